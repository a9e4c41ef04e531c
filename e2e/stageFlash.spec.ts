import { expect, test } from '@playwright/test';
import { type DrawingName, drawingNames } from '#shared/scene/schema';
import { flashes, flashShare } from '#tests/shared/scene/flashes';
import type { StagePage } from './stagePage/stagePage';
import { openStagePage } from './support/stageBundle';
import { watchConsole } from './support/watchConsole';

/** What the page offers; functions given to `evaluate` run there. */
declare const stagePage: StagePage;

const [width, height, framesASecond, seconds] = [32, 18, 30, 2] as const;

test('counts flashes as the definition does', () => {
  // Sequences after WCAG 2.2, "general flash and red flash thresholds": 60 frames a second.
  const wave = (hertz: number, low: number, high: number) =>
    Array.from({ length: 120 }, (_, i) => (Math.floor((i * hertz * 2) / 60) % 2 === 0 ? low : high));
  expect(flashes(wave(3, 0, 1), 60)).toBeLessThanOrEqual(3);
  expect(flashes(wave(4, 0, 1), 60)).toBeGreaterThan(3);
  expect(flashes(wave(10, 0.85, 1), 60), 'darker image not below 0.80').toBe(0);
  expect(flashes(wave(10, 0.5, 0.58), 60), 'less than 0.10 apart').toBe(0);
  expect(
    flashes(
      Array.from({ length: 120 }, (_, i) => 1 - Math.abs(1 - i / 60)),
      60,
    ),
  ).toBeLessThanOrEqual(1);
});

for (const bpm of [85, 128, 175])
  test(`flashes at most three times a second in any drawing at ${bpm} bpm`, async ({ page }) => {
    const check = watchConsole(page);
    await openStagePage(page);
    for (const name of drawingNames) {
      const frames = await page.evaluate(
        async ({ name, bpm, width, height, count, framesASecond }) => {
          const { canvas, stage } = stagePage.open(width, height);
          const all: number[][] = [];
          for (let i = 0; i < count; i += 1) {
            const item = stagePage.drawing(name, ((i / framesASecond) * bpm) / 60 + 8, bpm);
            if (item.source.kind === 'drawing') Object.assign(item.source, { a: 1, b: 1 });
            const data = await stagePage.drawn(
              stage,
              canvas,
              stagePage.input(width, height, [stagePage.frame(stagePage.list([item]))]),
            );
            all.push(stagePage.luminances(data));
          }
          stage.dispose();
          return all;
        },
        {
          name: name satisfies DrawingName,
          bpm,
          width,
          height,
          count: framesASecond * seconds,
          framesASecond,
        },
      );
      const means = frames.map((frame) => frame.reduce((sum, value) => sum + value, 0) / frame.length);
      expect(flashes(means, framesASecond), `${name}: the picture as a whole`).toBeLessThanOrEqual(3);
      // Area: a quarter of the picture counts as seen (25 % of a 10° field).
      expect(flashShare(frames, framesASecond), `${name}: share of points that flash`).toBeLessThan(0.25);
    }
    check();
  });
