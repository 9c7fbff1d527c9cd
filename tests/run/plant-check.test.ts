import { expect, test } from 'vitest';

import { checkPlant } from '../../sim/run/plant-check.ts';
import { caseText, changed, mustRead } from '../case/support.ts';

const found = (text: string): string[] => checkPlant(mustRead(text)).map((i) => `${i.severity} ${i.path}`);

test('the shipped absorber can run', () => {
  expect(found(caseText('acetone-absorber'))).toEqual([]);
});

test('a column that is too narrow floods at its design point: an error that names the bed', () => {
  // 0.6 m instead of 0.82 m: the gas velocity, 60 % of flooding at 0.82 m, rises by (0.82/0.6)^2 = 1.87.
  expect(found(changed('column/diameter', '0.6 m'))).toContain('error column.beds[0]');
});

test('a column that is too wide wets badly: warnings', () => {
  // 1.6 m: liquid velocity and gas velocity fall by (0.82/1.6)^2 = 0.26; the liquid was 1.47 times what wets.
  expect(found(changed('column/diameter', '1.6 m'))).toEqual(
    expect.arrayContaining(['warning column.diameter', 'warning column.beds[0]']),
  );
});

test('a limit that normal running breaks is a warning', () => {
  expect(found(changed('limits/bed-dp/max', '2 kPa'))).toEqual(['warning limits.bed-dp']);
});
