import { type BeatAnchor, beatAt, beatsPerBar, timeOfBeat } from '../time/beatClock';
import type { LandsOn } from './commands';

/** Least and most lead between stamp and landing, ms. */
export const leadLimits = { floor: 30, ceiling: 150 } as const;

const gridBeats: Record<Exclude<LandsOn, 'now'>, number> = {
  beat: 1,
  bar: beatsPerBar,
  '4 bars': 4 * beatsPerBar,
};

/** Beats this close past a grid point count as on it: 1e-6 beat is under a microsecond of music. */
const onGrid = 1e-6;

/**
 * Hub time (ms) at which a trigger stamped at `now` lands: the first point of the grid at or after now + lead.
 * @param lead ms that the slowest healthy display needs; clamped to leadLimits
 */
export const landing = (clock: BeatAnchor, landsOn: LandsOn, now: number, lead: number): number => {
  const earliest = now + Math.min(leadLimits.ceiling, Math.max(leadLimits.floor, lead));
  if (landsOn === 'now') return earliest;
  const grid = gridBeats[landsOn];
  const beat = Math.ceil(beatAt(clock, earliest) / grid - onGrid) * grid;
  return Math.max(earliest, timeOfBeat(clock, beat));
};
