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
  /** Simulated displays that one page of a rehearsal may speak for. */
  simulatedPerPage: 64,
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

/** Counts who is at the door or inside, so that many at once cannot slip in between asking and sitting down. */
export interface Door {
  /** Whether one more from this address may come in; if so it is counted until `leave`. */
  enter: (address: string) => boolean;
  leave: (address: string) => void;
}

export function makeDoor(most: number, mostPerAddress: number): Door {
  const byAddress = new Map<string, number>();
  let all = 0;
  return {
    enter: (address) => {
      const here = byAddress.get(address) ?? 0;
      if (all >= most || here >= mostPerAddress) return false;
      all += 1;
      byAddress.set(address, here + 1);
      return true;
    },
    leave: (address) => {
      all -= 1;
      const left = (byAddress.get(address) ?? 1) - 1;
      if (left > 0) byAddress.set(address, left);
      else byAddress.delete(address);
    },
  };
}
