import fc from 'fast-check';
import { expect, test } from 'vitest';
import { bracketedRoot } from '../../sim/numerics/bracketed-root.ts';

test('roots known in closed form are bracketed within the tolerance, in few evaluations', () => {
  const cases: [(x: number) => number, number, number, number][] = [
    [(x) => x * x - 2, 0, 2, Math.SQRT2],
    [(x) => Math.cos(x) - x, 0, 1, 0.7390851332151607], // Dottie number, OEIS A003957
    [(x) => Math.exp(-x) - 1e-8, 0, 100, 8 * Math.LN10],
    [(x) => (x - 1) ** 9, 0, 5, 1],
    [(x) => Math.atan(1e6 * (x - 0.123)), -1, 1, 0.123],
  ];
  for (const [f, a, b, root] of cases) {
    let evaluations = 0;
    const g = (x: number): number => {
      evaluations += 1;
      return f(x);
    };
    const { before, after } = bracketedRoot(g, a, b, f(a), f(b), 1e-12);
    // A ninth power is below the smallest number within 1e-36 of its root only: the bracket is real there too.
    expect(Math.abs(after - before)).toBeLessThanOrEqual(1e-12);
    expect(before - 1e-15).toBeLessThanOrEqual(root);
    expect(after + 1e-15).toBeGreaterThanOrEqual(root);
    // Bisection: log2(width/1e-12); one more is promised, and two to look around an exact zero.
    expect(evaluations).toBeLessThanOrEqual(Math.ceil(Math.log2((b - a) / 1e-12)) + 3);
  }
});

test('a smooth root takes far fewer evaluations than bisection', () => {
  let evaluations = 0;
  const g = (x: number): number => {
    evaluations += 1;
    return Math.exp(x) - 2;
  };
  bracketedRoot(g, 0, 2, -1, Math.exp(2) - 2, 1e-12);
  expect(evaluations).toBeLessThan(15); // bisection: 41
});

test('any change of sign is kept inside, whatever the function', () => {
  fc.assert(
    fc.property(
      fc.double({ min: -5, max: 5, noNaN: true }),
      fc.double({ min: 0.01, max: 20, noNaN: true }),
      fc.boolean(),
      (root, steepness, falling) => {
        const sign = falling ? -1 : 1;
        const g = (x: number): number => sign * (Math.tanh(steepness * (x - root)) + 0.1 * (x < root ? -1 : 1));
        const { before, after } = bracketedRoot(g, -6, 6, g(-6), g(6), 1e-9);
        return before <= root && root <= after && after - before <= 1e-9;
      },
    ),
    { seed: 3, numRuns: 500 },
  );
});

test('an exact zero counts as crossed, and the bracket may run backwards', () => {
  const { before, after } = bracketedRoot((x) => x, 4, -4, 4, -4, 1e-6);
  expect(before).toBeGreaterThan(0);
  expect(after).toBeLessThanOrEqual(0);
  expect(bracketedRoot((x) => x - 1, 0, 1, -1, 0, 1e-6).after).toBe(1);
});

test('ends of one sign are refused', () => {
  expect(() => bracketedRoot((x) => x, 1, 2, 1, 2, 1e-6)).toThrow();
});
