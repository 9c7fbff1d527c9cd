// Units at the edges: phantom types for signatures, and the way from text with a unit to SI and back.
// Inside, every number is in SI base units (K, Pa, mol, kg, m, s); nothing here knows a column or a case.

declare const unit: unique symbol;

/** A number that carries its unit for the checker and costs nothing at run time. */
export type Quantity<U extends string> = number & {
  /** Phantom; never present at run time. */
  readonly [unit]?: U;
};

/** Temperature. */
export type Kelvin = Quantity<'K'>;
/** Pressure. */
export type Pascal = Quantity<'Pa'>;
/** Molar mass. */
export type KilogramPerMole = Quantity<'kg/mol'>;

export type { Kind, KindEntry, UnitEntry } from './units/kinds.ts';
export { KINDS, kindsWithUnit, unitEntry, unitsOf } from './units/kinds.ts';
export type { ParsedQuantity, QuantityIssue } from './units/parse.ts';
export { normaliseUnit, parseQuantity, splitQuantity } from './units/parse.ts';
export { formatNumber, formatQuantity, formatTime } from './units/format.ts';
export { NORMAL_MOLAR_VOLUME } from './units/factors.ts';
