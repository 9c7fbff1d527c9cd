/**
 * The same run by an independent integrator (explicit extrapolation): the same right-hand side, another family of
 * method. What the run decided (commands, trips, steps of a scenario) is replayed at its times; what lies between is
 * integrated anew and compared. It proves the integration, not the physics.
 */
import { createColumn, type Column } from '../column/column.ts';
import { designChannels } from '../column/modes.ts';
import { integrateExplicit } from '../numerics/ivp/second-opinion.ts';
import { carryOut, type ActionTargets } from './actions.ts';
import { controllerOutput } from './controller-output.ts';
import { setModes } from './initial-state.ts';
import { columnTolerances } from './integrators.ts';
import { createObserver } from './observation.ts';
import { createPrograms, type Programs } from './programs.ts';
import type { SecondOpinionBlock } from './result-schema.ts';
import { createSignals } from './signals.ts';
import type { Run } from './simulate.ts';

/** Right-hand sides allowed for each second of plant time: steps of some 5 ms at a dozen calls, with room. */
const CALLS_PER_SECOND = 40_000;
/**
 * The explicit method works at this share of the run's tolerance: stability, not accuracy, sets its steps, and at the
 * limit of stability its noise is thousands of times its tolerance (seen in a flooded bed: 9e-4 of the peak at 1e-9,
 * 7e-5 at 1e-10). Costs some 10 % more right-hand sides than a tenth. Nothing is gained below what rounding leaves.
 */
const TIGHTER = 0.001;
const TIGHTEST = 1e-12;
/** Longest leg without a look at the progress, s. */
const LEG = 20;
const METHOD = 'explicit extrapolation (Gragg, Bulirsch and Stoer)';
/** Signals that are compared: what leaves the column and what it holds. */
const COMPARED = ['bed-dp', 'holdup', 'sump-level', 'gas-outlet-temperature', 'liquid-outlet-temperature'];
/** A temperature's differences are taken over its span, but at least over this, K. */
const LEAST_TEMPERATURE_SPAN = 10;
/** Share of the largest liquid load below which the strength of what still drips counts less: a quotient of next to nothing. */
const LEAST_LOAD = 0.01;

interface Replay {
  readonly column: Column;
  readonly programs: Programs;
  readonly targets: ActionTargets;
  /** State that the actions act on. */ y: Float64Array;
}

/** A column in the state of the run's start, to be driven by the run's own interventions. */
function createReplay(run: Run): Replay {
  const signals = createSignals(run.plant);
  const column = createColumn(run.plant, { signals });
  const first = run.recorder.shown[0];
  signals.modes.forEach((mode, i) => {
    mode.held = first[i];
  });
  setModes(column, run.scenario.initial);
  column.machinery.ductResistance = run.column.machinery.ductResistance;
  const programs = createPrograms(designChannels(run.plant), column.modes.channels);
  /** Without dead time; who reads a signal with one is refused. */
  const shownNow = (i: number, t: number): number => {
    const at = column.layout.instruments[i];
    const lagged = at >= 0 ? replay.y[at] : column.machinery.trueValue(run.plant.instruments[i], replay.y);
    return signals.shown(i, t, lagged);
  };
  const targets: ActionTargets = {
    plant: run.plant,
    modes: column.modes,
    programs,
    signals,
    shownNow,
    controllerOutput(i, t) {
      const instrument = run.plant.instruments.findIndex((x) => x.tag === run.plant.controllers[i].instrument);
      return controllerOutput(column, i, replay.y, shownNow(instrument, t));
    },
    later: () => undefined, // what is put off comes back as an intervention of its own
    interlock: () => undefined,
  };
  const replay: Replay = { column, programs, targets, y: Float64Array.from(run.initial) };
  return replay;
}

/** Why a run cannot be replayed, or undefined. */
function obstacle(run: Run): string | undefined {
  if (run.outcome.kind === 'failed') return 'not compared: the run did not reach its end';
  const controlled = new Set(run.plant.controllers.map((c) => c.instrument));
  const slow = run.plant.instruments.find(
    (i) => controlled.has(i.tag) && (i.deadTime > 0 || i.sampleInterval !== undefined),
  );
  return slow === undefined
    ? undefined
    : `not compared: a controller reads ${slow.tag}, which has a dead time or samples`;
}

/**
 * Compares a run with the explicit integrator's.
 *
 * @param run - At its end.
 * @param onStep - Hears of the plant time reached.
 */
export function secondOpinionOf(run: Run, onStep?: (t: number) => void): SecondOpinionBlock {
  const tolerance = run.plant.run.rtol;
  const nothing = { method: METHOD, tolerance, agreesWithin: null, worstSignal: null, worstTime: null };
  const why = obstacle(run);
  if (why !== undefined) return { ...nothing, rightHandSides: 0, note: why };
  const replay = createReplay(run);
  const { column, programs, targets } = replay;
  const { rows, time } = run.recorder;
  const observer = createObserver(column);
  const compared = observer.quantities.flatMap(({ id, kind, solute }, i) => {
    const isOutlet =
      solute !== undefined && (kind === 'gas-strength' || kind === 'liquid-strength') && id.includes('-outlet.');
    return isOutlet || COMPARED.includes(id) ? [i] : [];
  });
  const scale = compared.map((i) =>
    scaleOf(
      rows.map((row) => row[i]),
      observer.quantities[i].kind === 'temperature',
    ),
  );
  const load = observer.indexOf('liquid-load.bottom');
  const mostLoad = rows.reduce((most, row) => Math.max(most, row[load]), Number.MIN_VALUE);
  const found = new Float64Array(observer.quantities.length);
  const rates = new Float64Array(column.size);
  const rtol = Math.max(TIGHTER * tolerance, TIGHTEST);
  const { atol } = columnTolerances(column, rtol);
  let worst = 0;
  let worstSignal: string | null = null;
  let worstTime: number | null = null;
  let calls = 0;
  let t = 0;
  let row = 0;
  let next = 0; // intervention
  const end = run.time;
  const compare = (at: number, state: Float64Array): void => {
    column.rhs(at, state, rates);
    observer.observe(at, state, found);
    while (row < time.length && time[row] < at) row++;
    if (row >= time.length || time[row] !== at) return;
    const flowing = rows[row][load] / (rows[row][load] + LEAST_LOAD * mostLoad);
    compared.forEach((i, n) => {
      const weight = observer.quantities[i].kind === 'liquid-strength' ? flowing : 1;
      const difference = (weight * Math.abs(found[i] - rows[row][i])) / scale[n];
      if (difference > worst) {
        worst = difference;
        worstSignal = observer.quantities[i].id;
        worstTime = at;
      }
    });
  };
  while (t < end) {
    while (next < run.interventions.length && run.interventions[next].time <= t) {
      column.rhs(t, replay.y, rates); // actions read the plant as it is
      for (const action of run.interventions[next].actions) carryOut(action, t, targets);
      next += 1;
    }
    programs.apply(t);
    const start = t;
    column.setChannels((at) => {
      programs.apply(at, at > start);
    }, programs.varies(t));
    const decided = next < run.interventions.length ? run.interventions[next].time : end;
    const stop = Math.min(end, decided, programs.nextBreak(t), t + LEG);
    const outputTimes = [...new Set(time.filter((s) => s > t && s <= stop)), stop].filter(
      (s, k, all) => all.indexOf(s) === k,
    );
    const leg = integrateExplicit(column, t, replay.y, stop, {
      rtol,
      atol,
      outputTimes,
      maxRightHandSides: Math.ceil(CALLS_PER_SECOND * (stop - t)) + 100_000,
    });
    calls += leg.rightHandSides;
    leg.times.forEach((at, k) => {
      compare(at, Float64Array.from(leg.y[k]));
    });
    if (!leg.ok)
      return {
        ...nothing,
        rightHandSides: calls,
        note: `not compared beyond ${leg.t} s: the other method could not go on`,
      };
    replay.y = Float64Array.from(leg.yEnd);
    t = stop;
    onStep?.(t);
  }
  return {
    method: METHOD,
    tolerance,
    agreesWithin: worst,
    worstSignal,
    worstTime,
    rightHandSides: calls,
    note: 'outlets, pressure drop, hold-up, level and outlet temperatures at all recorded times, each over its peak; commands and trips at the times that the run found',
  };
}

/** Largest magnitude of a signal; of a temperature its span. */
function scaleOf(values: readonly number[], isTemperature: boolean): number {
  let low = Infinity;
  let high = -Infinity;
  for (const v of values) {
    if (v < low) low = v;
    if (v > high) high = v;
  }
  if (isTemperature) return Math.max(high - low, LEAST_TEMPERATURE_SPAN);
  return Math.max(Math.abs(low), Math.abs(high), Number.MIN_VALUE);
}
