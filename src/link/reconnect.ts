/** What opens a socket and asks whether a hub is there. Real ones in a page, others in tests. */
export interface GateParts {
  /** Asks the hub over HTTP, `limitMs` at the most. */
  probe: (limitMs: number) => Promise<'up' | 'refused' | 'silent'>;
  /** Opens a socket; resolves once it is open, or null when it was refused or took longer than `limitMs`. */
  open: (limitMs: number) => Promise<WebSocket | null>;
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
} as const;

/**
 * Gets a socket, however long it takes. A plain HTTP question goes first, because a browser delays each new socket after
 * failed ones for up to a minute, but not questions: refused → ask again soon; no answer at all → try a socket anyhow, for
 * some networks pass sockets only; an answer → the socket.
 * @returns null only when stopped
 */
export async function passGate(parts: GateParts): Promise<WebSocket | null> {
  for (;;) {
    if (parts.stopped()) return null;
    const answer = await parts.probe(gateTimes.probe);
    if (parts.stopped()) return null;
    if (answer !== 'refused') {
      const socket = await parts.open(gateTimes.socket);
      if (socket) return socket;
    }
    if (parts.stopped()) return null;
    await parts.wait(gateTimes.wait * (1 + 0.5 * Math.random()));
  }
}
