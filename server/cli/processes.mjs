import { readdirSync, readFileSync, readlinkSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';

/** True while a process with this id exists and isn't a zombie. @param {number} pid */
export function isAlive(pid) {
  const state = statOf(pid)?.state;
  return state !== undefined && state !== 'Z' && state !== 'X';
}

/**
 * State, parent and start tick of a process (proc(5), /proc/PID/stat fields 3, 4 and 22), or undefined when it's gone.
 * Process ids are used again, so only id and start tick together name a process.
 * @param {number} pid
 */
export function statOf(pid) {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = text.slice(text.lastIndexOf(')') + 2).split(' ');
    return { state: fields[0], parent: Number(fields[1]), started: fields[19] };
  } catch {
    return undefined;
  }
}

/** The command line of a process, words parted by spaces; empty when it's gone. @param {number} pid */
export function commandOf(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').replaceAll('\0', ' ').trim();
  } catch {
    return '';
  }
}

/** Ids of living processes whose working folder is `folder`. @param {string} folder */
export function processesIn(folder) {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .map(Number)
    .filter((pid) => workingFolderOf(pid) === folder && isAlive(pid));
}

/** @param {number} pid */
function workingFolderOf(pid) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`);
  } catch {
    // Gone, or another account's: neither is ours to touch.
    return undefined;
  }
}

/**
 * Waits until `done()` is true, looking every `stepMs`.
 * @param {() => boolean} done
 * @param {number} limitMs
 * @returns {Promise<boolean>} false when the limit passed first
 */
export async function until(done, limitMs, stepMs = 10) {
  const end = performance.now() + limitMs;
  while (!done()) {
    if (performance.now() > end) return false;
    await wait(stepMs);
  }
  return true;
}
