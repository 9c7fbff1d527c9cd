// The command line as a user has it: built, in a folder of its own, started as a process.

import { execFileSync, spawnSync } from 'node:child_process';
import { copyFileSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { caseText, put, type Tree } from '../case/support.ts';

const ROOT = join(import.meta.dirname, '../..');

/** What a process left. */
export interface Said {
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

/** A built command line with a folder for files. */
export interface Bedwave {
  readonly folder: string;
  /** Starts it in the folder. */ run(...args: string[]): Said;
  /** Starts it in a shell line; `bedwave` stands for the program. */ shell(line: string): Said;
  /** Writes a file into the folder. */ write(name: string, text: string): string;
  remove(): void;
}

/** Builds into a new temporary folder, laid out like the project: the committed stub beside the built program. */
export function buildBedwave(): Bedwave {
  const folder = mkdtempSync(join(tmpdir(), 'bedwave-'));
  const home = join(folder, 'home');
  const stub = join(home, 'sim/cli/bedwave.js');
  execFileSync(
    process.execPath,
    [
      join(ROOT, 'node_modules/vite/bin/vite.js'),
      'build',
      ...['--mode', 'cli', '--logLevel', 'error', '--outDir', join(home, 'dist/cli')],
    ],
    { cwd: ROOT, stdio: 'pipe' },
  );
  mkdirSync(join(home, 'sim/cli'), { recursive: true });
  copyFileSync(join(ROOT, 'sim/cli/bedwave.js'), stub);
  writeFileSync(join(home, 'package.json'), '{ "type": "module" }');
  const env = { ...process.env, NO_COLOR: '1' };
  const said = (command: string, args: readonly string[]): Said => {
    const { status, stdout, stderr } = spawnSync(command, args, { cwd: folder, encoding: 'utf8', env, maxBuffer: 1e8 });
    return { code: status, out: stdout, err: stderr };
  };
  return {
    folder,
    run: (...args) => said(process.execPath, [stub, ...args]),
    shell: (line) => said('bash', ['-c', line.replaceAll('bedwave', `'${process.execPath}' '${stub}'`)]),
    write(name, text) {
      writeFileSync(join(folder, name), text);
      return name;
    },
    remove: () => rmSync(folder, { recursive: true, force: true }),
  };
}

/**
 * A case that runs in a moment: constant coefficients, eight segments, one instrument with an alarm, two limits and an
 * interlock; the pump trips and comes back.
 */
export function tinyCase(changes: Readonly<Record<string, unknown>> = {}): string {
  const tree = JSON.parse(caseText('constant-coefficients')) as Tree;
  put(tree, 'column/beds/0/segments', 8);
  put(tree, 'instruments/AT-1', {
    measures: 'gas-outlet',
    unit: 'ppmv',
    lag: '2 s',
    deadTime: '3 s',
    range: ['0 ppmv', '1 ppmv'],
  });
  put(tree, 'alarms', { 'AAH-1': { instrument: 'AT-1', high: '0.12 ppmv', deadband: '0.01 ppmv', onDelay: '1 s' } });
  put(tree, 'interlocks', {
    'IS-1': { kind: 'auto-start', when: { instrument: 'AT-1', above: '0.15 ppmv' }, do: { start: 'P-1' } },
  });
  put(tree, 'limits', {
    outlet: { measures: 'gas-outlet', max: '0.15 ppmv' },
    mean: { measures: 'gas-outlet', max: '0.8 ppmv', averaging: { kind: 'rolling', window: '2 min' } },
    feed: { measures: 'gas-flow', min: '30 mol/s' },
  });
  put(tree, 'scenarios', {
    trip: {
      title: 'Pump trips and comes back',
      duration: '2 min',
      steps: [
        { id: 'trip', at: '5 s', stop: 'P-1', label: 'P-1 trips' },
        { id: 'power', at: '20 s', start: 'P-1', label: 'P-1 is started' },
      ],
      interlocks: 'none',
    },
    quiet: { title: 'Nothing happens', duration: '30 s', steps: [] },
  });
  for (const [path, value] of Object.entries(changes)) put(tree, path, value);
  return JSON.stringify(tree, null, 2);
}
