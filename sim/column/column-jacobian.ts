/**
 * Jacobian of the column. The local part (what a cell's primitives owe to its own states, gas flow and pressure) is
 * taken by differences, one cell at a time: some eight evaluations of a cell instead of the dozens of whole right-hand
 * sides that coloured differences would cost. The face part is exact. The plant is differenced through its two halves.
 * Left out: the thermal expansion of the liquid in the gas that a growing gas space takes in.
 */
import type { Case } from '../case/case.ts';
import { entryIndex, type SparsePattern } from '../numerics/sparse-pattern.ts';
import type { Chain } from './chain.ts';
import { createColumnPattern } from './column-pattern.ts';
import { inletFace, interiorFace, outletFace, type FaceValue } from './face-value.ts';
import { DATUM_TEMPERATURE, type Fluids } from './fluids.ts';
import type { Layout } from './layout.ts';
import { PRESSURE_LAG, type Plant } from './plant.ts';
import type { InputPorts, OutputPorts } from './ports.ts';
import { NO_LIMIT, type Primitives } from './primitives.ts';

export interface ColumnJacobianParts {
  readonly plant: Case;
  readonly layout: Layout;
  readonly fluids: Fluids;
  readonly chains: readonly (readonly Chain[])[];
  readonly machinery: Plant;
  readonly index: Primitives;
  readonly inputs: InputPorts;
  readonly outputs: OutputPorts;
  readonly molarVolume: (T: number) => number;
  readonly scales: Float64Array;
}

export interface ColumnJacobian {
  readonly pattern: SparsePattern;
  /** At a state that the column has just been evaluated at. */
  readonly fill: (t: number, y: Float64Array, values: Float64Array) => void;
}

/** Relative step of the differences; their error is some 1e-7 of an entry. */
const STEP = 1e-7;
/** Share of a state's typical magnitude below which the step does not follow it down. */
const FLOOR = 0.01;

/** Positions of one chain's blocks in the values. */
interface ChainPositions {
  /** By (row in chain) * 5 + (cell - own cell + 2): start of the block's columns, or -1; and the gas flow's column. */
  readonly block: Int32Array;
  readonly flow: Int32Array;
  /** By row: position of the top pressure and of each pressure drop of beds 0..bed. */
  readonly pressure: Int32Array;
  /** Gas rows of the top cell: the flow through the top face. */ readonly topFlow: Int32Array;
  /** By flow row (face 0..N): own; blocks of cells face - 2..face + 2 and the flows into them; pressures. */
  readonly flowOwn: Int32Array;
  readonly flowInto: Int32Array;
  readonly flowBlock: Int32Array;
  readonly flowPressure: Int32Array;
}

export function createColumnJacobian(parts: ColumnJacobianParts): ColumnJacobian {
  const { plant, layout, fluids, machinery, index, inputs: ip, outputs: op, scales } = parts;
  const { block, components, size } = layout;
  const K = layout.solutes;
  const chains = parts.chains.flat();
  const structure = createColumnPattern(plant, layout, machinery.passThrough);
  const { pattern, outerReads, gasInletColumns, liquidInletColumns } = structure;
  const liquidRows = components + 1;
  const fluxes = components + 1;
  const { isothermal } = plant.column;
  const { liquidHeat, vapourHeat, vaporisation, soluteVolume, carrierHeat } = fluids;
  const columns = block + 2; // own states, gas flow, pressure
  const FLOW = block;
  const PRESSURE = block + 1;
  const P = index.size;
  /** Primitives that have slopes. */
  const M = index.differentiated;
  const at = (row: number, column: number): number => entryIndex(pattern, row, column);
  const coreSize = layout.coreSize;
  const outerSize = coreSize + layout.accumulatorSize;

  const positions: ChainPositions[] = chains.map(({ layout: chain }) => {
    const rows = chain.cells * block;
    const blockAt = new Int32Array(rows * 5).fill(-1);
    const flowAt = new Int32Array(rows * 5).fill(-1);
    const drops = chain.bed + 2;
    const pressure = new Int32Array(rows * drops);
    const flowOwn = new Int32Array(chain.cells + 1);
    const flowInto = new Int32Array(chain.cells * 5).fill(-1);
    const flowBlock = new Int32Array(chain.cells * 5).fill(-1);
    const flowPressure = new Int32Array(chain.cells * drops);
    const topFlow = Int32Array.from({ length: block }, (_, r) => at(chain.first + r, size + chain.firstFlow));
    const pressureColumn = (i: number): number => (i === 0 ? layout.topPressure : layout.pressureDrop[i - 1]);
    for (let c = 0; c < chain.cells; c++) {
      for (let r = 0; r < block; r++) {
        const local = c * block + r;
        const row = chain.first + local;
        for (let j = Math.max(0, c - 2); j <= Math.min(chain.cells - 1, c + 2); j++) {
          blockAt[local * 5 + j - c + 2] = at(row, chain.first + j * block);
          flowAt[local * 5 + j - c + 2] = at(row, size + chain.firstFlow + j + 1);
        }
        for (let i = 0; i < drops; i++) pressure[local * drops + i] = at(row, pressureColumn(i));
      }
      const row = size + chain.firstFlow + c;
      flowOwn[c] = at(row, row);
      for (let j = Math.max(0, c - 2); j <= Math.min(chain.cells - 1, c + 2); j++) {
        flowBlock[c * 5 + j - c + 2] = at(row, chain.first + j * block);
        flowInto[c * 5 + j - c + 2] = at(row, size + chain.firstFlow + j + 1);
      }
      for (let i = 0; i < drops; i++) flowPressure[c * drops + i] = at(row, pressureColumn(i));
    }
    const bottom = size + chain.firstFlow + chain.cells;
    flowOwn[chain.cells] = at(bottom, bottom);
    return { block: blockAt, flow: flowAt, pressure, topFlow, flowOwn, flowInto, flowBlock, flowPressure };
  });
  /** Positions of outer rows in a chain's blocks, -1 where they read nothing: [outer row][cell]. */
  const outerBlock = chains.map(({ layout: chain }) => {
    const p = new Int32Array(outerSize * chain.cells).fill(-1);
    for (let i = 0; i < outerSize; i++) {
      for (let c = 0; c < chain.cells; c++) p[i * chain.cells + c] = at(layout.coreFirst + i, chain.first + c * block);
    }
    return p;
  });
  const outerFlow = chains.map(({ layout: chain }) => {
    const p = new Int32Array(outerSize * chain.cells).fill(-1);
    for (let i = 0; i < outerSize; i++) {
      for (let c = 0; c < chain.cells; c++)
        p[i * chain.cells + c] = at(layout.coreFirst + i, size + chain.firstFlow + c + 1);
    }
    return p;
  });
  /** Positions of outer rows at the flow through a chain's top face: [outer row]. */
  /** Positions of outer rows at a bed's pressure drop: [outer row]. */
  const outerDrop = plant.column.beds.map((_, b) =>
    Int32Array.from({ length: outerSize }, (_unused, i) => at(layout.coreFirst + i, size + layout.firstDrop + b)),
  );
  const outerTop = chains.map(({ layout: chain }) =>
    Int32Array.from({ length: outerSize }, (_, i) => at(layout.coreFirst + i, size + chain.firstFlow)),
  );
  const outerInflow = chains.map(({ layout: chain }) =>
    Int32Array.from({ length: outerSize }, (_, i) => at(layout.coreFirst + i, size + chain.firstFlow + chain.cells)),
  );
  const outerCore = new Int32Array(outerSize * coreSize);
  for (let i = 0; i < outerSize; i++) {
    for (let j = 0; j < coreSize; j++) outerCore[i * coreSize + j] = at(layout.coreFirst + i, layout.coreFirst + j);
  }
  const readers = (chain: number, kind: 'top' | 'bottom' | 'sums' | 'drops' | 'supply' | 'inflow'): number[] =>
    outerReads.flatMap((reads, i) => (reads[kind].includes(chains[chain].layout.bed) ? [i] : []));
  const topReaders = chains.map((_, i) => readers(i, 'top'));
  const bottomReaders = chains.map((_, i) => readers(i, 'bottom'));
  const sumReaders = chains.map((_, i) => readers(i, 'sums'));
  const dropReaders = chains.map((_, i) => readers(i, 'drops'));
  const supplyReaders = chains.map((_, i) => readers(i, 'supply'));
  const inflowReaders = chains.map((_, i) => readers(i, 'inflow'));

  // Work space.
  const local = chains.map(({ layout: chain }) => new Float64Array(chain.cells * M * columns));
  const trial = new Float64Array(block);
  const shifted = new Float64Array(P);
  const face: FaceValue = { value: 0, d1: 0, d2: 0, d3: 0 };
  /** Slopes of the fluxes through one face: [flux][cell 0..2][columns], and to the chain's inputs. */
  const cellSlopes = new Float64Array(fluxes * 3 * columns);
  const inputSlopes = new Float64Array(fluxes * ip.size);
  const base = new Float64Array(layout.size);
  /** d(input)/d(core column), [chain][input * coreSize + column]. */
  const inputCore = chains.map(() => new Float64Array(ip.size * coreSize));
  const savedInputs = chains.map(() => new Float64Array(ip.size));
  const moved = new Float64Array(layout.size);

  /** Differences of one chain's primitives. */
  const differenceCells = (i: number, y: Float64Array): void => {
    const { layout: chain, cell, work } = chains[i];
    const L = local[i];
    for (let c = 0; c < chain.cells; c++) {
      const from = chain.first + c * block;
      for (let s = 0; s < block; s++) trial[s] = y[from + s];
      const p = chains[i].pressure(c);
      const G = work.flow[c];
      const q = c * P;
      for (let s = 0; s < columns; s++) {
        let h: number;
        if (s < block) {
          h = STEP * (Math.abs(trial[s]) + FLOOR * scales[from + s]);
          const kept = trial[s];
          trial[s] = kept + h;
          h = trial[s] - kept;
          cell.settle(trial, 0, p, shifted, 0);
          cell.exchange(G, p, shifted, 0);
          trial[s] = kept;
        } else if (s === FLOW) {
          h = STEP * (Math.abs(G) + FLOOR * plant.gas.feed.rate);
          cell.settle(trial, 0, p, shifted, 0);
          cell.exchange(G + h, p, shifted, 0);
        } else {
          h = STEP * p;
          cell.settle(trial, 0, p + h, shifted, 0);
          cell.exchange(G, p + h, shifted, 0);
        }
        const per = 1 / h;
        for (let m = 0; m < M; m++) L[(c * M + m) * columns + s] = (shifted[m] - work.primitives[q + m]) * per;
      }
    }
  };

  const addPressure = (
    values: Float64Array,
    where: Int32Array,
    row: number,
    bed: number,
    share: number,
    slope: number,
  ): void => {
    const drops = bed + 2;
    const o = row * drops;
    for (let j = 0; j <= bed; j++) values[where[o + j]] += slope;
    values[where[o + bed + 1]] += slope * share;
  };

  /** Adds `factor` times a row of slopes over the columns of cell j to row r of cell c. */
  const addToRow = (
    values: Float64Array,
    i: number,
    c: number,
    r: number,
    j: number,
    slopes: Float64Array,
    from: number,
    factor: number,
  ): void => {
    const chain = chains[i].layout;
    const where = positions[i];
    const row = c * block + r;
    const o = row * 5 + j - c + 2;
    const b = where.block[o];
    for (let s = 0; s < block; s++) values[b + s] += factor * slopes[from + s];
    values[where.flow[o]] += factor * slopes[from + FLOW];
    addPressure(values, where.pressure, row, chain.bed, (j + 0.5) / chain.cells, factor * slopes[from + PRESSURE]);
  };

  /** Adds slopes to the chain's inputs `u` to row r of cell c, through what the inputs owe to the core. */
  const addInputs = (
    values: Float64Array,
    i: number,
    row: number,
    list: readonly number[],
    from: number,
    factor: number,
  ): void => {
    const gains = inputCore[i];
    for (const column of list) {
      const j = column - layout.coreFirst;
      let sum = 0;
      for (let u = 0; u < ip.differentiated; u++) sum += inputSlopes[from + u] * gains[u * coreSize + j];
      // The pressures act through the cells already.
      if (sum !== 0) values[at(row, column)] += factor * sum;
    }
  };

  /** The three cells behind a gas face, with slopes; cells[] = -1 marks the inlet. */
  const cells = [0, 0, 0];
  const slopesOf = [0, 0, 0];
  const setFace = (a: number, sa: number, b: number, sb: number, c: number, sc: number): void => {
    cells[0] = a;
    cells[1] = b;
    cells[2] = c;
    slopesOf[0] = sa;
    slopesOf[1] = sb;
    slopesOf[2] = sc;
  };
  const gasFace = (i: number, f: number, m: number, inlet: number): number => {
    const { work, layout: chain, scheme } = chains[i];
    const q = work.primitives;
    const o = f * P + m;
    if (scheme === 'well-mixed') {
      setFace(f, 1, f, 0, f, 0);
      return q[o];
    }
    if (f === 0) {
      outletFace(q[o + 2 * P], q[o + P], q[o], face);
      setFace(2, face.d1, 1, face.d2, 0, face.d3);
    } else if (f === chain.cells - 1) {
      inletFace(inlet, q[o], q[o - P], face);
      setFace(-1, face.d1, f, face.d2, f - 1, face.d3);
    } else {
      interiorFace(q[o + P], q[o], q[o - P], face);
      setFace(f + 1, face.d1, f, face.d2, f - 1, face.d3);
    }
    return face.value;
  };
  const liquidFace = (i: number, f: number, m: number, inlet: number): number => {
    const { work, layout: chain, scheme } = chains[i];
    const q = work.primitives;
    const o = (f - 1) * P + m;
    if (scheme === 'well-mixed') {
      setFace(f - 1, 1, f - 1, 0, f - 1, 0);
      return q[o];
    }
    if (f === chain.cells) {
      outletFace(q[o - 2 * P], q[o - P], q[o], face);
      setFace(f - 3, face.d1, f - 2, face.d2, f - 1, face.d3);
    } else if (f === 1) {
      inletFace(inlet, q[o], q[o + P], face);
      setFace(-1, face.d1, 0, face.d2, 1, face.d3);
    } else {
      interiorFace(q[o - P], q[o], q[o + P], face);
      setFace(f - 2, face.d1, f - 1, face.d2, f, face.d3);
    }
    return face.value;
  };
  /** First cell of the window of three that a face's slopes are kept for. */
  let windowFirst = 0;
  /** Adds gain * d(face value)/d(...) of primitive m to the slopes of flux n; `input` is the matching chain input. */
  const spread = (i: number, n: number, m: number, gain: number, input: number): void => {
    if (gain === 0) return;
    const L = local[i];
    for (let e = 0; e < 3; e++) {
      const w = slopesOf[e] * gain;
      if (w === 0) continue;
      const c = cells[e];
      if (c < 0) {
        inputSlopes[n * ip.size + input] += w;
        continue;
      }
      const from = (c * M + m) * columns;
      const to = (n * 3 + c - windowFirst) * columns;
      for (let s = 0; s < columns; s++) cellSlopes[to + s] += w * L[from + s];
    }
  };
  /** Adds gain * d(primitive m of cell c). */
  const spreadCell = (i: number, n: number, m: number, c: number, gain: number): void => {
    if (gain === 0) return;
    const L = local[i];
    const from = (c * M + m) * columns;
    const to = (n * 3 + c - windowFirst) * columns;
    for (let s = 0; s < columns; s++) cellSlopes[to + s] += gain * L[from + s];
  };

  /** Slopes of the gas fluxes through face f into `cellSlopes` and `inputSlopes`; levels per unit flow in `level`. */
  const level = new Float64Array(fluxes);
  const gasFluxSlopes = (i: number, f: number): void => {
    const { work, layout: chain, peclet } = chains[i];
    const N = chain.cells;
    const u = work.inputs;
    const q = work.primitives;
    const G = work.faceFlow[f];
    cellSlopes.fill(0);
    inputSlopes.fill(0);
    windowFirst = Math.max(0, Math.min(f - 1, N - 3));
    const H = components;
    const T = isothermal
      ? q[Math.min(f, N - 1) * P + index.TG]
      : f === N
        ? u[ip.TG]
        : gasFace(i, f, index.TG, u[ip.TG]);
    const theta = T - DATUM_TEMPERATURE;
    let inert = 1;
    let h = 0;
    let cp = carrierHeat;
    for (let k = 0; k < components; k++) {
      const excess = vapourHeat[k] - carrierHeat;
      const e = vaporisation[k] + excess * theta;
      let yk: number;
      if (f === N) {
        yk = u[ip.y + k];
        inputSlopes[k * ip.size + ip.y + k] += G;
        inputSlopes[H * ip.size + ip.y + k] += G * e;
      } else {
        yk = gasFace(i, f, index.y + k, u[ip.y + k]);
        spread(i, k, index.y + k, G, ip.y + k);
        spread(i, H, index.y + k, G * e, ip.y + k);
      }
      level[k] = yk;
      inert -= yk;
      h += yk * (vaporisation[k] + vapourHeat[k] * theta);
      cp += yk * excess;
    }
    level[H] = h + inert * carrierHeat * theta;
    if (!isothermal) {
      if (f === N) {
        inputSlopes[H * ip.size + ip.TG] += G * cp;
      } else {
        gasFace(i, f, index.TG, u[ip.TG]);
        spread(i, H, index.TG, G * cp, ip.TG);
      }
    }
    if (peclet.gas !== undefined && f > 0 && f < N && G > 0) {
      const mixing = N / peclet.gas;
      for (let k = 0; k < components; k++) {
        const e = vaporisation[k] + (vapourHeat[k] - carrierHeat) * theta;
        const difference = q[f * P + index.y + k] - q[(f - 1) * P + index.y + k];
        level[k] += mixing * difference;
        level[H] += mixing * difference * e;
        spreadCell(i, k, index.y + k, f, G * mixing);
        spreadCell(i, k, index.y + k, f - 1, -G * mixing);
        spreadCell(i, H, index.y + k, f, G * mixing * e);
        spreadCell(i, H, index.y + k, f - 1, -G * mixing * e);
      }
      if (!isothermal) {
        level[H] += mixing * carrierHeat * (q[f * P + index.TG] - q[(f - 1) * P + index.TG]);
        spreadCell(i, H, index.TG, f, G * mixing * carrierHeat);
        spreadCell(i, H, index.TG, f - 1, -G * mixing * carrierHeat);
      }
    }
  };

  /** Slopes of the liquid fluxes through face f, likewise. */
  const liquidFluxSlopes = (i: number, f: number): void => {
    const { work, layout: chain, peclet, isPrescribed } = chains[i];
    const N = chain.cells;
    const u = work.inputs;
    const q = work.primitives;
    const flowHere = work.liquidFlow[f];
    cellSlopes.fill(0);
    inputSlopes.fill(0);
    windowFirst = Math.max(0, Math.min(f - 2, N - 3));
    const H = components;
    const T = f === 0 ? u[ip.TL] : isothermal ? q[(f - 1) * P + index.TL] : liquidFace(i, f, index.TL, u[ip.TL]);
    const theta = T - DATUM_TEMPERATURE;
    const v0 = parts.molarVolume(T);
    const expansion = (parts.molarVolume(T + 0.5) - parts.molarVolume(T - 0.5)) / v0;
    let free = 1;
    let cp = 0; // J/(m3 K) of the stream
    for (let k = 1; k <= K; k++) {
      const c =
        f === 0
          ? u[ip.concentration + k - 1]
          : liquidFace(i, f, index.concentration + k - 1, u[ip.concentration + k - 1]);
      free -= c * soluteVolume[k];
      cp += c * liquidHeat[k];
      // Slopes of flux k, of the solvent's, and of the enthalpy to this concentration.
      const solvent = (-flowHere * soluteVolume[k]) / v0;
      const enthalpy = (flowHere * liquidHeat[k] + solvent * liquidHeat[0]) * theta;
      if (f === 0) {
        const n = ip.concentration + k - 1;
        inputSlopes[k * ip.size + n] += flowHere;
        inputSlopes[n] += solvent;
        inputSlopes[H * ip.size + n] += enthalpy;
      } else {
        const m = index.concentration + k - 1;
        const n = ip.concentration + k - 1;
        spread(i, k, m, flowHere, n);
        spread(i, 0, m, solvent, n);
        spread(i, H, m, enthalpy, n);
      }
      level[k] = c;
    }
    level[0] = free / v0;
    cp += level[0] * liquidHeat[0];
    level[H] = cp * theta;
    // Temperature: the solvent's volume and the enthalpy.
    const solventT = -flowHere * level[0] * expansion;
    const enthalpyT = flowHere * cp + solventT * liquidHeat[0] * theta;
    if (!isothermal) {
      if (f === 0) {
        inputSlopes[ip.TL] += solventT;
        inputSlopes[H * ip.size + ip.TL] += enthalpyT;
      } else {
        liquidFace(i, f, index.TL, u[ip.TL]);
        spread(i, 0, index.TL, solventT, ip.TL);
        spread(i, H, index.TL, enthalpyT, ip.TL);
      }
    }
    // Flow.
    for (let n = 0; n < fluxes; n++) {
      const gain = level[n];
      if (f === 0) {
        if (q[index.supply] < NO_LIMIT && q[index.supply] <= u[ip.liquidFlow]) spreadCell(i, n, index.supply, 0, gain);
        else inputSlopes[n * ip.size + ip.liquidFlow] += gain;
      } else if (isPrescribed) {
        inputSlopes[n * ip.size + ip.liquidFlow] += gain;
      } else {
        const value = liquidFace(i, f, index.demand, u[ip.liquidFlow]);
        if (f < N && q[f * P + index.supply] < value) spreadCell(i, n, index.supply, f, gain);
        else spread(i, n, index.demand, gain, ip.liquidFlow);
      }
    }
    if (peclet.liquid !== undefined && f > 0 && f < N) {
      const rate = (flowHere * N) / peclet.liquid;
      for (let k = 1; k <= K; k++) {
        const m = index.concentration + k - 1;
        for (const [c, sign] of [
          [f - 1, 1],
          [f, -1],
        ] as const) {
          spreadCell(i, k, m, c, sign * rate);
          spreadCell(i, 0, m, c, (-sign * rate * soluteVolume[k]) / v0);
        }
      }
      if (!isothermal) {
        spreadCell(i, H, index.TL, f - 1, (rate * liquidHeat[0]) / v0);
        spreadCell(i, H, index.TL, f, (-rate * liquidHeat[0]) / v0);
      }
    }
  };

  /** Adds the slopes of a face's fluxes to the rows (first row `r0`) of a cell. */
  const addFluxes = (
    values: Float64Array,
    i: number,
    c: number,
    r0: number,
    sign: number,
    inletList: readonly number[] | undefined,
  ): void => {
    const N = chains[i].layout.cells;
    for (let n = 0; n < fluxes; n++) {
      if (isothermal && n === components) continue;
      for (let e = 0; e < 3; e++) {
        const j = windowFirst + e;
        if (j >= N || j < c - 2 || j > c + 2) continue;
        const from = (n * 3 + e) * columns;
        if (positions[i].block[(c * block + r0 + n) * 5 + j - c + 2] < 0) continue;
        addToRow(values, i, c, r0 + n, j, cellSlopes, from, sign);
      }
      if (inletList !== undefined)
        addInputs(values, i, chains[i].layout.first + c * block + r0 + n, inletList, n * ip.size, sign);
    }
  };

  const addGasFaces = (values: Float64Array, i: number): void => {
    const { layout: chain } = chains[i];
    const N = chain.cells;
    const list = gasInletColumns[chain.bed];
    const where = positions[i];
    const r0 = liquidRows;
    for (let f = 0; f <= N; f++) {
      gasFluxSlopes(i, f);
      const isInlet = f >= N - 1;
      // The flow itself.
      for (let n = 0; n < fluxes; n++) {
        if (isothermal && n === components) continue;
        if (f < N) {
          const r = r0 + n;
          values[f === 0 ? where.topFlow[r] : where.flow[(f * block + r) * 5 + 1]] -= level[n];
        }
        if (f > 0) values[where.flow[((f - 1) * block + r0 + n) * 5 + 2]] += level[n];
      }
      if (f < N) addFluxes(values, i, f, r0, -1, isInlet ? list : undefined);
      if (f > 0) addFluxes(values, i, f - 1, r0, 1, isInlet ? list : undefined);
    }
  };

  const addLiquidFaces = (values: Float64Array, i: number): void => {
    const { layout: chain, isPrescribed } = chains[i];
    const N = chain.cells;
    const list = liquidInletColumns[chain.bed];
    for (let f = 0; f <= N; f++) {
      liquidFluxSlopes(i, f);
      const inlet = f <= 1 && !isPrescribed ? list : f === 0 ? list : undefined;
      if (f < N) addFluxes(values, i, f, 0, 1, f === 0 || f === 1 ? inlet : undefined);
      if (f > 0) addFluxes(values, i, f - 1, 0, -1, f === 1 ? inlet : undefined);
    }
  };

  const addTransfer = (values: Float64Array, i: number): void => {
    const { layout: chain, cell, work } = chains[i];
    const L = local[i];
    for (let c = 0; c < chain.cells; c++) {
      const theta = work.primitives[c * P + index.TL] - DATUM_TEMPERATURE;
      for (let k = 0; k < components; k++) {
        const from = (c * M + index.transfer + k) * columns;
        addToRow(values, i, c, k, c, L, from, 1);
        addToRow(values, i, c, liquidRows + k, c, L, from, -1);
        if (isothermal) continue;
        const enthalpy = vaporisation[k] + vapourHeat[k] * theta;
        const w = work.primitives[c * P + index.transfer + k];
        const TL = (c * M + index.TL) * columns;
        addToRow(values, i, c, components, c, L, from, enthalpy);
        addToRow(values, i, c, components, c, L, TL, w * vapourHeat[k]);
        addToRow(values, i, c, liquidRows + components, c, L, from, -enthalpy);
        addToRow(values, i, c, liquidRows + components, c, L, TL, -w * vapourHeat[k]);
      }
      if (isothermal) continue;
      const heat = (c * M + index.heat) * columns;
      addToRow(values, i, c, components, c, L, heat, 1);
      addToRow(values, i, c, liquidRows + components, c, L, heat, -1);
      if (cell.heatLoss > 0) addToRow(values, i, c, components, c, L, (c * M + index.TL) * columns, -cell.heatLoss);
    }
  };

  /** Adds factor * slopes over the columns of cell j to the row of the flow through face f. */
  const addToFlowRow = (
    values: Float64Array,
    i: number,
    f: number,
    j: number,
    slopes: Float64Array,
    from: number,
    factor: number,
  ): void => {
    if (factor === 0) return;
    const { layout: chain } = chains[i];
    const where = positions[i];
    const b = where.flowBlock[f * 5 + j - f + 2];
    for (let s = 0; s < block; s++) values[b + s] += factor * slopes[from + s];
    values[where.flowInto[f * 5 + j - f + 2]] += factor * slopes[from + FLOW];
    addPressure(values, where.flowPressure, f, chain.bed, (j + 0.5) / chain.cells, factor * slopes[from + PRESSURE]);
  };
  /** Adds factor * d(gas temperature at face g) to the row of face f. */
  const addFaceTemperature = (values: Float64Array, i: number, f: number, g: number, factor: number): void => {
    const { layout: chain, work } = chains[i];
    if (g < chain.cells) {
      gasFace(i, g, index.TG, work.inputs[ip.TG]);
      for (let e = 0; e < 3; e++) {
        if (slopesOf[e] === 0) continue;
        if (cells[e] >= 0)
          addToFlowRow(values, i, f, cells[e], local[i], (cells[e] * M + index.TG) * columns, factor * slopesOf[e]);
        else addInletTemperature(values, i, f, factor * slopesOf[e]);
      }
    } else {
      addInletTemperature(values, i, f, factor);
    }
  };
  const addInletTemperature = (values: Float64Array, i: number, f: number, factor: number): void => {
    addInlet(values, i, f, ip.TG, gasInletColumns[chains[i].layout.bed], factor);
  };
  /** Adds factor * d(chain input) to the row of face f. */
  const addInlet = (
    values: Float64Array,
    i: number,
    f: number,
    input: number,
    list: readonly number[],
    factor: number,
  ): void => {
    const row = size + chains[i].layout.firstFlow + f;
    for (const column of list) {
      const gain = inputCore[i][input * coreSize + column - layout.coreFirst];
      if (gain !== 0) values[at(row, column)] += factor * gain;
    }
  };
  /** Adds factor * d(liquid flow through face g) to the row of the gas flow through face f. */
  const addLiquidFlow = (values: Float64Array, i: number, f: number, g: number, factor: number): void => {
    const { layout: chain, work } = chains[i];
    const L = local[i];
    const q = work.primitives;
    const offered = work.inputs[ip.liquidFlow];
    const list = liquidInletColumns[chain.bed];
    if (g === 0) {
      if (q[index.supply] <= offered) addToFlowRow(values, i, f, 0, L, index.supply * columns, factor);
      else addInlet(values, i, f, ip.liquidFlow, list, factor);
      return;
    }
    const value = liquidFace(i, g, index.demand, offered);
    if (g < chain.cells && q[g * P + index.supply] < value) {
      addToFlowRow(values, i, f, g, L, (g * M + index.supply) * columns, factor);
      return;
    }
    for (let e = 0; e < 3; e++) {
      if (slopesOf[e] === 0) continue;
      if (cells[e] >= 0)
        addToFlowRow(values, i, f, cells[e], L, (cells[e] * M + index.demand) * columns, factor * slopesOf[e]);
      else addInlet(values, i, f, ip.liquidFlow, list, factor * slopesOf[e]);
    }
  };

  /**
   * Rows of the auxiliary flows: 0 = G_out (1 + k phi) - [G_in - transfer + k X], signs turned; k = n/(T C), whose own
   * slopes act on the small storage term only and are left out, as are those of the mixture's heat capacity.
   */
  const addFlowRows = (values: Float64Array, i: number): void => {
    const { layout: chain, work, isPrescribed } = chains[i];
    const L = local[i];
    const where = positions[i];
    const N = chain.cells;
    const q = work.primitives;
    const stride = components + 1;
    for (let f = 0; f < N; f++) {
      const p = f * P;
      const T = q[p + index.TG];
      const TL = q[p + index.TL];
      const own = f * M;
      // Rising pressure keeps gas back: n dP/dt / P, with dP/dt = (target - P)/lag.
      const kept = q[p + index.gasMoles] / (chains[i].pressure(f) * PRESSURE_LAG);
      addPressure(values, where.flowPressure, f, chain.bed, (f + 0.5) / N, kept);
      const first = size + layout.firstDrop;
      for (let b = 0; b < chain.bed; b++) values[at(size + chain.firstFlow + f, first + b)] -= kept;
      values[at(size + chain.firstFlow + f, first + chain.bed)] -= (kept * (f + 0.5)) / N;
      // Liquid that comes takes gas space: n/V times its net flow and what condenses.
      if (!isPrescribed) {
        const perVolume = q[p + index.gasMoles] / q[p + index.gasVolume];
        addLiquidFlow(values, i, f, f, perVolume);
        addLiquidFlow(values, i, f, f + 1, -perVolume);
        for (let k = 0; k < components; k++) {
          const v = k === 0 ? q[p + index.liquidRow] : soluteVolume[k];
          addToFlowRow(values, i, f, f, L, (own + index.transfer + k) * columns, perVolume * v);
        }
      }
      if (isothermal) {
        values[where.flowOwn[f]] -= 1;
        values[where.flowInto[f * 5 + 2]] += 1;
        for (let k = 0; k < components; k++) addToFlowRow(values, i, f, f, L, (own + index.transfer + k) * columns, -1);
        continue;
      }
      const perTC = q[p + index.gasMoles] / (T * q[p + index.gasHeat]);
      let mixIn = carrierHeat;
      let mixOut = carrierHeat;
      let carried = 0;
      for (let k = 0; k < components; k++) {
        const excess = vapourHeat[k] - carrierHeat;
        mixIn += work.gasFace[(f + 1) * stride + k] * excess;
        mixOut += work.gasFace[f * stride + k] * excess;
        carried += q[p + index.transfer + k] * vapourHeat[k];
      }
      const Tin = work.gasFace[(f + 1) * stride + components];
      const Tout = work.gasFace[f * stride + components];
      const Gin = work.flow[f];
      const Gout = f === 0 ? work.topFlow : work.flow[f - 1];
      values[where.flowOwn[f]] -= 1 + perTC * mixOut * (Tout - T);
      values[where.flowInto[f * 5 + 2]] += 1 + perTC * mixIn * (Tin - T);
      for (let k = 0; k < components; k++) {
        addToFlowRow(values, i, f, f, L, (own + index.transfer + k) * columns, -1 - perTC * vapourHeat[k] * (TL - T));
      }
      addToFlowRow(values, i, f, f, L, (own + index.heat) * columns, -perTC);
      addToFlowRow(values, i, f, f, L, (own + index.TL) * columns, -perTC * carried);
      addToFlowRow(values, i, f, f, L, (own + index.TG) * columns, perTC * (carried - Gin * mixIn + Gout * mixOut));
      addFaceTemperature(values, i, f, f + 1, perTC * Gin * mixIn);
      addFaceTemperature(values, i, f, f, -perTC * Gout * mixOut);
    }
    // Into the bottom cell: from the core, or from the bed below.
    values[where.flowOwn[N]] -= 1;
    const bottom = size + chain.firstFlow + N;
    if (chain.bed === parts.chains.length - 1) {
      for (const column of gasInletColumns[chain.bed]) {
        values[at(bottom, column)] += inputCore[i][ip.gasFlow * coreSize + column - layout.coreFirst];
      }
      return;
    }
    const G = work.flow[N - 1];
    let total = 0;
    for (const other of parts.chains[chain.bed]) total += other.work.flow[N - 1];
    const zones = parts.chains[chain.bed].length;
    const share = zones === 1 || total === 0 ? 1 : G / total;
    if (zones > 1) values[at(bottom, layout.gasShare[chain.bed])] += chain.zone === 0 ? total : -total;
    for (const below of layout.chains) {
      if (below.bed === chain.bed + 1) values[at(bottom, size + below.firstFlow)] += share;
    }
  };

  /** Rows of the auxiliary pressure drops: 0 = sum over the zones' cells, by area, less the drop. */
  const addDropRows = (values: Float64Array): void => {
    const shares = plant.column.distribution;
    chains.forEach(({ layout: chain }, i) => {
      const row = size + layout.firstDrop + chain.bed;
      if (chain.zone === 0) values[at(row, row)] -= 1;
      const share = shares === undefined ? 1 : chain.zone === 0 ? shares.areaShare : 1 - shares.areaShare;
      const L = local[i];
      for (let c = 0; c < chain.cells; c++) {
        const from = (c * M + index.pressureDrop) * columns;
        const b = at(row, chain.first + c * block);
        for (let s = 0; s < block; s++) values[b + s] += share * L[from + s];
        values[at(row, size + chain.firstFlow + c + 1)] += share * L[from + FLOW];
        const p = share * L[from + PRESSURE];
        values[at(row, layout.topPressure)] += p;
        for (let j = 0; j < chain.bed; j++) values[at(row, layout.pressureDrop[j])] += p;
        values[at(row, layout.pressureDrop[chain.bed])] += (p * (c + 0.5)) / chain.cells;
      }
    });
  };

  const stepOf = (y: Float64Array, column: number): number => STEP * (Math.abs(y[column]) + scales[column]);

  /** What the chains' inputs and the outer rates owe to the core's states. */
  const differenceCore = (t: number, y: Float64Array, values: Float64Array): void => {
    machinery.rates(y, base);
    chains.forEach((chain, i) => {
      savedInputs[i].set(chain.work.inputs);
    });
    for (let j = 0; j < coreSize; j++) {
      const column = layout.coreFirst + j;
      const kept = y[column];
      y[column] = kept + stepOf(y, column);
      const per = 1 / (y[column] - kept);
      machinery.prepare(t, y);
      chains.forEach((chain, i) => {
        const gains = inputCore[i];
        const u = chain.work.inputs;
        for (let n = 0; n < ip.differentiated; n++) gains[n * coreSize + j] = (u[n] - savedInputs[i][n]) * per;
        // Pressures act through the cells.
        gains[ip.topPressure * coreSize + j] = 0;
        gains[ip.pressureDrop * coreSize + j] = 0;
        u.set(savedInputs[i]);
      });
      machinery.rates(y, moved);
      y[column] = kept;
      for (let o = 0; o < outerSize; o++) {
        const slope = (moved[layout.coreFirst + o] - base[layout.coreFirst + o]) * per;
        if (slope !== 0) values[outerCore[o * coreSize + j]] += slope;
      }
    }
    machinery.prepare(t, y);
    chains.forEach((chain, i) => {
      chain.work.inputs.set(savedInputs[i]);
    });
  };

  /** Slope of every outer rate to one entry of a chain's outputs (or inputs), into `moved`. */
  const differencePort = (y: Float64Array, array: Float64Array, n: number, scale: number): void => {
    const kept = array[n];
    array[n] = kept + STEP * (Math.abs(kept) + scale);
    const per = 1 / (array[n] - kept);
    machinery.rates(y, moved);
    array[n] = kept;
    for (let o = 0; o < outerSize; o++) {
      moved[layout.coreFirst + o] = (moved[layout.coreFirst + o] - base[layout.coreFirst + o]) * per;
    }
  };

  const portScale = (n: number): number => {
    if (n === op.gasFlow) return plant.gas.feed.rate;
    if (n >= op.y && n < op.TG) return n === op.y ? 0.01 : Math.max(plant.gas.feed.composition[n - op.y - 1], 1e-9);
    if (n === op.TG || n === op.TL) return 10;
    if (n === op.liquidFlow || n === op.accepted) return plant.liquid.feed.rate;
    if (n >= op.concentration && n < op.TL) return 1;
    if (n === op.molarVolume) return 1e-5;
    if (n === op.pressureDrop || n === op.heatLoss) return 1e3;
    return 0.1;
  };

  /** Adds slopes over a cell's columns to outer row o. */
  const addOuter = (
    values: Float64Array,
    i: number,
    o: number,
    c: number,
    slopes: Float64Array,
    from: number,
    gain: number,
  ): void => {
    const chain = chains[i].layout;
    const where = outerBlock[i][o * chain.cells + c];
    for (let s = 0; s < block; s++) values[where + s] += gain * slopes[from + s];
    values[outerFlow[i][o * chain.cells + c]] += gain * slopes[from + FLOW];
    const p = gain * slopes[from + PRESSURE];
    if (p === 0) return;
    const top = o * coreSize - layout.coreFirst;
    values[outerCore[top + layout.topPressure]] += p;
    for (let b = 0; b < chain.bed; b++) values[outerCore[top + layout.pressureDrop[b]]] += p;
    values[outerCore[top + layout.pressureDrop[chain.bed]]] += (p * (c + 0.5)) / chain.cells;
  };

  /** Adds one end output's slopes (through `cells` and `slopesOf`) for all rows that read that end. */
  const addEnd = (values: Float64Array, i: number, rows: readonly number[], m: number): void => {
    for (const o of rows) {
      const gain = moved[layout.coreFirst + o];
      if (gain === 0) continue;
      for (let e = 0; e < 3; e++) {
        if (slopesOf[e] === 0 || cells[e] < 0) continue;
        addOuter(values, i, o, cells[e], local[i], (cells[e] * M + m) * columns, gain * slopesOf[e]);
      }
    }
  };

  const addOutputs = (y: Float64Array, values: Float64Array): void => {
    chains.forEach((chain, i) => {
      const { work, layout: at_, cell } = chain;
      const N = at_.cells;
      const o = work.outputs;
      const L = local[i];
      if (topReaders[i].length > 0) {
        differencePort(y, o, op.gasFlow, portScale(op.gasFlow));
        for (const row of topReaders[i]) {
          values[outerTop[i][row]] += moved[layout.coreFirst + row];
        }
        for (let k = 0; k < components; k++) {
          differencePort(y, o, op.y + k, portScale(op.y + k));
          gasFace(i, 0, index.y + k, 0);
          addEnd(values, i, topReaders[i], index.y + k);
        }
        if (!isothermal) {
          differencePort(y, o, op.TG, portScale(op.TG));
          gasFace(i, 0, index.TG, 0);
          addEnd(values, i, topReaders[i], index.TG);
        }
      }
      if (bottomReaders[i].length > 0) addBottom(y, values, i);
      if (dropReaders[i].length > 0) {
        // Weighted over the zones the gains add up to one bed's.
        differencePort(y, o, op.pressureDrop, portScale(op.pressureDrop));
        for (const row of dropReaders[i]) values[outerDrop[at_.bed][row]] += moved[layout.coreFirst + row];
      }
      if (sumReaders[i].length > 0) {
        const volume = cell.crossSection * cell.height;
        for (const [port, m, factor] of [
          [op.pressureDrop, index.pressureDrop, 1],
          [op.heatLoss, index.TL, cell.heatLoss],
          [op.liquidHeld, index.holdup, volume],
        ] as const) {
          if (factor === 0) continue;
          differencePort(y, o, port, portScale(port));
          for (const row of sumReaders[i]) {
            const gain = moved[layout.coreFirst + row] * factor;
            if (gain === 0) continue;
            for (let c = 0; c < N; c++) addOuter(values, i, row, c, L, (c * M + m) * columns, gain);
          }
        }
      }
      if (supplyReaders[i].length > 0) {
        differencePort(y, o, op.accepted, portScale(op.accepted));
        const isLimited = work.primitives[index.supply] <= work.inputs[ip.liquidFlow];
        for (const row of supplyReaders[i]) {
          const gain = moved[layout.coreFirst + row];
          if (gain === 0) continue;
          if (isLimited) {
            addOuter(values, i, row, 0, L, index.supply * columns, gain);
          } else {
            for (const column of liquidInletColumns[at_.bed]) {
              const j = column - layout.coreFirst;
              values[outerCore[row * coreSize + j]] += gain * inputCore[i][ip.liquidFlow * coreSize + j];
            }
          }
        }
      }
      if (inflowReaders[i].length > 0) {
        differencePort(y, work.inputs, ip.gasFlow, plant.gas.feed.rate);
        for (const row of inflowReaders[i]) values[outerInflow[i][row]] += moved[layout.coreFirst + row];
      }
    });
  };

  const addBottom = (y: Float64Array, values: Float64Array, i: number): void => {
    const { work, layout: chain, isPrescribed } = chains[i];
    const N = chain.cells;
    const o = work.outputs;
    const rows = bottomReaders[i];
    differencePort(y, o, op.liquidFlow, portScale(op.liquidFlow));
    if (isPrescribed) {
      for (const row of rows) {
        const gain = moved[layout.coreFirst + row];
        for (const column of liquidInletColumns[chain.bed]) {
          const j = column - layout.coreFirst;
          values[outerCore[row * coreSize + j]] += gain * inputCore[i][ip.liquidFlow * coreSize + j];
        }
      }
    } else {
      liquidFace(i, N, index.demand, 0);
      addEnd(values, i, rows, index.demand);
    }
    for (let k = 0; k < K; k++) {
      differencePort(y, o, op.concentration + k, portScale(op.concentration + k));
      liquidFace(i, N, index.concentration + k, 0);
      addEnd(values, i, rows, index.concentration + k);
    }
    if (isothermal) return;
    // Temperature acts by itself and through the molar volume.
    differencePort(y, o, op.molarVolume, portScale(op.molarVolume));
    const T = o[op.TL];
    const expansion = parts.molarVolume(T + 0.5) - parts.molarVolume(T - 0.5);
    const byVolume = rows.map((row) => moved[layout.coreFirst + row] * expansion);
    differencePort(y, o, op.TL, portScale(op.TL));
    rows.forEach((row, n) => {
      moved[layout.coreFirst + row] += byVolume[n];
    });
    liquidFace(i, N, index.TL, 0);
    addEnd(values, i, rows, index.TL);
  };

  return {
    pattern,
    fill(t, y, values) {
      values.fill(0);
      differenceCore(t, y, values);
      for (let i = 0; i < chains.length; i++) {
        differenceCells(i, y);
        addTransfer(values, i);
        addLiquidFaces(values, i);
        addGasFaces(values, i);
        addFlowRows(values, i);
      }
      addDropRows(values);
      addOutputs(y, values);
    },
  };
}
