import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';
import { statOf } from './processes.mjs';
import { Stop } from './say.mjs';

/**
 * Does `work` while no other process holds the lock file. The file names its holder by id and start tick, so a lock
 * that a killed process left behind is taken over, even when the id belongs to another program by now.
 * @template T
 * @param {string} path
 * @param {() => Promise<T>} work
 * @param {number} limitMs how long to wait for a living holder
 * @returns {Promise<T>}
 */
export async function withLock(path, work, limitMs = 120_000) {
  const own = `${process.pid} ${statOf(process.pid)?.started}\n`;
  const end = performance.now() + limitMs;
  while (!take(path, own)) {
    if (performance.now() > end) throw new Stop(`Another start holds ${path}. End it, then try again.`);
    await wait(20);
  }
  try {
    return await work();
  } finally {
    rmSync(path, { force: true });
  }
}

/** @param {string} path @param {string} own */
function take(path, own) {
  // Written whole under another name and then linked: nobody ever reads a half-written lock.
  const draft = `${path}.${process.pid}`;
  writeFileSync(draft, own);
  try {
    linkSync(draft, path);
    return true;
  } catch (error) {
    if (error.code !== 'EEXIST') throw error;
    clearStale(path);
    return false;
  } finally {
    rmSync(draft, { force: true });
  }
}

/** @param {string} path */
function clearStale(path) {
  const held = read(path);
  if (held === undefined || isHeld(held)) return;
  // Moved away before it's judged again: a second waiter may have cleared and taken it since it was read.
  const aside = `${path}.stale-${process.pid}`;
  try {
    renameSync(path, aside);
  } catch {
    return;
  }
  if (read(aside) !== held) {
    try {
      linkSync(aside, path);
    } catch {
      // Somebody holds it already.
    }
  }
  rmSync(aside, { force: true });
}

/** @param {string} text */
function isHeld(text) {
  const [pid, started] = text.trim().split(' ');
  return statOf(Number(pid))?.started === started;
}

/** @param {string} path */
function read(path) {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return undefined;
  }
}
