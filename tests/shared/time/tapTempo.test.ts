import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { addTap, beatForTap, tappedTempo } from '#shared/time/tapTempo';

const grid = (bpm: number, taps: number, from = 1000) =>
  Array.from({ length: taps }, (_, i) => from + (i * 60_000) / bpm);

/** Worst slope error of least squares over n even points when each may be `jitter` off, ms a beat. */
const worstSlope = (n: number, jitter: number) => {
  const offsets = Array.from({ length: n }, (_, i) => i - (n - 1) / 2);
  const reach = offsets.reduce((sum, x) => sum + Math.abs(x), 0);
  return (jitter * reach) / offsets.reduce((sum, x) => sum + x * x, 0);
};

describe('tap tempo', () => {
  test('even taps give the tempo exactly, from 85 to 175', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 85, max: 175, noNaN: true }),
        fc.integer({ min: 2, max: 40 }),
        (bpm, n) => {
          expect(tappedTempo(grid(bpm, n))?.bpm).toBeCloseTo(bpm, 6);
        },
      ),
    );
  });

  // Worked taps: 60000·(n − 1)/(last − first), by hand: 4 taps 0 470 937 1407 and 5 taps 0 345 690 1034 1379.
  test.each([
    [[0, 500, 1000, 1500], 120],
    [[0, 470, 937, 1407], 127.93],
    [[0, 345, 690, 1034, 1379], 174.04],
  ])('worked taps %j give %f beats a minute within a tenth', (taps, bpm) => {
    expect(Math.abs((tappedTempo(taps)?.bpm ?? 0) - bpm)).toBeLessThan(0.1);
  });

  test('four taps off by up to 10 ms miss by no more than least squares must', () => {
    const jitter = fc.array(fc.integer({ min: -10, max: 10 }), { minLength: 4, maxLength: 4 });
    fc.assert(
      fc.property(fc.integer({ min: 90, max: 165 }), jitter, (bpm, off) => {
        const beat = 60_000 / bpm;
        const tapped = tappedTempo(grid(bpm, 4).map((t, i) => t + (off[i] ?? 0)));
        expect(Math.abs(60_000 / (tapped?.bpm ?? 1) - beat)).toBeLessThanOrEqual(worstSlope(4, 10) + 1e-6);
      }),
    );
  });

  test('sixteen taps off by up to 10 ms miss by half a beat a minute at 128 even at worst', () => {
    const jitter = fc.array(fc.integer({ min: -10, max: 10 }), { minLength: 16, maxLength: 16 });
    fc.assert(
      fc.property(jitter, (off) => {
        const tapped = tappedTempo(grid(128, 16).map((t, i) => t + (off[i] ?? 0)));
        expect(Math.abs((tapped?.bpm ?? 0) - 128)).toBeLessThan(0.55);
      }),
    );
  });

  test('a beat left out, a bounce of the thumb and one late tap do not bend the tempo', () => {
    const even = grid(126, 9);
    expect(tappedTempo(even.filter((_, i) => i !== 4))?.bpm).toBeCloseTo(126, 6);
    expect(tappedTempo([...even.slice(0, 5), (even[4] ?? 0) + 40, ...even.slice(5)])?.bpm).toBeCloseTo(
      126,
      6,
    );
    expect(tappedTempo(even.map((t, i) => (i === 5 ? t + 170 : t)))?.bpm).toBeCloseTo(126, 1);
  });

  test.each([
    [64, 128],
    [43, 86],
    [190, 95],
    [340, 170],
    [85, 85],
    [175, 175],
  ])('taps at %i a minute count as %i', (tapped, bpm) => {
    expect(tappedTempo(grid(tapped, 6))?.bpm).toBeCloseTo(bpm, 6);
  });

  test('two seconds of pause begin a new series', () => {
    expect(addTap([0, 500], 2499)).toEqual([0, 500, 2499]);
    expect(addTap([0, 500], 2500)).toEqual([2500]);
    expect(addTap([0, 500], 400)).toEqual([400]);
  });

  test('one tap is no tempo', () => {
    expect(tappedTempo([])).toBeNull();
    expect(tappedTempo([5])).toBeNull();
  });

  test('the first tap is the one, also when tapped at half time', () => {
    expect(tappedTempo(grid(120, 6))).toMatchObject({ beatsFromOne: 5 });
    expect(tappedTempo(grid(60, 6))).toMatchObject({ beatsFromOne: 10 });
  });

  test('a tapped grid moves the beat position by two beats at most', () => {
    const anything = fc.record({
      beat: fc.integer({ min: -100_000, max: 100_000 }),
      at: fc.integer({ min: 0, max: 1e9 }),
      taps: fc.integer({ min: 0, max: 64 }),
    });
    fc.assert(
      fc.property(anything, ({ beat, at, taps }) => {
        const to = beatForTap({ bpm: 128, at, beat }, at, taps);
        expect((((to - taps) % 4) + 4) % 4).toBe(0);
        expect(Math.abs(to - beat)).toBeLessThanOrEqual(2);
      }),
    );
  });
});
