// Schema of what watches and acts: instruments, alarms, interlocks, controllers, limits.

import * as v from 'valibot';

import { actionSchema, conditionSchema } from './actions.ts';
import { choice, count, group, maybe, quantity, tag, text, textOrNumber } from './primitives.ts';
import type { Range } from './primitives.ts';

/** Everything that can be measured or limited. */
const MEASURED = [
  'gas-outlet',
  'gas-inlet',
  'liquid-outlet',
  'sump-strength',
  'bed-dp',
  'liquid-flow',
  'gas-flow',
  'sump-level',
  'sump-temperature',
  'liquid-inlet-temperature',
  'gas-outlet-temperature',
  'gas-inlet-temperature',
  'liquid-outlet-temperature',
  'distributor-volume',
  'flood-approach',
  'carry-over',
  'pump-speed',
  'make-up-flow',
  'bleed-flow',
  'holdup',
] as const;

const DELAY: Range = { min: 0, max: 86_400 };
const value = (description: string) => text(`${description}, in the instrument's kind or as "40 % of range"`);
const measures = choice(MEASURED, 'what is measured');
const solute = maybe(text('which solute, when there are several', 'acetone'));

export const instrumentSchema = group({
  measures,
  solute,
  unit: text('unit in which it is shown', 'ppmv'),
  lag: maybe(quantity('time', DELAY, 'first order')),
  deadTime: maybe(quantity('time', DELAY, 'pure, such as a sample line')),
  bias: maybe(text("offset, in the instrument's kind", '5 ppmv')),
  drift: maybe(text('change of the offset per time', '2 ppmv/h')),
  noise: maybe(
    group({
      sigma: text('standard deviation', '1.5 ppmv'),
      correlationTime: maybe(quantity('time', DELAY)),
    }),
  ),
  range: maybe(v.tuple([text('lower end'), text('upper end')])),
  sampleInterval: maybe(quantity('time', { above: 0, max: 86_400 }, 'between samples of a sampling analyser')),
});

export const alarmSchema = group({
  instrument: tag(),
  high: maybe(value('alarm setpoint, alarm above it')),
  low: maybe(value('alarm setpoint, alarm below it')),
  deadband: maybe(value('way back from the setpoint')),
  onDelay: maybe(quantity('time', DELAY)),
  offDelay: maybe(quantity('time', DELAY)),
  priority: maybe(choice(['low', 'medium', 'high', 'critical'], 'alarm priority')),
});

export const interlockSchema = group({
  kind: choice(['trip', 'auto-start'], 'trip: latched until reset; auto-start: acts each time'),
  when: v.union([conditionSchema, v.pipe(v.array(conditionSchema), v.minLength(1, 'at least one condition'))]),
  votes: maybe(count(1, 20, 'conditions that must hold')),
  delay: maybe(quantity('time', DELAY, 'from the vote to the actions')),
  do: v.union([actionSchema, v.pipe(v.array(actionSchema), v.minLength(1, 'at least one action'))]),
  resetPermissive: maybe(conditionSchema),
});

export const controllerSchema = group({
  instrument: tag(),
  output: choice(
    ['drain', 'solvent-valve', 'make-up', 'bleed', 'gas-damper', 'cooler', 'pump-speed'],
    'what the controller moves',
  ),
  setpoint: value('setpoint'),
  gain: textOrNumber('output share per unit of measurement: "2 1/m", "5 %/K", or "%/% of range"', '2 1/m'),
  integralTime: quantity('time', { above: 0, max: 1e6 }),
  action: choice(['direct', 'reverse'], 'direct: output rises when the measurement rises'),
  outputRange: maybe(v.tuple([quantity('fraction', { min: 0, max: 1 }), quantity('fraction', { min: 0, max: 1 })])),
  mode: maybe(choice(['automatic', 'manual'], 'mode at the start')),
  manualOutput: maybe(quantity('fraction', { min: 0, max: 1 }, 'in manual, and first guess in automatic')),
});

export const limitSchema = group({
  measures,
  solute,
  max: maybe(text('not to be passed upward', '350 mg/Nm3')),
  min: maybe(text('not to be passed downward')),
  averaging: maybe(
    v.union([
      v.literal('none'),
      group({
        kind: choice(['rolling', 'block'], 'rolling or block average'),
        window: quantity('time', { above: 0, max: 31_536_000 }),
      }),
    ]),
  ),
  basis: maybe(choice(['wet', 'dry'], 'gas to which the strength refers')),
});

export type InstrumentText = v.InferOutput<typeof instrumentSchema>;
export type AlarmText = v.InferOutput<typeof alarmSchema>;
export type InterlockText = v.InferOutput<typeof interlockSchema>;
export type ControllerText = v.InferOutput<typeof controllerSchema>;
export type LimitText = v.InferOutput<typeof limitSchema>;
