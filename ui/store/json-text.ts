/**
 * Edits of a JSON text at a path that leave the rest of the text as it is: order, spacing, numbers as typed. The text
 * must be JSON (callers parse it first); a path that does not lead anywhere throws.
 */

/** A way into a document: keys and indices. */
export type Path = readonly (string | number)[];

interface Member {
  readonly key: string | number;
  /** Of the key (objects) or the value (lists). */ readonly start: number;
  readonly valueStart: number;
  readonly valueEnd: number;
}

const BLANK = /[ \t\r\n]/;
/** Longest object or list that is written on one line, characters. */
const ONE_LINE = 100;

/** Reads `column.beds[0].height`. Tags and ids may hold anything but dots and brackets. */
export function parsePath(text: string): Path {
  const path: (string | number)[] = [];
  for (const [, key, index] of text.matchAll(/([^.[\]]+)|\[(\d+)\]/g))
    path.push(index === undefined ? (key ?? '') : Number(index));
  return path;
}

/** Writes a path as issues and sources name it. */
export function pathText(path: Path): string {
  return path.reduce<string>(
    (text, key) => (typeof key === 'number' ? `${text}[${key}]` : text === '' ? key : `${text}.${key}`),
    '',
  );
}

/** The value at a path of a parsed document; undefined where there is none. */
export function valueAt(document: unknown, path: Path): unknown {
  let at: unknown = document;
  for (const key of path) {
    if (typeof at !== 'object' || at === null) return undefined;
    at = (at as Record<string | number, unknown>)[key];
  }
  return at;
}

/** The text with a value in place of the one at a path; a missing key, or the index after the last, is added. */
export function setAt(text: string, path: Path, value: unknown): string {
  const { start, end, missing } = locate(text, path);
  if (missing.length === 0) return text.slice(0, start) + written(value, indentAt(text, start)) + text.slice(end);
  const [key, ...deeper] = missing;
  if (key === undefined) throw new RangeError('no path');
  const nested = deeper.reduceRight<unknown>((inner, k) => (typeof k === 'number' ? [inner] : { [k]: inner }), value);
  return insert(text, start, end, key, nested);
}

/** The text without the entry at a path; the same text when there is none. */
export function removeAt(text: string, path: Path): string {
  const parent = locate(text, path.slice(0, -1));
  const key = path[path.length - 1];
  if (parent.missing.length > 0) return text;
  const members = membersOf(text, parent.start);
  const i = members.findIndex((m) => m.key === key);
  const member = members[i];
  if (member === undefined) return text;
  const next = members[i + 1];
  const before = members[i - 1];
  if (next !== undefined) return text.slice(0, member.start) + text.slice(next.start);
  if (before !== undefined) return text.slice(0, before.valueEnd) + text.slice(member.valueEnd);
  const close = text[parent.start] === '[' ? '[]' : '{}';
  return text.slice(0, parent.start) + close + text.slice(parent.end);
}

/** Where a path leads, as far as it does: the value's span, and the keys that are missing below it. */
function locate(text: string, path: Path): { start: number; end: number; missing: Path } {
  let start = skipBlank(text, 0);
  let end = skipValue(text, start);
  for (const [depth, key] of path.entries()) {
    const member = membersOf(text, start).find((m) => m.key === key);
    if (member === undefined) return { start, end, missing: path.slice(depth) };
    start = member.valueStart;
    end = member.valueEnd;
  }
  return { start, end, missing: [] };
}

function insert(text: string, start: number, end: number, key: string | number, value: unknown): string {
  const isList = text[start] === '[';
  const members = membersOf(text, start);
  if (!isList && text[start] !== '{') throw new RangeError('a value without entries');
  if (isList && key !== members.length) throw new RangeError('an index beyond the end');
  const outer = indentAt(text, start);
  const inner = `${outer}  `;
  const entry = (indent: string): string => (isList ? '' : `${JSON.stringify(key)}: `) + written(value, indent);
  const last = members[members.length - 1];
  if (last === undefined) {
    const [open, close] = isList ? ['[', ']'] : ['{', '}'];
    return `${text.slice(0, start)}${open}\n${inner}${entry(inner)}\n${outer}${close}${text.slice(end)}`;
  }
  const isBroken = text.slice(start, last.start).includes('\n');
  const between = isBroken ? `,\n${indentAt(text, last.start)}` : ', ';
  return `${text.slice(0, last.valueEnd)}${between}${entry(isBroken ? indentAt(text, last.start) : outer)}${text.slice(last.valueEnd)}`;
}

/** A value as text: on one line when short, else broken and set in. */
function written(value: unknown, indent: string): string {
  const flat = flatText(value);
  if (flat.length <= ONE_LINE || typeof value !== 'object' || value === null) return flat;
  const inner = `${indent}  `;
  const parts = Array.isArray(value)
    ? value.map((item) => inner + written(item, inner))
    : Object.entries(value).flatMap(([k, v]) =>
        v === undefined ? [] : [`${inner}${JSON.stringify(k)}: ${written(v, inner)}`],
      );
  const [open, close] = Array.isArray(value) ? ['[', ']'] : ['{', '}'];
  return `${open}\n${parts.join(',\n')}\n${indent}${close}`;
}

function flatText(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(flatText).join(', ')}]`;
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const parts = Object.entries(value).flatMap(([k, v]) =>
    v === undefined ? [] : [`${JSON.stringify(k)}: ${flatText(v)}`],
  );
  return parts.length === 0 ? '{}' : `{ ${parts.join(', ')} }`;
}

/** Blanks at the start of the line on which a place stands. */
function indentAt(text: string, at: number): string {
  const line = text.lastIndexOf('\n', at - 1) + 1;
  return /^[ \t]*/.exec(text.slice(line, at))?.[0] ?? '';
}

/** Entries of the object or list that starts at a place. */
function membersOf(text: string, start: number): Member[] {
  const isList = text[start] === '[';
  const members: Member[] = [];
  if (!isList && text[start] !== '{') return members;
  let at = skipBlank(text, start + 1);
  while (at < text.length && text[at] !== ']' && text[at] !== '}') {
    const begin = at;
    let key: string | number = members.length;
    if (!isList) {
      const keyEnd = skipValue(text, at);
      key = JSON.parse(text.slice(at, keyEnd)) as string;
      at = skipBlank(text, skipBlank(text, keyEnd) + 1);
    }
    const valueEnd = skipValue(text, at);
    members.push({ key, start: begin, valueStart: at, valueEnd });
    at = skipBlank(text, valueEnd);
    if (text[at] === ',') at = skipBlank(text, at + 1);
  }
  return members;
}

function skipBlank(text: string, at: number): number {
  let i = at;
  while (BLANK.test(text[i] ?? '')) i++;
  return i;
}

/** The place after the value that starts at a place. */
function skipValue(text: string, at: number): number {
  if (text[at] === '"') return skipString(text, at);
  if (text[at] !== '{' && text[at] !== '[') {
    let i = at;
    while (i < text.length && !/[,\]}\s]/.test(text[i] ?? '')) i++;
    return i;
  }
  let depth = 0;
  for (let i = at; i < text.length; i++) {
    const c = text[i];
    if (c === '"') i = skipString(text, i) - 1;
    else if (c === '{' || c === '[') depth++;
    else if (c === '}' || c === ']') {
      depth--;
      if (depth === 0) return i + 1;
    }
  }
  return text.length;
}

function skipString(text: string, at: number): number {
  for (let i = at + 1; i < text.length; i++) {
    if (text[i] === '\\') i++;
    else if (text[i] === '"') return i + 1;
  }
  return text.length;
}
