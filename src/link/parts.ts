import type { KeepStore } from './drawnQueue';
import type { LinkOptions } from './types';

/** What a link stands on. */
export interface LinkParts {
  WebSocket: typeof WebSocket;
  fetch: typeof fetch;
  /** Monotonic ms. */
  now: () => number;
  /** http://host of the hub. */
  origin: string;
  store: KeepStore | null;
  /** Calls when the page or its network wakes: waiting is then over. Returns what ends it. */
  onWake: (wake: () => void) => () => void;
}

const storage = (): KeepStore | null => {
  try {
    return window.localStorage;
  } catch {
    return null;
  }
};

const onPageWake = (wake: () => void): (() => void) => {
  const seen = (): void => {
    if (!document.hidden) wake();
  };
  document.addEventListener('visibilitychange', seen);
  window.addEventListener('pageshow', wake);
  window.addEventListener('online', wake);
  return () => {
    document.removeEventListener('visibilitychange', seen);
    window.removeEventListener('pageshow', wake);
    window.removeEventListener('online', wake);
  };
};

/** Those of a page. */
export const pageParts = (): LinkParts => ({
  WebSocket: window.WebSocket,
  fetch: window.fetch.bind(window),
  now: () => performance.now(),
  origin: window.location.origin,
  store: storage(),
  onWake: onPageWake,
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

/** What a browser can't learn from a refused socket: whether this page is still let in. Words, or null when it is. */
export async function whyNot(parts: LinkParts, { as, showId }: LinkOptions): Promise<string | null> {
  const path = as === 'display' ? '/api/display/self' : `/api/shows/${encodeURIComponent(showId)}`;
  try {
    const { status } = await parts.fetch(`${parts.origin}${path}`, {
      cache: 'no-store',
      credentials: 'same-origin',
    });
    if (status === 401)
      return as === 'display'
        ? 'This display is not joined any more.'
        : 'You are signed out: sign in again to go on.';
    if (status === 403) return 'Your role may not look at this show.';
    return status === 404 ? 'This show is gone.' : null;
  } catch {
    return null;
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
