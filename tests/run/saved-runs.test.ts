import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Case } from '../../sim/case/case.ts';
import { resultOf, writeResult } from '../../sim/run/result.ts';
import { createRun, type Run, type SavedRun } from '../../sim/run/simulate.ts';
import { caseText, mustRead } from '../case/support.ts';

// Same input, same bytes: twice over, and through a save as text at any moment.

function small(name: string, segments: number, noise: boolean): Case {
  const plant = mustRead(caseText(name));
  return {
    ...plant,
    column: { ...plant.column, beds: plant.column.beds.map((bed) => ({ ...bed, segments })) },
    run: { ...plant.run, noise, rtol: 1e-4 },
  };
}

interface Trial {
  readonly plant: Case;
  readonly id: string;
  readonly end: number;
}

const trials: Trial[] = [
  { plant: small('acetone-absorber', 4, true), id: 'pump-trip', end: 80 },
  { plant: small('acetone-absorber', 4, false), id: 'cold-dry-start', end: 100 },
  { plant: small('methanol-recirculated', 4, true), id: 'pump-trip', end: 75 },
  { plant: small('chloroform-stripper', 4, false), id: 'fan-trip', end: 75 },
];

const begin = ({ plant, id, end }: Trial, saved?: SavedRun): Run => {
  const scenario = { ...plant.scenarios.find((s) => s.id === id)!, duration: end };
  return createRun(plant, scenario, saved);
};
const bytes = (run: Run): string => writeResult(resultOf(run, { caseText: '' })) + JSON.stringify(run.save());

/** Runs to the end with a halt at each of the times; at the last halt it is saved as text and another run goes on. */
function interrupted(trial: Trial, halts: readonly number[]): { whole: string; resumed: string } {
  const run = begin(trial);
  for (const t of halts) run.advance(t);
  const text = JSON.stringify(run.save());
  run.advance(trial.end);
  const other = begin(trial, JSON.parse(text) as SavedRun);
  other.advance(trial.end);
  return { whole: bytes(run), resumed: bytes(other) };
}

describe.each(trials)('$id of $plant.title', { timeout: 60_000 }, (trial) => {
  test('twice the same input gives the same bytes', () => {
    const [one, two] = [begin(trial), begin(trial)];
    one.advance(trial.end);
    two.advance(trial.end);
    expect(bytes(one) === bytes(two)).toBe(true);
  });

  test('saved at any moment and resumed, it gives the bytes of the run that only took the save', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: trial.end, noNaN: true }), { minLength: 1, maxLength: 3 }),
        (at) => {
          const { whole, resumed } = interrupted(
            trial,
            at.sort((a, b) => a - b),
          );
          expect(whole === resumed).toBe(true);
        },
      ),
      { seed: 11, numRuns: 2 },
    );
  });

  test('saved exactly where something happens, too', () => {
    const plain = begin(trial);
    plain.advance(trial.end);
    const times = [...new Set(plain.events.map((e) => e.time))].filter((t) => t > 0 && t < trial.end).slice(-2);
    expect(times.length).toBeGreaterThan(0);
    for (const t of times) {
      const { whole, resumed } = interrupted(trial, [t]);
      expect(whole === resumed).toBe(true);
    }
  });
});

test('a branch changes nothing behind it, and the trunk does not feel it', () => {
  const trial = trials[0]!;
  const trunk = begin(trial);
  trunk.advance(60);
  const saved = JSON.stringify(trunk.save());
  const branch = begin(trial, JSON.parse(saved) as SavedRun);
  const before = JSON.stringify(branch.recorder.save());
  branch.act(
    [{ kind: 'machine', tag: trial.plant.liquid.pumps.standby!, command: 'start' }],
    'action',
    'standby started',
  );
  branch.advance(trial.end);
  trunk.advance(trial.end);
  const alone = begin(trial, JSON.parse(saved) as SavedRun);
  alone.advance(trial.end);
  expect(bytes(trunk) === bytes(alone)).toBe(true);
  const rows = (JSON.parse(before) as { time: number[] }).time.length;
  expect(branch.recorder.time.slice(0, rows)).toEqual((JSON.parse(before) as { time: number[] }).time);
  expect(branch.recorder.time.length).toBeGreaterThan(rows);
  expect(bytes(branch) === bytes(trunk)).toBe(false);
});
