import { spawnSync } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { installScript } from '../../server/cli/debian.mjs';
import { readFlags } from '../../server/cli/flags.mjs';
import { dataHome } from '../../server/cli/home.mjs';
import { checkNode } from '../../server/cli/packages.mjs';
import { claimPort } from '../../server/cli/ports.mjs';
import { closingLines, countPlaywright, countVitest } from '../../server/cli/testSteps.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url));
const cli = (script: string, ...words: string[]) =>
  spawnSync(process.execPath, [`server/cli/${script}`, ...words], { cwd: root, encoding: 'utf8' });

describe('the start command', () => {
  it('reads port, folder and demo from its words', () => {
    const flags = readFlags(['--port', '4100', '--data=/tmp/night', '--demo', '--open'], {});
    expect(flags).toMatchObject({ port: 4100, data: '/tmp/night', demo: true, open: true });
  });

  it.each([
    [['--port', 'x'], 'x is no port'],
    [['--port'], '--port needs a value'],
    [['--sideways'], 'no switch --sideways'],
    [['--prot', '1'], 'There is no switch --prot'],
  ])('refuses %j with a sentence and code 2', (words, sentence) => {
    const done = cli('start.mjs', ...words);
    expect(done.status).toBe(2);
    expect(done.stderr).toContain(sentence);
    expect(done.stderr).not.toContain('    at ');
  });

  it('refuses a Node that is too old', () => {
    expect(() => checkNode('20.18.1')).toThrow('Node 20.18.1 is too old');
    expect(() => checkNode('18.20.0')).toThrow('too old');
    expect(() => checkNode('20.19.0')).not.toThrow();
  });

  it('keeps two copies of the project apart', () => {
    expect(dataHome('/a/one', undefined)).not.toBe(dataHome('/a/two', undefined));
    expect(dataHome('/a/one', undefined)).toBe(dataHome('/a/one', undefined));
  });

  it.each([
    ['lampyrid', 0, 'Lampyrid runs already: http://127.0.0.1:'],
    ['something', 1, 'Another program uses port'],
  ])('tells when its port is taken by %s', async (name, code, sentence) => {
    const server = createServer((_request, answer) => answer.end(JSON.stringify({ name }))).listen(
      0,
      '127.0.0.1',
    );
    await once(server, 'listening');
    const { port } = server.address() as AddressInfo;
    await expect(claimPort(port)).rejects.toMatchObject({ code, message: expect.stringContaining(sentence) });
    server.close();
  });

  it('keeps Debian from starting a server of its own on 5432', () => {
    const script = installScript(['postgresql', 'ffmpeg']);
    const order = ['postgresql-common ||', 'create_main_cluster = false', 'postgresql ffmpeg'];
    const found = order.map((part) => script.indexOf(part));
    expect(found).toEqual([...found].sort((a, b) => a - b));
    expect(found).not.toContain(-1);
    expect(script).toContain('trap');
    expect(spawnSync('sh', ['-n', '-c', script]).status).toBe(0);
  });
});

describe('the run command', () => {
  it('names what can be run when asked for what can’t', () => {
    const done = cli('run.mjs', 'bench', 'nothing');
    expect(done.status).toBe(2);
    expect(done.stderr).toContain('There is no bench nothing.');
    expect(done.stdout).toBe('');
  });
});

describe('the test command', () => {
  it('repeats each runner’s own closing lines', () => {
    const vitest =
      'x\n\u001b[2m Test Files \u001b[22m 3 passed (3)\n      Tests  29 passed (29)\n   Start at  07:00\n';
    expect(closingLines('unit', vitest)).toEqual([
      ' Test Files  3 passed (3)',
      '      Tests  29 passed (29)',
    ]);
    const playwright = '  ✓  1 story 2 passed\n  1 failed\n    a.spec.ts\n  12 passed (1.2m)\n';
    expect(closingLines('browser', playwright)).toEqual(['  1 failed', '  12 passed (1.2m)']);
  });

  it('counts a file that did not load, a flaky test and a missing report as failures', () => {
    const folder = mkdtempSync(join(tmpdir(), 'lampyrid-reports-'));
    const write = (name: string, report: unknown) => {
      writeFileSync(join(folder, name), JSON.stringify(report));
      return join(folder, name);
    };
    const broken = { status: 'failed', assertionResults: [] };
    const vitest = write('v.json', { numPassedTests: 5, numFailedTests: 0, testResults: [broken] });
    expect(countVitest(vitest)).toEqual({ passed: 5, failed: 1 });
    const playwright = write('p.json', { stats: { expected: 4, unexpected: 1, flaky: 1 }, errors: [] });
    expect(countPlaywright(playwright)).toEqual({ passed: 4, failed: 2 });
    expect(countPlaywright(join(folder, 'none.json'))).toEqual({ passed: 0, failed: 1 });
    rmSync(folder, { recursive: true });
  });
});
