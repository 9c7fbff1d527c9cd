// Hand-made records for tests: the acetone case's words, with limits and rows of the test's own.

import type { Case, Limit, Scenario } from '../../sim/case/case.ts';
import type { RunEvent } from '../../sim/run/events.ts';
import type { RunRecord } from '../../sim/run/run-record.ts';
import type { Intervention } from '../../sim/run/simulate.ts';
import { caseText, mustRead } from '../case/support.ts';

/** What a test writes down. Quantities and instruments that are not named stand at `rest`. */
export interface HandMade {
  readonly time: readonly number[];
  readonly quantities?: Readonly<Record<string, readonly number[]>>;
  readonly shown?: Readonly<Record<string, readonly number[]>>;
  readonly truth?: Readonly<Record<string, readonly number[]>>;
  readonly limits?: readonly Limit[];
  readonly events?: readonly RunEvent[];
  readonly interventions?: readonly Intervention[];
  readonly scenario?: Partial<Scenario>;
  readonly plant?: Partial<Case>;
}

const acetone = mustRead(caseText('acetone-absorber'));

/** Quantities that every hand-made record has; more come with what a test names. */
const ALWAYS = ['gas-outlet.acetone', 'gas-outlet.moisture', 'stack-flow.acetone', 'stack-flow', 'bed-dp'];

/** A record of the acetone case. */
export function handMade(given: HandMade): RunRecord {
  const { time, quantities = {}, shown = {}, truth = {} } = given;
  const plant: Case = { ...acetone, limits: given.limits ?? [], ...given.plant };
  const first = plant.scenarios[0]!;
  const ids = [...new Set([...ALWAYS, ...Object.keys(quantities)])];
  const rows = (of: Readonly<Record<string, readonly number[]>>, names: readonly string[]): Float64Array[] =>
    time.map((_, i) => Float64Array.from(names.map((name) => of[name]?.[i] ?? 0)));
  const tags = plant.instruments.map((i) => i.tag);
  return {
    plant,
    scenario: { ...first, interlocksInService: 'all', ...given.scenario },
    time,
    quantities: ids.map((id) => ({
      id,
      label: id === 'gas-outlet.acetone' ? 'acetone in the gas outlet' : id,
      kind: id === 'bed-dp' ? 'pressure-difference' : 'gas-strength',
      unit: id === 'bed-dp' ? 'Pa' : 'mol/mol',
      solute: undefined,
    })),
    rows: rows(quantities, ids),
    truth: rows(truth, tags),
    shown: rows(shown, tags),
    events: given.events ?? [],
    interventions: given.interventions ?? [],
  };
}

/** A limit on acetone in the gas outlet, mole fraction. */
export function outletLimit(value: number, more: Partial<Limit> = {}): Limit {
  return {
    id: 'outlet',
    measured: { quantity: 'gas-outlet', solute: 0 },
    kind: 'max',
    value,
    averaging: { kind: 'none' },
    basis: 'wet',
    unit: 'ppmv',
    ...more,
  };
}

/** An upset at a time. */
export function upsetAt(time: number, text = 'P-310A trips'): RunEvent {
  return { time, kind: 'upset', tag: 'trip', text };
}
