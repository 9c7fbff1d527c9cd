import { expect, test } from 'vitest';
import { createRun } from '../../sim/run/simulate.ts';
import { acetone, mustRead, put } from '../case/support.ts';

// A pressure drop that is a large share of the pressure ties gas flow and pressure together; the search for the steady
// state must take it in long steps all the same. The outlet of a tall bed with absorption factor 2 comes to equilibrium
// with the entering water, which is clean.

test.each([
  ['20 m', '101.325 kPa(a)', '48 mol/s'],
  ['10 m', '5 kPa(a)', '12 mol/s'],
])('a bed of %s at %s is steady, and clean at its outlet', (height, pressure, rate) => {
  const tree = acetone();
  put(tree, 'column/beds', [{ packing: 'PR-MET-35', height, segments: 12 }]);
  put(tree, 'column/shellHeight', undefined);
  put(tree, 'column/topPressure', pressure);
  put(tree, 'gas/feed/rate', rate);
  put(tree, 'gas/range', undefined);
  put(tree, 'gas/feed/humidity', '0 %');
  const plant = mustRead(JSON.stringify(tree));
  const run = createRun(plant, plant.scenarios[0]!);
  run.advance(20);
  expect(run.outcome.kind).toBe('running');
  const { observer, rows } = run.recorder;
  const drop = rows[0]![observer.indexOf('bed-dp')]!;
  expect(drop / plant.column.topPressure).toBeGreaterThan(0.08);
  expect(rows[0]![observer.indexOf('gas-outlet.acetone')]!).toBeLessThan(0.01 * plant.gas.feed.composition[0]!);
  expect(run.stats.steps).toBeLessThan(100); // it stands still: seconds each, not milliseconds
});
