import { settle } from '#shared/show/reduce';
import type { SceneRun, ShowState } from '#shared/show/state';
import { beatAt } from '#shared/time/beatClock';
import type { LinkSnapshot } from '@/link/types';

/** How long after its landing a scene may stay unreported before the crew is told, ms (a picture takes ≤ 1 s). */
const graceMs = 2000;

/** What one tile says of its scene. */
export interface TileState {
  /** The hub took it and it lands in the future. */
  sent: { landsAt: number; beatsLeft: number; screenIds: readonly string[] } | null;
  /** It has landed by the clock, and no display has said yet that it drew it. */
  landing: boolean;
  /** Screens on which displays report it as drawn. */
  on: number;
  /** Fed screens on which it should be, or is. */
  of: number;
  /** It landed more than 2 s ago and some display has not drawn it. */
  missing: boolean;
  /** It runs only on screens that no display feeds. */
  unfed: boolean;
}

type Known = Pick<LinkSnapshot, 'state' | 'maps' | 'displays' | 'wall'>;

interface Feeder {
  displayId: string;
  connected: boolean;
  runId: string | null;
}

/** Joined displays that feed a screen, each with the run it last said it drew there. */
const feeders = (known: Known, screenId: string): Feeder[] => {
  const seen = new Map(
    known.wall
      .filter((report) => report.screenId === screenId)
      .map(({ displayId, runId }) => [displayId, runId]),
  );
  return known.displays
    .filter(
      ({ displayId }) =>
        seen.has(displayId) ||
        known.maps[displayId]?.regions.some((region) => region.screenId === screenId) === true,
    )
    .map(({ displayId, connected }) => ({ displayId, connected, runId: seen.get(displayId) ?? null }));
};

interface ScreenFacts {
  screenId: string;
  /** Run that is on air by the clock. */
  current: SceneRun | null;
  /** Run that lands in the future. */
  sent: SceneRun | null;
  fed: boolean;
  /** Scene that every display with a link reports as drawn; null when they disagree or none does. */
  drawnSceneId: string | null;
}

const factsOf = (known: Known, state: ShowState, screenId: string, now: number): ScreenFacts => {
  const run = state.screens[screenId];
  const settled = run ? settle(run, now) : null;
  const all = feeders(known, screenId);
  const alive = all.filter((feeder) => feeder.connected);
  const runs = [run?.previous, run?.current, run?.next];
  const sceneOf = (runId: string | null) => runs.find((one) => one && one.runId === runId)?.sceneId ?? null;
  const [first] = alive;
  const agree =
    first !== undefined && alive.every((feeder) => sceneOf(feeder.runId) === sceneOf(first.runId));
  return {
    screenId,
    current: settled?.current ?? null,
    sent: settled?.next ?? null,
    fed: all.length > 0,
    drawnSceneId: agree ? sceneOf(first.runId) : null,
  };
};

/** The state that every screen of the room is in, once for all tiles. */
export const nightFacts = (known: Known, screenIds: readonly string[], now: number): ScreenFacts[] => {
  const { state } = known;
  return state ? screenIds.map((id) => factsOf(known, state, id, now)) : [];
};

const sentOf = (facts: readonly ScreenFacts[], sceneId: string, state: ShowState, now: number) => {
  const waiting = facts.filter(({ sent }) => sent?.sceneId === sceneId);
  if (waiting.length === 0) return null;
  const landsAt = Math.max(...waiting.map(({ sent }) => sent?.landsAt ?? now));
  return {
    landsAt,
    beatsLeft: Math.max(0, beatAt(state.beat, landsAt) - beatAt(state.beat, now)),
    screenIds: waiting.map(({ screenId }) => screenId),
  };
};

/**
 * What the tile of a scene says at hub time `now`. “On the wall” comes from drawn frames of displays that have a link
 * and from nothing else; what the hub only took is “sent”. Pure.
 */
export const tileState = (
  facts: readonly ScreenFacts[],
  sceneId: string,
  state: ShowState,
  now: number,
): TileState => {
  const running = facts.filter(({ current }) => current?.sceneId === sceneId);
  const drawn = facts.filter(({ drawnSceneId }) => drawnSceneId === sceneId);
  const wanted = running.filter(({ fed }) => fed);
  const late = wanted.filter(({ drawnSceneId }) => drawnSceneId !== sceneId);
  const of = new Set([...wanted, ...drawn].map(({ screenId }) => screenId)).size;
  const overdue = late.filter(({ current }) => current !== null && now - current.landsAt > graceMs);
  return {
    sent: sentOf(facts, sceneId, state, now),
    landing: late.length > overdue.length,
    on: drawn.length,
    of,
    missing: overdue.length > 0,
    unfed: running.length > 0 && wanted.length === 0 && drawn.length === 0,
  };
};

/** Runs on the chosen screens whose dials can be turned, one entry a run. */
export const runningOn = (
  facts: readonly ScreenFacts[],
  chosen: readonly string[],
): { run: SceneRun; screenIds: string[] }[] => {
  const runs = new Map<string, { run: SceneRun; screenIds: string[] }>();
  for (const { screenId, current } of facts) {
    if (!current || !chosen.includes(screenId)) continue;
    const known = runs.get(current.runId);
    if (known) known.screenIds.push(screenId);
    else runs.set(current.runId, { run: current, screenIds: [screenId] });
  }
  return [...runs.values()];
};
