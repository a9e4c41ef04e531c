import { mkdirSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { makeApp } from './app';
import { type Config, readConfig } from './config';
import { createHub, type Hub } from './hub/hub';
import { makeMailer } from './mail/makeMailer';
import { demoTools } from './media/demoMedia';
import { startMedia } from './media/startMedia';
import { connect, type Database } from './models/database';
import { migrate } from './models/migrate';
import { type HostRule, hostRule, networkAddresses, originAllowed } from './origins';
import { accountRoutes } from './routes/accounts';
import { assetRoutes } from './routes/assets';
import { brandRoutes } from './routes/brands';
import type { RouteContext } from './routes/context';
import { demoRoutes } from './routes/demo';
import { displayRoutes } from './routes/displays';
import { mailRoutes } from './routes/mail';
import { mediaRoutes } from './routes/media';
import { sceneRoutes } from './routes/scenes';
import { sessionMiddleware } from './routes/session';
import { showRoutes } from './routes/shows';
import { venueRoutes } from './routes/venues';
import { setUpLink } from './services/accounts/setUp';
import { demoCalls } from './services/demo/makeDemo';
import { openDemo } from './services/demo/openDemo';
import type { HubCalls } from './services/hubCalls';
import { makeHubStore } from './services/hubStore';
import { type Log, makeLog } from './services/log';
import { openShowIds, showManifest } from './services/manifest';
import { sessionSecret } from './services/sessionCookie';
import { anyShowLive } from './services/shows/live';
import { authorizeSocket } from './services/socketCaller';

/** A phone on a venue's network may take this long for one large clip, ms. */
const longestUploadMs = 3_600_000;

/** Brings up one server and says so to whoever started it. */
async function main(): Promise<void> {
  const config = readConfig(process.env);
  const log = makeLog(config.logLevel);
  const stopping = new AbortController();
  watchEnd(stopping, log);
  mkdirSync(config.dataFolder, { recursive: true });
  await migrate(config.databaseUrl);
  const db = connect(config.databaseUrl);
  const http = createServer({
    headersTimeout: 5000,
    requestTimeout: longestUploadMs,
    connectionsCheckingInterval: 1000,
  });
  const hosts = hostRule(() => (http.address() as AddressInfo | null)?.port ?? config.port, config.publicUrl);
  const parts = await makeParts(config, log, db, hosts);
  http.on('request', parts.app);
  http.on('upgrade', (request, socket, head) => parts.hub.handleUpgrade(request, socket, head));
  await listen(http, config);
  const address = config.publicUrl ?? `http://127.0.0.1:${(http.address() as AddressInfo).port}`;
  const told = { address, ...(await welcome(config, db, parts.context, address)) };
  // Started by hand, nobody listens on the channel: then it is said aloud.
  if (process.send) process.send({ type: 'ready', ...told });
  else
    process.stdout.write(
      `${[told.address, told.setUpUrl, ...(told.lines ?? [])].filter(Boolean).join('\n')}\n`,
    );
  await aborted(stopping.signal);
  await stop(http, parts, db);
  process.exit(0);
}

interface Parts {
  app: ReturnType<typeof makeApp>;
  hub: Hub;
  context: RouteContext;
  closeMedia: () => Promise<void>;
}

async function makeParts(config: Config, log: Log, db: Database, hosts: HostRule): Promise<Parts> {
  const secret = await sessionSecret(config.dataFolder);
  const mail = await makeMailer(config, log);
  const hub = createHub({
    store: makeHubStore(db, config.databaseUrl),
    dataDir: config.dataFolder,
    authorize: (request) => authorizeSocket(db, secret, request),
    loadShow: (showId) => showManifest(db, showId),
    allowedOrigin: (request) =>
      hosts.knows(request.headers.host) && originAllowed(hosts, request.headers.origin),
    log,
  });
  const calls: HubCalls = {
    ...hubCallsOf(hub),
    assetsChanged: (crewId) => void tellShows(db, hub, crewId, log),
  };
  const media = await startMedia({
    db,
    databaseUrl: config.databaseUrl,
    dataFolder: config.dataFolder,
    log,
    onChange: (crewId) => calls.assetsChanged(crewId),
    liveNow: () => anyShowLive(db),
  });
  const demo = demoCalls({ db, media, hub: calls, log, tools: demoTools });
  const context: RouteContext = { config, db, hub: calls, mail, media, demo, log };
  const app = makeApp({
    db,
    log,
    hosts,
    sessions: sessionMiddleware(db, secret),
    routers: routersOf(context),
    pagesFolder: config.pagesFolder,
    behindProxy: config.publicUrl !== null,
  });
  return { app, hub, context, closeMedia: media.close };
}

const routersOf = (context: RouteContext) =>
  [
    accountRoutes,
    mailRoutes,
    showRoutes,
    sceneRoutes,
    venueRoutes,
    brandRoutes,
    displayRoutes,
    assetRoutes,
    mediaRoutes,
    demoRoutes,
  ].map((make) => make(context));

const hubCallsOf = (hub: Hub): Omit<HubCalls, 'assetsChanged'> => ({
  manifestChanged: (showId) => hub.manifestChanged(showId),
  mapSaved: (showId, displayId, version, map, by) => hub.mapSaved(showId, displayId, version, map, by),
  displaysChanged: (showId) => hub.displaysChanged(showId),
  modeChanged: (showId, mode) => hub.modeChanged(showId, mode),
  revoke: (whom) => hub.revoke(whom),
});

async function tellShows(db: Database, hub: Hub, crewId: string, log: Log): Promise<void> {
  try {
    for (const showId of await openShowIds(db, crewId)) hub.manifestChanged(showId);
  } catch (error) {
    log.warn({ err: error }, 'shows were not told of changed files');
  }
}

/** What the starter prints: the set-up link of a new house, or how to get into the demo night. */
async function welcome(
  config: Config,
  db: Database,
  context: RouteContext,
  address: string,
): Promise<{ setUpUrl?: string; lines?: string[] }> {
  if (config.demo === 'open') {
    const lines = await openDemo(db, context.demo, config.demoPassword);
    return { lines: [...lines, ...networkLines(config, address)] };
  }
  const token = await setUpLink(db);
  const lines = networkLines(config, address);
  return token ? { setUpUrl: `${address}/setup#${token}`, lines } : { lines };
}

/** How phones and other machines reach us, and what they lose on a plain network. */
function networkLines(config: Config, address: string): string[] {
  if (config.host !== '0.0.0.0') return [];
  const port = new URL(address).port;
  const addresses = networkAddresses().map((one) => `On the network: http://${one}:${port}`);
  return [...addresses, 'The network hears passwords in the clear: use one of your own, not the guests’.'];
}

function listen(http: Server, config: Config): Promise<void> {
  return new Promise((resolve, reject) => {
    http.once('error', reject);
    http.listen(config.port, config.host, () => resolve());
  });
}

/** Ends on Ctrl-C, when told, and when whoever started us has gone: no orphan keeps the port. */
function watchEnd(stopping: AbortController, log: Log): void {
  const end = () => stopping.abort();
  process.on('SIGTERM', end);
  process.on('SIGINT', end);
  process.on('disconnect', end);
  process.on('unhandledRejection', (error) => log.error({ err: error }, 'unhandled rejection'));
}

function aborted(signal: AbortSignal): Promise<void> {
  if (signal.aborted) return Promise.resolve();
  return new Promise((resolve) => signal.addEventListener('abort', () => resolve(), { once: true }));
}

async function stop(http: Server, parts: Parts, db: Database): Promise<void> {
  http.close();
  await parts.hub.close();
  http.closeAllConnections();
  await parts.closeMedia();
  await parts.context.mail.close();
  await db.close();
}

main().catch((error: unknown) => {
  process.stderr.write(
    `Lampyrid could not start: ${error instanceof Error ? error.message : String(error)}\n`,
  );
  process.exit(1);
});
