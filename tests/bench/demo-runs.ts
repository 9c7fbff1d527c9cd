/** Demo scenarios run with chosen settings, and how far their outlets lie from a reference run's. */

import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Case, Scenario } from '../../sim/case/case.ts';
import { readCase } from '../../sim/case/read.ts';
import type { MethodName } from '../../sim/run/integrators.ts';
import { createRun, type Run } from '../../sim/run/simulate.ts';

/** Times at which outlets are compared, s apart. */
const SPACING = 1;

/** A case file beside the sources, read. */
export function demoCase(name: string): Case {
  const found = readCase(readFileSync(join('cases', `${name}.json`), 'utf8'));
  if (!found.ok) throw new Error(`cases/${name}.json does not read`);
  return found.value;
}

/** A scenario of a case by its name. */
export function scenarioOf(plant: Case, id: string): Scenario {
  const found = plant.scenarios.find((s) => s.id === id);
  if (found === undefined) throw new Error(`no scenario ${id}`);
  return found;
}

/** A run at its end, and what its integration alone took. */
export interface TimedRun {
  readonly run: Run;
  /** s, of the wall's clock and of the processor's. */
  readonly wall: number;
  readonly processor: number;
}

/** Runs a scenario; `every` is the spacing of the record, the case's own if left out. */
export function timedRun(plant: Case, id: string, method: MethodName, rtol: number, every?: number): TimedRun {
  const settings = { ...plant.run, method, rtol, maxSteps: 1e6, recordEvery: every ?? plant.run.recordEvery };
  const run = createRun({ ...plant, run: settings }, scenarioOf(plant, id));
  const started = performance.now();
  const usage = process.cpuUsage();
  run.advance(run.scenario.duration);
  const { user, system } = process.cpuUsage(usage);
  if (run.outcome.kind !== 'completed') throw new Error(`${id} with ${method} at ${rtol} did not complete`);
  return { run, wall: (performance.now() - started) / 1000, processor: (user + system) / 1e6 };
}

/** Mole fraction of the first solute in the gas outlet at whole seconds. */
export interface OutletCurve {
  readonly values: ReadonlyMap<number, number>;
  readonly peak: number;
}

/** The outlet curve of a run that was recorded every second. */
export function outletCurve({ recorder, plant }: Run): OutletCurve {
  const at = recorder.observer.indexOf(`gas-outlet.${plant.solutes[0]!.id}`);
  const values = new Map<number, number>();
  recorder.time.forEach((t, k) => {
    if (Number.isInteger(t / SPACING)) values.set(t, recorder.rows[k]![at]!);
  });
  return { values, peak: Math.max(...values.values()) };
}

/** Largest distance between two curves, over the second one's peak. */
export function curveError(found: OutletCurve, reference: OutletCurve): number {
  let worst = 0;
  for (const [t, value] of found.values) {
    const other = reference.values.get(t);
    if (other !== undefined) worst = Math.max(worst, Math.abs(value - other));
  }
  return worst / reference.peak;
}

/** The same scenario recorded every second and followed to 1e-9. */
export function referenceCurve(plant: Case, id: string): OutletCurve {
  return outletCurve(timedRun(plant, id, 'rodas5p', 1e-9, SPACING).run);
}
