/**
 * Published initial-value problems with reference end values, and small ones with closed solutions. Equations,
 * data and reference values of the stiff set: [MazziaMagherini2008], unless another source is named.
 */

import type { IvpProblem } from '../../sim/numerics/ivp/problem.ts';
import { densePattern } from '../../sim/numerics/sparse-pattern.ts';

/** A problem on [0, end] with its solution at the end. */
export interface TestProblem {
  readonly name: string;
  readonly problem: IvpProblem;
  readonly start: readonly number[];
  readonly end: number;
  readonly reference: readonly number[];
  /** Absolute tolerance of each component in units of the relative one. */
  readonly scale: number | readonly number[];
}

/** Rates of a network of reactions, each the product of a constant and one or two concentrations. */
interface Network {
  readonly constants: readonly number[];
  /** Species (0-based) that each rate multiplies, with repetition. */
  readonly factors: readonly (readonly number[])[];
  /** For each species the reactions (1-based) that make it, negative for those that consume it, with repetition. */
  readonly balance: readonly (readonly number[])[];
}

function networkProblem({ constants, factors, balance }: Network): IvpProblem {
  const size = balance.length;
  const rate = (r: number, y: Float64Array): number =>
    factors[r]!.reduce((product, species) => product * y[species]!, constants[r]!);
  /** d rate / d y_j: drops one factor at a time. */
  const rateSlope = (r: number, j: number, y: Float64Array): number => {
    let sum = 0;
    factors[r]!.forEach((species, at) => {
      if (species !== j) return;
      sum += factors[r]!.reduce((p, other, k) => (k === at ? p : p * y[other]!), constants[r]!);
    });
    return sum;
  };
  return {
    size,
    pattern: densePattern(size),
    rhs(_t, y, dydt) {
      const rates = constants.map((_, r) => rate(r, y));
      balance.forEach((terms, i) => {
        dydt[i] = terms.reduce((sum, r) => sum + Math.sign(r) * rates[Math.abs(r) - 1]!, 0);
      });
    },
    jacobian(_t, y, values) {
      for (let j = 0; j < size; j++) {
        const slopes = constants.map((_, r) => rateSlope(r, j, y));
        balance.forEach((terms, i) => {
          values[i * size + j] = terms.reduce((sum, r) => sum + Math.sign(r) * slopes[Math.abs(r) - 1]!, 0);
        });
      }
    },
  };
}

/** Robertson's autocatalysis [Robertson1966]; y1 + y2 + y3 is conserved. */
const robertson: IvpProblem = networkProblem({
  constants: [0.04, 1e4, 3e7],
  factors: [[0], [1, 2], [1, 1]],
  balance: [[-1, 2], [1, -2, -3], [3]],
});

/** Robertson's problem to t = 40; end value computed with two codes at rtol 1e-12. */
const robertsonShort: TestProblem = {
  name: 'Robertson to 40',
  problem: robertson,
  start: [1, 0, 0],
  end: 40,
  reference: [7.158270687e-1, 9.18553476e-6, 2.841637457e-1],
  scale: [1, 1e-5, 1],
};

/** Robertson's problem to t = 1e11. */
export const robertsonLong: TestProblem = {
  name: 'Robertson to 1e11',
  problem: robertson,
  start: [1, 0, 0],
  end: 1e11,
  reference: [0.2083340149701255e-7, 0.8333360770334713e-13, 0.999999979166505],
  scale: [1e-8, 1e-13, 1],
};

const HIRES_RATE = 280;
const hiresProblem: IvpProblem = {
  size: 8,
  pattern: densePattern(8),
  rhs(_t, y, f) {
    const [y1, y2, y3, y4, y5, y6, y7, y8] = y as unknown as [
      number,
      number,
      number,
      number,
      number,
      number,
      number,
      number,
    ];
    const pairing = HIRES_RATE * y6 * y8;
    f[0] = -1.71 * y1 + 0.43 * y2 + 8.32 * y3 + 0.0007;
    f[1] = 1.71 * y1 - 8.75 * y2;
    f[2] = -10.03 * y3 + 0.43 * y4 + 0.035 * y5;
    f[3] = 8.32 * y2 + 1.71 * y3 - 1.12 * y4;
    f[4] = -1.745 * y5 + 0.43 * y6 + 0.43 * y7;
    f[5] = -pairing + 0.69 * y4 + 1.71 * y5 - 0.43 * y6 + 0.69 * y7;
    f[6] = pairing - 1.81 * y7;
    f[7] = -f[6];
  },
  jacobian(_t, y, v) {
    v.set([
      -1.71,
      0.43,
      8.32,
      0,
      0,
      0,
      0,
      0, //
      1.71,
      -8.75,
      0,
      0,
      0,
      0,
      0,
      0, //
      0,
      0,
      -10.03,
      0.43,
      0.035,
      0,
      0,
      0, //
      0,
      8.32,
      1.71,
      -1.12,
      0,
      0,
      0,
      0, //
      0,
      0,
      0,
      0,
      -1.745,
      0.43,
      0.43,
      0, //
      0,
      0,
      0,
      0.69,
      1.71,
      -0.43,
      0.69,
      0, //
      0,
      0,
      0,
      0,
      0,
      0,
      -1.81,
      0, //
      0,
      0,
      0,
      0,
      0,
      0,
      1.81,
      0,
    ]);
    const by6 = HIRES_RATE * y[7]!;
    const by8 = HIRES_RATE * y[5]!;
    v[45]! -= by6;
    v[47]! -= by8;
    v[53]! += by6;
    v[55]! += by8;
    v[61]! -= by6;
    v[63]! -= by8;
  },
};

/** HIRES, 8 equations of plant physiology. */
export const hires: TestProblem = {
  name: 'HIRES',
  problem: hiresProblem,
  start: [1, 0, 0, 0, 0, 0, 0, 0.0057],
  end: 321.8122,
  reference: [
    0.7371312573325668e-3, 0.1442485726316185e-3, 0.5888729740967575e-4, 0.1175651343283149e-2, 0.2386356198831331e-2,
    0.6238968252742796e-2, 0.2849998395185769e-2, 0.2850001604814231e-2,
  ],
  scale: 1e-4,
};

/** y1' = y2, y2' = (mu (1 - y1^2) y2 - y1) * scale. */
function vanDerPol(mu: number, scale: number): IvpProblem {
  return {
    size: 2,
    pattern: densePattern(2),
    rhs(_t, y, f) {
      f[0] = y[1]!;
      f[1] = (mu * (1 - y[0]! * y[0]!) * y[1]! - y[0]!) * scale;
    },
    jacobian(_t, y, v) {
      v[0] = 0;
      v[1] = 1;
      v[2] = (-2 * mu * y[0]! * y[1]! - 1) * scale;
      v[3] = mu * (1 - y[0]! * y[0]!) * scale;
    },
  };
}

/** Van der Pol's oscillator in slow time, epsilon = 1e-6. */
export const vanDerPolScaled: TestProblem = {
  name: 'van der Pol, epsilon 1e-6',
  problem: vanDerPol(1, 1e6),
  start: [2, 0],
  end: 2,
  reference: [0.1706167732170483e1, -0.8928097010247975],
  scale: 1,
};

/** Van der Pol's oscillator in its own time, mu = 1000. */
const vanDerPolUnscaled: TestProblem = {
  name: 'van der Pol, mu 1000',
  problem: vanDerPol(1000, 1),
  start: [2, 0],
  end: 2000,
  reference: [0.1706167732170469e1, -0.8928097010248125e-3],
  scale: [1, 1e-3],
};

/** The Belousov-Zhabotinskii reaction. */
export const oregonator: TestProblem = {
  name: 'Oregonator',
  problem: {
    size: 3,
    pattern: densePattern(3),
    rhs(_t, y, f) {
      const [y1, y2, y3] = y as unknown as [number, number, number];
      f[0] = 77.27 * (y2 + y1 * (1 - 8.375e-6 * y1 - y2));
      f[1] = (y3 - (1 + y1) * y2) / 77.27;
      f[2] = 0.161 * (y1 - y3);
    },
    jacobian(_t, y, v) {
      const [y1, y2] = y as unknown as [number, number];
      v.set([77.27 * (1 - 2 * 8.375e-6 * y1 - y2), 77.27 * (1 - y1), 0]);
      v.set([-y2 / 77.27, -(1 + y1) / 77.27, 1 / 77.27], 3);
      v.set([0.161, 0, -0.161], 6);
    },
  },
  start: [1, 2, 3],
  end: 360,
  reference: [0.1000814870318523e1, 0.1228178521549917e4, 0.1320554942846706e3],
  scale: 1,
};

/** Pollution: 20 species, 25 reactions of the air over the Netherlands. */
export const pollution: TestProblem = {
  name: 'Pollution',
  problem: networkProblem({
    constants: [
      0.35, 26.6, 1.23e4, 8.6e-4, 8.2e-4, 1.5e4, 1.3e-4, 2.4e4, 1.65e4, 9e3, 0.022, 1.2e4, 1.88, 1.63e4, 4.8e6, 3.5e-4,
      0.0175, 1e8, 4.44e11, 1.24e3, 2.1, 5.78, 0.0474, 1.78e3, 3.12,
    ],
    factors: [
      [0],
      [1, 3],
      [4, 1],
      [6],
      [6],
      [6, 5],
      [8],
      [8, 5],
      [10, 1],
      [10, 0],
      [12],
      [9, 1],
      [13],
      [0, 5],
      [2],
      [3],
      [3],
      [15],
      [15],
      [16, 5],
      [18],
      [18],
      [0, 3],
      [18, 0],
      [19],
    ],
    balance: [
      [-1, -10, -14, -23, -24, 2, 3, 9, 11, 12, 22, 25],
      [-2, -3, -9, -12, 1, 21],
      [-15, 1, 17, 19, 22],
      [-2, -16, -17, -23, 15],
      [-3, 4, 4, 6, 7, 13, 20],
      [-6, -8, -14, -20, 3, 18, 18],
      [-4, -5, -6, 13],
      [4, 5, 6, 7],
      [-7, -8],
      [-12, 7, 9],
      [-9, -10, 8, 11],
      [9],
      [-11, 10],
      [-13, 12],
      [14],
      [-18, -19, 16],
      [-20],
      [20],
      [-21, -22, -24, 23, 25],
      [-25, 24],
    ],
  }),
  start: [0, 0.2, 0, 0.04, 0, 0, 0.1, 0.3, 0.01, 0, 0, 0, 0, 0, 0, 0, 0.007, 0, 0, 0],
  end: 60,
  reference: [
    0.5646255480022769e-1, 0.1342484130422339, 0.4139734331099427e-8, 0.5523140207484359e-2, 0.2018977262302196e-6,
    0.1464541863493966e-6, 0.7784249118997964e-1, 0.3245075353396018, 0.7494013383880406e-2, 0.1622293157301561e-7,
    0.1135863833257075e-7, 0.2230505975721359e-2, 0.208716278287963e-3, 0.1396921016840158e-4, 0.8964884856898295e-2,
    0.4352846369330103e-17, 0.6899219696263405e-2, 0.1007803037365946e-3, 0.1772146513969984e-5, 0.5682943292316392e-4,
  ],
  scale: 1e-3,
};

/** The seven stiff problems. */
export const stiffProblems: readonly TestProblem[] = [
  robertsonShort,
  robertsonLong,
  hires,
  vanDerPolScaled,
  vanDerPolUnscaled,
  oregonator,
  pollution,
];

/**
 * Prothero and Robinson's problem y' = lambda (y - sin t) + cos t, whose solution through the origin is sin t for
 * any lambda [ProtheroRobinson1974]. Shows the order that is left when stiffness is not resolved.
 */
export function protheroRobinson(lambda: number): IvpProblem {
  return {
    size: 1,
    pattern: densePattern(1),
    rhs(t, y, f) {
      f[0] = lambda * (y[0]! - Math.sin(t)) + Math.cos(t);
    },
    jacobian(_t, _y, v) {
      v[0] = lambda;
    },
    timeDerivative(t, _y, out) {
      out[0] = -lambda * Math.cos(t) - Math.sin(t);
      return true;
    },
  };
}

/** y' = -2 t y^2, y(0) = 1: y = 1/(1 + t^2). Smooth, nonlinear, dependent on t. */
export const bell: IvpProblem = {
  size: 1,
  pattern: densePattern(1),
  rhs(t, y, f) {
    f[0] = -2 * t * y[0]! * y[0]!;
  },
  jacobian(t, y, v) {
    v[0] = -4 * t * y[0]!;
  },
  timeDerivative(_t, y, out) {
    out[0] = -2 * y[0]! * y[0]!;
    return true;
  },
};

/** Two states whose solution is (cos t, sin t), coupled by a cubic term that vanishes on the circle. */
export const circle: IvpProblem = {
  size: 2,
  pattern: densePattern(2),
  rhs(_t, y, f) {
    const [a, b] = y as unknown as [number, number];
    const off = 1 - a * a - b * b;
    f[0] = -b + a * off;
    f[1] = a + b * off;
  },
  jacobian(_t, y, v) {
    const [a, b] = y as unknown as [number, number];
    const off = 1 - a * a - b * b;
    v.set([off - 2 * a * a, -1 - 2 * a * b, 1 - 2 * a * b, off - 2 * b * b]);
  },
};
