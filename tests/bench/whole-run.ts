/** The two-hour run with three upsets: error and time by tolerance, and the explicit integrator on the same run. */

import { secondOpinionOf } from '../../sim/run/second-opinion.ts';
import { curveError, demoCase, outletCurve, referenceCurve, timedRun } from './demo-runs.ts';

const SCENARIO = 'three-upsets';
const TOLERANCES = [1e-3, 5e-4, 2.5e-4, 1e-4, 1e-5];
/** Tolerance that keeps the outlet within 1e-3 of its peak; the table shows whether it still does. */
const CHOSEN = 2.5e-4;
/** The explicit integrator is off by more than a tenth of a temperature's span when it is asked for less. */
const EXPLICIT = 1e-5;
const ROUNDS = 3;

/** The table as text. */
export function wholeRunTable(): string {
  const plant = demoCase('acetone-absorber');
  const reference = referenceCurve(plant, SCENARIO);
  const lines = [
    `${SCENARIO}, N = ${plant.column.beds[0]!.segments}: error of the outlet over its peak against 1e-9; best of ${ROUNDS}`,
  ];
  let chosen = Infinity;
  for (const rtol of TOLERANCES) {
    const error = curveError(outletCurve(timedRun(plant, SCENARIO, 'rodas4', rtol, 1).run), reference);
    const runs = Array.from({ length: ROUNDS }, () => timedRun(plant, SCENARIO, 'rodas4', rtol));
    const wall = Math.min(...runs.map((r) => r.wall));
    const { steps, rejected, rightHandSides } = runs[0]!.run.stats;
    if (rtol === CHOSEN) chosen = wall;
    lines.push(
      `  rodas4 ${String(rtol).padEnd(8)} error ${error.toExponential(1)}  ${wall.toFixed(2)} s  ${steps} steps, ${rejected} tried again, ${rightHandSides} right-hand sides`,
    );
  }
  const memory = process.memoryUsage().rss / 1e6;
  const { run } = timedRun(plant, SCENARIO, 'rodas4', EXPLICIT, 60);
  const started = performance.now();
  const other = secondOpinionOf(run);
  const explicit = (performance.now() - started) / 1000;
  lines.push(
    `  odex   ${String(EXPLICIT).padEnd(8)} ${explicit.toFixed(1)} s, ${other.rightHandSides} right-hand sides, ${(explicit / chosen).toFixed(0)} times rodas4 at ${CHOSEN}`,
    `  memory of the process after these runs, before odex: ${memory.toFixed(0)} MB`,
  );
  return lines.join('\n');
}
