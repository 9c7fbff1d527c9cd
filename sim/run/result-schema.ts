/**
 * The result document of a run: what another program can read. One schema makes the type, the check and the JSON Schema
 * beside the cases. SI throughout (K, Pa, mol, kg, m3, s); a number that has no value is null. No timings and nothing
 * about the machine: the same case gives the same bytes.
 */
import * as v from 'valibot';

/** Name and version in the first two keys of a document; the version changes when a reader would have to. */
export const RESULT_FORMAT = 'bedwave-result';
export const RESULT_VERSION = 1;

const describe = v.description;
const text = (what: string) => v.pipe(v.string(), describe(what));
const real = (what: string) => v.pipe(v.number(), describe(what));
const realOrNull = (what: string) => v.pipe(v.nullable(v.number()), describe(`${what}; null: none`));
const count = (what: string) => v.pipe(v.number(), v.integer(), v.minValue(0), describe(what));
const flag = (what: string) => v.pipe(v.boolean(), describe(what));
const reals = (what: string) => v.pipe(v.array(v.number()), describe(what));
const realsOrNull = (what: string) => v.pipe(v.array(v.nullable(v.number())), describe(what));
const oneOf = <const T extends readonly string[]>(words: T, what: string) => v.pipe(v.picklist(words), describe(what));
const listOf = <T extends v.GenericSchema>(item: T, what: string) => v.pipe(v.array(item), describe(what));

const side = oneOf(['above', 'below'], 'on which side of the value it counts');

const point = v.strictObject({
  time: real('s from the start of the scenario'),
  value: real('SI; a mole fraction for a strength'),
  mgPerNm3: realOrNull('gas strengths only: mg in a cubic metre at 273.15 K and 101.325 kPa, of the same gas'),
});

const interval = v.strictObject({
  from: real('s'),
  to: real('s'),
  open: flag('true when it lasts to the end of the record'),
});

const exceedance = v.strictObject({
  intervals: listOf(interval, 'times beyond the limit'),
  first: realOrNull('first crossing, s'),
  total: real('time beyond the limit in all, s'),
});

const block = v.strictObject({
  from: real('s'),
  to: real('s'),
  value: realOrNull('mean, SI'),
  validShare: real('share of the block with valid data, 0..1'),
  complete: flag('false where the record ends within the block: filled up with the last value'),
});

const average = v.strictObject({
  peak: v.nullable(point),
  over: exceedance,
  blocks: v.nullable(listOf(block, 'block averages; null for a rolling average')),
  worstAlignment: v.nullable(point),
  invalidTime: real('time without enough valid data for an average, s'),
  leastValidShare: real('least share of valid data in a window, 0..1'),
});

const shownLimit = v.strictObject({
  instrument: text('tag'),
  peak: point,
  atRangeEnd: flag('true when the instrument stands at an end of its range there: the true value lies beyond'),
  bad: listOf(interval, 'times in which the instrument is frozen or failed'),
  average: v.nullable(average),
});

const recovery = v.strictObject({
  outcome: oneOf(
    ['recovered', 'not-recovered', 'never-left', 'no-steady-start'],
    'whether the quantity comes back for good within the record',
  ),
  band: real('largest distance from the initial value that counts as recovered, SI'),
  time: realOrNull('when it is back for good, s from the start'),
  after: realOrNull('the same from the first upset, s'),
});

const limitAnswer = v.strictObject({
  id: text('id of the limit in the case'),
  label: text('what is limited'),
  quantity: text('id of the signal in the series'),
  solute: v.pipe(v.nullable(v.string()), describe('id of the solute; null: the limit is about none')),
  unit: text('SI unit of the values'),
  shownUnit: text('unit in which the case states the limit'),
  kind: oneOf(['max', 'min'], 'which way is allowed'),
  limit: v.strictObject({ value: real('SI'), mgPerNm3: realOrNull('as for a point') }),
  basis: oneOf(['wet', 'dry'], 'gas that strengths refer to; dry: y / (1 - y of solvent vapour)'),
  averaging: v.strictObject({
    kind: oneOf(['none', 'rolling', 'block'], 'how values are averaged before they are held against the limit'),
    window: realOrNull('s'),
  }),
  initial: point,
  peak: point,
  over: exceedance,
  average: v.nullable(average),
  shown: listOf(shownLimit, 'the same as the instruments that measure it show it'),
  kept: flag('whether the true value, averaged as the limit asks, keeps it over the whole record'),
  massOver: realOrNull('emitted above the limit strength, kg: integral of max(0, rate - limit strength x gas rate)'),
  recovery,
});

const emission = v.strictObject({
  solute: text('id'),
  molarMass: real('kg/mol'),
  stack: real('emitted at the stack over the record, kg'),
  aboveStart: real('the same less the initial rate over the record, kg'),
  diverted: real('sent through the diversion, counted apart, kg'),
});

const crossing = v.strictObject({
  instrument: text('tag'),
  side,
  value: real('SI'),
  trueCrossing: realOrNull('true value passes it, s: the last time not later than the shown crossing, else the first'),
  shownCrossing: realOrNull('shown value passes it, s: the crossing that led to the first act, else the first'),
});

const alarmInstants = v.strictObject({
  tag: text('tag of the alarm'),
  setpoint: crossing,
  onDelay: real('s'),
  annunciations: reals('s'),
  cleared: reals('s'),
});

const interlockInstants = v.strictObject({
  tag: text('tag of the interlock'),
  inService: flag('whether it acts in this scenario'),
  conditions: listOf(crossing, 'each condition'),
  acts: reals('when it acts, s: the command of a trip or a start'),
});

const command = v.strictObject({
  time: real('s'),
  by: oneOf(['upset', 'action', 'interlock'], 'who'),
  tag: text('step or interlock'),
  text: text('in words'),
  peakAfter: v.nullable(point),
});

const summary = v.strictObject({
  sentence: text('the answer in words'),
  caution: text('what the result is not'),
  headline: v.pipe(v.nullable(v.string()), describe('id of the limit that the sentence is about')),
});

const answers = v.strictObject({
  firstUpset: realOrNull('s'),
  limits: listOf(limitAnswer, 'in the order of the case'),
  emissions: listOf(emission, 'by solute'),
  carriedOver: real('liquid carried over with the gas, m3'),
  instants: v.strictObject({
    alarms: listOf(alarmInstants, 'in the order of the case'),
    interlocks: listOf(interlockInstants, 'in the order of the case'),
    commands: listOf(command, 'in order of time; peakAfter: worst of the headline quantity up to the next command'),
  }),
  rules: listOf(v.string(), 'how the figures are made, in words'),
});

const event = v.strictObject({
  time: real('s from the start'),
  afterUpset: realOrNull('s from the first upset'),
  kind: text('sort of event'),
  tag: text('what it is about'),
  text: text('in words'),
  value: realOrNull('SI'),
});

const closure = v.strictObject({
  target: real('error that a run is built to reach'),
  limit: real('error beyond which the balance is called broken'),
  ok: flag('no line beyond the limit'),
  worst: realOrNull('largest error'),
  lines: listOf(
    v.strictObject({
      component: text('name'),
      unit: oneOf(['mol', 'J'], 'unit of the amounts'),
      inflow: realOrNull('came in'),
      net: realOrNull('came in less went out'),
      stored: realOrNull('change of what is held'),
      inventory: realOrNull('held at the start'),
      error: realOrNull('|net - stored| / max(inflow, inventory)'),
    }),
    'by component, carrier gas and energy',
  ),
});

const signal = v.strictObject({
  id: text('id, or tag of an instrument'),
  label: text('in words'),
  kind: text('sort of quantity'),
  unit: text('SI unit'),
  sort: oneOf(['true', 'shown'], 'the plant, or what an instrument shows of it'),
  measures: v.pipe(v.nullable(v.string()), describe('id of the true signal that an instrument shows')),
  values: realsOrNull('as many as times'),
});

const profileRow = v.strictObject({
  depth: real("of the segment's middle below the top of its bed, m"),
  segment: count('from the top of its bed, from 1'),
  liquidTemperature: real('K'),
  gasTemperature: real('K'),
  holdup: real('m3/m3'),
  liquidVelocity: real('superficial, leaving the segment, m/s'),
  gasFlow: real('entering from below, mol/s'),
  moisture: real('solvent vapour, mol/mol'),
  gas: reals('mole fractions by solute'),
  liquid: reals('mole fractions by solute'),
  transfer: reals('gas to liquid by solute, mol/(m3 s)'),
  pressureGradient: real('Pa/m'),
  loading: real('1 at the flood point'),
  floodApproach: realOrNull('gas velocity over the flooding velocity'),
});

const profile = v.strictObject({
  time: real('s'),
  beds: listOf(
    v.strictObject({ bed: count('from the top, from 1'), zone: count('from 1'), rows: v.array(profileRow) }),
    'by bed and zone',
  ),
});

const secondOpinion = v.strictObject({
  method: text('the other method'),
  tolerance: real('relative'),
  agreesWithin: realOrNull('largest difference of a recorded signal over its span'),
  worstSignal: v.nullable(v.string()),
  worstTime: realOrNull('s'),
  rightHandSides: count('calls'),
  note: text('what was compared; why not, where it was not'),
});

const convergence = v.strictObject({
  segments: v.pipe(v.array(v.number()), describe('segments in all: N and 2 N')),
  headline: listOf(
    v.strictObject({
      id: text('figure'),
      unit: text('SI unit'),
      valueN: realOrNull('at N segments'),
      value2N: realOrNull('at 2 N segments'),
      difference: realOrNull('relative to the value at 2 N'),
    }),
    'headline figures',
  ),
});

const assumption = v.strictObject({
  path: text('key of the case'),
  source: text('publication key, or a remark'),
  mark: text('seen, computed, from memory, judgement: how far the source was compared'),
});

const warning = v.strictObject({
  kind: text('sort of warning'),
  time: realOrNull('first time, s'),
  text: text('in words'),
});

/** The document. */
export const resultSchema = v.strictObject({
  format: v.literal(RESULT_FORMAT),
  formatVersion: v.literal(RESULT_VERSION),
  tool: v.strictObject({ name: v.literal('bedwave'), version: text('of the program') }),
  case: v.strictObject({
    title: text('from the case file'),
    sha256: v.pipe(v.string(), v.regex(/^[0-9a-f]{64}$/), describe('SHA-256 of the text of the case file, UTF-8')),
  }),
  scenario: v.strictObject({
    id: text('id'),
    title: text('title'),
    duration: real('s'),
    initial: text('initial state'),
  }),
  settings: v.strictObject({
    method: text('integrator'),
    rtol: real('relative tolerance'),
    segments: v.pipe(v.array(v.number()), describe('by bed')),
    axialScheme: text('face values'),
    recordEvery: real('largest spacing of the record, s'),
    maxSteps: count('work limit'),
    noise: flag('measurement noise on'),
    seed: real('of the noise'),
  }),
  outcome: v.strictObject({
    kind: oneOf(['completed', 'running', 'failed'], 'how the run ended; running: stopped before its end'),
    time: real('of the last good state, s'),
    failure: v.nullable(
      v.strictObject({
        kind: text('why'),
        where: text('part of the plant'),
        time: real('s'),
        text: text('in words; what was computed before is kept'),
      }),
    ),
  }),
  summary,
  answers,
  events: listOf(event, 'in order of time'),
  closure,
  statistics: v.strictObject({
    steps: count('accepted steps'),
    rejected: count('steps tried and not accepted'),
    rightHandSides: count('calls'),
    jacobians: count('made'),
    factorisations: count('made'),
    solves: count('made'),
    moments: count('recorded'),
  }),
  warnings: listOf(warning, 'ranges left, and what else to know before trusting a figure'),
  assumptions: listOf(assumption, 'values that the case file does not state'),
  series: v.strictObject({
    time: reals('s; two values may share a time where something stepped'),
    signals: listOf(signal, 'true quantities, then instruments'),
  }),
  profiles: listOf(profile, 'along the depth, at the times asked for'),
  secondOpinion: v.nullable(secondOpinion),
  convergence: v.nullable(convergence),
});

/** Parts that the JSON Schema writes once and refers to by name. */
export const RESULT_PARTS = { point, interval, exceedance, average, crossing, signal, profile };

/** A result document. */
export type ResultDocument = v.InferOutput<typeof resultSchema>;
/** The part of it that answers the questions. */
export type Answers = ResultDocument['answers'];
/** One limit's answer. */
export type LimitAnswer = Answers['limits'][number];
/** An average of a limited quantity. */
export type AverageAnswer = NonNullable<LimitAnswer['average']>;
/** Times beyond a limit. */
export type Exceedance = LimitAnswer['over'];
/** A moment of a limited quantity. */
export type Point = LimitAnswer['peak'];
/** Recovery of a limited quantity. */
export type Recovery = LimitAnswer['recovery'];
/** Emission of one solute. */
export type Emission = Answers['emissions'][number];
/** Instants of one alarm. */
export type AlarmInstants = Answers['instants']['alarms'][number];
/** Instants of one interlock. */
export type InterlockInstants = Answers['instants']['interlocks'][number];
/** A command, or an upset. */
export type CommandInstant = Answers['instants']['commands'][number];
/** A crossing of a setpoint, true and shown. */
export type SetpointCrossing = Answers['instants']['alarms'][number]['setpoint'];
/** An entry of the event list. */
export type ResultEvent = ResultDocument['events'][number];
/** The balance. */
export type ClosureAnswer = ResultDocument['closure'];
/** A warning. */
export type Warning = ResultDocument['warnings'][number];
/** Agreement with the independent integrator. */
export type SecondOpinionBlock = NonNullable<ResultDocument['secondOpinion']>;
/** N against 2 N. */
export type ConvergenceBlock = NonNullable<ResultDocument['convergence']>;
