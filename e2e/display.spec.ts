import type { Page } from '@playwright/test';
import type { ShowDetail } from '../shared/api/shows';
import { newBody } from '../shared/scene/defaults';
import { drawingBody, makeNight, makeScene, mapWhole } from './support/night';
import { expectColour } from './support/pixels';
import { expect, type JoinedDisplay, test } from './support/test';

const middle = [320, 180] as const;
const paper = [0xe0, 0xe0, 0xe0] as const;
const black = [0, 0, 0] as const;

/** Fires a scene as the crew does, and waits until a display shows its colour. */
async function fire(crew: Page, house: string, show: ShowDetail, name: string): Promise<void> {
  await crew.goto(`${house}/shows/${show.id}/live`);
  await crew
    .getByRole('group', { name: 'Lands on' })
    .getByRole('button', { name: 'now', exact: true })
    .click();
  await crew.locator('[data-scene]', { hasText: name }).click();
}

const flat = { ...newBody(), ground: '#e0e0e0', transition: { kind: 'cut' as const, beats: 0 } };

/** True once the page is kept in the browser with all it is made of. */
const isKept = (page: Page): Promise<boolean> =>
  page.evaluate(async () => {
    const urls = (await (await caches.open('lampyrid-page')).keys()).map(({ url }) => new URL(url).pathname);
    const active = (await navigator.serviceWorker.getRegistration('/display'))?.active ?? null;
    return active !== null && urls.includes('/display') && urls.some((path) => path.endsWith('.js'));
  });

const gone = (page: Page): Promise<void> =>
  expect(page.locator('html')).not.toHaveAttribute('data-link', 'on', { timeout: 20_000 });

test('a display that is not joined shows its code in two parts, keeps it while the server is away, and takes it then', async ({
  signedIn,
  openPage,
  house,
  call,
}) => {
  const show = await makeNight(call);
  const page = await openPage();
  await page.goto(`${house.address}/display`);
  await expect(page.locator('#code .word')).toHaveText(/^[A-Z]{4}$/);
  await expect(page.locator('#code .digits')).toHaveText(/^\d{4}$/);
  const code = `${await page.locator('#code .word').textContent()} ${await page.locator('#code .digits').textContent()}`;
  await house.restart('SIGKILL', async () => {
    await page.waitForEvent('requestfailed', (request) => request.url().endsWith('/api/pairing/wait'));
    await expect(page.locator('#code .word')).toHaveText(code.slice(0, 4));
  });
  expect(signedIn.url()).toContain(house.address);
  const { id } = await call<{ id: string }>('POST', '/api/displays/join', {
    code,
    showId: show.id,
    name: 'Bar',
  });
  await expect(page.locator('html')).toHaveAttribute('data-link', 'on', { timeout: 20_000 });
  await expect(page.locator('#code')).toBeHidden();

  await test.step('taken out of the show, it shows a new code', async () => {
    await call('DELETE', `/api/displays/${id}`);
    await expect(page.locator('#code .word')).toBeVisible({ timeout: 20_000 });
    expect(await page.locator('#code').textContent()).not.toContain(code.slice(5));
  });
});

test('a display reloaded while the hub is dead goes on with its picture, and follows the hub when it is back', async ({
  signedIn,
  joinDisplay,
  house,
  call,
}) => {
  test.setTimeout(120_000);
  const show = await makeNight(call);
  await makeScene(call, show, 'Paper', flat);
  const { page, displayId }: JoinedDisplay = await joinDisplay(show.id, 'House left');
  await mapWhole(call, displayId, [640, 360]);
  await fire(signedIn, house.address, show, 'Paper');
  await expectColour(page, middle, paper);
  await expect.poll(() => isKept(page), { timeout: 20_000 }).toBe(true);
  // What was last told is kept within a second.
  await expect
    .poll(() => page.evaluate(() => localStorage.getItem('lampyrid.last')?.includes('"runId"') ?? false))
    .toBe(true);
  await house.restart('SIGKILL', async () => {
    await gone(page);
    await page.reload();
    await expectColour(page, middle, paper);
    await expect(page.locator('#code')).toBeHidden();
  });
  await expect(page.locator('html')).toHaveAttribute('data-link', 'on', { timeout: 20_000 });
  await expectColour(page, middle, paper);
  await signedIn.getByRole('button', { name: 'Blackout' }).click();
  await expectColour(page, middle, black, 2);
});

test('a display says that it stands still while the show does, and not while the show moves', async ({
  signedIn,
  joinDisplay,
  house,
  call,
}) => {
  const show = await makeNight(call);
  await makeScene(call, show, 'Paper', flat);
  await makeScene(call, show, 'Low tide', drawingBody('tide'));
  const { page, displayId } = await joinDisplay(show.id, 'House left');
  await mapWhole(call, displayId, [640, 360]);
  await expect(page.locator('html')).toHaveAttribute('data-still', 'true', { timeout: 20_000 });
  await fire(signedIn, house.address, show, 'Low tide');
  await expect(page.locator('html')).toHaveAttribute('data-still', 'false', { timeout: 20_000 });
  await signedIn.locator('[data-scene]', { hasText: 'Paper' }).click();
  await expectColour(page, middle, paper);
  await expect(page.locator('html')).toHaveAttribute('data-still', 'true', { timeout: 20_000 });
});

test('a display whose graphics card is lost for good loads itself anew', async ({
  signedIn,
  joinDisplay,
  house,
  call,
}) => {
  test.setTimeout(120_000);
  const show = await makeNight(call);
  await makeScene(call, show, 'Paper', flat);
  const { page, displayId } = await joinDisplay(show.id, 'House left');
  await mapWhole(call, displayId, [640, 360]);
  await fire(signedIn, house.address, show, 'Paper');
  await expectColour(page, middle, paper);
  const loaded = page.waitForEvent('load', { timeout: 60_000 });
  await page.evaluate(() => {
    const canvas = document.querySelector<HTMLCanvasElement>('#picture');
    canvas?.getContext('webgl2')?.getExtension('WEBGL_lose_context')?.loseContext();
  });
  await loaded;
  await expectColour(page, middle, paper);
});
