// The rules that hold the map of the code together, each shown to fire on a seeded violation.
// The expected arrows are written down again here: the test must not read them from the configuration.

import { readdirSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
import { ESLint } from 'eslint';
import { describe, expect, it, vi } from 'vitest';

const root = join(import.meta.dirname, '../..');

// The first file linted loads every plugin: 2 s here, more on a busy machine.
vi.setConfig({ testTimeout: 60_000 });

/** From the ground up; a part may import any part of an earlier row. */
const rows = [
  ['errors.ts'],
  ['units', 'units.ts'],
  ['numerics'],
  ['properties'],
  ['control', 'transfer'],
  ['case'],
  ['column'],
  ['run'],
  ['index.ts'],
  ['cli'],
] as const;

/** Arrows that the order of the rows would allow and the map does not, or the other way round. */
const exceptions: Record<string, boolean> = {
  // Mathematics that has never heard of a column has never heard of a unit either.
  'numerics -> units': false,
  'numerics -> units.ts': false,
  // units.ts is the face of units/, and nobody else looks behind it.
  'units.ts -> units': true,
};

const parts: string[] = rows.flat();
const rowOf = (part: string): number => rows.findIndex((row) => (row as readonly string[]).includes(part));

function mayImport(importer: string, target: string): boolean {
  if (importer === target) return true;
  const exception = exceptions[`${importer} -> ${target}`];
  if (exception !== undefined) return exception;
  if (target === 'units') return false;
  return rowOf(target) < rowOf(importer);
}

// A seeded file is not on disk, so it belongs to no TypeScript project: rules that need types stay off.
const eslint = new ESLint({
  cwd: root,
  overrideConfigFile: join(root, 'tests/lint/eslint.config.js'),
  overrideConfig: { languageOptions: { parserOptions: { projectService: false, program: null } } },
  ruleFilter: ({ ruleId }) => !ruleId.startsWith('@typescript-eslint/'),
});

/** Rules broken by `code` if it stood in `file`. */
async function brokenRules(file: string, code: string): Promise<string[]> {
  const [result] = await eslint.lintText(code, { filePath: join(root, file) });
  const messages = result?.messages ?? [];
  const unreadable = messages.find((message) => message.fatal ?? message.ruleId === null);
  if (unreadable) throw new Error(`${file} was not linted: ${unreadable.message}`);
  return messages.map((message) => message.ruleId ?? '');
}

const ARROW = 'import-x/no-restricted-paths';
const CYCLE = 'import-x/no-cycle';
const NODE = 'import-x/no-nodejs-modules';
const EXTENSION = 'import-x/extensions';

/** A file that really exists in the part, from the project's root; undefined while the part has none. */
function fileOf(part: string): string | undefined {
  if (part.endsWith('.ts')) return readdirSync(join(root, 'sim')).includes(part) ? `sim/${part}` : undefined;
  const names = readdirSync(join(root, 'sim'), { recursive: true, encoding: 'utf8' });
  const name = names.filter((entry) => entry.startsWith(`${part}/`) && /(?<!\.d)\.ts$/.test(entry)).sort()[0];
  return name === undefined ? undefined : `sim/${name}`;
}

function importOf(target: string, importer: string): string {
  const path = relative(dirname(importer), target);
  return path.startsWith('.') ? path : `./${path}`;
}

describe('arrows between the parts of sim/', () => {
  it('gives every file and folder of sim/ its place on the map', () => {
    const present = readdirSync(join(root, 'sim')).filter((name) => name !== 'tsconfig.json');
    expect(present.filter((name) => !parts.includes(name))).toEqual([]);
  });

  const pairs = parts.flatMap((importer) =>
    parts.flatMap((target) => {
      const file = fileOf(target);
      return importer === target || file === undefined ? [] : [{ importer, target, file }];
    }),
  );

  it('has pairs to try', () => {
    // errors.ts and index.ts exist from the first day: two targets for all other parts.
    expect(pairs.length).toBeGreaterThanOrEqual(2 * (parts.length - 1));
  });

  it.each(pairs)('$importer and an import of $target', async ({ importer, target, file }) => {
    const seeded = importer.endsWith('.ts') ? `sim/${importer}` : `sim/${importer}/seeded.ts`;
    const path = importOf(file, seeded);
    const allowed = mayImport(importer, target);
    expect((await brokenRules(seeded, `import '${path}';`)).includes(ARROW)).toBe(!allowed);
    // A type travels along the same arrows as a value.
    expect((await brokenRules(seeded, `export type { Any } from '${path}';`)).includes(ARROW)).toBe(!allowed);
  });
});

describe('arrows around sim/', () => {
  it.each(['ui/main.ts', 'ui/store/session.ts', 'ui/worker/sim.worker.ts'])('%s sees only index.ts', async (file) => {
    expect(await brokenRules(file, `import '${importOf('sim/index.ts', file)}';`)).not.toContain(ARROW);
    expect(await brokenRules(file, `import '${importOf('sim/errors.ts', file)}';`)).toContain(ARROW);
  });

  it('an element does not see the simulator at all', async () => {
    expect(await brokenRules('ui/elements/bw-bed/bw-bed.ts', `import '../../../sim/index.ts';`)).toContain(ARROW);
  });

  it.each(['sim/seeded.ts', 'sim/run/seeded.ts', 'sim/cli/seeded.ts', 'ui/seeded.ts'])(
    '%s does not import a test',
    async (file) => {
      const path = importOf('tests/lint/arrows.test.ts', file);
      expect(await brokenRules(file, `import '${path}';`)).toContain(ARROW);
    },
  );
});

describe('cycles', () => {
  // index.ts on disk imports errors.ts; the seeded text closes the circle.
  it('are found through the file on disk', async () => {
    expect(await brokenRules('sim/errors.ts', `import { SimError } from './index.ts';\nvoid SimError;`)).toContain(
      CYCLE,
    );
  });

  it('are not seen where there is none', async () => {
    expect(await brokenRules('sim/index.ts', `export { SimError } from './errors.ts';`)).toEqual([]);
  });
});

describe('modules of Node', () => {
  const imports = [
    `import { readFileSync } from 'node:fs';\nvoid readFileSync;`,
    `import { readFileSync } from 'fs';\nvoid readFileSync;`,
    `import type { Readable } from 'node:stream';\nexport type { Readable };`,
    `export const later = import('node:worker_threads');`,
  ];

  it.each(imports)('are refused outside the command line: %s', async (code) => {
    for (const file of ['sim/seeded.ts', 'sim/run/seeded.ts', 'sim/numerics/ivp/seeded.ts', 'ui/seeded.ts']) {
      expect(await brokenRules(file, code)).toContain(NODE);
    }
  });

  it.each(imports)('are at home in the command line: %s', async (code) => {
    expect(await brokenRules('sim/cli/seeded.ts', code)).toEqual([]);
  });
});

describe('sim/ gives the same bytes for the same case', () => {
  it.each(['Date.now()', 'new Date()', 'performance.now()', 'setTimeout(f, 1)', 'crypto.randomUUID()'])(
    'refuses %s',
    async (code) => {
      const seeded = `export const f = () => ${code};`;
      expect(await brokenRules('sim/run/seeded.ts', seeded)).toContain('no-restricted-globals');
      expect(await brokenRules('sim/cli/seeded.ts', seeded)).not.toContain('no-restricted-globals');
    },
  );

  it('refuses Math.random', async () => {
    const seeded = 'export const draw = () => Math.random();';
    expect(await brokenRules('sim/run/seeded.ts', seeded)).toContain('no-restricted-properties');
  });
});

describe('paths', () => {
  it('end in .ts', async () => {
    expect(await brokenRules('sim/seeded.ts', `import './errors';`)).toContain(EXTENSION);
    expect(await brokenRules('sim/seeded.ts', `export type { SimFault } from './errors';`)).toContain(EXTENSION);
    expect(await brokenRules('sim/seeded.ts', `import './errors.ts';`)).not.toContain(EXTENSION);
  });

  it('lead to a file', async () => {
    expect(await brokenRules('sim/seeded.ts', `import './nowhere.ts';`)).toContain('import-x/no-unresolved');
  });
});
