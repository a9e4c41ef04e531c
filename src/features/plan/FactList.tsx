import type { ReactNode } from 'react';

export interface Fact {
  what: string;
  value: ReactNode;
}

/** Facts, one a line: what it is and how it stands. */
export const FactList = ({ facts }: { facts: readonly Fact[] }) => (
  <dl className="divide-y divide-(--line)">
    {facts.map(({ what, value }) => (
      <div key={what} className="flex flex-wrap justify-between gap-x-4 py-2">
        <dt>{what}</dt>
        <dd className="text-right text-(--quiet)">{value}</dd>
      </div>
    ))}
  </dl>
);
