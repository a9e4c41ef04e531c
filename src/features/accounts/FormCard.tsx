import type { FormEvent, ReactNode } from 'react';
import { Button } from '@/components/Button';
import { Problem } from '@/components/Problem';

interface Props {
  title: string;
  intro?: ReactNode;
  submit: string;
  busy: boolean;
  problem: unknown;
  onSubmit: () => void;
  children: ReactNode;
  foot?: ReactNode;
}

/** A form of one column: fields, what went wrong, one button. */
export const FormCard = ({ title, intro, submit, busy, problem, onSubmit, children, foot }: Props) => (
  <form
    noValidate
    className="mx-auto mt-6 flex max-w-md flex-col gap-4 rounded-2xl border border-(--line) bg-(--raised) p-6"
    onSubmit={(event: FormEvent) => {
      event.preventDefault();
      onSubmit();
    }}
  >
    <h2 className="text-2xl font-bold">{title}</h2>
    {intro && <div className="text-(--quiet)">{intro}</div>}
    {children}
    {problem ? <Problem problem={problem} /> : null}
    <Button variant="primary" type="submit" disabled={busy}>
      {busy ? 'One moment' : submit}
    </Button>
    {foot && <div className="text-sm text-(--quiet)">{foot}</div>}
  </form>
);
