import { expect, test } from '@playwright/test';
import { demoScenes } from '#server/services/demo/scenes';
import { evaluateScreen, sceneKey } from '#shared/scene/evaluate';
import type { Layer, SceneBody } from '#shared/scene/schema';
import { startState } from '#shared/show/reduce';
import type { SceneRun, ShowState } from '#shared/show/state';
import { flashes, flashShare } from '#tests/shared/scene/flashes';
import type { StagePage } from './stagePage/stagePage';
import { openStagePage } from './support/stageBundle';
import { watchConsole } from './support/watchConsole';

/** What the page offers; functions given to `evaluate` run there. */
declare const stagePage: StagePage;

const [width, height, framesASecond, seconds] = [32, 18, 30, 2] as const;
const file = 'paper';
const scenes = demoScenes({
  mark: file,
  boathouse: file,
  oars: file,
  bough: file,
  water: file,
  salt: file,
  static: file,
  pour: file,
});

/** Clips stand as white paper: the brightest that a file can be, so that only what the scene does with it counts. */
const asPaper = (layer: Layer): Layer =>
  layer.source.kind === 'clip'
    ? { ...layer, source: { kind: 'stills', assetIds: [file], everyBeats: 64, seed: 1 } }
    : layer;

const run = (sceneId: string, body: SceneBody): SceneRun => ({
  runId: sceneId,
  sceneId,
  version: 1,
  seed: 3,
  firedAt: 0,
  landsAt: 0,
  landsAtBeat: 0,
  transition: { kind: 'cut', beats: 0 },
  transitionMs: 0,
  dials: body.dials.map(({ value }) => value),
});

/** Frames of one demo scene as the evaluation gives them, from the eighth beat on. */
const framesOf = (name: string, body: SceneBody, bpm: number) => {
  const never = { on: false, at: Number.NEGATIVE_INFINITY };
  const state: ShowState = {
    ...startState('show', 'live', 0),
    calm: never,
    blackout: never,
    beat: { bpm, at: 0, beat: 0, source: 'typed' },
    screens: { wall: { previous: null, current: run(name, body), next: null } },
  };
  const paper = { ...body, layers: body.layers.map(asPaper) };
  const from = (8 * 60_000) / bpm;
  return Array.from({ length: framesASecond * seconds }, (_, i) =>
    evaluateScreen({
      state,
      screenId: 'wall',
      aspect: width / height,
      bodies: new Map([[sceneKey(name, 1), paper]]),
      assets: new Map([[file, { durationS: null }]]),
      t: from + (i * 1000) / framesASecond,
    }),
  );
};

for (const bpm of [85, 128, 175])
  test(`no scene of the demo night flashes more than three times a second at ${bpm} bpm`, async ({
    page,
  }) => {
    const check = watchConsole(page);
    await openStagePage(page);
    await page.evaluate((id) => stagePage.columns(id, [[255, 255, 255, 255]]), file);
    for (const { name, body } of scenes) {
      const lights = await page.evaluate(
        async ({ frames, width, height }) => {
          const { canvas, stage } = stagePage.open(width, height);
          const all: number[][] = [];
          for (const frame of frames) {
            const data = await stagePage.drawn(stage, canvas, stagePage.input(width, height, [frame]));
            all.push(stagePage.luminances(data));
          }
          stage.dispose();
          return all;
        },
        { frames: framesOf(name, body, bpm), width, height },
      );
      const means = lights.map((frame) => frame.reduce((sum, value) => sum + value, 0) / frame.length);
      expect(Math.max(...means), `${name} is to be seen`).toBeGreaterThan(0.0005);
      expect(flashes(means, framesASecond), `${name}: the picture as a whole`).toBeLessThanOrEqual(3);
      // Area: a quarter of the picture counts as seen (25 % of a 10° field).
      expect(flashShare(lights, framesASecond), `${name}: share of points that flash`).toBeLessThan(0.25);
    }
    check();
  });
