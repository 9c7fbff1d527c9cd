// Values of measured quantities between text and SI: which kind goes with what is measured, and the
// strengths that need a molar mass (mg/Nm3, ppmw, mg/L).

import type { Kind, KilogramPerMole } from '../units.ts';
import {
  NORMAL_MOLAR_VOLUME,
  formatNumber,
  formatQuantity,
  kindsWithUnit,
  splitQuantity,
  unitEntry,
} from '../units.ts';
import type { Measured } from './case.ts';
import type { Reading } from './reading.ts';

/** What a strength needs to become a mole fraction. */
export interface StrengthBasis {
  /** kg/mol */ readonly solute: KilogramPerMole;
  /** kg/mol */ readonly solvent: KilogramPerMole;
  /** kg/m3 of the liquid at its feed temperature; the solute's own part is left out (dilute). */
  readonly density: number;
}

/** Sort of signal; defaults of lag and deadband go by it. */
export type Signal = 'strength' | 'flow' | 'pressure' | 'level' | 'temperature' | 'other';

/** `gas-strength` and `liquid-strength` are read by the functions below, the rest by kind. */
export type MeasuredKind = Kind | 'gas-strength' | 'liquid-strength';

const KIND_OF: Readonly<Record<Measured['quantity'], MeasuredKind>> = {
  'gas-outlet': 'gas-strength',
  'gas-inlet': 'gas-strength',
  'liquid-outlet': 'liquid-strength',
  'sump-strength': 'liquid-strength',
  'bed-dp': 'pressure-difference',
  'liquid-flow': 'volume-flow',
  'gas-flow': 'molar-flow',
  'sump-level': 'length',
  'sump-temperature': 'temperature',
  'liquid-inlet-temperature': 'temperature',
  'gas-outlet-temperature': 'temperature',
  'gas-inlet-temperature': 'temperature',
  'liquid-outlet-temperature': 'temperature',
  'distributor-volume': 'volume',
  'flood-approach': 'fraction',
  'carry-over': 'volume-flow',
  'pump-speed': 'fraction',
  'make-up-flow': 'volume-flow',
  'bleed-flow': 'volume-flow',
  holdup: 'fraction',
};

const GAS_KINDS: readonly Kind[] = ['mole-fraction', 'normal-mass-concentration'];
const LIQUID_KINDS: readonly Kind[] = ['mole-fraction', 'mass-fraction', 'mass-concentration'];
const GAS_ONLY_UNITS: readonly string[] = ['vol%', 'ppmv', 'ppbv'];

/** Kind of a measured quantity. */
export function kindOfMeasured(quantity: Measured['quantity']): MeasuredKind {
  return KIND_OF[quantity];
}

/** Sort of signal of a measured quantity. */
export function signalOf(quantity: Measured['quantity']): Signal {
  const kind = KIND_OF[quantity];
  if (kind === 'gas-strength' || kind === 'liquid-strength') return 'strength';
  if (kind === 'volume-flow' || kind === 'molar-flow' || kind === 'mass-flow') return 'flow';
  if (kind === 'pressure-difference') return 'pressure';
  if (kind === 'length') return 'level';
  return kind === 'temperature' ? 'temperature' : 'other';
}

/** The SI value of 1 in a unit of a strength; undefined for a unit that is none. Mass fractions: dilute limit. */
function strengthFactor(unit: string, gas: boolean, basis: StrengthBasis): number | undefined {
  for (const kind of gas ? GAS_KINDS : LIQUID_KINDS) {
    const entry = unitEntry(kind, unit);
    if (entry === undefined || (!gas && GAS_ONLY_UNITS.includes(entry.symbol))) continue;
    if (kind === 'mole-fraction') return entry.factor;
    if (kind === 'normal-mass-concentration') return (entry.factor / basis.solute) * NORMAL_MOLAR_VOLUME;
    const perMass = kind === 'mass-fraction' ? 1 : 1 / basis.density;
    return (entry.factor * perMass * basis.solvent) / basis.solute;
  }
  return undefined;
}

/**
 * Mole fraction from a mass fraction beside the pure solvent.
 *
 *   x = (w/M) / (w/M + (1 - w)/Ms)
 */
function moleFromMass(w: number, basis: StrengthBasis): number {
  const n = w / basis.solute;
  return n / (n + (1 - w) / basis.solvent);
}

/** Mass fraction beside the pure solvent, the inverse of `moleFromMass`. */
function massFromMole(x: number, basis: StrengthBasis): number {
  const m = x * basis.solute;
  return m / (m + (1 - x) * basis.solvent);
}

/**
 * A strength as mole fraction, of a gas (ppmv, vol%, mol%, mg/Nm3) or a liquid (mol%, ppmw, wt%, mg/L).
 * Mass per normal volume refers to the gas as the limit's or composition's basis says; nothing is
 * converted between wet and dry here.
 *
 * @returns undefined after noting the issue.
 */
export function readStrength(
  reading: Reading,
  path: string,
  text: string,
  gas: boolean,
  basis: StrengthBasis,
): number | undefined {
  const { number, unit } = splitQuantity(text);
  const expected = gas ? 'a gas strength' : 'a liquid strength';
  const write = gas
    ? 'write for example "400 ppmv" or "350 mg/Nm3"'
    : 'write for example "0.02 mol%", "50 ppmw" or "10 ug/L"';
  if (!Number.isFinite(number)) {
    reading.refuse('number', path, expected, text, write);
    return undefined;
  }
  const factor = strengthFactor(unit, gas, basis);
  if (factor === undefined) {
    refuseUnit(reading, path, expected, text, unit, gas, write);
    return undefined;
  }
  const entry = unitEntry('mass-fraction', unit) ?? unitEntry('mass-concentration', unit);
  if (gas || entry === undefined) return number * factor;
  const perMass = unitEntry('mass-fraction', unit) === undefined ? 1 / basis.density : 1;
  return moleFromMass(number * entry.factor * perMass, basis);
}

function refuseUnit(
  reading: Reading,
  path: string,
  expected: string,
  text: string,
  unit: string,
  gas: boolean,
  write: string,
): void {
  if (unit === 'ppm' || unit === 'ppb') {
    reading.refuse('unit', path, expected, text, `${unit} alone is ambiguous; write ${unit}${gas ? 'v' : 'w'}`);
  } else if (unit === '') {
    reading.refuse('unit', path, expected, text, `the unit is missing; ${write}`);
  } else {
    const known = kindsWithUnit(unit).length > 0;
    reading.refuse(known ? 'kind' : 'unit', path, expected, text, known ? `${unit} is no unit of it; ${write}` : write);
  }
}

/** How the values of one measured quantity are read: its kind, strengths with their basis. */
export interface MeasuredScale {
  readonly quantity: Measured['quantity'];
  readonly basis: StrengthBasis | undefined;
  /** Range of the instrument, SI; for values in "% of range". */
  readonly range: readonly [number, number] | undefined;
}

const OF_RANGE = /^(.*?) ?% of range$/;

/**
 * A value, or a difference, of a measured quantity in SI.
 *
 * @param text - In any unit of the kind, or "40 % of range" when the instrument has one.
 * @returns undefined after noting the issue.
 */
export function readMeasured(
  reading: Reading,
  path: string,
  text: string,
  scale: MeasuredScale,
  as: 'value' | 'difference' = 'value',
): number | undefined {
  const share = OF_RANGE.exec(text.trim());
  if (share !== null) {
    const percent = Number(share[1]);
    if (scale.range === undefined || share[1] === '' || !Number.isFinite(percent)) {
      reading.refuse(
        'contradiction',
        path,
        'a share of the range of an instrument that has one',
        text,
        'give the instrument a range, or a value with its unit',
      );
      return undefined;
    }
    const [low, high] = scale.range;
    return (as === 'value' ? low : 0) + (percent / 100) * (high - low);
  }
  const kind = kindOfMeasured(scale.quantity);
  if (kind === 'gas-strength' || kind === 'liquid-strength') {
    if (scale.basis === undefined) return undefined;
    return readStrength(reading, path, text, kind === 'gas-strength', scale.basis);
  }
  if (as === 'difference' && kind === 'temperature') return reading.quantity(path, text, 'temperature-difference');
  return reading.quantity(path, text, kind);
}

/**
 * SI size of one unit of a measured quantity, for gains and drifts; differences of temperature count in K.
 *
 * @returns undefined when the unit is not one of the quantity's.
 */
export function unitSize(unit: string, scale: MeasuredScale): number | undefined {
  const kind = kindOfMeasured(scale.quantity);
  if (kind === 'gas-strength' || kind === 'liquid-strength') {
    return scale.basis === undefined ? undefined : strengthFactor(unit, kind === 'gas-strength', scale.basis);
  }
  if (kind === 'temperature')
    return (unitEntry('temperature-difference', unit) ?? unitEntry('temperature', unit))?.factor;
  return unitEntry(kind, unit)?.factor;
}

/**
 * A measured value as text in a unit.
 *
 * @param value - SI.
 * @param digits - Significant figures.
 */
export function formatMeasured(value: number, unit: string, scale: MeasuredScale, digits = 4): string {
  const kind = kindOfMeasured(scale.quantity);
  if (kind !== 'gas-strength' && kind !== 'liquid-strength') return formatQuantity(value, kind, unit, digits);
  return `${formatNumber(inUnit(value, unit, scale), digits)} ${unit}`;
}

/** A measured SI value as a number in a unit, unrounded; for axes and tables. */
export function inUnit(value: number, unit: string, scale: MeasuredScale): number {
  const kind = kindOfMeasured(scale.quantity);
  if (kind === 'gas-strength' || kind === 'liquid-strength') {
    const mass = unitEntry('mass-fraction', unit) ?? unitEntry('mass-concentration', unit);
    if (kind === 'liquid-strength' && mass !== undefined && scale.basis !== undefined) {
      const density = unitEntry('mass-fraction', unit) === undefined ? scale.basis.density : 1;
      return (massFromMole(value, scale.basis) * density) / mass.factor;
    }
    return value / (unitSize(unit, scale) ?? 1);
  }
  const entry = unitEntry(kind, unit);
  return entry === undefined ? value : value / entry.factor - entry.offset;
}
