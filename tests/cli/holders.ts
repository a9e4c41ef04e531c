import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import {
  chmodSync,
  chownSync,
  copyFileSync,
  cpSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  rmSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';
import pg from 'pg';

export interface Held {
  url: string;
  port: number;
  pid: number;
  adopted: boolean;
  made: boolean;
}

export interface Holder {
  held: Held;
  child: ChildProcess;
  /** Ends it as Ctrl-C does. */
  end: () => Promise<void>;
}

export interface Account {
  uid: number;
  gid: number;
}

/** User and group id of an account by its name. */
export function accountOf(name: string): Account {
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith(`${name}:`));
  const [, , uid, gid] = (line ?? '').split(':');
  return { uid: Number(uid), gid: Number(gid) };
}

/** A place with a copy of the start modules that any account can read, and data folders that `account` owns. */
export function makePlace(account: Account | undefined) {
  const folder = mkdtempSync(join(tmpdir(), 'lampyrid-cli-'));
  chmodSync(folder, 0o755);
  cpSync(fileURLToPath(new URL('../../server/cli', import.meta.url)), join(folder, 'cli'), {
    recursive: true,
  });
  copyFileSync(fileURLToPath(new URL('./holder.mjs', import.meta.url)), join(folder, 'holder.mjs'));
  return {
    folder,
    /** A new data home. */
    home: (name: string) => {
      const home = join(folder, name);
      mkdirSync(home);
      if (account) chownSync(home, account.uid, account.gid);
      return home;
    },
    hold: (home: string) => hold(folder, home, account),
    remove: () => rmSync(folder, { recursive: true, force: true }),
  };
}

/** Starts a process that holds the cluster of `home`, and waits until it's up. */
async function hold(folder: string, home: string, account: Account | undefined): Promise<Holder> {
  const env: NodeJS.ProcessEnv = { ...process.env };
  delete env.LAMPYRID_PG_DIR;
  const options = {
    cwd: folder,
    env,
    ...account,
    stdio: ['ignore', 'pipe', 'pipe'] as ['ignore', 'pipe', 'pipe'],
  };
  const child = spawn(process.execPath, ['holder.mjs', home], options);
  let told = '';
  child.stderr.on('data', (part) => {
    told += part;
  });
  const lines = createInterface({ input: child.stdout });
  const line = await Promise.race([
    once(lines, 'line').then(([text]) => String(text)),
    once(child, 'exit').then(() => Promise.reject(new Error(`The holder ended: ${told}`))),
  ]);
  const end = async () => {
    if (child.exitCode !== null || child.signalCode !== null) return;
    const over = once(child, 'exit');
    child.kill('SIGTERM');
    await over;
  };
  return { held: JSON.parse(line) as Held, child, end };
}

/** Asks a server for one value. */
export async function ask(url: string, sql = 'select 1 as value'): Promise<unknown> {
  const client = new pg.Client({ connectionString: url, connectionTimeoutMillis: 2000 });
  client.on('error', () => undefined);
  await client.connect();
  try {
    return (await client.query(sql)).rows[0]?.value;
  } finally {
    await client.end();
  }
}
