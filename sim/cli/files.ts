/** Reading and writing files. Whatever goes wrong with one is an issue, never a stack trace. */
import { readFileSync, realpathSync, statSync, writeFileSync } from 'node:fs';
import { dirname, resolve } from 'node:path';

import { LONGEST_TEXT, readCase, type Case, type Issue } from '../index.ts';
import { BadInput } from './exit.ts';

/** A case as it was read. */
export interface LoadedCase {
  readonly text: string;
  readonly plant: Case;
  readonly warnings: readonly Issue[];
}

/** Bytes that a text of the longest length can take in UTF-8. */
const MOST_BYTES = 4 * LONGEST_TEXT;
/** Most bytes of a trace or a saved run that are read. */
const LARGEST_FILE = 512e6;

/** Reads a case; traces and tables that it names are found beside it. @throws BadInput with every issue. */
export function loadCase(path: string): LoadedCase {
  const text = readText(path, 'case file', MOST_BYTES);
  const folder = dirname(path);
  const result = readCase(text, { resolveFile: (name) => readBeside(folder, name) });
  if (!result.ok) throw new BadInput([...result.issues, ...result.warnings]);
  return { text, plant: result.value, warnings: result.warnings };
}

/** Text of a file. @throws BadInput */
export function readText(path: string, what: string, mostBytes = LARGEST_FILE): string {
  const refuse = (expected: string, received: string): never => {
    throw new BadInput([{ path, expected, received, severity: 'error', kind: 'reference' }]);
  };
  try {
    const { size } = statSync(path);
    if (size > mostBytes) return refuse(`a ${what} of at most ${mostBytes / 1e6} MB`, `${(size / 1e6).toFixed(1)} MB`);
    return readFileSync(path, 'utf8').replace(/^\uFEFF/, '');
  } catch (error) {
    if (error instanceof BadInput) throw error;
    return refuse(`a ${what} that can be read`, reason(error));
  }
}

/** Writes a text, unless that would overwrite an input. @throws BadInput */
export function writeText(path: string, text: string, inputs: readonly string[]): void {
  const target = real(path);
  const input = inputs.find((other) => real(other) === target);
  if (input !== undefined) {
    throw new BadInput([
      { path, expected: 'a file other than the input', received: input, severity: 'error', kind: 'contradiction' },
    ]);
  }
  try {
    writeFileSync(path, text);
  } catch (error) {
    throw new BadInput([
      { path, expected: 'a file that can be written', received: reason(error), severity: 'error', kind: 'reference' },
    ]);
  }
}

function readBeside(folder: string, name: string): string | undefined {
  try {
    return readFileSync(resolve(folder, name), 'utf8');
  } catch {
    return undefined;
  }
}

function real(path: string): string {
  try {
    return realpathSync(path);
  } catch {
    return resolve(path);
  }
}

/** Why the system refused, in words. */
function reason(error: unknown): string {
  const code = error instanceof Error && 'code' in error ? String(error.code) : '';
  const known: Readonly<Record<string, string>> = {
    ENOENT: 'no such file or folder',
    EISDIR: 'a folder',
    ENOTDIR: 'a file where a folder belongs',
    EACCES: 'one without permission',
    EPERM: 'one without permission',
    EROFS: 'one on a read-only file system',
    ENOSPC: 'a full disk',
  };
  return known[code] ?? (code === '' ? 'one that failed' : code);
}
