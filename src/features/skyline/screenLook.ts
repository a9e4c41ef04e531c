import type { LinkSnapshot } from '@/link/types';

/** A picture older than this says its age, ms. */
export const agingMs = 2000;
/** A picture older than this is grey: it may no longer be true, ms. */
export const staleMs = 5000;

/** What the crew can know of one screen right now. */
export interface ScreenLook {
  /** Newest true picture as a data: address; null when none has come. */
  picture: string | null;
  /** Age of the picture in ms; null without one. */
  ageMs: number | null;
  light: 'fresh' | 'aging' | 'stale' | 'none';
  /** Displays that feed it. `lost`: none of them has a link. `weak`: some have not. */
  feed: 'none' | 'fine' | 'weak' | 'lost';
}

type Known = Pick<LinkSnapshot, 'maps' | 'displays' | 'wall' | 'pictures'>;

/** Ids of the displays that feed a screen: by their saved map, or because they have drawn it. */
export const feedersOf = (known: Pick<Known, 'maps' | 'wall'>, screenId: string): string[] => {
  const mapped = Object.entries(known.maps)
    .filter(([, map]) => map.regions.some((region) => region.screenId === screenId))
    .map(([displayId]) => displayId);
  const drawn = known.wall.filter((seen) => seen.screenId === screenId).map((seen) => seen.displayId);
  return [...new Set([...mapped, ...drawn])];
};

const feedOf = (known: Known, screenId: string): ScreenLook['feed'] => {
  const feeders = new Set(feedersOf(known, screenId));
  const joined = known.displays.filter((display) => feeders.has(display.displayId));
  if (joined.length === 0) return 'none';
  const alive = joined.filter((display) => display.connected).length;
  if (alive === 0) return 'lost';
  return alive < joined.length ? 'weak' : 'fine';
};

const lightOf = (ageMs: number): ScreenLook['light'] => {
  if (ageMs > staleMs) return 'stale';
  return ageMs > agingMs ? 'aging' : 'fresh';
};

/** The look of one screen at hub time `now` (ms). Pure. */
export const screenLook = (known: Known, screenId: string, now: number): ScreenLook => {
  const feed = feedOf(known, screenId);
  const newest = Object.values(known.pictures)
    .filter((picture) => picture.screenId === screenId)
    .reduce<LinkSnapshot['pictures'][string] | null>(
      (best, picture) => (best && best.at >= picture.at ? best : picture),
      null,
    );
  if (!newest) return { picture: null, ageMs: null, light: 'none', feed };
  const ageMs = Math.max(0, now - newest.at);
  return { picture: `data:image/webp;base64,${newest.data}`, ageMs, light: lightOf(ageMs), feed };
};

/** The looks of all screens, by id. */
export const screenLooks = (
  known: Known,
  screenIds: readonly string[],
  now: number,
): Record<string, ScreenLook> => Object.fromEntries(screenIds.map((id) => [id, screenLook(known, id, now)]));

const age = (ms: number): string => {
  const s = Math.round(ms / 1000);
  return s < 100 ? `${s} s` : `${Math.round(s / 60)} min`;
};

/** A screen's state for eye and screen reader; empty when all is fine. */
export const lookWords = (look: ScreenLook): string => {
  if (look.feed === 'lost')
    return look.ageMs === null ? 'no link' : `no link, picture ${age(look.ageMs)} old`;
  if (look.feed === 'none') return 'no display';
  if (look.light === 'none') return 'no picture yet';
  if (look.light !== 'fresh' && look.ageMs !== null) return `picture ${age(look.ageMs)} old`;
  return look.feed === 'weak' ? 'one display has no link' : '';
};

/** The age as it stands on the picture; null while it is fresh. */
export const ageLabel = (look: ScreenLook): string | null =>
  look.ageMs === null || look.light === 'fresh' ? null : age(look.ageMs);
