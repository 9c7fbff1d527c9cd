/** Makes the result document of a run. Same case, same scenario, same program: same bytes. */
import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';

import type { Case } from '../case/case.ts';
import { answersOf, headlineLimit, integratedOf } from './answers.ts';
import { CLOSURE_LIMIT, CLOSURE_TARGET, closureOf } from './closure.ts';
import { isMethod, METHODS } from './integrators.ts';
import { rangeWarnings } from './range-watch.ts';
import {
  RESULT_FORMAT,
  RESULT_VERSION,
  type ClosureAnswer,
  type ConvergenceBlock,
  type ResultDocument,
  type SecondOpinionBlock,
} from './result-schema.ts';
import { recordedId, recordOf, type RunRecord } from './run-record.ts';
import { CAUTION, sentenceOf } from './sentence.ts';
import type { Run, RunFailure } from './simulate.ts';
import { timelineOf } from './timeline.ts';
import { VERSION } from './version.ts';

/** What goes into a document beside the run. */
export interface ResultExtras {
  /** Text of the case file, for its hash. */ readonly caseText: string;
  readonly secondOpinion?: SecondOpinionBlock;
  readonly convergence?: ConvergenceBlock;
}

/** SHA-256 of a case's text, hexadecimal. */
export function caseHash(text: string): string {
  return bytesToHex(sha256(utf8ToBytes(text)));
}

/** The document of a run as it stands: completed, failed (what it has is kept) or still running. */
export function resultOf(run: Run, extras: ResultExtras): ResultDocument {
  const { plant, scenario, column, outcome } = run;
  const record = recordOf(run);
  const answers = answersOf(record, integratedOf(column.layout, run.state));
  const warnings = rangeWarnings(record, column.fluids);
  const failure = outcome.kind === 'failed' ? outcome.failure : undefined;
  const { steps, rejected, rightHandSides, jacobians, factorisations, solves } = run.stats;
  return {
    format: RESULT_FORMAT,
    formatVersion: RESULT_VERSION,
    tool: { name: 'bedwave', version: VERSION },
    case: { title: plant.title, sha256: caseHash(extras.caseText) },
    scenario: { id: scenario.id, title: scenario.title, duration: scenario.duration, initial: scenario.initial },
    settings: settingsOf(plant),
    outcome: {
      kind: outcome.kind,
      time: run.time,
      failure: failure === undefined ? null : { ...failureText(failure, run.time), where: failure.where },
    },
    summary: {
      sentence: sentenceOf(record, answers, failure === undefined ? undefined : run.time),
      caution: CAUTION,
      headline: headlineLimit(answers.limits)?.id ?? null,
    },
    answers,
    events: timelineOf(record, answers, warnings),
    closure: closureAnswer(run),
    statistics: { steps, rejected, rightHandSides, jacobians, factorisations, solves, moments: record.time.length },
    warnings,
    assumptions: plant.provenance
      .filter((p) => p.isDefault)
      .map(({ path, source, verified }) => ({ path, source, mark: verified })),
    series: seriesOf(record),
    profiles: run.profiles.map(({ time, beds }) => ({
      time,
      beds: beds.map((bed) => ({
        ...bed,
        rows: bed.rows.map((row) => ({
          ...row,
          gas: [...row.gas],
          liquid: [...row.liquid],
          transfer: [...row.transfer],
        })),
      })),
    })),
    secondOpinion: extras.secondOpinion ?? null,
    convergence: extras.convergence ?? null,
  };
}

function settingsOf(plant: Case): ResultDocument['settings'] {
  const { rtol, axialScheme, recordEvery, maxSteps, noise, seed } = plant.run;
  const method = isMethod(plant.run.method) ? plant.run.method : METHODS[0];
  return {
    method,
    rtol,
    segments: plant.column.beds.map((b) => b.segments),
    axialScheme,
    recordEvery,
    maxSteps,
    noise,
    seed,
  };
}

/** Balance between the start of a run and now. */
function closureAnswer(run: Run): ClosureAnswer {
  const lines = closureOf(run.column, 0, run.initial, run.time, run.state);
  const finite = (v: number): number | null => (Number.isFinite(v) ? v : null);
  const worst = Math.max(...lines.map((l) => (Number.isFinite(l.error) ? l.error : Infinity)));
  return {
    target: CLOSURE_TARGET,
    limit: CLOSURE_LIMIT,
    ok: worst <= CLOSURE_LIMIT,
    worst: finite(worst),
    lines: lines.map(({ component, unit, inflow, net, stored, inventory, error }) => ({
      component,
      unit,
      inflow: finite(inflow),
      net: finite(net),
      stored: finite(stored),
      inventory: finite(inventory),
      error: finite(error),
    })),
  };
}

/** A failure in words. */
function failureText(failure: RunFailure, time: number): { kind: string; time: number; text: string } {
  if (failure.kind === 'no-steady-state') {
    return {
      kind: failure.kind,
      time,
      text: `no steady state was found to start from; what still moves most: ${failure.where}`,
    };
  }
  const why = {
    'step-size-underflow': 'no step is small enough for the tolerance',
    'not-finite': 'a value is not finite',
    'newton-diverged': 'the equations of a step were not solved',
    'singular-matrix': 'a linear system has no solution',
    'work-limit': 'the work limit (run.maxSteps) is reached',
  }[failure.failure.kind];
  return {
    kind: failure.failure.kind,
    time,
    text: `${why} at ${failure.failure.t.toPrecision(6)} s (last step tried ${failure.failure.h.toPrecision(2)} s); worst: ${failure.where}`,
  };
}

function seriesOf(record: RunRecord): ResultDocument['series'] {
  const finite = (v: number): number | null => (Number.isFinite(v) ? v : null);
  const { plant } = record;
  const quantity = new Map(record.quantities.map((q) => [q.id, q]));
  return {
    time: [...record.time],
    signals: [
      ...record.quantities.map(({ id, label, kind, unit }, i) => ({
        id,
        label,
        kind,
        unit,
        sort: 'true' as const,
        measures: null,
        values: record.rows.map((row) => finite(row[i])),
      })),
      ...plant.instruments.map(({ tag, measured }, i) => {
        const id = recordedId(plant, measured);
        const q = quantity.get(id);
        return {
          id: tag,
          label: q?.label ?? id,
          kind: q?.kind ?? 'fraction',
          unit: q?.unit ?? '1',
          sort: 'shown' as const,
          measures: id,
          values: record.shown.map((row) => finite(row[i])),
        };
      }),
    ],
  };
}

/** The document as text: indented by one, lists of plain values on one line; ends in a line break. */
export function writeResult(result: ResultDocument): string {
  return `${jsonText(result, '')}\n`;
}

function jsonText(value: unknown, indent: string): string {
  if (typeof value !== 'object' || value === null) return JSON.stringify(value) ?? 'null';
  const inner = `${indent} `;
  if (Array.isArray(value)) {
    if (value.length === 0) return '[]';
    const texts = value.map((item) => jsonText(item, inner));
    const isPlain = value.every((item) => typeof item !== 'object' || item === null);
    return isPlain ? `[${texts.join(', ')}]` : `[\n${inner}${texts.join(`,\n${inner}`)}\n${indent}]`;
  }
  const entries = Object.entries(value).filter(([, item]) => item !== undefined);
  if (entries.length === 0) return '{}';
  const lines = entries.map(([key, item]) => `${JSON.stringify(key)}: ${jsonText(item, inner)}`);
  return `{\n${inner}${lines.join(`,\n${inner}`)}\n${indent}}`;
}
