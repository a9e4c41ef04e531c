import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, type Page, test } from '@playwright/test';
import { chance } from '#shared/scene/noise';
import { type BlendMode, blendModes } from '#shared/scene/schema';
import type { StagePage } from './stagePage/stagePage';
import { blended } from './support/blendFormulas';
import { openStagePage } from './support/stageBundle';
import { watchConsole } from './support/watchConsole';

/** What the page offers; functions given to `evaluate` run there. */
declare const stagePage: StagePage;

let check: () => void;
test.beforeEach(async ({ page }) => {
  check = watchConsole(page);
  await openStagePage(page);
});
test.afterEach(() => check());

/** Colours that try every formula's corners, then any: 64 of a seed. */
const colours = (seed: number): number[][] => {
  const ends = [0, 255, 128, 127, 64, 1, 254, 191];
  return Array.from({ length: 64 }, (_, i) =>
    i < 8
      ? [ends[i] ?? 0, ends[(i + seed) % 8] ?? 0, ends[(i * 3 + seed) % 8] ?? 0, 255]
      : [0, 1, 2].map((part) => Math.floor(chance(i, part, seed) * 256)).concat(255),
  );
};

/** Draws one picture of 64 colours over another in a mode; gives the colours that come out. */
const blendDrawn = (page: Page, mode: BlendMode, opacity: number): Promise<number[][]> =>
  page.evaluate(
    async ({ mode, opacity, below, above }) => {
      await stagePage.columns('below', below);
      await stagePage.columns('above', above);
      const { canvas, stage } = stagePage.open(64, 32);
      const list = stagePage.list([
        stagePage.layer({ kind: 'picture', assetId: 'below' }),
        stagePage.layer({ kind: 'picture', assetId: 'above' }, { blend: mode, opacity }),
      ]);
      const data = await stagePage.drawn(stage, canvas, stagePage.input(64, 32, [stagePage.frame(list)]));
      stage.dispose();
      const row = 16 * 64 * 4;
      return Array.from({ length: 64 }, (_, x) => [...data.slice(row + x * 4, row + x * 4 + 3)]);
    },
    { mode, opacity, below: colours(1), above: colours(2) },
  );

const farthest = (a: readonly number[], b: readonly number[]): number =>
  Math.max(...a.map((value, i) => Math.abs(value - (b[i] ?? 0))));

test('blends each mode as the W3C formulas say, opaque and half see-through', async ({ page }) => {
  const [below, above] = [colours(1), colours(2)];
  for (const mode of blendModes)
    for (const opacity of [1, 0.6]) {
      const drawn = (await blendDrawn(page, mode, opacity)).flat();
      const wanted = below.flatMap((colour, i) =>
        [0, 1, 2].map(
          (part) => 255 * blended(mode, (colour[part] ?? 0) / 255, (above[i]?.[part] ?? 0) / 255, opacity),
        ),
      );
      expect(farthest(drawn, wanted), `${mode} at ${opacity}`).toBeLessThanOrEqual(2);
    }
});

test('blends as ffmpeg’s own filter does', async ({ page }) => {
  const folder = mkdtempSync(join(tmpdir(), 'lampyrid-blend-'));
  try {
    const flat = (seed: number) => Buffer.from(colours(seed).flatMap((colour) => colour.slice(0, 3)));
    writeFileSync(join(folder, 'below'), flat(1));
    writeFileSync(join(folder, 'above'), flat(2));
    const raw = (name: string) => [
      '-f',
      'rawvideo',
      '-pix_fmt',
      'gray',
      '-s',
      '192x1',
      '-i',
      join(folder, name),
    ];
    for (const mode of ['multiply', 'screen', 'overlay', 'difference'] as const) {
      // The filter's first input decides in `overlay`, as the backdrop does.
      const wanted = execFileSync('ffmpeg', [
        ...['-loglevel', 'error', ...raw('below'), ...raw('above')],
        ...[
          '-filter_complex',
          `blend=all_mode=${mode}`,
          '-frames:v',
          '1',
          '-f',
          'rawvideo',
          '-pix_fmt',
          'gray',
          '-',
        ],
      ]);
      const drawn = (await blendDrawn(page, mode, 1)).flat();
      expect(farthest(drawn, [...wanted]), mode).toBeLessThanOrEqual(2);
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
});
