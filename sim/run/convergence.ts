/** How much the number of segments decides: the headline figures at N and at twice N. */
import type { Case } from '../case/case.ts';
import { answersOf, headlineFigures, integratedOf } from './answers.ts';
import type { ConvergenceBlock } from './result-schema.ts';
import { recordOf } from './run-record.ts';
import { createRun, type Run } from './simulate.ts';

/** The figures of a run that has ended. */
function figuresOf(run: Run): ReturnType<typeof headlineFigures> {
  return headlineFigures(answersOf(recordOf(run), integratedOf(run.column.layout, run.state)));
}

/**
 * Compares a run with the same scenario on twice the segments.
 *
 * @param run - At its end.
 * @param onStep - Hears of each step of the second run.
 */
export function convergenceOf(run: Run, onStep?: (t: number) => void): ConvergenceBlock {
  const finer = createRun(twiceTheSegments(run.plant), run.scenario);
  finer.advance(run.time, onStep);
  const fine = new Map(figuresOf(finer).map((f) => [f.id, f.value]));
  return {
    segments: [run.plant, finer.plant].map((plant) => plant.column.beds.reduce((sum, bed) => sum + bed.segments, 0)),
    headline: figuresOf(run).map(({ id, unit, value }) => {
      const value2N = fine.get(id) ?? null;
      return { id, unit, valueN: value, value2N, difference: relative(value, value2N) };
    }),
  };
}

function twiceTheSegments(plant: Case): Case {
  const beds = plant.column.beds.map((bed) => ({ ...bed, segments: 2 * bed.segments }));
  return { ...plant, column: { ...plant.column, beds } };
}

/** Difference over the finer value; 0 where both are 0, null where that says nothing. */
function relative(coarse: number | null, fine: number | null): number | null {
  if (coarse === null || fine === null) return null;
  if (coarse === fine) return 0;
  return fine === 0 ? null : (coarse - fine) / Math.abs(fine);
}
