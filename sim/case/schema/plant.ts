// Schema of the plant around the bed: gas supply, liquid supply.

import * as v from 'valibot';

import { choice, group, maybe, quantity, tag, text } from './primitives.ts';
import type { Range } from './primitives.ts';

const POSITIVE: Range = { above: 0 };
const NOT_NEGATIVE: Range = { min: 0 };
const SHARE: Range = { min: 0, max: 1 };
const LIQUID_RANGE: Range = { min: 200, max: 500 };
const stroke = maybe(quantity('time', { min: 0, max: 3600 }, 'full travel'));
const lag = (description: string) => maybe(quantity('time', { min: 0, max: 3600 }, description));

const gasComposition = v.record(v.string(), text('a gas strength', '400 ppmv'));
const liquidComposition = v.record(v.string(), text('a liquid strength', '0.02 mol%'));

export const gasSchema = group({
  feed: group({
    rate: quantity('molar-flow', { above: 0, max: 1e6 }, 'wet total'),
    temperature: quantity('temperature', { min: 200, max: 600 }),
    humidity: maybe(
      text(
        'relative ("50 %"), as dew point ("12 degC") or as mole fraction ("1.2 mol%") of the solvent\'s vapour',
        '50 %',
      ),
    ),
    composition: maybe(gasComposition),
  }),
  range: maybe(v.tuple([quantity('molar-flow', NOT_NEGATIVE), quantity('molar-flow', POSITIVE)])),
  source: maybe(
    v.variant('kind', [
      group({ kind: v.literal('forced'), lag: lag('of the flow') }),
      group({
        kind: v.literal('fan'),
        tag: tag(),
        shutOffPressure: quantity('pressure-difference', POSITIVE, 'rise at no flow and full speed'),
        ratedFlow: quantity('volume-flow', POSITIVE, 'at feed conditions'),
        ratedPressure: quantity('pressure-difference', POSITIVE, 'rise at the rated flow'),
        lag: lag('of the flow'),
        coastDown: lag('time constant of the speed'),
        runUp: lag('time constant of the speed'),
      }),
    ]),
  ),
  inletValve: maybe(group({ tag: tag(), stroke })),
  diversion: maybe(group({ tag: tag(), stroke })),
});

const stream = {
  rate: quantity('volume-flow', { min: 0, max: 100 }),
  temperature: quantity('temperature', LIQUID_RANGE),
  composition: maybe(liquidComposition),
};
const capacity = maybe(quantity('volume-flow', POSITIVE, 'valve fully open'));

export const liquidSchema = group({
  mode: choice(['once-through', 'recirculated'], 'from a header, or round over the sump'),
  feed: group({ ...stream, rate: quantity('volume-flow', { above: 0, max: 100 }, 'design rate') }),
  pumps: group({
    duty: tag(),
    standby: maybe(tag()),
    staticHeadShare: maybe(quantity('fraction', { min: 0, below: 1 }, 'static head over shut-off head')),
    coastDown: lag('T of w = 1/(1 + t/T)'),
    runUp: lag('to 95 % of the speed'),
    minimumLevel: maybe(quantity('length', NOT_NEGATIVE, 'sump level below which suction starves')),
  }),
  valve: maybe(group({ tag: tag(), stroke })),
  distributorVolume: maybe(quantity('volume', { min: 0, max: 100 }, 'liquid held at the design rate')),
  sump: maybe(
    group({
      area: maybe(quantity('area', { above: 0, max: 1e4 })),
      normalLevel: maybe(quantity('length', { above: 0, max: 100 })),
      overflowLevel: maybe(quantity('length', { above: 0, max: 100 })),
      drain: maybe(group({ tag: tag(), capacity, stroke })),
    }),
  ),
  cooler: maybe(
    group({
      tag: tag(),
      effectiveness: quantity('fraction', SHARE, "share of the way to the coolant's temperature"),
      coolantTemperature: quantity('temperature', LIQUID_RANGE),
    }),
  ),
  makeUp: maybe(v.union([v.literal('none'), group({ ...stream, tag: tag(), capacity, stroke })])),
  bleed: maybe(group({ tag: tag(), rate: quantity('volume-flow', NOT_NEGATIVE, 'design'), capacity, stroke })),
  emergencyWater: maybe(group({ ...stream, tag: tag(), stroke })),
});

export type GasText = v.InferOutput<typeof gasSchema>;
export type LiquidText = v.InferOutput<typeof liquidSchema>;
