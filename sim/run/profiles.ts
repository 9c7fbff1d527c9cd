/** The column along its depth at a moment: one row for each segment, top first. The column must have been evaluated. */
import type { Chain } from '../column/chain.ts';
import type { Column } from '../column/column.ts';
import { segmentFloodApproach } from './observation.ts';

/** One segment. Mole fractions and rates by solute, in the case's order. */
export interface ProfileRow {
  /** Of the segment's middle below the top of its bed, m. */ readonly depth: number;
  /** Within its bed, from the top, from 1. */ readonly segment: number;
  /** K */ readonly liquidTemperature: number;
  /** K */ readonly gasTemperature: number;
  /** m3/m3 */ readonly holdup: number;
  /** Superficial, leaving the segment, m/s. */ readonly liquidVelocity: number;
  /** Entering from below, mol/s. */ readonly gasFlow: number;
  /** Mole fractions of the gas: solvent vapour, then solutes. */ readonly moisture: number;
  readonly gas: readonly number[];
  /** Mole fractions of the liquid. */ readonly liquid: readonly number[];
  /** From gas to liquid, mol/(m3 s). */ readonly transfer: readonly number[];
  /** Pa/m */ readonly pressureGradient: number;
  /** Hold-up feedback, 1 at the flood point. */ readonly loading: number;
  /** Gas velocity over the flooding velocity; null where the law has no flooding. */
  readonly floodApproach: number | null;
}

/** Rows of one zone of one bed. */
export interface BedProfile {
  /** From the top, from 1. */ readonly bed: number;
  readonly zone: number;
  readonly rows: readonly ProfileRow[];
}

/** All beds at a moment. */
export interface Profile {
  /** s */ readonly time: number;
  readonly beds: readonly BedProfile[];
}

/** The profile of a column just evaluated at t. */
export function profileOf(column: Column, t: number): Profile {
  const beds = column.chains.flatMap((zones, b) =>
    zones.map((chain, z) => ({
      bed: b + 1,
      zone: z + 1,
      rows: Array.from({ length: chain.layout.cells }, (_, c) => rowOf(column, chain, c)),
    })),
  );
  return { time: t, beds };
}

function rowOf(column: Column, chain: Chain, c: number): ProfileRow {
  const { index, layout } = column;
  const { height, crossSection } = chain.cell;
  const q = chain.work.primitives;
  const o = c * index.size;
  const volume = crossSection * height;
  const solutes = Array.from({ length: layout.solutes }, (_, k) => k + 1);
  const approach = segmentFloodApproach(column, chain, c);
  return {
    depth: (c + 0.5) * height,
    segment: c + 1,
    liquidTemperature: q[o + index.TL],
    gasTemperature: q[o + index.TG],
    holdup: q[o + index.holdup],
    liquidVelocity: q[o + index.demand] / crossSection,
    gasFlow: chain.work.flow[c],
    moisture: q[o + index.y],
    gas: solutes.map((k) => q[o + index.y + k]),
    liquid: solutes.map((k) => q[o + index.x + k]),
    transfer: solutes.map((k) => q[o + index.transfer + k] / volume),
    pressureGradient: q[o + index.pressureDrop] / height,
    loading: q[o + index.loading],
    floodApproach: Number.isFinite(approach) ? approach : null,
  };
}
