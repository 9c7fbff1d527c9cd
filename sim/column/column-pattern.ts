/**
 * Which state's rate depends on which state: the pattern of the column's Jacobian, and where its blocks lie in it.
 * A liquid row sees two cells above and one below, a gas row one above and two below (the faces' three means), the
 * pressures, and at the ends of a chain the vessels and supplies that feed it. Outer rows are core and accumulators.
 */
import type { Case } from '../case/case.ts';
import { createPatternBuilder, type SparsePattern } from '../numerics/sparse-pattern.ts';
import type { Layout } from './layout.ts';

/** What an outer row reads of the chains. */
export interface OuterReads {
  /** Beds whose top outputs, bottom outputs, sums over the bed (heat, hold-up), top cell's supply, bottom gas inflow it reads. */
  readonly top: readonly number[];
  readonly bottom: readonly number[];
  readonly sums: readonly number[];
  /** Beds whose pressure drop it reads. */ readonly drops: readonly number[];
  readonly supply: readonly number[];
  readonly inflow: readonly number[];
}

/** Cells at a chain's end that its end face reads. */
const END_CELLS = 3;

export interface ColumnPattern {
  readonly pattern: SparsePattern;
  /** Core columns that the gas inlet, and the liquid inlet, of bed b depend on. */
  readonly gasInletColumns: readonly (readonly number[])[];
  readonly liquidInletColumns: readonly (readonly number[])[];
  readonly outerReads: readonly OuterReads[];
  /** Lowest and highest cell that row r of cell c reads. */
  span(r: number, c: number, cells: number): readonly [number, number];
}

const NOTHING: OuterReads = { top: [], bottom: [], sums: [], drops: [], supply: [], inflow: [] };

/** What each outer row (core, then accumulators) reads of the chains. */
function outerReads(plant: Case, layout: Layout): OuterReads[] {
  const beds = plant.column.beds.length;
  const last = beds - 1;
  const all = plant.column.beds.map((_, b) => b);
  const reads: OuterReads[] = new Array<OuterReads>(layout.coreSize + layout.accumulatorSize).fill(NOTHING);
  const set = (state: number, what: Partial<OuterReads>): void => {
    reads[state - layout.coreFirst] = { ...NOTHING, ...what };
  };
  const { components } = layout;
  for (let b = 1; b < beds; b++) {
    for (let k = 0; k <= components; k++) {
      set(layout.vessel[b] + k, { bottom: [b - 1], supply: [b] });
      set(layout.plenum[b] + k, { top: [b], inflow: [b - 1] });
    }
  }
  for (const b of all) {
    set(layout.pressureDrop[b], { drops: [b] });
    // The split reads each zone's own drop.
    if (layout.gasShare[b] >= 0) set(layout.gasShare[b], { sums: [b] });
  }
  for (let k = 0; k <= components; k++) set(layout.sump + k, { bottom: [last] });
  plant.instruments.forEach((instrument, i) => {
    const at = layout.instruments[i];
    if (at < 0) return;
    switch (instrument.measured.quantity) {
      case 'gas-outlet':
      case 'gas-outlet-temperature':
        set(at, { top: [0] });
        break;
      case 'liquid-outlet':
      case 'liquid-outlet-temperature':
        set(at, { bottom: [last] });
        break;
      case 'bed-dp':
        set(at, { drops: all });
        break;
      case 'holdup':
        set(at, { sums: all });
        break;
      case 'carry-over':
        set(at, { supply: [0] });
        break;
      case 'gas-inlet':
      case 'sump-strength':
      case 'liquid-flow':
      case 'gas-flow':
      case 'sump-level':
      case 'sump-temperature':
      case 'liquid-inlet-temperature':
      case 'gas-inlet-temperature':
      case 'distributor-volume':
      case 'flood-approach':
      case 'pump-speed':
      case 'make-up-flow':
      case 'bleed-flow':
        break;
    }
  });
  for (let k = 0; k < components; k++) {
    set(layout.netIn + k, { top: [0], supply: [0] });
    set(layout.stack + k, { top: [0] });
  }
  set(layout.netIn + components, { top: [0] });
  set(layout.netIn + components + 1, { top: [0], supply: [0], sums: all });
  set(layout.carryOver, { supply: [0] });
  return reads;
}

/** States that nothing else reads: accumulators, and the lags of instruments that no controller uses. */
export function leafStates(plant: Case, layout: Layout): ReadonlySet<number> {
  const leaves = new Set<number>();
  const used = new Set(plant.controllers.map((c) => c.instrument));
  plant.instruments.forEach((instrument, i) => {
    if (layout.instruments[i] >= 0 && !used.has(instrument.tag)) leaves.add(layout.instruments[i]);
  });
  for (let i = 0; i < layout.accumulatorSize; i++) leaves.add(layout.accumulatorFirst + i);
  return leaves;
}

/** Builds the pattern. */
export function createColumnPattern(plant: Case, layout: Layout, passThrough: boolean): ColumnPattern {
  const { block, components, size } = layout;
  const beds = plant.column.beds.length;
  const builder = createPatternBuilder(size + layout.auxiliary);
  const liquidRows = components + 1;
  const span = (r: number, c: number, cells: number): readonly [number, number] =>
    r < liquidRows
      ? [Math.max(0, c - 2), Math.min(cells - 1, c + 1)]
      : [Math.max(0, c - 1), Math.min(cells - 1, c + 2)];
  const pressures = (b: number): number[] => [layout.topPressure, ...layout.pressureDrop.slice(0, b + 1)];
  const states = (at: number): number[] => Array.from({ length: components + 1 }, (_, k) => at + k);
  const gasInletColumns = plant.column.beds.map((_, b) => {
    const share = layout.gasShare[b] >= 0 ? [layout.gasShare[b]] : [];
    if (b === beds - 1) {
      return [
        layout.gasFlow,
        layout.valves['gas-inlet'],
        layout.valves.diversion,
        ...share,
        layout.topPressure,
        ...layout.pressureDrop,
      ];
    }
    return [...states(layout.plenum[b + 1]), ...share, layout.topPressure, ...layout.pressureDrop.slice(0, b + 2)];
  });
  const liquidInletColumns = plant.column.beds.map((_, b) => {
    if (b > 0 || !passThrough) return states(layout.vessel[b]);
    return [...layout.pumpSpeed, layout.valves.solvent, layout.valves['emergency-water'], ...states(layout.sump)];
  });
  for (const chain of layout.chains) {
    const { bed, cells, first, firstFlow } = chain;
    for (let c = 0; c < cells; c++) {
      for (let r = 0; r < block; r++) {
        const row = first + c * block + r;
        const [low, high] = span(r, c, cells);
        for (let j = low; j <= high; j++) {
          for (let s = 0; s < block; s++) builder.add(row, first + j * block + s);
          builder.add(row, size + firstFlow + j + 1);
        }
        for (const column of pressures(bed)) builder.add(row, column);
        if (r < liquidRows && c <= 1) for (const column of liquidInletColumns[bed]) builder.add(row, column);
        if (r >= liquidRows && c >= cells - 2) for (const column of gasInletColumns[bed]) builder.add(row, column);
      }
      // The flow out of the cell: by the flow in, transfer, heat, the temperatures of its two faces, and the liquid that
      // comes and goes and so takes or gives gas space.
      for (let r = block - components - 1; r < block; r++) builder.add(first + c * block + r, size + firstFlow + c);
      const row = size + firstFlow + c;
      builder.add(row, row + 1);
      for (const column of pressures(bed)) builder.add(row, column);
      for (let b = 0; b <= bed; b++) builder.add(row, size + layout.firstDrop + b);
      for (let j = Math.max(0, c - 2); j <= Math.min(cells - 1, c + 2); j++) {
        for (let s = 0; s < block; s++) builder.add(row, first + j * block + s);
        builder.add(row, size + firstFlow + j + 1);
      }
      if (c <= 1) for (const column of liquidInletColumns[bed]) builder.add(row, column);
      if (c >= cells - 2) for (const column of gasInletColumns[bed]) builder.add(row, column);
    }
    const row = size + firstFlow + cells;
    for (const column of gasInletColumns[bed]) builder.add(row, column);
    for (const below of layout.chains) {
      if (below.bed === bed + 1) builder.add(row, size + below.firstFlow);
    }
  }
  for (const chain of layout.chains) {
    const row = size + layout.firstDrop + chain.bed;
    for (let c = 0; c < chain.cells; c++) {
      for (let s = 0; s < block; s++) builder.add(row, chain.first + c * block + s);
      builder.add(row, size + chain.firstFlow + c + 1);
    }
    for (const column of pressures(chain.bed)) builder.add(row, column);
    for (let b = 0; b <= chain.bed; b++) builder.add(row, size + layout.firstDrop + b);
  }
  const reads = outerReads(plant, layout);
  const leaves = leafStates(plant, layout);
  reads.forEach((what, i) => {
    const row = layout.coreFirst + i;
    builder.add(row, row);
    for (let j = 0; j < layout.coreSize; j++) {
      if (!leaves.has(layout.coreFirst + j)) builder.add(row, layout.coreFirst + j);
    }
    for (const b of what.drops) builder.add(row, size + layout.firstDrop + b);
    for (const chain of layout.chains) {
      const cell = (c: number): void => {
        for (let s = 0; s < block; s++) builder.add(row, chain.first + c * block + s);
        builder.add(row, size + chain.firstFlow + c + 1);
      };
      if (what.sums.includes(chain.bed)) for (let c = 0; c < chain.cells; c++) cell(c);
      if (what.top.includes(chain.bed)) {
        builder.add(row, size + chain.firstFlow);
        for (let c = 0; c < END_CELLS; c++) cell(c);
      }
      if (what.bottom.includes(chain.bed)) for (let c = chain.cells - END_CELLS; c < chain.cells; c++) cell(c);
      if (what.supply.includes(chain.bed)) cell(0);
      if (what.inflow.includes(chain.bed)) builder.add(row, size + chain.firstFlow + chain.cells);
    }
  });
  return { pattern: builder.build(), gasInletColumns, liquidInletColumns, outerReads: reads, span };
}
