import { newBody, newLayer } from '#shared/scene/defaults';
import { type EvaluateInput, sceneKey } from '#shared/scene/evaluate';
import type { Layer, SceneBody, Source, SourceKind } from '#shared/scene/schema';
import { startState } from '#shared/show/reduce';
import type { SceneRun, ShowState } from '#shared/show/state';

/** A layer of a kind with some of its source changed. */
export const layerOf = <K extends SourceKind>(
  kind: K,
  source: Partial<Extract<Source, { kind: K }>> = {},
  more: Partial<Layer> = {},
): Layer => {
  const layer = newLayer(kind, `${kind}1`);
  return { ...layer, ...more, source: { ...layer.source, ...source } as Source };
};

export const bodyOf = (layers: Layer[], more: Partial<SceneBody> = {}): SceneBody => ({
  ...newBody(),
  layers,
  ...more,
});

/** A run of a scene that landed at 10 s, on beat 20 of a clock of 120 bpm. */
export const runOf = (sceneId: string, more: Partial<SceneRun> = {}): SceneRun => ({
  runId: `run-${sceneId}`,
  sceneId,
  version: 1,
  seed: 1,
  firedAt: 9_900,
  landsAt: 10_000,
  landsAtBeat: 20,
  transition: { kind: 'cut', beats: 0 },
  transitionMs: 0,
  dials: [],
  ...more,
});

/** A show in which `current` is on the wall since 10 s, and which came from `previous`. */
export const stateOf = (current: SceneRun | null, more: Partial<ShowState> = {}): ShowState => ({
  ...startState('show', 'live', 0),
  screens: { wall: { previous: null, current, next: null } },
  ...more,
});

/** What evaluateScreen asks for, at a time. */
export const inputOf = (
  state: ShowState,
  bodies: Record<string, SceneBody>,
  t: number,
  durations: Record<string, number | null> = {},
): EvaluateInput => ({
  state,
  screenId: 'wall',
  aspect: 16 / 9,
  bodies: new Map(Object.entries(bodies).map(([id, body]) => [sceneKey(id, 1), body])),
  assets: new Map(Object.entries(durations).map(([id, durationS]) => [id, { durationS }])),
  t,
});
