import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  gasLeft,
  gasLeftAfterStages,
  liquidLeft,
  overallUnitHeight,
  stages,
  strippingUnits,
  transferUnits,
  unitsPerStage,
} from '../../sim/transfer/transfer-units.ts';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);
const SIX_DECIMALS = 6e-7;

describe('transfer units, clean solvent', () => {
  // [Colburn1939]: y2/y1 for N = 1, 2, 3, 5, 8; evaluated independently to six decimals.
  it.each([
    [0.7, [0.551478, 0.42678, 0.371986, 0.326841, 0.306969]],
    [1, [0.5, 0.333333, 0.25, 0.166667, 0.111111]],
    [1.3, [0.470633, 0.282362, 0.187756, 0.096108, 0.041459]],
    [2.5, [0.421906, 0.205471, 0.106201, 0.030479, 0.004954]],
  ])('leave the computed share at A = %d', (A, expected) => {
    for (const [k, N] of [1, 2, 3, 5, 8].entries()) {
      expect(Math.abs(gasLeft(N, A) - (expected[k] ?? 0))).toBeLessThan(SIX_DECIMALS);
    }
  });

  it.each([
    [1.3, 13.7437],
    [2.5, 6.83498],
    [1.424, 11.47593],
  ])('for 99 %% removal at A = %d are as computed', (A, N) => {
    expect(Math.abs(transferUnits(100, A) - N)).toBeLessThan(6e-6); // five decimals
  });

  // [Colburn1939], stripping form: 95 % and 99 % removal at S = m G/L.
  it.each([
    [1.5, 5.97729, 10.57908],
    [2, 4.70275, 7.84395],
    [5, 3.48126, 5.48065],
  ])('of a stripper at S = %d are as computed', (S, N95, N99) => {
    expect(Math.abs(strippingUnits(20, 1 / S) - N95)).toBeLessThan(6e-6);
    expect(Math.abs(strippingUnits(100, 1 / S) - N99)).toBeLessThan(6e-6);
    expect(relative(liquidLeft(strippingUnits(20, 1 / S), 1 / S), 0.05)).toBeLessThan(1e-12); // inverse
  });

  it('with very much solvent leave exp(-N)', () => {
    // Limit of the form; 1 % at A = 1000 because 1/A still acts.
    expect(relative(gasLeft(5, 1000), Math.exp(-5))).toBeLessThan(0.01);
  });

  it('invert each other, and pass A = 1 without a step', () => {
    const factor = fc.double({ min: 0.3, max: 5, noNaN: true });
    fc.assert(
      fc.property(factor, fc.double({ min: 0.05, max: 12, noNaN: true }), (A, N) => {
        const left = gasLeft(N, A);
        // Where A < 1 the share saturates and the inverse loses digits as exp(N (1/A - 1)).
        const loss = Math.exp(Math.max(0, N * (1 / A - 1)));
        fc.pre(loss < 1e8);
        expect(relative(transferUnits(1 / left, A), N)).toBeLessThan(1e-13 * loss + 1e-12);
        expect(gasLeft(N * 1.01, A)).toBeLessThan(left);
      }),
    );
    for (const e of [1e-3, 1e-6, 1e-9]) {
      expect(relative(gasLeft(5, 1 + e), 1 / 6)).toBeLessThan(5 * e); // linear in the distance from 1
      expect(relative(transferUnits(6, 1 + e), 5)).toBeLessThan(5 * e);
      expect(relative(gasLeftAfterStages(5, 1 + e), 1 / 6)).toBeLessThan(5 * e);
    }
  });
});

describe('stages, clean solvent', () => {
  // [Kremser1930]: n = 1, 2, 3, 5, 8; evaluated independently to six decimals.
  it.each([
    [0.7, [0.588235, 0.456621, 0.394789, 0.340001, 0.312615]],
    [1.3, [0.434783, 0.250627, 0.161629, 0.078394, 0.031235]],
    [2.5, [0.285714, 0.102564, 0.039409, 0.006169, 0.000393]],
  ])('leave the computed share at A = %d', (A, expected) => {
    for (const [k, n] of [1, 2, 3, 5, 8].entries()) {
      expect(Math.abs(gasLeftAfterStages(n, A) - (expected[k] ?? 0))).toBeLessThan(SIX_DECIMALS);
    }
  });

  it.each([
    [0.7, 0.832242],
    [1.3, 1.136912],
    [2.5, 1.527151],
  ])('are worth the computed number of units at A = %d', (A, ratio) => {
    expect(Math.abs(unitsPerStage(A) - ratio)).toBeLessThan(SIX_DECIMALS);
    expect(relative(transferUnits(3, A) / stages(3, A), ratio)).toBeLessThan(1e-6);
  });
});

describe('the benzene absorber of Treybal', () => {
  // [Treybal1980] illustrations 8.2, 8.3 and 8.7: y1 0.02, y2 0.00102, x2 0.005, m 0.125, A 1.424.
  const r = (0.02 - 0.125 * 0.005) / (0.00102 - 0.125 * 0.005);

  it('has the stages and units of the book', () => {
    expect(Math.abs(stages(r, 1.424) - 7.72)).toBeLessThan(0.02); // three digits
    expect(relative(stages(r, 1.424), 7.6)).toBeLessThan(0.03); // read from a graph
    expect(relative(transferUnits(r, 1.424), 9.163)).toBeLessThan(1e-3); // book 9.16
  });

  it('has the heights of the book', () => {
    // FG a 0.0719, FL a 0.01377 kmol/(m3 s), G 0.0609 kmol/(m2 s); L and area as printed.
    const HG = 0.0609 / 0.0719;
    const X = (x: number): number => x / (1 - x);
    const L = (1.787e-3 * (1 + X(0.1063) + 1 + X(0.005))) / (2 * 0.1746);
    const HL = L / 0.01377;
    expect(relative(HG, 0.847)).toBeLessThan(5e-3);
    expect(relative(HL, 0.7893)).toBeLessThan(5e-3);
    const HOG = overallUnitHeight(HG, HL, 1.424);
    expect(relative(HOG, 1.4013)).toBeLessThan(5e-3); // rounding of the printed inputs
    expect(relative(HOG * 9.16, 12.84)).toBeLessThan(5e-3);
  });

  it('needs the least oil of the book', () => {
    // Gas 0.250 m3/s, 26 degC, 107 kPa; pure benzene 13.33 kPa; 95 % removed. The book reads X1 = 0.176
    // from a graph; the exact tangent is at 0.1801, 1.1675e-3 kmol/s (2 % less).
    const G = (0.25 * 273 * 107) / (299 * 101.33 * 22.41);
    const Gs = G * (1 - 0.02);
    expect(relative(G, 0.01075)).toBeLessThan(2e-3);
    expect(relative(Gs, 0.01051)).toBeLessThan(5e-3);
    const Y1 = 0.02 / 0.98;
    const Y2 = 0.05 * Y1;
    const X2 = 0.005 / 0.995;
    const k = 13_330 / 107_000;
    let slope = 0;
    for (let X = X2 + 1e-4; X < 0.5; X += 1e-5) {
      const y = (k * X) / (1 + X);
      const Y = y / (1 - y);
      if (Y <= Y1) slope = Math.max(slope, (Y - Y2) / (X - X2));
    }
    expect(relative(Gs * slope, 1.1675e-3)).toBeLessThan(2e-3);
    expect(relative(Gs * slope, 1.195e-3)).toBeLessThan(0.03); // graph reading
  });
});

it('an SO2 absorber with a straight line has the textbook units', () => {
  // Open exercise: 1.5 m2, 4 m, L 2.4, G 0.065 kmol/s, y 0.016 to 0.004, y* = 45 x, clean water:
  // A 0.8205, NOG 4.8816, HOG 0.8194 m, Ky a 0.05288 kmol/(m3 s); four digits.
  const A = 2.4 / (45 * 0.065);
  const N = transferUnits(4, A);
  expect(relative(A, 0.8205)).toBeLessThan(1e-4);
  expect(relative(N, 4.8816)).toBeLessThan(1e-4);
  expect(relative(4 / N, 0.8194)).toBeLessThan(1e-4);
  expect(relative((0.065 * N) / (1.5 * 4), 0.05288)).toBeLessThan(1e-3);
});

it('the two films add up', () => {
  // HOG = HG + (m G/L) HL: 0.39 + 0.8 x 0.5 = 0.79, algebra.
  expect(relative(overallUnitHeight(0.39, 0.5, 1 / 0.8), 0.79)).toBeLessThan(1e-14);
});
