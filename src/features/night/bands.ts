import type { WakeState } from '@/inputs/wakeLock';
import type { LinkSnapshot } from '@/link/types';

/** A line across the page about the state of things; worst first. */
export interface Band {
  kind: 'broken' | 'look';
  words: string;
}

/** A round trip above this is slow, ms: a tap is then felt late. */
export const slowLinkMs = 250;

const linkBand = (snapshot: LinkSnapshot, performanceNow: number): Band | null => {
  switch (snapshot.status) {
    case 'away': {
      const s = Math.max(0, Math.floor((performanceNow - (snapshot.awaySince ?? performanceNow)) / 1000));
      return { kind: 'broken', words: `No link for ${s} s. Nothing is sent.` };
    }
    case 'joining':
      return { kind: 'broken', words: 'Joining. Nothing is sent yet.' };
    case 'refused':
      return { kind: 'broken', words: snapshot.refusedWhy ?? 'The hub does not let this page in.' };
    case 'outdated':
      return { kind: 'broken', words: 'This page is older than the hub. Load it again.' };
    case 'on':
      return snapshot.linkMs !== null && snapshot.linkMs > slowLinkMs
        ? { kind: 'look', words: `Slow link, ${Math.round(snapshot.linkMs)} ms. Taps come late.` }
        : null;
  }
};

const lostDisplays = ({ displays, displayNames, status }: LinkSnapshot): Band | null => {
  if (status !== 'on') return null;
  const lost = displays.filter(({ connected }) => !connected);
  const [first] = lost;
  if (!first) return null;
  const name = displayNames[first.displayId] ?? 'A display';
  return {
    kind: 'look',
    words: lost.length === 1 ? `${name} has no link.` : `${lost.length} displays have no link.`,
  };
};

const modeBand = ({ mode }: LinkSnapshot): Band | null =>
  mode === 'closed' ? { kind: 'look', words: 'The show is closed. Nothing fires.' } : null;

const durableBand = ({ durable, status }: LinkSnapshot): Band | null =>
  status === 'on' && durable === 'none' ? { kind: 'look', words: 'Nothing is being kept right now.' } : null;

const wakeBand = (wake: WakeState): Band | null =>
  wake === 'may sleep' ? { kind: 'look', words: 'Screen may sleep. Keep it touched.' } : null;

/** What the page must say, worst first; at most two, so that the tiles keep their room. Pure. */
export const bandsOf = (snapshot: LinkSnapshot, wake: WakeState, performanceNow: number): Band[] =>
  [
    linkBand(snapshot, performanceNow),
    modeBand(snapshot),
    durableBand(snapshot),
    lostDisplays(snapshot),
    wakeBand(wake),
  ]
    .filter((band) => band !== null)
    .slice(0, 2);
