import fc from 'fast-check';
import { expect, test } from 'vitest';
import { issueSentence } from '../../sim/case/issues.ts';
import { readCase } from '../../sim/case/read.ts';
import { closureOf } from '../../sim/run/closure.ts';
import { createRun, type Run } from '../../sim/run/simulate.ts';
import { acetone, put, type Tree } from '../case/support.ts';

// Random plants through random upsets, many of them poor designs (dry, flooded, overloaded): every run comes to an end, and
// none loses anything or shows a number that cannot be. Few segments and short runs; the seed is fixed.

const WORK_LIMIT = 20_000; // steps
/** The carrier is no state but the rest of the gas space: it closes as well as the integration is exact. 1e-4: a run calls itself broken. */
const CLOSED = { carrier: 1e-4, other: 1e-6 };

const upset = fc.oneof(
  fc.record({ change: fc.constant('gas.composition.acetone'), times: fc.double({ min: 0, max: 10, noNaN: true }) }),
  fc.record({ change: fc.constant('gas.rate'), times: fc.double({ min: 0.05, max: 2.5, noNaN: true }) }),
  fc.record({ change: fc.constant('liquid.temperature'), by: fc.integer({ min: -5, max: 40 }).map((d) => `${d} K`) }),
  fc.record({ stop: fc.constant('P-310A') }),
  fc.record({ close: fc.constantFrom('gas-inlet', 'solvent', 'drain') }),
  fc.record({ open: fc.constant('diversion') }),
  fc.record({
    change: fc.constant('packing.fouling'),
    to: fc.double({ min: 0, max: 0.3, noNaN: true }).map(String),
  }),
);

const plant = fc.record({
  diameter: fc.double({ min: 0.4, max: 1.6, noNaN: true }),
  height: fc.double({ min: 0.5, max: 12, noNaN: true }),
  segments: fc.integer({ min: 3, max: 7 }),
  gas: fc.double({ min: 5, max: 90, noNaN: true }),
  strength: fc.double({ min: 1e-6, max: 0.02, noNaN: true }),
  gasTemperature: fc.integer({ min: 275, max: 345 }),
  humidity: fc.integer({ min: 0, max: 100 }),
  liquid: fc.double({ min: 0.2, max: 6, noNaN: true }),
  liquidTemperature: fc.integer({ min: 276, max: 330 }),
  pressure: fc.double({ min: 30, max: 800, noNaN: true }),
  /** Hydraulics, and a packing of the library that has its constants. */
  law: fc.constantFrom(
    ['stichlmair-bravo-fair', 'PR-MET-35'],
    ['stichlmair-bravo-fair', 'PR-MET-25'],
    ['stichlmair-bravo-fair', 'BS-CER-25'],
    ['billet-schultes', 'RR-CER-25a'],
    ['billet-schultes', 'PR-MET-50'],
    ['billet-schultes', 'PR-PLA-35'],
  ),
  initial: fc.constantFrom('steady', 'dry', 'hot-standby'),
});

interface Choice {
  readonly diameter: number;
  readonly height: number;
  readonly segments: number;
  readonly gas: number;
  readonly strength: number;
  readonly gasTemperature: number;
  readonly humidity: number;
  readonly liquid: number;
  readonly liquidTemperature: number;
  readonly pressure: number;
  readonly law: readonly string[];
  readonly initial: string;
}

function caseOf(choice: Choice, first: Tree, second: Tree): string {
  const tree = acetone();
  put(tree, 'column/diameter', `${choice.diameter} m`);
  put(tree, 'column/shellHeight', undefined);
  put(tree, 'column/topPressure', `${choice.pressure} kPa(a)`);
  put(tree, 'column/beds', [{ packing: choice.law[1], height: `${choice.height} m`, segments: choice.segments }]);
  put(tree, 'column/hydraulics', { model: choice.law[0] });
  put(tree, 'gas/feed/rate', `${choice.gas} mol/s`);
  put(tree, 'gas/range', undefined);
  put(tree, 'gas/feed/temperature', `${choice.gasTemperature} K`);
  put(tree, 'gas/feed/humidity', `${choice.humidity} %`);
  put(tree, 'gas/feed/composition', { acetone: `${1e6 * choice.strength} ppmv` });
  put(tree, 'liquid/feed/rate', `${choice.liquid} L/s`);
  put(tree, 'liquid/feed/temperature', `${choice.liquidTemperature} K`);
  put(tree, 'liquid/sump/drain/capacity', `${2.5 * choice.liquid} L/s`);
  put(tree, 'run', { maxSteps: WORK_LIMIT });
  put(tree, 'uncertainty', undefined);
  put(tree, 'scenarios', {
    trial: {
      title: 'trial',
      duration: '90 s',
      initial: choice.initial,
      interlocks: 'none',
      steps: [
        ...(choice.initial === 'dry' ? [{ at: '0 s', start: 'P-310A' }] : []),
        { at: '5 s', ...first },
        { at: '25 s', ...second, over: 'change' in second ? '10 s' : undefined },
      ],
    },
  });
  return JSON.stringify(tree);
}

/** What is wrong with the record of a run, in words. */
function faultsOf(run: Run): string[] {
  const { observer, rows, time } = run.recorder;
  const found: string[] = [];
  observer.quantities.forEach(({ id, kind }, i) => {
    const largest = rows.reduce((m, row) => Math.max(m, Math.abs(row[i]!)), 0);
    rows.forEach((row, k) => {
      const v = row[i]!;
      if (!Number.isFinite(v) && id !== 'flood-approach') found.push(`${id} is ${v} at ${time[k]} s`);
      const isFraction = kind === 'gas-strength' || kind === 'fraction';
      if (isFraction && v < -1e-3 * largest - 1e-9) found.push(`${id} is ${v} at ${time[k]} s`);
    });
  });
  if (run.outcome.kind === 'failed' && run.outcome.failure.kind === 'no-steady-state') return found;
  for (const { component, error } of closureOf(run.column, 0, run.initial, run.time, run.state)) {
    const target = component === 'carrier gas' ? CLOSED.carrier : CLOSED.other;
    if (!(error < target)) found.push(`${component} is lost: ${error}`);
  }
  return found;
}

const outcomes = new Map<string, number>();

test(
  'nothing negative, nothing lost, nothing that is no number, no end without an answer',
  { timeout: 120_000 },
  () => {
    fc.assert(
      fc.property(plant, upset, upset, (choice, first, second) => {
        const text = caseOf(choice, first, second);
        const read = readCase(text);
        if (!read.ok) throw new Error(read.issues.map(issueSentence).join('\n'));
        const run = createRun(read.value, read.value.scenarios[0]!);
        const outcome = run.advance(90);
        const word = outcome.kind === 'failed' ? `failed: ${outcome.failure.kind}` : outcome.kind;
        outcomes.set(word, (outcomes.get(word) ?? 0) + 1);
        const where = outcome.kind === 'failed' ? outcome.failure.where : 'the end';
        expect(['completed', 'failed']).toContain(outcome.kind);
        expect(where.length).toBeGreaterThan(3); // a failure says where
        expect(faultsOf(run)).toEqual([]);
      }),
      { seed: 20_261, numRuns: 40, endOnFailure: true },
    );
  },
);

test('most of them run to their end', () => {
  expect(outcomes.get('completed') ?? 0).toBeGreaterThan(30);
});
