/** Which unit a quantity stands in for a person, and numbers in it. */
import { KINDS, formatNumber, quantityText, type Kind, type QuantityKind } from '../../sim/index.ts';
import type { Units } from '../store/work.ts';

/** Kind of unit by sort of quantity. */
const KIND_OF: Readonly<Record<QuantityKind, Kind>> = {
  'gas-strength': 'mole-fraction',
  'liquid-strength': 'mole-fraction',
  'molar-flow': 'molar-flow',
  'volume-flow': 'volume-flow',
  'pressure-difference': 'pressure-difference',
  temperature: 'temperature',
  length: 'length',
  volume: 'volume',
  velocity: 'velocity',
  fraction: 'fraction',
};

/** Figures of a number that is read off. */
const FIGURES = 4;

/** A unit, and the way to it from the unit in which values come. */
export interface Display {
  readonly unit: string;
  convert(value: number): number;
  /** A number with its unit; "none" for a missing one. */ text(value: number, figures?: number): string;
}

/** What has values to be shown. */
export interface Shown {
  readonly kind: QuantityKind;
  /** Unit of the values: SI, or a strength's own. */ readonly unit: string;
  /** Unit in which the case states it. */ readonly ownUnit?: string | undefined;
}

/** The unit for a quantity: a strength in its own, else as the person chose, else as the case states it. */
export function displayOf({ kind, unit, ownUnit }: Shown, units: Units): Display {
  const isOwn = (kind === 'gas-strength' || kind === 'liquid-strength') && unit !== 'mol/mol';
  if (isOwn) return display(unit, (value) => value);
  const chosen = units.own[kind];
  const system = units.system === 'case' ? 'si' : units.system;
  const wish = chosen ?? (units.system === 'case' && ownUnit !== undefined ? ownUnit : systemUnit(kind, system));
  const entry = KINDS[KIND_OF[kind]].units.find((u) => u.symbol === wish);
  if (entry === undefined) return display(unit, (value) => value);
  return display(entry.symbol, (value) => value / entry.factor - entry.offset);
}

/** Unit of a sort of quantity in a system, as the command line writes it. */
function systemUnit(kind: QuantityKind, system: 'si' | 'us'): string {
  return quantityText(1, kind, system).split(' ').slice(1).join(' ');
}

/** Units that a sort of quantity may stand in. */
export function unitChoices(kind: QuantityKind): readonly string[] {
  return KINDS[KIND_OF[kind]].units.map((u) => u.symbol);
}

function display(unit: string, convert: (value: number) => number): Display {
  return {
    unit,
    convert,
    text: (value, figures = FIGURES) =>
      Number.isFinite(value) ? numberWithUnit(formatNumber(convert(value), figures), unit) : 'none',
  };
}

function numberWithUnit(number: string, unit: string): string {
  return unit === '1' ? number : `${number} ${unit}`;
}
