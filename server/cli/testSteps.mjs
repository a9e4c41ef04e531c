import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { stripVTControlCharacters } from 'node:util';
import { Stop } from './say.mjs';

/**
 * @typedef {{ name: string, program?: string, words?: string[], work?: () => Promise<void> }} Step
 */

/**
 * Runs one step, showing what it prints and keeping it.
 * @param {string} root
 * @param {Step} step
 * @param {Record<string, string | undefined>} env
 * @param {{ asked: boolean }} stop becomes true when the person ends the run
 * @returns {Promise<{ ok: boolean, output: string }>}
 */
export async function perform(root, step, env, stop) {
  if (step.work) return performHere(step.work);
  const program = join(root, 'node_modules/.bin', step.program);
  const child = spawn(program, step.words, {
    cwd: root,
    env: { ...process.env, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const watch = setInterval(() => stop.asked && child.kill('SIGTERM'), 200);
  const parts = [];
  child.stdout.on('data', (part) => {
    parts.push(part);
    process.stdout.write(part);
  });
  child.stderr.on('data', (part) => {
    parts.push(part);
    process.stderr.write(part);
  });
  const [code] = await once(child, 'close');
  clearInterval(watch);
  return { ok: code === 0, output: Buffer.concat(parts).toString() };
}

/** @param {() => Promise<void>} work */
async function performHere(work) {
  try {
    await work();
    return { ok: true, output: '' };
  } catch (error) {
    if (!(error instanceof Stop)) throw error;
    process.stderr.write(`${error.message}\n`);
    return { ok: false, output: '' };
  }
}

/** The lines that sum up a run, by the step that prints them. */
const closings = {
  unit: /^ *(Test Files|Tests) +\d/,
  browser: /^ *\d+ (passed|failed|flaky|skipped|did not run)\b/,
};

/** A runner's own closing lines. @param {string} name @param {string} output @returns {string[]} */
export function closingLines(name, output) {
  const pattern = closings[name];
  if (!pattern) return [];
  const lines = stripVTControlCharacters(output).split('\n');
  return lines.filter((line) => pattern.test(line)).map((line) => line.trimEnd());
}

/**
 * Passed and failed tests of Vitest's JSON report. A file that did not load has no tests, and counts as one failure.
 * @param {string} path
 */
export function countVitest(path) {
  const report = readJson(path);
  if (!report) return { passed: 0, failed: 1 };
  const broken = report.testResults.filter(
    (file) => file.status === 'failed' && !file.assertionResults.some((one) => one.status === 'failed'),
  );
  return { passed: report.numPassedTests, failed: report.numFailedTests + broken.length };
}

/** Passed and failed tests of Playwright's JSON report; a flaky one has failed once. @param {string} path */
export function countPlaywright(path) {
  const report = readJson(path);
  if (!report) return { passed: 0, failed: 1 };
  const { expected, unexpected, flaky } = report.stats;
  return { passed: expected, failed: unexpected + flaky + (report.errors?.length ?? 0) };
}

/** @param {string} path */
function readJson(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'));
  } catch {
    return undefined;
  }
}
