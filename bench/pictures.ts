import { mkdirSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'playwright';
import sharp from 'sharp';
import type { Corners, OutputMap, Region } from '../shared/mapping/schema';
import type { Scene } from '../shared/scene/schema';
import { fire, type OpenHouse, openHouse } from './support/openHouse';

const folder = join(process.cwd(), 'docs/pictures');
const laptop: [number, number] = [1440, 900];
const phone: [number, number] = [390, 844];
const raster: [number, number] = [480, 270];
/** Frames are drawn in software here: pages get this long to show what they were sent, ms. */
const settleMs = 6000;
const most = { one: 200_000, all: 1_000_000 };

/** Quads as a lining-up leaves them: never square to the raster. */
const places: readonly Corners[] = [
  [
    [18, 30],
    [297, 17],
    [288, 184],
    [27, 174],
  ],
  [
    [327, 45],
    [462, 58],
    [453, 196],
    [333, 189],
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
async function takePage(
  house: OpenHouse,
  name: string,
  path: string,
  words: string,
  before: (page: Page) => Promise<void> = async () => undefined,
): Promise<void> {
  const page = await house.open(path, laptop);
  await before(page);
  await take(page, name, words);
  await page.close();
}

const sceneNamed = (house: OpenHouse, name: string): Scene => {
  const scene = house.scenes.find((one) => one.name === name);
  if (!scene) throw new Error(`The demo night has no scene “${name}”.`);
  return scene;
};

/** Fires scenes in the house, or in rehearsal, from a phone that is put away again. */
async function fireFrom(house: OpenHouse, path: string, names: readonly string[], name?: string) {
  const handset = await house.open(path, phone);
  await handset.getByText('now', { exact: true }).click();
  for (const one of names) await fire(handset, house.show, sceneNamed(house, one));
  if (name) await take(handset, name, 'Handset');
  await handset.close();
}

/** What wants displays that draw. */
async function takeNight(house: OpenHouse, at: string): Promise<void> {
  const displays: Page[] = [];
  for (const [name, screenIds] of machines)
    displays.push(await house.join(name, raster, mapOf(house, screenIds)));
  // Each scene that was on the wall leaves its picture on its tile.
  await fireFrom(house, `${at}/handset`, ['Low tide', 'Lamps on the slip', 'Boathouse'], 'handset');
  await takePage(house, 'live', `${at}/live`, 'Live');
  await takePage(house, 'lookout', `${at}/lookout`, 'Lookout');
  await takePage(house, 'plan', at, 'Plan');
  await takePage(house, 'outputs', `${at}/outputs`, 'Outputs', async (page) => {
    await page
      .locator('polygon.cursor-move')
      .first()
      .click({ position: { x: 60, y: 60 } });
  });
  for (const page of displays) await page.context().close();
}

async function main(): Promise<void> {
  mkdirSync(folder, { recursive: true });
  const house = await openHouse();
  try {
    const at = `/shows/${house.show.id}`;
    await takeNight(house, at);
    await takePage(house, 'rehearsal', `${at}/rehearsal`, 'Rehearsal', () =>
      fireFrom(house, `${at}/handset?room=rehearsal`, ['Awning']),
    );
    await takePage(house, 'scene', `${at}/scenes/${sceneNamed(house, 'Awning').id}`, 'Scene');
    checkAll();
  } finally {
    await house.close();
  }
}

function checkAll(): void {
  const names = readdirSync(folder).filter((name) => name.endsWith('.webp'));
  const all = names.reduce((sum, name) => sum + statSync(join(folder, name)).size, 0);
  if (all > most.all) throw new Error(`The pictures have ${all} bytes together; ${most.all} are allowed.`);
}

await main();
