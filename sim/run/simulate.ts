/**
 * A run: a case, a scenario, and the plant's time. Steps of the integrator are looked through for what happened in
 * them, in order; where something changes the plant, the step ends exactly there and a new one begins.
 * Advances on demand, so that a study, a test and a live session use the same object; saves and resumes bit for bit.
 */
import type { Action, Case, Scenario } from '../case/case.ts';
import { createColumn, type Column } from '../column/column.ts';
import { designChannels, type PlantModes } from '../column/modes.ts';
import { bracketedRoot } from '../numerics/bracketed-root.ts';
import type { StepFailure, Stepper, StepperState, StepperStats } from '../numerics/ivp/stepper.ts';
import { carryOut, type ActionTargets } from './actions.ts';
import { controllerOutput } from './controller-output.ts';
import type { RunEvent } from './events.ts';
import { fitDuct, initialState } from './initial-state.ts';
import { createEvaluation, type Evaluation } from './evaluation.ts';
import { createColumnStepper, isMethod, METHODS } from './integrators.ts';
import { createLogic, type Logic, type LogicState } from './logic.ts';
import { createObserver } from './observation.ts';
import { profileOf, type Profile } from './profiles.ts';
import { createPrograms, type Program, type Programs } from './programs.ts';
import { createRecorder, type RecordState, type Recorder } from './recorder.ts';
import { createSignals, type Signals, type SignalsState } from './signals.ts';

/** A change of the plant from outside the equations, as it was carried out. */
export interface Intervention {
  readonly time: number;
  readonly actions: readonly Action[];
}

/** Why a run ended before its end. */
export type RunFailure =
  | {
      readonly kind: 'integration';
      readonly failure: StepFailure;
      /** In words: which part of the plant. */ readonly where: string;
    }
  | { readonly kind: 'no-steady-state'; readonly residual: number; readonly where: string };

/** How a run stands. */
export type RunOutcome =
  | { readonly kind: 'running' }
  | { readonly kind: 'completed' }
  | { readonly kind: 'failed'; readonly failure: RunFailure };

/** A run at a moment, as plain data. */
export interface SavedRun {
  readonly scenario: string;
  /** @internal */ readonly stepper: StepperState;
  /** @internal */ readonly modes: SavedModes;
  /** @internal */ readonly programs: readonly Program[];
  /** @internal */ readonly logic: LogicState;
  /** @internal */ readonly signals: SignalsState;
  /** @internal */ readonly record: RecordState;
  readonly events: readonly RunEvent[];
  readonly interventions: readonly Intervention[];
  readonly profiles: readonly Profile[];
  /** @internal */ readonly ductResistance: number;
  /** @internal */ readonly initialState: readonly number[];
  /** @internal */ readonly pieceStart: number;
  /** @internal */ readonly nextRecord: number;
  readonly outcome: RunOutcome;
}

/** Modes as plain data; channels come back from the programs and the case. */
type SavedModes = Pick<
  PlantModes,
  'pumpRunning' | 'pumpAvailable' | 'fanRunning' | 'fanAvailable' | 'valveCommand' | 'valveStuck'
> & {
  readonly controllers: PlantModes['controllers'];
};

/** A run on its way. */
export interface Run {
  readonly plant: Case;
  readonly scenario: Scenario;
  /** @internal */ readonly column: Column;
  readonly recorder: Recorder;
  readonly events: readonly RunEvent[];
  readonly interventions: readonly Intervention[];
  /** Profiles taken so far, in order of time. */ readonly profiles: readonly Profile[];
  readonly outcome: RunOutcome;
  readonly time: number;
  readonly stats: Readonly<StepperStats>;
  /** State at the start, and now. */ readonly initial: Float64Array;
  readonly state: Float64Array;
  /** Goes on to time `to` (or the scenario's end, or a failure); `onStep` hears of each step, and changes nothing. */
  advance(to: number, onStep?: (t: number) => void): RunOutcome;
  /** Asks for profiles at these times, s, those still ahead (or now); steps stay as they are. */
  takeProfiles(times: readonly number[]): void;
  /** Carries actions out now, as an operator or a trainer does. */
  act(actions: readonly Action[], role: 'upset' | 'action', text: string): void;
  /** The run at this moment, to be resumed bit for bit. */
  save(): SavedRun;
}

/** Root tolerance of event times, s. */
const EVENT_TOLERANCE = 1e-9;
/** Parts of a step that are looked at for a crossing: signals behind a lag, and those without. */
const PARTS_LAGGED = 4;
const PARTS_DIRECT = 2;
/**
 * Parts of a step that are written down: straight lines between them are within 2e-4 of a curve that the integrator
 * follows to 1e-5 with a method of fourth order ((h/4)^2/8 for h^4/24 = 1e-5).
 */
const PARTS_RECORDED = 4;

/** Starts a run at the scenario's initial state, or resumes a saved one. */
export function createRun(plant: Case, scenario: Scenario, saved?: SavedRun): Run {
  const signals = createSignals(plant);
  const column = createColumn(plant, { signals });
  const { modes } = column;
  const programs = createPrograms(designChannels(plant), modes.channels);
  const logic = createLogic(plant, scenario);
  const recorder = createRecorder(createObserver(column), plant.instruments.length);
  const method = isMethod(plant.run.method) ? plant.run.method : METHODS[0];
  const evaluation = createEvaluation(column);
  const { rtol, maxSteps } = plant.run;
  const settings = { method, rtol, maxStep: signals.controlDeadTime, maxSteps };
  const stepper = createColumnStepper(column, settings, evaluation);
  const run = new RunCore(plant, scenario, column, signals, programs, logic, recorder, evaluation, stepper);
  if (saved === undefined) {
    signals.isAtRest = true;
    fitDuct(column); // a fan that is too small is said by the plant check; the run shows what it gives
    const start = initialState(column, scenario.initial);
    signals.isAtRest = false;
    if (start.kind === 'failed') {
      run.fail({
        kind: 'integration',
        failure: start.failure,
        where: stateName(plant, column, start.failure.component),
      });
    } else if (start.kind === 'not-steady') {
      run.fail({ kind: 'no-steady-state', residual: start.residual, where: stateName(plant, column, start.state) });
    }
    run.begin(start.y);
  } else {
    run.resume(saved);
  }
  return run;
}

class RunCore implements Run {
  readonly plant: Case;
  readonly scenario: Scenario;
  readonly column: Column;
  readonly recorder: Recorder;
  readonly events: RunEvent[] = [];
  readonly interventions: Intervention[] = [];
  readonly profiles: Profile[] = [];
  #profileTimes: number[] = [];
  readonly initial: Float64Array;
  outcome: RunOutcome = { kind: 'running' };
  readonly #signals: Signals;
  readonly #programs: Programs;
  readonly #logic: Logic;
  readonly #evaluation: Evaluation;
  readonly #stepper: Stepper;
  readonly #targets: ActionTargets;
  /** State between, for looking into a step. */ readonly #between: Float64Array;
  #pieceStart = 0;
  #nextRecord = 0;

  constructor(
    plant: Case,
    scenario: Scenario,
    column: Column,
    signals: Signals,
    programs: Programs,
    logic: Logic,
    recorder: Recorder,
    evaluation: Evaluation,
    stepper: Stepper,
  ) {
    this.plant = plant;
    this.scenario = scenario;
    this.column = column;
    this.recorder = recorder;
    this.initial = new Float64Array(column.size);
    this.#signals = signals;
    this.#programs = programs;
    this.#logic = logic;
    this.#evaluation = evaluation;
    this.#stepper = stepper;
    this.#between = new Float64Array(column.size);
    this.#targets = {
      plant,
      modes: column.modes,
      programs,
      signals,
      shownNow: (i, t) => this.#shownAt(i, t),
      controllerOutput: (i, t) => this.#controllerOutput(i, t),
      later: (time, actions, text) => {
        logic.postpone(time, actions, text);
      },
      interlock: (tag, command, t) => logic.command(tag, command, t, (e) => this.events.push(e)),
    };
  }

  get time(): number {
    return this.#stepper.t;
  }
  get stats(): Readonly<StepperStats> {
    return this.#stepper.stats;
  }
  get state(): Float64Array {
    return this.#stepper.y;
  }

  fail(failure: RunFailure): void {
    this.outcome = { kind: 'failed', failure };
  }

  /** First moment: signals at rest, comparators read, steps due at time 0 carried out. */
  begin(y: Float64Array): void {
    this.initial.set(y);
    this.#stepper.start(0, y);
    this.#beginPiece(0);
    this.#evaluate(0, y);
    const { instruments } = this.plant;
    instruments.forEach((instrument, i) => {
      const slot = this.#signals.slot[i];
      const value = this.#rawNow(i, y);
      if (slot >= 0) this.#signals.history.begin(slot, value);
      const mode = this.#signals.modes[i];
      mode.held = this.#signals.conditioned(i, 0, value);
      if (instrument.sampleInterval !== undefined) mode.nextSample = instrument.sampleInterval;
    });
    this.#readComparators(0, () => true);
    this.#record(0, y);
    this.#nextRecord = this.plant.run.recordEvery;
    if (this.outcome.kind === 'failed') return;
    this.#happen(0);
  }

  takeProfiles(times: readonly number[]): void {
    this.#profileTimes = times.filter((t) => t >= this.time).sort((a, b) => a - b);
    this.#takeProfiles(this.time);
  }

  /** Takes the profiles that are due up to `to`, a time of the last step. */
  #takeProfiles(to: number): void {
    while (this.#profileTimes.length > 0 && this.#profileTimes[0] <= to) {
      const t = this.#profileTimes.shift() ?? to;
      if (this.profiles.some((p) => p.time === t)) continue; // taken before the run was saved
      this.#evaluateAt(t);
      this.profiles.push(profileOf(this.column, t));
    }
  }

  advance(to: number, onStep?: (t: number) => void): RunOutcome {
    const end = Math.min(to, this.scenario.duration);
    while (this.outcome.kind === 'running' && this.time < end) {
      this.#step(end);
      onStep?.(this.time);
    }
    if (this.outcome.kind === 'running' && this.time >= this.scenario.duration) this.outcome = { kind: 'completed' };
    return this.outcome;
  }

  act(actions: readonly Action[], role: 'upset' | 'action', text: string): void {
    const t = this.time;
    this.#carryOut(t, actions, role, '', text);
    this.#restart(t);
    this.#happen(t);
  }

  /** One step of the integrator, cut where the plant changes. */
  #step(end: number): void {
    const stepper = this.#stepper;
    const from = stepper.t;
    const stop = Math.min(end, this.#programs.nextBreak(from), this.#logic.nextDue(from), this.#nextSample());
    const result = stepper.step(stop);
    if (result.kind === 'failed') {
      this.#evaluate(stepper.t, stepper.y);
      this.fail({
        kind: 'integration',
        failure: result.failure,
        where: stateName(this.plant, this.column, result.failure.component),
      });
      return;
    }
    const to = stepper.t;
    this.#remember(from, to);
    const cut = this.#lookThrough(from, to);
    const until = cut ?? to;
    if (cut !== undefined) {
      stepper.interpolate(cut, this.#between);
      this.#signals.history.dropLast();
      this.#remember(from, cut);
    }
    this.#recordBetween(from, until);
    if (cut !== undefined) {
      stepper.start(cut, this.#between);
    }
    // What is due exactly here: timers, samples, the next piece of a channel.
    const isBreak = this.#programs.nextBreak(until - 1e-12 * Math.max(1, until)) <= until;
    this.#sample(until);
    const changed = this.#happen(until);
    if (isBreak && !changed) this.#restart(until);
  }

  /** Puts the step's values of dead-time signals into the history. */
  #remember(from: number, to: number): void {
    const slots = this.#signals.slot;
    if (!slots.some((s) => s >= 0)) return;
    this.#signals.history.add(from, to, (slot, t) => this.#rawAt(slots.indexOf(slot), t));
  }

  /** Handles crossings and timers in (from, to) in order; returns the time at which the plant changed, if it did. */
  #lookThrough(from: number, to: number): number | undefined {
    let cursor = from;
    const looks = this.#looks(from, to);
    for (;;) {
      let first = Infinity;
      let which = -1;
      this.#logic.comparators.forEach((_, c) => {
        const t = this.#crossing(c, looks, cursor);
        if (t < first) {
          first = t;
          which = c;
        }
      });
      const due = this.#logic.nextDue(cursor);
      const next = Math.min(first, due);
      if (!(next < to)) {
        // A crossing in the last instant belongs to the end of the step.
        if (which >= 0 && first <= to) this.#logic.truth[which] = !this.#logic.truth[which];
        return undefined;
      }
      if (which >= 0 && first <= due) this.#logic.truth[which] = !this.#logic.truth[which];
      cursor = next;
      const list = this.#logic.settle(cursor, (e) => this.events.push(e));
      if (list.length === 0) continue;
      // The plant changes here: leave the rest of the step. Carried out on the state at the cut.
      this.#pending = list;
      return cursor;
    }
  }
  #pending: ReturnType<Logic['settle']> = [];

  /** Values of each instrument at points through the step; alarms and interlocks look for changes between them. */
  #looks(from: number, to: number): Map<number, { t: number[]; v: number[] }> {
    const looks = new Map<number, { t: number[]; v: number[] }>();
    for (const { instrument } of this.#logic.comparators) {
      if (looks.has(instrument)) continue;
      const parts = this.column.layout.instruments[instrument] >= 0 ? PARTS_LAGGED : PARTS_DIRECT;
      const t: number[] = [from];
      for (const edge of [...this.#signals.kinks(instrument, from, to), to]) {
        const last = t[t.length - 1];
        if (!(edge > last)) continue;
        for (let p = 1; p <= parts; p++) t.push(p === parts ? edge : last + ((edge - last) * p) / parts);
      }
      looks.set(instrument, { t, v: t.map((at) => this.#shownAt(instrument, at)) });
    }
    return looks;
  }

  /** First time after the cursor at which a comparator's truth changes; Infinity for none. */
  #crossing(c: number, looks: ReadonlyMap<number, { t: number[]; v: number[] }>, cursor: number): number {
    const { instrument, kind, value } = this.#logic.comparators[c];
    const look = looks.get(instrument);
    if (look === undefined) return Infinity;
    const truth = this.#logic.truth[c];
    const holds = (v: number): boolean => (kind === 'above' ? v > value : v < value);
    for (let k = 1; k < look.t.length; k++) {
      if (look.t[k] <= cursor || holds(look.v[k]) === truth) continue;
      const a = Math.max(look.t[k - 1], cursor);
      const b = look.t[k];
      const ga = (a === look.t[k - 1] ? look.v[k - 1] : this.#shownAt(instrument, a)) - value;
      const gb = look.v[k] - value;
      if (!(ga * gb < 0)) return Math.max(b, cursor);
      const root = bracketedRoot((t) => this.#shownAt(instrument, t) - value, a, b, ga, gb, EVENT_TOLERANCE);
      return Math.max(root.after, cursor);
    }
    return Infinity;
  }

  /** Lets logic act at t until nothing more happens; true when the plant changed. */
  #happen(t: number): boolean {
    let changed = false;
    for (let round = 0; round < 100; round++) {
      const list = this.#pending.length > 0 ? this.#pending : this.#logic.settle(t, (e) => this.events.push(e));
      this.#pending = [];
      if (list.length === 0) break;
      changed = true;
      for (const due of list) this.#carryOut(t, due.actions, due.role, due.tag, due.text);
      this.#restart(t);
    }
    return changed;
  }

  #carryOut(
    t: number,
    actions: readonly Action[],
    role: 'upset' | 'action' | 'interlock',
    tag: string,
    text: string,
  ): void {
    this.events.push({ time: t, kind: role === 'interlock' ? 'interlock' : role, tag, text });
    this.interventions.push({ time: t, actions });
    for (const action of actions) {
      const refused = carryOut(action, t, this.#targets);
      if (refused !== undefined) {
        this.events.push({
          time: t,
          kind: action.kind === 'interlock' ? 'interlock-refused' : 'command-refused',
          tag,
          text: refused,
        });
      }
    }
  }

  /** Begins a new piece at t on the present state, after something changed. */
  #restart(t: number): void {
    this.#beginPiece(t);
    const y = Float64Array.from(this.#stepper.y);
    this.#stepper.start(t, y);
    this.#evaluate(t, y);
    // Signals that jump with the plant: direct ones, stuck ones, sampled ones.
    this.#readComparators(
      t,
      (i) =>
        this.column.layout.instruments[i] < 0 ||
        this.#signals.modes[i].fault !== 'none' ||
        this.#signals.modes[i].bias !== 0,
    );
    this.#record(t, y);
  }

  #beginPiece(t: number): void {
    this.#evaluation.forget();
    this.#pieceStart = t;
    this.#programs.apply(t);
    this.column.setChannels((at) => {
      this.#programs.apply(at, at > this.#pieceStart);
    }, this.#programs.varies(t));
  }

  #nextSample(): number {
    let next = Infinity;
    for (const mode of this.#signals.modes) next = Math.min(next, mode.nextSample);
    return next;
  }

  /** Takes the samples that are due. */
  #sample(t: number): void {
    const sampled: number[] = [];
    this.#signals.modes.forEach((mode, i) => {
      if (mode.nextSample > t) return;
      const interval = this.plant.instruments[i].sampleInterval ?? Infinity;
      mode.nextSample += interval;
      if (mode.fault === 'frozen') return;
      mode.held = this.#signals.conditioned(i, t, this.#rawAt(i, t));
      this.#evaluation.forget(); // a controller may read it
      sampled.push(i);
    });
    if (sampled.length === 0) return;
    this.#readComparators(t, (i) => sampled.includes(i));
  }

  /** Sets the truths of comparators on the instruments that `which` picks from their values at t. */
  #readComparators(t: number, which: (instrument: number) => boolean): void {
    this.#logic.comparators.forEach(({ instrument, kind, value }, c) => {
      if (!which(instrument)) return;
      const v = this.#shownAt(instrument, t);
      const margin = 1e-9 * Math.abs(value);
      // On the very threshold the truth stays as it was: the crossing has just been counted.
      if (Math.abs(v - value) <= margin && t > 0) return;
      this.#logic.truth[c] = kind === 'above' ? v > value : v < value;
    });
  }

  #evaluate(t: number, y: Float64Array): void {
    this.#evaluation.settle(t, y);
  }

  /** State at a time of the last step, evaluated. */
  #evaluateAt(t: number): Float64Array {
    if (t === this.#stepper.t) this.#between.set(this.#stepper.y);
    else this.#stepper.interpolate(t, this.#between);
    this.#evaluate(t, this.#between);
    return this.#between;
  }

  /** Lagged (or true) value of an instrument at a time of the last step. */
  #rawAt(i: number, t: number): number {
    const at = this.column.layout.instruments[i];
    if (at >= 0) return t === this.#stepper.t ? this.#stepper.y[at] : this.#stepper.interpolateOne(at, t);
    return this.column.machinery.trueValue(this.plant.instruments[i], this.#evaluateAt(t));
  }
  #rawNow(i: number, y: Float64Array): number {
    const at = this.column.layout.instruments[i];
    return at >= 0 ? y[at] : this.column.machinery.trueValue(this.plant.instruments[i], y);
  }
  #shownAt(i: number, t: number): number {
    const mode = this.#signals.modes[i];
    // A stuck or sampled signal needs no look at the plant.
    if (mode.fault !== 'none' || this.plant.instruments[i].sampleInterval !== undefined)
      return this.#signals.shown(i, t, 0);
    return this.#signals.shown(i, t, this.#signals.slot[i] >= 0 ? 0 : this.#rawAt(i, t));
  }
  #controllerOutput(i: number, t: number): number {
    const instrument = this.plant.instruments.findIndex((x) => x.tag === this.plant.controllers[i].instrument);
    return controllerOutput(this.column, i, this.#stepper.y, this.#shownAt(instrument, t));
  }

  #record(t: number, y: Float64Array): void {
    const { machinery } = this.column;
    this.recorder.add(
      t,
      y,
      (i) => machinery.trueValue(this.plant.instruments[i], y),
      (i) => this.#signals.shown(i, t, this.#rawNow(i, y)),
    );
  }

  /** Records the end of a step, points through it, and the multiples of the spacing that is asked for. */
  #recordBetween(from: number, to: number): void {
    const every = this.plant.run.recordEvery;
    this.#takeProfiles(to);
    let part = 1;
    for (;;) {
      const within = part < PARTS_RECORDED ? from + ((to - from) * part) / PARTS_RECORDED : to;
      const next = Math.min(within, this.#nextRecord > from ? this.#nextRecord : to);
      if (!(next < to)) break;
      if (next > from) this.#record(next, this.#evaluateAt(next));
      if (within <= next) part += 1;
      if (this.#nextRecord <= next) this.#nextRecord += every;
    }
    while (this.#nextRecord <= to) this.#nextRecord += every;
    this.#record(to, this.#evaluateAt(to));
  }

  save(): SavedRun {
    const { modes, machinery } = this.column;
    return structuredCopy({
      scenario: this.scenario.id,
      stepper: this.#stepper.save(),
      modes: {
        pumpRunning: modes.pumpRunning,
        pumpAvailable: modes.pumpAvailable,
        fanRunning: modes.fanRunning,
        fanAvailable: modes.fanAvailable,
        valveCommand: modes.valveCommand,
        valveStuck: modes.valveStuck,
        controllers: modes.controllers,
      },
      programs: this.#programs.save(),
      logic: this.#logic.save(),
      signals: this.#signals.save(),
      record: this.recorder.save(),
      events: this.events,
      interventions: this.interventions,
      profiles: this.profiles,
      ductResistance: machinery.ductResistance,
      initialState: Array.from(this.initial),
      pieceStart: this.#pieceStart,
      nextRecord: this.#nextRecord,
      outcome: this.outcome,
    });
  }

  resume(saved: SavedRun): void {
    const { modes, machinery } = this.column;
    Object.assign(modes.pumpRunning, saved.modes.pumpRunning);
    Object.assign(modes.pumpAvailable, saved.modes.pumpAvailable);
    modes.fanRunning = saved.modes.fanRunning;
    modes.fanAvailable = saved.modes.fanAvailable;
    Object.assign(modes.valveCommand, saved.modes.valveCommand);
    Object.assign(modes.valveStuck, saved.modes.valveStuck);
    saved.modes.controllers.forEach((c, i) => Object.assign(modes.controllers[i], c));
    machinery.ductResistance = saved.ductResistance;
    this.#programs.restore(saved.programs);
    this.#logic.restore(saved.logic);
    this.#signals.restore(saved.signals);
    this.recorder.restore(saved.record);
    this.events.push(...saved.events);
    this.interventions.push(...saved.interventions);
    this.profiles.push(...saved.profiles);
    this.initial.set(saved.initialState);
    this.#nextRecord = saved.nextRecord;
    this.outcome = saved.outcome;
    this.#beginPiece(saved.pieceStart);
    this.#stepper.restore(saved.stepper);
    this.#programs.apply(this.#stepper.t, this.#stepper.t > this.#pieceStart);
    this.#evaluate(this.#stepper.t, this.#stepper.y);
  }
}

/** A deep copy as JSON would make it. */
function structuredCopy<T>(value: T): T {
  return JSON.parse(JSON.stringify(value)) as T;
}

/** Which part of the plant a state belongs to, in words. */
function stateName(plant: Case, column: Column, state: number): string {
  const { layout } = column;
  const parts = (r: number): string => {
    const { components } = layout;
    const substance = (k: number): string => (k === 0 ? plant.solvent.name : plant.solutes[k - 1].name);
    if (r < components) return `${substance(r)} in the liquid`;
    if (r === components) return 'liquid temperature';
    if (r < 2 * components + 1) return `${substance(r - components - 1)} in the gas`;
    return 'gas temperature';
  };
  for (const chain of layout.chains) {
    const local = state - chain.first;
    if (local >= 0 && local < chain.cells * layout.block) {
      const cell = Math.floor(local / layout.block);
      return `bed ${chain.bed + 1}, segment ${cell + 1} of ${chain.cells} from the top, ${parts(local % layout.block)}`;
    }
  }
  const within = (at: number): boolean => state >= at && state <= at + layout.components;
  const vessel = layout.vessel.findIndex(within);
  if (vessel >= 0) return vessel === 0 ? 'distributor' : `redistributor above bed ${vessel + 1}`;
  if (within(layout.sump)) return 'sump';
  const controller = layout.controllers.indexOf(state);
  if (controller >= 0) return `controller ${plant.controllers[controller].tag}`;
  const instrument = layout.instruments.indexOf(state);
  if (instrument >= 0) return `instrument ${plant.instruments[instrument].tag}`;
  if (layout.pressureDrop.includes(state)) return 'pressure drop';
  if (state === layout.gasFlow) return 'gas flow';
  if (layout.pumpSpeed.includes(state)) return 'pump speed';
  return state >= layout.accumulatorFirst ? 'balance of the boundary' : 'plant around the bed';
}
