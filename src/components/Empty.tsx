import type { ReactNode } from 'react';

/** First use: what this place is for and what to do next. */
export const Empty = ({
  title,
  children,
  action,
}: {
  title: string;
  children?: ReactNode;
  action?: ReactNode;
}) => (
  <div className="flex flex-col items-start gap-3 rounded-2xl border border-dashed border-(--line) p-8">
    <h2 className="text-xl font-bold">{title}</h2>
    {children && <div className="max-w-prose text-(--quiet)">{children}</div>}
    {action}
  </div>
);
