import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureBuilt } from './build.mjs';
import { startCluster } from './cluster.mjs';
import { ensureParts } from './debian.mjs';
import { checkNode, ensurePackages } from './packages.mjs';
import { run, Stop, say, since } from './say.mjs';
import { onEnd } from './signals.mjs';
import { closingLines, countPlaywright, countVitest, perform } from './testSteps.mjs';

const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..');

/** Lint, types, unit and browser tests, in this order; all of them run, whatever fails. */
async function test() {
  const from = performance.now();
  checkNode();
  ensurePackages(root);
  ensureParts(process.env.DATABASE_URL ? ['ffmpeg', 'chromium'] : ['postgresql', 'ffmpeg', 'chromium']);
  const home = mkdtempSync(join(tmpdir(), 'lampyrid-tests-'));
  chmodSync(home, 0o711);
  const cluster = process.env.DATABASE_URL ? undefined : await throwaway(home);
  const env = { DATABASE_URL: process.env.DATABASE_URL ?? cluster?.url };
  const stop = { asked: false };
  onEnd(async () => {
    stop.asked = true;
  });
  try {
    return await performAll(home, env, stop, from);
  } finally {
    await cluster?.stop();
    rmSync(home, { recursive: true, force: true });
  }
}

/** A database for this run only: nothing of it needs to outlive a power cut. */
function throwaway(home) {
  const settings = { fsync: 'off', full_page_writes: 'off', max_connections: '300' };
  return startCluster({ home, pgHome: join(home, 'pg'), settings });
}

async function performAll(home, env, stop, from) {
  const vitestJson = join(home, 'vitest.json');
  const playwrightJson = join(home, 'playwright.json');
  const steps = [
    { name: 'lint', program: 'biome', words: ['check', '--error-on-warnings', '.'] },
    { name: 'types', program: 'tsc', words: ['--noEmit', '-p', 'tsconfig.json'] },
    {
      name: 'unit',
      program: 'vitest',
      words: ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${vitestJson}`],
    },
    { name: 'build', work: async () => ensureBuilt(root) },
    {
      name: 'browser',
      program: 'playwright',
      words: ['test', '--forbid-only', '--reporter=list,json'],
      env: { PLAYWRIGHT_JSON_OUTPUT_NAME: playwrightJson },
    },
  ];
  const failed = [];
  const closing = [];
  for (const step of steps) {
    if (stop.asked) throw new Stop('Ended before all tests had run.', 130);
    say(`\n— ${step.name} —`);
    const { ok, output } = await perform(root, step, { ...env, ...step.env }, stop);
    if (!ok) failed.push(step.name);
    closing.push(...closingLines(step.name, output));
  }
  const counts = [countVitest(vitestJson), countPlaywright(playwrightJson)];
  const passed = counts.reduce((sum, count) => sum + count.passed, 0);
  const lost = counts.reduce((sum, count) => sum + count.failed, 0);
  say(`\nAll of it took ${since(from)}.`);
  for (const line of closing) say(line);
  if (failed.length > 0) say(`Failed: ${failed.join(', ')}.`);
  say(`${passed} passed, ${lost} failed`);
  return failed.length > 0 || lost > 0 || passed === 0 ? 1 : 0;
}

await run(test);
