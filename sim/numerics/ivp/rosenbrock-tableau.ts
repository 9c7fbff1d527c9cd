/**
 * Coefficients of Rosenbrock methods in the form that needs no products with the Jacobian [HairerWanner1996, IV.7.25]:
 *
 *   (I/(h gamma) - J) u_i = f(t + alpha_i h, y + sum_j a_ij u_j) + sum_j (c_ij/h) u_j + h d_i f_t
 *   y_new = y + sum_j m_j u_j,   error = sum_j e_j u_j
 *
 * with the continuous solution, theta in [0, 1],
 *
 *   y(theta) = (1 - theta) y + theta (y_new + (1 - theta) (k_1 + theta (k_2 + theta k_3 ...))),   k_p = sum_j dense_pj u_j
 */

import { minimumNorm } from '../minimum-norm.ts';

/** A Rosenbrock method of s stages. */
export interface RosenbrockTableau {
  readonly name: string;
  readonly order: number;
  readonly embeddedOrder: number;
  /** Order of the continuous solution. */
  readonly denseOrder: number;
  /** True when the order holds for any matrix in place of the Jacobian (a W-method). */
  readonly toleratesAnyMatrix: boolean;
  readonly gamma: number;
  /** Stage times, length s. */
  readonly alpha: readonly number[];
  /** Row i has i entries. */
  readonly a: readonly (readonly number[])[];
  /** Row i has i entries. */
  readonly c: readonly (readonly number[])[];
  /** Weights of the time derivative, length s. */
  readonly d: readonly number[];
  readonly m: readonly number[];
  readonly e: readonly number[];
  readonly dense: readonly (readonly number[])[];
}

/** The form with k_i = f(...) h + h J sum_j gamma_ij k_j in which theory and most papers write [HairerWanner1996, IV.7.4]. */
interface StandardRosenbrock {
  /** s x s, strictly lower. */
  readonly alpha: readonly (readonly number[])[];
  /** s x s, lower, constant diagonal gamma. */
  readonly gamma: readonly (readonly number[])[];
  readonly b: readonly number[];
  readonly bEmbedded: readonly number[];
}

/** Row times the inverse of a lower triangular matrix. */
function timesInverse(row: readonly number[], lower: readonly (readonly number[])[]): number[] {
  const s = lower.length;
  const out = new Array<number>(s).fill(0);
  for (let j = s - 1; j >= 0; j--) {
    let sum = row[j] ?? 0;
    for (let k = j + 1; k < s; k++) sum -= out[k] * lower[k][j];
    out[j] = sum / lower[j][j];
  }
  return out;
}

/** The coefficients that follow from the standard form: A = alpha Gamma^-1, C = diag(1/gamma) - Gamma^-1, m = b Gamma^-1. */
function transformed(
  standard: StandardRosenbrock,
): Pick<RosenbrockTableau, 'gamma' | 'alpha' | 'a' | 'c' | 'd' | 'm' | 'e'> {
  const { alpha, gamma, b, bEmbedded } = standard;
  const m = timesInverse(b, gamma);
  const mEmbedded = timesInverse(bEmbedded, gamma);
  const unit = gamma.map((_, i) => gamma.map((__, j) => (i === j ? 1 : 0)));
  return {
    gamma: gamma[0][0],
    alpha: alpha.map((row) => row.reduce((sum, x) => sum + x, 0)),
    a: alpha.map((row, i) => timesInverse(row, gamma).slice(0, i)),
    c: unit.map((row, i) =>
      timesInverse(row, gamma)
        .slice(0, i)
        .map((x) => -x),
    ),
    d: gamma.map((row) => row.reduce((sum, x) => sum + x, 0)),
    m,
    e: m.map((x, j) => x - mEmbedded[j]),
  };
}

/** RODAS: 6 stages, order 4(3), L-stable, stiffly accurate. Coefficients: [HairerWanner1996, IV.7 and the code RODAS, method 1]. */
export const RODAS4: RosenbrockTableau = {
  name: 'RODAS4',
  order: 4,
  embeddedOrder: 3,
  denseOrder: 3,
  toleratesAnyMatrix: false,
  gamma: 0.25,
  alpha: [0, 0.386, 0.21, 0.63, 1, 1],
  a: [
    [],
    [1.544],
    [0.9466785280815826, 0.2557011698983284],
    [3.314825187068521, 2.896124015972201, 0.9986419139977817],
    [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895],
    [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895, 1],
  ],
  c: [
    [],
    [-5.6688],
    [-2.430093356833875, -0.2063599157091915],
    [-0.1073529058151375, -9.594562251023355, -20.47028614809616],
    [7.496443313967647, -10.24680431464352, -33.99990352819905, 11.7089089320616],
    [8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054],
  ],
  d: [0.25, -0.1043, 0.1035, -0.0362, 0, 0],
  m: [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895, 1, 1],
  e: [0, 0, 0, 0, 0, 1],
  dense: [
    [10.12623508344586, -7.487995877610167, -34.80091861555747, -7.992771707568823, 1.025137723295662, 0],
    [-0.6762803392801253, 6.087714651680015, 16.43084320892478, 24.76722511418386, -6.594389125716872, 0],
  ],
};

/**
 * Rodas5P: 8 stages, order 5(4), L-stable, stiffly accurate, of order 3 and more on linear parabolic problems and
 * Prothero-Robinson's. Coefficients: [Steinebach2023].
 */
export const RODAS5P: RosenbrockTableau = {
  name: 'Rodas5P',
  order: 5,
  embeddedOrder: 4,
  denseOrder: 4,
  toleratesAnyMatrix: false,
  gamma: 0.21193756319429014,
  alpha: [0, 0.6358126895828704, 0.4095798393397535, 0.9769306725060716, 0.4288403609558664, 1, 1, 1],
  a: [
    [],
    [3],
    [2.849394379747939, 0.45842242204463923],
    [-6.954028509809101, 2.489845061869568, -10.358996098473584],
    [2.8029986275628964, 0.5072464736228206, -0.3988312541770524, -0.04721187230404641],
    [-7.502846399306121, 2.561846144803919, -11.627539656261098, -0.18268767659942256, 0.030198172008377946],
    [-7.502846399306121, 2.561846144803919, -11.627539656261098, -0.18268767659942256, 0.030198172008377946, 1],
    [-7.502846399306121, 2.561846144803919, -11.627539656261098, -0.18268767659942256, 0.030198172008377946, 1, 1],
  ],
  c: [
    [],
    [-14.155112264123755],
    [-17.97296035885952, -2.859693295451294],
    [147.12150275711716, -1.41221402718213, 71.68940251302358],
    [165.43517024871676, -0.4592823456491126, 42.90938336958603, -5.961986721573306],
    [24.854864614690072, -3.0009227002832186, 47.4931110020768, 5.5814197821558125, -0.6610691825249471],
    [
      30.91273214028599, -3.1208243349937974, 77.79954646070892, 34.28646028294783, -19.097331116725623,
      -28.087943162872662,
    ],
    [
      37.80277123390563, -3.2571969029072276, 112.26918849496327, 66.9347231244047, -40.06618937091002,
      -54.66780262877968, -9.48861652309627,
    ],
  ],
  d: [0.21193756319429014, -0.42387512638858027, -0.3384627126235924, 1.8046452872882734, 2.325825639765069, 0, 0, 0],
  m: [-7.502846399306121, 2.561846144803919, -11.627539656261098, -0.18268767659942256, 0.030198172008377946, 1, 1, 1],
  e: [0, 0, 0, 0, 0, 0, 0, 1],
  dense: [
    [
      25.948786856663858, -2.5579724845846235, 10.433815404888879, -2.3679251022685204, 0.524948541321073,
      1.1241088310450404, 0.4272876194431874, -0.17202221070155493,
    ],
    [
      -9.91568850695171, -0.9689944594115154, 3.0438037242978453, -24.495224566215796, 20.176138334709044,
      15.98066361424651, -6.789040303419874, -6.710236069923372,
    ],
    [
      11.419903575922262, 2.8879645146136994, 72.92137995996029, 80.12511834622643, -52.072871366152654,
      -59.78993625266729, -0.15582684282751913, 4.883087185713722,
    ],
  ],
};

const W_GAMMA = 0.435866521508459; // root of x^3 - 3 x^2 + 3 x/2 - 1/6 in (0.4, 0.5): L-stable of order 3
const ROS34PW2_STANDARD: StandardRosenbrock = {
  alpha: [
    [0, 0, 0, 0],
    [0.87173304301691801, 0, 0, 0],
    [0.84457060015369423, -0.11299064236484185, 0, 0],
    [0, 0, 1, 0],
  ],
  gamma: [
    [W_GAMMA, 0, 0, 0],
    [-0.87173304301691801, W_GAMMA, 0, 0],
    [-0.90338057013044082, 0.054180672388095326, W_GAMMA, 0],
    [0.24212380706095346, -1.2232505839045147, 0.54526025533510214, W_GAMMA],
  ],
  b: [0.24212380706095346, -1.2232505839045147, 1.545260255335102, W_GAMMA],
  bEmbedded: [0.37810903145819369, -0.096042292212423178, 0.5, 0.2179332607542295],
};

/**
 * ROS34PW2: 4 stages, order 3(2), L-stable, stiffly accurate, and of order 3 with any matrix in place of the Jacobian
 * (with the exact one also for index-1 and linear parabolic problems). Coefficients: [RangAngermann2005]. The
 * continuous solution is the only one of order 3 on these stages, derived here.
 */
export const ROS34PW2: RosenbrockTableau = {
  name: 'ROS34PW2',
  order: 3,
  embeddedOrder: 2,
  denseOrder: 3,
  toleratesAnyMatrix: true,
  ...transformed(ROS34PW2_STANDARD),
  dense: thirdOrderDense(ROS34PW2_STANDARD),
};

/**
 * The k_p of the continuous solution of order 3 of a 4-stage method. Its weights b(theta) obey, with beta = alpha + gamma,
 * sum b_i = theta, sum b_i beta_i = theta^2/2, sum b_i alpha_i^2 = theta^3/3, sum b_i beta_ij beta_j = theta^3/6
 * [HairerWanner1996, IV.7 with theta in place of 1]: four conditions for four weights.
 */
function thirdOrderDense(standard: StandardRosenbrock): number[][] {
  const { alpha, gamma } = standard;
  const sum = (row: readonly number[]): number => row.reduce((total, x) => total + x, 0);
  const beta = alpha.map((row, i) => row.map((x, j) => x + gamma[i][j]));
  const betaSums = beta.map(sum);
  const conditions = [
    alpha.map(() => 1),
    betaSums,
    alpha.map((row) => sum(row) ** 2),
    beta.map((row) => row.reduce((total, x, j) => total + x * betaSums[j], 0)),
  ];
  const square = minimumNorm(conditions, [0, 1 / 2, 0, 0]); // weights of theta^2
  const cube = minimumNorm(conditions, [0, 0, 1 / 3, 1 / 6]); // weights of theta^3
  const first = square.map((x, i) => -x - cube[i]);
  const second = cube.map((x) => -x);
  return [timesInverse(first, gamma), timesInverse(second, gamma)];
}
