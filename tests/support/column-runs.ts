/** Marching a column through a test: steady states, steps in time, what leaves it. */
import type { Case } from '../../sim/case/case.ts';
import type { Column } from '../../sim/column/column.ts';
import { createColumn } from '../../sim/column/column.ts';
import { fillColumn, type StartingState } from '../../sim/column/initial.ts';
import { closureOf } from '../../sim/run/closure.ts';
import { createColumnStepper, type MethodName } from '../../sim/run/integrators.ts';
import { findSteady } from '../../sim/run/steady.ts';

/** What leaves a column at one time. */
export interface Outlet {
  /** Mole fractions of the solutes in the gas; flow, mol/s; temperature, K. */
  readonly y: readonly number[];
  readonly G: number;
  readonly TG: number;
  /** Concentrations in the liquid, mol/m3; flow out of the bed, m3/s; temperature, K. */
  readonly c: readonly number[];
  readonly L: number;
  readonly TL: number;
  /** Pressure drop, Pa; liquid in the beds, m3; sent over the top, m3/s. */
  readonly drop: number;
  readonly held: number;
  readonly carryOver: number;
}

/** Outlets of zone 0 (gas: top bed; liquid: bottom bed) with flows, drops and hold-ups of all. */
export function outletAt(column: Column, t: number, y: Float64Array): Outlet {
  const rates = new Float64Array(column.size);
  column.rhs(t, y, rates);
  const { outputs: op, chains, layout } = column;
  const top = chains[0]!;
  const bottom = chains.at(-1)!;
  const o = top[0]!.work.outputs;
  const b = bottom[0]!.work.outputs;
  const sum = (zones: (typeof chains)[number], i: number): number => zones.reduce((s, z) => s + z.work.outputs[i]!, 0);
  const all = chains.flat();
  return {
    y: Array.from({ length: layout.solutes }, (_, k) => o[op.y + 1 + k]!),
    G: sum(top, op.gasFlow),
    TG: o[op.TG]!,
    c: Array.from({ length: layout.solutes }, (_, k) => b[op.concentration + k]!),
    L: sum(bottom, op.liquidFlow),
    TL: b[op.TL]!,
    drop: chains.reduce((s, zones) => s + sum(zones, op.pressureDrop) / zones.length, 0),
    held: sum(all, op.liquidHeld),
    carryOver: column.machinery.flows.carryOver,
  };
}

/** The steady state of a column, or an error that fails the test. */
export function steadyOf(column: Column, start: Partial<StartingState> = {}): Float64Array {
  const outcome = findSteady(column, { liquidOn: true, gasOn: true, holdup: 0.04, ...start });
  if (outcome.kind !== 'steady') throw new Error(`no steady state: ${outcome.kind}`);
  return outcome.y;
}

/** Column and steady state of a case. */
export function settled(plant: Case): { column: Column; y: Float64Array; outlet: Outlet } {
  const column = createColumn(plant);
  const y = steadyOf(column);
  return { column, y, outlet: outletAt(column, 0, y) };
}

/** Something that happens to a column at a time. */
export interface Event {
  readonly at: number;
  readonly act: (column: Column) => void;
}

export interface MarchOptions {
  readonly rtol?: number;
  readonly method?: MethodName;
  readonly events?: readonly Event[];
  readonly maxSteps?: number;
  readonly maxStep?: number;
}

/**
 * Integrates from t = 0 and calls `see` at each of the times (ascending, the last one is the end).
 *
 * @returns The state at the end. Throws when the integration fails.
 */
export function march(
  column: Column,
  start: Float64Array,
  times: readonly number[],
  see: (t: number, y: Float64Array) => void,
  options: MarchOptions = {},
): Float64Array {
  const { rtol = 1e-6, method = 'rodas4', events = [], maxSteps = 50_000, maxStep = Infinity } = options;
  const stepper = createColumnStepper(column, { method, rtol, maxSteps, maxStep });
  const end = times.at(-1) ?? 0;
  const stops = [...events.map((e) => e.at).filter((t) => t > 0 && t < end), end];
  const row = new Float64Array(column.size);
  for (const e of events) if (e.at <= 0) e.act(column);
  stepper.start(0, start);
  let next = 0;
  while (next < times.length && times[next]! <= 0) see(times[next++]!, start);
  for (const stop of stops) {
    for (;;) {
      const outcome = stepper.step(stop);
      if (outcome.kind === 'failed') {
        throw new Error(`stopped at ${stepper.t} s: ${JSON.stringify(outcome.failure)}`);
      }
      while (next < times.length && times[next]! <= stepper.t) {
        stepper.interpolate(times[next]!, row);
        see(times[next++]!, row);
      }
      if (outcome.kind === 'reached-stop') break;
    }
    const here = Float64Array.from(stepper.y);
    const due = events.filter((e) => e.at === stop);
    if (due.length > 0) {
      for (const e of due) e.act(column);
      stepper.start(stop, here);
    }
  }
  return Float64Array.from(stepper.y);
}

/** Evenly spaced times from 0 to the end. */
export function evenly(end: number, spacing: number): number[] {
  return Array.from({ length: Math.round(end / spacing) + 1 }, (_, i) => Math.min(end, i * spacing));
}

/** Worst closure over components, carrier and energy between two states of one run that began with accumulators at 0. */
export function worstClosure(column: Column, before: Float64Array, after: Float64Array): number {
  return Math.max(...closureOf(column, 0, before, 0, after).map((line) => line.error));
}

/** Fills a column instead of searching its steady state. */
export function filled(column: Column, start: StartingState): Float64Array {
  const y = new Float64Array(column.size);
  fillColumn(column, start, y);
  return y;
}
