import { mkdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'playwright';
import sharp from 'sharp';
import type { Corners, OutputMap, Region } from '../shared/mapping/schema';
import { fire, type OpenHouse, openHouse } from './support/openHouse';

const folder = join(process.cwd(), 'docs/pictures');
const laptop: [number, number] = [1440, 900];
const phone: [number, number] = [390, 844];
const raster: [number, number] = [640, 360];
/** Frames are drawn in software here: pages get this long to show what they were sent, ms. */
const settleMs = 6000;
const most = { one: 200_000, all: 1_000_000 };

/** Quads as a lining-up leaves them: never square to the raster. */
const places: readonly Corners[] = [
  [
    [24, 40],
    [396, 22],
    [384, 246],
    [36, 232],
  ],
  [
    [436, 60],
    [616, 78],
    [604, 262],
    [444, 252],
  ],
];

const mapOf = (house: OpenHouse, screenIds: readonly string[]): OutputMap => ({
  raster,
  regions: screenIds.flatMap((screenId, at): Region[] => {
    const screen = house.show.venue?.body.screens.find(({ id }) => id === screenId);
    const corners = places[at];
    if (!screen || !corners) return [];
    const source = { x: 0, y: 0, w: 1, h: 1 };
    return [{ id: `r${at}`, screenId, name: screen.name, source, corners, brightness: 1 }];
  }),
});

/** Machines of the night and the screens that each feeds. */
const machines = [
  ['Truss left', ['back', 'sail-l']],
  ['Truss right', ['bar', 'sail-r']],
  ['Stairs', ['stair', 'door']],
] as const;

async function take(page: Page, name: string, words: string): Promise<void> {
  await page.waitForTimeout(settleMs);
  const path = join(folder, `${name}.webp`);
  await sharp(await page.screenshot())
    .webp({ quality: 80, effort: 6 })
    .toFile(path);
  const { size } = statSync(path);
  if (size > most.one) throw new Error(`${name}.webp has ${size} bytes; ${most.one} are allowed.`);
  console.error(`${words}: ${name}.webp, ${Math.round(size / 1024)} kB`);
}

/** Opens a page, takes its picture, and closes it: pages that draw slow each other down. */
async function takePage(house: OpenHouse, name: string, path: string, words: string): Promise<void> {
  const page = await house.open(path, laptop);
  await take(page, name, words);
  await page.close();
}

async function main(): Promise<void> {
  mkdirSync(folder, { recursive: true });
  const house = await openHouse();
  try {
    const at = `/shows/${house.show.id}`;
    const named = (name: string) => {
      const scene = house.scenes.find((one) => one.name === name);
      if (!scene) throw new Error(`The demo night has no scene “${name}”.`);
      return scene;
    };
    for (const [name, screenIds] of machines) await house.join(name, raster, mapOf(house, screenIds));
    const handset = await house.open(`${at}/handset`, phone);
    await handset.getByText('now', { exact: true }).click();
    await fire(handset, house.show, named('Lamps on the slip'));
    await fire(handset, house.show, named('Harbour lights'));
    await take(handset, 'handset', 'Handset');
    await takePage(house, 'live', `${at}/live`, 'Live');
    await fire(handset, house.show, named('Boathouse'));
    await takePage(house, 'lookout', `${at}/lookout`, 'Lookout');
    await takePage(house, 'rehearsal', `${at}/rehearsal`, 'Rehearsal');
    await takePage(house, 'outputs', `${at}/outputs`, 'Outputs');
    await takePage(house, 'scene', `${at}/scenes/${named('Awning').id}`, 'Scene');
    await takePage(house, 'plan', at, 'Plan');
  } finally {
    await house.close();
  }
}

await main();
