// Types of `odex`, written here because its package ships source that does not pass our checks.
// Found through `paths` in tsconfig.json. Only what a caller needs is declared.
// The numeric values of `Outcome` and the defaults are those of version 2.0.4.

/** Why `solve` returned. */
export declare enum Outcome {
  /** The end was reached. */
  Converged,
  /** `maxSteps` steps were started without reaching the end. */
  MaxStepsExceeded,
  /** The observer returned `false`. */
  EarlyReturn,
}

/** y' at (x, y). `y` is a copy that the caller of `Derivative` does not read again. */
export type Derivative = (x: number, y: number[]) => number[];

/**
 * Called at the start (step 1, `xOld === x`, no interpolant) and after each accepted step.
 *
 * `dense(c, x)` gives component `c` within [xOld, x] and is there only when `denseOutput` is set; otherwise
 * the argument is `false`. Return `false` to stop.
 */
export type Observer = (
  step: number,
  xOld: number,
  x: number,
  y: number[],
  dense?: ((component: number, x: number) => number) | false,
) => boolean | undefined;

/** What `solve` returns. */
export interface Solution {
  /** Solution where the integration stopped. */
  y: number[];
  outcome: Outcome;
  /** Steps started, accepted and rejected; evaluations of the derivative. */
  nStep: number;
  nAccept: number;
  nReject: number;
  nEval: number;
  /** The end that was asked for, also when it was not reached. */
  xEnd: number;
}

/** Explicit Gragg-Bulirsch-Stoer extrapolation with order and step-size control. */
export declare class Solver {
  /** @param n - Number of equations. */
  constructor(n: number);
  /** Greatest number of steps; default 10 000. */
  maxSteps: number;
  /** First step; default and least value 1e-4. */
  initialStepSize: number;
  /** Longest step; default 0, which means the whole interval. */
  maxStepSize: number;
  /** Columns of the extrapolation table, above 2; default 9. */
  maxExtrapolationColumns: number;
  /** Give the observer an interpolant; default false. */
  denseOutput: boolean;
  /** Components with an interpolant; default all. */
  denseComponents: number[] | undefined;
  /** One for all components or one each; default 1e-5. */
  relativeTolerance: number | number[];
  /** One for all components or one each; default 1e-5. */
  absoluteTolerance: number | number[];
  /** `y0` must be a plain array: a typed array gives NaN without a word. */
  solve(f: Derivative, x: number, y0: number[], xEnd: number, observer?: Observer): Solution;
}
