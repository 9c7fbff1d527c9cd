// Text with a unit -> SI. A quantity is one number and one unit, or for times a sum ("6 min 20 s") or
// h:mm:ss. What is wrong comes back as data; the caller knows the path and makes the sentence.

import type { Kind, UnitEntry } from './kinds.ts';
import { KINDS, kindsWithUnit, unitEntry, unitsOf } from './kinds.ts';

/** Why a text is not a quantity of the kind asked for. */
export interface QuantityIssue {
  /** What would have been right, a noun phrase. */
  readonly expected: string;
  /** How to mend it. */
  readonly hint: string;
  readonly reason: 'not-text' | 'no-number' | 'no-unit' | 'unknown-unit' | 'other-kind';
}

/** Value in SI and the unit's symbol as the table writes it, or the issue. */
export type ParsedQuantity =
  | { readonly ok: true; readonly value: number; readonly unit: string }
  | { readonly ok: false; readonly issue: QuantityIssue };

// A number: sign, digits (groups of three may be set apart by one space), point, exponent.
const NUMBER = /^[+-]?(?:\d{1,3}(?: \d{3})+|\d+)?(?:\.\d*)?(?:[eE][+-]?\d+)?/;
const DECIMAL_COMMA = /^[+-]?\d+,\d/;
const CLOCK = /^(\d+):([0-5]\d):([0-5]\d(?:\.\d+)?)$/;

const LOOKALIKES: readonly (readonly [RegExp, string])[] = [
  [/[\u00a0\u2009\u202f]/g, ' '],
  [/\u2212/g, '-'],
  [/[\u00b5\u03bc]/g, 'u'],
  [/\u00b2/g, '2'],
  [/\u00b3/g, '3'],
  [/\u2082/g, '2'],
  [/[\u00b7\u22c5]/g, ' '],
  [/\u2103/g, 'degC'],
  [/\u2109/g, 'degF'],
  [/\u00b0 ?/g, 'deg'],
  [/\u0394 ?/g, 'delta '],
];

/**
 * A unit in the table's spelling: superscripts, micro and degree signs, `^2`, `m_N3` and double
 * blanks are levelled. Case is kept: `mPa` is not `MPa`.
 */
export function normaliseUnit(text: string): string {
  let out = text;
  for (const [pattern, plain] of LOOKALIKES) out = out.replace(pattern, plain);
  return out
    .replace(/\^/g, '')
    .replace(/\*/g, ' ')
    .replace(/\s+/g, ' ')
    .replace(/ ?\/ ?/g, '/')
    .replace(/\( /g, '(')
    .replace(/ \)/g, ')')
    .trim();
}

/**
 * Number and unit of a text, apart.
 *
 * @returns The number, NaN when the text does not start with one, and the rest, normalised.
 */
export function splitQuantity(text: string): { readonly number: number; readonly unit: string } {
  const clean = normaliseUnit(text);
  const match = NUMBER.exec(clean)?.[0] ?? '';
  const digits = match.replace(/ /g, '');
  const number = /\d/.test(digits) ? Number(digits) : Number.NaN;
  return { number, unit: clean.slice(match.length).trim() };
}

/**
 * A quantity in SI from text such as "5 m", "15 degC", "3870 Nm3/h".
 *
 * @param text - As typed; anything but text is refused.
 * @param kind - Kind that the place asks for.
 * @returns SI value (K, Pa, mol, kg, m, s and products), or the issue. Ranges are the caller's.
 */
export function parseQuantity(text: unknown, kind: Kind): ParsedQuantity {
  const { noun, example } = KINDS[kind];
  const refuse = (reason: QuantityIssue['reason'], hint: string): ParsedQuantity => ({
    ok: false,
    issue: { expected: noun, hint, reason },
  });
  const write = `write for example "${example}"`;
  if (typeof text !== 'string') return refuse('not-text', `a quantity is text with its unit; ${write}`);
  const clean = normaliseUnit(text);
  if (DECIMAL_COMMA.test(clean)) return refuse('no-number', 'use a decimal point');
  if (kind === 'time') {
    const time = parseTime(clean);
    if (time !== undefined) return { ok: true, value: time, unit: 's' };
  }
  const { number, unit } = splitQuantity(clean);
  if (!Number.isFinite(number)) return refuse('no-number', write);
  const entry = unitEntry(kind, unit);
  if (entry !== undefined) {
    const value = toSI(number, entry);
    return Number.isFinite(value) ? { ok: true, value, unit: entry.symbol } : refuse('no-number', write);
  }
  if (unit === '') return refuse('no-unit', `the unit is missing; ${write}`);
  const special = specialHint(unit, kind);
  if (special !== undefined) return refuse('unknown-unit', special);
  const others = kindsWithUnit(unit);
  const other = others[0];
  if (other !== undefined) return refuse('other-kind', `${unit} is ${KINDS[other].noun}; ${write}`);
  const known = unitsOf(kind).filter((symbol) => symbol !== '1');
  const sameLetters = known.find((symbol) => symbol.toLowerCase() === unit.toLowerCase());
  if (sameLetters !== undefined) return refuse('unknown-unit', `did you mean ${sameLetters}?`);
  return refuse(
    'unknown-unit',
    known.length === 0 ? `no unit belongs here; ${write}` : `known units: ${known.join(', ')}`,
  );
}

/** SI value of a number in a unit. */
function toSI(number: number, entry: UnitEntry): number {
  return (number + entry.offset) * entry.factor;
}

/** Seconds from "6 min 20 s", "1:05:00"; undefined when the text is neither. */
function parseTime(text: string): number | undefined {
  const clock = CLOCK.exec(text);
  if (clock !== null) return Number(clock[1]) * 3600 + Number(clock[2]) * 60 + Number(clock[3]);
  const parts = text.match(/\d+(?:\.\d+)? ?[a-z]+/g);
  if (parts === null || parts.length < 2 || parts.join(' ').replace(/ /g, '') !== text.replace(/ /g, '')) {
    return undefined;
  }
  let seconds = 0;
  let last = Number.POSITIVE_INFINITY;
  for (const part of parts) {
    const { number, unit } = splitQuantity(part);
    const entry = unitEntry('time', unit);
    // Larger units first, each once: "20 s 6 min" is more likely a slip than a time.
    if (entry === undefined || entry.factor >= last) return undefined;
    last = entry.factor;
    seconds += number * entry.factor;
  }
  return seconds;
}

/** Hints for units that mislead people more often than others. */
function specialHint(unit: string, kind: Kind): string | undefined {
  if (unit === 'ppm' || unit === 'ppb') {
    return `${unit} alone is ambiguous; write ${unit}v for a mole fraction or ${unit}w for a mass fraction`;
  }
  if (kind === 'absolute-pressure' && unitEntry('pressure-difference', unit) !== undefined) {
    return `say absolute or gauge: ${unit}(a) or ${unit}(g)`;
  }
  if (kind === 'pressure-difference' && unitEntry('absolute-pressure', unit) !== undefined) {
    return `a difference is neither absolute nor gauge; write for example "2.6 kPa"`;
  }
  if (kind === 'temperature-difference' && unitEntry('temperature', unit) !== undefined) {
    return `${unit} has its own zero; write a difference in K or as delta ${unit}`;
  }
  if (kind === 'molar-flow' && unitEntry('volume-flow', unit) !== undefined) {
    return `${unit} is an actual volume flow, which needs temperature and pressure; write Nm3/h, scf/min or mol/s`;
  }
  if (kind === 'volume-flow' && unitEntry('molar-flow', unit) !== undefined) {
    return `${unit} is a molar or normal flow; write for example "8.6 m3/h"`;
  }
  if (kind === 'mole-fraction' && unit === '%') return 'write mol% or vol%';
  if (kind === 'mass-fraction' && unit === '%') return 'write wt%';
  return undefined;
}
