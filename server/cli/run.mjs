import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { chmodSync, existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { startCluster } from './cluster.mjs';
import { ensureParts } from './debian.mjs';
import { checkNode, ensurePackages } from './packages.mjs';
import { run, Stop } from './say.mjs';

const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..');

/** What can be run by name: where the files are, and whether they want a database of their own. */
const kinds = {
  bench: { folder: 'bench', database: true },
  tool: { folder: 'server/cli/tools', database: false },
};

/** Runs bench/NAME.ts or a tool. Prints nothing of its own on stdout: the last line there is the program's JSON. */
async function main() {
  checkNode();
  const [asked, ...rest] = process.argv.slice(2);
  const [kindName, name, ...words] = asked === 'pictures' ? ['bench', 'pictures', ...rest] : [asked, ...rest];
  const kind = kinds[kindName];
  if (!kind) throw new Stop(`Say which kind: ${Object.keys(kinds).join(' or ')}.`, 2);
  const file = fileOf(kind, kindName, name);
  ensurePackages(root);
  if (!kind.database) return perform(file, words, {});
  ensureParts(process.env.DATABASE_URL ? ['ffmpeg'] : ['postgresql', 'ffmpeg']);
  return withDatabase((env) => perform(file, words, env));
}

function fileOf(kind, kindName, name) {
  const folder = join(root, kind.folder);
  const entries = existsSync(folder) ? readdirSync(folder) : [];
  const names = entries.filter((entry) => entry.endsWith('.ts')).map((entry) => basename(entry, '.ts'));
  if (names.includes(name)) return join(folder, `${name}.ts`);
  const told = name ? `There is no ${kindName} ${name}.` : `Say which ${kindName}.`;
  const list = names.length > 0 ? `There are: ${names.join(', ')}.` : 'There are none yet.';
  throw new Stop(`${told} ${list}`, 2);
}

/** @param {(env: Record<string, string>) => Promise<number>} work */
async function withDatabase(work) {
  if (process.env.DATABASE_URL) return work({});
  const home = mkdtempSync(join(tmpdir(), 'lampyrid-run-'));
  chmodSync(home, 0o711);
  try {
    // Synced to the disk as on a real night: benches measure that too.
    const cluster = await startCluster({ home, pgHome: join(home, 'pg') });
    try {
      return await work({ DATABASE_URL: cluster.url });
    } finally {
      await cluster.stop();
    }
  } finally {
    rmSync(home, { recursive: true, force: true });
  }
}

/** @returns {Promise<number>} */
async function perform(file, words, env) {
  const child = spawn(process.execPath, ['--import', 'tsx', file, ...words], {
    cwd: process.env.INIT_CWD ?? process.cwd(),
    env: { ...process.env, ...env },
    stdio: 'inherit',
  });
  const pass = (signal) => child.kill(signal);
  process.on('SIGINT', pass).on('SIGTERM', pass);
  const [code] = await once(child, 'exit');
  return code ?? 1;
}

await run(main);
