// SI -> text with a unit. What is written here can be read back by `parseQuantity`.

import type { Kind } from './kinds.ts';
import { unitEntry } from './kinds.ts';

/** Below or above these, numbers are written with an exponent. */
const SMALLEST_PLAIN = 1e-4;
const LARGEST_PLAIN = 1e7;

/**
 * A number with a given count of significant figures, trailing zeros after the point dropped.
 *
 * @param digits - 1 to 17; 17 reads back to the same number.
 */
export function formatNumber(value: number, digits: number): string {
  if (!Number.isFinite(value)) return String(value);
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size < SMALLEST_PLAIN || size >= LARGEST_PLAIN) return trimExponent(value.toExponential(digits - 1));
  const precise = value.toPrecision(digits);
  return precise.includes('e') ? trimExponent(String(Number(precise))) : trimZeros(precise);
}

/**
 * A quantity as text.
 *
 * @param value - SI.
 * @param kind - Kind of the quantity.
 * @param unit - One of the kind's units.
 * @param digits - Significant figures.
 * @throws RangeError when the kind does not have the unit: a mistake of the program, not of the user.
 */
export function formatQuantity(value: number, kind: Kind, unit: string, digits = 4): string {
  const entry = unitEntry(kind, unit);
  if (entry === undefined) throw new RangeError(`${kind} has no unit ${unit}`);
  const number = formatNumber(value / entry.factor - entry.offset, digits);
  if (entry.symbol === '1') return number;
  return `${number} ${entry.symbol}`;
}

/**
 * A time for people: "90 s", "6 min 20 s", "1 h 5 min"; parts of a second only below a minute.
 *
 * @param seconds - s; negative times keep their sign in front.
 */
export function formatTime(seconds: number): string {
  if (!Number.isFinite(seconds)) return String(seconds);
  if (seconds < 0) return `-${formatTime(-seconds)}`;
  if (seconds < 59.95) return `${formatNumber(seconds, seconds < 10 ? 2 : 3)} s`;
  const whole = Math.round(seconds);
  const h = Math.floor(whole / 3600);
  const min = Math.floor((whole % 3600) / 60);
  const s = whole % 60;
  const parts = [h > 0 ? `${h} h` : '', min > 0 ? `${min} min` : '', s > 0 ? `${s} s` : ''];
  return parts.filter((part) => part !== '').join(' ');
}

function trimZeros(text: string): string {
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}

function trimExponent(text: string): string {
  const [mantissa = '', exponent = ''] = text.split('e');
  return exponent === '' ? trimZeros(mantissa) : `${trimZeros(mantissa)}e${exponent.replace('+', '')}`;
}
