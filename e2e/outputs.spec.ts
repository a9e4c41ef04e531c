import { drawingBody, makeNight, makeScene, mapWhole } from './support/night';
import { expectColour, readPage } from './support/pixels';
import { expect, test } from './support/test';

test('a region is added, moved by keys while the display follows, saved, and an older version comes back', async ({
  signedIn,
  joinDisplay,
  house,
  call,
}) => {
  test.setTimeout(150_000);
  const show = await makeNight(call);
  // A scene of one light colour and nothing that moves, so that pixels say where the region is.
  const scene = await makeScene(call, show, 'Paper', {
    ...drawingBody('tide'),
    layers: [],
    ground: '#e0e0e0',
  });
  const { page: display, displayId } = await joinDisplay(show.id, 'House left', { width: 640, height: 360 });
  await mapWhole(call, displayId, [640, 360]);
  await signedIn.setViewportSize({ width: 1440, height: 900 });
  await signedIn.goto(`${house.address}/shows/${show.id}/live`);
  await signedIn
    .getByRole('group', { name: 'Lands on' })
    .getByRole('button', { name: 'now', exact: true })
    .click();
  await signedIn.locator(`[data-scene="${scene.id}"]`).click();
  await expectColour(display, [4, 4], [224, 224, 224]);

  await signedIn.goto(`${house.address}/shows/${show.id}/outputs`);
  await expect(signedIn.getByRole('heading', { name: 'House left' })).toBeVisible();
  await signedIn.locator('polygon').first().click();
  for (let press = 0; press < 4; press += 1) await signedIn.keyboard.press('Shift+ArrowRight');
  // Nothing is saved yet, and the wall shows it: 40 px to the right.
  await expectColour(display, [4, 4], [0, 0, 0], 3);
  const versions = await call<{ version: number }[]>('GET', `/api/displays/${displayId}/maps`);
  expect(versions.length).toBe(2);
  await signedIn.getByRole('button', { name: 'Save version' }).click();
  await expect(signedIn.getByRole('button', { name: 'Go back to 2' })).toBeVisible();
  await expectColour(display, [4, 4], [0, 0, 0], 3);
  await signedIn.getByRole('button', { name: 'Go back to 2' }).click();
  await expectColour(display, [4, 4], [224, 224, 224]);

  await signedIn.getByRole('button', { name: 'Line-up grid' }).click();
  await expect
    .poll(async () => (await readPage(display)).at(4, 180, 3)[0], { timeout: 15_000 })
    .not.toBe(224);
  await signedIn.getByRole('button', { name: 'Grid off' }).click();
  await expectColour(display, [4, 180], [224, 224, 224]);
});

test('the lookout says when a display is gone, and the crew sees it come back', async ({
  signedIn,
  joinDisplay,
  house,
  call,
}) => {
  const show = await makeNight(call);
  const { page: display } = await joinDisplay(show.id, 'House left', { width: 640, height: 360 });
  await signedIn.setViewportSize({ width: 1440, height: 900 });
  await signedIn.goto(`${house.address}/shows/${show.id}/lookout`);
  await expect(signedIn.getByRole('cell', { name: '640×360' })).toBeVisible({ timeout: 20_000 });
  await display.goto('about:blank');
  await expect(signedIn.getByText(/House left has no link/)).toBeVisible({
    timeout: 20_000,
  });
  await display.goto(`${house.address}/display`);
  await expect(signedIn.getByText(/House left has no link/)).toHaveCount(0, {
    timeout: 20_000,
  });
});

test('a rehearsal draws the room and reaches no real display', async ({
  signedIn,
  joinDisplay,
  house,
  call,
  page,
}) => {
  test.setTimeout(150_000);
  const show = await makeNight(call);
  const scene = await makeScene(call, show, 'Paper', {
    ...drawingBody('tide'),
    layers: [],
    ground: '#e0e0e0',
  });
  const { page: display, displayId } = await joinDisplay(show.id, 'House left', { width: 640, height: 360 });
  await mapWhole(call, displayId, [640, 360]);
  await signedIn.goto(`${house.address}/shows/${show.id}/rehearsal`);
  const phone = await page.context().newPage();
  await phone.setViewportSize({ width: 390, height: 844 });
  await phone.goto(`${house.address}/shows/${show.id}/handset?room=rehearsal`);
  await phone
    .getByRole('group', { name: 'Lands on' })
    .getByRole('button', { name: 'now', exact: true })
    .click();
  await phone.locator(`[data-scene="${scene.id}"]`).click();
  await expect(phone.locator(`[data-scene="${scene.id}"]`)).toHaveAttribute('data-state', 'on', {
    timeout: 20_000,
  });
  const room = signedIn.locator('canvas').first();
  const box = await room.boundingBox();
  if (!box) throw new Error('The room is not drawn.');
  await expect
    .poll(
      async () => {
        const shown = await readPage(signedIn);
        let most = 0;
        for (let x = 0.1; x < 0.95; x += 0.05)
          for (let y = 0.1; y < 0.95; y += 0.05)
            most = Math.max(most, shown.at(box.x + box.width * x, box.y + box.height * y)[0]);
        return most;
      },
      { timeout: 20_000 },
    )
    .toBeGreaterThan(120);
  expect((await readPage(display)).at(320, 180)).toEqual([0, 0, 0]);
  expect(await call<unknown[]>('GET', `/api/shows/${show.id}/as-run`)).toEqual([]);
  await phone.close();
});
