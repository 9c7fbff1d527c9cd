import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { createDenseSolver } from '../../sim/numerics/dense-lu.ts';
import { createSparseSolver } from '../../sim/numerics/sparse-lu.ts';
import { createPatternBuilder, densePattern, entryIndex } from '../../sim/numerics/sparse-pattern.ts';
import type { SparsePattern } from '../../sim/numerics/sparse-pattern.ts';

function product(pattern: SparsePattern, values: Float64Array, x: Float64Array): Float64Array {
  const { n, rowStart, column } = pattern;
  const out = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    for (let e = rowStart[i]!; e < rowStart[i + 1]!; e++) out[i]! += values[e]! * x[column[e]!]!;
  }
  return out;
}

/** -J row by row: diagonally dominant, so that elimination without row exchanges is stable [Higham2002, section 9.5]. */
function dominant(pattern: SparsePattern, entry: (e: number) => number): Float64Array {
  const { n, rowStart, column } = pattern;
  const values = new Float64Array(column.length);
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let e = rowStart[i]!; e < rowStart[i + 1]!; e++) {
      if (column[e] === i) continue;
      values[e] = entry(e);
      sum += Math.abs(values[e]!);
    }
    values[entryIndex(pattern, i, i)] = -(sum + 1);
  }
  return values;
}

/** Blocks along the diagonal with two neighbours each way, bordered by full rows and columns. */
function borderedBand(blocks: number, size: number, border: number): SparsePattern {
  const inner = blocks * size;
  const builder = createPatternBuilder(inner + border);
  for (let i = 0; i < inner; i++) {
    for (let j = 0; j < inner; j++) {
      if (Math.abs(Math.floor(i / size) - Math.floor(j / size)) <= 2) builder.add(i, j);
    }
  }
  for (let b = inner; b < inner + border; b++) {
    for (let j = 0; j < inner + border; j++) {
      builder.add(b, j);
      builder.add(j, b);
    }
  }
  return builder.build();
}

describe('pattern', () => {
  test('columns ascend, the diagonal is there unasked, and entries are found again', () => {
    const builder = createPatternBuilder(3);
    builder.add(0, 2);
    builder.add(2, 1);
    builder.add(2, 0);
    builder.add(2, 0);
    const pattern = builder.build();
    expect([...pattern.rowStart]).toEqual([0, 2, 3, 6]);
    expect([...pattern.column]).toEqual([0, 2, 1, 0, 1, 2]);
    expect(entryIndex(pattern, 2, 1)).toBe(4);
    expect(entryIndex(pattern, 0, 1)).toBe(-1);
  });

  test('an entry outside the matrix is refused', () => {
    expect(() => createPatternBuilder(2).add(0, 2)).toThrow();
    expect(() => createPatternBuilder(2).add(2, 0)).toThrow();
  });
});

describe.each([
  ['sparse', createSparseSolver],
  ['dense', (p: SparsePattern, m?: Float64Array) => createDenseSolver(p.n, p, m)],
] as const)('%s solver', (_, create) => {
  test('a 3 x 3 system solved by hand', () => {
    // W = 2 I - J = [[4, 1, 0], [1, 3, 1], [0, 1, 2]]; W (1, 2, 3) = (6, 10, 8).
    const pattern = densePattern(3);
    const solver = create(pattern);
    expect(solver.factor(2, Float64Array.from([-2, -1, 0, -1, -1, -1, 0, -1, 0]))).toBe(true);
    const b = Float64Array.from([6, 10, 8]);
    solver.solve(b);
    // Condition number about 3: a few roundings.
    [1, 2, 3].forEach((x, i) => expect(Math.abs(b[i]! - x)).toBeLessThan(1e-14));
  });

  test('a row of mass zero is an algebraic equation', () => {
    // k1 = g, with g = 3 - k1 posed as 0 = k1 + g - 3: J = [[0, 1], [1, 1]], b = (1, -3) with shift 1.
    const pattern = densePattern(2);
    const solver = create(pattern, Float64Array.from([1, 0]));
    expect(solver.factor(1, Float64Array.from([0, 1, 1, 1]))).toBe(true);
    const b = Float64Array.from([1, -3]);
    solver.solve(b); // k - g = 1, -k - g = -3
    expect(b[0]).toBeCloseTo(2, 14); // exact in two roundings
    expect(b[1]).toBeCloseTo(1, 14);
  });

  test('a singular matrix, NaN and infinity are refused', () => {
    const pattern = densePattern(2);
    const solver = create(pattern);
    expect(solver.factor(0, Float64Array.from([3, 1, 1, 1 / 3]))).toBe(false);
    expect(solver.factor(1, Float64Array.from([1, 0, 0, 0]))).toBe(false);
    expect(solver.factor(1, Float64Array.from([Number.NaN, 0, 0, 0]))).toBe(false);
    expect(solver.factor(1, Float64Array.from([Infinity, 0, 0, 0]))).toBe(false);
    expect(solver.factor(1, Float64Array.from([0, 0, 0, 0]))).toBe(true);
  });

  test('rows in units twenty decades apart are not mistaken for singular', () => {
    const pattern = densePattern(2);
    const solver = create(pattern);
    expect(solver.factor(0, Float64Array.from([-1e-12, 1e8, 1e-13, -1e-12]))).toBe(true);
  });
});

describe('sparse solver against what it replaces', () => {
  test('any pattern, diagonally dominant: the residual is at rounding level', () => {
    const cases = fc.record({
      n: fc.integer({ min: 1, max: 40 }),
      entries: fc.array(fc.tuple(fc.nat(39), fc.nat(39)), { maxLength: 160 }),
      seed: fc.integer({ min: 1, max: 1000 }),
    });
    fc.assert(
      fc.property(cases, ({ n, entries, seed }) => {
        const builder = createPatternBuilder(n);
        for (const [i, j] of entries) if (i < n && j < n) builder.add(i, j);
        const pattern = builder.build();
        const jacobian = dominant(pattern, (e) => Math.sin(seed * (e + 1)));
        const x = Float64Array.from({ length: n }, (__, i) => Math.cos(seed + i));
        const solver = createSparseSolver(pattern);
        const b = product(pattern, jacobian, x).map((v, i) => 0.5 * x[i]! - v);
        if (!solver.factor(0.5, jacobian)) return false;
        solver.solve(b);
        // Condition number below 2 * 40 in the maximum norm; 40 unknowns, 2^-52 each.
        return x.every((v, i) => Math.abs(v - b[i]!) < 1e-12);
      }),
      { seed: 7, numRuns: 300 },
    );
  });

  test('the bordered band of a long bed agrees with row exchanges', () => {
    const pattern = borderedBand(12, 7, 9);
    const jacobian = dominant(pattern, (e) => Math.sin(e * e));
    const mass = Float64Array.from({ length: pattern.n }, (_, i) => (i % 7 === 6 ? 0 : 1));
    const sparse = createSparseSolver(pattern, mass);
    const dense = createDenseSolver(pattern.n, pattern, mass);
    for (const shift of [1e-3, 1, 1e6]) {
      const a = Float64Array.from({ length: pattern.n }, (_, i) => Math.cos(3 * i));
      const b = a.slice();
      expect(sparse.factor(shift, jacobian) && dense.factor(shift, jacobian)).toBe(true);
      sparse.solve(a);
      dense.solve(b);
      // Both at rounding level for a dominant matrix.
      a.forEach((v, i) => expect(Math.abs(v - b[i]!)).toBeLessThan(1e-13));
    }
  });

  test('factoring twice leaves no trace of the first', () => {
    const pattern = borderedBand(4, 3, 2);
    const first = dominant(pattern, (e) => Math.sin(e));
    const second = dominant(pattern, (e) => Math.cos(e));
    const used = createSparseSolver(pattern);
    used.factor(1, first);
    used.factor(2, second);
    const fresh = createSparseSolver(pattern);
    fresh.factor(2, second);
    const a = new Float64Array(pattern.n).fill(1);
    const b = a.slice();
    used.solve(a);
    fresh.solve(b);
    expect(a).toEqual(b);
  });
});
