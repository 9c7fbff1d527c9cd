/** Balance of a run: what went in less what came out against what is stored, for every component, the carrier, energy. */
import type { Column } from '../column/column.ts';

export interface ClosureLine {
  /** Name of the component, `carrier gas` or `energy`. */ readonly component: string;
  readonly unit: 'mol' | 'J';
  /** Integrated inflow, net inflow, change of inventory, inventory at the start. */
  readonly inflow: number;
  readonly net: number;
  readonly stored: number;
  readonly inventory: number;
  /** |net - stored| / max(inflow, inventory). */ readonly error: number;
}

/** Closure that a run is built to reach, and beyond which it is called broken. */
export const CLOSURE_TARGET = 1e-6;
export const CLOSURE_LIMIT = 1e-4;

/** Inventories of solvent, solutes, carrier, energy; length components + 2. The column must have been evaluated at `y`. */
function inventories(column: Column, y: Float64Array): Float64Array {
  const { layout, machinery, index } = column;
  const { components, block } = layout;
  const sum = new Float64Array(components + 2);
  const gas = components + 1;
  for (const zones of column.chains) {
    for (const chain of zones) {
      for (let c = 0; c < chain.layout.cells; c++) {
        const at = chain.layout.first + c * block;
        let carrier = chain.work.primitives[c * index.size + index.gasMoles];
        for (let k = 0; k < components; k++) {
          sum[k] += y[at + k] + y[at + gas + k];
          carrier -= y[at + gas + k];
        }
        sum[components] += carrier;
        sum[components + 1] += y[at + components] + y[at + gas + components];
      }
    }
  }
  const vessel = (at: number): void => {
    for (let k = 0; k < components; k++) sum[k] += y[at + k];
    sum[components + 1] += y[at + components];
  };
  layout.vessel.forEach(vessel);
  vessel(layout.sump);
  layout.plenum.forEach((at, b) => {
    const plenum = machinery.plenums[b];
    if (at < 0 || plenum === undefined) return;
    vessel(at);
    let carrier = plenum.moles;
    for (let k = 0; k < components; k++) carrier -= y[at + k];
    sum[components] += carrier;
  });
  return sum;
}

/** Closure between two states of one run. */
export function closureOf(column: Column, t0: number, y0: Float64Array, t1: number, y1: Float64Array): ClosureLine[] {
  const { layout, plant } = column;
  const rates = new Float64Array(column.size);
  column.rhs(t0, y0, rates);
  const before = inventories(column, y0);
  column.rhs(t1, y1, rates);
  const after = inventories(column, y1);
  const names = [plant.solvent.name, ...plant.solutes.map((k) => k.name), 'carrier gas', 'energy'];
  return names.map((component, i): ClosureLine => {
    const net = y1[layout.netIn + i] - y0[layout.netIn + i];
    const inflow = y1[layout.grossIn + i] - y0[layout.grossIn + i];
    const stored = after[i] - before[i];
    const inventory = Math.abs(before[i]);
    const scale = Math.max(Math.abs(inflow), inventory, Number.MIN_VALUE);
    return {
      component,
      unit: i === names.length - 1 ? 'J' : 'mol',
      inflow,
      net,
      stored,
      inventory,
      error: Math.abs(net - stored) / scale,
    };
  });
}
