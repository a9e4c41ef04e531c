import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { Stop, say, since } from './say.mjs';

/**
 * Installs the packages of package-lock.json when they are missing or were installed from another lock.
 * @param {string} root
 */
export function ensurePackages(root) {
  const stamp = join(root, 'node_modules/.lampyrid-lock');
  const wanted = createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .digest('hex');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return;
  say('Installing packages (npm ci).');
  const from = performance.now();
  // NODE_ENV=production would leave out what the build and the tests need.
  const env = { ...process.env, NODE_ENV: 'development' };
  const words = ['ci', '--no-audit', '--no-fund', '--loglevel=error'];
  const { status } = spawnSync('npm', words, { cwd: root, env, stdio: ['ignore', 'ignore', 'inherit'] });
  if (status !== 0) throw new Stop('The packages did not install; npm says why above.');
  writeFileSync(stamp, wanted);
  say(`Packages installed in ${since(from)}.`);
}

/** Ends with a sentence when this Node can't run the product. */
export function checkNode(version = process.versions.node) {
  const [major, minor] = version.split('.').map(Number);
  const fits = (major === 20 && minor >= 19) || major >= 22;
  if (!fits)
    throw new Stop(`Node ${version} is too old. Install Node 20.19 or newer (or 22 and up), then try again.`);
}
