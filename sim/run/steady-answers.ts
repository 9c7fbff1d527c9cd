/** The steady state in the figures that a column is judged by: outlet, flooding, pressure drop, wetting, transfer units. */
import type { Case } from '../case/case.ts';
import type { Chain } from '../column/chain.ts';
import type { Column } from '../column/column.ts';
import { kisterGillFloodPressureDrop } from '../transfer/kister-gill.ts';
import { minimumWettingVelocity } from '../transfer/wetting-rate.ts';
import { limitAnswers } from './limit-answers.ts';
import { floodApproach } from './observation.ts';
import { profileOf, type Profile } from './profiles.ts';
import { milligramsPerNormal, quantityIndex, recordOf, type RunRecord } from './run-record.ts';
import type { Run } from './simulate.ts';

/** Driving force below which a segment says nothing about transfer units, over the gas's strength. */
const LEAST_DRIVING = 1e-9;

/** What leaves, by solute. */
export interface OutletAnswer {
  readonly solute: string;
  /** mol/mol of the wet gas, in and out. */ readonly gasIn: number;
  readonly gasOut: number;
  /** mg/Nm3 of the dry gas, out. */ readonly dryMgPerNm3: number | null;
  /** mol/mol */ readonly liquidOut: number;
  /** Share of the entering amount that leaves with the gas. */ readonly gasLeft: number;
}

/** A limit against the steady value; averages of a steady state are the value. */
export interface SteadyLimit {
  readonly id: string;
  readonly value: number;
  readonly limit: number;
  readonly kept: boolean;
}

/** Transfer units of a bed and a solute, from the computed profile. */
export interface TransferAnswer {
  readonly bed: number;
  readonly solute: string;
  /** Sum over segments of transfer / (gas flow x driving force). */ readonly NOG: number;
  /** Bed height over it, m. */ readonly HOG: number;
  /** L/(m G) in the top and the bottom segment, and the mean over segments. */
  readonly absorptionFactor: { readonly top: number; readonly bottom: number; readonly mean: number };
}

/** Load of a bed. */
export interface BedAnswer {
  readonly bed: number;
  /** Pa */ readonly pressureDrop: number;
  /** Mean over the bed, and in its worst segment, Pa/m. */ readonly gradient: number;
  readonly worstGradient: number;
  /** Pressure gradient at flooding by the packing factor, Pa/m; null without one. */ readonly floodGradient:
    number | null;
  /** Least superficial liquid velocity in the bed, and the least that wets, m/s. */
  readonly liquidVelocity: number;
  readonly wettingVelocity: number;
  /** m3/m3, mean. */ readonly holdup: number;
}

/** All of it. */
export interface SteadyAnswer {
  readonly outlets: readonly OutletAnswer[];
  readonly limits: readonly SteadyLimit[];
  /** Gas velocity over the flooding velocity, worst segment; null where the law has no flooding. */
  readonly floodApproach: number | null;
  readonly beds: readonly BedAnswer[];
  readonly transfer: readonly TransferAnswer[];
  readonly profile: Profile;
}

/** Figures of a run that stands at its steady start. */
export function steadyAnswers(run: Run): SteadyAnswer {
  const { column, plant } = run;
  const record = recordOf(run);
  const scratch = new Float64Array(column.size);
  column.rhs(run.time, run.state, scratch);
  const approach = floodApproach(column);
  return {
    outlets: outletsOf(record),
    limits: limitAnswers(record).map((l) => ({
      id: l.id,
      value: l.initial.value,
      limit: l.limit.value,
      kept: l.over.first === null,
    })),
    floodApproach: Number.isFinite(approach) ? approach : null,
    beds: plant.column.beds.map((_, b) => bedAnswer(column, b)),
    transfer: plant.column.beds.flatMap((_, b) => plant.solutes.map((_solute, k) => transferAnswer(column, b, k))),
    profile: profileOf(column, run.time),
  };
}

function outletsOf(record: RunRecord): OutletAnswer[] {
  const { plant } = record;
  const row = record.rows[record.rows.length - 1];
  const read = (id: string): number => row[quantityIndex(record, id)];
  return plant.solutes.map(({ id }, k) => {
    const gasOut = read(`gas-outlet.${id}`);
    const dry = gasOut / (1 - read('gas-outlet.moisture'));
    return {
      solute: id,
      gasIn: read(`gas-inlet.${id}`),
      gasOut,
      dryMgPerNm3: milligramsPerNormal(plant, { quantity: 'gas-outlet', solute: k }, dry),
      liquidOut: read(`liquid-outlet.${id}`),
      gasLeft: read(`stack-flow.${id}`) / (read('gas-flow') * read(`gas-inlet.${id}`)),
    };
  });
}

/** Cells of a bed, zone by zone. */
function cellsOf(column: Column, b: number): { readonly chain: Chain; readonly at: number; readonly c: number }[] {
  return column.chains[b].flatMap((chain) =>
    Array.from({ length: chain.layout.cells }, (_, c) => ({ chain, c, at: c * column.index.size })),
  );
}

function bedAnswer(column: Column, b: number): BedAnswer {
  const { index, plant, outputs } = column;
  const bed = plant.column.beds[b];
  const { packing, height } = bed;
  const cells = cellsOf(column, b);
  const area = cells.reduce((sum, { chain, c }) => sum + (c === 0 ? chain.cell.crossSection : 0), 0);
  const drop = column.chains[b].reduce(
    (sum, chain) => sum + (chain.cell.crossSection / area) * chain.work.outputs[outputs.pressureDrop],
    0,
  );
  const held = cells.reduce(
    (sum, { chain, at }) =>
      sum + chain.work.primitives[at + index.holdup] * chain.cell.crossSection * chain.cell.height,
    0,
  );
  return {
    bed: b + 1,
    pressureDrop: drop,
    gradient: drop / height,
    worstGradient: Math.max(
      ...cells.map(({ chain, at }) => chain.work.primitives[at + index.pressureDrop] / chain.cell.height),
    ),
    floodGradient: packing.packingFactor === undefined ? null : kisterGillFloodPressureDrop(packing.packingFactor),
    liquidVelocity: Math.min(
      ...cells.map(({ chain, at }) => chain.work.primitives[at + index.demand] / chain.cell.crossSection),
    ),
    wettingVelocity: minimumWettingVelocity(packing.area, packing.nominalSize),
    holdup: held / (area * height),
  };
}

/** Transfer units: exact for cell means, since a segment transfers K_y a V (y - y*). */
function transferAnswer(column: Column, b: number, k: number): TransferAnswer {
  const { index, fluids, plant } = column;
  const equilibrium = fluids.equilibrium[k];
  const zones = column.chains[b];
  const factors: number[] = [];
  let units = 0;
  for (const { chain, at, c } of cellsOf(column, b)) {
    const q = chain.work.primitives;
    const T = q[at + index.TL];
    const x = q[at + index.x + k + 1];
    const p = chain.pressure(c);
    const scale = equilibrium.pressureScale(T) * (equilibrium.kind === 'ratio' ? p : 1);
    const partial = equilibrium.kind === 'table' ? equilibrium.partialPressure(T, x) : scale * equilibrium.activity(x);
    const slope = equilibrium.kind === 'table' ? equilibrium.slope(T, x) : scale * equilibrium.activitySlope(x);
    const G = chain.work.flow[c];
    const y = q[at + index.y + k + 1];
    const driving = y - partial / p;
    if (Math.abs(driving) > LEAST_DRIVING * Math.abs(y))
      units += q[at + index.transfer + k + 1] / (G * driving) / zones.length;
    const molarVolume = q[at + index.liquidRow];
    factors.push((q[at + index.demand] * p) / (molarVolume * slope * G));
  }
  return {
    bed: b + 1,
    solute: plant.solutes[k].id,
    NOG: units,
    HOG: plant.column.beds[b].height / units,
    absorptionFactor: {
      top: factors[0],
      bottom: factors[factors.length - 1],
      mean: factors.reduce((sum, f) => sum + f, 0) / factors.length,
    },
  };
}

/** A scenario that stands at the steady state and does nothing. */
export function steadyScenario(plant: Case): Case['scenarios'][number] {
  const { recordEvery } = plant.run;
  return {
    id: 'steady',
    title: 'Steady state',
    initial: 'steady',
    steps: [],
    duration: recordEvery,
    interlocksInService: [],
  };
}
