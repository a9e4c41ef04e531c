import { type BeatAnchor, beatAt, beatsPerBar } from './beatClock';

/** A pause this long (ms) ends a series of taps: at the slowest folded tempo a beat lasts 706 ms. */
export const tapPauseMs = 2000;
/** Taps that are looked at; older ones fall away, so that the tempo can drift. */
const keptTaps = 16;
/** Taps before a tempo is trusted enough to be sent. */
export const tapsToSend = 4;
/** Range that a tapped tempo is folded into, beats a minute: twice the least lies inside, so every tempo has a home in it. */
export const tapRange = { least: 85, most: 175 } as const;
/** A tap further than this share of a beat from the line of the others is an outlier. */
const outlierShare = 0.2;

/** A tempo tapped by hand: the tempo, and a moment at which tap number `tap` lies on the fitted grid. */
export interface TappedTempo {
  bpm: number;
  /** Fitted time of the newest tap, ms, on the clock of the taps. */
  at: number;
  /** Beats from the first tap to `at`; the first tap is “the one”. */
  beatsFromOne: number;
  /** Taps in the series. */
  taps: number;
}

/** The series with one more tap at `t` (ms, monotonic): a pause of 2 s or a step back in time begins anew. */
export const addTap = (taps: readonly number[], t: number): readonly number[] => {
  const last = taps.at(-1);
  return last === undefined || t - last >= tapPauseMs || t <= last ? [t] : [...taps, t];
};

const median = (values: readonly number[]): number => {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  const upper = sorted[middle] ?? 0;
  return sorted.length % 2 === 1 ? upper : ((sorted[middle - 1] ?? upper) + upper) / 2;
};

interface Point {
  /** Beat that the tap belongs to, counted from the first tap. */
  beat: number;
  t: number;
}

interface Line {
  /** ms at beat 0. */
  origin: number;
  /** ms a beat. */
  period: number;
}

/** Ordinary least squares of time over beat number. */
const lineThrough = (points: readonly Point[]): Line => {
  const n = points.length;
  const meanBeat = points.reduce((sum, point) => sum + point.beat, 0) / n;
  const meanT = points.reduce((sum, point) => sum + point.t, 0) / n;
  const over = points.reduce((sum, { beat, t }) => sum + (beat - meanBeat) * (t - meanT), 0);
  const under = points.reduce((sum, { beat }) => sum + (beat - meanBeat) ** 2, 0);
  const period = over / under;
  return { origin: meanT - period * meanBeat, period };
};

/** Numbers each tap by its gap, so that a beat left out counts as two and a bounce of the thumb as none. */
const number = (taps: readonly number[], period: number): Point[] => {
  const points: Point[] = [];
  let beat = 0;
  taps.forEach((t, i) => {
    const before = taps[i - 1];
    if (before === undefined) points.push({ beat, t });
    else {
      const steps = Math.round((t - before) / period);
      beat += steps;
      if (steps > 0) points.push({ beat, t });
    }
  });
  return points;
};

/** The line without the taps that lie off it; falls back to all when too few would be left. */
const fitWithout = (points: readonly Point[], period: number): Line => {
  const first = lineThrough(points);
  const good = points.filter(
    ({ beat, t }) => Math.abs(t - first.origin - first.period * beat) <= outlierShare * period,
  );
  return good.length >= 3 && good.length < points.length ? lineThrough(good) : first;
};

/** A hand on the edge of the range is not folded away from it, beats a minute. */
const foldSlack = 0.5;

/** Factor that brings a tempo into tapRange by doubling or halving. */
const foldFactor = (bpm: number): number => {
  if (bpm < tapRange.least - foldSlack) return 2 * foldFactor(bpm * 2);
  return bpm > tapRange.most + foldSlack ? foldFactor(bpm / 2) / 2 : 1;
};

/**
 * The tempo of a series of taps (ms): least squares over the numbered taps, outliers left out, folded into 85–175.
 * Null for fewer than two taps.
 */
export const tappedTempo = (taps: readonly number[]): TappedTempo | null => {
  const one = taps[0];
  if (one === undefined || taps.length < 2) return null;
  const recent = taps.slice(-keptTaps);
  const gaps = recent.slice(1).map((t, i) => t - (recent[i] ?? t));
  const typical = median(gaps);
  const points = number(recent, typical);
  if (points.length < 2) return null;
  const { origin, period } = fitWithout(points, typical);
  const factor = foldFactor(60_000 / period);
  const bpm = (60_000 / period) * factor;
  const newest = points.at(-1) ?? { beat: 0, t: one };
  const at = origin + period * newest.beat;
  return { bpm, at, beatsFromOne: Math.round(((at - one) / period) * factor), taps: taps.length };
};

/**
 * Beat position for a tapped grid that puts the first tap on the first beat of a bar, and lies nearest to where the
 * running clock is at `at` (hub ms): scenes that count their own beats do not jump by more than two.
 */
export const beatForTap = (clock: BeatAnchor, at: number, beatsFromOne: number): number => {
  const place = ((beatsFromOne % beatsPerBar) + beatsPerBar) % beatsPerBar;
  return Math.round((beatAt(clock, at) - place) / beatsPerBar) * beatsPerBar + place;
};
