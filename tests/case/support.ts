// Case texts for tests: the shipped ones, and changes to them.

import { readFileSync } from 'node:fs';

import type { Case } from '../../sim/case/case.ts';
import type { Issue } from '../../sim/case/issues.ts';
import type { ReadOptions } from '../../sim/case/read.ts';
import { readCase } from '../../sim/case/read.ts';

/** Text of a shipped case. */
export function caseText(name: string): string {
  return readFileSync(new URL(`../../cases/${name}.json`, import.meta.url), 'utf8');
}

/** A JSON tree in which tests set and delete keys. */
export interface Tree {
  [key: string]: unknown;
}

/** The acetone case as a tree, free to be changed. */
export function acetone(): Tree {
  return JSON.parse(caseText('acetone-absorber')) as Tree;
}

/** Sets a value at a dotted path; `undefined` deletes the key. */
export function put(tree: Tree, path: string, value: unknown): Tree {
  const keys = path.split('/');
  const last = keys.pop() ?? '';
  let at: Tree = tree;
  for (const key of keys) at = at[key] as Tree;
  if (value === undefined) Reflect.deleteProperty(at, last);
  else at[last] = value;
  return tree;
}

/** The acetone case with one change. */
export function changed(path: string, value: unknown): string {
  return JSON.stringify(put(acetone(), path, value));
}

/** Path and kind of every issue; an empty list for a case that reads. */
export function faults(text: string, options: ReadOptions = {}): string[] {
  return issuesOf(text, options).map(({ path, kind }) => `${path}: ${kind}`);
}

/** Every issue. */
export function issuesOf(text: string, options: ReadOptions = {}): readonly Issue[] {
  const result = readCase(text, options);
  return result.ok ? [] : result.issues;
}

/** The case of a text that must read. */
export function mustRead(text: string, options: ReadOptions = {}): Case {
  const result = readCase(text, options);
  if (!result.ok) throw new Error(JSON.stringify(result.issues));
  return result.value;
}
