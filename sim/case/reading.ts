// What one reading of a case collects on its way: issues, and where each number comes from.

import type { Kind } from '../units.ts';
import { parseQuantity } from '../units.ts';
import type { Provenance } from './case.ts';
import type { Issue, IssueKind } from './issues.ts';
import { shorten } from './issues.ts';
import { suggestion } from './nearest.ts';

/** A value for a key that the case leaves out, with its origin. */
export interface Default<T> {
  readonly value: T;
  readonly source: string;
  readonly verified: Provenance['verified'];
}

/** Gives the text of a file that a case names, or undefined when there is none. */
export type ResolveFile = (name: string) => string | undefined;

/** Issues and origins of one reading. */
export class Reading {
  readonly issues: Issue[] = [];
  readonly warnings: Issue[] = [];
  readonly provenance: Provenance[] = [];
  readonly resolveFile: ResolveFile | undefined;

  constructor(resolveFile: ResolveFile | undefined) {
    this.resolveFile = resolveFile;
  }

  /** Notes an error. */
  refuse(kind: IssueKind, path: string, expected: string, received: unknown, hint?: string): void {
    this.issues.push(issue('error', kind, path, expected, shorten(received), hint));
  }

  /** Notes an error whose received part is a phrase of ours, not the user's text. */
  object(kind: IssueKind, path: string, expected: string, received: string, hint?: string): void {
    this.issues.push(issue('error', kind, path, expected, received, hint));
  }

  /** Notes something allowed that deserves a look. */
  warn(kind: IssueKind, path: string, expected: string, received: string, hint?: string): void {
    this.warnings.push(issue('warning', kind, path, expected, received, hint));
  }

  /** Notes a name that nothing carries, with the nearest one that something does. */
  unknown(path: string, what: string, name: string, known: readonly string[]): void {
    this.refuse('reference', path, what, name, suggestion(name, known));
  }

  /** The given value, or the default; either way its origin is kept. */
  fill<T>(path: string, given: T | undefined, fallback: Default<T>): T {
    if (given !== undefined) {
      this.stated(path);
      return given;
    }
    this.provenance.push({ path, source: fallback.source, verified: fallback.verified, isDefault: true });
    return fallback.value;
  }

  /** Keeps that the case file states a value. */
  stated(path: string): void {
    this.provenance.push({ path, source: 'case file', verified: 'user', isDefault: false });
  }

  /** Keeps the origin of a value taken from the library. */
  taken(path: string, source: string, verified: Provenance['verified']): void {
    this.provenance.push({ path, source, verified, isDefault: true });
  }

  /** A quantity in SI, or undefined after noting the issue. */
  quantity(path: string, text: unknown, kind: Kind): number | undefined {
    const parsed = parseQuantity(text, kind);
    if (parsed.ok) return parsed.value;
    this.refuse(quantityIssueKind(parsed.issue.reason), path, parsed.issue.expected, text, parsed.issue.hint);
    return undefined;
  }
}

/** The issue kind that goes with a reason of the parser. */
export function quantityIssueKind(
  reason: 'not-text' | 'no-number' | 'no-unit' | 'unknown-unit' | 'other-kind',
): IssueKind {
  if (reason === 'not-text') return 'type';
  if (reason === 'no-number') return 'number';
  return reason === 'other-kind' ? 'kind' : 'unit';
}

function issue(
  severity: Issue['severity'],
  kind: IssueKind,
  path: string,
  expected: string,
  received: string,
  hint: string | undefined,
): Issue {
  const base = { path, expected, received, severity, kind };
  return hint === undefined ? base : { ...base, hint };
}
