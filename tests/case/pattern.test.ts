import fc from 'fast-check';
import { expect, test } from 'vitest';

import { quantityPattern } from '../../sim/case/schema/pattern.ts';
import type { Kind } from '../../sim/units.ts';
import { KINDS, formatQuantity, formatTime, unitsOf } from '../../sim/units.ts';

const KIND_NAMES = Object.keys(KINDS) as Kind[];

test('the pattern that editors use takes every quantity the program writes', () => {
  const use = fc
    .constantFrom(...KIND_NAMES)
    .chain((kind) => fc.record({ kind: fc.constant(kind), unit: fc.constantFrom(...unitsOf(kind)) }));
  fc.assert(
    fc.property(use, fc.double({ min: 1e-9, max: 1e12, noNaN: true }), ({ kind, unit }, value) => {
      expect(formatQuantity(value, kind, unit)).toMatch(new RegExp(quantityPattern(kind)));
    }),
    { numRuns: 500 },
  );
});

test('it takes other spellings and refuses other kinds', () => {
  expect('15 °C').toMatch(new RegExp(quantityPattern('temperature')));
  expect('3870 Nm³/h').toMatch(new RegExp(quantityPattern('molar-flow')));
  expect('1:05:00').toMatch(new RegExp(quantityPattern('time')));
  expect(formatTime(3725)).toMatch(new RegExp(quantityPattern('time')));
  expect('6 kg').not.toMatch(new RegExp(quantityPattern('length')));
  expect('101 kPa').not.toMatch(new RegExp(quantityPattern('absolute-pressure')));
});
