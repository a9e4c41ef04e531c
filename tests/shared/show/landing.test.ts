import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { landing, leadLimits } from '#shared/show/landing';
import { beatAt } from '#shared/time/beatClock';

const clocks = fc.record({
  bpm: fc.double({ min: 60, max: 200, noNaN: true }),
  at: fc.double({ min: 0, max: 1e6, noNaN: true }),
  beat: fc.double({ min: 0, max: 1000, noNaN: true }),
});
const moments = fc.double({ min: 1e6, max: 2e6, noNaN: true });
const leads = fc.double({ min: 0, max: 400, noNaN: true });
const grids = [
  ['beat', 1],
  ['bar', 4],
  ['4 bars', 16],
] as const;

describe('where a trigger lands', () => {
  it('[LAND1] is never before its stamp and the lead of the slowest healthy display', () => {
    fc.assert(
      fc.property(
        clocks,
        moments,
        leads,
        fc.constantFrom('now', 'beat', 'bar', '4 bars'),
        (clock, now, lead, on) => {
          const held = Math.min(leadLimits.ceiling, Math.max(leadLimits.floor, lead));
          expect(landing(clock, on, now, lead)).toBeGreaterThanOrEqual(now + held);
        },
      ),
    );
  });

  it('[LAND2] is the first point of its grid after that', () => {
    fc.assert(
      fc.property(clocks, moments, leads, fc.constantFrom(...grids), (clock, now, lead, [on, beats]) => {
        const at = landing(clock, on, now, lead);
        const place = beatAt(clock, at) / beats;
        expect(Math.abs(place - Math.round(place)) * beats).toBeLessThan(1e-3);
        // One grid step earlier would be before the lead is over.
        const step = (beats * 60_000) / clock.bpm;
        expect(at - step).toBeLessThan(now + leadLimits.ceiling + 1e-3);
        const held = Math.min(leadLimits.ceiling, Math.max(leadLimits.floor, lead));
        expect(at - step).toBeLessThan(now + held + 1e-3);
      }),
    );
  });

  it('[LAND3] is held between 30 and 150 ms of lead', () => {
    const clock = { bpm: 120, at: 0, beat: 0 };
    expect(landing(clock, 'now', 1000, 0)).toBe(1030);
    expect(landing(clock, 'now', 1000, 80)).toBe(1080);
    expect(landing(clock, 'now', 1000, 5000)).toBe(1150);
  });

  it('is on the bar by hand: 126 bpm, beat 0 at 0, stamped at 5 s', () => {
    // Worked by hand: a beat lasts 476.190 ms, a bar 1904.762 ms; bar 3 begins at 5714.286 ms, beat 11 at 5238.095 ms.
    const clock = { bpm: 126, at: 0, beat: 0 };
    expect(landing(clock, 'beat', 5000, 40)).toBeCloseTo(5238.095, 3);
    expect(landing(clock, 'bar', 5000, 40)).toBeCloseTo(5714.286, 3);
    expect(landing(clock, '4 bars', 5000, 40)).toBeCloseTo(7619.048, 3);
  });

  it('is the next point when a grid point is nearer than the lead', () => {
    // The beat at 500 ms is 20 ms away, less than the lead of 30.
    expect(landing({ bpm: 120, at: 0, beat: 0 }, 'beat', 480, 30)).toBe(1000);
  });
});
