// Schema of conditions, actions and scenario steps. An action is told by its verb, the one key that says
// what is done; which keys may stand beside which verb is checked where the action is read.

import * as v from 'valibot';

import { choice, count, group, maybe, quantity, tag, text, textOrNumber } from './primitives.ts';
import type { Range } from './primitives.ts';

const TIME: Range = { min: 0, max: 31_536_000 };

/** A measured value above or below a level for a while. */
export const conditionSchema = group({
  instrument: tag(),
  above: maybe(text('level, in the instrument\'s kind or as "40 % of range"', '0.4 m')),
  below: maybe(text('level, in the instrument\'s kind or as "40 % of range"', '1.5 L/s')),
  for: maybe(quantity('time', TIME, 'must hold without break')),
});

/** Verbs with the keys that may stand beside them. */
export const VERBS = {
  change: ['to', 'by', 'times', 'trace', 'column', 'over', 'for'],
  set: ['over', 'for'],
  start: [],
  stop: [],
  lockOut: [],
  release: [],
  open: [],
  close: [],
  valve: ['to'],
  stick: [],
  free: [],
  controller: ['mode', 'setpoint', 'output'],
  fault: ['instrument', 'by', 'perTime'],
  interlock: ['command'],
  powerDip: ['for'],
} as const;

export type Verb = keyof typeof VERBS;

const actionEntries = {
  change: maybe(text('a quantity to change', 'gas.composition.acetone')),
  set: maybe(v.record(v.string(), textOrNumber('the new value'))),
  to: maybe(textOrNumber('the new value, or the opening of a valve', '8000 ppmv')),
  by: maybe(textOrNumber('the difference, or the bias of a faulty instrument', '5 K')),
  times: maybe(quantity('number', { min: 0, max: 1e6 }, "factor on the case's value")),
  trace: maybe(text('CSV file with time and value', 'feed.csv')),
  column: maybe(text('column of the trace', 'acetone')),
  over: maybe(quantity('time', TIME, 'ramp')),
  for: maybe(quantity('time', { above: 0, max: 31_536_000 }, "then back to the case's value; a dip's length")),
  start: maybe(tag('pump or fan')),
  stop: maybe(tag('pump or fan')),
  lockOut: maybe(tag('pump or fan that no start command reaches')),
  release: maybe(tag('pump or fan, after a lock-out')),
  open: maybe(text('a valve by name or tag', 'gas-inlet')),
  close: maybe(text('a valve by name or tag', 'gas-inlet')),
  valve: maybe(text('a valve by name or tag, moved `to` an opening', 'drain')),
  stick: maybe(text('a valve that stays where it is', 'drain')),
  free: maybe(text('a valve that moves again', 'drain')),
  controller: maybe(tag('a controller')),
  mode: maybe(choice(['automatic', 'manual'], 'controller mode')),
  setpoint: maybe(text("controller setpoint, in its instrument's kind", '0.6 m')),
  output: maybe(quantity('fraction', { min: 0, max: 1 }, 'controller output')),
  fault: maybe(choice(['freeze', 'fail-high', 'fail-low', 'bias', 'drift', 'restore'], 'what an instrument does')),
  instrument: maybe(tag('the instrument with the fault')),
  perTime: maybe(text('drift', '5 ppmv/min')),
  interlock: maybe(tag('an interlock')),
  command: maybe(choice(['reset', 'bypass', 'restore'], 'what is done to the interlock')),
  powerDip: maybe(v.pipe(v.array(tag('pump or fan')), v.minLength(1, 'at least one machine'))),
};

export const actionSchema = group(actionEntries);

export const stepSchema = group({
  id: maybe(text('a name that later steps refer to', 'fill')),
  label: maybe(text('what happens, for people')),
  role: maybe(choice(['upset', 'action'], 'an upset starts trouble, an action answers it')),
  at: maybe(quantity('time', TIME, 'from the start')),
  when: maybe(conditionSchema),
  after: maybe(text('id of the step that must have happened', 'fill')),
  delay: maybe(quantity('time', TIME, 'after that step')),
  do: maybe(v.pipe(v.array(actionSchema), v.minLength(1, 'at least one action'))),
  ...actionEntries,
});

export const scenarioSchema = group({
  title: text('a title for people'),
  initial: maybe(choice(['steady', 'dry', 'hot-standby'], 'state at the start')),
  duration: quantity('time', { above: 0, max: 31_536_000 }),
  interlocks: maybe(v.union([choice(['all', 'none'], 'interlocks in service'), v.array(tag())])),
  steps: v.pipe(v.array(stepSchema), v.maxLength(500, 'at most 500 steps')),
});

export type ConditionText = v.InferOutput<typeof conditionSchema>;
export type ActionText = v.InferOutput<typeof actionSchema>;
export type StepText = v.InferOutput<typeof stepSchema>;
export type ScenarioText = v.InferOutput<typeof scenarioSchema>;
export const runSchema = group({
  rtol: maybe(quantity('number', { min: 1e-10, max: 1e-2 }, 'relative tolerance of the integration')),
  method: maybe(text('integration method')),
  axialScheme: maybe(choice(['exponential', 'well-mixed'], 'how a segment passes its value on')),
  recordEvery: maybe(quantity('time', { above: 0, max: 3600 }, 'largest spacing of the recorded series')),
  maxSteps: maybe(count(100, 100_000_000, 'work limit')),
  seed: maybe(count(0, 4_294_967_295, 'of the instrument noise')),
  noise: maybe(v.boolean()),
});
export type RunText = v.InferOutput<typeof runSchema>;

export const uncertainSchema = group({
  path: text('path of a case key', 'column.transfer.scaleArea'),
  distribution: choice(['normal', 'uniform', 'triangular', 'lognormal'], 'shape'),
  times: maybe(v.tuple([quantity('number', { min: 0, max: 1e3 }), quantity('number', { min: 0, max: 1e3 })])),
  between: maybe(v.tuple([textOrNumber('low end'), textOrNumber('high end')])),
  source: maybe(text('where the spread comes from')),
});
export type UncertainText = v.InferOutput<typeof uncertainSchema>;
