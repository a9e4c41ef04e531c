import { useQuery } from '@tanstack/react-query';
import type { z } from 'zod';
import { type Brand, newShowSchema, type Venue } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { Problem } from '@/components/Problem';
import { Select } from '@/components/Select';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import { useForm } from '@/lib/useForm';

export type ShowValues = z.output<typeof newShowSchema>;

interface Props {
  start: z.input<typeof newShowSchema>;
  submit: string;
  busy: boolean;
  problem: unknown;
  onSubmit: (values: ShowValues) => void;
}

const named = (none: string, list: readonly { id: string; name: string }[] | undefined) => [
  { value: '', label: none },
  ...(list ?? []).map(({ id, name }) => ({ value: id, label: name })),
];

/** What a show is: name, night, place and for whom. */
export const ShowForm = ({ start, submit, busy, problem, onSubmit }: Props) => {
  const form = useForm(newShowSchema, start);
  const venues = useQuery({ queryKey: queryKeys.venues, queryFn: () => api.get<Venue[]>('/api/venues') });
  const brands = useQuery({ queryKey: queryKeys.brands, queryFn: () => api.get<Brand[]>('/api/brands') });
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
      <Field label="Name of the night" required {...form.text('name')} />
      <Field
        label="Date"
        type="date"
        hint="The day on which it begins, however late it ends."
        required
        {...form.text('date')}
      />
      <Select
        label="Venue"
        value={form.values.venueId ?? ''}
        options={named('not known yet', venues.data)}
        onChange={(event) => form.set('venueId', event.target.value || null)}
      />
      <Field label="Client" {...form.text('client')} />
      <Select
        label="Brand"
        value={form.values.brandId ?? ''}
        options={named('none', brands.data)}
        onChange={(event) => form.set('brandId', event.target.value || null)}
      />
      {problem ? <Problem problem={problem} /> : null}
      <Button variant="primary" type="submit" disabled={busy}>
        {busy ? 'One moment' : submit}
      </Button>
    </form>
  );
};
