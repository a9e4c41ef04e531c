import type { Manifest } from '../protocol/messages';
import { settle } from '../show/reduce';
import type { SceneRun, ShowState, Switch } from '../show/state';
import { beatAt } from '../time/beatClock';
import { calmBody } from './calm';
import { rgbOf } from './colour';
import type { DrawList, ScreenFrame } from './drawingList';
import { evaluateLayer } from './evaluateLayer';
import type { SceneBody } from './schema';

/** Length of the fades of switches, ms. Long enough that a switch is no flash, short enough to obey at once. */
export const fades = { blackout: 120, calm: 800 } as const;

/** Scenes by `${id}@${version}`. */
export type SceneBodies = ReadonlyMap<string, SceneBody>;

export interface EvaluateInput {
  state: ShowState;
  screenId: string;
  /** Width divided by height of the screen. */
  aspect: number;
  bodies: SceneBodies;
  /** What is known of files, by id. */
  assets: ReadonlyMap<string, { durationS: number | null }>;
  /** Hub time, ms. */
  t: number;
}

export const sceneKey = (sceneId: string, version: number): string => `${sceneId}@${version}`;

/** The scenes of a manifest, ready for evaluateScreen. */
export const sceneBodies = (manifest: Pick<Manifest, 'scenes'>): SceneBodies =>
  new Map(manifest.scenes.map((scene) => [sceneKey(scene.id, scene.version), scene.body]));

const clamp01 = (value: number): number => Math.min(1, Math.max(0, value));

/** How far a switch is on: 0..1. */
const along = ({ on, at }: Switch, t: number, fade: number): number => {
  const share = clamp01((t - at) / fade);
  return on ? share : 1 - share;
};

const black: DrawList = { ground: [0, 0, 0], items: [] };

const listOf = (run: SceneRun | null, input: EvaluateInput, t: number): DrawList => {
  if (!run) return black;
  const body = input.bodies.get(sceneKey(run.sceneId, run.version));
  if (!body) return black;
  const moment = {
    runKey: run.runId,
    beat: beatAt(input.state.beat, t) - run.landsAtBeat,
    timeS: (t - run.landsAt) / 1000,
    bpm: input.state.beat.bpm,
    dials: run.dials,
    durationOf: (assetId: string) => input.assets.get(assetId)?.durationS ?? null,
  };
  return { ground: rgbOf(body.ground), items: body.layers.flatMap((layer) => evaluateLayer(layer, moment)) };
};

const calmList = (input: EvaluateInput, t: number): DrawList => ({
  ground: rgbOf(calmBody.ground),
  items: calmBody.layers.flatMap((layer) =>
    evaluateLayer(layer, {
      runKey: 'calm',
      beat: beatAt(input.state.beat, t),
      // Whole seconds since a fixed moment would lose precision as a 32-bit shader number; an hour is enough.
      timeS: (t / 1000) % 3600,
      bpm: input.state.beat.bpm,
      dials: [],
      durationOf: () => null,
    }),
  ),
});

type Picture = Omit<ScreenFrame, 'screenId' | 'level'>;

/** What the show itself puts on a screen, with its running transition. */
const showPicture = (input: EvaluateInput, t: number): Picture => {
  const run = input.state.screens[input.screenId];
  if (!run) return { under: null, over: black, transition: null, runId: null };
  const { previous, current } = settle(run, t);
  if (!current) return { under: null, over: black, transition: null, runId: null };
  const progress = current.transitionMs > 0 ? clamp01((t - current.landsAt) / current.transitionMs) : 1;
  const over = listOf(current, input, t);
  if (progress >= 1) return { under: null, over, transition: null, runId: current.runId };
  return {
    under: listOf(previous, input, t),
    over,
    transition: { kind: current.transition.kind, progress },
    runId: current.runId,
  };
};

/** The show's picture, or the calm one, or a crossfade between them. */
const withCalm = (input: EvaluateInput, t: number): Picture => {
  // Calm is for people's sake: it comes even while the picture is frozen.
  const calm = along(input.state.calm, input.t, fades.calm);
  if (calm <= 0) return showPicture(input, t);
  if (calm >= 1) return { under: null, over: calmList(input, t), transition: null, runId: null };
  const show = showPicture(input, t);
  return {
    under: show.over,
    over: calmList(input, t),
    transition: { kind: 'crossfade', progress: calm },
    runId: show.runId,
  };
};

/**
 * What one screen shows at hub time `t`: a pure function of state, scenes and time, so that every display that shares
 * the hub clock draws the same. While frozen, the time stands at the freeze. At level 0 nothing is shown, so no run.
 */
export const evaluateScreen = (input: EvaluateInput): ScreenFrame => {
  const { state, screenId } = input;
  const t = state.freeze.on ? Math.min(input.t, state.freeze.at) : input.t;
  const level = state.dimmer * (1 - along(state.blackout, input.t, fades.blackout));
  const picture = withCalm(input, t);
  return { screenId, ...picture, runId: level > 0 ? picture.runId : null, level };
};
