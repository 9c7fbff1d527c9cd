/**
 * The recent past of signals that a pure dead time shows later: for each step of the integrator five values of each,
 * through which a quartic is drawn. Before the start a signal stands at its first value.
 */

/** Values kept of each step, at equal distances. */
const NODES = 5;

export interface SignalHistoryState {
  readonly start: readonly number[];
  readonly end: readonly number[];
  readonly values: readonly (readonly number[])[];
  readonly first: readonly number[];
}

export interface SignalHistory {
  /** Adds a step; `sample(signal, t)` is asked at the nodes. Steps older than the span are dropped. */
  add(t0: number, t1: number, sample: (signal: number, t: number) => number): void;
  /** Takes the last step back, to be added again in part. */
  dropLast(): void;
  /** Value of a signal at a past time. */
  at(signal: number, t: number): number;
  /** Sets the value that holds before the first step. */
  begin(signal: number, value: number): void;
  /** Ends of kept steps within (from, to). */
  edges(from: number, to: number): readonly number[];
  save(): SignalHistoryState;
  restore(state: SignalHistoryState): void;
}

/**
 * @param signals - How many.
 * @param span - Longest look back, s.
 */
export function createSignalHistory(signals: number, span: number): SignalHistory {
  let start: number[] = [];
  let end: number[] = [];
  let values: number[][] = []; // one row for each step: signal by signal, NODES each
  const first = new Array<number>(signals).fill(0);

  const quartic = (row: readonly number[], o: number, u: number): number => {
    // Lagrange through u = 0, 1, 2, 3, 4.
    const v = u * (NODES - 1);
    let sum = 0;
    for (let i = 0; i < NODES; i++) {
      let w = row[o + i];
      for (let j = 0; j < NODES; j++) if (j !== i) w *= (v - j) / (i - j);
      sum += w;
    }
    return sum;
  };
  return {
    add(t0, t1, sample) {
      if (!(t1 > t0) || signals === 0) return;
      const row: number[] = [];
      for (let i = 0; i < signals; i++) {
        for (let n = 0; n < NODES; n++) row.push(sample(i, t0 + ((t1 - t0) * n) / (NODES - 1)));
      }
      start.push(t0);
      end.push(t1);
      values.push(row);
      let drop = 0;
      while (drop < end.length - 1 && end[drop] < t0 - span) drop++; // the present step looks back from its start
      if (drop > 64) {
        start = start.slice(drop);
        end = end.slice(drop);
        values = values.slice(drop);
      }
    },
    dropLast() {
      start.pop();
      end.pop();
      values.pop();
    },
    at(signal, t) {
      if (start.length === 0 || t <= start[0]) {
        return start.length === 0 ? first[signal] : t < start[0] ? first[signal] : values[0][signal * NODES];
      }
      let low = 0;
      let high = end.length - 1;
      while (low < high) {
        const middle = (low + high) >> 1;
        if (end[middle] < t) low = middle + 1;
        else high = middle;
      }
      const u = Math.min(1, Math.max(0, (t - start[low]) / (end[low] - start[low])));
      return quartic(values[low], signal * NODES, u);
    },
    begin(signal, value) {
      first[signal] = value;
    },
    edges: (from, to) => end.filter((t) => t > from && t < to),
    save: () => ({ start: [...start], end: [...end], values: values.map((row) => [...row]), first: [...first] }),
    restore(state) {
      start = [...state.start];
      end = [...state.end];
      values = state.values.map((row) => [...row]);
      state.first.forEach((value, i) => {
        first[i] = value;
      });
    },
  };
}
