/** What opens a socket and asks whether a hub is there. Real ones in a page, others in tests. */
export interface GateParts {
  /** Asks the hub over HTTP, `limitMs` at the most. */
  probe: (limitMs: number) => Promise<'up' | 'refused' | 'silent'>;
  /** Opens a socket; resolves once it is open, or null when it was refused or took longer than `limitMs`. */
  open: (limitMs: number) => Promise<WebSocket | null>;
  /** Why a hub that is up lets this page in no more, in a sentence; null when nothing speaks against it. */
  whyNot: () => Promise<string | null>;
  wait: (ms: number) => Promise<void>;
  /** True once nobody wants the link any more. */
  stopped: () => boolean;
}

/** Times of the gate, ms. */
export const gateTimes = {
  probe: 800,
  /** A socket that hangs in a dead network is given up after this, never sooner: browsers space out attempts that are cancelled. */
  socket: 6000,
  /** Between two questions to a machine whose hub is not up: soon, and not all displays in step. */
  wait: 200,
  /** Least of the longest pause between two sockets that a hub which is up has refused; half as much again at the most. */
  longest: 1300,
} as const;

/** Pause after a number of sockets in a row that came to nothing, ms: doubled each time, never in step with others. */
export const pauseAfter = (failures: number): number =>
  Math.min(gateTimes.longest, gateTimes.wait * 2 ** Math.max(0, failures - 1)) * (1 + 0.5 * Math.random());

/**
 * Gets a socket, however long it takes. A plain HTTP question goes first, because a browser delays each new socket after
 * failed ones for up to a minute, but not questions: refused → ask again soon; no answer at all → try a socket anyhow, for
 * some networks pass sockets only; an answer → the socket. A hub that is up and refuses the socket is asked why.
 * @returns null only when stopped
 */
export async function passGate(parts: GateParts): Promise<WebSocket | { refused: string } | null> {
  let failures = 0;
  for (;;) {
    if (parts.stopped()) return null;
    const answer = await parts.probe(gateTimes.probe);
    if (parts.stopped()) return null;
    if (answer === 'refused') {
      failures = 0;
    } else {
      const socket = await parts.open(gateTimes.socket);
      if (socket) return socket;
      failures += 1;
      const refused = answer === 'up' && !parts.stopped() ? await parts.whyNot() : null;
      if (refused) return { refused };
    }
    if (parts.stopped()) return null;
    await parts.wait(pauseAfter(failures));
  }
}
