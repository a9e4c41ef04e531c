import type { Page } from '@playwright/test';
import { expect } from '@playwright/test';
import sharp from 'sharp';

/** What a page shows, as RGB rows. */
export interface Shown {
  width: number;
  height: number;
  /** Mean colour of the `side` × `side` pixels round a point, 0..255 each. */
  at: (x: number, y: number, side?: number) => [red: number, green: number, blue: number];
}

/** Reads back what a page shows, one raster pixel a CSS pixel. */
export async function readPage(page: Page): Promise<Shown> {
  const png = await page.screenshot({ type: 'png', scale: 'css' });
  const { data, info } = await sharp(png).removeAlpha().raw().toBuffer({ resolveWithObject: true });
  const { width, height, channels } = info;
  return {
    width,
    height,
    at: (x, y, side = 5) => {
      const sum = [0, 0, 0];
      const from = Math.floor(side / 2);
      for (let dy = -from; dy <= from; dy += 1)
        for (let dx = -from; dx <= from; dx += 1) {
          const column = Math.min(width - 1, Math.max(0, Math.round(x) + dx));
          const row = Math.min(height - 1, Math.max(0, Math.round(y) + dy));
          for (let part = 0; part < 3; part += 1)
            sum[part] = (sum[part] ?? 0) + (data[(row * width + column) * channels + part] ?? 0);
        }
      const count = (2 * from + 1) ** 2;
      return [(sum[0] ?? 0) / count, (sum[1] ?? 0) / count, (sum[2] ?? 0) / count];
    },
  };
}

/** How far two colours are apart: the largest difference of a part. */
export const apart = (a: readonly number[], b: readonly number[]): number =>
  Math.max(...a.map((part, index) => Math.abs(part - (b[index] ?? 0))));

/** Waits until a page shows about this colour at a point. */
export async function expectColour(
  page: Page,
  [x, y]: readonly [number, number],
  colour: readonly [number, number, number],
  tolerance = 24,
): Promise<void> {
  await expect
    .poll(async () => apart((await readPage(page)).at(x, y), colour), {
      message: `colour at ${x}, ${y} is not ${colour.join(' ')}`,
      timeout: 20_000,
    })
    .toBeLessThanOrEqual(tolerance);
}

/** Waits until something bright is on a page. */
export async function expectLit(page: Page, points: readonly (readonly [number, number])[]): Promise<void> {
  await expect
    .poll(
      async () => {
        const shown = await readPage(page);
        return Math.max(...points.map(([x, y]) => Math.max(...shown.at(x, y))));
      },
      { message: 'the display stays dark', timeout: 30_000 },
    )
    .toBeGreaterThan(30);
}
