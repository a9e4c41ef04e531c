import type { Phase } from '#shared/api/shows';

/** Minutes the last phase is drawn for, as nothing follows it. */
export const lastPhaseMinutes = 45;
const dayMinutes = 24 * 60;

const minutesOf = (clock: string): number => {
  const [hours = 0, minutes = 0] = clock.split(':').map(Number);
  return hours * 60 + minutes;
};

/** A phase on the strip of the night: start and end as shares 0..1, energy as a share 0..1. */
export interface PhaseSpan {
  phase: Phase;
  from: number;
  to: number;
  energy: number;
}

/** Phases laid along the night, from the first start; times after midnight come after those before. */
export const nightSpans = (phases: readonly Phase[]): PhaseSpan[] => {
  const sorted = [...phases].sort((a, b) => a.position - b.position);
  const first = sorted[0];
  if (!first) return [];
  const begin = minutesOf(first.startsAt);
  const starts = sorted.map((phase) => (minutesOf(phase.startsAt) - begin + dayMinutes) % dayMinutes);
  const length = Math.max(...starts) + lastPhaseMinutes;
  return sorted.map((phase, index) => ({
    phase,
    from: (starts[index] ?? 0) / length,
    to: Math.max(starts[index] ?? 0, starts[index + 1] ?? length) / length,
    energy: phase.energy / 10,
  }));
};

/** Whether the phases start one after the other; two at the same minute do not. */
export const inOrder = (phases: readonly Phase[]): boolean => {
  const spans = nightSpans(phases);
  return spans.every((span, index) => index === 0 || span.from > (spans[index - 1]?.from ?? 0));
};

const round = (value: number): number => Math.round(value * 10) / 10;

/**
 * The night's energy as an SVG path in a box of width × height. Each phase reaches its energy in its middle; between
 * middles the line goes over with level ends, so that it never swings past a planned energy.
 */
export const energyPath = (spans: readonly PhaseSpan[], width: number, height: number): string => {
  const y = (energy: number) => round(height - energy * height * 0.92);
  const points = spans.map((span) => ({ x: ((span.from + span.to) / 2) * width, y: y(span.energy) }));
  const first = points[0];
  const last = points.at(-1);
  if (!first || !last) return '';
  const all = [{ x: 0, y: first.y }, ...points, { x: width, y: last.y }];
  return all
    .map((point, index) => {
      const before = all[index - 1];
      if (!before) return `M${round(point.x)} ${point.y}`;
      const middle = round((before.x + point.x) / 2);
      return `C${middle} ${before.y} ${middle} ${point.y} ${round(point.x)} ${point.y}`;
    })
    .join('');
};
