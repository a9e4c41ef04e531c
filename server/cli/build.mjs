import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { Stop, say, since } from './say.mjs';
import { squeeze } from './squeeze.mjs';

/** All that the built pages are made of. */
const sources = [
  'index.html',
  'display.html',
  'vite.config.ts',
  'package-lock.json',
  'server/cli/squeeze.mjs',
  'src',
  'shared',
  'fonts',
  'public',
];

/**
 * Builds the pages into dist/ unless they were built from just these sources.
 * @param {string} root
 */
export function ensureBuilt(root) {
  const stamp = join(root, 'dist/.stamp');
  const wanted = hashOf(root);
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return;
  say('Building the pages.');
  const from = performance.now();
  const vite = join(root, 'node_modules/vite/bin/vite.js');
  const words = [vite, 'build', '--logLevel', 'warn'];
  const done = spawnSync(process.execPath, words, { cwd: root, encoding: 'utf8' });
  if (done.status !== 0) throw new Stop(`The pages did not build:\n${done.stdout}${done.stderr}`);
  squeeze(join(root, 'dist/assets'));
  writeFileSync(stamp, wanted);
  say(`Pages built in ${since(from)}.`);
}

/** @param {string} root */
function hashOf(root) {
  const hash = createHash('sha256');
  for (const name of sources) addTo(hash, root, name);
  return hash.digest('hex');
}

/** @param {import('node:crypto').Hash} hash @param {string} root @param {string} name */
function addTo(hash, root, name) {
  const path = join(root, name);
  if (!existsSync(path)) return;
  if (statSync(path).isDirectory()) {
    for (const entry of readdirSync(path).sort()) addTo(hash, root, join(name, entry));
    return;
  }
  const bytes = readFileSync(path);
  // Name and length bound what follows: moving bytes from one file to the next changes the hash.
  hash.update(`${name}\0${bytes.length}\0`).update(bytes);
}
