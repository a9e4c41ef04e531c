import { useMemo } from 'react';
import type { Phase } from '#shared/api/shows';
import type { Manifest } from '#shared/protocol/messages';
import type { Scene } from '#shared/scene/schema';
import type { RoomKind, ShowState } from '#shared/show/state';
import type { ScreenGroup } from '#shared/venue/schema';
import { useStored } from '@/hooks/useStored';
import { useTick } from '@/hooks/useTick';
import type { LinkSnapshot, ShowLink } from '@/link/types';
import { type Choices, chosenScreens, firstChoices, isChoices } from './choices';
import { nightFacts, type TileState, tileState } from './tileState';
import { type NightActions, useNightActions } from './useNightActions';
import { type Notice, useNotice } from './useNotice';
import { useSeenPictures } from './useSeenPictures';

/** What a page that runs a night knows of its show beside the link. */
export interface NightShow {
  id: string;
  name: string;
  phases: readonly Phase[];
  groups: readonly ScreenGroup[];
}

export interface TileFacts {
  scene: Scene;
  tile: TileState;
  /** base64 WebP of the scene as a display drew it tonight, or null. */
  seen: string | null;
}

/** Everything that the handset and Live show and do, once for both. */
export interface Night extends NightActions {
  show: NightShow;
  room: RoomKind;
  link: ShowLink;
  snapshot: LinkSnapshot;
  state: ShowState;
  manifest: Manifest;
  /** Hub time of this rendering, ms. */
  now: number;
  choices: Choices;
  setChoices: (choices: Choices) => void;
  /** Ids of the screens that a tap fires on. */
  chosen: readonly string[];
  /** Phase that is looked at. */
  phase: Phase | null;
  /** Its scenes in order. */
  tiles: readonly TileFacts[];
  notice: Notice | null;
}

const quietTickMs = 500;
const countingTickMs = 80;

const isCounting = (snapshot: LinkSnapshot, now: number): boolean =>
  Object.values(snapshot.state?.screens ?? {}).some(({ next }) => next !== null && next.landsAt > now - 2500);

/** Scenes of a phase in order; a show without phases shows all of its scenes. */
const scenesOf = (manifest: Manifest, phase: Phase | null): Scene[] =>
  manifest.scenes
    .filter((scene) => phase === null || scene.phaseId === phase.id)
    .sort((a, b) => a.position - b.position);

/** The night as one hand sees it. Null until the hub has said what the state is. */
export const useNight = (
  show: NightShow,
  room: RoomKind,
  link: ShowLink,
  snapshot: LinkSnapshot,
): Night | null => {
  const [choices, setChoices] = useStored(`lampyrid.night.${room}.${show.id}`, firstChoices, isChoices);
  const { notice, tell } = useNotice();
  useTick(isCounting(snapshot, link.hubNow()) ? countingTickMs : quietTickMs);
  const now = link.hubNow();
  const { state, manifest } = snapshot;
  const seen = useSeenPictures(show.id, snapshot, now);
  const all = useMemo(() => manifest?.screens.map(({ id }) => id) ?? [], [manifest]);
  const chosen = useMemo(() => chosenScreens(choices.screenIds, all), [choices.screenIds, all]);
  const actions = useNightActions(link, state?.dimmer ?? 1, chosen, choices.landsOn, tell);
  if (!state || !manifest) return null;

  const wanted = choices.phaseId ?? state.phaseId;
  const phase = show.phases.find(({ id }) => id === wanted) ?? show.phases[0] ?? null;
  const facts = nightFacts(snapshot, all, now);
  const tiles = scenesOf(manifest, phase).map((scene) => ({
    scene,
    tile: tileState(facts, scene.id, state, now),
    seen: seen[scene.id] ?? null,
  }));
  return {
    ...actions,
    show,
    room,
    link,
    snapshot,
    state,
    manifest,
    now,
    choices,
    setChoices,
    chosen,
    phase,
    tiles,
    notice,
  };
};
