import AxeBuilder from '@axe-core/playwright';
import { drawingBody, makeNight, makeScene } from './support/night';
import { expect, test } from './support/test';

const sizes = [
  { width: 390, height: 844 },
  { width: 1440, height: 900 },
];

test('every page is readable by machine and fits a phone and a laptop', async ({ signedIn, house, call }) => {
  test.setTimeout(240_000);
  const show = await makeNight(call);
  const scene = await makeScene(call, show, 'Low tide', drawingBody('tide'));
  const ofShow = [
    '',
    '/scenes',
    `/scenes/${scene.id}`,
    '/outputs',
    '/lookout',
    '/rehearsal',
    '/live',
    '/handset',
  ];
  const paths = ['/shows', '/library', '/crew', '/mail', ...ofShow.map((path) => `/shows/${show.id}${path}`)];
  const found: string[] = [];
  for (const size of sizes) {
    await signedIn.setViewportSize(size);
    for (const path of paths) {
      await signedIn.goto(`${house.address}${path}`);
      await expect(signedIn.locator('main, .handset').first()).toBeVisible();
      await expect(signedIn.getByRole('status').filter({ hasText: '…' })).toHaveCount(0);
      const { violations } = await new AxeBuilder({ page: signedIn })
        .withTags(['wcag2a', 'wcag2aa'])
        .analyze();
      for (const { id, nodes } of violations)
        for (const { target } of nodes) found.push(`${path} at ${size.width}: ${id} ${target.join(' ')}`);
      const over = await signedIn.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
      if (over > 0) found.push(`${path} at ${size.width}: ${over} px wider than the screen`);
    }
  }
  expect(found).toEqual([]);
});

test('the handset is light: at most 150 kB of script over the wire to first use', async ({
  signedIn,
  house,
  call,
}) => {
  const show = await makeNight(call);
  const scripts: Promise<number>[] = [];
  signedIn.on('response', (answer) => {
    if (!/\.js$/.test(new URL(answer.url()).pathname)) return;
    scripts.push(
      answer
        .request()
        .sizes()
        .then(({ responseBodySize }) => responseBodySize),
    );
  });
  await signedIn.setViewportSize({ width: 390, height: 844 });
  // A page of its own, so that nothing is in the browser's cache.
  await signedIn.route('**/*', (route) => route.continue());
  await signedIn.goto(`${house.address}/shows/${show.id}/handset`);
  await expect(signedIn.getByRole('group', { name: 'Lands on' })).toBeVisible();
  const bytes = (await Promise.all(scripts)).reduce((sum, size) => sum + size, 0);
  expect(bytes).toBeGreaterThan(20_000);
  expect(bytes).toBeLessThanOrEqual(150_000);
});

test('nothing is asked of any other machine', async ({ signedIn, house, call }) => {
  const show = await makeNight(call);
  const foreign: string[] = [];
  signedIn.on('request', (request) => {
    const { origin, protocol } = new URL(request.url());
    if (origin !== house.address && !['blob:', 'data:'].includes(protocol)) foreign.push(request.url());
  });
  for (const path of ['', '/live', '/rehearsal', '/outputs']) {
    const joined = signedIn.waitForEvent('websocket');
    await signedIn.goto(`${house.address}/shows/${show.id}${path}`);
    const socket = await joined;
    expect(socket.url().startsWith(house.address.replace('http', 'ws'))).toBe(true);
  }
  expect(foreign).toEqual([]);
});
