import { describe, expect, it } from 'vitest';
import { gasLeft, liquidLeft } from '../../sim/transfer/transfer-units.ts';
import { linearBed, linearSlope, TRACE } from '../support/column-cases.ts';
import { settled } from '../support/column-runs.ts';

// Steady state of the bed with constant coefficients against Colburn's closed form [Colburn1939].
// The project's bar is 0.5 % at 40 segments. The face values are exact on this profile, so that what is left is the
// feed's own strength, 1e-8, through the change of the gas flow; 1e-6 leaves room for the steady search's own bound.
const EXACT = 1e-6;

describe('absorption', () => {
  const NOGs = Array.from({ length: 12 }, (_, i) => i + 1);
  /** All of them at 4, 8 and 12 units, every second one, in turn, at the others. */
  const factors = [0.5, 0.7, 1, 1.3, 2, 3];
  it.each(NOGs)('with %d transfer units leaves what Colburn gives, for absorption factors 0.5 to 3', (NOG) => {
    for (const A of factors.filter((_, i) => NOG % 4 === 0 || i % 2 === NOG % 2)) {
      const { outlet } = settled(linearBed({ NOG, A }));
      expect(Math.abs(outlet.y[0]! / TRACE / gasLeft(NOG, A) - 1)).toBeLessThan(EXACT);
    }
  });

  it('from liquid without end leaves exp(-NOG)', () => {
    // A = 1000: what the liquid takes up moves y2/y1 by some NOG/A of itself.
    const { outlet } = settled(linearBed({ NOG: 5, A: 1000 }));
    expect(Math.abs(outlet.y[0]! / TRACE / Math.exp(-5) - 1)).toBeLessThan(0.01);
  });

  it.each([
    // Six digits of the closed form, evaluated independently.
    { A: 0.7, NOG: 3, gas: 0.371986 },
    { A: 1.3, NOG: 5, gas: 0.096108 },
    { A: 2.5, NOG: 8, gas: 0.004954 },
  ])('A $A, NOG $NOG: what gas alone and liquid alone leave in the gas adds up to one', ({ A, NOG, gas }) => {
    const m = linearSlope(linearBed({ NOG, A }));
    const fromGas = settled(linearBed({ NOG, A })).outlet.y[0]! / TRACE;
    const fromLiquid = settled(linearBed({ NOG, A, yIn: 0, xIn: TRACE / m })).outlet.y[0]! / TRACE;
    expect(Math.abs(fromGas - gas)).toBeLessThan(6e-7);
    expect(Math.abs(fromGas + fromLiquid - 1)).toBeLessThan(2 * EXACT);
  });

  it('does not depend on the number of segments', () => {
    for (const segments of [10, 20, 80]) {
      const { outlet } = settled(linearBed({ NOG: 8, A: 1.5, segments }));
      expect(Math.abs(outlet.y[0]! / TRACE / gasLeft(8, 1.5) - 1)).toBeLessThan(EXACT);
    }
  });

  it('from a solvent that carries solute approaches the balance with it', () => {
    // (y2 - m x2)/(y1 - m x2) is the closed form's ratio.
    const plain = linearBed({ NOG: 5, A: 1.3 });
    const m = linearSlope(plain);
    const xIn = (0.3 * TRACE) / m;
    const { outlet } = settled(linearBed({ NOG: 5, A: 1.3, xIn }));
    const left = (outlet.y[0]! / TRACE - 0.3) / 0.7;
    expect(Math.abs(left / gasLeft(5, 1.3) - 1)).toBeLessThan(3 * EXACT); // the difference of two numbers
  });
});

describe('stripping', () => {
  // NOL for 95 and 99 % removal at stripping factors m G/L of 1.5, 2 and 5: closed form, evaluated independently.
  it.each([
    [1.5, 5.97729, 10.57908],
    [2, 4.70275, 7.84395],
    [5, 3.48126, 5.48065],
  ])('at a stripping factor of %d needs the transfer units of the closed form', (S, NOL95, NOL99) => {
    for (const [NOL, left] of [
      [NOL95, 0.05],
      [NOL99, 0.01],
    ] as const) {
      // NOL = NOG m G/L, hence NOG = NOL A with A = 1/S.
      const A = 1 / S;
      const plain = linearBed({ NOG: NOL * A, A, yIn: 0, xIn: 1 });
      const xIn = TRACE / linearSlope(plain);
      const { outlet, column } = settled(linearBed({ NOG: NOL * A, A, yIn: 0, xIn }));
      const molar = 1000 / column.plant.solvent.molarMass;
      expect(Math.abs(outlet.c[0]! / molar / xIn / left - 1)).toBeLessThan(1e-4); // six digits of NOL printed
      expect(Math.abs(outlet.c[0]! / molar / xIn / liquidLeft(NOL, A) - 1)).toBeLessThan(EXACT);
    }
  });
});

describe('ways to state measured coefficients', () => {
  const NOG = 5;
  const A = 1.3;
  const height = 4;
  const base = linearBed({ NOG, A, height });
  const crossSection = 0.25 * Math.PI * base.column.diameter ** 2;
  const gasFlux = base.gas.feed.rate / crossSection;
  const expected = gasLeft(NOG, A);
  it.each([
    ['HOG', { kind: 'HOG', value: height / NOG }],
    ['Kya', { kind: 'Kya', value: (NOG * gasFlux) / height }],
    ['KGa', { kind: 'KGa', value: (NOG * gasFlux) / height / 101_325 }],
  ] as const)('%s means the same bed', (_name, statedAs) => {
    const { outlet } = settled(linearBed({ NOG, A, height, statedAs }));
    expect(Math.abs(outlet.y[0]! / TRACE / expected - 1)).toBeLessThan(EXACT);
  });

  it('H_G and H_L add up to H_OG = H_G + H_L/A', () => {
    // The split of [Colburn1939]; the solute's drift correction is off for measured films.
    const HOG = height / NOG;
    for (const share of [0.2, 0.8]) {
      const statedAs = { kind: 'HG-HL', HG: share * HOG, HL: (1 - share) * HOG * A } as const;
      const { outlet } = settled(linearBed({ NOG, A, height, statedAs }));
      // The solvent's molar volume takes the place of the liquid's: 1e-8 of solute; and of its table, 1e-9.
      expect(Math.abs(outlet.y[0]! / TRACE / expected - 1)).toBeLessThan(EXACT);
    }
  });
});

describe('well-mixed segments', () => {
  // Equal mixed cells in each phase solved by hand as a linear system: tauG dy_j/dt = 0 = n (y_{j-1} - y_j) - N (y_j - X_j)
  // and its mirror; six digits computed independently.
  it.each([
    [0.7, 3, 5, 0.449273],
    [0.7, 3, 20, 0.392593],
    [0.7, 3, 80, 0.377196],
    [1.3, 5, 10, 0.158358],
    [1.3, 5, 40, 0.112176],
    [2.5, 8, 5, 0.062403],
    [2.5, 8, 40, 0.008921],
    [2.5, 8, 160, 0.005829],
  ])('A %d, NOG %d, %d cells have the cell model’s own bias', (A, NOG, segments, expected) => {
    const { outlet } = settled(linearBed({ NOG, A, segments, scheme: 'well-mixed' }));
    expect(Math.abs(outlet.y[0]! / TRACE - expected)).toBeLessThan(6e-7); // half of the sixth digit, and EXACT
  });
});

describe('axial mixing', () => {
  it('of both phases lowers the recovery towards the stirred tank', () => {
    const at = (Pe: number | undefined): number =>
      settled(linearBed({ NOG: 5, A: 1.3, segments: 80, peclet: { gas: Pe, liquid: Pe } })).outlet.y[0]! / TRACE;
    const stirred = 1 / (1 + 5 - (5 * 5) / 1.3 / (1 + 5 / 1.3)); // y = 1 - N (y - X), X = (N/A)(y - X)
    const values = [at(undefined), at(100), at(10), at(1)];
    for (let i = 1; i < values.length; i++) expect(values[i]!).toBeGreaterThan(values[i - 1]!);
    expect(values.at(-1)!).toBeLessThan(stirred);
  });
});
