/** What the parts of a step cost on the demo plant, and how they compare with one right-hand side. */

import { demoCase, scenarioOf } from './demo-runs.ts';
import { createRun } from '../../sim/run/simulate.ts';

/** The moment that is measured: the wetting front runs down the bed after the late restart. */
const SCENARIO = 'three-upsets';
const MOMENT = 2463;

/** Microseconds a call: the best of five rounds, so that a neighbour's work counts least. */
function microseconds(calls: number, work: () => void): number {
  let best = Infinity;
  for (let round = 0; round < 5; round++) {
    const started = performance.now();
    for (let i = 0; i < calls; i++) work();
    best = Math.min(best, ((performance.now() - started) / calls) * 1000);
  }
  return best;
}

/** The table as text. */
export function partsTable(): string {
  const plant = demoCase('acetone-absorber');
  const run = createRun(plant, scenarioOf(plant, SCENARIO));
  run.advance(MOMENT);
  const { column, state, time } = run;
  const y = Float64Array.from(state);
  const rates = new Float64Array(column.size);
  const jacobian = new Float64Array(column.pattern.column.length);
  const solver = column.createSolver();
  const right = new Float64Array(solver.n);
  const row = new Float64Array(run.recorder.observer.quantities.length);
  const rhs = microseconds(1000, () => column.rhs(time, y, rates));
  const parts: [string, number][] = [
    ['right-hand side', rhs],
    ['Jacobian', microseconds(200, () => column.jacobian(time, y, jacobian))],
    ['factorisation', microseconds(400, () => solver.factor(10, jacobian))],
    ['solve', microseconds(2000, () => solver.solve(right.fill(1)))],
    ['row of the record', microseconds(1000, () => run.recorder.observer.observe(time, y, row))],
  ];
  const before = run.stats.steps;
  const started = performance.now();
  run.advance(MOMENT + 200);
  const step = ((performance.now() - started) / (run.stats.steps - before)) * 1000;
  parts.push(['whole step, its rows and events', step]);
  return [
    `Parts of a step, ${column.size} states, ${solver.n} unknowns in the linear systems`,
    ...parts.map(
      ([name, cost]) =>
        `  ${name.padEnd(34)}${cost.toFixed(1).padStart(8)} us${(cost / rhs).toFixed(2).padStart(9)} right-hand sides`,
    ),
  ].join('\n');
}
