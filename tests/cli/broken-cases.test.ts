// Cases that cannot be used, through the command line as a user has it: each is said in words, every issue on its own
// line, exit status 2, nothing on standard output, no stack trace.

import { closeSync, openSync, writeSync } from 'node:fs';
import { join } from 'node:path';

import { afterAll, beforeAll, describe, expect, test } from 'vitest';

import { caseText, changed } from '../case/support.ts';
import { buildBedwave, tinyCase, type Bedwave, type Said } from './support.ts';

let bedwave: Bedwave;
beforeAll(() => {
  bedwave = buildBedwave();
}, 60_000);
afterAll(() => bedwave.remove());

const check = (text: string): Said => {
  bedwave.write('broken.json', text);
  return bedwave.run('check', 'broken.json');
};

function expectRefusal({ code, out, err }: Said): string[] {
  expect(code).toBe(2);
  expect(out).toBe('');
  expect(err).not.toMatch(/\n\s+at |node:internal|Error:/);
  const lines = err.trimEnd().split('\n');
  for (const line of lines) expect(line).toMatch(/^bedwave: /);
  return lines;
}

const cycle = [
  { id: 'a', after: 'b', delay: '1 s', stop: 'P-310A' },
  { id: 'b', after: 'a', delay: '1 s', start: 'P-310B' },
];

describe('broken cases', () => {
  test.each([
    [
      'an unknown unit',
      changed('column/beds/0/height', '5 parsec'),
      /column\.beds\[0\]\.height: expected a length .*received "5 parsec"/,
    ],
    [
      'a unit of another kind',
      changed('column/beds/0/height', '6 kg'),
      /column\.beds\[0\]\.height: .*received "6 kg" - kg is a mass/,
    ],
    ['an unknown key', changed('column/diametre', '1 m'), /column\.diametre: .*diameter/],
    ['a missing field', changed('liquid/feed/rate', undefined), /liquid\.feed\.rate: expected .*received nothing/],
    ['a plant that contradicts itself', changed('liquid/pumps/standby', undefined), /no standby pump/],
    ['a text cut off', caseText('acetone-absorber').slice(0, 900), /case \(line \d+, column \d+\): expected/],
    [
      'an unknown tag in an interlock',
      changed('interlocks/IS-301/when/instrument', 'AT-3O1'),
      /interlocks\.IS-301\.when\.instrument: .*"AT-3O1".*AT-301/,
    ],
    ['triggers in a circle', changed('scenarios/pump-trip/steps', cycle), /scenarios\.pump-trip\.steps/],
    ['nothing at all', '', /case.*: expected/],
    ['a list', '[]', /case: expected an object, received \[\]/],
    ['a number without unit', changed('gas/feed/rate', 48), /gas\.feed\.rate: expected .*received 48/],
    ['another format version', changed('formatVersion', 2), /formatVersion: expected 1/],
  ])('%s', (_what, text, message) => {
    expect(expectRefusal(check(text)).some((line) => message.test(line))).toBe(true);
  });

  test('a trace beside the case with gaps, told with its row', () => {
    bedwave.write('gaps.csv', 'time [s],rate [mol/s]\n0,48\n10,\n20,52\n');
    const text = changed('scenarios/feed-spike/steps', [{ at: '0 s', change: 'gas.rate', trace: 'gaps.csv' }]);
    expect(expectRefusal(check(text))[0]).toMatch(/scenarios\.feed-spike\.steps\[0\]\.trace/);
  });

  test('a trace beside the case without gaps reads', () => {
    bedwave.write('whole.csv', 'time [s],rate [mol/s]\n0,48\n10,50\n20,52\n');
    const text = changed('scenarios/feed-spike/steps', [{ at: '0 s', change: 'gas.rate', trace: 'whole.csv' }]);
    expect(check(text)).toMatchObject({ code: 0 });
  });

  test('a file of 50 MB', () => {
    const handle = openSync(join(bedwave.folder, 'large.json'), 'w');
    const chunk = ' '.repeat(1e6);
    for (let i = 0; i < 50; i++) writeSync(handle, chunk);
    closeSync(handle);
    expect(expectRefusal(bedwave.run('check', 'large.json'))[0]).toMatch(
      /large\.json: expected .* at most .* MB, received 50\.0 MB/,
    );
  });

  test('no file, and a folder', () => {
    expect(expectRefusal(bedwave.run('run', 'none.json'))).toEqual([
      'bedwave: none.json: expected a case file that can be read, received no such file or folder',
    ]);
    expect(expectRefusal(bedwave.run('run', '.'))).toEqual([
      'bedwave: .: expected a case file that can be read, received a folder',
    ]);
  });

  test('bytes that are no text', () => {
    bedwave.write('bytes.json', '\u0000\u0001\ufffd{');
    expectRefusal(bedwave.run('check', 'bytes.json'));
  });

  test('every issue is listed, one a line', () => {
    const text = tinyCase({ 'column/diameter': '1 kg', 'gas/feed/rate': '40', colour: 'red' });
    const lines = expectRefusal(check(text));
    expect(lines.map((line) => /^bedwave: ([^:]+):/.exec(line)?.[1]).sort()).toEqual([
      'colour',
      'column.diameter',
      'gas.feed.rate',
    ]);
  });
});
