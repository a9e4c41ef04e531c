import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import sharp from 'sharp';
import type { StagePage } from './stagePage/stagePage';
import { openStagePage } from './support/stageBundle';
import { watchConsole } from './support/watchConsole';

/** What the page offers; functions given to `evaluate` run there. */
declare const stagePage: StagePage;

/** A clip of two seconds whose frame n (30 a second) is grey with luma 40 + 3n. */
const countingClip = (): Buffer => {
  const folder = mkdtempSync(join(tmpdir(), 'lampyrid-clip-'));
  try {
    const out = join(folder, 'clip.mp4');
    execFileSync('ffmpeg', [
      ...[
        '-loglevel',
        'error',
        '-f',
        'lavfi',
        '-i',
        "nullsrc=s=64x36:r=30:d=2,geq=lum='40+3*N':cb=128:cr=128",
      ],
      ...[
        '-c:v',
        'libx264',
        '-pix_fmt',
        'yuv420p',
        '-g',
        '15',
        '-bf',
        '0',
        '-qp',
        '4',
        '-movflags',
        '+faststart',
        out,
      ],
    ]);
    return readFileSync(out);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
};

test('holds a clip to the clock, and stops it on the frame of a freeze', async ({ page }) => {
  const check = watchConsole(page);
  await openStagePage(page, { '/clip.mp4': countingClip() });
  const got = await page.evaluate(async () => {
    const blob = await (await fetch('/clip.mp4')).blob();
    const clip = { kind: 'clip', width: 64, height: 36, durationS: 2, fps: 30 } as const;
    stagePage.files.set('clip', { ...clip, url: URL.createObjectURL(blob) });
    const { canvas, stage } = stagePage.open(64, 36);
    const show = async (positionS: number, paused: boolean) => {
      const item = stagePage.layer({ kind: 'clip', assetId: 'clip', positionS, rate: 1 });
      const input = stagePage.input(64, 36, [stagePage.frame(stagePage.list([item]))], { paused });
      const data = await stagePage.drawn(stage, canvas, input);
      const grey = data[(18 * 64 + 32) * 4 + 1] ?? 0;
      // Studio range: luma 16..235 stands for 0..255 (ITU-R BT.709).
      return ((grey * 219) / 255 + 16 - 40) / 3;
    };
    const next = () => new Promise<number>((done) => requestAnimationFrame(done));
    const start = await next();
    const errors: number[] = [];
    for (let now = start; now - start < 4500; now = await next()) {
      const positionS = (1.3 + (now - start) / 1000) % 2;
      const frame = await show(positionS, false);
      const late = positionS - frame / 30;
      if (now - start > 1500) errors.push(Math.abs(late > 1 ? late - 2 : late < -1 ? late + 2 : late));
    }
    errors.sort((a, b) => a - b);
    let frozen = 0;
    for (let i = 0; i < 40; i += 1) {
      frozen = await show(0.75, true);
      await next();
    }
    return {
      median: errors[errors.length >> 1] ?? 9,
      p90: errors[Math.floor(errors.length * 0.9)] ?? 9,
      frozen,
    };
  });
  expect(got.median).toBeLessThan(0.06);
  expect(got.p90).toBeLessThan(0.12);
  expect(Math.abs(got.frozen - 22.5)).toBeLessThanOrEqual(1.2);
  check();
});

test('fetches files ahead, tries again, finds them without a network and lets go of what nobody wants', async ({
  page,
}) => {
  const png = await sharp({ create: { width: 8, height: 8, channels: 4, background: '#2468ac' } })
    .png()
    .toBuffer();
  await openStagePage(page, { '/a.png': png, '/b.png': png });
  let [fails, asked, open] = [2, 0, true];
  await page.route('http://localhost:1/*.png', (route) => {
    asked += 1;
    if (!open) return route.abort();
    if (route.request().url().endsWith('b.png') && fails > 0) {
      fails -= 1;
      return route.fulfill({ status: 503, body: '' });
    }
    return route.fulfill({ contentType: 'image/png', body: png });
  });
  const fetchAll = (names: string[]) =>
    page.evaluate(async (names) => {
      const store = stagePage.createFileStore();
      const asset = (name: string) =>
        ({
          id: name,
          kind: 'still',
          url: `/${name}.png`,
          bytes: 90,
          width: 8,
          height: 8,
          durationS: null,
          fps: null,
        }) as const;
      store.want(names.map(asset));
      const first = store.counts();
      const until = performance.now() + 8000;
      while (store.counts().onBoard < names.length && performance.now() < until)
        await new Promise((done) => setTimeout(done, 20));
      const all = store.counts();
      const file = store.get(names[0] ?? '');
      store.want([asset('a')]);
      const one = { counts: store.counts(), gone: store.get('b') };
      store.dispose();
      return { first, all, kind: file?.kind, width: file?.width, one };
    }, names);
  const got = await fetchAll(['a', 'b']);
  expect(got.first).toEqual({ onBoard: 0, wanted: 2 });
  expect(got.all).toEqual({ onBoard: 2, wanted: 2 });
  expect([got.kind, got.width]).toEqual(['picture', 8]);
  expect(got.one).toEqual({ counts: { onBoard: 1, wanted: 1 }, gone: null });
  expect(asked).toBe(4);
  open = false;
  await page.evaluate(() => undefined);
  const again = await fetchAll(['a']);
  expect(again.all).toEqual({ onBoard: 1, wanted: 1 });
});
