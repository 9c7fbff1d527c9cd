/** The options of all commands, in one table: flags, help line, how the text is read. `--help` is made from it. */
import { Option, type Command } from 'commander';

import { METHODS, parseQuantity, type UnitSystem } from '../index.ts';
import { badOption } from './exit.ts';

/** Values of the options, read. Absent ones are undefined. */
export interface Options {
  readonly scenario?: string;
  readonly list?: boolean;
  /** File, or true for standard output. */ readonly json?: string | true;
  readonly csv?: string | true;
  /** s */ readonly until?: number;
  readonly segments?: number;
  readonly tolerance?: number;
  readonly method?: string;
  /** s */ readonly profiles?: readonly number[];
  readonly save?: { readonly time: number; readonly file: string };
  readonly resume?: string;
  readonly secondOpinion?: boolean;
  readonly estimate?: boolean;
  readonly noise?: boolean;
  readonly seed?: number;
  readonly hold?: readonly string[];
  readonly units: UnitSystem;
  readonly port?: number;
  readonly browser?: boolean;
}

/** One line of the table. */
interface OptionEntry {
  readonly flags: string;
  readonly help: string;
  readonly default?: string;
  readonly choices?: readonly string[];
  /** Reads the text; `before` is what earlier uses of a repeatable option gave. */
  readonly read?: (text: string, before: unknown) => unknown;
}

/** Smallest and largest: as a case allows them. */
const SEGMENTS = [2, 400] as const;
const TOLERANCE = [1e-10, 1e-2] as const;
const PORTS = [0, 65_535] as const;
const LARGEST_SEED = 2 ** 31 - 1;
/** Between the two values of `--save`, which commander hands over as one. */
const JOINT = '\u0000';

const OPTIONS = {
  scenario: { flags: '--scenario <id>', help: 'which scenario of the case (default: its first)' },
  list: { flags: '--list', help: 'list the scenarios of the case and stop' },
  json: { flags: '--json [file]', help: 'write the result document; without a file to standard output' },
  csv: { flags: '--csv [file]', help: 'write the series as CSV, SI units; without a file to standard output' },
  until: { flags: '--until <time>', help: 'end at this time, such as "10 min"', read: (t) => seconds('--until', t) },
  segments: { flags: '--segments <n>', help: 'segments of each bed', read: (t) => whole('--segments', t, ...SEGMENTS) },
  tolerance: { flags: '--tolerance <number>', help: 'relative tolerance of the integration', read: tolerance },
  method: { flags: '--method <name>', help: 'integrator', choices: METHODS },
  profiles: {
    flags: '--profiles <times>',
    help: 'profiles along the depth at these times, such as "0 s, 60 s, 2 min"',
    read: times,
  },
  save: { flags: '--save <time> <file>', help: 'save the run at a time, to be resumed later', read: saving },
  resume: { flags: '--resume <file>', help: 'go on with a saved run of the same case' },
  secondOpinion: { flags: '--second-opinion', help: 'the same run by an independent integrator; takes long' },
  estimate: { flags: '--estimate', help: 'run again with twice the segments and compare the headline figures' },
  noise: { flags: '--noise', help: "add the instruments' noise" },
  seed: { flags: '--seed <n>', help: 'seed of the noise', read: (t) => whole('--seed', t, 0, LARGEST_SEED) },
  hold: {
    flags: '--hold <limit>',
    help: 'exit with 1 if this limit is not kept (repeatable; "all")',
    read: (t, before) => [...((before as string[] | undefined) ?? []), t],
  },
  port: { flags: '--port <n>', help: 'port to serve at', read: (t) => whole('--port', t, ...PORTS) },
  noBrowser: { flags: '--no-browser', help: 'print the address and start no browser' },
  units: {
    flags: '--units <system>',
    help: 'units of the printed answer: as the case states limits and instruments, SI elsewhere; or one system',
    choices: ['case', 'si', 'us'],
    default: 'case',
  },
} as const satisfies Record<string, OptionEntry>;

/** Name of an option. */
export type OptionName = keyof typeof OPTIONS;

/** Adds options to a command, in the order given. */
export function addOptions(command: Command, names: readonly OptionName[]): void {
  for (const name of names) {
    const entry: OptionEntry = OPTIONS[name];
    const option = new Option(entry.flags, entry.help);
    if (entry.choices !== undefined) option.choices(entry.choices);
    if (entry.default !== undefined) option.default(entry.default);
    if (entry.read !== undefined) option.argParser(entry.read);
    command.addOption(option);
  }
}

/** Arguments with the two values of `--save` made one. */
export function joinPairs(argv: readonly string[]): string[] {
  const out = [...argv];
  const at = out.indexOf('--save');
  if (at >= 0 && at + 2 < out.length) out.splice(at + 1, 2, `${out[at + 1] ?? ''}${JOINT}${out[at + 2] ?? ''}`);
  return out;
}

function seconds(path: string, text: string): number {
  const parsed = parseQuantity(text, 'time');
  if (!parsed.ok) throw badOption(path, parsed.issue.expected, `"${text}"`, parsed.issue.hint);
  if (parsed.value < 0) throw badOption(path, 'a time of at least 0 s', `"${text}"`);
  return parsed.value;
}

function whole(path: string, text: string, low: number, high: number): number {
  const value = /^\d+$/.test(text.trim()) ? Number(text) : Number.NaN;
  if (!(value >= low && value <= high)) throw badOption(path, `a whole number from ${low} to ${high}`, `"${text}"`);
  return value;
}

function tolerance(text: string): number {
  const value = text.trim() === '' ? Number.NaN : Number(text);
  const [low, high] = TOLERANCE;
  if (!(value >= low && value <= high)) throw badOption('--tolerance', `a number from ${low} to ${high}`, `"${text}"`);
  return value;
}

function times(text: string): number[] {
  return text.split(',').map((part) => seconds('--profiles', part.trim()));
}

function saving(text: string): { time: number; file: string } {
  const [time, file] = text.split(JOINT);
  if (time === undefined || file === undefined || file.startsWith('--')) {
    throw badOption('--save', 'a time and a file', `"${time ?? ''}"`, 'write for example --save "60 s" state.json');
  }
  return { time: seconds('--save', time), file };
}
