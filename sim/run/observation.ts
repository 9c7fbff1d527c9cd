/**
 * What a run writes down at a moment: named quantities of the plant, SI, in one order. The column must have been
 * evaluated at the state.
 */
import type { Case } from '../case/case.ts';
import type { Chain } from '../column/chain.ts';
import type { Column } from '../column/column.ts';
import { GAS_CONSTANT } from '../properties/constants.ts';
import { billetFloodVelocity } from '../transfer/billet-limits.ts';
import { stichlmairFloodVelocity } from '../transfer/stichlmair-flood.ts';

/** Dimension of a series, which decides its units for people. */
export type QuantityKind =
  | 'gas-strength'
  | 'liquid-strength'
  | 'molar-flow'
  | 'volume-flow'
  | 'pressure-difference'
  | 'temperature'
  | 'length'
  | 'volume'
  | 'velocity'
  | 'fraction';

/** A quantity that is written down. */
export interface Observed {
  readonly id: string;
  readonly label: string;
  readonly kind: QuantityKind;
  /** SI unit. */ readonly unit: string;
  /** Solute that it is about, by index. */ readonly solute: number | undefined;
}

/** Names the quantities of a record and reads them off a state. */
export interface Observer {
  readonly quantities: readonly Observed[];
  /** Index of a quantity by id; -1 when unknown. */ indexOf(id: string): number;
  /** Writes all quantities for a state just evaluated. */
  observe(t: number, y: Float64Array, out: Float64Array): void;
}

/** Builds the observer of a column. */
export function createObserver(column: Column): Observer {
  const { plant, machinery, index, outputs: op } = column;
  const solutes = plant.solutes;
  const quantities: Observed[] = [];
  const readers: ((y: Float64Array) => number)[] = [];
  const add = (
    id: string,
    label: string,
    kind: QuantityKind,
    unit: string,
    read: (y: Float64Array) => number,
    solute?: number,
  ): void => {
    quantities.push({ id, label, kind, unit, solute });
    readers.push(read);
  };
  const measured = (quantity: Case['instruments'][number]['measured']) => {
    const instrument = { tag: '', measured: quantity } as Case['instruments'][number];
    return (y: Float64Array): number => machinery.trueValue(instrument, y);
  };
  const top = column.chains[0];
  solutes.forEach((solute, k) => {
    add(
      `gas-outlet.${solute.id}`,
      `${solute.name} in the gas outlet`,
      'gas-strength',
      'mol/mol',
      measured({ quantity: 'gas-outlet', solute: k }),
      k,
    );
    add(
      `gas-inlet.${solute.id}`,
      `${solute.name} in the gas feed`,
      'gas-strength',
      'mol/mol',
      measured({ quantity: 'gas-inlet', solute: k }),
      k,
    );
    add(
      `stack-flow.${solute.id}`,
      `${solute.name} emitted at the stack`,
      'molar-flow',
      'mol/s',
      () => {
        let sum = 0;
        for (const chain of top) sum += chain.work.outputs[op.gasFlow] * chain.work.outputs[op.y + k + 1];
        return sum;
      },
      k,
    );
    add(
      `diverted-flow.${solute.id}`,
      `${solute.name} diverted`,
      'molar-flow',
      'mol/s',
      () => machinery.flows.gasDiverted * machinery.flows.feedY[k + 1],
      k,
    );
    add(
      `liquid-outlet.${solute.id}`,
      `${solute.name} in the liquid outlet`,
      'liquid-strength',
      'mol/mol',
      measured({ quantity: 'liquid-outlet', solute: k }),
      k,
    );
    add(
      `sump-strength.${solute.id}`,
      `${solute.name} in the sump`,
      'liquid-strength',
      'mol/mol',
      measured({ quantity: 'sump-strength', solute: k }),
      k,
    );
  });
  add('gas-outlet.moisture', 'solvent vapour in the gas outlet', 'fraction', 'mol/mol', () => {
    let sum = 0;
    let flow = 0;
    for (const chain of top) {
      const G = Math.abs(chain.work.outputs[op.gasFlow]) + 1e-12;
      sum += G * chain.work.outputs[op.y];
      flow += G;
    }
    return sum / flow;
  });
  add('gas-inlet.moisture', 'solvent vapour in the gas feed', 'fraction', 'mol/mol', () => machinery.flows.feedY[0]);
  add('stack-flow', 'gas at the stack', 'molar-flow', 'mol/s', () => {
    let sum = 0;
    for (const chain of top) sum += chain.work.outputs[op.gasFlow];
    return sum;
  });
  add('gas-flow', 'gas into the bed', 'molar-flow', 'mol/s', measured({ quantity: 'gas-flow' }));
  add('gas-diverted', 'gas diverted', 'molar-flow', 'mol/s', () => machinery.flows.gasDiverted);
  add('bed-dp', 'pressure drop of the bed', 'pressure-difference', 'Pa', measured({ quantity: 'bed-dp' }));
  add(
    'liquid-flow',
    'liquid to the distributor',
    'volume-flow',
    'm3/s',
    () => machinery.flows.delivery.rate + machinery.flows.emergency.rate,
  );
  add('holdup', 'mean hold-up of the bed', 'fraction', 'm3/m3', measured({ quantity: 'holdup' }));
  add('distributor-volume', 'liquid in the distributor', 'volume', 'm3', measured({ quantity: 'distributor-volume' }));
  add('sump-level', 'sump level', 'length', 'm', measured({ quantity: 'sump-level' }));
  add('sump-temperature', 'sump temperature', 'temperature', 'K', measured({ quantity: 'sump-temperature' }));
  add(
    'liquid-inlet-temperature',
    'liquid inlet temperature',
    'temperature',
    'K',
    measured({ quantity: 'liquid-inlet-temperature' }),
  );
  add(
    'liquid-outlet-temperature',
    'liquid outlet temperature',
    'temperature',
    'K',
    measured({ quantity: 'liquid-outlet-temperature' }),
  );
  add(
    'gas-inlet-temperature',
    'gas inlet temperature',
    'temperature',
    'K',
    measured({ quantity: 'gas-inlet-temperature' }),
  );
  add(
    'gas-outlet-temperature',
    'gas outlet temperature',
    'temperature',
    'K',
    measured({ quantity: 'gas-outlet-temperature' }),
  );
  add('carry-over', 'liquid carried over with the gas', 'volume-flow', 'm3/s', measured({ quantity: 'carry-over' }));
  add('pump-speed', 'pump speed', 'fraction', '1', measured({ quantity: 'pump-speed' }));
  add('make-up-flow', 'make-up', 'volume-flow', 'm3/s', measured({ quantity: 'make-up-flow' }));
  add('bleed-flow', 'bleed', 'volume-flow', 'm3/s', measured({ quantity: 'bleed-flow' }));
  add('flood-approach', 'gas velocity over the flooding velocity, worst segment', 'fraction', '1', () =>
    floodApproach(column),
  );
  add('loading', 'loading, worst segment', 'fraction', '1', () => {
    let worst = 0;
    for (const zones of column.chains) {
      for (const chain of zones) {
        for (let c = 0; c < chain.layout.cells; c++) {
          worst = Math.max(worst, chain.work.primitives[c * index.size + index.loading]);
        }
      }
    }
    return worst;
  });
  watchedCells(column).forEach(({ place, chain, cell }) => {
    const at = cell * index.size;
    add(
      `liquid-load.${place}`,
      `superficial liquid velocity, ${place} segment`,
      'velocity',
      'm/s',
      () => chain.work.primitives[at + index.demand] / chain.cell.crossSection,
    );
    add(
      `liquid-temperature.${place}`,
      `liquid temperature, ${place} segment`,
      'temperature',
      'K',
      () => chain.work.primitives[at + index.TL],
    );
    add(
      `gas-temperature.${place}`,
      `gas temperature, ${place} segment`,
      'temperature',
      'K',
      () => chain.work.primitives[at + index.TG],
    );
  });
  solutes.forEach((solute, k) => {
    add(
      `liquid-strength-highest.${solute.id}`,
      `${solute.name} in the liquid, strongest segment`,
      'liquid-strength',
      'mol/mol',
      () => {
        let most = 0;
        for (const zones of column.chains) {
          for (const chain of zones) {
            for (let c = 0; c < chain.layout.cells; c++)
              most = Math.max(most, chain.work.primitives[c * index.size + index.x + k + 1]);
          }
        }
        return most;
      },
      k,
    );
  });
  const byId = new Map(quantities.map((q, i) => [q.id, i]));
  return {
    quantities,
    indexOf: (id) => byId.get(id) ?? -1,
    observe(_t, y, out) {
      for (let i = 0; i < readers.length; i++) out[i] = readers[i](y);
    },
  };
}

/** A place in the packing that is looked at on the way. */
type WatchedPlace = 'top' | 'middle' | 'bottom';

/** Segments at which loads and temperatures are written down: of the first zone, counted over all beds. */
function watchedCells(
  column: Column,
): { readonly place: WatchedPlace; readonly chain: Chain; readonly cell: number }[] {
  const all = column.chains.flatMap(([chain]) =>
    Array.from({ length: chain.layout.cells }, (_, cell) => ({ chain, cell })),
  );
  return [
    { place: 'top', ...all[0] },
    { place: 'middle', ...all[all.length >> 1] },
    { place: 'bottom', ...all[all.length - 1] },
  ];
}

/** Gas velocity over the flooding velocity in the most loaded segment; see `segmentFloodApproach`. */
export function floodApproach(column: Column): number {
  const { index } = column;
  let worst = -1;
  let chainOf = column.chains[0][0];
  let cellOf = 0;
  for (const zones of column.chains) {
    for (const chain of zones) {
      for (let c = 0; c < chain.layout.cells; c++) {
        const loading = chain.work.primitives[c * index.size + index.loading];
        if (loading > worst) {
          worst = loading;
          chainOf = chain;
          cellOf = c;
        }
      }
    }
  }
  return segmentFloodApproach(column, chainOf, cellOf);
}

/**
 * Gas velocity over the flooding velocity at the local liquid rate in a segment: Stichlmair's flood condition, or Billet
 * and Schultes' where that hydraulics is chosen; NaN where the law has no flooding.
 */
export function segmentFloodApproach(column: Column, chainOf: Chain, cellOf: number): number {
  const { plant, index, fluids } = column;
  const { model } = plant.column.hydraulics;
  if (model !== 'stichlmair-bravo-fair' && model !== 'billet-schultes') return Number.NaN;
  const q = chainOf.work.primitives;
  const o = cellOf * index.size;
  const TL = q[o + index.TL];
  const TG = q[o + index.TG];
  const p = chainOf.pressure(cellOf);
  const { conditions, crossSection } = chainOf.cell;
  const uL = q[o + index.demand] / crossSection;
  const uG = (chainOf.work.flow[cellOf] * GAS_CONSTANT * TG) / (p * crossSection);
  if (!(uL > 0) || !(uG > 0)) return 0;
  const rhoG = (p * q[o + index.gasMass]) / (GAS_CONSTANT * TG);
  const rhoL = fluids.solventDensity(TL);
  const muG = fluids.gasViscosity(TG);
  const { packing } = plant.column.beds[chainOf.layout.bed];
  const eps = packing.voidFraction * (1 - conditions.fouling);
  if (model === 'stichlmair-bravo-fair' && packing.friction !== undefined) {
    const flood = stichlmairFloodVelocity({ a: packing.area, eps, ...packing.friction }, uL, rhoL, rhoG, muG);
    return uG / (flood * conditions.foaming);
  }
  if (packing.billet !== undefined) {
    const muL = fluids.solventViscosity(TL);
    const flood = billetFloodVelocity(
      { a: packing.area, eps },
      packing.billet.CFl,
      { rhoL, rhoV: rhoG, muL, muV: muG },
      { kind: 'velocity', value: uL },
    );
    return uG / (flood * conditions.foaming);
  }
  return Number.NaN;
}
