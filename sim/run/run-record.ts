/** What answers are made of: the rows of a run, its events and interventions. Pure data, so that tests can write one. */
import type { Case, Limit, Measured, Scenario } from '../case/case.ts';
import { NORMAL_MOLAR_VOLUME } from '../units.ts';
import type { RunEvent } from './events.ts';
import type { Observed } from './observation.ts';
import type { Interval, Trace } from './piecewise.ts';
import type { Intervention, Run } from './simulate.ts';

/** The written part of a run. Rows share a time where something stepped. */
export interface RunRecord {
  readonly plant: Case;
  readonly scenario: Scenario;
  readonly time: readonly number[];
  readonly quantities: readonly Observed[];
  /** By row: quantities, SI. */ readonly rows: readonly ArrayLike<number>[];
  /** By row: true and shown value of each instrument, SI. */
  readonly truth: readonly ArrayLike<number>[];
  readonly shown: readonly ArrayLike<number>[];
  readonly events: readonly RunEvent[];
  readonly interventions: readonly Intervention[];
}

/** The record of a run as it stands. */
export function recordOf(run: Run): RunRecord {
  const { plant, scenario, recorder, events, interventions } = run;
  const { time, rows, truth, shown } = recorder;
  return { plant, scenario, time, quantities: recorder.observer.quantities, rows, truth, shown, events, interventions };
}

/** Index of a quantity by id, -1 when it is not recorded. */
export function quantityIndex(record: RunRecord, id: string): number {
  return record.quantities.findIndex((q) => q.id === id);
}

/** A recorded quantity; NaN throughout when it is not recorded. */
export function traceOf(record: RunRecord, id: string): Trace {
  const i = quantityIndex(record, id);
  return { time: record.time, value: record.rows.map((row) => (i < 0 ? Number.NaN : row[i])) };
}

/** True or shown values of an instrument. */
export function instrumentTrace(record: RunRecord, instrument: number, which: 'truth' | 'shown'): Trace {
  return { time: record.time, value: record[which].map((row) => row[instrument]) };
}

/** Id under which what is measured or limited is recorded. */
export function recordedId(plant: Case, measured: Measured): string {
  return 'solute' in measured ? `${measured.quantity}.${plant.solutes[measured.solute].id}` : measured.quantity;
}

/** Whether two measure the same. */
export function isSameQuantity(a: Measured, b: Measured): boolean {
  if (a.quantity !== b.quantity) return false;
  return !('solute' in a && 'solute' in b) || a.solute === b.solute;
}

/** Whether a gas strength. */
export function isGasStrength(measured: Measured): measured is Extract<Measured, { solute: number }> {
  return measured.quantity === 'gas-outlet' || measured.quantity === 'gas-inlet';
}

/** mg in a cubic metre at 273.15 K and 101.325 kPa of a mole fraction; null when it is no gas strength. */
export function milligramsPerNormal(plant: Case, measured: Measured, y: number): number | null {
  if (!isGasStrength(measured) || !Number.isFinite(y)) return null;
  return (1e6 * y * plant.solutes[measured.solute].molarMass) / NORMAL_MOLAR_VOLUME;
}

/**
 * A trace of a strength on the gas that a limit refers to.
 *
 *   y_dry = y / (1 - y of solvent vapour)
 */
export function onBasis(record: RunRecord, limit: Limit, trace: Trace): Trace {
  if (limit.basis === 'wet' || !isGasStrength(limit.measured)) return trace;
  const moisture = traceOf(record, `${limit.measured.quantity}.moisture`).value;
  return { time: trace.time, value: Array.from(trace.value, (y, i) => y / (1 - moisture[i])) };
}

/** Time of the first upset, s; undefined when none came. */
export function firstUpset(record: RunRecord): number | undefined {
  return record.events.find((e) => e.kind === 'upset')?.time;
}

/** Times in which an instrument is frozen or failed, from what was done to it. */
export function badTimes(record: RunRecord, tag: string): Interval[] {
  const end = record.time[record.time.length - 1] ?? 0;
  const found: Interval[] = [];
  let from: number | undefined;
  for (const { time, actions } of record.interventions) {
    for (const action of actions) {
      if (action.kind !== 'instrument' || action.tag !== tag) continue;
      if (action.fault === 'restore') {
        if (from !== undefined && time > from) found.push({ from, to: time, open: false });
        from = undefined;
      } else if (typeof action.fault === 'string') {
        from ??= time;
      }
    }
  }
  if (from !== undefined && end > from) found.push({ from, to: end, open: true });
  return found;
}
