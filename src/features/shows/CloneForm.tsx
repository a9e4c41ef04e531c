import { cloneShowSchema, type Show } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { Problem } from '@/components/Problem';
import { useForm } from '@/lib/useForm';

interface Props {
  show: Show;
  date: string;
  busy: boolean;
  problem: unknown;
  onSubmit: (values: { name: string; date: string }) => void;
}

/** The same night again on another date: phases, scenes and venue come along; displays and what ran do not. */
export const CloneForm = ({ show, date, busy, problem, onSubmit }: Props) => {
  const form = useForm(cloneShowSchema, { name: `${show.name} again`.slice(0, 60), date });
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        const values = form.check();
        if (values) onSubmit(values);
      }}
    >
      <p className="text-(--quiet)">
        Phases, scenes and venue come along. Displays and the as-run log do not.
      </p>
      <Field label="Name of the night" required {...form.text('name')} />
      <Field label="Date" type="date" required {...form.text('date')} />
      {problem ? <Problem problem={problem} /> : null}
      <Button variant="primary" type="submit" disabled={busy}>
        Clone it
      </Button>
    </form>
  );
};
