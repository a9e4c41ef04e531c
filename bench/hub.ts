import { type ChildProcess, fork } from 'node:child_process';
import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import { Server as GeneralServer } from 'socket.io';
import { WebSocketServer } from 'ws';
import { migrate } from '../server/models/migrate';
import { makeHubHouse } from '../tests/make/hub';
import { makeTemplate } from '../tests/make/templateDatabase';
import type { CrowdOrder, CrowdReport } from './support/crowd';

/*
 * Fan-out of one command to N receivers in another process: our hub (roles, schema, decision, reducer, journal in real
 * PostgreSQL) beside bare ws, which only parses, numbers and sends on, and beside a general-purpose socket library that
 * does the same. All three answer the time, which every page asks each second. Rounds take turns on servers that are
 * warm, so that other work on the machine and the compiler fall on all alike.
 */
const sizes = [10, 50, 200] as const;
const rounds = 3;
const commands = 50;
const warmUp = 10;
const pace = 40;

interface Stand {
  kind: CrowdOrder['kind'];
  url: string;
  headers: Record<string, string>;
  close: () => Promise<unknown>;
}

interface Figure {
  cpuUsPerDelivery: number;
  p50: number;
  p99: number;
  lost: number;
}

const now = () => performance.timeOrigin + performance.now();
/** The body of an event as our hub sends it, about 250 bytes. */
const eventOf = (command: { id: string; body: unknown }, revision: number) => ({
  type: 'event',
  event: {
    epoch: 1,
    revision,
    at: now(),
    commandId: command.id,
    by: 'user-1',
    body: { kind: 'dimmer.changed', level: (command.body as { level: number }).level },
  },
});

async function bareStand(): Promise<Stand> {
  const http = createServer();
  const sockets = new WebSocketServer({ server: http, perMessageDeflate: false });
  let revision = 0;
  sockets.on('connection', (socket) => {
    socket.on('message', (data) => {
      const message = JSON.parse(data.toString());
      const at = now();
      if (message.type === 'time')
        return socket.send(JSON.stringify({ type: 'time', t1: message.t1, t2: at, t3: now() }));
      const { command } = message;
      revision += 1;
      const frame = Buffer.from(JSON.stringify(eventOf(command, revision)));
      for (const client of sockets.clients) client.send(frame, { binary: false });
    });
  });
  http.listen(0, '127.0.0.1');
  await once(http, 'listening');
  const { port } = http.address() as AddressInfo;
  return {
    kind: 'ws',
    url: `ws://127.0.0.1:${port}`,
    headers: {},
    close: async () => sockets.close(() => http.close()),
  };
}

async function generalStand(): Promise<Stand> {
  const http = createServer();
  const server = new GeneralServer(http, { transports: ['websocket'] });
  let revision = 0;
  server.on('connection', (socket) => {
    socket.on('time', ({ t1 }) => socket.emit('time', { t1, t2: now(), t3: now() }));
    socket.on('command', ({ command }) => {
      revision += 1;
      server.emit('event', eventOf(command, revision));
    });
  });
  http.listen(0, '127.0.0.1');
  await once(http, 'listening');
  const { port } = http.address() as AddressInfo;
  return { kind: 'socket.io', url: `http://127.0.0.1:${port}`, headers: {}, close: () => server.close() };
}

async function hubStand(): Promise<Stand> {
  const house = await makeHubHouse();
  return {
    kind: 'hub',
    url: `ws://${house.address}/hub?show=${house.showId}&room=live&as=crew`,
    headers: { origin: 'http://here', cookie: `user=${house.lead.userId}` },
    close: () => house.close(),
  };
}

async function measure(child: ChildProcess, stand: Stand, receivers: number): Promise<Figure> {
  const { kind, url, headers } = stand;
  child.send({ kind, url, headers, receivers, commands, warmUp, pace } satisfies CrowdOrder);
  await once(child, 'message');
  const before = process.cpuUsage();
  child.send('go');
  const [report] = (await once(child, 'message')) as [CrowdReport];
  const { user, system } = process.cpuUsage(before);
  const at = (share: number) => report.latencies[Math.floor(report.latencies.length * share)] ?? Number.NaN;
  return {
    cpuUsPerDelivery: (user + system) / report.deliveries,
    p50: at(0.5),
    p99: at(0.99),
    lost: receivers * commands - report.deliveries,
  };
}

const median = (list: number[]): number =>
  [...list].sort((a, b) => a - b)[Math.floor(list.length / 2)] ?? Number.NaN;
const round = (value: number): number => Math.round(value * 100) / 100;

async function main(): Promise<void> {
  const drop = await makeTemplate(migrate);
  const rows = [];
  const child = fork(fileURLToPath(new URL('./support/crowd.ts', import.meta.url)), {
    execArgv: ['--import', 'tsx'],
  });
  const stands = [await bareStand(), await hubStand(), await generalStand()];
  for (const n of sizes) {
    const figures: Record<CrowdOrder['kind'], Figure[]> = { hub: [], ws: [], 'socket.io': [] };
    for (let one = 0; one < rounds; one += 1)
      for (const stand of stands) figures[stand.kind].push(await measure(child, stand, n));
    const of = (kind: CrowdOrder['kind'], pick: keyof Figure) =>
      median(figures[kind].map((figure) => figure[pick]));
    const ratio = (pick: keyof Figure, to: CrowdOrder['kind']) => round(of('hub', pick) / of(to, pick));
    rows.push({
      n,
      cpuUsRatioToWs: ratio('cpuUsPerDelivery', 'ws'),
      p50Ratio: ratio('p50', 'ws'),
      p99Ratio: ratio('p99', 'ws'),
      cpuUsRatioToGeneral: ratio('cpuUsPerDelivery', 'socket.io'),
      p50Ms: round(of('hub', 'p50')),
      p99Ms: round(of('hub', 'p99')),
      hubCpuUs: round(of('hub', 'cpuUsPerDelivery')),
      lost: figures.hub.reduce((sum, figure) => sum + figure.lost, 0),
    });
    process.stderr.write(`${JSON.stringify(rows.at(-1))}\n`);
  }
  child.disconnect();
  for (const stand of stands) await stand.close();
  await drop();
  process.stdout.write(`${JSON.stringify({ bench: 'hub', commands, pace, rounds, rows })}\n`);
}

await main();
process.exit(0);
