import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const root = fileURLToPath(new URL('../..', import.meta.url));

/** Paths of all files below a folder of the project, those of a name's end. */
function filesIn(folder: string, end: string): string[] {
  return readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith(end))
    .map((name) => join(folder, name));
}

const text = (path: string) => readFileSync(join(root, path), 'utf8');
const rulesOf = (path: string) =>
  [...text(path).matchAll(/^- \*\*([A-Z]+\d+)\*\*/gm)].map((match) => match[1] ?? '');
const rules = ['shared', 'server', 'src'].flatMap((folder) => filesIn(folder, 'RULES.md')).flatMap(rulesOf);
const tests = ['tests', 'e2e'].flatMap((folder) => filesIn(folder, '.ts').concat(filesIn(folder, '.tsx')));
const titles = tests.flatMap((path) =>
  [...text(path).matchAll(/\b(?:it|test)(?:\.each\([^`]*?\))?\(\s*(['"`])((?:\\.|(?!\1).)+)\1/g)].map(
    (match) => ({
      path,
      title: match[2] ?? '',
    }),
  ),
);
const tested = titles.flatMap(({ title }) =>
  [...title.matchAll(/\[([A-Z]+\d+)\]/g)].map((match) => match[1] ?? ''),
);

describe('the numbered rules', () => {
  it('are found, and so are the tests', () => {
    expect(rules.length).toBeGreaterThan(5);
    expect(titles.length).toBeGreaterThan(20);
  });

  it('have each number once', () => {
    expect(rules.filter((rule, at) => rules.indexOf(rule) !== at)).toEqual([]);
  });

  it('have a test each', () => {
    expect(rules.filter((rule) => !tested.includes(rule))).toEqual([]);
  });

  it('are named by tests only when they exist', () => {
    expect(tested.filter((rule) => !rules.includes(rule))).toEqual([]);
  });
});

describe('test titles', () => {
  it('claim what is, and say it plainly', () => {
    expect(titles.filter(({ title }) => /\bshould\b/i.test(title))).toEqual([]);
  });

  it('are said once in a file', () => {
    const keys = titles.map(({ path, title }) => `${path}: ${title}`);
    expect(keys.filter((key, at) => keys.indexOf(key) !== at)).toEqual([]);
  });
});
