import type { ReactNode } from 'react';

const looks = {
  on: { sign: '●', colour: 'text-(--firefly)' },
  sent: { sign: '◔', colour: 'text-(--moonlight)' },
  look: { sign: '▲', colour: 'text-(--amber)' },
  broken: { sign: '✕', colour: 'text-(--coral)' },
} as const;

/** A state by sign and colour, never by colour alone. */
export const StateTag = ({ state, children }: { state: keyof typeof looks; children: ReactNode }) => (
  <span className={`inline-flex items-center gap-1.5 whitespace-nowrap ${looks[state].colour}`}>
    <span aria-hidden="true">{looks[state].sign}</span>
    {children}
  </span>
);
