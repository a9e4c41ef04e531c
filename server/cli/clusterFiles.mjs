import { spawnSync } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { chownSync, existsSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { isAlive } from './processes.mjs';
import { Stop } from './say.mjs';

/** Name of the database and of its owner. */
export const databaseName = 'lampyrid';

/**
 * @typedef {{ uid: number, gid: number } | undefined} Account
 * @typedef {{ pid: number, port: number, state: string }} Postmaster
 */

/** The generated password of this cluster. @param {string} pgHome */
export function readSecret(pgHome) {
  try {
    return readFileSync(join(pgHome, 'secret'), 'utf8').trim();
  } catch {
    throw new Stop(`${pgHome} holds a database but its file "secret" is missing. Put it back from a copy.`);
  }
}

/**
 * What postmaster.pid says (PostgreSQL's miscadmin.h: line 1 process id, line 4 port, line 8 state), or undefined.
 * @param {string} data
 * @returns {Postmaster | undefined}
 */
export function readPostmaster(data) {
  try {
    const lines = readFileSync(join(data, 'postmaster.pid'), 'utf8').split('\n');
    return { pid: Number(lines[0]), port: Number(lines[3]), state: (lines[7] ?? '').trim() };
  } catch {
    return undefined;
  }
}

/**
 * Makes a new cluster with our database in it. All is made under another name and renamed at the end, so a cluster of
 * the final name is always whole.
 * @param {string} pgHome
 * @param {string} bin PostgreSQL's folder of programs
 * @param {Account} account
 */
export function createCluster(pgHome, bin, account) {
  clearHalfMade(pgHome);
  const secret = join(pgHome, 'secret');
  writeFileSync(secret, `${randomBytes(24).toString('base64url')}\n`, { mode: 0o600 });
  if (account) chownSync(secret, account.uid, account.gid);
  const draft = join(pgHome, `new-${process.pid}`);
  const words = ['-D', draft, '-U', databaseName, '-A', 'scram-sha-256', '--pwfile', secret, '-E', 'UTF8'];
  perform(join(bin, 'initdb'), [...words, '--locale=C.UTF-8', '--no-instructions'], pgHome, account);
  // Single-user mode needs no port and no client.
  const sql = `CREATE DATABASE ${databaseName};\n`;
  perform(join(bin, 'postgres'), ['--single', '-D', draft, 'postgres'], pgHome, account, sql);
  renameSync(draft, join(pgHome, 'data'));
}

/** @param {string} pgHome */
function clearHalfMade(pgHome) {
  for (const name of readdirSync(pgHome)) {
    const pid = Number(/^new-(\d+)$/.exec(name)?.[1]);
    if (pid && (pid === process.pid || !isAlive(pid))) rmSync(join(pgHome, name), { recursive: true });
  }
}

/**
 * @param {string} program
 * @param {string[]} words
 * @param {string} cwd the account must be able to enter it
 * @param {Account} account
 */
function perform(program, words, cwd, account, input = '') {
  const done = spawnSync(program, words, { cwd, input, encoding: 'utf8', ...account });
  if (done.status === 0) return;
  const reason = (done.stderr || done.error?.message || '').trim().split('\n').slice(-3).join('\n');
  throw new Stop(`The database could not be made in ${cwd}:\n${reason}`);
}

/** True when this folder holds a finished cluster. @param {string} data */
export function hasCluster(data) {
  return existsSync(join(data, 'PG_VERSION'));
}
