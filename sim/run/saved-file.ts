/** A saved run as a file: the run's own state with what it belongs to, so that it is resumed on nothing else. */
import * as v from 'valibot';

import type { Case } from '../case/case.ts';
import type { Issue } from '../case/issues.ts';
import { parseJson } from '../case/json.ts';
import { caseHash } from './result.ts';
import type { SavedRun } from './simulate.ts';
import { VERSION } from './version.ts';

/** First key of the file. */
const FORMAT = 'bedwave-state';

/** Settings that decide the bits of what follows. */
export interface RunChoices {
  /** Scenario's end, s. */ readonly duration: number;
  readonly segments: readonly number[];
  readonly rtol: number;
  readonly method: string;
  readonly noise: boolean;
  readonly seed: number;
}

/** A file's content. */
export interface SavedFile {
  readonly format: typeof FORMAT;
  readonly formatVersion: 1;
  readonly tool: string;
  readonly caseSha256: string;
  readonly choices: RunChoices;
  readonly run: SavedRun;
}

const numbers = v.array(v.number());
const numbersOrNull = v.array(v.nullable(v.number()));

// What a run reads at once; a file that fits and was edited by hand is on its own.
const savedSchema = v.looseObject({
  format: v.literal(FORMAT),
  formatVersion: v.literal(1),
  tool: v.string(),
  caseSha256: v.string(),
  choices: v.strictObject({
    duration: v.number(),
    segments: numbers,
    rtol: v.number(),
    method: v.string(),
    noise: v.boolean(),
    seed: v.number(),
  }),
  run: v.looseObject({
    scenario: v.string(),
    stepper: v.looseObject({
      t: v.number(),
      tPrevious: v.number(),
      y: numbers,
      stepSize: v.number(),
      method: v.looseObject({}),
    }),
    modes: v.looseObject({}),
    programs: v.array(v.looseObject({})),
    logic: v.looseObject({ truth: v.array(v.boolean()) }),
    signals: v.looseObject({ modes: v.array(v.looseObject({})), history: v.looseObject({}) }),
    record: v.looseObject({
      time: numbers,
      rows: v.array(numbersOrNull),
      truth: v.array(numbersOrNull),
      shown: v.array(numbersOrNull),
    }),
    events: v.array(v.looseObject({ time: v.number(), kind: v.string(), tag: v.string(), text: v.string() })),
    interventions: v.array(v.looseObject({ time: v.number(), actions: v.array(v.looseObject({})) })),
    profiles: v.array(v.looseObject({ time: v.number() })),
    initialState: numbers,
    outcome: v.looseObject({ kind: v.string() }),
  }),
});

/** Choices that a case and a duration come to. */
export function choicesOf(plant: Case, duration: number): RunChoices {
  const { rtol, method, noise, seed } = plant.run;
  return { duration, segments: plant.column.beds.map((b) => b.segments), rtol, method, noise, seed };
}

/** Text of a saved run. */
export function writeSaved(caseText: string, choices: RunChoices, run: SavedRun): string {
  const file: SavedFile = {
    format: FORMAT,
    formatVersion: 1,
    tool: VERSION,
    caseSha256: caseHash(caseText),
    choices,
    run,
  };
  return `${JSON.stringify(file)}\n`;
}

/**
 * Reads a saved run for a case.
 *
 * @param caseText - Text of the case that is to go on; another text than it was saved with is refused.
 */
export function readSaved(
  text: string,
  caseText: string,
): { readonly ok: true; readonly value: SavedFile } | { readonly ok: false; readonly issue: Issue } {
  const refuse = (kind: Issue['kind'], expected: string, received: string, hint?: string) =>
    ({
      ok: false,
      issue: {
        path: 'saved run',
        expected,
        received,
        kind,
        severity: 'error',
        ...(hint === undefined ? {} : { hint }),
      },
    }) as const;
  const json = parseJson(text);
  if (!json.ok) return refuse('syntax', json.fault.expected, json.fault.received);
  const checked = v.safeParse(savedSchema, json.value);
  if (!checked.success) {
    const where = v.getDotPath(checked.issues[0]) ?? 'the whole';
    return refuse('type', 'a run saved by this program', `another file (${where})`, 'written by "bedwave run --save"');
  }
  const file = json.value as SavedFile;
  if (file.tool !== VERSION) {
    return refuse('version', `a run saved by version ${VERSION}`, file.tool, 'run it again from the start');
  }
  if (file.caseSha256 !== caseHash(caseText)) {
    return refuse(
      'contradiction',
      'the case that the run was saved with',
      'another text',
      'run it again from the start',
    );
  }
  return { ok: true, value: file };
}
