import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const path = (name: string) => fileURLToPath(new URL(`../../${name}`, import.meta.url));
const { scripts } = JSON.parse(readFileSync(path('package.json'), 'utf8')) as {
  scripts: Record<string, string>;
};
const documents = ['README.md', 'DEVELOPERS.md'].filter((name) => existsSync(path(name)));

describe('the commands', () => {
  it.each(documents)('that %s names are there', (name) => {
    const named = [...readFileSync(path(name), 'utf8').matchAll(/npm run ([a-z0-9:-]+)/g)].map(
      (match) => match[1],
    );
    expect(named.filter((command) => !command || !(command in scripts))).toEqual([]);
  });

  it('lead to files that are there', () => {
    const files = Object.values(scripts).flatMap((line) => line.match(/\bserver\/cli\/\S+\.mjs\b/g) ?? []);
    expect(files.filter((file) => !existsSync(path(file)))).toEqual([]);
    expect(files.length).toBeGreaterThan(2);
  });
});
