import {
  copyFileSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { cruise, type ICruiseResult } from 'dependency-cruiser';
import extractTSConfig from 'dependency-cruiser/config-utl/extract-ts-config';
import { beforeAll, describe, expect, it } from 'vitest';
import { borders } from './borders';

const root = fileURLToPath(new URL('../..', import.meta.url));
const folders = ['shared', 'server', 'src'].filter((folder) => existsSync(`${root}/${folder}`));
let result: ICruiseResult;

/** What dependency-cruiser finds in some folders of a project. */
async function look(baseDir: string, folders: string[]): Promise<ICruiseResult> {
  const { output } = await cruise(
    folders,
    {
      baseDir,
      ruleSet: { forbidden: borders },
      validate: true,
      tsPreCompilationDeps: true,
      doNotFollow: { path: 'node_modules' },
      tsConfig: { fileName: `${root}/tsconfig.json` },
      enhancedResolveOptions: {
        exportsFields: ['exports'],
        conditionNames: ['import', 'require', 'node', 'default', 'types'],
        extensions: ['.ts', '.tsx', '.mjs', '.js', '.d.ts', '.css'],
      },
    },
    undefined,
    { tsConfig: extractTSConfig(`${root}/tsconfig.json`) },
  );
  if (typeof output === 'string') throw new Error(output);
  return output;
}

beforeAll(async () => {
  result = await look(root, folders);
});

/** Wrong imports, each with the border that must catch it. */
const wrong: [file: string, line: string, border: string][] = [
  ['shared/time/a.ts', "import 'node:fs';", 'shared-is-pure'],
  ['shared/time/b.ts', "import '../show/c';", 'shared-from-top-to-bottom'],
  ['shared/show/c.ts', "import './d';", 'no-cycles'],
  ['src/stage/e.ts', "import type { f } from '../link/f';", 'stage-link-inputs-apart'],
  ['src/link/f.ts', "import 'react';\nexport type f = 1;", 'no-react-below-pages'],
  ['src/features/g/g.tsx', "import '../h/h';", 'features-apart'],
  ['src/features/h/h.ts', "import 'pixi.js';", 'pixi-on-the-stage'],
  ['src/components/i.ts', "import '../features/h/h';", 'components-have-no-subject'],
  ['src/hooks/j.ts', "import '../features/h/h';", 'hooks-and-lib-below-features'],
  ['server/routes/k.ts', "import '../hub/l';", 'routes-hub-media-apart'],
  ['server/hub/l.ts', "import 'express';", 'express-in-routes'],
  ['server/services/m.ts', "import '../hub/l';", 'services-below-edges'],
  ['server/services/n.ts', "import 'ws';", 'ws-in-the-hub'],
  ['server/routes/o.ts', "import 'sequelize';", 'sequelize-in-models'],
  ['server/routes/p.ts', "import 'node:child_process';", 'programs-in-media-and-cli'],
  ['server/routes/q.ts', "import '../../src/hooks/j';", 'server-never-src'],
  ['src/lib/r.ts', "import '../../server/services/n';", 'src-never-server'],
  ['src/lib/s.ts', "import 'vitest';", 'product-without-tests'],
  ['src/lib/t.ts', "import './nowhere';", 'all-resolve'],
];

/** Files that a wrong one needs. A cycle is reported once, at one of its files. */
const beside: [file: string, line: string][] = [['shared/show/d.ts', "import './c';"]];

describe('the watch over borders', () => {
  let seen: string[];

  beforeAll(async () => {
    const folder = mkdtempSync(join(tmpdir(), 'lampyrid-borders-'));
    symlinkSync(join(root, 'node_modules'), join(folder, 'node_modules'));
    for (const name of ['tsconfig.json', 'package.json']) copyFileSync(join(root, name), join(folder, name));
    for (const [file, line] of [...wrong, ...beside]) {
      mkdirSync(dirname(join(folder, file)), { recursive: true });
      writeFileSync(join(folder, file), `${line}\n`);
    }
    const { summary } = await look(folder, ['shared', 'server', 'src']);
    seen = summary.violations.map(({ from, rule }) => `${rule.name} in ${from}`);
    rmSync(folder, { recursive: true });
  });

  it.each(wrong)('catches %s: %s', (file, _line, border) => {
    expect(seen).toContain(`${border} in ${file}`);
  });

  it('knows a wrong import for each border', () => {
    const tried = new Set(wrong.map(([, , border]) => border));
    expect(borders.map(({ name }) => name).filter((name) => !tried.has(name ?? ''))).toEqual([]);
  });
});

describe('the borders of the house', () => {
  it('are looked at in every module, pages with JSX and aliases too', () => {
    const seen = result.modules.map(({ source }) => source);
    expect(seen.length).toBeGreaterThan(30);
    expect(seen.some((source) => source.startsWith('src/') && source.endsWith('.tsx'))).toBe(true);
    const targets = result.modules.flatMap(({ dependencies }) => dependencies);
    const resolved = (start: string) => targets.find(({ module }) => module.startsWith(start))?.resolved;
    expect(resolved('#shared/')).toMatch(/^shared\/.+\.ts$/);
    expect(resolved('@/')).toMatch(/^src\//);
  });

  it.each(borders.map(({ name, comment }) => ({ name, comment })))('are kept: $name', ({ name, comment }) => {
    const broken = result.summary.violations
      .filter(({ rule }) => rule.name === name)
      .map(({ from, to, cycle }) => `${from} → ${cycle?.map((step) => step.name).join(' → ') ?? to}`);
    expect(broken, comment).toEqual([]);
  });
});
