/** Limits of one socket and of all. Bytes, ms, counts. */
export const hubLimits = {
  payload: 64 * 1024,
  /** A receiver that has this much waiting is cut: it joins again and gets the newest state. */
  backlog: 1024 * 1024,
  sockets: 2000,
  socketsPerAddress: 1000,
  /** Unreadable messages after which a socket is closed. */
  junk: 10,
  commandsPerSecond: 40,
  draftsPerSecond: 120,
  othersPerSecond: 400,
  /** Least time between two pictures of a display and screen. */
  pictureMs: 400,
} as const;

/**
 * A token bucket: `perSecond` on average, twice that at once.
 * @returns whether one more is within the limit at `now` (ms)
 */
export function bucket(perSecond: number): (now: number) => boolean {
  let tokens = perSecond * 2;
  let last: number | null = null;
  return (now) => {
    tokens = Math.min(perSecond * 2, tokens + ((now - (last ?? now)) * perSecond) / 1000);
    last = now;
    if (tokens < 1) return false;
    tokens -= 1;
    return true;
  };
}
