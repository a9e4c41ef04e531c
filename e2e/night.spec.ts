import type { Page } from '@playwright/test';
import type { Asset } from '../shared/api/assets';
import type { ShowDetail } from '../shared/api/shows';
import { newBody, newLayer } from '../shared/scene/defaults';
import type { SceneBody } from '../shared/scene/schema';
import { makeMp4, makePng } from './support/madeFiles';
import { drawingBody, makeNight, makeScene } from './support/night';
import { expectColour, readPage } from './support/pixels';
import { expect, test } from './support/test';

type Corners = [[number, number], [number, number], [number, number], [number, number]];

/** Quads on a raster of 640 × 360 that lean like a wall seen from the side. */
const wallCorners: Corners = [
  [80, 60],
  [560, 30],
  [520, 300],
  [110, 330],
];
const sailCorners: Corners = [
  [200, 40],
  [420, 80],
  [440, 320],
  [180, 280],
];

/** Where the diagonals of a quad cross: the middle of its picture, whatever the perspective. */
const middleOf = ([a, b, c, d]: Corners): [number, number] => {
  const [x1, y1, x2, y2, x3, y3, x4, y4] = [...a, ...c, ...b, ...d] as [
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  const under = (x1 - x2) * (y3 - y4) - (y1 - y2) * (x3 - x4);
  const left = x1 * y2 - y1 * x2;
  const right = x3 * y4 - y3 * x4;
  return [(left * (x3 - x4) - (x1 - x2) * right) / under, (left * (y3 - y4) - (y1 - y2) * right) / under];
};

/** A point some way from the middle of a quad towards a corner. */
const towards = (corners: Corners, corner: number, share: number): [number, number] => {
  const [mx, my] = middleOf(corners);
  const [cx, cy] = corners[corner] ?? [0, 0];
  return [mx + (cx - mx) * share, my + (cy - my) * share];
};

const map = (screenId: string, corners: Corners) => ({
  map: {
    raster: [640, 360],
    regions: [
      { id: 'r1', screenId, name: screenId, source: { x: 0, y: 0, w: 1, h: 1 }, corners, brightness: 1 },
    ],
  },
  note: 'lined up',
});

const green = [0x1f, 0x9d, 0x55] as const;
const black = [0, 0, 0] as const;
const white = [255, 255, 255] as const;

/** Checks that a display shows the clip with the mark in its middle, and nothing outside its corners. */
async function expectPicture(page: Page, corners: Corners): Promise<void> {
  await expectColour(page, middleOf(corners), white);
  for (const corner of [0, 1, 2, 3]) await expectColour(page, towards(corners, corner, 0.85), green, 30);
  const shown = await readPage(page);
  for (const corner of [0, 1, 2, 3]) {
    const [x, y] = towards(corners, corner, 1.12);
    expect(shown.at(x, y, 3), `outside corner ${corner}`).toEqual([0, 0, 0]);
  }
}

async function expectBlack(page: Page, corners: Corners): Promise<void> {
  await expectColour(page, middleOf(corners), black, 2);
}

const brandedBody = (clip: Asset, mark: Asset): SceneBody => ({
  ...newBody(),
  transition: { kind: 'cut', beats: 0 },
  layers: [
    { ...newLayer('clip', 'l1'), source: { kind: 'clip', assetId: clip.id, rate: 1, fitBars: null } },
    {
      ...newLayer('mark', 'l2'),
      source: { kind: 'mark', assetId: mark.id, take: 'still', amount: 0, seed: 1 },
    },
  ],
});

const tile = (page: Page, name: string) => page.locator('[data-scene]', { hasText: name });

test('a clip and a logo become a scene on two mapped displays, fired from a phone, through a reload and a dead hub', async ({
  signedIn,
  joinDisplay,
  house,
  call,
}) => {
  test.setTimeout(180_000);
  const show: ShowDetail = await makeNight(call);

  await signedIn.goto(`${house.address}/library`);
  await signedIn
    .locator('input[type=file]')
    .first()
    .setInputFiles([makeMp4(), await makePng()]);
  await expect
    .poll(async () => (await call<Asset[]>('GET', '/api/assets')).map((asset) => asset.state), {
      timeout: 60_000,
    })
    .toEqual(['ready', 'ready']);
  await expect(signedIn.getByText('green wall').first()).toBeVisible();
  const assets = await call<Asset[]>('GET', '/api/assets');
  const clip = assets.find((asset) => asset.kind === 'clip');
  const mark = assets.find((asset) => asset.kind !== 'clip');
  if (!clip || !mark) throw new Error('The files are not in the Library.');
  expect([clip.width, clip.height].every((side) => (side ?? 1) % 2 === 0)).toBe(true);

  await makeScene(call, show, 'Green wall', brandedBody(clip, mark));
  await makeScene(call, show, 'Low tide', drawingBody('tide'));

  const wall = await joinDisplay(show.id, 'House left', { width: 640, height: 360 });
  const sail = await joinDisplay(show.id, 'House right', { width: 640, height: 360 });
  await call('POST', `/api/displays/${wall.displayId}/maps`, map('wall', wallCorners));
  await call('POST', `/api/displays/${sail.displayId}/maps`, map('sail', sailCorners));
  await expectBlack(wall.page, wallCorners);

  const phone = signedIn;
  await phone.setViewportSize({ width: 390, height: 844 });
  await phone.goto(`${house.address}/shows/${show.id}/handset`);
  await phone
    .getByRole('group', { name: 'Lands on' })
    .getByRole('button', { name: 'bar', exact: true })
    .click();
  await tile(phone, 'Green wall').click();
  await expect(tile(phone, 'Green wall')).toHaveAttribute('data-state', 'on', { timeout: 20_000 });
  await expectPicture(wall.page, wallCorners);
  await expectPicture(sail.page, sailCorners);

  await test.step('one display is reloaded in the middle', async () => {
    await wall.page.reload();
    await expectPicture(wall.page, wallCorners);
    await expectPicture(sail.page, sailCorners);
  });

  await test.step('the hub dies and comes back: displays keep drawing, the state is as before', async () => {
    const before = await readPage(sail.page);
    expect(before.at(...middleOf(sailCorners))[0]).toBeGreaterThan(200);
    await house.restart('SIGKILL');
    await expectPicture(sail.page, sailCorners);
    await expectPicture(wall.page, wallCorners);
    await expect(tile(phone, 'Green wall')).toHaveAttribute('data-state', 'on', { timeout: 20_000 });
    await phone.getByRole('button', { name: 'Blackout' }).click();
    await expectBlack(wall.page, wallCorners);
    await expectBlack(sail.page, sailCorners);
    await phone.getByRole('button', { name: /Restore: blackout/ }).click();
    await expectPicture(wall.page, wallCorners);
  });

  await test.step('what was drawn is in the as-run log', async () => {
    const rows = await call<{ sceneName: string | null; displayName: string }[]>(
      'GET',
      `/api/shows/${show.id}/as-run`,
    );
    const drawn = rows.filter((row) => row.sceneName === 'Green wall').map((row) => row.displayName);
    expect(new Set(drawn)).toEqual(new Set(['House left', 'House right']));
  });
});
