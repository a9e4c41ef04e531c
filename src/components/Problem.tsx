import { Button } from './Button';

interface Props {
  /** Anything thrown; a ProblemError speaks for itself. */
  problem: unknown;
  onRetry?: () => void;
}

interface Said {
  detail: string;
  mend?: string;
  fields?: { path: string; message: string }[];
}

const said = (problem: unknown): Said => {
  if (typeof problem === 'object' && problem !== null && 'detail' in problem) return problem as Said;
  return { detail: problem instanceof Error ? problem.message : 'Something did not work.' };
};

/** What went wrong and how to mend it. */
export const Problem = ({ problem, onRetry }: Props) => {
  const { detail, mend, fields = [] } = said(problem);
  return (
    <div
      role="alert"
      className="flex flex-wrap items-center gap-3 rounded-xl border border-dashed border-(--coral) p-4"
    >
      <div className="min-w-0 flex-1">
        <p className="font-bold text-(--coral)">{detail}</p>
        {mend && <p>{mend}</p>}
        {fields.map((field) => (
          <p key={`${field.path} ${field.message}`} className="text-sm">
            {field.path}: {field.message}
          </p>
        ))}
      </div>
      {onRetry && <Button onClick={onRetry}>Try again</Button>}
    </div>
  );
};
