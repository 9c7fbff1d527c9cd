/**
 * A run as the page draws it: flat arrays and the answers. Made in the worker from a run; nothing here knows how it is
 * drawn. Strengths that an instrument or a limit states stand in that unit, all other quantities in SI.
 */
import type { Case, QuantityKind, ResultDocument } from '../../sim/index.ts';

/** The result document without what the packet holds as arrays. */
type RunDocument = Omit<ResultDocument, 'series' | 'profiles'>;

/** A quantity over time. */
export interface Series {
  readonly id: string;
  readonly label: string;
  readonly kind: QuantityKind;
  /** SI, or the own unit of a strength. */ readonly unit: string;
  readonly value: Float64Array;
}

/** A number that is drawn across a lane. */
export interface SetpointLine {
  readonly tag: string;
  readonly role: 'alarm' | 'trip' | 'auto-start' | 'limit' | 'controller';
  readonly side: 'above' | 'below';
  readonly value: number;
  /** s, from the start. */ readonly trueCrossings: readonly number[];
  readonly shownCrossings: readonly number[];
  /** When it annunciates, trips or starts. */ readonly acts: readonly number[];
  readonly inService: boolean;
}

/** One instrument: what is so, and what it shows. */
export interface InstrumentLane {
  readonly tag: string;
  readonly label: string;
  readonly kind: QuantityKind;
  /** Unit of the values: the instrument's own for a strength, else SI. */ readonly unit: string;
  /** Unit in which the case shows it. */ readonly ownUnit: string;
  readonly truth: Float64Array;
  readonly shown: Float64Array;
  readonly range: readonly [number, number] | undefined;
  readonly lines: readonly SetpointLine[];
}

/** A limited quantity on the basis of its limit, in the unit of `InstrumentLane.unit`'s rule. */
export interface LimitLane {
  readonly id: string;
  readonly label: string;
  readonly kind: QuantityKind;
  readonly unit: string;
  readonly ownUnit: string;
  readonly basis: 'wet' | 'dry' | undefined;
  readonly side: 'max' | 'min';
  readonly limit: number;
  readonly value: Float64Array;
  /** Window of the average that is judged, s; undefined: the value itself. */
  readonly averaging: { readonly kind: 'rolling' | 'block'; readonly window: number } | undefined;
}

/** Quantities that a bed map can show. Strengths carry the index of their solute: `gas.0`. */
export type MapQuantity =
  `gas.${number}` | `liquid.${number}` | 'holdup' | 'liquidTemperature' | 'gasTemperature' | 'floodApproach';

/** Profiles over time: value of cell c at moment t is `field[t * cells + c]`. First zone of each bed, top first. */
export interface BedMap {
  /** s */ readonly time: Float64Array;
  readonly cells: number;
  /** Boundaries of the cells below the top of the packing, m; one more than cells. */ readonly edges: Float64Array;
  /** Index of the first cell of each bed. */ readonly beds: readonly number[];
  readonly fields: Readonly<Partial<Record<MapQuantity, Float64Array>>>;
  /** Superficial liquid velocity, m/s, and gas, mol/s, for the column's numbers. */
  readonly liquidVelocity: Float64Array;
  readonly gasFlow: Float64Array;
}

/** When a step of the scenario came. */
interface StepTime {
  readonly id: string;
  readonly time: number;
}

/** A run, drawn from. */
export interface RunPacket {
  readonly scenario: string;
  readonly quality: 'draft' | 'full';
  readonly plant: Case;
  readonly duration: number;
  /** s; two moments may share a time where something stepped. */ readonly time: Float64Array;
  readonly series: readonly Series[];
  readonly instruments: readonly InstrumentLane[];
  readonly limits: readonly LimitLane[];
  readonly map: BedMap;
  readonly steps: readonly StepTime[];
  readonly document: RunDocument;
  /** The answer in words, by system of units. */
  readonly sentence: { readonly case: string; readonly si: string; readonly us: string };
}
