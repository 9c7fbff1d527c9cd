/** What a person works on: saved, shared, undone and redone as one value. Plain data. */

/** A run that leaves the scenario at a moment with other actions. Kept beside the case until it is made a scenario. */
export interface Branch {
  readonly id: string;
  readonly label: string;
  /** s from the start of the scenario. */ readonly at: number;
  /** The action, as a case file writes it, without its time. */ readonly action: Readonly<Record<string, unknown>>;
  /** Whether the scenario's own actions after that moment still happen; its upsets always do. */ readonly keepsLater: boolean;
  /** Place among the line colours, from 1. */ readonly line: number;
}

/** Units for people: a system, and kinds that stand in a unit of their own. */
export interface Units {
  readonly system: 'case' | 'si' | 'us';
  /** Unit by sort of quantity. */ readonly own: Readonly<Record<string, string>>;
}

/** The work. */
export interface Work {
  /** File name, without a folder. */ readonly name: string;
  /** Text of the case file: the one truth about the case. */ readonly text: string;
  /** Texts of files that the case names, by that name. */ readonly files: Readonly<Record<string, string>>;
  /** Id of the scenario that is looked at. */ readonly scenario: string;
  readonly branches: readonly Branch[];
  readonly units: Units;
}

/** Most branches beside the scenario itself. */
export const MOST_BRANCHES = 4;

/** A work on the text of a case, at its first scenario. */
export function workOn(name: string, text: string, files: Readonly<Record<string, string>> = {}): Work {
  return { name, text, files, scenario: firstScenario(text), branches: [], units: { system: 'case', own: {} } };
}

/** Id of the first scenario of a text; empty when it has none or cannot be read. */
function firstScenario(text: string): string {
  try {
    const document = JSON.parse(text) as { scenarios?: Record<string, unknown> };
    return Object.keys(document.scenarios ?? {})[0] ?? '';
  } catch {
    return '';
  }
}

/** A work from outside (storage, a link), or undefined when it is none. */
export function asWork(value: unknown): Work | undefined {
  if (typeof value !== 'object' || value === null) return undefined;
  const { name, text, files, scenario, branches, units } = value as Partial<Record<keyof Work, unknown>>;
  if (typeof name !== 'string' || typeof text !== 'string' || typeof scenario !== 'string') return undefined;
  return {
    name,
    text,
    scenario,
    files: isRecord(files) ? textsOf(files) : {},
    branches: Array.isArray(branches) ? branches.filter(isBranch).slice(0, MOST_BRANCHES) : [],
    units: unitsOf(units),
  };
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function textsOf(record: Record<string, unknown>): Record<string, string> {
  return Object.fromEntries(Object.entries(record).filter((e): e is [string, string] => typeof e[1] === 'string'));
}

function isBranch(value: unknown): value is Branch {
  if (!isRecord(value)) return false;
  const { id, label, at, action, keepsLater, line } = value;
  return (
    typeof id === 'string' &&
    typeof label === 'string' &&
    typeof at === 'number' &&
    isRecord(action) &&
    typeof keepsLater === 'boolean' &&
    typeof line === 'number'
  );
}

function unitsOf(value: unknown): Units {
  if (!isRecord(value)) return { system: 'case', own: {} };
  const { system, own } = value;
  return { system: system === 'si' || system === 'us' ? system : 'case', own: isRecord(own) ? textsOf(own) : {} };
}
