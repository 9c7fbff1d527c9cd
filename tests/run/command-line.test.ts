// The run's answers as a user gets them from the built command line: the same bytes as from the library, and plants that
// cannot be refused or warned about in words that say what would mend them.

import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { resultOf, writeResult } from '../../sim/run/result.ts';
import { createRun } from '../../sim/run/simulate.ts';
import { acetone, caseText, changed, mustRead, put, type Tree } from '../case/support.ts';
import { buildBedwave, tinyCase, type Bedwave, type Said } from '../cli/support.ts';

let bedwave: Bedwave;
beforeAll(() => {
  bedwave = buildBedwave();
}, 60_000);
afterAll(() => bedwave.remove());

test('command line and library give the same document, byte for byte', () => {
  const text = tinyCase();
  bedwave.write('tiny.json', text);
  const plant = mustRead(text);
  const run = createRun(plant, plant.scenarios[0]!);
  run.advance(plant.scenarios[0]!.duration);
  expect(bedwave.run('run', 'tiny.json', '--json').out).toBe(writeResult(resultOf(run, { caseText: text })));
});

const check = (text: string): Said => {
  bedwave.write('plant.json', text);
  return bedwave.run('check', 'plant.json');
};
const two = (composition: object): string =>
  JSON.stringify(put(JSON.parse(caseText('benzene-wash-oil')) as Tree, 'gas/feed/composition', composition));

describe('plants that cannot be', () => {
  test.each([
    [
      'gas above the flood point',
      // 0.6 m instead of 0.82 m: the velocity, 60 % of flooding, rises by (0.82/0.6)^2 = 1.87.
      changed('column/diameter', '0.6 m'),
      /column\.beds\[0\]: expected a bed that does not flood .* - a larger diameter, an opener packing, less gas or less/,
    ],
    [
      'a bed taller than its shell',
      changed('column/beds/0/height', '12 m'),
      /fit into the shell of .* - lower the beds/,
    ],
    [
      'gas that flows out of the inlet',
      changed('gas/feed/rate', '-48 mol/s'),
      /gas\.feed\.rate: .* in \(0 mol\/s, .*-48/,
    ],
    [
      'liquid that flows upward',
      changed('liquid/feed/rate', '-2 L/s'),
      /liquid\.feed\.rate: .* in \(0 m3\/s, .*-2 L\/s/,
    ],
    [
      'a strength below nothing',
      changed('gas/feed/composition/acetone', '-1 ppmv'),
      /from 0 to below 1, received "-1 ppmv/,
    ],
    [
      'a liquid that is more than all',
      changed('liquid/feed/composition', { acetone: '110 mol%' }),
      /from 0 to below 1/,
    ],
    [
      'a gas that is more than all',
      two({ benzene: '70 vol%', toluene: '40 vol%' }),
      /leave room for the carrier.*110 mol%/,
    ],
    [
      'steam over water',
      changed('carrier', 'steam'),
      /carrier: .*stays a gas.* - a condensing carrier is outside the model/,
    ],
    [
      'ice',
      changed('liquid/feed/temperature', '-5 degC'),
      /liquid\.feed\.temperature: .*water is liquid.*below 273\.15 K/,
    ],
    [
      'boiling water',
      changed('liquid/feed/temperature', '105 degC'),
      /liquid\.feed\.temperature: .*above its boiling point/,
    ],
    [
      'a gas with droplets',
      changed('gas/feed/humidity', '150 %'),
      /gas\.feed\.humidity: .*droplets is outside the model/,
    ],
  ])('%s: refused, in words', (_what, text, message) => {
    const { code, out, err } = check(text);
    expect([code, out]).toEqual([2, '']);
    expect(err).toMatch(message);
  });

  test('a bed so flooded that it finds no rest is called flooded', () => {
    // The feed's velocity, 9 m/s, is some five times what floods this packing.
    const tree = put(put(acetone(), 'column/diameter', '0.4 m'), 'gas/range', undefined);
    const { code, err } = check(JSON.stringify(tree));
    expect(code).toBe(2);
    expect(err).toMatch(/column\.beds\[0\]: expected a bed that does not flood/);
  });

  test('an unusual plant runs, with warnings: nearly flooded, too wide, too little liquid', () => {
    const narrow = check(changed('column/diameter', '0.71 m'));
    expect([narrow.code, narrow.err]).toEqual([0, '']);
    expect(narrow.out).toMatch(/warning: column\.diameter: expected gas below 85 % of the flooding velocity, received/);
    const wide = check(changed('column/diameter', '1.6 m'));
    expect(wide.code).toBe(0);
    expect(wide.out).toMatch(/warning: column\.diameter: expected gas above 20 % .* - wide for its gas/);
    expect(wide.out).toMatch(
      /warning: column\.beds\[0\]: expected liquid of at least .* - more liquid, or a smaller diameter/,
    );
  });
});
