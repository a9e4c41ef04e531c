import { createRequire } from 'node:module';
import { expect, test } from '@playwright/test';
import type { Corners } from '#shared/mapping/schema';
import { chance } from '#shared/scene/noise';
import type { StagePage } from './stagePage/stagePage';
import { openStagePage } from './support/stageBundle';
import { watchConsole } from './support/watchConsole';

/** What the page offers; functions given to `evaluate` run there. */
declare const stagePage: StagePage;

// OpenCV's module is a thenable that resolves to itself: it must never be awaited or returned.
const cv: typeof import('@techstark/opencv-js') = createRequire(import.meta.url)('@techstark/opencv-js');

let check: () => void;
test.beforeEach(async ({ page }) => {
  check = watchConsole(page);
  await openStagePage(page);
});
test.afterEach(() => check());

const farthest = (a: readonly number[], b: readonly number[]): number =>
  Math.max(...a.map((value, i) => Math.abs(value - (b[i] ?? 0))));

test('takes more layers than one pass holds, a see-through picture, and the light that is left', async ({
  page,
}) => {
  const got = await page.evaluate(async () => {
    await stagePage.columns('grey', [[20, 40, 10, 255]]);
    await stagePage.columns('veil', [[255, 255, 255, 128]]);
    const { canvas, stage } = stagePage.open(64, 32);
    const grey = stagePage.layer({ kind: 'picture', assetId: 'grey' }, { blend: 'add' });
    const at = async (items: (typeof grey)[], level = 1) => {
      const frame = stagePage.frame(stagePage.list(items, [0, 0, 0.2]), { level });
      const data = await stagePage.drawn(stage, canvas, stagePage.input(64, 32, [frame]));
      return [...data.slice(4 * (16 * 64 + 32), 4 * (16 * 64 + 32) + 3)];
    };
    const nine = await at(Array.from({ length: 6 }, () => grey));
    const veil = await at([stagePage.layer({ kind: 'picture', assetId: 'veil' })]);
    const dim = await at([grey], 0.5);
    return { nine, veil, dim };
  });
  expect(farthest(got.nine, [120, 240, 51 + 60])).toBeLessThanOrEqual(2);
  expect(farthest(got.veil, [128, 128, 128 + 51 * 0.498])).toBeLessThanOrEqual(2);
  expect(farthest(got.dim, [10, 20, 30.5])).toBeLessThanOrEqual(2);
});

test('crosses from one scene to the next, by fading and by slats', async ({ page }) => {
  const got = await page.evaluate(async () => {
    const { canvas, stage } = stagePage.open(64, 32);
    const red = stagePage.list([], [1, 0, 0]);
    const blue = stagePage.list([], [0, 0, 1]);
    const means = async (kind: 'crossfade' | 'slats', progress: number) => {
      const frame = stagePage.frame(blue, { under: red, transition: { kind, progress } });
      const data = await stagePage.drawn(stage, canvas, stagePage.input(64, 32, [frame]));
      let [r, b] = [0, 0];
      for (let i = 0; i < data.length; i += 4) {
        r += data[i] ?? 0;
        b += data[i + 2] ?? 0;
      }
      return [r / 2048, b / 2048] as const;
    };
    const slats: (readonly [number, number])[] = [];
    for (const progress of [0, 0.25, 0.5, 0.75, 1]) slats.push(await means('slats', progress));
    return { fade: await means('crossfade', 0.25), slats };
  });
  expect(farthest(got.fade, [191.25, 63.75])).toBeLessThanOrEqual(1);
  expect(got.slats[0]).toEqual([255, 0]);
  expect(got.slats[4]).toEqual([0, 255]);
  const blues = got.slats.map(([, blue]) => blue);
  expect(blues, 'never back').toEqual([...blues].sort((a, b) => a - b));
});

/** Convex quadrilaterals inside 640×360, by a seed. */
const quad = (seed: number): Corners => {
  const at = (x: number, y: number, i: number): [number, number] => [
    x + (chance(seed, i, 0) - 0.5) * 180,
    y + (chance(seed, i, 1) - 0.5) * 120,
  ];
  return [at(130, 90, 0), at(510, 90, 1), at(510, 270, 2), at(130, 270, 3)];
};

const marks = [
  [0.5, 0.5],
  [0.12, 0.15],
  [0.88, 0.2],
  [0.8, 0.85],
  [0.2, 0.75],
] as const;

test('warps with exact perspective, and leaves the rest of the wall black', async ({ page }) => {
  if (!cv.Mat) await new Promise<void>((done) => Object.assign(cv, { onRuntimeInitialized: () => done() }));
  for (let seed = 1; seed <= 8; seed += 1) {
    const corners = quad(seed);
    const from = cv.matFromArray(4, 1, cv.CV_32FC2, [0, 0, 1, 0, 1, 1, 0, 1]);
    const to = cv.matFromArray(4, 1, cv.CV_32FC2, corners.flat());
    const points = cv.matFromArray(marks.length, 1, cv.CV_32FC2, marks.flat());
    const moved = new cv.Mat();
    const matrix = cv.getPerspectiveTransform(from, to);
    cv.perspectiveTransform(points, moved, matrix);
    const wanted = marks.map((_, i) => [moved.data32F[i * 2] ?? 0, moved.data32F[i * 2 + 1] ?? 0] as const);
    for (const mat of [from, to, points, moved, matrix]) mat.delete();
    const found = await page.evaluate(
      async ({ corners, marks, wanted }) => {
        const picture = document.createElement('canvas');
        Object.assign(picture, { width: 640, height: 360 });
        const context = picture.getContext('2d');
        if (!context) throw new Error('no canvas');
        context.fillStyle = '#300';
        context.fillRect(0, 0, 640, 360);
        context.fillStyle = '#fff';
        for (const [x, y] of marks) context.fillRect(x * 640 - 4, y * 360 - 4, 8, 8);
        stagePage.files.set('marks', {
          kind: 'picture',
          bitmap: await createImageBitmap(picture),
          width: 640,
          height: 360,
        });
        const { canvas, stage } = stagePage.open(640, 360);
        const input = stagePage.input(640, 360, [
          stagePage.frame(stagePage.list([stagePage.layer({ kind: 'picture', assetId: 'marks' })])),
        ]);
        for (const region of input.map.regions) region.corners = corners;
        const data = await stagePage.drawn(stage, canvas, input);
        stage.dispose();
        const light = (x: number, y: number) => data[(y * 640 + x) * 4 + 1] ?? 0;
        const middles = wanted.map(([wx, wy]) => {
          let [sum, sx, sy] = [0, 0, 0];
          for (let y = Math.max(0, Math.round(wy) - 14); y < Math.min(360, wy + 14); y += 1)
            for (let x = Math.max(0, Math.round(wx) - 14); x < Math.min(640, wx + 14); x += 1) {
              sum += light(x, y);
              sx += light(x, y) * (x + 0.5);
              sy += light(x, y) * (y + 0.5);
            }
          return [sx / sum, sy / sum] as const;
        });
        // A point is outside when it lies more than two pixels beyond some side.
        const outside = (px: number, py: number) =>
          corners.some(([ax, ay], i) => {
            const [bx, by] = corners[(i + 1) % 4] ?? [0, 0];
            return ((bx - ax) * (py - ay) - (by - ay) * (px - ax)) / Math.hypot(bx - ax, by - ay) < -2;
          });
        let stray = 0;
        for (let y = 0; y < 360; y += 1)
          for (let x = 0; x < 640; x += 1)
            if (outside(x + 0.5, y + 0.5) && (data[(y * 640 + x) * 4] ?? 0) > 0) stray += 1;
        return { middles, stray };
      },
      { corners, marks, wanted },
    );
    for (const [i, [x, y]] of found.middles.entries())
      expect(
        Math.hypot(x - (wanted[i]?.[0] ?? 0), y - (wanted[i]?.[1] ?? 0)),
        `mark ${i} of quad ${seed}`,
      ).toBeLessThan(1);
    expect(found.stray).toBe(0);
  }
});

test('is whole again within a second after the graphics card was lost', async ({ page }) => {
  const got = await page.evaluate(async () => {
    await stagePage.columns('bars', [
      [255, 0, 0, 255],
      [0, 255, 0, 255],
      [0, 0, 255, 255],
    ]);
    const { canvas, stage } = stagePage.open(320, 180);
    const items = [
      stagePage.drawing('slats', 3.5),
      stagePage.layer(
        { kind: 'picture', assetId: 'bars' },
        { opacity: 0.5, blend: 'screen', fit: 'contain' },
      ),
      stagePage.layer(
        { kind: 'words', text: 'Salt & Static', weight: 700, colour: '#ffffff', mono: false },
        { fit: 'contain' },
      ),
    ];
    const input = stagePage.input(320, 180, [stagePage.frame(stagePage.list(items))]);
    await stagePage.drawn(stage, canvas, input);
    await document.fonts.ready;
    const before = await stagePage.drawn(stage, canvas, input);
    const lose = canvas.getContext('webgl2')?.getExtension('WEBGL_lose_context');
    const lost = new Promise((done) => canvas.addEventListener('webglcontextlost', done, { once: true }));
    lose?.loseContext();
    await lost;
    stage.draw(input);
    const during = await stage.readPictures(64);
    const restored = new Promise((done) =>
      canvas.addEventListener('webglcontextrestored', done, { once: true }),
    );
    lose?.restoreContext();
    await restored;
    const since = performance.now();
    let different = -1;
    while (performance.now() - since < 3000) {
      const after = await stagePage.drawn(stage, canvas, input);
      different = after.reduce((sum, value, i) => sum + (value === before[i] ? 0 : 1), 0);
      if (different === 0) break;
      await new Promise((done) => requestAnimationFrame(done));
    }
    const took = performance.now() - since;
    return { different, took, during: during.length, pictures: (await stage.readPictures(64)).length };
  });
  expect(got.different).toBe(0);
  expect(got.took).toBeLessThan(1000);
  expect(got.during).toBe(0);
  expect(got.pictures).toBe(1);
});

test('reads back what the canvas shows, un-warped', async ({ page }) => {
  const got = await page.evaluate(async () => {
    const { canvas, stage } = stagePage.open(128, 72);
    const straight = stagePage.input(128, 72, [
      stagePage.frame(stagePage.list([stagePage.drawing('weave', 3)])),
    ]);
    await stagePage.drawn(stage, canvas, straight);
    stage.draw(straight);
    const reading = stage.readPictures(128);
    const shown = stagePage.pixels(canvas);
    const [picture] = await reading;
    const off = picture
      ? Math.max(...picture.pixels.map((value, i) => Math.abs(value - (shown[i] ?? 0))))
      : -1;
    const data = picture ? await stagePage.pictureData(picture) : null;
    stage.resize(640, 360);
    await stagePage.columns(
      'bars',
      [
        [250, 0, 0, 255],
        [0, 250, 0, 255],
        [0, 0, 250, 255],
        [250, 250, 0, 255],
      ],
      1,
    );
    const warped = stagePage.input(640, 360, [
      stagePage.frame(stagePage.list([stagePage.layer({ kind: 'picture', assetId: 'bars' })])),
    ]);
    for (const region of warped.map.regions)
      region.corners = [
        [60, 40],
        [600, 90],
        [500, 330],
        [120, 280],
      ];
    stage.draw(warped);
    const [true_] = await stage.readPictures(64);
    const at = (x: number, y: number) =>
      true_ ? [...true_.pixels.slice((y * true_.width + x) * 4, (y * true_.width + x) * 4 + 3)] : [];
    return {
      off,
      bytes: data?.length ?? 0,
      size: [true_?.width, true_?.height],
      left: at(6, 4),
      right: at(57, 31),
    };
  });
  expect(got.off).toBeLessThanOrEqual(1);
  expect(got.bytes).toBeGreaterThan(100);
  expect(got.bytes).toBeLessThan(40_000);
  expect(got.size).toEqual([64, 36]);
  expect(farthest(got.left, [250, 0, 0])).toBeLessThanOrEqual(8);
  expect(farthest(got.right, [250, 250, 0])).toBeLessThanOrEqual(8);
});

test('keeps nothing of scenes that are gone', async ({ page }) => {
  const counts = await page.evaluate(async () => {
    let alive = 0;
    const proto = WebGL2RenderingContext.prototype;
    const { createTexture, deleteTexture } = proto;
    proto.createTexture = function create() {
      alive += 1;
      return createTexture.call(this);
    };
    proto.deleteTexture = function remove(texture) {
      alive -= 1;
      deleteTexture.call(this, texture);
    };
    const { canvas, stage } = stagePage.open(64, 36);
    const scene = (n: number) =>
      stagePage.input(64, 36, [
        stagePage.frame(
          stagePage.list([
            stagePage.drawing('tide', n, 126, { opacity: 0.9, key: `run${n}/tide` }),
            stagePage.layer(
              { kind: 'words', text: `Night ${n}`, weight: 700, colour: '#ffffff', mono: false },
              { key: `run${n}/words` },
            ),
          ]),
        ),
      ]);
    await stagePage.drawn(stage, canvas, scene(0));
    const seen: number[] = [];
    for (let n = 1; n <= 600; n += 1) {
      stage.draw(scene(n));
      if (n % 200 === 0) seen.push(alive);
      if (n % 20 === 0) await new Promise((done) => setTimeout(done, 0));
    }
    return seen;
  });
  expect(counts[2]).toBe(counts[0]);
  expect(counts[2]).toBeLessThan(150);
});

test('gives its canvas to a second stage, and the card back when it has gone', async ({ page }) => {
  const got = await page.evaluate(async () => {
    const { canvas, stage } = stagePage.open(64, 36);
    const input = stagePage.input(64, 36, [stagePage.frame(stagePage.list([], [0, 1, 0]))]);
    // A page in development mounts twice: the first stage ends before it has begun.
    stage.dispose();
    const second = stagePage.stageOn(canvas);
    const one = [...(await stagePage.drawn(second, canvas, input)).slice(0, 3)];
    second.dispose();
    const third = stagePage.stageOn(canvas);
    const two = [...(await stagePage.drawn(third, canvas, input)).slice(0, 3)];
    await new Promise((done) => setTimeout(done, 1300));
    const kept = canvas.getContext('webgl2')?.isContextLost();
    const lost = new Promise((done) =>
      canvas.addEventListener('webglcontextlost', () => done(true), { once: true }),
    );
    third.dispose();
    return { one, two, kept, freed: await lost, pictures: await third.readPictures(64) };
  });
  expect(got).toEqual({ one: [0, 255, 0], two: [0, 255, 0], kept: false, freed: true, pictures: [] });
});
