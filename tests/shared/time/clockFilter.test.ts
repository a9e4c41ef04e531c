import { describe, expect, it } from 'vitest';
import {
  addExchange,
  type Clock,
  clockError,
  emptyClock,
  hubTime,
  leastDelay,
  sampleOf,
} from '#shared/time/clockFilter';

/** Numbers from 0 to 1 that are the same in each run (Lehmer's generator, minimal standard). */
function numbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48_271) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}

interface Simulated {
  /** Hub time minus page time at page time 0, ms. */
  offset: number;
  /** Hub ms a page ms, less one. */
  skew: number;
  /** Most extra one-way time up and down, ms. */
  jitterUp: number;
  jitterDown: number;
}

/** Exchanges once a second over a link whose truth is known; returns errors from `from` seconds on, ms, sorted. */
function errorsOf(link: Simulated, seconds: number, from: number, seed = 7): number[] {
  const random = numbers(seed);
  const truth = (local: number) => local * (1 + link.skew) + link.offset;
  let clock: Clock = emptyClock;
  const errors: number[] = [];
  for (let second = 0; second < seconds; second += second < 3 ? 0.25 : 1) {
    const t1 = second * 1000;
    const up = 2 + link.jitterUp * random();
    const t4 = t1 + up + 0.1 + 2 + link.jitterDown * random();
    clock = addExchange(clock, { t1, t2: truth(t1 + up), t3: truth(t1 + up + 0.1), t4 });
    if (second >= from) errors.push(Math.abs(hubTime(clock, t4 + 400) - truth(t4 + 400)));
  }
  return errors.sort((a, b) => a - b);
}

const p95 = (sorted: readonly number[]) => sorted[Math.floor(sorted.length * 0.95)] ?? Number.NaN;

describe('one exchange', () => {
  it('gives the offset and delay of the four-timestamp formulas', () => {
    // RFC 5905 section 8: θ = ((T2−T1)+(T3−T4))/2, δ = (T4−T1)−(T3−T2), worked by hand.
    const sample = sampleOf({ t1: 100, t2: 107.52, t3: 107.523, t4: 100.043 });
    expect(sample.offset).toBeCloseTo(7.5, 9);
    expect(sample.delay).toBeCloseTo(0.04, 9);
  });
});

describe('the clock filter', () => {
  it('trusts the least delay of the last eight', () => {
    // RFC 5905 section 10: the sample of minimum delay in the eight-stage shift register.
    const delays = [1, 30, 20, 40, 25, 60, 22, 35, 28];
    const samples = delays.map((delay, local) => ({ local, offset: 0, delay }));
    expect(leastDelay(samples)?.delay).toBe(20);
  });

  it('stays within 2 ms of the truth at 20 ms of jitter that is all on one way', () => {
    const link = { offset: 1.76e12, skew: 4e-5, jitterUp: 20, jitterDown: 0 };
    const errors = errorsOf(link, 180, 30);
    expect(p95(errors)).toBeLessThan(2);
  });

  it('has settled after three seconds on a quiet link', () => {
    const errors = errorsOf({ offset: -5000, skew: 2e-5, jitterUp: 1, jitterDown: 1 }, 30, 3);
    expect(errors.at(-1)).toBeLessThan(1);
  });

  it('never runs backwards, even when the hub turns out to be behind', () => {
    let clock = addExchange(emptyClock, { t1: 0, t2: 1000, t3: 1000, t4: 2 });
    clock = addExchange(clock, { t1: 1000, t2: 1900, t3: 1900, t4: 1002 });
    let before = hubTime(clock, 1002);
    for (let local = 1003; local < 9000; local += 7) {
      const at = hubTime(clock, local);
      expect(at).toBeGreaterThanOrEqual(before);
      before = at;
    }
  });

  it('says nothing before the first answer', () => {
    expect(hubTime(emptyClock, 5)).toBeNaN();
    expect(clockError(emptyClock)).toBeNull();
  });
});
