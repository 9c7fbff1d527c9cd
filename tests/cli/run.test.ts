import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

import * as v from 'valibot';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';

import { resultSchema, type ResultDocument } from '../../sim/run/result-schema.ts';
import { changed } from '../case/support.ts';
import { buildBedwave, tinyCase, type Bedwave } from './support.ts';

let bedwave: Bedwave;
beforeAll(() => {
  bedwave = buildBedwave();
  bedwave.write('tiny.json', tinyCase());
}, 60_000);
afterAll(() => bedwave.remove());

const file = (name: string): string => readFileSync(join(bedwave.folder, name), 'utf8');
const result = (name: string): ResultDocument => JSON.parse(file(name)) as ResultDocument;

describe('run', () => {
  // Why it exists: the printed answer is read by people and pasted into reports; a change of it should be seen.
  // Case: tinyCase() in support.ts, tolerance 1e-5. `vitest -u` writes it anew.
  test('prints the sentence, tables, events, warnings and the caution', async () => {
    const { code, out, err } = bedwave.run('run', 'tiny.json', '--scenario', 'trip');
    expect([code, err]).toEqual([0, '']);
    await expect(out).toMatchFileSnapshot('../golden/cli-run.txt');
  });

  test('takes the first scenario when none is named, and lists them', () => {
    expect(bedwave.run('run', 'tiny.json', '--list').out).toBe(
      'trip   Pump trips and comes back\nquiet  Nothing happens\n',
    );
    expect(bedwave.run('run', 'tiny.json').out).toContain('Pump trips and comes back');
  });

  test('writes a document that fits its schema, the same bytes twice, and the table', () => {
    const first = bedwave.run('run', 'tiny.json', '--json', 'a.json', '--csv', 'a.csv', '--profiles', '0 s, 30 s');
    expect(first.code).toBe(0);
    expect(first.err).toBe('bedwave: wrote a.json\nbedwave: wrote a.csv\n');
    expect(first.out).toMatch(/^Tracer at the outlet peaks/);
    const second = bedwave.run('run', 'tiny.json', '--json', '--profiles', '0 s, 30 s');
    expect(second.out).toBe(file('a.json'));
    expect(v.safeParse(resultSchema, result('a.json')).issues).toBeUndefined();
    expect(result('a.json').profiles.map((p) => p.time)).toEqual([0, 30]);
    expect(file('a.csv').split('\r\n')).toHaveLength(result('a.json').series.time.length + 2);
  });

  test('resumed from a saved state it gives the same bytes as the run that saved it', () => {
    const saving = bedwave.run('run', 'tiny.json', '--save', '12 s', 'state.json', '--json', 'whole.json', '--noise');
    expect([saving.code, saving.err]).toEqual([
      0,
      'bedwave: saved the run at 12 s to state.json\nbedwave: wrote whole.json\n',
    ]);
    const resumed = bedwave.run('run', 'tiny.json', '--resume', 'state.json', '--json');
    expect([resumed.code, resumed.out]).toEqual([0, file('whole.json')]);
  });

  test('a saved state belongs to its case and its choices', () => {
    bedwave.run('run', 'tiny.json', '--save', '1 s', 'other.json', '--until', '2 s');
    bedwave.write('changed.json', tinyCase({ title: 'another' }));
    const wrong = bedwave.run('run', 'changed.json', '--resume', 'other.json');
    expect([wrong.code, wrong.err]).toMatchObject([2, expect.stringMatching(/other\.json: expected the case that/)]);
    const both = bedwave.run('run', 'tiny.json', '--resume', 'other.json', '--seed', '4');
    expect([both.code, both.err]).toMatchObject([
      2,
      expect.stringMatching(/^bedwave: --seed: expected no such option/),
    ]);
  });

  test('overrides of the command line end in the document', () => {
    bedwave.run(
      ...['run', 'tiny.json', '--scenario', 'quiet', '--until', '10 s', '--segments', '6', '--tolerance', '1e-4'],
      ...['--method', 'rodas5p', '--seed', '7', '--json', 'o.json'],
    );
    expect(result('o.json')).toMatchObject({
      scenario: { id: 'quiet', duration: 10 },
      settings: { segments: [6], rtol: 1e-4, method: 'rodas5p', seed: 7 },
      outcome: { kind: 'completed', time: 10 },
    });
  });

  test('compares with twice the segments where asked', () => {
    const { code, out } = bedwave.run('run', 'tiny.json', '--until', '8 s', '--estimate');
    expect(code).toBe(0);
    expect(out).toMatch(/Twice the segments\n +figure +N = 8 +2 N = 16/);
  });

  test('asks an independent integrator where asked', () => {
    const { code, out } = bedwave.run('run', 'tiny.json', '--until', '0.5 s', '--second-opinion');
    expect(code).toBe(0);
    expect(out).toMatch(/second opinion {2}explicit extrapolation .*: agrees within /);
  });

  test('prints other units where asked', () => {
    expect(bedwave.run('run', 'tiny.json', '--units', 'us').out).toMatch(/>= \d+ scf\/min/);
  });
});

describe('exit status', () => {
  test('1 when a limit that was asked to hold is not kept, and only then', () => {
    expect(bedwave.run('run', 'tiny.json').code).toBe(0);
    expect(bedwave.run('run', 'tiny.json', '--hold', 'mean', '--hold', 'feed').code).toBe(0);
    expect(bedwave.run('run', 'tiny.json', '--hold', 'outlet')).toMatchObject({
      code: 1,
      err: 'bedwave: outlet is not kept\n',
    });
    expect(bedwave.run('run', 'tiny.json', '--hold', 'all').code).toBe(1);
  });

  test('3 when the calculation could not go on, with all that it has', () => {
    bedwave.write('stops.json', tinyCase({ run: { maxSteps: 100, rtol: 1e-9 } }));
    const said = bedwave.run('run', 'stops.json', '--json', 'part.json');
    expect(said.code).toBe(3);
    expect(said.err).toMatch(/bedwave: the calculation could not go on: the work limit/);
    expect(said.out).toMatch(/^The calculation stopped after/);
    expect(result('part.json').series.time.length).toBeGreaterThan(5);
    expect(result('part.json').outcome.failure?.kind).toBe('work-limit');
  });

  test.each([
    ['no command', []],
    ['an unknown command', ['rum', 'tiny.json']],
    ['no case', ['run']],
    ['an unknown option', ['run', 'tiny.json', '--jsn']],
    ['an unknown scenario', ['run', 'tiny.json', '--scenario', 'nope']],
    ['an unknown limit to hold', ['run', 'tiny.json', '--hold', 'nope']],
    ['a time without a unit', ['run', 'tiny.json', '--until', '90']],
    ['a time of the wrong kind', ['run', 'tiny.json', '--until', '5 m']],
    ['a method that does not exist', ['run', 'tiny.json', '--method', 'magic']],
    ['half a segment', ['run', 'tiny.json', '--segments', '4.5']],
    ['a tolerance of nothing', ['run', 'tiny.json', '--tolerance', '0']],
    ['a save after the end', ['run', 'tiny.json', '--save', '1 h', 's.json']],
    ['a save without a file', ['run', 'tiny.json', '--save', '1 h']],
    ['two documents for one output', ['run', 'tiny.json', '--json', '--csv']],
    ['a document over the case', ['run', 'tiny.json', '--json', 'tiny.json']],
    ['a folder for a document', ['run', 'tiny.json', '--until', '1 s', '--json', '.']],
    ['a state that is none', ['run', 'tiny.json', '--resume', 'tiny.json']],
  ])('2 for %s, said in words', (_what, args) => {
    const { code, out, err } = bedwave.run(...args);
    expect(code).toBe(2);
    expect(out).toBe('');
    expect(err).not.toMatch(/\n\s+at |node:internal/);
    expect(err.length).toBeGreaterThan(10);
    expect(existsSync(join(bedwave.folder, 's.json'))).toBe(false);
    expect(file('tiny.json')).toBe(tinyCase());
  });

  test('0 for help and version, with examples', () => {
    const help = bedwave.run('--help');
    expect([help.code, help.out]).toMatchObject([0, expect.stringMatching(/Examples:\n[^]*\n {2}bedwave check/)]);
    expect(bedwave.run('run', '--help').out).toContain('--hold <limit>');
    expect(bedwave.run('--version').out).toMatch(/^\d+\.\d+\.\d+\n$/);
  });

  test('a reader that closes early is no trouble', () => {
    const { out, err } = bedwave.shell('bedwave run tiny.json --json | head -c 20; echo " ${PIPESTATUS[0]}"');
    expect([out, err]).toEqual(['{\n "format": "bedwav 0\n', '']);
  });
});

describe('steady and check', () => {
  test('the steady state is printed, or written for programs', () => {
    const { code, out } = bedwave.run('steady', 'tiny.json');
    expect(code).toBe(0);
    // 1e-2: printed figures; the case states NOG 5, A 1.3.
    expect(out).toMatch(/tracer {2}5 {4}0\.8 m {2}1\.3/);
    const document = JSON.parse(bedwave.run('steady', 'tiny.json', '--json').out) as { transfer: { NOG: number }[] };
    expect(document.transfer[0]?.NOG).toBeCloseTo(5, 3);
  });

  test('a sound case is told so', () => {
    const { code, out } = bedwave.run('check', 'tiny.json');
    expect(code).toBe(0);
    expect(out).toMatch(/no errors/);
  });

  test('a plant that floods is no sound case', () => {
    bedwave.write('narrow.json', changed('column/diameter', '0.6 m'));
    const { code, err } = bedwave.run('check', 'narrow.json');
    expect(code).toBe(2);
    expect(err).toMatch(/^bedwave: column\.beds\[0\]: expected a bed that does not flood/);
  });
});
