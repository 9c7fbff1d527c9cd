/** The written record of a run: times and quantities, true and shown, in rows of plain numbers. */
import type { Observer } from './observation.ts';

export interface RecordState {
  readonly time: readonly number[];
  readonly rows: readonly (readonly number[])[];
  readonly truth: readonly (readonly number[])[];
  readonly shown: readonly (readonly number[])[];
}

/** One written moment. */
export interface Recorder {
  readonly observer: Observer;
  /** s; two rows may share a time where something stepped. */ readonly time: number[];
  /** By row: quantities of the observer. */ readonly rows: Float64Array[];
  /** By row: instruments' true and shown values. */
  readonly truth: Float64Array[];
  readonly shown: Float64Array[];
  /** @internal */ add(
    t: number,
    y: Float64Array,
    truthOf: (i: number) => number,
    shownOf: (i: number) => number,
  ): void;
  /** @internal */ save(): RecordState;
  /** @internal */ restore(state: RecordState): void;
}

/** JSON has no NaN: it travels as null. */
const plain = (row: Float64Array): number[] => Array.from(row);
const typed = (row: readonly (number | null)[]): Float64Array => Float64Array.from(row, (v) => v ?? Number.NaN);

export function createRecorder(observer: Observer, instruments: number): Recorder {
  const time: number[] = [];
  const rows: Float64Array[] = [];
  const truth: Float64Array[] = [];
  const shown: Float64Array[] = [];
  return {
    observer,
    time,
    rows,
    truth,
    shown,
    add(t, y, truthOf, shownOf) {
      const row = new Float64Array(observer.quantities.length);
      observer.observe(t, y, row);
      time.push(t);
      rows.push(row);
      truth.push(Float64Array.from({ length: instruments }, (_, i) => truthOf(i)));
      shown.push(Float64Array.from({ length: instruments }, (_, i) => shownOf(i)));
    },
    save: () => ({ time: [...time], rows: rows.map(plain), truth: truth.map(plain), shown: shown.map(plain) }),
    restore(state) {
      time.length = 0;
      time.push(...state.time);
      const fill = (to: Float64Array[], from: readonly (readonly number[])[]): void => {
        to.length = 0;
        to.push(...from.map(typed));
      };
      fill(rows, state.rows);
      fill(truth, state.truth);
      fill(shown, state.shown);
    },
  };
}
