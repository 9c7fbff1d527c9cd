import { describe, expect, test } from 'vitest';
import {
  continuousCorrection,
  ESDIRK3,
  ESDIRK4,
  ESDIRK5,
  errorCoefficients,
  TR_BDF2,
} from '../../../sim/numerics/ivp/esdirk-tableau.ts';
import type { EsdirkTableau } from '../../../sim/numerics/ivp/esdirk-tableau.ts';
import { RODAS4, RODAS5P, ROS34PW2 } from '../../../sim/numerics/ivp/rosenbrock-tableau.ts';
import type { RosenbrockTableau } from '../../../sim/numerics/ivp/rosenbrock-tableau.ts';
import { density, elementaryWeights, rootedTrees, splitWeights, treeOrder } from '../../support/rooted-trees.ts';
import type { Tree } from '../../support/rooted-trees.ts';

type Matrix = number[][];

const dot = (a: readonly number[], b: readonly number[]): number => a.reduce((sum, x, i) => sum + x * (b[i] ?? 0), 0);
const sum = (a: readonly number[]): number => a.reduce((total, x) => total + x, 0);
const square = (rows: readonly (readonly number[])[]): Matrix => rows.map((row) => rows.map((_, j) => row[j] ?? 0));
const multiply = (a: Matrix, b: Matrix): Matrix =>
  a.map((row) => b.map((_, j) => sum(row.map((x, k) => x * b[k]![j]!))));
const treesUpTo = (order: number): Tree[] => Array.from({ length: order }, (_, k) => rootedTrees(k + 1)).flat();

/** Inverse of a lower triangular matrix. */
function inverse(lower: Matrix): Matrix {
  const n = lower.length;
  const out = lower.map(() => new Array<number>(n).fill(0));
  for (let j = 0; j < n; j++) {
    for (let i = j; i < n; i++) {
      let rest = i === j ? 1 : 0;
      for (let k = j; k < i; k++) rest -= lower[i]![k]! * out[k]![j]!;
      out[i]![j] = rest / lower[i]![i]!;
    }
  }
  return out;
}

/** |y1/y0| of one step on y' = z y, z = re + i im: stages k_i = (1 + z sum_{j<i} a_ij k_j)/(1 - z a_ii). */
function growth(re: number, im: number, a: Matrix, b: readonly number[]): number {
  const kRe: number[] = [];
  const kIm: number[] = [];
  a.forEach((row, i) => {
    const sRe = dot(row.slice(0, i), kRe);
    const sIm = dot(row.slice(0, i), kIm);
    const upRe = 1 + re * sRe - im * sIm;
    const upIm = re * sIm + im * sRe;
    const downRe = 1 - re * row[i]!;
    const downIm = -im * row[i]!;
    const size = downRe * downRe + downIm * downIm;
    kRe.push((upRe * downRe + upIm * downIm) / size);
    kIm.push((upIm * downRe - upRe * downIm) / size);
  });
  const sRe = dot(b, kRe);
  const sIm = dot(b, kIm);
  return Math.hypot(1 + re * sRe - im * sIm, re * sIm + im * sRe);
}

/** Stable on the imaginary axis and damping far out: with analyticity in the left half-plane (all poles at 1/gamma), L-stable. */
function expectLStable(a: Matrix, b: readonly number[]): void {
  // |R| - 1 is of order y^4 and more near 0: rounding may show there.
  for (let y = 0.01; y < 1e6; y *= 1.1) expect(growth(0, y, a, b)).toBeLessThan(1 + 1e-12);
  // R falls at least like 1/|z|, with a constant below 100.
  for (const z of [1e6, 1e8]) {
    expect(growth(-z, 0, a, b)).toBeLessThan(100 / z);
    expect(growth(0, z, a, b)).toBeLessThan(100 / z);
  }
}

test('the trees are those of the books: 1, 1, 2, 4, 9, 20', () => {
  // [HairerNorsettWanner1993, II.2, table 2.3]
  expect([1, 2, 3, 4, 5, 6].map((order) => rootedTrees(order).length)).toEqual([1, 1, 2, 4, 9, 20]);
});

describe.each([RODAS4, RODAS5P, ROS34PW2])('$name', (tableau: RosenbrockTableau) => {
  // Back to the standard form: Gamma = (I/gamma - C)^-1, alpha = A Gamma, b = m Gamma [HairerWanner1996, IV.7.24].
  const c = square(tableau.c);
  const gamma = inverse(c.map((row, i) => row.map((x, j) => (i === j ? 1 / tableau.gamma : 0) - x)));
  const alpha = multiply(square(tableau.a), gamma);
  const beta = alpha.map((row, i) => row.map((x, j) => x + gamma[i]![j]!));
  const weights = (u: readonly number[]): number[] =>
    gamma.map((_, j) =>
      dot(
        u,
        gamma.map((row) => row[j]!),
      ),
    );
  const b = weights(tableau.m);
  const embedded = weights(tableau.m.map((x, j) => x - tableau.e[j]!));
  // Coefficients have 16 digits and reach 150; the sums cancel: 150 * 8 stages * 1e-16, seen 1e-13.
  const rounding = 5e-13;

  function defect(tree: Tree, w: readonly number[], theta = 1): number {
    return dot(w, elementaryWeights(tree, beta, alpha)) - theta ** treeOrder(tree) / density(tree);
  }

  test('stage times and weights of the time derivative are the row sums', () => {
    alpha.forEach((row, i) => expect(Math.abs(sum(row) - tableau.alpha[i]!)).toBeLessThan(rounding));
    gamma.forEach((row, i) => expect(Math.abs(sum(row) - tableau.d[i]!)).toBeLessThan(rounding));
  });

  test('has its order and no more', () => {
    for (const tree of treesUpTo(tableau.order)) expect(Math.abs(defect(tree, b))).toBeLessThan(rounding);
    const next = rootedTrees(tableau.order + 1).map((tree) => Math.abs(defect(tree, b)));
    expect(Math.max(...next)).toBeGreaterThan(1e-5);
  });

  test('its embedded method has its order and no more', () => {
    for (const tree of treesUpTo(tableau.embeddedOrder)) {
      expect(Math.abs(defect(tree, embedded))).toBeLessThan(rounding);
    }
    const next = rootedTrees(tableau.embeddedOrder + 1).map((tree) => Math.abs(defect(tree, embedded)));
    expect(Math.max(...next)).toBeGreaterThan(1e-5);
  });

  test('its continuous solution has its order', () => {
    for (const theta of [0.1, 0.37, 0.5, 0.82]) {
      const inner = tableau.dense.reduceRight<number[]>((acc, row) => row.map((x, j) => x + theta * (acc[j] ?? 0)), []);
      const u = tableau.m.map((x, j) => theta * (x + (1 - theta) * (inner[j] ?? 0)));
      for (const tree of treesUpTo(tableau.denseOrder)) {
        expect(Math.abs(defect(tree, weights(u), theta))).toBeLessThan(rounding);
      }
    }
  });

  test('is L-stable', () => {
    expectLStable(beta, b);
  });

  test('is stiffly accurate: the last stage is the embedded or the full step', () => {
    const lastRow = beta[beta.length - 1]!;
    lastRow.forEach((x, j) => expect(Math.abs(x - b[j]!)).toBeLessThan(1e-11)); // as above
  });
});

test('ROS34PW2 keeps order 3 with any matrix in place of the Jacobian', () => {
  const c = square(ROS34PW2.c);
  const gamma = inverse(c.map((row, i) => row.map((x, j) => (i === j ? 1 / ROS34PW2.gamma : 0) - x)));
  const alpha = multiply(square(ROS34PW2.a), gamma);
  const b = gamma.map((_, j) =>
    dot(
      ROS34PW2.m,
      gamma.map((row) => row[j]!),
    ),
  );
  for (const tree of treesUpTo(3)) {
    for (const { phi, withGamma } of splitWeights(tree, alpha, gamma)) {
      // 16 digits printed, four stages.
      expect(Math.abs(dot(b, phi) - (withGamma ? 0 : 1 / density(tree)))).toBeLessThan(1e-14);
    }
  }
});

describe.each([TR_BDF2, ESDIRK3, ESDIRK4, ESDIRK5])('$name', (tableau: EsdirkTableau) => {
  const a = square(tableau.a);
  const b = a[a.length - 1]!;
  const rounding = 1e-14; // closed forms and quotients of 13-digit integers, entries up to 2

  function defect(tree: Tree, w: readonly number[], theta = 1): number {
    return dot(w, elementaryWeights(tree, a, a)) - theta ** treeOrder(tree) / density(tree);
  }

  test('rows sum to the stage times, and stages are of order 2', () => {
    a.forEach((row, i) => {
      const ci = tableau.c[i]!;
      expect(Math.abs(sum(row) - ci)).toBeLessThan(rounding);
      expect(Math.abs(dot(row, tableau.c) - (ci * ci) / 2)).toBeLessThan(rounding);
    });
  });

  test('has its order and no more', () => {
    for (const tree of treesUpTo(tableau.order)) expect(Math.abs(defect(tree, b))).toBeLessThan(rounding);
    const next = rootedTrees(tableau.order + 1).map((tree) => Math.abs(defect(tree, b)));
    expect(Math.max(...next)).toBeGreaterThan(1e-5);
  });

  test('its embedded method has its order', () => {
    for (const tree of treesUpTo(tableau.embeddedOrder)) {
      expect(Math.abs(defect(tree, tableau.bEmbedded))).toBeLessThan(rounding);
    }
    expect(Math.abs(sum(errorCoefficients(tableau)))).toBeLessThan(rounding);
  });

  test('its continuous solution has order 3, or 4 from order 4 on', () => {
    const w = continuousCorrection(tableau);
    const last = b.map((_, i) => (i === b.length - 1 ? 1 : 0));
    const first = b.map((_, i) => (i === 0 ? 1 : 0));
    const order = Math.min(tableau.order, 4);
    for (const theta of [0.1, 0.37, 0.5, 0.82]) {
      const rest = 1 - theta;
      const bTheta = b.map(
        (x, i) =>
          theta * theta * (3 - 2 * theta) * x +
          theta * rest * rest * first[i]! -
          theta * theta * rest * last[i]! +
          theta * theta * rest * rest * w[i]!,
      );
      for (const tree of treesUpTo(order)) {
        expect(Math.abs(defect(tree, bTheta, theta))).toBeLessThan(rounding);
      }
    }
  });

  test('is L-stable', () => {
    expectLStable(a, b);
  });

  test('a stiff component that is off by one tolerance does not show as an error of one, or is filtered', () => {
    // Infinite stiffness, y off by 1, first slope 0 (it comes from the step before): h k = -A22^-1 1 on the other stages.
    const k: number[] = [0];
    a.slice(1).forEach((row, r) => k.push(-(1 + dot(row.slice(1, r + 1), k.slice(1))) / row[r + 1]!));
    const shown = Math.abs(dot(errorCoefficients(tableau), k));
    expect(shown < 0.1 || tableau.filtersError).toBe(true);
  });
});
