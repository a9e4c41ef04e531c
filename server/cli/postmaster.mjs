import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { closeSync, openSync, readFileSync, statSync, truncateSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { readPostmaster } from './clusterFiles.mjs';
import { asAccount } from './home.mjs';
import { until } from './processes.mjs';
import { Stop } from './say.mjs';

const readyLimitMs = 120_000;
const fastStopMs = 10_000;
const logLimitBytes = 5_000_000;

/** A TCP port of 127.0.0.1 that is free at this moment. @returns {Promise<number>} */
export async function freePort() {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address();
  server.close();
  await once(server, 'close');
  return port;
}

/**
 * Starts a postmaster and waits until it takes connections. It dies with this process, whatever ends it: the kernel
 * sends it SIGINT (a fast, clean stop) when its parent is gone.
 * @param {{ pgHome: string, bin: string, account: import('./clusterFiles.mjs').Account, port?: number,
 *   settings?: Record<string, string> }} options `port`: tried first
 * @returns {Promise<{ child: import('node:child_process').ChildProcess, port: number }>}
 */
export async function launch(options) {
  for (let attempt = 0; attempt < 5; attempt += 1) {
    const port = attempt === 0 && options.port ? options.port : await freePort();
    const child = await tryPort(options, port);
    if (child) return { child, port };
  }
  throw new Stop(`PostgreSQL found no free port five times. See ${join(options.pgHome, 'log')}.`);
}

/**
 * @param {Parameters<typeof launch>[0]} options
 * @param {number} port
 */
async function tryPort({ pgHome, bin, account, settings = {} }, port) {
  const data = join(pgHome, 'data');
  const wanted = {
    listen_addresses: '127.0.0.1',
    port: String(port),
    unix_socket_directories: '',
    ...settings,
  };
  const words = Object.entries(wanted).flatMap(([name, value]) => ['-c', `${name}=${value}`]);
  const logPath = join(pgHome, 'log');
  const log = openLog(logPath);
  const before = statSync(logPath).size;
  // setpriv execs, so child.pid is the postmaster's own. Detached: the terminal's Ctrl-C is ours to pass on, in order.
  const command = [...asAccount(account), '--pdeathsig', 'INT', join(bin, 'postgres'), '-D', data, ...words];
  const child = spawn('setpriv', command, { cwd: pgHome, detached: true, stdio: ['ignore', log, log] });
  closeSync(log);
  let failure;
  child.on('error', (error) => {
    failure = error;
  });
  const isOver = () => failure !== undefined || child.exitCode !== null || child.signalCode !== null;
  const isReady = () => {
    const seen = readPostmaster(data);
    return seen?.pid === child.pid && seen?.state === 'ready';
  };
  const inTime = await until(() => isOver() || isReady(), readyLimitMs);
  if (!isOver() && inTime) return child;
  if (!isOver()) await stopPostmaster(child);
  if (failure) throw new Stop(`setpriv could not be started: ${failure.message}`);
  const told = readFileSync(logPath, 'utf8').slice(before);
  if (/could not bind|Address already in use/.test(told)) return undefined;
  throw new Stop(`PostgreSQL did not start:\n${told.trim().split('\n').slice(-4).join('\n')}`);
}

/** @param {string} path */
function openLog(path) {
  const log = openSync(path, 'a', 0o600);
  if (statSync(path).size > logLimitBytes) truncateSync(path);
  return log;
}

/**
 * Stops a postmaster that this process started: fast, and at once when that takes more than ten seconds. Never SIGTERM:
 * that waits for every client to leave by itself.
 * @param {import('node:child_process').ChildProcess} child
 */
export async function stopPostmaster(child) {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const over = once(child, 'exit');
  child.kill('SIGINT');
  const timer = setTimeout(() => child.kill('SIGQUIT'), fastStopMs);
  await over;
  clearTimeout(timer);
}
