import { readFileSync } from 'node:fs';
import { isAlive, statOf } from './processes.mjs';

const watchMs = 500;

/**
 * Calls `stop` once when this process is told to end (Ctrl-C, SIGTERM, a closed terminal), or when the npm that
 * started it was killed without a word.
 * @param {() => Promise<void>} stop
 */
export function onEnd(stop) {
  let ended = false;
  const end = () => {
    if (ended) return;
    ended = true;
    void stop();
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, end);
  const npm = npmAbove();
  if (npm === undefined) return;
  const watch = setInterval(() => {
    if (!isAlive(npm)) end();
  }, watchMs);
  watch.unref();
}

/** Process id of the npm that runs this script, or undefined when it was started by hand. */
function npmAbove() {
  let pid = process.ppid;
  for (let steps = 0; steps < 3 && pid > 1; steps += 1) {
    if (nameOf(pid).startsWith('npm')) return pid;
    pid = statOf(pid)?.parent ?? 0;
  }
  return undefined;
}

/** @param {number} pid */
function nameOf(pid) {
  try {
    return readFileSync(`/proc/${pid}/comm`, 'utf8');
  } catch {
    return '';
  }
}
