/**
 * Names to offsets: the one owner of the state vector's order.
 *
 *   [ cells of chain 0, top to bottom | cells of chain 1 | ... | core (plant) | accumulators ]
 *
 * A chain is one zone of one bed. A cell holds `block` states in this order (k = 0 solvent, 1..K solutes):
 *   liquid moles n_0..n_K, enthalpy of liquid and packing, gas moles m_0..m_K (solvent vapour, solutes), gas enthalpy.
 * The linear systems carry one auxiliary unknown more for each face of a chain, 0 at the top: the gas flow through
 * it; and one for each bed: its pressure drop.
 */
import type { Case } from '../case/case.ts';

export interface ChainLayout {
  readonly bed: number;
  readonly zone: number;
  readonly cells: number;
  /** State offset of the top cell. */ readonly first: number;
  /** Auxiliary offset (after all states) of the gas flow through the top face. */ readonly firstFlow: number;
}

export interface Layout {
  readonly solutes: number;
  /** Transferring components: solvent and solutes. */ readonly components: number;
  /** States of a cell: 2 components + 2. */ readonly block: number;
  readonly chains: readonly ChainLayout[];
  readonly coreFirst: number;
  readonly coreSize: number;
  readonly accumulatorFirst: number;
  readonly accumulatorSize: number;
  /** States in all. */ readonly size: number;
  readonly auxiliary: number;
  /** Auxiliary offset (after all states) of the first bed's pressure drop. */ readonly firstDrop: number;
  /** Core offsets (absolute). Liquid vessel above bed b: n_0..n_K, enthalpy. */
  readonly vessel: readonly number[];
  /** Gas space below bed b - 1 and above bed b (b >= 1): m_0..m_K, enthalpy; -1 for b = 0. */
  readonly plenum: readonly number[];
  /** Lagged pressure drop of bed b. */ readonly pressureDrop: readonly number[];
  /** Lagged pressure at the top of the column. */ readonly topPressure: number;
  /** Gas share of zone 0 in bed b; -1 with one zone. */ readonly gasShare: readonly number[];
  readonly sump: number;
  readonly gasFlow: number;
  readonly fanSpeed: number;
  readonly pumpSpeed: readonly [number, number];
  /** Valve positions. */
  readonly valves: Readonly<
    Record<
      'solvent' | 'drain' | 'gas-inlet' | 'diversion' | 'make-up' | 'bleed' | 'emergency-water' | 'gas-damper',
      number
    >
  >;
  readonly controllers: readonly number[];
  /** Lag state of each instrument; -1 when it has no lag. */ readonly instruments: readonly number[];
  /** Accumulators, see `accumulators.ts`: first of each group. */
  readonly netIn: number;
  readonly grossIn: number;
  readonly stack: number;
  readonly diverted: number;
  readonly carryOver: number;
}

/** Lays the states of a case out. */
export function createLayout(plant: Case): Layout {
  const solutes = plant.solutes.length;
  const components = solutes + 1;
  const block = 2 * components + 2;
  const zones = plant.column.distribution === undefined ? 1 : 2;
  const chains: ChainLayout[] = [];
  let next = 0;
  let flow = 0;
  plant.column.beds.forEach((bed, b) => {
    for (let zone = 0; zone < zones; zone++) {
      chains.push({ bed: b, zone, cells: bed.segments, first: next, firstFlow: flow });
      next += bed.segments * block;
      flow += bed.segments + 1;
    }
  });
  const firstDrop = flow;
  const auxiliary = flow + plant.column.beds.length;
  const coreFirst = next;
  const take = (count: number): number => {
    const at = next;
    next += count;
    return at;
  };
  const beds = plant.column.beds;
  const vessel = beds.map(() => take(components + 1));
  const plenum = beds.map((_, b) => (b === 0 ? -1 : take(components + 1)));
  const pressureDrop = beds.map(() => take(1));
  const topPressure = take(1);
  const gasShare = beds.map(() => (zones === 2 ? take(1) : -1));
  const sump = take(components + 1);
  const gasFlow = take(1);
  const fanSpeed = take(1);
  const pumpSpeed: [number, number] = [take(1), take(1)];
  const valves = {
    solvent: take(1),
    drain: take(1),
    'gas-inlet': take(1),
    diversion: take(1),
    'make-up': take(1),
    bleed: take(1),
    'emergency-water': take(1),
    'gas-damper': take(1),
  };
  const controllers = plant.controllers.map(() => take(1));
  const instruments = plant.instruments.map((i) => (i.lag > 0 ? take(1) : -1));
  const coreSize = next - coreFirst;
  const accumulatorFirst = next;
  const netIn = take(components + 2); // solvent, solutes, carrier, energy
  const grossIn = take(components + 2);
  const stack = take(components);
  const diverted = take(components);
  const carryOver = take(1);
  return {
    solutes,
    components,
    block,
    chains,
    coreFirst,
    coreSize,
    accumulatorFirst,
    accumulatorSize: next - accumulatorFirst,
    size: next,
    auxiliary,
    firstDrop,
    vessel,
    plenum,
    pressureDrop,
    topPressure,
    gasShare,
    sump,
    gasFlow,
    fanSpeed,
    pumpSpeed,
    valves,
    controllers,
    instruments,
    netIn,
    grossIn,
    stack,
    diverted,
    carryOver,
  };
}
