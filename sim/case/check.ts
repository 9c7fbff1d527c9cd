// A section of a case against its schema: every issue with path, expectation, what stood there and the
// nearest known word. Unknown keys are noted all at once and taken out, so that the rest is still checked.

import * as v from 'valibot';

import type { IssueKind } from './issues.ts';
import { join } from './issues.ts';
import { suggestion } from './nearest.ts';
import type { Reading } from './reading.ts';
import { NOUN } from './schema/primitives.ts';

type Schema = v.GenericSchema;
type Key = string | number;

/** What the walk needs to know of the inside of a schema; all parts are optional by its type. */
interface Inside {
  readonly type: string;
  readonly entries?: Readonly<Record<string, Schema>>;
  readonly item?: Schema;
  readonly items?: readonly Schema[];
  readonly value?: Schema;
  readonly wrapped?: Schema;
  readonly options?: readonly unknown[];
  readonly key?: unknown;
  readonly literal?: unknown;
}

/**
 * The section's value after its schema, or undefined after noting why not.
 *
 * @param path - Path of the section in the case file.
 */
export function checkSection<S extends Schema>(
  reading: Reading,
  schema: S,
  value: unknown,
  path: string,
): v.InferOutput<S> | undefined {
  const known = withoutUnknownKeys(reading, schema, value, path);
  const result = v.safeParse(schema, known);
  if (result.success) return result.output;
  for (const issue of result.issues) note(reading, schema, known, path, issue);
  return undefined;
}

/** Notes each unknown key and returns the value without them. */
function withoutUnknownKeys(reading: Reading, schema: Schema, value: unknown, path: string): unknown {
  const chosen = branch(schema, value);
  const inside = chosen as unknown as Inside;
  if (Array.isArray(value)) {
    return value.map((item: unknown, index) => {
      const of = child(chosen, index);
      return of === undefined ? item : withoutUnknownKeys(reading, of, item, join(path, index));
    });
  }
  if (!isObject(value)) return value;
  const out: Record<string, unknown> = {};
  for (const [key, item] of Object.entries(value)) {
    const of = child(chosen, key);
    if (of !== undefined) {
      define(out, key, withoutUnknownKeys(reading, of, item, join(path, key)));
    } else if (inside.entries === undefined) {
      define(out, key, item);
    } else {
      const keys = Object.keys(inside.entries);
      const where = path === '' ? 'the case' : path;
      reading.object('unknown-key', join(path, key), `a key that ${where} knows`, `"${key}"`, suggestion(key, keys));
    }
  }
  return out;
}

/** The schema inside wrappers and unions that fits a value best. */
function branch(schema: Schema, value: unknown): Schema {
  const inside = schema as unknown as Inside;
  if (inside.type === 'optional' && inside.wrapped !== undefined) return branch(inside.wrapped, value);
  const options = inside.options as readonly Schema[] | undefined;
  if (inside.type === 'variant' && isObject(value)) {
    const word = value[String(inside.key)];
    const found = options?.find((option) => {
      const entry = (option as unknown as Inside).entries?.[String(inside.key)];
      return (entry as unknown as Inside | undefined)?.literal === word;
    });
    return found ?? schema;
  }
  if (inside.type !== 'union' || options === undefined) return schema;
  if (Array.isArray(value)) {
    const list = options.find((option) => has(option, 'array') || has(option, 'tuple'));
    return list ?? schema;
  }
  if (!isObject(value)) return schema;
  const objects = options.filter((o) => has(o, 'strict_object') || has(o, 'record') || has(o, 'variant'));
  let best = objects[0];
  let most = -1;
  for (const option of objects) {
    const keys = (option as unknown as Inside).entries ?? {};
    const shared = Object.keys(value).filter((key) => Object.hasOwn(keys, key)).length;
    if (shared > most) {
      most = shared;
      best = option;
    }
  }
  return best === undefined ? schema : branch(best, value);
}

/** The schema of a key of an object, or of an index of a list. */
function child(schema: Schema, key: Key): Schema | undefined {
  const inside = schema as unknown as Inside;
  if (typeof key === 'number') return inside.items?.[key] ?? inside.item;
  if (inside.type === 'record') return inside.value;
  return inside.entries !== undefined && Object.hasOwn(inside.entries, key) ? inside.entries[key] : undefined;
}

function schemaAt(schema: Schema, value: unknown, keys: readonly Key[]): Schema | undefined {
  let at: Schema | undefined = schema;
  let here = value;
  for (const key of keys) {
    if (at === undefined) return undefined;
    at = child(branch(at, here), key);
    here = isObject(here) || Array.isArray(here) ? (here as Record<Key, unknown>)[key] : undefined;
  }
  return at;
}

/** Turns one issue of the schema library into ours; of a union, those of the branch that was meant. */
function note(reading: Reading, schema: Schema, root: unknown, path: string, issue: v.BaseIssue<unknown>): void {
  const keys = (issue.path ?? []).map((item) => item.key as Key);
  const where = keys.reduce<string>(join, path);
  const target = schemaAt(schema, root, keys);
  const noun = target === undefined ? phrase(issue.expected) : nounOf(target);
  if (issue.type === 'union' && target !== undefined) {
    const meant = branch(target, issue.input);
    if (!has(meant, 'union')) {
      for (const one of v.safeParse(meant, issue.input).issues ?? []) note(reading, meant, issue.input, where, one);
      return;
    }
    const own = (issue.issues ?? []).find((one) => one.type === 'raw_transform');
    if (own !== undefined && typeof issue.input === 'string') {
      noteQuantity(reading, where, own);
      return;
    }
  }
  if (issue.input === undefined && issue.kind === 'schema') {
    reading.object('missing', where, noun, 'nothing', 'this key is required');
  } else if (issue.type === 'raw_transform') {
    noteQuantity(reading, where, issue);
  } else if (issue.kind === 'validation') {
    reading.refuse('range', where, issue.message, issue.input);
  } else {
    const words = quotedWords(issue.expected);
    if (words.length > 0) {
      const hint = typeof issue.input === 'string' ? suggestion(issue.input, words) : undefined;
      reading.refuse('choice', where, `one of ${words.join(', ')}`, issue.input, hint);
    } else {
      reading.refuse('type', where, noun, issue.input);
    }
  }
}

/** An issue of a quantity brick: its message is `kind|hint`. */
function noteQuantity(reading: Reading, where: string, issue: v.BaseIssue<unknown>): void {
  if (issue.input === undefined) {
    reading.object('missing', where, phrase(issue.expected), 'nothing', 'this key is required');
    return;
  }
  const [kind = 'type', hint = ''] = issue.message.split('|');
  const expected = phrase(issue.expected);
  reading.refuse(kind as IssueKind, where, expected, issue.input, hint === '' ? undefined : hint);
}

/** What a schema asks for, as a noun phrase. */
function nounOf(schema: Schema): string {
  const noun = v.getMetadata(schema)[NOUN];
  if (typeof noun === 'string') return noun;
  const inside = schema as unknown as Inside;
  if (inside.wrapped !== undefined) return nounOf(inside.wrapped);
  if (inside.type === 'union') return (inside.options as readonly Schema[]).map(nounOf).join(', or ');
  if (inside.type === 'variant') return `an object with the key "${String(inside.key)}"`;
  if (inside.type === 'strict_object') {
    const required = Object.entries(inside.entries ?? {})
      .filter(([, entry]) => !has(entry, 'optional'))
      .map(([key]) => key);
    return required.length === 0 ? 'an object' : `an object with ${required.join(', ')}`;
  }
  if (inside.type === 'record') return 'an object';
  if (inside.type === 'array') return 'a list';
  if (inside.type === 'tuple') return `a list of ${inside.items?.length ?? 0}`;
  if (inside.type === 'literal') return JSON.stringify(inside.literal);
  if (inside.type === 'boolean') return 'true or false';
  return inside.type === 'string' ? 'text' : `a ${inside.type}`;
}

/** The words of a choice as the schema library lists them, `("wet" | "dry")`; empty for anything else. */
function quotedWords(expected: string | null): readonly string[] {
  return (expected?.startsWith('(') ?? false) || (expected?.startsWith('"') ?? false)
    ? [...(expected ?? '').matchAll(/"([^"]*)"/g)].map((match) => match[1] ?? '')
    : [];
}

const TYPE_WORDS: Readonly<Record<string, string>> = {
  string: 'text',
  Object: 'an object',
  Array: 'a list',
  boolean: 'true or false',
  number: 'a number',
};

function phrase(expected: string | null): string {
  const words = quotedWords(expected);
  if (words.length > 0) return words.length === 1 ? `"${words.join('')}"` : `one of ${words.join(', ')}`;
  return expected === null ? 'another value' : (TYPE_WORDS[expected] ?? expected);
}

function has(schema: Schema, type: string): boolean {
  return (schema as unknown as Inside).type === type;
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** Sets a key without letting `__proto__` act. */
function define(out: Record<string, unknown>, key: string, value: unknown): void {
  Object.defineProperty(out, key, { value, enumerable: true, configurable: true, writable: true });
}
