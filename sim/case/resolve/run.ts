// Settings of a run, with defaults.

import type { RunSettings } from '../case.ts';
import { RUN } from '../defaults.ts';
import type { Reading } from '../reading.ts';
import type { RunText } from '../schema/actions.ts';

/** The settings, complete. */
export function readRun(reading: Reading, given: RunText): RunSettings {
  return {
    rtol: reading.fill('run.rtol', given.rtol, RUN.rtol),
    method: reading.fill('run.method', given.method, RUN.method),
    axialScheme: reading.fill('run.axialScheme', given.axialScheme, RUN.axialScheme),
    recordEvery: reading.fill('run.recordEvery', given.recordEvery, RUN.recordEvery),
    maxSteps: reading.fill('run.maxSteps', given.maxSteps, RUN.maxSteps),
    seed: reading.fill('run.seed', given.seed, RUN.seed),
    noise: reading.fill('run.noise', given.noise, RUN.noise),
  };
}
