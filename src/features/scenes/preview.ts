import type { Asset } from '#shared/api/assets';
import { wholeMap } from '#shared/mapping/rectangle';
import { evaluateScreen, sceneKey } from '#shared/scene/evaluate';
import type { SceneBody } from '#shared/scene/schema';
import { assetsOfBody } from '#shared/scene/sourceFiles';
import { startState } from '#shared/show/reduce';
import type { SceneRun, ShowState } from '#shared/show/state';
import { reanchor } from '#shared/time/beatClock';
import { createFileStore } from '@/stage/fileStore';
import { createStage } from '@/stage/stage';
import { drawable } from './drawable';

const screenId = 'preview';
const draft = { id: 'draft', version: 1 } as const;
/** Longest side of the live picture's raster, pixels. */
const side = 960;

const run: SceneRun = {
  runId: 'preview',
  sceneId: draft.id,
  version: draft.version,
  seed: 1,
  firedAt: 0,
  landsAt: 0,
  landsAtBeat: 0,
  transition: { kind: 'cut', beats: 0 },
  transitionMs: 0,
  dials: [],
};

/** What the picture is drawn from; asked at each frame. */
export interface PreviewInput {
  body: SceneBody;
  assets: readonly Asset[];
  bpm: number;
  playing: boolean;
  /** Width and height of the screen in metres. */
  size: { width: number; height: number };
}

/** A raster in the screen's shape, no side longer than `side`. */
export const rasterOf = ({ width, height }: { width: number; height: number }): [number, number] => {
  const scale = side / Math.max(width, height);
  return [Math.max(16, Math.round(width * scale)), Math.max(16, Math.round(height * scale))];
};

/**
 * Draws a scene that isn't saved with the renderer of the displays, on a clock of its own that can be paused.
 * @returns stops it and frees what it held
 */
export const startPreview = (canvas: HTMLCanvasElement, input: () => PreviewInput): (() => void) => {
  const files = createFileStore();
  const stage = createStage(canvas, files);
  // Switches were let go long ago, so that nothing fades when the preview opens.
  const never = { on: false, at: Number.NEGATIVE_INFINITY };
  let state: ShowState = { ...startState('preview', 'live', 0), calm: never, blackout: never };
  let wanted: readonly Asset[] | null = null;
  let seen: SceneBody | null = null;
  let size = '';
  let t = 0;
  let last: number | null = null;
  let handle = 0;
  const frame = (performanceMs: number): void => {
    handle = requestAnimationFrame(frame);
    const { body, assets, bpm, playing, size: metres } = input();
    if (playing && last !== null) t += performanceMs - last;
    last = performanceMs;
    if (assets !== wanted || body !== seen) {
      wanted = assets;
      seen = body;
      // Only what this scene shows: a library may be gigabytes.
      const used = new Set(assetsOfBody(body));
      files.want(drawable(assets).filter(({ id }) => used.has(id)));
    }
    const raster = rasterOf(metres);
    if (size !== raster.join('×')) {
      size = raster.join('×');
      stage.resize(...raster);
    }
    if (bpm !== state.beat.bpm) state = { ...state, beat: { ...reanchor(state.beat, t), bpm } };
    const current = { ...run, dials: body.dials.map((dial) => dial.value) };
    const shown = { ...state, screens: { [screenId]: { previous: null, current, next: null } } };
    const drawn = evaluateScreen({
      state: shown,
      screenId,
      aspect: metres.width / metres.height,
      bodies: new Map([[sceneKey(draft.id, draft.version), body]]),
      assets: new Map(assets.map((asset) => [asset.id, asset])),
      t,
    });
    stage.draw({
      frames: [drawn],
      map: wholeMap(screenId, raster),
      screenSizes: { [screenId]: metres },
      hubNow: t,
      paused: !playing,
      lineUp: false,
      label: null,
    });
  };
  handle = requestAnimationFrame(frame);
  return () => {
    cancelAnimationFrame(handle);
    stage.dispose();
    files.dispose();
  };
};
