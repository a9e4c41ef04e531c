import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { freePort } from '../../server/cli/postmaster.mjs';
import { createDatabase, dropDatabase, withDatabase } from '../../tests/make/database';

/** A whole, real server with an empty database and data folder of its own. */
export interface House {
  /** http://127.0.0.1:PORT */
  address: string;
  /** The one-time link that the first start printed. */
  setUpUrl: string;
  databaseUrl: string;
  /** All that the server has printed. */
  printed: () => string;
  /** Kills the server (kill -9 unless told otherwise), lets something happen, and starts it again at the same address. */
  restart: (signal?: 'SIGKILL' | 'SIGTERM', meanwhile?: () => Promise<void>) => Promise<void>;
  stop: () => Promise<void>;
}

interface Ready {
  type: 'ready';
  address: string;
  setUpUrl?: string;
}

let made = 0;

/** Starts a server as the start command does. `env` adds to its environment. */
export async function startHouse(env: Record<string, string> = {}): Promise<House> {
  const admin = process.env.LAMPYRID_TEST_ADMIN ?? '';
  made += 1;
  const name = `story_${process.pid}_${process.hrtime.bigint().toString(36)}_${made}`;
  await createDatabase(admin, name);
  const data = mkdtempSync(join(tmpdir(), 'lampyrid-story-'));
  const databaseUrl = withDatabase(admin, name);
  const wanted = { NODE_ENV: 'production', DATABASE_URL: databaseUrl, LAMPYRID_DATA: data };
  const all = { ...process.env, ...wanted, PORT: String(await freePort()), ...env };
  const parts: string[] = [];
  let running = await launch(all, parts);
  return {
    address: running.ready.address,
    setUpUrl: running.ready.setUpUrl ?? '',
    databaseUrl,
    printed: () => parts.join(''),
    restart: async (signal = 'SIGKILL', meanwhile) => {
      await end(running.child, signal);
      await meanwhile?.();
      running = await launch(all, parts);
    },
    stop: async () => {
      await end(running.child, 'SIGTERM');
      await dropDatabase(admin, name);
      rmSync(data, { recursive: true, force: true });
    },
  };
}

async function launch(
  env: NodeJS.ProcessEnv,
  parts: string[],
): Promise<{ child: ChildProcess; ready: Ready }> {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    env,
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  });
  for (const stream of [child.stdout, child.stderr]) stream?.on('data', (part) => parts.push(String(part)));
  const ready = new Promise<Ready>((resolve, reject) => {
    child.on('message', (message: Ready) => message.type === 'ready' && resolve(message));
    child.on('exit', () => reject(new Error(`The server did not start:\n${parts.join('').slice(-2000)}`)));
  });
  return { child, ready: await ready };
}

async function end(child: ChildProcess, signal: 'SIGKILL' | 'SIGTERM'): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const over = once(child, 'exit');
  child.kill(signal);
  // A server that hangs while it stops must not hang the stories.
  const timer = setTimeout(() => child.kill('SIGKILL'), 10_000);
  await over;
  clearTimeout(timer);
}
