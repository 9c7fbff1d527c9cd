// Bricks of the case schema: quantities as text with their unit, tags, shares. Each brick carries in its
// metadata what an editor needs (description, pattern, examples) and what an issue says (noun).

import * as v from 'valibot';

import type { Kind } from '../../units.ts';
import { KINDS, formatNumber, parseQuantity } from '../../units.ts';
import { quantityIssueKind } from '../reading.ts';
import { quantityPattern } from './pattern.ts';

/** Bounds of a quantity, SI; `above` and `below` exclude the bound itself. */
export interface Range {
  readonly min?: number;
  readonly above?: number;
  readonly max?: number;
  readonly below?: number;
}

/** Key under which a brick keeps its noun for issues; left out of the JSON Schema. */
export const NOUN = 'bedwaveNoun';

/**
 * A quantity as text with its unit, read to SI.
 *
 * @param kind - Kind; shares and plain numbers may also be JSON numbers.
 * @param range - Allowed values, SI.
 * @param description - One phrase for editors.
 */
export function quantity(kind: Kind, range: Range = {}, description?: string) {
  const entry = KINDS[kind];
  const allowed = rangeText(kind, range);
  const noun = allowed === '' ? entry.noun : `${entry.noun} ${allowed}`;
  const bare = kind === 'fraction' || kind === 'number';
  return v.pipe(
    v.unknown(),
    v.metadata({
      [NOUN]: noun,
      description: description === undefined ? noun : `${description}: ${noun}`,
      examples: [entry.example],
      ...(bare
        ? { anyOf: [{ type: 'number' }, { type: 'string', pattern: quantityPattern(kind) }] }
        : { type: 'string', pattern: quantityPattern(kind) }),
    }),
    v.rawTransform<unknown, number>(({ dataset, addIssue, NEVER }) => {
      const parsed =
        bare && typeof dataset.value === 'number'
          ? { ok: true as const, value: dataset.value, unit: '1' }
          : parseQuantity(dataset.value, kind);
      if (!parsed.ok) {
        addIssue({ expected: noun, message: `${quantityIssueKind(parsed.issue.reason)}|${parsed.issue.hint}` });
        return NEVER;
      }
      if (!within(parsed.value, range)) {
        addIssue({ expected: noun, message: 'range|' });
        return NEVER;
      }
      return parsed.value;
    }),
  );
}

/** Text whose kind depends on its surroundings (strengths, setpoints); read later. */
export function text(description: string, example?: string) {
  return v.pipe(
    v.string(),
    v.metadata({
      [NOUN]: description,
      description,
      ...(example === undefined ? {} : { examples: [example] }),
    }),
  );
}

/** Text or a plain number whose kind depends on its surroundings. */
export function textOrNumber(description: string, example?: string) {
  return v.pipe(
    v.union([v.string(), v.number()]),
    v.metadata({
      [NOUN]: description,
      description,
      ...(example === undefined ? {} : { examples: [example] }),
    }),
  );
}

/** A whole number in a range. */
export function count(min: number, max: number, description: string) {
  const noun = `a whole number from ${min} to ${max}`;
  return v.pipe(
    v.number(),
    v.metadata({ [NOUN]: noun, description: `${description}: ${noun}`, minimum: min, maximum: max, type: 'integer' }),
    v.check((value) => Number.isInteger(value) && value >= min && value <= max, noun),
  );
}

/** A plain number, in a range when one is given. */
export function number(range: Range, description: string) {
  return quantity('number', range, description);
}

/** A yes or no. */
export function yesNo(description: string) {
  return v.pipe(v.boolean(), v.metadata({ [NOUN]: 'true or false', description }));
}

/** One of a few words. */
export function choice<const T extends readonly string[]>(words: T, description: string) {
  return v.pipe(v.picklist(words), v.metadata({ [NOUN]: `one of ${words.join(', ')}`, description }));
}

/** The tag of a device or an instrument. */
export function tag(description = 'a tag, such as "FT-311"') {
  return v.pipe(
    v.string(),
    v.metadata({ [NOUN]: 'a tag', description, examples: ['FT-311'] }),
    v.check((value) => value.trim() !== '' && value === value.trim(), 'a tag without blanks around it'),
  );
}

/** An object with exactly these keys, those in `optional(...)` aside. */
export const group = v.strictObject;
export const maybe = v.optional;

function within(value: number, range: Range): boolean {
  return (
    Number.isFinite(value) &&
    (range.min === undefined || value >= range.min) &&
    (range.above === undefined || value > range.above) &&
    (range.max === undefined || value <= range.max) &&
    (range.below === undefined || value < range.below)
  );
}

/** `in (0 m, 100 m]`, `from 0 Pa`, `above 0 m`; empty without bounds. */
function rangeText(kind: Kind, range: Range): string {
  const unit = KINDS[kind].units[0].symbol;
  const show = (value: number): string => (unit === '1' ? formatNumber(value, 6) : `${formatNumber(value, 6)} ${unit}`);
  const low = range.above ?? range.min;
  const high = range.below ?? range.max;
  if (low !== undefined && high !== undefined) {
    return `in ${range.above === undefined ? '[' : '('}${show(low)}, ${show(high)}${range.below === undefined ? ']' : ')'}`;
  }
  if (low !== undefined) return range.above === undefined ? `of at least ${show(low)}` : `above ${show(low)}`;
  if (high !== undefined) return range.below === undefined ? `of at most ${show(high)}` : `below ${show(high)}`;
  return '';
}
