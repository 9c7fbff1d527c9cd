/**
 * What the chains' inputs and the outer rates owe to the core's states: by differences through the two halves of the
 * plant, the chains' outputs standing still.
 */
import type { Chain } from '../chain.ts';
import { leafStates } from '../column-pattern.ts';
import { STEP, type Shape } from './shape.ts';

export interface CoreSlopes {
  /** Outer rates where the plant has been evaluated, indexed as states. */ readonly rates: Float64Array;
  /** d(input u)/d(core state j) of chain i, [u coreSize + j]. Pressures have none: they act through the cells. */
  readonly gains: readonly Float64Array[];
  /** Takes the differences, and adds the outer rows' slopes to `values`. Leaves plant and inputs as they were. */
  take(t: number, y: Float64Array, values: Float64Array): void;
}

/**
 * @param chains - All chains, in the layout's order.
 * @param entries - Of outer rows at the core's states, see `coreEntries`.
 */
export function createCoreSlopes(shape: Shape, chains: readonly Chain[], entries: Int32Array): CoreSlopes {
  const { layout, machinery, scales, inputs: ip, outerSize } = shape;
  const { coreSize, coreFirst } = layout;
  const rates = new Float64Array(layout.size);
  const moved = new Float64Array(layout.size);
  const gains = chains.map(() => new Float64Array(ip.size * coreSize));
  const kept = chains.map(() => new Float64Array(ip.size));
  const leaves = leafStates(shape.plant, layout);
  const isLeaf = Uint8Array.from({ length: coreSize }, (_, j) => (leaves.has(coreFirst + j) ? 1 : 0));

  const restoreInputs = (): void => {
    for (let i = 0; i < chains.length; i++) chains[i].work.inputs.set(kept[i]);
  };

  /** Slopes of the chains' inputs to core state j, which has been moved by 1/per. */
  const noteInputs = (j: number, per: number): void => {
    for (let i = 0; i < chains.length; i++) {
      const u = chains[i].work.inputs;
      const before = kept[i];
      const g = gains[i];
      for (let n = 0; n < ip.differentiated; n++) g[n * coreSize + j] = (u[n] - before[n]) * per;
      g[ip.topPressure * coreSize + j] = 0;
      g[ip.pressureDrop * coreSize + j] = 0;
    }
  };

  const addOuter = (values: Float64Array, j: number, per: number): void => {
    for (let o = 0; o < outerSize; o++) {
      const slope = (moved[coreFirst + o] - rates[coreFirst + o]) * per;
      if (slope !== 0) values[entries[o * coreSize + j]] += slope;
    }
  };

  return {
    rates,
    gains,
    take(t, y, values) {
      machinery.rates(y, rates);
      for (let i = 0; i < chains.length; i++) kept[i].set(chains[i].work.inputs);
      // Leaves first, while the plant is as it was: nothing in it reads them.
      for (let pass = 1; pass >= 0; pass--) {
        for (let j = 0; j < coreSize; j++) {
          if (isLeaf[j] !== pass) continue;
          const at = coreFirst + j;
          const value = y[at];
          y[at] = value + STEP * (Math.abs(value) + scales[at]);
          const per = 1 / (y[at] - value);
          if (pass === 0) {
            machinery.prepare(t, y);
            noteInputs(j, per);
            restoreInputs();
          }
          machinery.rates(y, moved);
          y[at] = value;
          addOuter(values, j, per);
        }
      }
      machinery.prepare(t, y);
      restoreInputs();
    },
  };
}
