import { Worker } from 'node:worker_threads';

type Answer = string | boolean | null;

let worker: Worker | null = null;
let asked = 0;
const waiting = new Map<number, (answer: Answer) => void>();

/** One thread for all of them: a hash takes 0.3 s of a core, which the hub's loop cannot spare. */
function thread(): Worker {
  if (worker) return worker;
  const made = new Worker(new URL('./passwordWorker.mjs', import.meta.url));
  made.on('message', ({ id, answer }: { id: number; answer: Answer }) => {
    waiting.get(id)?.(answer);
    waiting.delete(id);
    if (waiting.size === 0) made.unref();
  });
  made.on('error', () => {
    worker = null;
    for (const answer of waiting.values()) answer(null);
    waiting.clear();
  });
  worker = made;
  return made;
}

function ask(password: string, hash: string | null): Promise<Answer> {
  asked += 1;
  const id = asked;
  const at = thread();
  at.ref();
  return new Promise((resolve) => {
    waiting.set(id, resolve);
    at.postMessage({ id, password, hash });
  });
}

/**
 * bcrypt hash of a password, cost 12.
 * @throws Error when the thread has died
 */
export async function hashPassword(password: string): Promise<string> {
  const hash = await ask(password, null);
  if (typeof hash !== 'string') throw new Error('The password could not be hashed.');
  return hash;
}

/** A hash that no password fits, so that a question about nobody takes as long as one about somebody. */
const nobody = '$2b$12$3RhMmI1dFfAK2eR32yoleunHXJTkaBJmPYfk1uwveNDXlyswc5BnC';

/** bcrypt reads no further, so a longer password would fit by its beginning. */
const mostBytes = 72;

/**
 * Whether a password fits a hash; `null` (no such user) takes the same time and is never true.
 * @throws Error when the thread has died
 */
export async function checkPassword(password: string, hash: string | null): Promise<boolean> {
  const fits = await ask(password, hash ?? nobody);
  if (fits === null) throw new Error('The password could not be checked.');
  return hash !== null && fits === true && Buffer.byteLength(password) <= mostBytes;
}
