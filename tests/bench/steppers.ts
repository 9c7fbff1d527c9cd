/**
 * Work to reach a given error at the end of the published stiff problems, method by method. Work is counted, not timed, in
 * right-hand sides, so that the table is the same on every machine.
 */

import type { StepperStats } from '../../sim/numerics/ivp/stepper.ts';
import { stiffProblems } from '../support/problems.ts';
import type { TestProblem } from '../support/problems.ts';
import { endError, solveProblem, steppers } from '../support/steppers.ts';
import type { NamedStepper } from '../support/steppers.ts';

/** Costs in right-hand sides: about what they are for a bed of 40 segments (Jacobian 6 to 9; the others timed). */
const COST = { jacobian: 7, factorisation: 2, solve: 0.25 };
const TARGETS = [1e-3, 1e-5, 1e-7];
const TOLERANCES = [1e-2, 1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-9];

function work(stats: Readonly<StepperStats>): number {
  return (
    stats.rightHandSides +
    COST.jacobian * stats.jacobians +
    COST.factorisation * stats.factorisations +
    COST.solve * stats.solves
  );
}

interface Run {
  readonly error: number;
  readonly stats: Readonly<StepperStats>;
}

function runs(method: NamedStepper, problem: TestProblem): Run[] {
  return TOLERANCES.flatMap((rtol) => {
    const { stepper, outcome } = solveProblem(method, problem, rtol);
    return outcome.kind === 'failed' ? [] : [{ error: endError(problem, stepper.y), stats: stepper.stats }];
  });
}

/** Interpolates log(value) over log(error); undefined where the runs do not reach the target. */
function atError(found: readonly Run[], target: number, value: (run: Run) => number): number | undefined {
  for (let k = 1; k < found.length; k++) {
    const [looser, tighter] = [found[k - 1]!, found[k]!];
    if (looser.error < target || tighter.error > target) continue;
    const share = Math.log(looser.error / target) / Math.log(looser.error / tighter.error);
    return Math.exp((1 - share) * Math.log(value(looser)) + share * Math.log(value(tighter)));
  }
  // Already better at the loosest tolerance: that is what it costs.
  return found[0] !== undefined && found[0].error <= target ? value(found[0]) : undefined;
}

const geometricMean = (values: readonly number[]): number =>
  Math.exp(values.reduce((sum, x) => sum + Math.log(x), 0) / values.length);

/** The table as text: for each target error the geometric means over the problems. */
export function stepperTable(): string {
  const lines = [
    `Geometric means over ${stiffProblems.length} problems at equal end error; work = f + ${COST.jacobian} J + ${COST.factorisation} LU + ${COST.solve} solves`,
    ['method'.padEnd(20), ...TARGETS.map((t) => `error ${t.toExponential(0)}: f/J/LU  work`.padEnd(36))].join(' '),
  ];
  for (const method of steppers) {
    const all = stiffProblems.map((problem) => runs(method, problem));
    const cells = TARGETS.map((target) => {
      const mean = (value: (run: Run) => number): string => {
        const values = all.map((found) => atError(found, target, value)).filter((x) => x !== undefined);
        const missing = all.length - values.length;
        return values.length === 0
          ? '-'
          : geometricMean(values).toFixed(0) + (missing > 0 ? `(${missing} missed)` : '');
      };
      const counts = [
        mean(({ stats }) => stats.rightHandSides),
        mean(({ stats }) => stats.jacobians),
        mean(({ stats }) => stats.factorisations),
      ];
      return `${counts.join('/').padEnd(26)}${mean(({ stats }) => work(stats))}`.padEnd(36);
    });
    lines.push([method.name.padEnd(20), ...cells].join(' '));
  }
  return lines.join('\n');
}
