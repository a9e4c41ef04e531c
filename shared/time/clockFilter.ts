/** The four timestamps of one exchange, ms: sent and received on the page's clock (t1, t4), on the hub's (t2, t3). */
export interface Exchange {
  t1: number;
  t2: number;
  t3: number;
  t4: number;
}

/** One measured offset: hub time minus page time, and the round trip, ms. */
export interface ClockSample {
  /** Page's monotonic ms in the middle of the exchange. */
  local: number;
  offset: number;
  delay: number;
}

/** On-wire offset and delay: θ = ((T2−T1)+(T3−T4))/2, δ = (T4−T1)−(T3−T2). RFC 5905 section 8. */
export const sampleOf = ({ t1, t2, t3, t4 }: Exchange): ClockSample => ({
  local: (t1 + t4) / 2,
  offset: (t2 - t1 + (t3 - t4)) / 2,
  delay: t4 - t1 - (t3 - t2),
});

/** The sample with the least delay of the last eight. RFC 5905 section 10. Undefined without a sample. */
export const leastDelay = (samples: readonly ClockSample[]): ClockSample | undefined =>
  samples
    .slice(-8)
    .reduce<ClockSample | undefined>(
      (best, sample) => (best && best.delay <= sample.delay ? best : sample),
      undefined,
    );

/** Samples that are looked at: a minute at two a second. */
const kept = 120;
/** Quartz is rarely worse than 100 ppm; a fit that says more than half as much again is bent back. */
const mostSkew = 1.5e-4;
/** Speed of corrections: 20 ms a second, too slow to be seen in a picture. */
const slewRate = 0.02;
/** A pause between samples this long means that the page slept, ms. */
const sleepMs = 10_000;
/** An error this large after a sleep is stepped over, ms. */
const stepMs = 50;

/**
 * A disciplined clock as a plain value: hub time is a line from `base` at `1 + skew`, plus what is left to slew.
 * Replaced at each sample; reading it changes nothing.
 */
export interface Clock {
  samples: readonly ClockSample[];
  /** null before the first sample. */
  base: { local: number; hub: number } | null;
  skew: number;
  /** ms still to be worked in, at `rate` ms a ms. */
  left: number;
  rate: number;
}

export const emptyClock: Clock = { samples: [], base: null, skew: 0, left: 0, rate: slewRate };

const clamp = (value: number, most: number): number => Math.min(most, Math.max(-most, value));

/** Hub time (ms) at a page time. Never runs backwards from the clock's base on; NaN before the first sample. */
export const hubTime = ({ base, skew, left, rate }: Clock, local: number): number => {
  if (!base) return Number.NaN;
  const passed = local - base.local;
  return base.hub + passed * (1 + skew) + (passed > 0 ? clamp(left, rate * passed) : 0);
};

/** Half the least delay of the last eight bounds the offset's error on any path, ms. Null without a sample. */
export const clockError = ({ samples }: Clock): number | null => {
  const best = leastDelay(samples);
  return best ? Math.max(0, best.delay) / 2 : null;
};

/** Least round trip of the last eight, ms. */
export const roundTrip = ({ samples }: Clock): number | null => leastDelay(samples)?.delay ?? null;

/** What a sample that waited `excess` ms longer than the best is worth, 0..1, by the usual excess of good ones. */
const worth = (excess: number, scale: number): number => (1 + (excess / scale) ** 2) ** -2;

/**
 * Offset and skew at `local`: weighted least squares over the kept samples, those with little queueing count most.
 * The skew is pulled towards what was believed before while few samples speak against it.
 */
const fitOffset = (
  samples: readonly ClockSample[],
  local: number,
  before: number,
): { offset: number; skew: number } => {
  const least = Math.min(...samples.map((sample) => sample.delay));
  const good = samples
    .map((sample) => sample.delay - least)
    .sort((a, b) => a - b)
    .slice(0, 6);
  const scale = 0.3 + good.reduce((sum, excess) => sum + excess, 0) / good.length;
  let [w, x, y, xx, xy] = [0, 0, 0, 0, 0];
  for (const sample of samples) {
    const weight = worth(sample.delay - least, scale);
    const at = sample.local - local;
    w += weight;
    x += weight * at;
    y += weight * sample.offset;
    xx += weight * at * at;
    xy += weight * at * sample.offset;
  }
  // The belief is good to 20 ppm, weighed against samples that are good to about a third of their scale.
  const prior = (scale / 3) ** 2 / 2e-5 ** 2;
  const spread = xx - (x * x) / w;
  const skew = clamp((xy - (x * y) / w + before * prior) / (spread + prior), mostSkew);
  return { offset: (y - skew * x) / w, skew };
};

/**
 * The clock after one more exchange. Small errors are slewed; an error of 50 ms or more is stepped over only at the
 * first sample or after a sleep. A step back is waited for, never run backwards.
 */
export const addExchange = (clock: Clock, exchange: Exchange): Clock => {
  const sample = sampleOf(exchange);
  const now = exchange.t4;
  const last = clock.samples.at(-1);
  const woke = last === undefined || sample.local - last.local > sleepMs;
  const samples = [...(woke ? [] : clock.samples.slice(1 - kept)), sample];
  // Offsets near Unix time would eat the precision of the sums.
  const whole = Math.floor(sample.offset);
  const relative = samples.map((one) => ({ ...one, offset: one.offset - whole }));
  const { offset, skew } = fitOffset(relative, now, clock.skew);
  const target = now + whole + offset;
  const set = (hub: number, left: number, rate = slewRate): Clock => ({
    samples,
    base: { local: now, hub },
    skew,
    left,
    rate,
  });
  if (!clock.base) return set(target, 0);
  const hub = hubTime(clock, now);
  const left = target - hub;
  if (woke && left >= stepMs) return set(target, 0);
  // 0.98: even while it waits for the hub to catch up, time creeps forward.
  return set(hub, left, woke && left <= -stepMs ? 0.98 : slewRate);
};
