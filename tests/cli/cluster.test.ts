import { spawn } from 'node:child_process';
import { readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import pg from 'pg';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { isAlive } from '../../server/cli/processes.mjs';
import { accountOf, ask, type Holder, makePlace } from './holders';

const isRoot = process.getuid?.() === 0;
/** Who types `npm start`. Root can also try how it goes for an ordinary user. */
const people = [
  {
    who: isRoot ? 'root' : 'an ordinary user',
    account: undefined,
    owner: isRoot ? accountOf('postgres') : undefined,
  },
  ...(isRoot ? [{ who: 'an ordinary user', account: accountOf('nobody'), owner: accountOf('nobody') }] : []),
];
const gone = (pid: number) => vi.waitFor(() => expect(isAlive(pid)).toBe(false), { timeout: 10_000 });
const kill9 = ({ child, held }: Holder, also: 'server too' | 'alone') => {
  if (also === 'server too') process.kill(held.pid, 'SIGKILL');
  child.kill('SIGKILL');
};

describe.each(people)('our own PostgreSQL, started by $who', ({ account, owner }) => {
  const place = makePlace(account);
  const holders: Holder[] = [];
  let home: string;
  const start = async (where = home) => {
    const holder = await place.hold(where);
    holders.push(holder);
    return holder;
  };

  beforeAll(async () => {
    home = place.home('home');
    await (await start()).end();
  });
  afterEach(async () => {
    for (const { child, held } of holders.splice(0)) {
      child.kill('SIGKILL');
      await gone(held.pid);
    }
  });
  afterAll(() => place.remove());

  it('is made once, listens on loopback with a secret of its own, and stops clean', async () => {
    const { held, end } = await start();
    expect(held.made).toBe(false);
    expect(await ask(held.url, "select current_setting('listen_addresses') as value")).toBe('127.0.0.1');
    expect(await ask(held.url, "select current_setting('unix_socket_directories') as value")).toBe('');
    const wrong = new URL(held.url);
    wrong.password = 'guess';
    await expect(ask(wrong.href)).rejects.toThrow('password authentication failed');
    const secret = statSync(join(home, 'pg/secret'));
    expect(secret.mode & 0o777).toBe(0o600);
    expect(secret.uid).toBe(owner?.uid ?? process.getuid?.());
    await end();
    expect(isAlive(held.pid)).toBe(false);
    expect(readFileSync(join(home, 'pg/log'), 'utf8').trimEnd()).toMatch(/database system is shut down$/);
  });

  it('is made by one of two starts at once, and adopted by the other', async () => {
    const fresh = place.home('two');
    const both = await Promise.all([start(fresh), start(fresh)]);
    expect(both.map(({ held }) => held.made).sort()).toEqual([false, true]);
    expect(both.map(({ held }) => held.adopted).sort()).toEqual([false, true]);
    expect(both[0].held.url).toBe(both[1].held.url);
  });

  it('goes when the start that owns it is killed', async () => {
    const holder = await start();
    kill9(holder, 'alone');
    await gone(holder.held.pid);
    const again = await start();
    expect(again.held.adopted).toBe(false);
    expect(await ask(again.held.url)).toBe(1);
  });

  it('stays, at the same address, for a start that adopted it when its owner ends', async () => {
    const owning = await start();
    const adopting = await start();
    expect(adopting.held.adopted).toBe(true);
    await owning.end();
    await vi.waitFor(async () => expect(await ask(adopting.held.url)).toBe(1), {
      timeout: 10_000,
      interval: 50,
    });
  });

  it('comes back at the same address when it crashes under its owner', async () => {
    const { held } = await start();
    process.kill(held.pid, 'SIGKILL');
    await gone(held.pid);
    await vi.waitFor(async () => expect(await ask(held.url)).toBe(1), { timeout: 10_000, interval: 50 });
  });

  it('starts over a dead process id and a query that still runs', async () => {
    const holder = await start();
    const busy = new pg.Client({ connectionString: holder.held.url });
    const cut = new Promise((resolve) => busy.on('error', resolve));
    await busy.connect();
    const endless = busy.query('select count(*) from generate_series(1, 1e12)').catch(() => 'cut');
    kill9(holder, 'server too');
    await gone(holder.held.pid);
    const again = await start();
    expect(await ask(again.held.url)).toBe(1);
    await Promise.all([cut, endless]);
  });

  it('starts over a process id that is another program’s by now', async () => {
    const holder = await start();
    kill9(holder, 'server too');
    await gone(holder.held.pid);
    const file = join(home, 'pg/data/postmaster.pid');
    const other = spawn('sleep', ['60'], { cwd: '/', ...owner });
    writeFileSync(file, readFileSync(file, 'utf8').replace(/^\d+/, String(other.pid)));
    const again = await start();
    expect(await ask(again.held.url)).toBe(1);
    expect(other.exitCode).toBe(null);
    other.kill();
  });

  it('takes over the lock of a start that was killed', async () => {
    writeFileSync(join(home, 'pg/start.lock'), `${process.pid} 1\n`);
    const { held } = await start();
    expect(await ask(held.url)).toBe(1);
  });
});
