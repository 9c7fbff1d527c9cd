import { expect, test } from 'vitest';

import type { Case } from '../../sim/case/case.ts';
import { convergenceOf } from '../../sim/run/convergence.ts';
import { createRun } from '../../sim/run/simulate.ts';
import { steadyScenario } from '../../sim/run/steady-answers.ts';
import { gasLeft } from '../../sim/transfer/transfer-units.ts';
import { caseText, mustRead } from '../case/support.ts';
import { outletLimit } from './support.ts';

test('with well-mixed segments, first order, N and 2 N differ by half the error at N', () => {
  const shipped = mustRead(caseText('constant-coefficients'));
  const beds = shipped.column.beds.map((bed) => ({ ...bed, segments: 80 }));
  const plant: Case = {
    ...shipped,
    limits: [outletLimit(1)],
    column: { ...shipped.column, beds },
    run: { ...shipped.run, axialScheme: 'well-mixed' },
  };
  const run = createRun(plant, steadyScenario(plant));
  run.advance(1);
  const { segments, headline } = convergenceOf(run);
  expect(segments).toEqual([80, 160]);
  const { valueN, value2N, difference } = headline.find(({ id }) => id === 'outlet.initial')!;
  // [Colburn1939], NOG 5 and absorption factor 1.3 as the case states, feed 1 ppmv.
  const exact = 1e-6 * gasLeft(5, 1.3);
  const error = valueN! / exact - 1;
  expect(difference).toBeCloseTo(valueN! / value2N! - 1, 12); // its own definition
  expect(error).toBeGreaterThan(0.01); // there is an error to estimate
  // 0.05: the terms of second order at 80 segments.
  expect(Math.abs(difference! / error - 0.5)).toBeLessThan(0.05);
});
