import { describe, expect, test } from 'vitest';
import { resolveOptions } from '../../../sim/numerics/ivp/options.ts';
import type { IvpProblem } from '../../../sim/numerics/ivp/problem.ts';
import type { StepFailure, Stepper } from '../../../sim/numerics/ivp/stepper.ts';
import { densePattern } from '../../../sim/numerics/sparse-pattern.ts';
import { circle, oregonator } from '../../support/problems.ts';
import { runTo, steppers } from '../../support/steppers.ts';

/** One state, y' = f(y). */
function scalar(f: (y: number) => number, slope: (y: number) => number): IvpProblem {
  return {
    size: 1,
    pattern: densePattern(1),
    rhs(_t, y, dydt) {
      dydt[0] = f(y[0]!);
    },
    jacobian(_t, y, v) {
      v[0] = slope(y[0]!);
    },
  };
}

function failureOf(stepper: Stepper, tStop: number): StepFailure {
  const outcome = runTo(stepper, tStop);
  if (outcome.kind !== 'failed') throw new Error(`expected a failure, got ${outcome.kind}`);
  return outcome.failure;
}

describe.each(steppers)('$name', (method) => {
  test('a solution that blows up stops just before the pole, with its last good state', () => {
    // y' = y^2, y(0) = 1: y = 1/(1 - t).
    const stepper = method.create(
      scalar(
        (y) => y * y,
        (y) => 2 * y,
      ),
      { rtol: 1e-6, atol: 1e-9 },
    );
    stepper.start(0, Float64Array.of(1));
    const failure = failureOf(stepper, 2);
    expect(['step-size-underflow', 'not-finite', 'newton-diverged']).toContain(failure.kind);
    expect(failure.t).toBe(stepper.t);
    // Relative errors of 1e-6 and less in y move the pole by as much; seen: up to 3e-4 with TR-BDF2.
    expect(Math.abs(stepper.t - 1)).toBeLessThan(1e-3);
    expect(stepper.y[0]).toBeGreaterThan(1e6);
    expect(Number.isFinite(stepper.y[0])).toBe(true);
  });

  test('NaN from some point on ends the run there and names the component', () => {
    const problem: IvpProblem = {
      size: 2,
      pattern: densePattern(2),
      rhs(_t, y, f) {
        f[0] = 1;
        f[1] = y[0]! < 0.5 ? 1 : Number.NaN;
      },
      jacobian: (_t, _y, v) => v.fill(0),
    };
    const stepper = method.create(problem, { rtol: 1e-6, atol: 1e-9 });
    stepper.start(0, Float64Array.of(0, 0));
    const failure = failureOf(stepper, 1);
    expect(failure.kind).toBe('not-finite');
    expect(failure.component).toBe(1);
    // Retreats of a quarter each come close to the wall; the end of a step itself need not have been tried.
    expect(Math.abs(stepper.t - 0.5)).toBeLessThan(1e-4);
    expect(Math.abs(stepper.y[0]! - stepper.t)).toBeLessThan(1e-12);
  });

  test('a stage that leaves the domain of f costs steps, not the run', () => {
    // Logistic growth, y = 1/(1 + 99 exp(-t)), undefined outside [0, 1.001], tried with a step of twenty time constants.
    let undefinedSlopes = 0;
    const growth = (y: number): number => {
      if (y >= 0 && y <= 1.001) return y * (1 - y);
      undefinedSlopes += 1;
      return Number.NaN;
    };
    const problem = scalar(growth, (y) => 1 - 2 * y);
    const stepper = method.create(problem, { rtol: 1e-6, atol: 1e-10 });
    stepper.start(0, Float64Array.of(0.01), 20);
    let worst = 0;
    while (stepper.t < 25) {
      expect(stepper.step(25).kind).not.toBe('failed');
      worst = Math.max(worst, Math.abs(stepper.y[0]! - 1 / (1 + 99 * Math.exp(-stepper.t))));
    }
    expect(undefinedSlopes).toBeGreaterThan(0);
    // The error is carried along by the growth: 100 tolerances to the method's power.
    expect(worst).toBeLessThan(100 * 1e-6 ** method.tolerancePower);
  });

  test('a number of steps that is not enough is said so', () => {
    const stepper = method.create(oregonator.problem, { rtol: 1e-6, atol: 1e-6, maxSteps: 20 });
    stepper.start(0, Float64Array.from(oregonator.start));
    const failure = failureOf(stepper, 360);
    expect(failure.kind).toBe('work-limit');
    expect(stepper.stats.steps + stepper.stats.rejected).toBe(20);
    expect(stepper.t).toBeLessThan(360);
    expect(failure.t).toBe(stepper.t);
  });

  test('a Jacobian that cannot be factored is said so', () => {
    const stepper = method.create(
      scalar(
        (y) => -y,
        () => Number.NaN,
      ),
    );
    stepper.start(1, Float64Array.of(1));
    const failure = failureOf(stepper, 2);
    expect(failure.kind).toBe('singular-matrix');
    expect([...stepper.y]).toEqual([1]);
    expect(stepper.t).toBe(1);
  });

  test('a run can go on after a failure when the cause is gone', () => {
    let broken = true;
    const problem: IvpProblem = {
      ...circle,
      rhs(t, y, f) {
        circle.rhs(t, y, f);
        if (broken && t > 0.5) f[0] = Number.NaN;
      },
    };
    const stepper = method.create(problem, { rtol: 1e-6, atol: 1e-6 });
    stepper.start(0, Float64Array.of(1, 0));
    const failure = failureOf(stepper, 1);
    broken = false;
    stepper.start(failure.t, stepper.y.slice());
    expect(runTo(stepper, 1).kind).toBe('reached-stop');
    expect(Math.abs(stepper.y[0]! - Math.cos(1))).toBeLessThan(1e-3); // TR-BDF2: 1e-6^(2/3), the others less
  });
});

test('Newton that cannot converge is said so', () => {
  // The slope is wrong by more than 1/h at every h that t = 1 resolves.
  for (const method of steppers.filter(({ name }) => /ESDIRK|BDF/.test(name))) {
    const stepper = method.create(
      scalar(
        (y) => -1e18 * Math.sin(1e3 * y),
        () => 1e3,
      ),
    );
    stepper.start(1, Float64Array.of(1), 0.1);
    const failure = failureOf(stepper, 2);
    expect(failure.kind).toBe('newton-diverged');
    expect(stepper.t).toBe(1);
  }
});

test('options that make no sense are refused', () => {
  expect(() => resolveOptions({ rtol: -1 }, 2)).toThrow();
  expect(() => resolveOptions({ rtol: 0, atol: 0 }, 2)).toThrow();
  expect(() => resolveOptions({ atol: [1] }, 2)).toThrow();
  expect(() => resolveOptions({ maxStep: 0 }, 2)).toThrow();
  expect(() => resolveOptions({ maxSteps: 0 }, 2)).toThrow();
  expect(() => resolveOptions({ initialStep: Number.NaN }, 2)).toThrow();
  expect([...resolveOptions({ rtol: [1e-3, 0], atol: 1e-6 }, 2).rtol]).toEqual([1e-3, 0]);
});

test('a saved state of another method or problem is refused', () => {
  const [first, second] = [steppers[0]!.create(circle), steppers[7]!.create(circle)];
  first.start(0, Float64Array.of(1, 0));
  first.step(1);
  expect(() => second.restore(first.save())).toThrow();
  const other = steppers[0]!.create(oregonator.problem);
  expect(() => other.restore(first.save())).toThrow();
});
