import { expect, test } from 'vitest';

import { alarmInstants, commandInstants, interlockInstants } from '../../sim/run/instants.ts';
import { limitAnswers } from '../../sim/run/limit-answers.ts';
import { handMade, outletLimit, upsetAt } from './support.ts';

// AAH-310 of the acetone case: AT-310 above 180 ppmv for 5 s; the analyser shows the truth 35 s late here.
const time = [0, 60, 100, 200, 300];
const truth = { 'AT-310': [0, 0, 4e-4, 4e-4, 0] };
const shown = { 'AT-310': [0, 0, 1e-4, 4e-4, 4e-4] };
const alarm = (at: number) => ({ time: at, kind: 'alarm' as const, tag: 'AAH-310', text: '' });
const instantsOf = (events: Parameters<typeof handMade>[0]['events']) =>
  alarmInstants(handMade({ time, truth, shown, events: events ?? [] })).find(({ tag }) => tag === 'AAH-310')!;

test('true and shown crossing of a setpoint are read off by straight lines', () => {
  // Truth passes 180 ppmv at 60 + 40 x 0.45, the shown value at 100 + 100 x 80/300.
  const { setpoint, annunciations } = instantsOf([]);
  expect(setpoint.trueCrossing).toBeCloseTo(78, 9); // rounding
  expect(setpoint.shownCrossing).toBeCloseTo(100 + 80 / 3, 9);
  expect(annunciations).toEqual([]);
});

test('a crossing that the run located itself is exactly the on-delay before the annunciation', () => {
  // 0.2 s beside the straight line, as a curved signal between two rows would have it.
  const located = 100 + 80 / 3 + 0.2;
  const { setpoint, onDelay, annunciations } = instantsOf([alarm(located + 5)]);
  expect(onDelay).toBe(5);
  expect(annunciations).toEqual([located + 5]);
  expect(setpoint.shownCrossing).toBeCloseTo(located, 12);
});

test('the true crossing belongs to the shown one: the last that is not later', () => {
  const twice = alarmInstants(
    handMade({
      time: [0, 10, 20, 30, 100, 110, 200],
      truth: { 'AT-310': [0, 3.6e-4, 0, 0, 0, 3.6e-4, 3.6e-4] },
      shown: { 'AT-310': [0, 0, 0, 0, 0, 0, 3.6e-4] },
    }),
  ).find(({ tag }) => tag === 'AAH-310')!;
  expect(twice.setpoint.trueCrossing).toBeCloseTo(105, 9);
  expect(twice.setpoint.shownCrossing).toBeCloseTo(155, 9);
});

test('an interlock out of service says so and never acts', () => {
  const record = handMade({ time, scenario: { interlocksInService: ['IS-301'] } });
  expect(interlockInstants(record).map(({ tag, inService, acts }) => [tag, inService, acts])).toEqual([
    ['IS-311', false, []],
    ['IS-301', true, []],
    ['IS-310', false, []],
  ]);
});

test('a command reports the worst that still comes before the next one', () => {
  const record = handMade({
    time: [0, 10, 20, 30, 40],
    quantities: { 'gas-outlet.acetone': [1e-4, 1e-4, 5e-4, 9e-4, 5e-4] },
    limits: [outletLimit(1e-3)],
    events: [upsetAt(5), { time: 20, kind: 'action', tag: 'restart', text: 'start P-310B' }],
  });
  const commands = commandInstants(record, limitAnswers(record)[0]);
  expect(commands.map(({ by, time: t, peakAfter }) => [by, t, peakAfter?.time, peakAfter?.value])).toEqual([
    ['upset', 5, 20, 5e-4],
    ['action', 20, 30, 9e-4],
  ]);
});
