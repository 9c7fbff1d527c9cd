import { describe, expect, test } from 'vitest';
import type { Case } from '../../sim/case/case.ts';
import { secondOpinionOf } from '../../sim/run/second-opinion.ts';
import { createRun } from '../../sim/run/simulate.ts';
import { caseText, mustRead } from '../case/support.ts';

// The same right-hand side through another family of method by another author (package `odex`): it proves the integration.
// At a tolerance of 1e-7 both must agree within 1e-4 of each outlet's peak throughout. Here with few segments and short
// windows, for time. Seen at the cases' own segments, all scenarios: 2e-7 to 9e-5, but 2e-4 where an extremum of the gas
// profile leaves the bed (warm-oil): both have the same states to 1e-6 there, and the outlet's face value turns on it.

const AGREEMENT = 1e-4;

function coarse(name: string, segments: number): Case {
  const plant = mustRead(caseText(name));
  const beds = plant.column.beds.map((bed) => ({ ...bed, segments }));
  return { ...plant, column: { ...plant.column, beds }, run: { ...plant.run, rtol: 1e-7, recordEvery: 2 } };
}

describe('both integrators at 1e-7 agree', () => {
  test.each([
    ['acetone-absorber', 'pump-trip', 6, 110],
    ['acetone-absorber', 'cold-dry-start', 5, 60],
    ['acetone-absorber', 'flood-and-recovery', 6, 400],
    ['methanol-recirculated', 'start', 5, 100], // controllers are put in manual and back
    ['benzene-wash-oil', 'oil-pump-trip', 5, 90],
    ['chloroform-stripper', 'surge', 5, 90],
    ['maldistribution', 'tilt', 5, 75],
  ] as const)(
    '%s, %s, %d segments, %d s',
    (name, id, segments, until) => {
      const plant = coarse(name, segments);
      const run = createRun(
        plant,
        plant.scenarios.find((s) => s.id === id)!,
      );
      run.advance(until);
      const { agreesWithin, rightHandSides, note } = secondOpinionOf(run);
      expect(note).toMatch(/^outlets/);
      expect(agreesWithin).toBeLessThan(AGREEMENT);
      expect(rightHandSides).toBeGreaterThan(run.stats.rightHandSides);
    },
    60_000,
  );
});

test('a loose run is found out', () => {
  const plant = coarse('acetone-absorber', 6);
  const run = createRun(
    { ...plant, run: { ...plant.run, rtol: 1e-2 } },
    plant.scenarios.find((s) => s.id === 'feed-spike')!,
  );
  run.advance(120);
  expect(secondOpinionOf({ ...run, plant, column: run.column, time: run.time }).agreesWithin).toBeGreaterThan(1e-3);
});

test('what cannot be replayed says why', () => {
  const plant = coarse('chloroform-stripper', 4);
  const slow = plant.instruments.map((i) => ({ ...i, sampleInterval: 900 }));
  const run = createRun({ ...plant, instruments: slow }, plant.scenarios[0]!);
  run.advance(1);
  const { agreesWithin, note } = secondOpinionOf(run);
  expect(agreesWithin).toBe(null);
  expect(note).toMatch(/^not compared: a controller reads .*, which has a dead time or samples$/);
});
