/** Families of integrators on demo upsets: error of the outlet against work and time, method by method. */

import { METHODS } from '../../sim/run/integrators.ts';
import { curveError, demoCase, outletCurve, referenceCurve, timedRun } from './demo-runs.ts';

const UPSETS = [
  ['acetone-absorber', 'feed-spike'],
  ['acetone-absorber', 'pump-trip'],
  ['acetone-absorber', 'load-up'],
  ['acetone-absorber', 'cold-dry-start'],
  ['chloroform-stripper', 'surge'],
] as const;
const TOLERANCES = [1e-3, 1e-4, 1e-5, 1e-6];

/** The table as text. */
export function methodsTable(): string {
  const lines: string[] = [];
  for (const [name, id] of UPSETS) {
    const plant = demoCase(name);
    const reference = referenceCurve(plant, id);
    lines.push(`${name}, ${id}: error over the peak / right-hand sides / Jacobians / factorisations / s`);
    for (const method of METHODS) {
      const cells = TOLERANCES.map((rtol) => {
        try {
          const { run, wall } = timedRun(plant, id, method, rtol, 1);
          const { rightHandSides, jacobians, factorisations } = run.stats;
          const error = curveError(outletCurve(run), reference).toExponential(1);
          return `${error} ${rightHandSides}/${jacobians}/${factorisations} ${wall.toFixed(2)}`.padEnd(32);
        } catch {
          return 'failed'.padEnd(32);
        }
      });
      lines.push(`  ${method.padEnd(14)}${cells.join('')}`);
    }
  }
  return lines.join('\n');
}
