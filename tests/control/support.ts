/** A plant that costs nothing to run, for tests of what is around the bed: four segments, constant coefficients. */
import type { Action, Case, Instrument, Scenario, Step } from '../../sim/case/case.ts';
import { createRun, type Run } from '../../sim/run/simulate.ts';
import { linearBed, TRACE, withLiquid } from '../support/column-cases.ts';

/** An instrument on the strength of the gas feed, which a scenario moves as it likes. */
export function feedAnalyser(tag: string, more: Partial<Instrument> = {}): Instrument {
  return {
    tag,
    measured: { quantity: 'gas-inlet', solute: 0 },
    unit: '',
    lag: 0,
    deadTime: 0,
    bias: 0,
    drift: 0,
    noise: undefined,
    range: undefined,
    sampleInterval: undefined,
    ...more,
  };
}

/** The plant, with valves that move at once. */
export function smallPlant(more: Partial<Case> = {}): Case {
  const plant = withLiquid(linearBed({ NOG: 2, A: 1.3, segments: 4, tauL: 4 }), {
    valve: { tag: 'FV-311', stroke: 0 },
  });
  return { ...plant, run: { ...plant.run, recordEvery: 1 }, ...more };
}

/** Ramp of the feed's strength to `times` its design value, over a time. */
export function ramp(times: number, over: number): Action {
  return {
    kind: 'change',
    channel: { name: 'gas.composition', solute: 0 },
    how: { kind: 'to', value: times * TRACE, over, duration: undefined },
  };
}

/** A timed step of a scenario. */
export function at(time: number, ...actions: readonly Action[]): Step {
  return {
    id: `at-${String(time)}`,
    label: `at ${String(time)} s`,
    role: 'action',
    trigger: { kind: 'time', at: time },
    actions,
  };
}

/** Runs a plant through steps to the end. */
export function runThrough(plant: Case, steps: readonly Step[], duration: number): Run {
  const scenario: Scenario = {
    id: 'test',
    title: '',
    initial: 'steady',
    steps,
    duration,
    interlocksInService: 'all',
  };
  const run = createRun(plant, scenario);
  const outcome = run.advance(duration);
  if (outcome.kind !== 'completed') throw new Error(JSON.stringify(outcome));
  return run;
}

/** Shown value of instrument `i` at a recorded time, the last row there. */
export function shownAt(run: Run, i: number, time: number): number {
  const row = run.recorder.time.lastIndexOf(time);
  if (row < 0) throw new Error(`nothing recorded at ${String(time)} s`);
  return run.recorder.shown[row]![i]!;
}

/** Times of the events of a kind, for a tag. */
export function eventTimes(run: Run, kind: string, tag: string): number[] {
  return run.events.filter((e) => e.kind === kind && e.tag === tag).map((e) => e.time);
}
