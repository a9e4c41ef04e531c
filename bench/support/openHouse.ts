import { type Browser, type BrowserContext, chromium, type Page } from 'playwright';
import { type House, startHouse } from '../../e2e/support/house';
import type { Call } from '../../e2e/support/night';
import { ensureBuilt } from '../../server/cli/build.mjs';
import type { DemoProgress } from '../../shared/api/demo';
import type { ShowDetail } from '../../shared/api/shows';
import type { OutputMap } from '../../shared/mapping/schema';
import type { Scene } from '../../shared/scene/schema';
import { callOf } from './callOf';

const password = 'four otters on a raft';

/** A house with the demo night in it, its lead signed in, and a browser to look at it. */
export interface OpenHouse {
  house: House;
  browser: Browser;
  lead: BrowserContext;
  show: ShowDetail;
  scenes: Scene[];
  call: Call;
  /** A display of its own, joined and mapped. */
  join: (name: string, size: [number, number], map: OutputMap) => Promise<Page>;
  /** A page of the lead's. */
  open: (path: string, size: [number, number]) => Promise<Page>;
  close: () => Promise<void>;
}

/** Waits until the demo night is whole, and says how long that took in seconds. */
async function waitForDemo(call: Call): Promise<{ showId: string; seconds: number }> {
  const from = performance.now();
  for (;;) {
    const { state, words, showId } = await call<DemoProgress>('GET', '/api/demo');
    if (state === 'failed' || state === 'none') throw new Error(words);
    if (state === 'ready' && showId) return { showId, seconds: (performance.now() - from) / 1000 };
    await new Promise((done) => setTimeout(done, 250));
  }
}

async function joinDisplay(
  { browser, house, call, show }: Pick<OpenHouse, 'browser' | 'house' | 'call' | 'show'>,
  name: string,
  [width, height]: [number, number],
  map: OutputMap,
): Promise<Page> {
  const context = await browser.newContext({ viewport: { width, height } });
  const page = await context.newPage();
  const asked = page.waitForResponse((answer) => new URL(answer.url()).pathname === '/api/pairing');
  await page.goto(`${house.address}/display`);
  const { code } = (await (await asked).json()) as { code: string };
  const { id } = await call<{ id: string }>('POST', '/api/displays/join', { code, showId: show.id, name });
  await call('POST', `/api/displays/${id}/maps`, { map, note: 'lined up' });
  return page;
}

/** Starts all of it. Wants DATABASE_URL. Call `close` when done. */
export async function openHouse(): Promise<OpenHouse> {
  ensureBuilt(process.cwd());
  process.env.LAMPYRID_TEST_ADMIN ??= process.env.DATABASE_URL;
  const house = await startHouse({ LAMPYRID_DEMO: 'open', LAMPYRID_DEMO_PASSWORD: password });
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM || '/usr/bin/chromium',
    args: ['--no-sandbox', '--enable-unsafe-swiftshader', '--autoplay-policy=no-user-gesture-required'],
  });
  const close = async () => {
    await browser.close();
    await house.stop();
  };
  try {
    const lead = await browser.newContext({ deviceScaleFactor: 1 });
    const call = callOf(lead, house);
    await call('POST', '/api/session', { email: 'lead@boathouse.example', password });
    const { showId, seconds } = await waitForDemo(call);
    console.error(`The demo night was made in ${seconds.toFixed(1)} s.`);
    const show = await call<ShowDetail>('GET', `/api/shows/${showId}`);
    const scenes = await call<Scene[]>('GET', `/api/shows/${showId}/scenes`);
    return {
      ...{ house, browser, lead, show, scenes, call, close },
      join: (name, size, map) => joinDisplay({ browser, house, call, show }, name, size, map),
      open: async (path, [width, height]) => {
        const page = await lead.newPage();
        await page.setViewportSize({ width, height });
        await page.goto(`${house.address}${path}`);
        return page;
      },
    };
  } catch (error) {
    await close();
    throw error;
  }
}

/** Fires a scene on every screen from a handset, and waits until the wall shows it. */
export async function fire(handset: Page, show: ShowDetail, scene: Scene): Promise<void> {
  const phase = show.phases.find(({ id }) => id === scene.phaseId);
  await handset
    .getByRole('navigation', { name: 'Phases' })
    .getByRole('button', { name: phase?.name ?? '' })
    .click();
  const tile = handset.locator(`[data-scene="${scene.id}"]`);
  await tile.click();
  await handset.locator(`[data-scene="${scene.id}"][data-state="on"]`).waitFor({ timeout: 30_000 });
}
