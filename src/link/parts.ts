import type { KeepStore } from './drawnQueue';

/** What a link stands on. */
export interface LinkParts {
  WebSocket: typeof WebSocket;
  fetch: typeof fetch;
  /** Monotonic ms. */
  now: () => number;
  /** http://host of the hub. */
  origin: string;
  store: KeepStore | null;
}

const storage = (): KeepStore | null => {
  try {
    return window.localStorage;
  } catch {
    return null;
  }
};

/** Those of a page. */
export const pageParts = (): LinkParts => ({
  WebSocket: window.WebSocket,
  fetch: window.fetch.bind(window),
  now: () => performance.now(),
  origin: window.location.origin,
  store: storage(),
});

/** Asks the hub over HTTP whether it is there. */
export async function probeHub(parts: LinkParts, limitMs: number): Promise<'up' | 'refused' | 'silent'> {
  const ending = new AbortController();
  const timer = setTimeout(() => ending.abort(), limitMs);
  try {
    const answer = await parts.fetch(`${parts.origin}/healthz`, { cache: 'no-store', signal: ending.signal });
    return answer.ok ? 'up' : 'refused';
  } catch {
    return ending.signal.aborted ? 'silent' : 'refused';
  } finally {
    clearTimeout(timer);
  }
}

/** Opens a socket, or gives up after `limitMs`. */
export function openSocket(parts: LinkParts, path: string, limitMs: number): Promise<WebSocket | null> {
  return new Promise((resolve) => {
    const socket = new parts.WebSocket(`${parts.origin.replace(/^http/, 'ws')}${path}`);
    const finish = (result: WebSocket | null) => {
      clearTimeout(timer);
      socket.onopen = null;
      socket.onerror = null;
      socket.onclose = null;
      if (!result) socket.close();
      resolve(result);
    };
    const timer = setTimeout(() => finish(null), limitMs);
    socket.onopen = () => finish(socket);
    socket.onerror = () => finish(null);
    socket.onclose = () => finish(null);
  });
}
