/** The state a scenario starts from, with the modes that belong to it. */
import type { Case, Scenario } from '../case/case.ts';
import type { Column } from '../column/column.ts';
import { fillColumn } from '../column/initial.ts';
import { ductResistance } from '../control/fan.ts';
import { GAS_CONSTANT } from '../properties/constants.ts';
import { findSteady, type SteadyOutcome } from './steady.ts';

/** Hold-up with which a steady search begins, m3/m3. */
const GUESS = 0.04;

/** Puts the machines where the initial state has them. */
export function setModes(column: Column, initial: Scenario['initial']): void {
  const { modes } = column;
  if (initial === 'steady') return;
  modes.valveCommand['gas-inlet'] = 0;
  modes.fanRunning = false;
  if (initial === 'dry') modes.pumpRunning[0] = false;
}

/**
 * A fan plant's duct resistance is what makes the design rate at the design point; found with the rate forced first.
 * Returns why not, when the fan is too small.
 */
export function fitDuct(column: Column): string | undefined {
  const { plant, machinery } = column;
  const { source, feed } = plant.gas;
  if (source.kind !== 'fan') return undefined;
  const steady = findSteadyOfForced(column, plant);
  let drop = 0;
  for (const at of column.layout.pressureDrop) drop += steady.y[at];
  const pressure = plant.column.topPressure + drop;
  const flow = (feed.rate * GAS_CONSTANT * feed.temperature) / pressure;
  machinery.ductResistance = ductResistance(source, flow, drop);
  if (machinery.ductResistance >= 0) return undefined;
  const least = drop.toPrecision(3);
  machinery.ductResistance = 0;
  return `the fan gives less than the design rate against the bed's ${least} Pa`;
}

/** Steady state at the forced design rate: two rounds of fitting the duct so that the fan just gives it. */
function findSteadyOfForced(column: Column, plant: Case): SteadyOutcome {
  const { machinery } = column;
  const { source, feed } = plant.gas;
  let outcome: SteadyOutcome | undefined;
  let drop = 0;
  for (let round = 0; round < 3; round++) {
    if (source.kind === 'fan') {
      const pressure = plant.column.topPressure + drop;
      const flow = (feed.rate * GAS_CONSTANT * feed.temperature) / pressure;
      machinery.ductResistance = Math.max(0, ductResistance(source, flow, drop));
    }
    outcome = findSteady(column, { liquidOn: true, gasOn: true, holdup: GUESS });
    drop = 0;
    for (const at of column.layout.pressureDrop) drop += outcome.y[at];
  }
  return outcome ?? findSteady(column, { liquidOn: true, gasOn: true, holdup: GUESS });
}

/** Finds the state. The column's modes are set to match. */
export function initialState(column: Column, initial: Scenario['initial']): SteadyOutcome {
  setModes(column, initial);
  if (initial === 'dry') {
    const y = new Float64Array(column.size);
    fillColumn(column, { liquidOn: false, gasOn: false, holdup: 0 }, y);
    return { kind: 'steady', y, residual: 0 };
  }
  return findSteady(column, { liquidOn: true, gasOn: initial === 'steady', holdup: GUESS });
}
