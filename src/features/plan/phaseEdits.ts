import type { Phase } from '#shared/api/shows';

/** Dusk to dawn: colours that new phases take in turn. */
const dusk = ['#7d6bd6', '#3f7fd0', '#2ba89a', '#d3f84b', '#e58aa6', '#ffb98a'] as const;

/** Phases with positions counted again from 0. */
export const renumber = (phases: readonly Phase[]): Phase[] =>
  phases.map((phase, position) => ({ ...phase, position }));

/** One hour after a clock time, over midnight when it must. */
export const hourLater = (clock: string): string => {
  const [hours = 0, minutes = 0] = clock.split(':').map(Number);
  return `${String((hours + 1) % 24).padStart(2, '0')}:${String(minutes).padStart(2, '0')}`;
};

/** Adds a phase at the end, an hour after the last. */
export const addPhase = (phases: readonly Phase[], id: string): Phase[] => {
  const last = phases.at(-1);
  return renumber([
    ...phases,
    {
      id,
      name: `Phase ${phases.length + 1}`,
      colour: dusk[phases.length % dusk.length] ?? dusk[0],
      startsAt: last ? hourLater(last.startsAt) : '21:00',
      energy: last?.energy ?? 3,
      brightness: last?.brightness ?? 0.8,
      flashes: 0,
      position: phases.length,
    },
  ]);
};
