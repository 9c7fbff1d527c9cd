/**
 * The column's right-hand side with a memory of one call. The end of a step is asked for three times (the record, the
 * next step's slope, the Jacobian's base); the column is evaluated once. Who changes the plant says so: `forget`.
 */
import type { Column } from '../column/column.ts';
import type { IvpProblem } from '../numerics/ivp/problem.ts';

/** The column as integrators see it. */
export interface Evaluation extends IvpProblem {
  /** Leaves the column evaluated at (t, y), to be read. */ settle(t: number, y: Float64Array): void;
  /** To be called when the plant, or what its controllers are shown, changed at the same time and state. */
  forget(): void;
}

/** Wraps a column; all memory is taken here. */
export function createEvaluation(column: Column): Evaluation {
  const { size } = column;
  const lastY = new Float64Array(size);
  const last = new Float64Array(size);
  let lastTime = 0;
  let isKnown = false;

  const isSame = (t: number, y: Float64Array): boolean => {
    if (!isKnown || t !== lastTime) return false;
    for (let i = 0; i < size; i++) if (y[i] !== lastY[i]) return false;
    return true;
  };
  const settle = (t: number, y: Float64Array): void => {
    if (isSame(t, y)) return;
    isKnown = false; // an evaluation that throws leaves nothing
    column.rhs(t, y, last);
    lastY.set(y);
    lastTime = t;
    isKnown = true;
  };
  return {
    size,
    pattern: column.pattern,
    ...(column.auxiliary === undefined ? {} : { auxiliary: column.auxiliary }),
    settle,
    forget() {
      isKnown = false;
    },
    rhs(t, y, dydt) {
      settle(t, y);
      dydt.set(last);
    },
    jacobian(t, y, values) {
      settle(t, y);
      column.jacobianHere(t, y, values);
      isKnown = false; // differences have passed through the column
    },
    timeDerivative(t, y, out) {
      isKnown = false;
      return column.timeDerivative?.(t, y, out) ?? false;
    },
  };
}
