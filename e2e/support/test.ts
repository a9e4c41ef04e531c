import { type BrowserContext, test as base, expect, type Page } from '@playwright/test';
import { type House, startHouse } from './house';
import { watchConsole } from './watchConsole';

/** Who signs in as lead in the stories. */
export const lead = {
  crewName: 'Boathouse crew',
  name: 'Ines Varga',
  email: 'ines@crew.example',
  password: 'salt static and otters',
};

export interface JoinedDisplay {
  page: Page;
  displayId: string;
}

interface Fixtures {
  house: House;
  /** A page at the set-up link, as on the first start. */
  newcomer: Page;
  /** A page of a lead whose crew exists; nothing else does. */
  signedIn: Page;
  /** Opens a display page on a machine of its own and joins it to a show. The lead must be signed in. */
  joinDisplay: (
    showId: string,
    name: string,
    viewport?: { width: number; height: number },
  ) => Promise<JoinedDisplay>;
  /** Sends a JSON request as the signed-in lead; fails the test when it's refused. */
  call: <T>(method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE', path: string, data?: unknown) => Promise<T>;
  /** Opens a page in a browser of its own (own cookies), watched for console errors. */
  openPage: (viewport?: { width: number; height: number }) => Promise<Page>;
}

/** The stories' test: a server for each one, and no console error unnoticed. */
export const test = base.extend<Fixtures>({
  // biome-ignore lint/correctness/noEmptyPattern: Playwright reads the fixtures wanted from this pattern.
  house: async ({}, use) => {
    const house = await startHouse();
    await use(house);
    await house.stop();
  },
  page: async ({ page }, use) => {
    const check = watchConsole(page);
    await use(page);
    check();
  },
  openPage: async ({ browser }, use) => {
    const contexts: BrowserContext[] = [];
    const checks: (() => void)[] = [];
    await use(async (viewport = { width: 640, height: 360 }) => {
      const context = await browser.newContext({ viewport });
      contexts.push(context);
      const page = await context.newPage();
      checks.push(watchConsole(page));
      return page;
    });
    for (const context of contexts) await context.close();
    for (const check of checks) check();
  },
  newcomer: async ({ page, house }, use) => {
    await page.goto(house.setUpUrl);
    await use(page);
  },
  call: async ({ page, house }, use) => {
    await use(async (method, path, data) => {
      const headers = { origin: house.address };
      const answer = await page.request.fetch(`${house.address}${path}`, { method, headers, data });
      expect(answer.ok(), `${method} ${path}: ${await answer.text()}`).toBe(true);
      return answer.status() === 204 ? undefined : await answer.json();
    });
  },
  signedIn: async ({ page, house, call }, use) => {
    const token = new URL(house.setUpUrl).hash.slice(1);
    await call('POST', '/api/setup', { token, ...lead, demo: false });
    await page.goto(house.address);
    await use(page);
  },
  joinDisplay: async ({ openPage, house, call }, use) => {
    await use(async (showId, name, viewport) => {
      const page = await openPage(viewport);
      const asked = page.waitForResponse((answer) => new URL(answer.url()).pathname === '/api/pairing');
      await page.goto(`${house.address}/display`);
      const { code } = (await (await asked).json()) as { code: string };
      await call('POST', '/api/displays/look-up', { code });
      const joined = page.waitForResponse(async (answer) => {
        if (new URL(answer.url()).pathname !== '/api/pairing/wait') return false;
        return ((await answer.json()) as { state: string }).state === 'joined';
      });
      const { id } = await call<{ id: string }>('POST', '/api/displays/join', { code, showId, name });
      await joined;
      return { page, displayId: id };
    });
  },
});

export { expect };
