/** SI values as text for people, in SI or US customary units. Numbers with three significant figures, the unit always there. */
import type { Case, Limit } from '../case/case.ts';
import { formatMeasured, kindOfMeasured } from '../case/measured.ts';
import { basisOf } from '../case/resolve/strengths.ts';
import { formatNumber, formatQuantity, type Kind } from '../units.ts';
import type { QuantityKind } from './observation.ts';

/** Units for people: as the case states a limit or an instrument (SI elsewhere), or one system for all. */
export type UnitSystem = 'case' | 'si' | 'us';

/** Figures that answers are given with. */
const FIGURES = 3;

/** Kind and unit by sort of quantity. */
const UNITS: Readonly<Record<QuantityKind | 'mass' | 'pressure-gradient', { kind: Kind; si: string; us: string }>> = {
  'gas-strength': { kind: 'mole-fraction', si: 'ppmv', us: 'ppmv' },
  'liquid-strength': { kind: 'mole-fraction', si: 'mol%', us: 'mol%' },
  'molar-flow': { kind: 'molar-flow', si: 'Nm3/h', us: 'scf/min' },
  'volume-flow': { kind: 'volume-flow', si: 'm3/h', us: 'gal/min' },
  'pressure-difference': { kind: 'pressure-difference', si: 'kPa', us: 'inH2O' },
  'pressure-gradient': { kind: 'pressure-gradient', si: 'Pa/m', us: 'inH2O/ft' },
  temperature: { kind: 'temperature', si: 'degC', us: 'degF' },
  length: { kind: 'length', si: 'm', us: 'ft' },
  volume: { kind: 'volume', si: 'L', us: 'gal' },
  velocity: { kind: 'velocity', si: 'm/h', us: 'gal/(min ft2)' },
  fraction: { kind: 'fraction', si: '%', us: '%' },
  mass: { kind: 'mass', si: 'kg', us: 'lb' },
};

/** A value of a sort of quantity as text. */
export function quantityText(value: number, sort: keyof typeof UNITS, system: UnitSystem, figures = FIGURES): string {
  if (!Number.isFinite(value)) return 'none';
  const { kind, si, us } = UNITS[sort];
  return formatQuantity(value, kind, system === 'us' ? us : si, figures);
}

/** Least mass that is given in kg, and in g below that, kg. */
const LEAST_IN_KG = 0.1;
const LEAST_IN_G = 1e-4;

/** A mass as text: kg, g or mg by size, or pounds. */
export function massText(kg: number, system: UnitSystem): string {
  const size = Math.abs(kg);
  if (system === 'us' || size >= LEAST_IN_KG || kg === 0 || !Number.isFinite(kg))
    return quantityText(kg, 'mass', system);
  return formatQuantity(kg, 'mass', size >= LEAST_IN_G ? 'g' : 'mg', FIGURES);
}

/** What has a unit of its own in the case: a limit, an instrument. */
export type InOwnUnit = Pick<Limit, 'measured' | 'unit'>;

/** A value of a limited or measured quantity, in its own unit or the system's; strengths always in their own. */
export function measuredText(plant: Case, of: InOwnUnit, value: number, system: UnitSystem, figures = FIGURES): string {
  if (!Number.isFinite(value)) return 'none';
  const { measured, unit } = of;
  const kind = kindOfMeasured(measured.quantity);
  if (system !== 'case' && !('solute' in measured) && isSort(kind)) return quantityText(value, kind, system, figures);
  const basis = 'solute' in measured ? basisOf(plant, measured.solute, plant.liquid.feed.temperature) : undefined;
  return formatMeasured(value, unit, { quantity: measured.quantity, basis, range: undefined }, figures);
}

function isSort(kind: string): kind is keyof typeof UNITS {
  return Object.hasOwn(UNITS, kind);
}

/** mg per normal cubic metre, as g from 1000 mg on. */
export function normalMassText(mgPerNm3: number): string {
  if (mgPerNm3 >= 1000) return `${formatNumber(mgPerNm3 / 1000, FIGURES)} g/Nm3`;
  return `${formatNumber(mgPerNm3, FIGURES)} mg/Nm3`;
}
