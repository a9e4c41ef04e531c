import { useEffect, useState } from 'react';
import type { LinkSnapshot } from '@/link/types';
import { nightFacts } from './tileState';

/** A true picture of a scene, as a display drew it some time tonight. */
type Seen = Readonly<Record<string, string>>;

/** Kept for at most this many scenes; each picture is a few kB. */
const keep = 24;
/** Light below this makes a picture that says nothing about its scene. */
const leastLevel = 0.6;
/** A display needs this long after a transition until its next picture shows the scene alone, ms. */
const settledMs = 300;

const read = (key: string): Seen => {
  try {
    const value: unknown = JSON.parse(sessionStorage.getItem(key) ?? '{}');
    return typeof value === 'object' && value !== null ? (value as Seen) : {};
  } catch {
    return {};
  }
};

/** Pictures that show one scene alone and in full light: what may be remembered as that scene's picture. Pure. */
export const truePictures = (snapshot: LinkSnapshot, now: number): Record<string, string> => {
  const { state, manifest } = snapshot;
  if (!state || !manifest || state.dimmer < leastLevel || state.blackout.on || state.calm.on) return {};
  const wide = [...manifest.screens].sort((a, b) => b.width / b.height - a.width / a.height);
  const facts = nightFacts(
    snapshot,
    wide.map(({ id }) => id),
    now,
  );
  const found: Record<string, string> = {};
  for (const { screenId, current, drawnSceneId } of facts) {
    if (!current || drawnSceneId !== current.sceneId || found[drawnSceneId]) continue;
    const from = current.landsAt + current.transitionMs + settledMs;
    const picture = Object.values(snapshot.pictures).find(
      (one) => one.screenId === screenId && one.at >= from && !state.lineUp.includes(one.displayId),
    );
    if (picture) found[drawnSceneId] = picture.data;
  }
  return found;
};

/** The newest true picture of each scene that has been on the wall tonight, by scene id; base64 WebP. */
export const useSeenPictures = (showId: string, snapshot: LinkSnapshot, now: number): Seen => {
  const key = `lampyrid.seen.${showId}`;
  const [seen, setSeen] = useState<Seen>(() => read(key));
  // biome-ignore lint/correctness/useExhaustiveDependencies: only a new picture can bring something new
  useEffect(() => {
    const found = truePictures(snapshot, now);
    if (Object.keys(found).length === 0) return;
    setSeen((before) => {
      const rest = Object.entries(before).filter(([sceneId]) => !found[sceneId]);
      const next = Object.fromEntries([...Object.entries(found), ...rest].slice(0, keep));
      try {
        sessionStorage.setItem(key, JSON.stringify(next));
      } catch {
        // Full: they are remembered as long as the page.
      }
      return next;
    });
  }, [snapshot.pictures]);
  return seen;
};
