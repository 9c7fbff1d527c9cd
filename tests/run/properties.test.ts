import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Case } from '../../sim/case/case.ts';
import { issueSentence } from '../../sim/case/issues.ts';
import { readCase } from '../../sim/case/read.ts';
import { CLOSURE_LIMIT, CLOSURE_TARGET } from '../../sim/run/closure.ts';
import { createRun } from '../../sim/run/simulate.ts';
import { caseText, put, type Tree } from '../case/support.ts';
import { impossible, lost } from './run-faults.ts';

// Random plants through random upsets, many of them poor designs (dry, flooded, overloaded): every run comes to an end, and
// none loses anything or shows a number that cannot be. Few segments and short runs; the seed is fixed.

const RUNS = 24;
const WORK_LIMIT = 20_000; // steps
const DURATION = 60; // s
/**
 * The carrier is no state but the rest of the gas space. Where no gas is fed it is compared with the bed's gas alone, and
 * then closes as well as the integration (1e-5) and the liquid's expansion (its slope taken over 1 K) are known; what is
 * called broken is 1e-4. The others are sums of what flows.
 */
const CLOSED = { carrier: CLOSURE_LIMIT, other: CLOSURE_TARGET };

/** A shipped case that is varied, with its own pump and solutes. */
const bases = [
  { name: 'acetone-absorber', pump: 'P-310A', solutes: ['acetone'] },
  { name: 'benzene-wash-oil', pump: 'P-510A', solutes: ['benzene', 'toluene'] },
] as const;

/** Whole numbers in steps: what fails is then small and plain to read. */
const within = (least: number, most: number, per = 1): fc.Arbitrary<number> =>
  fc.integer({ min: Math.round(least * per), max: Math.round(most * per) }).map((n) => n / per);

const upset = fc.oneof(
  fc.record({ change: fc.constant('gas.composition.$solute'), times: within(0, 10, 4) }),
  fc.record({ change: fc.constant('gas.rate'), times: within(0.05, 2.5, 20) }),
  fc.record({ change: fc.constant('liquid.temperature'), by: within(-5, 40).map((d) => `${d} K`) }),
  fc.record({ change: fc.constant('packing.fouling'), to: within(0, 0.3, 100).map(String) }),
  fc.constant({ stop: '$pump' }),
  fc.constantFrom('gas-inlet', 'solvent', 'drain').map((valve) => ({ close: valve })),
);

const choices = fc.record({
  base: fc.constantFrom(...bases),
  diameter: within(0.4, 1.6, 20),
  height: within(0.5, 12, 2),
  segments: within(3, 6),
  gas: within(5, 90), // mol/s
  strength: within(1, 20_000), // ppmv
  gasTemperature: within(275, 345), // K
  liquid: within(0.2, 6, 10), // L/s
  liquidTemperature: within(276, 330), // K
  pressure: within(30, 800), // kPa
  /** Hydraulics, and a packing of the library that has its constants. */
  law: fc.constantFrom(
    ['stichlmair-bravo-fair', 'PR-MET-35'],
    ['stichlmair-bravo-fair', 'BS-CER-25'],
    ['billet-schultes', 'RR-CER-25a'],
    ['billet-schultes', 'PR-MET-50'],
  ),
  initial: fc.constantFrom('steady', 'dry', 'hot-standby'),
  first: upset,
  second: upset,
});

type Choice = typeof choices extends fc.Arbitrary<infer T> ? T : never;

function caseOf(choice: Choice): Case {
  const { base } = choice;
  const tree = JSON.parse(caseText(base.name)) as Tree;
  const step = (at: string, upset: Choice['first']): object => ({
    at,
    ...(JSON.parse(JSON.stringify(upset).replace('$solute', base.solutes[0]).replace('$pump', base.pump)) as object),
  });
  put(tree, 'column/diameter', `${choice.diameter} m`);
  put(tree, 'column/shellHeight', undefined);
  put(tree, 'column/topPressure', `${choice.pressure} kPa(a)`);
  put(tree, 'column/beds', [{ packing: choice.law[1], height: `${choice.height} m`, segments: choice.segments }]);
  put(tree, 'column/hydraulics', { model: choice.law[0] });
  put(tree, 'gas/feed/rate', `${choice.gas} mol/s`);
  put(tree, 'gas/range', undefined);
  put(tree, 'gas/feed/temperature', `${choice.gasTemperature} K`);
  put(
    tree,
    'gas/feed/composition',
    Object.fromEntries(base.solutes.map((id, k) => [id, `${choice.strength / (1 + k)} ppmv`])),
  );
  put(tree, 'liquid/feed/rate', `${choice.liquid} L/s`);
  put(tree, 'liquid/feed/temperature', `${choice.liquidTemperature} K`);
  put(tree, 'liquid/sump/drain/capacity', `${2.5 * choice.liquid} L/s`);
  put(tree, 'run', { maxSteps: WORK_LIMIT });
  put(tree, 'uncertainty', undefined);
  put(tree, 'scenarios', {
    trial: {
      title: 'trial',
      duration: `${DURATION} s`,
      initial: choice.initial,
      interlocks: 'none',
      steps: [
        ...(choice.initial === 'dry' ? [{ at: '0 s', start: base.pump }] : []),
        step('5 s', choice.first),
        { ...step('20 s', choice.second), over: 'change' in choice.second ? '10 s' : undefined },
      ],
    },
  });
  const read = readCase(JSON.stringify(tree));
  if (!read.ok) throw new Error(read.issues.map(issueSentence).join('\n'));
  return read.value;
}

test(
  'random plants in random upsets: an end with an answer, nothing lost, nothing impossible',
  { timeout: 120_000 },
  () => {
    const ends = { completed: 0, failed: 0 };
    const trial = (choice: Choice): void => {
      const plant = caseOf(choice);
      const run = createRun(plant, plant.scenarios[0]!);
      const outcome = run.advance(DURATION);
      if (outcome.kind === 'running') throw new Error('no end');
      ends[outcome.kind] += 1;
      expect(impossible(run)).toEqual([]);
      expect(lost(run, (c) => (c === 'carrier gas' ? CLOSED.carrier : CLOSED.other))).toEqual([]);
      // A failure says where, in the plant's own words.
      const where = outcome.kind === 'failed' ? outcome.failure.where : 'no plant';
      expect(where).toMatch(/bed|pump|sump|flow|pressure|plant/);
    };
    fc.assert(fc.property(choices, trial), { seed: 20_261, numRuns: RUNS, endOnFailure: true });
    expect(ends.completed).toBeGreaterThan(0.9 * RUNS);
  },
);

test('a run that would take too much work ends with that answer, and keeps what it has', () => {
  const plant = caseOf(fc.sample(choices, { seed: 1, numRuns: 1 })[0]!);
  const whole = createRun(plant, plant.scenarios[0]!);
  whole.advance(DURATION);
  const enough = Math.floor(whole.stats.steps / 2);
  const run = createRun({ ...plant, run: { ...plant.run, maxSteps: enough } }, plant.scenarios[0]!);
  expect(run.advance(DURATION)).toMatchObject({
    kind: 'failed',
    failure: { kind: 'integration', failure: { kind: 'work-limit' } },
  });
  expect(run.stats.steps + run.stats.rejected).toBeLessThanOrEqual(enough);
  expect(run.time).toBeGreaterThan(0);
  expect(run.time).toBeLessThan(DURATION);
  const kept = run.recorder.time.length;
  expect(run.recorder.time).toEqual(whole.recorder.time.slice(0, kept));
  expect(run.recorder.rows).toEqual(whole.recorder.rows.slice(0, kept));
});
