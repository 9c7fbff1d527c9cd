import { expect, test } from 'vitest';
import { integrateExplicit } from '../../../sim/numerics/ivp/second-opinion.ts';
import { bell, circle, hires, pollution } from '../../support/problems.ts';
import { endError } from '../../support/steppers.ts';

test('agrees with closed solutions to its tolerance', () => {
  const times = [0.5, 1, Math.PI, 6];
  const result = integrateExplicit(circle, 0, Float64Array.of(1, 0), 6, {
    rtol: 1e-9,
    atol: 1e-9,
    outputTimes: times,
  });
  expect(result.ok).toBe(true);
  expect(result.t).toBe(6);
  expect(result.times).toEqual(times);
  result.y.forEach(([x, y], k) => {
    expect(Math.abs(x! - Math.cos(times[k]!))).toBeLessThan(1e-7); // 100 tolerances over the run
    expect(Math.abs(y! - Math.sin(times[k]!))).toBeLessThan(1e-7);
  });
});

test('the end is reached also when no output is asked for there', () => {
  const result = integrateExplicit(bell, 0, [1], 3, { rtol: 1e-8, atol: 1e-8, outputTimes: [1] });
  expect(result.times).toEqual([1]);
  expect(result.t).toBe(3);
  expect(Math.abs(result.yEnd[0]! - 0.1)).toBeLessThan(1e-6);
});

test('stiff problems come out right, at a price', () => {
  const result = integrateExplicit(hires.problem, 0, hires.start, hires.end, { rtol: 1e-7, atol: 1e-11 });
  expect(result.ok).toBe(true);
  expect(endError(hires, result.yEnd)).toBeLessThan(1e-5); // 100 tolerances
  expect(result.rightHandSides).toBeGreaterThan(10_000); // an implicit method: some 1 000
});

test('a stiff problem that it cannot afford ends at the work limit, with the time it reached', () => {
  const result = integrateExplicit(pollution.problem, 0, pollution.start, pollution.end, {
    rtol: 1e-4,
    atol: 1e-7,
    maxRightHandSides: 5_000,
  });
  expect(result.ok).toBe(false);
  expect(result.failure?.kind).toBe('work-limit');
  expect(result.rightHandSides).toBe(5_000);
  expect(result.t).toBeLessThan(60);
  expect(result.failure?.t).toBe(result.t);
  expect(result.yEnd.every(Number.isFinite)).toBe(true);
});

test('NaN is found at once and placed', () => {
  const problem = {
    size: 2,
    rhs(_t: number, y: Float64Array, f: Float64Array): void {
      f[0] = 1;
      f[1] = y[0]! < 0.5 ? 0 : Number.NaN;
    },
  };
  const result = integrateExplicit(problem, 0, [0, 7], 1);
  expect(result.ok).toBe(false);
  expect(result.failure).toMatchObject({ kind: 'not-finite', component: 1 });
  expect(result.t).toBeLessThan(0.5);
  expect(result.t).toBeGreaterThan(0.49); // steps shrink tenfold, eight times
  expect(result.yEnd[1]).toBe(7);
});

test('a solution that blows up does not keep it for ever', () => {
  const problem = {
    size: 1,
    rhs(_t: number, y: Float64Array, f: Float64Array): void {
      f[0] = y[0]! * y[0]!;
    },
  };
  const result = integrateExplicit(problem, 0, [1], 2, { maxRightHandSides: 50_000 });
  expect(result.ok).toBe(false);
  expect(Math.abs(result.t - 1)).toBeLessThan(1e-3); // pole at 1
});

test('an error thrown by f is not swallowed', () => {
  const problem = {
    size: 1,
    rhs(): void {
      throw new TypeError('broken');
    },
  };
  expect(() => integrateExplicit(problem, 0, [1], 1)).toThrow(TypeError);
});
