import { useCallback, useEffect, useSyncExternalStore } from 'react';
import type { RoomKind } from '#shared/show/state';
import { createShowLink } from '@/link/showLink';
import type { LinkSnapshot, ShowLink } from '@/link/types';

interface Held {
  link: ShowLink;
  holders: number;
  /** Runs when the last holder has gone for a moment, or when a render that made the link never mounted. */
  closing: ReturnType<typeof setTimeout> | null;
}

const held = new Map<string, Held>();
/** A link outlives its last holder this long, so that a page that only remounts keeps its socket, ms. */
const lingerMs = 300;
/** A link made by a render that never mounted is closed after this, ms. */
const strayMs = 5000;

const closeAfter = (key: string, entry: Held, ms: number): void => {
  if (entry.closing) clearTimeout(entry.closing);
  entry.closing = setTimeout(() => {
    if (entry.holders > 0) return;
    held.delete(key);
    entry.link.close();
  }, ms);
};

const linkFor = (showId: string, room: RoomKind): { key: string; entry: Held } => {
  const key = `${room}/${showId}`;
  const known = held.get(key);
  if (known) return { key, entry: known };
  const entry: Held = { link: createShowLink({ showId, room, as: 'crew' }), holders: 0, closing: null };
  held.set(key, entry);
  closeAfter(key, entry, strayMs);
  return { key, entry };
};

/**
 * The crew's link to one room of a show: one socket a show and room, shared by everything on the page, closed when
 * the last user has gone. `snapshot` is replaced as a whole at each change.
 */
export const useShowLink = (
  showId: string,
  room: RoomKind = 'live',
): { link: ShowLink; snapshot: LinkSnapshot } => {
  const { link } = linkFor(showId, room).entry;
  useEffect(() => {
    const { key, entry } = linkFor(showId, room);
    entry.holders += 1;
    if (entry.closing) clearTimeout(entry.closing);
    entry.closing = null;
    return () => {
      entry.holders -= 1;
      if (entry.holders === 0) closeAfter(key, entry, lingerMs);
    };
  }, [showId, room]);
  const subscribe = useCallback((listener: () => void) => link.subscribe(listener), [link]);
  const snapshot = useSyncExternalStore(subscribe, () => link.getSnapshot());
  return { link, snapshot };
};
