import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { chmodSync, chownSync, mkdirSync, readFileSync } from 'node:fs';
import { homedir } from 'node:os';
import { join, resolve } from 'node:path';
import { Stop } from './say.mjs';

const isRoot = process.getuid?.() === 0;

/**
 * The folder that holds all that this copy of the project keeps: pg, media, spill, secrets. One for each project path,
 * so that two clones never share a database.
 * @param {string} root the project
 * @param {string | undefined} asked what --data or LAMPYRID_DATA says
 */
export function dataHome(root, asked) {
  if (asked) return resolve(asked);
  const key = createHash('sha256').update(resolve(root)).digest('hex').slice(0, 10);
  const base = isRoot ? '/var/lib' : process.env.XDG_DATA_HOME || join(homedir(), '.local/share');
  return join(base, 'lampyrid', key);
}

/**
 * The account that runs PostgreSQL: it refuses to run as root, so root lends it Debian's own account.
 * @returns {{ uid: number, gid: number } | undefined} undefined for an ordinary user: one's own
 */
export function postgresAccount() {
  if (!isRoot) return undefined;
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith('postgres:'));
  if (!line) throw new Stop('There is no postgres account. Install PostgreSQL: apt-get install postgresql');
  const [, , uid, gid] = line.split(':');
  return { uid: Number(uid), gid: Number(gid) };
}

/**
 * Makes the data folders. The database's own belongs to the account that runs it and is closed to others.
 * @param {string} home
 * @param {string} pgHome
 * @param {{ uid: number, gid: number } | undefined} account
 */
export function makeHome(home, pgHome, account) {
  mkdirSync(home, { recursive: true });
  mkdirSync(pgHome, { recursive: true });
  if (!account) return;
  chownSync(pgHome, account.uid, account.gid);
  chmodSync(pgHome, 0o700);
  // A folder under /root (mode 0700) can't be walked into by the postgres account, whoever owns it.
  const { status } = spawnSync('setpriv', [...asAccount(account), 'test', '-w', pgHome], { cwd: '/' });
  if (status !== 0)
    throw new Stop(
      `The postgres account can't write in ${pgHome}.\nKeep the data elsewhere, for instance: npm start -- --data /var/lib/lampyrid/show`,
    );
}

/** The words for setpriv that become another account. @param {{ uid: number, gid: number } | undefined} account */
export function asAccount(account) {
  return account ? ['--reuid', String(account.uid), '--regid', String(account.gid), '--clear-groups'] : [];
}
