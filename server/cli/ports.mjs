import { createServer } from 'node:net';
import { Stop } from './say.mjs';

/**
 * Who listens on this port of 127.0.0.1: nobody, one of us, or another program.
 * @param {number} port
 * @returns {Promise<'nobody' | 'lampyrid' | 'other'>}
 */
export async function whoListens(port) {
  if (await isFree(port)) return 'nobody';
  try {
    const answer = await fetch(`http://127.0.0.1:${port}/healthz`, { signal: AbortSignal.timeout(2000) });
    const { name } = await answer.json();
    return name === 'lampyrid' ? 'lampyrid' : 'other';
  } catch {
    return 'other';
  }
}

/** @param {number} port @returns {Promise<boolean>} */
function isFree(port) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen(port, '127.0.0.1', () => probe.close(() => resolve(true)));
  });
}

/**
 * Ends the command with a sentence when the port is taken.
 * @param {number} port
 */
export async function claimPort(port) {
  const who = await whoListens(port);
  if (who === 'lampyrid') throw new Stop(`Lampyrid runs already: http://127.0.0.1:${port}`, 0);
  if (who === 'other')
    throw new Stop(`Another program uses port ${port}. Choose one: npm start -- --port ${port + 1}`);
}
