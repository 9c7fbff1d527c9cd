/**
 * Coefficients of diagonally implicit Runge-Kutta methods with an explicit first stage and one repeated diagonal
 * entry (ESDIRK). All are stiffly accurate (b is the last row of A), L-stable and of stage order 2.
 */

import { minimumNorm } from '../minimum-norm.ts';

/** An ESDIRK method of s stages. */
export interface EsdirkTableau {
  readonly name: string;
  readonly order: number;
  readonly embeddedOrder: number;
  /** Diagonal of A from the second stage on. */
  readonly gamma: number;
  /** Stage times, length s, the first 0, the last 1. */
  readonly c: readonly number[];
  /** Row i has i + 1 entries, the diagonal included. */
  readonly a: readonly (readonly number[])[];
  /** Weights of the embedded method, length s. */
  readonly bEmbedded: readonly number[];
  /**
   * True when the error estimate is to be multiplied by (I - h gamma J)^-1 [HoseaShampine1996]: where a state off the slow
   * manifold, with a slope on it, would otherwise show undamped in the estimate.
   */
  readonly filtersError: boolean;
}

const ROOT2 = Math.SQRT2;

/** A with its first column filled in from the row sums c_i, as its authors state it; rows hold the other entries. */
function withFirstColumn(c: readonly number[], rows: readonly (readonly number[])[]): number[][] {
  return rows.map((row, i) => (i === 0 ? [0] : [row.reduce((rest, x) => rest - x, c[i]), ...row]));
}

const TR_GAMMA = 1 - ROOT2 / 2;
const TR_OUTER = ROOT2 / 4;

/**
 * TR-BDF2 as an ESDIRK pair of order 2(3): 3 stages. Coefficients, embedded method and filter:
 * [HoseaShampine1996]; the method is of [BankEtAl1985].
 */
export const TR_BDF2: EsdirkTableau = {
  name: 'TR-BDF2',
  order: 2,
  embeddedOrder: 3,
  gamma: TR_GAMMA,
  c: [0, 2 - ROOT2, 1],
  a: [[0], [TR_GAMMA, TR_GAMMA], [TR_OUTER, TR_OUTER, TR_GAMMA]],
  bEmbedded: [(1 - TR_OUTER) / 3, (1 + 3 * TR_OUTER) / 3, TR_GAMMA / 3],
  filtersError: true,
};

const B3_OUTER = (2398 + 1205 * ROOT2) / (2835 * (4 + 3 * ROOT2));
const B3_EMBEDDED = (5547709 * ROOT2 - 4800247) / 16519545;
const A3_THIRD = (9 * (1 + ROOT2)) / 80;
const A3_FOURTH = (22 + 15 * ROOT2) / (80 * (1 + ROOT2));

/** ESDIRK3(2)5L[2]SA: 5 stages, order 3(2), gamma 9/40. Coefficients: [KennedyCarpenter2019]. */
export const ESDIRK3: EsdirkTableau = {
  name: 'ESDIRK3(2)5L[2]SA',
  order: 3,
  embeddedOrder: 2,
  gamma: 9 / 40,
  c: [0, 9 / 20, (9 * (2 + ROOT2)) / 40, 3 / 5, 1],
  a: [
    [0],
    [9 / 40, 9 / 40],
    [A3_THIRD, A3_THIRD, 9 / 40],
    [A3_FOURTH, A3_FOURTH, -7 / (40 * (1 + ROOT2)), 9 / 40],
    [B3_OUTER, B3_OUTER, (-2374 * (1 + 2 * ROOT2)) / (2835 * (5 + 3 * ROOT2)), 5827 / 7560, 9 / 40],
  ],
  bEmbedded: [B3_EMBEDDED, B3_EMBEDDED, (11095418 * (1 - ROOT2)) / 16519545, 30698249 / 44052120, 49563 / 233080],
  filtersError: false,
};

const C4 = [0, 1 / 2, (2 - ROOT2) / 4, 5 / 8, 26 / 25, 1];
const B4_SECOND = (1181 - 987 * ROOT2) / 13782;

/** ESDIRK4(3)6L[2]SA: 6 stages, order 4(3), gamma 1/4. Coefficients: [KennedyCarpenter2016]. */
export const ESDIRK4: EsdirkTableau = {
  name: 'ESDIRK4(3)6L[2]SA',
  order: 4,
  embeddedOrder: 3,
  gamma: 1 / 4,
  c: C4,
  a: withFirstColumn(C4, [
    [],
    [1 / 4],
    [(1 - ROOT2) / 8, 1 / 4],
    [(5 - 7 * ROOT2) / 64, (7 * (1 + ROOT2)) / 32, 1 / 4],
    [
      (-13796 - 54539 * ROOT2) / 125000,
      (506605 + 132109 * ROOT2) / 437500,
      (166 * (-97 + 376 * ROOT2)) / 109375,
      1 / 4,
    ],
    [
      B4_SECOND,
      (47 * (-267 + 1783 * ROOT2)) / 273343,
      (-16 * (-22922 + 3525 * ROOT2)) / 571953,
      (-15625 * (97 + 376 * ROOT2)) / 90749876,
      1 / 4,
    ],
  ]),
  bEmbedded: [
    -480923228411 / 4982971448372,
    -480923228411 / 4982971448372,
    6709447293961 / 12833189095359,
    3513175791894 / 6748737351361,
    -498863281070 / 6042575550617,
    2077005547802 / 8945017530137,
  ],
  filtersError: false,
};

const C5 = [0, 46 / 125, 7121331996143 / 11335814405378, 49 / 353, 3706679970760 / 5295570149437, 347 / 382, 1];
const B5_EMBEDDED = [
  -582099335757 / 7214068459310,
  615023338567 / 3362626566945,
  3192122436311 / 6174152374399,
  6156034052041 / 14430468657929,
  -1011318518279 / 9693750372484,
  1914490192573 / 13754262428401,
];

/**
 * ESDIRK5(4)7L[2]SA2: 7 stages, order 5(4), gamma 23/125. Coefficients: [KennedyCarpenter2019]. The filter is not theirs:
 * without it a state one tolerance off the slow manifold gives an estimate of 1.76 tolerances at any step.
 */
export const ESDIRK5: EsdirkTableau = {
  name: 'ESDIRK5(4)7L[2]SA2',
  order: 5,
  embeddedOrder: 4,
  gamma: 23 / 125,
  c: C5,
  a: withFirstColumn(C5, [
    [],
    [23 / 125],
    [791020047304 / 3561426431547, 23 / 125],
    [-158159076358 / 11257294102345, -85517644447 / 5003708988389, 23 / 125],
    [-1653327111580 / 4048416487981, 1514767744496 / 9099671765375, 14283835447591 / 12247432691556, 23 / 125],
    [
      -4540011970825 / 8418487046959,
      -1790937573418 / 7393406387169,
      10819093665085 / 7266595846747,
      4109463131231 / 7386972500302,
      23 / 125,
    ],
    [
      -188593204321 / 4778616380481,
      2809310203510 / 10304234040467,
      1021729336898 / 2364210264653,
      870612361811 / 2470410392208,
      -1307970675534 / 8059683598661,
      23 / 125,
    ],
  ]),
  bEmbedded: [B5_EMBEDDED.reduce((rest, x) => rest - x, 1), ...B5_EMBEDDED],
  filtersError: true,
};

/** b - bEmbedded: the weights of the error estimate. */
export function errorCoefficients(tableau: EsdirkTableau): number[] {
  const b = tableau.a[tableau.a.length - 1];
  return b.map((x, i) => x - tableau.bEmbedded[i]);
}

/**
 * Weights w of the term theta^2 (1 - theta)^2 h sum_i w_i k_i that lifts cubic Hermite interpolation to order 4: the
 * shortest w whose sum has the local error of Hermite's polynomial, h^4 y''''/24, as its leading term. Of the eight
 * order conditions five are left, since A c = c^2/2 here. Zeros for methods below order 4, which do not need it.
 * Derived for this code; the orders are tested.
 */
export function continuousCorrection(tableau: EsdirkTableau): number[] {
  const { c, a, order } = tableau;
  if (order < 4) return c.map(() => 0);
  const aTimesC2 = a.map((row) => row.reduce((sum, x, j) => sum + x * c[j] * c[j], 0));
  const rows = [c.map(() => 1), c, c.map((x) => x * x), c.map((x) => x * x * x), aTimesC2];
  return minimumNorm(rows, [0, 0, 0, 1 / 4, 1 / 12]);
}

/** A predictor of stage i needs at most this many conditions; more would extrapolate noise. */
const PREDICTOR_CONDITIONS = 3;

/**
 * Row i: weights p_j of the stages before it with which y + h sum_j p_j k_j predicts stage i to as high an order as the
 * stages allow, at most 3 (shortest weights). Row 1 is the explicit Euler step.
 */
export function stagePredictors(tableau: EsdirkTableau): number[][] {
  const { c } = tableau;
  return c.map((ci, i) => {
    if (i === 0) return [];
    const known = c.slice(0, i);
    const conditions = Math.min(i, PREDICTOR_CONDITIONS);
    const rows = Array.from({ length: conditions }, (_, q) => known.map((x) => x ** q));
    const right = rows.map((_, q) => ci ** (q + 1) / (q + 1));
    return minimumNorm(rows, right);
  });
}
