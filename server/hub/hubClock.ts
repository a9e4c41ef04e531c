/** Hub time in ms: near Unix time, from the monotonic clock, so that it never runs backwards. */
export const hubNow = (): number => performance.timeOrigin + performance.now();
