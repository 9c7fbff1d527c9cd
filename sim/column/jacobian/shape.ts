/**
 * What all parts of the column's Jacobian share: the column they differentiate, and the sizes of what they keep.
 */
import type { Case } from '../../case/case.ts';
import type { Chain } from '../chain.ts';
import type { Fluids } from '../fluids.ts';
import type { Layout } from '../layout.ts';
import type { Plant } from '../plant.ts';
import type { InputPorts, OutputPorts } from '../ports.ts';
import type { Primitives } from '../primitives.ts';

/** The column as the Jacobian sees it. */
export interface ColumnJacobianParts {
  readonly plant: Case;
  readonly layout: Layout;
  readonly fluids: Fluids;
  /** By bed, then zone. */ readonly chains: readonly (readonly Chain[])[];
  readonly machinery: Plant;
  readonly index: Primitives;
  readonly inputs: InputPorts;
  readonly outputs: OutputPorts;
  /** Of the solvent, m3/mol, against K. */ readonly molarVolume: (T: number) => number;
  /** Typical magnitude of each state. */ readonly scales: Float64Array;
}

/** The parts, with sizes derived from them. */
export interface Shape extends ColumnJacobianParts {
  readonly isothermal: boolean;
  /** Fluxes through a face: K + 1 components, then enthalpy; as many rows has each phase of a cell. */
  readonly fluxes: number;
  /** A row of slopes: to the cell's own states, then to the gas flow that enters it, then to its pressure. */
  readonly columns: number;
  readonly flowColumn: number;
  readonly pressureColumn: number;
  /** Rows outside the chains: core, then accumulators. */ readonly outerSize: number;
}

/** Relative step of the differences; their error is some 1e-7 of an entry. */
export const STEP = 1e-7;

export function shapeOf(parts: ColumnJacobianParts): Shape {
  const { layout } = parts;
  return {
    ...parts,
    isothermal: parts.plant.column.isothermal,
    fluxes: layout.components + 1,
    columns: layout.block + 2,
    flowColumn: layout.block,
    pressureColumn: layout.block + 1,
    outerSize: layout.coreSize + layout.accumulatorSize,
  };
}
