import { type BrowserContext, chromium } from 'playwright';
import { WebSocket } from 'ws';
import { type House, startHouse } from '../e2e/support/house';
import { type Call, makeNight, makeScene, mapWhole, twoScreens } from '../e2e/support/night';
import { ensureBuilt } from '../server/cli/build.mjs';
import { protocolVersion } from '../shared/protocol/constants';
import type { FromHub } from '../shared/protocol/messages';
import { newBody } from '../shared/scene/defaults';
import { callOf } from './support/callOf';

/*
 * From a press to the first drawn frame on real display pages: n pages in one Chromium, a real hub, a real PostgreSQL.
 * What is drawn comes from the displays' own reports, in hub time.
 */
const displays = 3;
const triggers = 100;
/** The hub's lead goes by the last twenty seconds: those in which the pages loaded say nothing of the night. */
const settleMs = 21_000;
const raster = { width: 320, height: 180 } as const;

/** Opens a display page and joins it, with the first screen over its whole raster. */
async function join(
  lead: BrowserContext,
  call: Call,
  house: House,
  showId: string,
  name: string,
): Promise<void> {
  const browser = lead.browser();
  if (!browser) throw new Error('No browser.');
  const page = await (await browser.newContext({ viewport: raster })).newPage();
  const asked = page.waitForResponse((answer) => new URL(answer.url()).pathname === '/api/pairing');
  await page.goto(`${house.address}/display`);
  const { code } = (await (await asked).json()) as { code: string };
  const { id } = await call<{ id: string }>('POST', '/api/displays/join', { code, showId, name });
  await mapWhole(call, id, [raster.width, raster.height]);
}

/** A socket of the lead's that hears what the hub says. */
async function listen(lead: BrowserContext, house: House, showId: string) {
  const cookies = await lead.cookies();
  const cookie = cookies.map(({ name, value }) => `${name}=${value}`).join('; ');
  const url = `${house.address.replace('http', 'ws')}/hub?show=${showId}&room=live&as=crew`;
  const socket = new WebSocket(url, { headers: { origin: house.address, cookie } });
  const waiting = new Set<(message: FromHub) => void>();
  socket.on('message', (data) => {
    const message = JSON.parse(data.toString()) as FromHub;
    for (const hear of waiting) hear(message);
  });
  await new Promise<void>((resolve, reject) => {
    socket.on('open', () => resolve());
    socket.on('error', reject);
  });
  const until = <T>(look: (message: FromHub) => T | undefined): Promise<T> =>
    new Promise((resolve) => {
      const hear = (message: FromHub) => {
        const found = look(message);
        if (found === undefined) return;
        waiting.delete(hear);
        resolve(found);
      };
      waiting.add(hear);
    });
  const alive = setInterval(() => socket.send(JSON.stringify({ type: 'time', t1: 0 })), 1000);
  const welcome = until((message) => (message.type === 'welcome' ? true : undefined));
  socket.send(JSON.stringify({ type: 'hello', protocol: protocolVersion, epoch: null, revision: null }));
  await welcome;
  return {
    until,
    put: (message: unknown) => socket.send(JSON.stringify(message)),
    close: () => {
      clearInterval(alive);
      socket.terminate();
    },
  };
}

interface Shot {
  lead: number;
  toDrawn: number[];
  pastLanding: number[];
  spread: number;
}

async function fire(link: Awaited<ReturnType<typeof listen>>, sceneId: string, count: number): Promise<Shot> {
  const commandId = `shot-${count}`;
  const fired = link.until((message) =>
    message.type === 'event' &&
    message.event.commandId === commandId &&
    message.event.body.kind === 'scene.fired'
      ? { at: message.event.at, run: message.event.body.run }
      : undefined,
  );
  const expiresAt = performance.timeOrigin + performance.now() + 2000;
  const body = { kind: 'scene.trigger', screenIds: [twoScreens[0]?.id], sceneId, landsOn: 'now' };
  link.put({ type: 'command', command: { id: commandId, expiresAt, body } });
  const { at, run } = await fired;
  const drawn = await link.until((message) => {
    if (message.type !== 'wall') return undefined;
    const ours = message.wall.filter(({ runId }) => runId === run.runId);
    return ours.length === displays ? ours.map((one) => one.at) : undefined;
  });
  return {
    lead: run.landsAt - at,
    toDrawn: drawn.map((one) => one - at),
    pastLanding: drawn.map((one) => one - run.landsAt),
    spread: Math.max(...drawn) - Math.min(...drawn),
  };
}

const share = (list: readonly number[], part: number): number => {
  const sorted = [...list].sort((a, b) => a - b);
  return (
    Math.round((sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * part))] ?? Number.NaN) * 10) /
    10
  );
};
const three = (list: readonly number[]) => ({
  p50: share(list, 0.5),
  p95: share(list, 0.95),
  p99: share(list, 0.99),
});

async function main(): Promise<void> {
  ensureBuilt(process.cwd());
  process.env.LAMPYRID_TEST_ADMIN ??= process.env.DATABASE_URL ?? '';
  const house = await startHouse();
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM || '/usr/bin/chromium',
    args: ['--no-sandbox', '--enable-unsafe-swiftshader'],
  });
  const lead = await browser.newContext();
  const call = callOf(lead, house);
  const account = {
    crewName: 'Bench',
    name: 'Bench',
    email: 'bench@crew.example',
    password: 'four otters on a raft',
  };
  await call('POST', '/api/setup', { token: new URL(house.setUpUrl).hash.slice(1), ...account, demo: false });
  const show = await makeNight(call);
  const scenes = [];
  for (const ground of ['#202020', '#304050'])
    scenes.push(
      await makeScene(call, show, ground, { ...newBody(), ground, transition: { kind: 'cut', beats: 0 } }),
    );
  for (let one = 0; one < displays; one += 1) await join(lead, call, house, show.id, `Display ${one + 1}`);
  const link = await listen(lead, house, show.id);
  // Frame rates are known once every display has told its vitals.
  const rates = await link.until((message) => {
    if (message.type !== 'displays') return undefined;
    const known = message.displays.flatMap(({ vitals }) => (vitals && vitals.fps > 1 ? [vitals.fps] : []));
    return known.length === displays ? known : undefined;
  });
  await new Promise((resolve) => setTimeout(resolve, settleMs));
  const shots: Shot[] = [];
  for (let count = 0; count < triggers; count += 1) {
    const scene = scenes[count % scenes.length];
    if (scene) shots.push(await fire(link, scene.id, count));
  }
  const frameMs = 1000 / Math.min(60, Math.min(...rates));
  const past = shots.flatMap(({ pastLanding }) => pastLanding);
  const report = {
    bench: 'trigger',
    displays,
    triggers,
    frameMs: Math.round(frameMs * 10) / 10,
    leadMs: three(shots.map(({ lead }) => lead)),
    toDrawnMs: three(shots.flatMap(({ toDrawn }) => toDrawn)),
    pastLandingMs: three(past),
    framesLate: past.filter((ms) => ms > frameMs + 1).length,
    spreadMs: three(shots.map(({ spread }) => spread)),
  };
  link.close();
  await browser.close();
  await house.stop();
  process.stdout.write(`${JSON.stringify(report)}\n`);
}

await main();
process.exit(0);
