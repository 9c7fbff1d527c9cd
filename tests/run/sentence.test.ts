import { describe, expect, test } from 'vitest';

import { answersOf, headlineLimit } from '../../sim/run/answers.ts';
import { sentenceOf } from '../../sim/run/sentence.ts';
import { timelineOf } from '../../sim/run/timeline.ts';
import { handMade, outletLimit, upsetAt } from './support.ts';

const NOTHING = { stack: [0], diverted: [0], carriedOver: 0 };
const time = [0, 30, 60, 90, 120, 300];
const outlet = [0, 0, 1e-3, 2e-3, 1e-3, 0];
const quantities = {
  'gas-outlet.acetone': outlet,
  'stack-flow.acetone': outlet.map((y) => 50 * y),
  'stack-flow': outlet.map(() => 50),
};

const sentence = (given: Parameters<typeof handMade>[0], stopped?: number, system?: 'us'): string => {
  const record = handMade(given);
  return sentenceOf(record, answersOf(record, NOTHING), stopped, system);
};

// The triangle: 2000 ppmv = 2e-3 x 58.08 g/mol / 22.414 L/mol = 5.18 g/Nm3, 60 s after the upset; above 1000 ppmv for
// half its base and half the fall's tail: 60 s to 120 s; mass M G (area above): 0.05808 x 50 x 1e-3 x 60/2 = 87.1 g.
test('a limit that is broken: peak, when, for how long, how much', () => {
  expect(sentence({ time, quantities, limits: [outletLimit(1e-3)], events: [upsetAt(30)] })).toBe(
    'Acetone at the outlet peaks at 2000 ppmv (5.18 g/Nm3 wet) 1 min after P-310A trips; over 1000 ppmv for 1 min, 87.1 g above it.',
  );
});

test('mass in pounds where US units are asked for', () => {
  // 0.0871 kg / 0.45359237 kg/lb
  expect(sentence({ time, quantities, limits: [outletLimit(1e-3)], events: [upsetAt(30)] }, undefined, 'us')).toContain(
    '0.192 lb above it',
  );
});

test('a limit that is kept', () => {
  expect(sentence({ time, quantities, limits: [outletLimit(3e-3)], events: [upsetAt(30)] })).toBe(
    'Acetone at the outlet peaks at 2000 ppmv (5.18 g/Nm3 wet) 1 min after P-310A trips; never over 3000 ppmv.',
  );
});

test('an averaged limit beside an instantaneous one', () => {
  // Trapezoids to the end: 0 + 0.015 + 0.045 + 0.045 + 0.09 = 0.195 s, over 300 s: 650 ppmv.
  const average = outletLimit(5e-4, { id: 'mean', averaging: { kind: 'rolling', window: 300 } });
  expect(sentence({ time, quantities, limits: [average, outletLimit(3e-3)], events: [upsetAt(30)] })).toMatch(
    /; never over 3000 ppmv; the 5 min average reaches 650 ppmv, over 500 ppmv for [^;]+\.$/,
  );
});

test('a run that stopped says so first', () => {
  expect(sentence({ time, quantities, limits: [outletLimit(1e-3)], events: [upsetAt(30)] }, 300)).toMatch(
    /^The calculation stopped after 5 min; until then: acetone at the outlet peaks/,
  );
});

test('nothing happens: the quantity stays', () => {
  const still = { 'gas-outlet.acetone': time.map(() => 6e-5) };
  expect(sentence({ time, quantities: still, limits: [outletLimit(1e-3)] })).toBe(
    'Acetone at the outlet stays at 60 ppmv (155 mg/Nm3 wet); never over 1000 ppmv.',
  );
});

test('another quantity that breaks its limit is named too', () => {
  const dp = { ...outletLimit(5000), id: 'dp', measured: { quantity: 'bed-dp' as const }, unit: 'kPa' };
  const found = sentence({
    time,
    quantities: { ...quantities, 'bed-dp': [1, 1, 6000, 6000, 1, 1] },
    limits: [outletLimit(3e-3), dp],
  });
  expect(found).toContain('; bed-dp breaks its limit.');
});

test('a case without limits is told about its first solute', () => {
  expect(sentence({ time, quantities, events: [upsetAt(30)] })).toBe(
    'Acetone at the outlet peaks at 2000 ppmv 1 min after P-310A trips; the case states no limit.',
  );
});

describe('headline', () => {
  test('is the limit broken most, outlet strengths first', () => {
    const record = handMade({
      time,
      quantities,
      limits: [
        outletLimit(1.9e-3, { id: 'near' }),
        outletLimit(1e-3, { id: 'far' }),
        outletLimit(1e-2, { id: 'kept' }),
      ],
    });
    expect(headlineLimit(answersOf(record, NOTHING).limits)?.id).toBe('far');
  });
});

test('events are in order of time, and count from the first upset', () => {
  const record = handMade({
    time,
    quantities: { ...quantities, loading: [0, 0, 0, 0, 2, 0] },
    limits: [outletLimit(1e-3)],
    events: [upsetAt(30), { time: 100, kind: 'action', tag: 'restart', text: 'start P-310B' }],
  });
  const events = timelineOf(record, answersOf(record, NOTHING), []);
  expect(events.map(({ kind, time: t, afterUpset }) => [kind, t, afterUpset])).toEqual([
    ['upset', 30, 0],
    ['limit-crossed', 60, 30],
    ['action', 100, 70],
    ['flooding', 105, 75],
    ['limit-kept-again', 120, 90],
    ['flooding-over', 210, 180],
  ]);
});
