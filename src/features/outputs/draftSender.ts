import type { OutputMap } from '#shared/mapping/schema';

/** Shortest time between two drafts, ms: two frames, well under the 100 ms that a hand on a corner feels. */
export const draftPeriodMs = 33;

/**
 * Sends maps while they are dragged: the first at once, then the newest each period; what came between is dropped.
 * @param send passes one map on
 */
export const createDraftSender = (send: (map: OutputMap) => void) => {
  let waiting: OutputMap | null = null;
  let timer: ReturnType<typeof setTimeout> | null = null;
  const flush = (): void => {
    timer = null;
    if (!waiting) return;
    send(waiting);
    waiting = null;
    timer = setTimeout(flush, draftPeriodMs);
  };
  return {
    push(map: OutputMap): void {
      waiting = map;
      if (!timer) flush();
    },
    stop(): void {
      if (timer) clearTimeout(timer);
      timer = null;
      waiting = null;
    },
  };
};
export type DraftSender = ReturnType<typeof createDraftSender>;
