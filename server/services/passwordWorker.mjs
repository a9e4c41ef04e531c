import { parentPort } from 'node:worker_threads';
import bcrypt from 'bcryptjs';

/** Rounds of bcrypt: 2^12, about 0.3 s of one core. */
const cost = 12;

parentPort?.on('message', ({ id, password, hash }) => {
  const work = hash === null ? bcrypt.hash(password, cost) : bcrypt.compare(password, hash);
  work.then(
    (answer) => parentPort?.postMessage({ id, answer }),
    () => parentPort?.postMessage({ id, answer: hash === null ? null : false }),
  );
});
