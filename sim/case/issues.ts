// What is wrong with a case, as data, and the one function that makes a sentence of it.
// Checks that need equations (can this plant run?) are made elsewhere and answer in the same form.

/** One thing wrong, or worth a look, in a case. */
export interface Issue {
  /** Path of the key in the case file, `column.beds[0].height`; empty for the file as a whole. */
  readonly path: string;
  /** What would have been right, a noun phrase. */
  readonly expected: string;
  /** What stood there, shortened. */
  readonly received: string;
  /** How to mend it. */
  readonly hint?: string;
  /** An error keeps the case from being used. */
  readonly severity: 'error' | 'warning';
  readonly kind: IssueKind;
  /** Line and column of the text, from 1; syntax errors only. */
  readonly line?: number;
  readonly column?: number;
}

/**
 * What sort of trouble: for programs and tests, which match this and the path, never the sentence.
 * - `syntax`: not JSON, or the same key twice; `too-large`: refused unread; `version`: other format;
 * - `type`: text where a list belongs, and the like; `missing`; `unknown-key`; `choice`: not one of the words;
 * - `unit`: no such unit or none; `kind`: a unit of another kind; `number`: no number in the text;
 * - `range`: outside what the key allows; `reference`: no such tag, step, substance, file;
 * - `contradiction`: two statements that cannot both hold; `cycle`; `duplicate`; `trace`: a table's rows;
 * - `style`: allowed, unusual; `physics`: found by the equations.
 */
export type IssueKind =
  | 'syntax'
  | 'too-large'
  | 'version'
  | 'type'
  | 'missing'
  | 'unknown-key'
  | 'choice'
  | 'unit'
  | 'kind'
  | 'number'
  | 'range'
  | 'reference'
  | 'contradiction'
  | 'cycle'
  | 'duplicate'
  | 'trace'
  | 'style'
  | 'physics';

/** Longest piece of the user's text that an issue repeats, characters. */
const RECEIVED_LENGTH = 60;

/**
 * The sentence of an issue.
 *
 * `column.beds[0].height: expected a length in (0 m, 100 m], received "6 kg" - kg is a mass; write for example "5 m"`
 */
export function issueSentence(issue: Issue): string {
  const where = issue.path === '' ? 'case' : issue.path;
  const at = issue.line === undefined ? '' : ` (line ${issue.line}, column ${issue.column ?? 1})`;
  const hint = issue.hint === undefined ? '' : ` - ${issue.hint}`;
  return `${where}${at}: expected ${issue.expected}, received ${issue.received}${hint}`;
}

/** A value as an issue repeats it: JSON, cut after 60 characters. */
export function shorten(value: unknown): string {
  if (value === undefined) return 'nothing';
  const json = JSON.stringify(value) ?? typeof value;
  const long = json.length > RECEIVED_LENGTH && typeof value === 'object' && value !== null;
  const text = !long ? json : Array.isArray(value) ? `a list of ${value.length}` : `an object with ${keysOf(value)}`;
  return text.length > RECEIVED_LENGTH ? `${text.slice(0, RECEIVED_LENGTH - 1)}…` : text;
}

/** A path extended by a key or an index. */
export function join(path: string, key: string | number): string {
  if (typeof key === 'number') return `${path}[${key}]`;
  return path === '' ? key : `${path}.${key}`;
}

function keysOf(value: object): string {
  return Object.keys(value).slice(0, 4).join(', ');
}
