import type { FromHub } from '../shared/protocol/messages';
import { drawingBody, makeNight, makeScene } from './support/night';
import { expect, lead, test } from './support/test';

test('an assistant is invited by mail, and is refused what is not theirs: on the route, on the socket, on the page', async ({
  signedIn,
  openPage,
  house,
  call,
}) => {
  const show = await makeNight(call);
  const scene = await makeScene(call, show, 'Low tide', drawingBody('tide'));

  await signedIn.goto(`${house.address}/crew`);
  await signedIn.getByRole('textbox', { name: 'Mail' }).fill('pip@crew.example');
  await signedIn.getByLabel('Role', { exact: true }).selectOption('assistant');
  await signedIn.getByRole('button', { name: /^Invite|^Send/ }).click();
  await expect(signedIn.getByText('pip@crew.example')).toBeVisible();
  await signedIn.goto(`${house.address}/mail`);
  const link = await signedIn.getByRole('link', { name: /\/invite#/ }).getAttribute('href');

  const page = await openPage({ width: 390, height: 844 });
  await page.goto(link ?? '');
  await page.getByLabel('Your name').fill('Pip Arkwright');
  await page.getByLabel('Password').fill('a lantern on the quay');
  await page.getByRole('button', { name: /join/i }).click();
  await expect(page).toHaveURL(/\/shows$/);

  const refused = await page.request.post(`${house.address}/api/shows/${show.id}/scenes`, {
    headers: { origin: house.address },
    data: { name: 'Mine', phaseId: null, energy: 5, body: drawingBody('tide') },
  });
  expect(refused.status()).toBe(403);
  expect((await refused.json()).detail).toContain('assistant');
  const foreign = await page.request.post(`${house.address}/api/shows/${show.id}/scenes`, {
    headers: { origin: 'http://evil.example' },
    data: {},
  });
  expect(foreign.status()).toBe(403);

  const answer = await page.evaluate(
    ([showId, sceneId]) =>
      new Promise<FromHub>((resolve, reject) => {
        const socket = new WebSocket(`ws://${location.host}/hub?show=${showId}&room=live&as=crew`);
        socket.onerror = () => reject(new Error('no socket'));
        socket.onopen = () =>
          socket.send(JSON.stringify({ type: 'hello', protocol: 1, epoch: null, revision: null }));
        socket.onmessage = (event) => {
          const message = JSON.parse(String(event.data)) as FromHub;
          if (message.type === 'welcome')
            socket.send(
              JSON.stringify({
                type: 'command',
                command: {
                  id: 'not-mine',
                  expiresAt: message.hubNow + 2000,
                  body: { kind: 'scene.trigger', screenIds: ['wall'], sceneId, landsOn: 'now' },
                },
              }),
            );
          if (message.type === 'refused' || message.type === 'taken') {
            socket.close();
            resolve(message);
          }
        };
      }),
    [show.id, scene.id] as const,
  );
  expect(answer).toMatchObject({ type: 'refused', commandId: 'not-mine', code: 'not-allowed' });

  await page.goto(`${house.address}/shows/${show.id}/handset`);
  // It looks unready, and still says why when it is tapped.
  await page.getByRole('button', { name: /^Low tide/ }).click({ force: true });
  await expect(page.getByText('Only lead and VJ fire')).toBeVisible();
  // Everyone in the crew may make the room dark.
  await page.getByRole('button', { name: 'Blackout' }).click();
  await expect(page.getByRole('button', { name: /Restore: blackout is on/ })).toBeVisible();
});

test('a socket without a session, and one from a foreign page, are not let in', async ({
  signedIn,
  openPage,
  house,
  call,
}) => {
  const show = await makeNight(call);
  const tryIt = (page: typeof signedIn) =>
    page.evaluate(
      ([address, showId]) =>
        new Promise<string>((resolve) => {
          const socket = new WebSocket(
            `${address.replace('http', 'ws')}/hub?show=${showId}&room=live&as=crew`,
          );
          socket.onopen = () => resolve('let in');
          socket.onerror = () => resolve('turned away');
        }),
      [house.address, show.id] as const,
    );
  expect(await tryIt(signedIn)).toBe('let in');
  const stranger = await openPage();
  await stranger.goto(`${house.address}/sign-in`);
  expect(await tryIt(stranger)).toBe('turned away');
  expect(lead.email).toContain('@');
});
