import type { ReactNode } from 'react';

interface Props {
  title: string;
  /** Beside the title, quiet. */
  note?: ReactNode;
  /** Right end of the title's line. */
  end?: ReactNode;
  className?: string;
  children: ReactNode;
}

/** One subject on a page: a title and what belongs to it. */
export const Card = ({ title, note, end, className = '', children }: Props) => (
  <section
    aria-label={title}
    className={`min-w-0 rounded-2xl border border-(--line) bg-(--raised) p-4 md:p-5 ${className}`}
  >
    <div className="mb-3 flex flex-wrap items-center gap-x-3 gap-y-2">
      <h2 className="text-lg font-bold">{title}</h2>
      {note && <p className="text-sm text-(--quiet)">{note}</p>}
      {end && <div className="ml-auto flex flex-wrap gap-2">{end}</div>}
    </div>
    {children}
  </section>
);
