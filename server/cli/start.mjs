import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureBuilt } from './build.mjs';
import { startCluster } from './cluster.mjs';
import { ensureParts } from './debian.mjs';
import { help, readFlags } from './flags.mjs';
import { dataHome } from './home.mjs';
import { checkNode, ensurePackages } from './packages.mjs';
import { claimPort } from './ports.mjs';
import { run, say, since } from './say.mjs';
import { onEnd } from './signals.mjs';
import { superviseServer } from './supervise.mjs';

const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..');

/** Brings up the whole product and stays until it's told to end. */
async function start() {
  const from = performance.now();
  checkNode();
  const flags = readFlags(process.argv.slice(2));
  if (flags.help) {
    say(help());
    return 0;
  }
  await claimPort(flags.port);
  ensurePackages(root);
  const ownDatabase = !process.env.DATABASE_URL;
  ensureParts(ownDatabase ? ['postgresql', 'ffmpeg'] : ['ffmpeg']);
  const home = dataHome(root, flags.data);
  ensureBuilt(root);
  const cluster = ownDatabase ? await startCluster({ home }) : undefined;
  if (cluster?.made) say(`New database in ${join(home, 'pg')}.`);
  const env = serverEnv(flags, home, cluster?.url ?? process.env.DATABASE_URL);
  const server = superviseServer({ root, env, onReady: (message) => greet(message, from) });
  const stop = async () => {
    await server.stop();
    await cluster?.stop();
  };
  onEnd(stop);
  const code = await server.over;
  await cluster?.stop();
  return code;
}

/** What the server needs to know, as its config reads it. */
function serverEnv(flags, home, databaseUrl) {
  return {
    NODE_ENV: process.env.NODE_ENV ?? 'production',
    DATABASE_URL: databaseUrl,
    PORT: String(flags.port),
    ...(flags.lan && { HOST: '0.0.0.0' }),
    LAMPYRID_DATA: home,
    ...(flags.demo && { LAMPYRID_DEMO: flags.open ? 'open' : 'offer' }),
    ...(flags.password && { LAMPYRID_DEMO_PASSWORD: flags.password }),
  };
}

/** @param {{ address: string, setUpUrl?: string, lines?: string[] }} message */
function greet({ address, setUpUrl, lines = [] }, from) {
  say(`\nLampyrid is up in ${since(from)}: ${address}`);
  if (setUpUrl) say(`Set up your crew here, once:  ${setUpUrl}`);
  for (const line of lines) say(line);
  say('A display opens the same address with /display. Ctrl-C ends it.\n');
}

await run(start);
