// Text -> a checked, complete case, or every issue at once. Pure: files that a case names come through a
// resolver; nothing here opens one, knows the time, or throws for anything a text can hold.

import type { Alarm, Case, Controller, Interlock, Limit, Scenario, Uncertain } from './case.ts';
import { checkSection } from './check.ts';
import type { Issue } from './issues.ts';
import { join } from './issues.ts';
import { parseJson } from './json.ts';
import { suggestion } from './nearest.ts';
import { Reading } from './reading.ts';
import type { ResolveFile } from './reading.ts';
import type { Directory } from './resolve/actions.ts';
import { knownTag } from './resolve/actions.ts';
import { readColumn } from './resolve/column.ts';
import type { ScaledInstrument } from './resolve/control.ts';
import { readAlarm, readController, readInstrument, readLimit, warnCrossedAlarms } from './resolve/control.ts';
import { readInterlock } from './resolve/interlocks.ts';
import { checkPhases } from './resolve/physics.ts';
import { readGas, readLiquid } from './resolve/plant.ts';
import type { Plant } from './resolve/plant-tags.ts';
import { plantOf } from './resolve/plant-tags.ts';
import { readRun } from './resolve/run.ts';
import { readScenario } from './resolve/scenarios.ts';
import type { Substances } from './resolve/strengths.ts';
import { readCarrier, readSolute, readSolvent } from './resolve/substances.ts';
import type { TagUse } from './resolve/tags.ts';
import { checkTags, keyedTags } from './resolve/tags.ts';
import { readUncertain } from './resolve/uncertainty.ts';
import type { UncertainText } from './schema/actions.ts';
import type { SolventText } from './schema/substances.ts';
import { FORMAT_VERSION, caseSchema } from './schema.ts';

/** Longer texts are refused unread, characters; a large case with typed tables has some 100 000. */
export const LONGEST_TEXT = 5_000_000;

/** What a reader may be given beside the text. */
export interface ReadOptions {
  /** Text of a file that the case names (a trace, an equilibrium table); undefined when there is none. */
  readonly resolveFile?: ResolveFile;
}

/** A case, or all that is wrong with its text. Warnings come either way. */
export type ReadResult =
  | { readonly ok: true; readonly value: Case; readonly warnings: readonly Issue[] }
  | { readonly ok: false; readonly issues: readonly Issue[]; readonly warnings: readonly Issue[] };

/**
 * Reads the text of a case file.
 *
 * @param text - JSON; longer than `LONGEST_TEXT` is refused unread.
 * @returns The case in SI with every default filled in, or all issues.
 */
export function readCase(text: string, options: ReadOptions = {}): ReadResult {
  const reading = new Reading(options.resolveFile);
  const root = readRoot(reading, text);
  const value = root === undefined ? undefined : readSections(reading, root);
  if (value !== undefined && reading.issues.length === 0) return { ok: true, value, warnings: reading.warnings };
  return { ok: false, issues: reading.issues, warnings: reading.warnings };
}

/** Id of the library solvent that a solvent rests on, or its own; the library lists solutes by solvent. */
function baseOf(solvent: SolventText | undefined): string {
  if (solvent === undefined || typeof solvent === 'string') return solvent ?? 'water';
  return solvent.base ?? solvent.id ?? 'own-solvent';
}

/** The JSON object of a text, or undefined after noting why there is none. */
function readRoot(reading: Reading, text: string): Record<string, unknown> | undefined {
  if (text.length > LONGEST_TEXT) {
    reading.object(
      'too-large',
      '',
      `a file of at most ${LONGEST_TEXT / 1e6} MB`,
      `${(text.length / 1e6).toFixed(1)} MB`,
      'put long traces into CSV files',
    );
    return undefined;
  }
  const json = parseJson(text);
  if (!json.ok) {
    const { line, column, expected, received } = json.fault;
    reading.issues.push({ path: '', expected, received, severity: 'error', kind: 'syntax', line, column });
    return undefined;
  }
  for (const { path, line, column } of json.duplicates) {
    reading.issues.push({
      path: path.reduce<string>(join, ''),
      expected: 'each key once',
      received: 'the same key a second time',
      severity: 'error',
      kind: 'syntax',
      line,
      column,
    });
  }
  const { value } = json;
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    reading.refuse('type', '', 'an object', value);
    return undefined;
  }
  const root = value as Record<string, unknown>;
  const version = root['formatVersion'];
  if (version !== undefined && version !== FORMAT_VERSION) {
    reading.refuse('version', 'formatVersion', `${FORMAT_VERSION}, the version this program reads`, version);
    return undefined;
  }
  return root;
}

type Sections = typeof caseSchema.entries;

/** Reads the sections one by one, so that trouble in one does not hide trouble in another. */
function readSections(reading: Reading, root: Record<string, unknown>): Case | undefined {
  const known = Object.keys(caseSchema.entries);
  for (const key of Object.keys(root)) {
    if (!known.includes(key)) {
      reading.object('unknown-key', key, 'a key that a case knows', `"${key}"`, suggestion(key, known));
    }
  }
  const section = <K extends keyof Sections>(key: K) => checkSection(reading, caseSchema.entries[key], root[key], key);
  section('$schema');
  section('invented');
  section('formatVersion');
  const title = section('title');
  const shows = section('shows');
  const solventText = section('solvent');
  const carrierText = section('carrier');
  const soluteTexts = section('solutes');
  const columnText = section('column');
  const gasText = section('gas');
  const liquidText = section('liquid');
  const runText = section('run');
  const uncertainTexts = section('uncertainty');

  const solvent = solventText === undefined ? undefined : readSolvent(reading, solventText);
  const carrier = carrierText === undefined ? undefined : readCarrier(reading, carrierText);
  const solutes = soluteTexts?.map((text, index) =>
    readSolute(reading, `solutes[${index}]`, text, baseOf(solventText)),
  );
  solutes?.forEach((solute, index) => {
    if (solute !== undefined && solutes.findIndex((other) => other?.id === solute.id) < index) {
      reading.refuse(
        'duplicate',
        `solutes[${index}]`,
        'a solute that is not listed before',
        solute.id,
        'give it its own "id"',
      );
    }
  });
  const whole = solutes?.filter((solute) => solute !== undefined);
  const substances: Substances | undefined =
    solvent === undefined || whole === undefined || whole.length < (solutes?.length ?? 0)
      ? undefined
      : { solvent, solutes: whole };

  const column = columnText === undefined ? undefined : readColumn(reading, columnText, liquidText?.feed.rate);
  const pressure = column?.topPressure ?? Number.NaN;
  const gas =
    gasText === undefined || substances === undefined ? undefined : readGas(reading, gasText, substances, pressure);
  const liquid =
    liquidText === undefined || substances === undefined || columnText === undefined
      ? undefined
      : readLiquid(reading, liquidText, substances, columnText);
  const plant =
    substances === undefined || column === undefined || gas === undefined || liquid === undefined
      ? undefined
      : plantOf(substances, column, gas, liquid);
  if (plant !== undefined && carrier !== undefined && solvent !== undefined) {
    checkPhases(reading, { solvent, carrier, column: plant.column, gas: plant.gas, liquid: plant.liquid });
  }
  const watch = readWatch(reading, root, plant);
  const run = readRun(reading, runText ?? {});
  const uncertainty = readUncertainty(reading, uncertainTexts ?? []);
  if (
    title === undefined ||
    shows === undefined ||
    solvent === undefined ||
    carrier === undefined ||
    plant === undefined ||
    watch === undefined
  ) {
    return undefined;
  }
  return {
    formatVersion: FORMAT_VERSION,
    title,
    shows,
    solvent,
    carrier,
    solutes: plant.solutes,
    column: plant.column,
    gas: plant.gas,
    liquid: plant.liquid,
    ...watch,
    uncertainty,
    run,
    provenance: reading.provenance,
  };
}

type Watch = Pick<Case, 'instruments' | 'alarms' | 'interlocks' | 'controllers' | 'limits' | 'scenarios'>;

/**
 * Instruments and what refers to them. Entries are checked against the schema even when the plant has
 * issues; what needs the plant (strengths, machines, valves) then waits for it.
 */
function readWatch(reading: Reading, root: Record<string, unknown>, plant: Plant | undefined): Watch | undefined {
  const { instruments, alarms, interlocks, controllers, limits, scenarios } = caseSchema.entries;
  const texts = {
    instruments: entriesOf(reading, 'instruments', root['instruments'], (value, path) =>
      checkSection(reading, instruments.wrapped.value, value, path),
    ),
    alarms: entriesOf(reading, 'alarms', root['alarms'], (value, path) =>
      checkSection(reading, alarms.wrapped.value, value, path),
    ),
    interlocks: entriesOf(reading, 'interlocks', root['interlocks'], (value, path) =>
      checkSection(reading, interlocks.wrapped.value, value, path),
    ),
    controllers: entriesOf(reading, 'controllers', root['controllers'], (value, path) =>
      checkSection(reading, controllers.wrapped.value, value, path),
    ),
    limits: entriesOf(reading, 'limits', root['limits'], (value, path) =>
      checkSection(reading, limits.wrapped.value, value, path),
    ),
    scenarios: entriesOf(reading, 'scenarios', root['scenarios'], (value, path) =>
      checkSection(reading, scenarios.wrapped.value, value, path),
    ),
  };
  const instrumentTags = keysOf(root['instruments']);
  for (const [name, list] of [
    ['alarms', texts.alarms],
    ['controllers', texts.controllers],
  ] as const) {
    for (const [tag, entry] of list) {
      knownTag(reading, `${name}.${tag}.instrument`, 'the tag of an instrument', entry.instrument, instrumentTags);
    }
  }
  if (plant === undefined) return undefined;
  const scaled = new Map<string, ScaledInstrument>();
  for (const [tag, text] of texts.instruments) {
    const instrument = readInstrument(reading, join('instruments', tag), tag, text, plant);
    if (instrument !== undefined) scaled.set(tag, instrument);
  }
  const directory: Directory = {
    plant,
    instruments: scaled,
    instrumentTags,
    controllerTags: keysOf(root['controllers']),
    controllerInstruments: new Map(texts.controllers.map(([tag, text]) => [tag, text.instrument])),
    interlockTags: keysOf(root['interlocks']),
  };
  checkTags(reading, tagUses(plant, root));
  const readAlarms: Alarm[] = read(texts.alarms, (tag, text) =>
    readAlarm(reading, join('alarms', tag), tag, text, scaled),
  );
  warnCrossedAlarms(reading, readAlarms);
  const readControllers: Controller[] = read(texts.controllers, (tag, text) =>
    readController(reading, join('controllers', tag), tag, text, scaled, plant),
  );
  const readInterlocks: Interlock[] = read(texts.interlocks, (tag, text) =>
    readInterlock(reading, join('interlocks', tag), tag, text, directory),
  );
  const readLimits: Limit[] = read(texts.limits, (id, text) => readLimit(reading, join('limits', id), id, text, plant));
  const readScenarios: Scenario[] = read(texts.scenarios, (id, text) =>
    readScenario(reading, join('scenarios', id), id, text, directory),
  );
  return {
    instruments: [...scaled.values()].map(({ instrument }) => instrument),
    alarms: readAlarms,
    interlocks: readInterlocks,
    controllers: readControllers,
    limits: readLimits,
    scenarios: readScenarios,
  };
}

/** Entries of a keyed section that fit their schema. */
function entriesOf<T>(
  reading: Reading,
  path: string,
  value: unknown,
  check: (value: unknown, path: string) => T | undefined,
): [string, T][] {
  if (value === undefined) return [];
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    reading.refuse('type', path, 'an object, one entry for each tag', value);
    return [];
  }
  const out: [string, T][] = [];
  for (const [key, entry] of Object.entries(value)) {
    const checked = check(entry, join(path, key));
    if (checked !== undefined) out.push([key, checked]);
  }
  return out;
}

function read<T, R>(entries: readonly [string, T][], one: (key: string, text: T) => R | undefined): R[] {
  return entries.map(([key, text]) => one(key, text)).filter((entry) => entry !== undefined);
}

function keysOf(value: unknown): string[] {
  return typeof value === 'object' && value !== null && !Array.isArray(value) ? Object.keys(value) : [];
}

function tagUses(plant: Plant, root: Record<string, unknown>): TagUse[] {
  const { gas, liquid } = plant;
  const uses: TagUse[] = [
    { tag: liquid.pumps.duty, path: 'liquid.pumps.duty', what: 'the duty pump' },
    { tag: gas.inletValve.tag, path: 'gas.inletValve.tag', what: 'the gas inlet valve' },
    { tag: liquid.valve.tag, path: 'liquid.valve.tag', what: 'the solvent valve' },
    { tag: liquid.sump.drain.tag, path: 'liquid.sump.drain.tag', what: 'the drain valve' },
  ];
  const more: [string | undefined, string, string][] = [
    [liquid.pumps.standby, 'liquid.pumps.standby', 'the standby pump'],
    [gas.source.kind === 'fan' ? gas.source.tag : undefined, 'gas.source.tag', 'the fan'],
    [gas.diversion?.tag, 'gas.diversion.tag', 'the diversion'],
    [liquid.cooler?.tag, 'liquid.cooler.tag', 'the cooler'],
    [liquid.makeUp?.tag, 'liquid.makeUp.tag', 'the make-up valve'],
    [liquid.bleed?.tag, 'liquid.bleed.tag', 'the bleed valve'],
    [liquid.emergencyWater?.tag, 'liquid.emergencyWater.tag', 'the emergency water valve'],
  ];
  for (const [tag, path, what] of more) if (tag !== undefined) uses.push({ tag, path, what });
  for (const [section, what] of [
    ['instruments', 'an instrument'],
    ['alarms', 'an alarm'],
    ['interlocks', 'an interlock'],
    ['controllers', 'a controller'],
  ] as const) {
    uses.push(...keyedTags(section, Object.fromEntries(keysOf(root[section]).map((key) => [key, null])), what));
  }
  return uses;
}

function readUncertainty(reading: Reading, texts: UncertainText[]): Uncertain[] {
  // A section with issues leaves no paths behind; a path into it is not to blame then.
  const paths = reading.issues.length === 0 ? reading.provenance.map(({ path }) => path) : undefined;
  return texts
    .map((text, index) => readUncertain(reading, `uncertainty[${index}]`, text, paths))
    .filter((entry) => entry !== undefined);
}
