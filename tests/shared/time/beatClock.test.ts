import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { barsInSeconds, beatAt, rateForBars, reanchor, timeOfBeat } from '#shared/time/beatClock';

const clocks = fc.record({
  bpm: fc.double({ min: 20, max: 300, noNaN: true }),
  at: fc.double({ min: 1.7e12, max: 1.9e12, noNaN: true }),
  beat: fc.double({ min: -1e5, max: 1e5, noNaN: true }),
});

describe('bar arithmetic', () => {
  // Worked by hand: bars · 4 beats · 60 s ÷ bpm.
  it.each([
    [90, 21.333],
    [120, 16],
    [126, 15.238],
    [128, 15],
    [174, 11.034],
  ])('makes eight bars at %d bpm last %d s', (bpm, seconds) => {
    expect(barsInSeconds(8, bpm)).toBeCloseTo(seconds, 3);
  });

  it('plays a clip of 7.2 s on four bars at 126 bpm at 0.945', () => {
    expect(rateForBars(7.2, 4, 126)).toBeCloseTo(0.945, 3);
  });
});

describe('the beat clock', () => {
  it('reaches a beat at the time it gives for that beat', () => {
    fc.assert(
      fc.property(clocks, fc.double({ min: -1000, max: 1000, noNaN: true }), (clock, ahead) => {
        expect(beatAt(clock, timeOfBeat(clock, clock.beat + ahead))).toBeCloseTo(clock.beat + ahead, 2);
      }),
    );
  });

  it('keeps its phase when it is anchored anew', () => {
    fc.assert(
      fc.property(clocks, fc.double({ min: 0, max: 1e6, noNaN: true }), (clock, later) => {
        const moved = reanchor(clock, clock.at + later);
        const probe = clock.at + later + 12_345;
        expect(beatAt(moved, probe)).toBeCloseTo(beatAt(clock, probe), 3);
      }),
    );
  });
});
