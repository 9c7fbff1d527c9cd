// Holds our declaration of the package `odex` to what the package does.
import { Outcome, Solver } from 'odex';
import { describe, expect, it } from 'vitest';

/** y' = -y, whose solution is exp(-x). */
const decay = (_x: number, y: number[]): number[] => y.map((value) => -value);

function solver(): Solver {
  const made = new Solver(1);
  made.relativeTolerance = 1e-9;
  made.absoluteTolerance = 1e-12;
  return made;
}

describe('odex', () => {
  it('names its outcomes as declared', () => {
    expect([Outcome.Converged, Outcome.MaxStepsExceeded, Outcome.EarlyReturn]).toEqual([0, 1, 2]);
  });

  it('reaches the end of a decay', () => {
    const solution = solver().solve(decay, 0, [1], 2);
    expect(solution.outcome).toBe(Outcome.Converged);
    // 100 x rtol: the error of a step is held, and errors of some ten steps add up.
    expect(Math.abs((solution.y[0] ?? NaN) / Math.exp(-2) - 1)).toBeLessThan(1e-7);
    expect(solution.nAccept + solution.nReject).toBeLessThanOrEqual(solution.nStep);
    expect(solution.nEval).toBeGreaterThan(solution.nStep);
  });

  it('interpolates inside a step when asked', () => {
    const made = solver();
    made.denseOutput = true;
    let worst = 0;
    let steps = 0;
    made.solve(decay, 0, [1], 2, (_step, xOld, x, _y, dense) => {
      if (typeof dense !== 'function') return undefined;
      steps += 1;
      const middle = (xOld + x) / 2;
      worst = Math.max(worst, Math.abs(dense(0, middle) - Math.exp(-middle)));
      return undefined;
    });
    expect(steps).toBeGreaterThan(1);
    // The interpolant's own error control is ten times looser than the step's; 100 x that.
    expect(worst).toBeLessThan(1e-6);
  });

  it('stops when the observer says so, and still gives the end that was asked for', () => {
    const solution = solver().solve(decay, 0, [1], 2, (_step, _xOld, x) => x < 0.5);
    expect(solution.outcome).toBe(Outcome.EarlyReturn);
    expect(solution.xEnd).toBe(2);
  });

  it('counts its steps against maxSteps', () => {
    const made = solver();
    made.maxSteps = 3;
    expect(made.solve(decay, 0, [1], 2).outcome).toBe(Outcome.MaxStepsExceeded);
  });
});
