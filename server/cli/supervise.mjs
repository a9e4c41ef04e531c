import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { setTimeout as wait } from 'node:timers/promises';
import { Stop } from './say.mjs';

const stopLimitMs = 10_000;
const restartPauseMs = 200;
const mostRestarts = 5;
const restartWindowMs = 60_000;

/**
 * Starts the server and keeps it up: one that dies after it was ready is started again, at most five times a minute.
 * It has an IPC channel, and ends by itself when that closes (this process was killed).
 * @param {{ root: string, env: Record<string, string>, onReady: (message: { address: string, setUpUrl?: string,
 *   lines?: string[] }) => void }} options
 * @returns {{ over: Promise<number>, stop: () => Promise<void> }} `over`: exit code once it's down for good
 */
export function superviseServer({ root, env, onReady }) {
  let stopping = false;
  let child;
  const deaths = [];
  const keepUp = async () => {
    for (;;) {
      child = startServer(root, env);
      let wasReady = false;
      child.on('message', (message) => {
        if (message?.type !== 'ready') return;
        if (deaths.length === 0) onReady(message);
        wasReady = true;
      });
      const [code, signal] = await once(child, 'exit');
      if (stopping) return 0;
      const now = performance.now();
      deaths.push(now);
      const recent = deaths.filter((at) => now - at < restartWindowMs).length;
      if (!wasReady || recent > mostRestarts) return code || 1;
      process.stderr.write(`The server ended (${signal ?? code}); starting it again.\n`);
      await wait(restartPauseMs);
      if (stopping) return 0;
    }
  };
  const over = keepUp();
  return {
    over,
    stop: async () => {
      stopping = true;
      if (child.exitCode === null && child.signalCode === null) child.kill('SIGTERM');
      const timer = setTimeout(() => child.kill('SIGKILL'), stopLimitMs);
      await over;
      clearTimeout(timer);
    },
  };
}

/** @param {string} root @param {Record<string, string>} env */
function startServer(root, env) {
  // Detached: the terminal's Ctrl-C is passed on in order, server first and database last.
  const options = { cwd: root, env: { ...process.env, ...env }, detached: true };
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    ...options,
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
  });
  child.on('error', (error) => {
    throw new Stop(`The server could not be started: ${error.message}`);
  });
  return child;
}
