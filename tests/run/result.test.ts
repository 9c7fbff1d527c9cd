import { readFileSync } from 'node:fs';

import * as v from 'valibot';
import { beforeAll, describe, expect, test } from 'vitest';

import type { Case } from '../../sim/case/case.ts';
import { caseHash, resultOf, writeResult } from '../../sim/run/result.ts';
import { writeCsv } from '../../sim/run/result-csv.ts';
import { resultSchema, type ResultDocument } from '../../sim/run/result-schema.ts';
import { choicesOf, readSaved, writeSaved } from '../../sim/run/saved-file.ts';
import { createRun } from '../../sim/run/simulate.ts';
import { steadyAnswers, steadyScenario } from '../../sim/run/steady-answers.ts';
import { VERSION } from '../../sim/run/version.ts';
import { gasLeft } from '../../sim/transfer/transfer-units.ts';
import { caseText, mustRead } from '../case/support.ts';

const text = caseText('constant-coefficients');
const plant: Case = mustRead(text);

/** The shipped step of the feed, shortened. */
const scenario = { ...plant.scenarios[0]!, duration: 60 };

function run(profiles: readonly number[] = []): ResultDocument {
  const it = createRun(plant, scenario);
  it.takeProfiles(profiles);
  it.advance(60);
  return resultOf(it, { caseText: text });
}

describe('the document of a real run', () => {
  let result: ResultDocument;
  beforeAll(() => {
    result = run([0, 12.34]);
  });

  test('fits its schema after a way through text', () => {
    const parsed = v.safeParse(resultSchema, JSON.parse(writeResult(result)));
    expect(parsed.issues).toBeUndefined();
  });

  test('is the same bytes twice', () => {
    expect(writeResult(run([0, 12.34]))).toBe(writeResult(result));
  });

  test('profiles leave the steps as they are', () => {
    const without = run();
    expect({ ...without, profiles: [] }).toEqual({ ...result, profiles: [] });
    expect(result.profiles.map((p) => p.time)).toEqual([0, 12.34]);
    expect(result.profiles[0]?.beds[0]?.rows).toHaveLength(40);
  });

  test('names the case by its hash, and the program by the version of its package', () => {
    expect(result.case.sha256).toBe(caseHash(text));
    const manifest = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8')) as {
      version: string;
    };
    expect(VERSION).toBe(manifest.version);
  });

  test('closes its balance', () => {
    expect(result.closure.ok).toBe(true);
    expect(result.closure.worst).toBeLessThan(result.closure.target);
  });

  test('emits what the recorded rate at the stack integrates to', () => {
    const rate = result.series.signals.find((s) => s.id === 'stack-flow.tracer')!.values;
    const { time } = result.series;
    const sum = time.reduce((s, t, i) => (i === 0 ? 0 : s + 0.5 * (rate[i]! + rate[i - 1]!) * (t - time[i - 1]!)), 0);
    const { stack, molarMass } = result.answers.emissions[0]!;
    // 1e-4: straight lines between rows at most 1 s apart against the integrator's own sum.
    expect(stack / (sum * molarMass)).toBeCloseTo(1, 4);
  });

  test('lists each default with its source and mark', () => {
    expect(result.assumptions.length).toBeGreaterThan(20);
    for (const { source, mark } of result.assumptions) expect([source, mark].every((s) => s !== '')).toBe(true);
  });

  test('as CSV has one header, one line for each row, and reads back to the same numbers', () => {
    const lines = writeCsv(result).split('\r\n');
    expect(lines).toHaveLength(result.series.time.length + 2); // header, and the empty rest after the last break
    const column = lines[0]!.split(',').findIndex((h) => h.startsWith('gas-outlet.tracer true [mol/mol]'));
    const last = lines[lines.length - 2]!.split(',');
    const signal = result.series.signals.find((s) => s.id === 'gas-outlet.tracer')!;
    expect(Number(last[column])).toBe(signal.values[signal.values.length - 1]);
  });
});

test('SHA-256 of "abc"', () => {
  // [FIPS180-4], the example of one block.
  expect(caseHash('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
});

test('a run saved, read and resumed gives the same document', () => {
  const first = createRun(plant, scenario);
  first.advance(20);
  const saved = writeSaved(text, choicesOf(plant, 60), first.save());
  first.advance(60);
  const read = readSaved(saved, text);
  if (!read.ok) throw new Error(read.issue.expected);
  const second = createRun(plant, scenario, read.value.run);
  second.advance(60);
  expect(writeResult(resultOf(second, { caseText: text }))).toBe(writeResult(resultOf(first, { caseText: text })));
});

test('a saved run is not resumed on another case', () => {
  const it = createRun(plant, scenario);
  const saved = writeSaved(text, choicesOf(plant, 60), it.save());
  expect(readSaved(saved, `${text} `)).toMatchObject({ ok: false, issue: { kind: 'contradiction' } });
  expect(readSaved('{"format":"bedwave-result"}', text)).toMatchObject({ ok: false, issue: { kind: 'type' } });
  expect(readSaved(saved.slice(0, 100), text)).toMatchObject({ ok: false, issue: { kind: 'syntax' } });
});

test('a run that cannot go on keeps what it has and says why', () => {
  const limited = { ...plant, run: { ...plant.run, maxSteps: 10 } };
  const it = createRun(limited, scenario);
  it.advance(60);
  const result = resultOf(it, { caseText: text });
  expect(result.outcome).toMatchObject({ kind: 'failed', failure: { kind: 'work-limit' } });
  expect(result.outcome.time).toBeGreaterThan(0);
  expect(result.series.time.length).toBeGreaterThan(1);
  expect(v.is(resultSchema, JSON.parse(writeResult(result)))).toBe(true);
  expect(result.summary.sentence).toMatch(/^The calculation stopped after /);
});

describe('steady state with constant coefficients', () => {
  const answer = steadyAnswers(createRun(plant, steadyScenario(plant)));

  test('gives back the transfer units and the absorption factor that the case states', () => {
    // The case: NOG 5, A = L/(m G) = 1.3. 1e-3: the gas flow falls by what is absorbed, 1 ppmv, and the liquid is water
    // at its own density.
    expect(answer.transfer[0]!.NOG).toBeCloseTo(5, 3);
    expect(answer.transfer[0]!.HOG).toBeCloseTo(4 / 5, 3);
    expect(answer.transfer[0]!.absorptionFactor.mean).toBeCloseTo(1.3, 3);
  });

  test("leaves in the gas what Colburn's closed form leaves", () => {
    // [Colburn1939]. 2e-4: the scheme's error at 40 segments, NOG 5.
    const exact = gasLeft(5, 1.3);
    expect(Math.abs(answer.outlets[0]!.gasLeft / exact - 1)).toBeLessThan(2e-4);
  });
});
