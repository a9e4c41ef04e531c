/** Beats in a bar (common practice for club music; no source). */
export const beatsPerBar = 4;

/** A tempo and the beat position at a moment: valid on any machine that shares the hub clock. */
export interface BeatAnchor {
  /** Beats a minute. */
  bpm: number;
  /** Hub ms. */
  at: number;
  /** Beat position at `at`. */
  beat: number;
}

/** Position of the beat clock at hub time `t` (ms): beat + (t − at)·bpm/60000. */
export const beatAt = (clock: BeatAnchor, t: number): number =>
  clock.beat + ((t - clock.at) * clock.bpm) / 60_000;

/** Hub time (ms) at which the clock reaches `beat`. */
export const timeOfBeat = (clock: BeatAnchor, beat: number): number =>
  clock.at + ((beat - clock.beat) * 60_000) / clock.bpm;

/** The same clock, anchored at `t`: no change of phase. */
export const reanchor = <C extends BeatAnchor>(clock: C, t: number): C => ({
  ...clock,
  at: t,
  beat: beatAt(clock, t),
});

/** Length in seconds of a number of bars: 8 bars at 90 bpm last 21.333 s. */
export const barsInSeconds = (bars: number, bpm: number): number => (bars * beatsPerBar * 60) / bpm;

/** Playing speed that makes a clip of `lengthS` last `bars` at `bpm`: 7.2 s on 4 bars at 126 → 0.945. */
export const rateForBars = (lengthS: number, bars: number, bpm: number): number =>
  lengthS / barsInSeconds(bars, bpm);
