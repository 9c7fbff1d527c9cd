import { describe, expect, test } from 'vitest';
import { firstCrossing } from '../../../sim/numerics/ivp/event-location.ts';
import type { EventFunction } from '../../../sim/numerics/ivp/integrate.ts';
import { integrate } from '../../../sim/numerics/ivp/integrate.ts';
import { bell, circle } from '../../support/problems.ts';
import { steppers } from '../../support/steppers.ts';

const search = { direction: 'either', parts: 4, tolerance: 1e-10 } as const;

describe('first crossing', () => {
  test('is located to its tolerance, on the side where it has happened', () => {
    const crossing = firstCrossing(Math.cos, 0, 2, 1, Math.cos(2), search)!;
    expect(crossing.direction).toBe('falling');
    // pi/2 itself, rounded down, lies before the zero of the cosine.
    expect(crossing.before).toBeLessThanOrEqual(Math.PI / 2);
    expect(crossing.after).toBeGreaterThan(Math.PI / 2);
    expect(crossing.after - crossing.before).toBeLessThanOrEqual(1e-10);
  });

  test('of two crossings in a step the first is found, if a part lies between', () => {
    const crossing = firstCrossing(Math.sin, 1, 7, Math.sin(1), Math.sin(7), search)!;
    expect(Math.abs(crossing.after - Math.PI)).toBeLessThan(1e-10);
    expect(firstCrossing(Math.sin, 1, 7, Math.sin(1), Math.sin(7), { ...search, parts: 1 })).toBeUndefined();
  });

  test('the direction asked for is the only one that counts', () => {
    const rising = firstCrossing(Math.sin, 1, 7, Math.sin(1), Math.sin(7), { ...search, direction: 'rising' })!;
    expect(Math.abs(rising.after - 2 * Math.PI)).toBeLessThan(1e-10);
    expect(firstCrossing(Math.cos, 0, 2, 1, Math.cos(2), { ...search, direction: 'rising' })).toBeUndefined();
  });

  test('leaving zero is no crossing, reaching it is one', () => {
    expect(firstCrossing((t) => t, 0, 1, 0, 1, search)).toBeUndefined();
    expect(firstCrossing((t) => t - 1, 0, 1, -1, 0, search)?.after).toBe(1);
  });
});

const falls: EventFunction = {
  name: 'x falls through zero',
  g: (_t, y) => y[0]!,
  direction: 'falling',
  terminal: false,
};

describe.each(steppers)('events with $name', (method) => {
  test('the bracket of an event holds on the continuous solution', () => {
    const stepper = method.create(circle, { rtol: 1e-5, atol: 1e-5 });
    stepper.start(0, Float64Array.of(1, 0));
    const { events, outcome } = integrate(stepper, { tEnd: 10, events: [falls] });
    expect(outcome.kind).toBe('reached-end');
    expect(events).toHaveLength(2);
    events.forEach(({ t, y }, k) => {
      expect(y[0]).toBeLessThanOrEqual(0);
      expect(y[0]).toBeGreaterThan(-2e-10); // slope 1, bracket 1e-10
      // Phase errors accumulate over the run; seen: up to 130 tolerances.
      expect(Math.abs(t - (0.5 + 2 * k) * Math.PI)).toBeLessThan(300 * 1e-5 ** method.tolerancePower);
    });
  });
});

describe.each(steppers.filter(({ name }) => ['Rodas5P', 'ESDIRK5(4)7L[2]SA2'].includes(name)))(
  'events with $name at tight tolerance',
  (method) => {
    test('are where the exact solution has them, to 1e-10', () => {
      const stepper = method.create(circle, { rtol: 1e-13, atol: 1e-13 });
      stepper.start(0, Float64Array.of(1, 0));
      const rises: EventFunction = { ...falls, name: 'up', direction: 'rising', terminal: true };
      const plan = { tEnd: 10, events: [falls, rises], eventTolerance: 1e-12 };
      const { events, outcome, t, y } = integrate(stepper, plan);
      expect(outcome).toEqual({ kind: 'event', name: 'up' });
      expect(events.map(({ name }) => name)).toEqual(['x falls through zero', 'up']);
      expect(Math.abs(events[0]!.t - Math.PI / 2)).toBeLessThan(1e-10);
      expect(Math.abs(t - 1.5 * Math.PI)).toBeLessThan(1e-10);
      expect(Math.abs(y[1]! + 1)).toBeLessThan(1e-10);
    });
  },
);

test('stops are met exactly and outputs come from the continuous solution', () => {
  const stepper = steppers[2]!.create(bell, { rtol: 1e-9, atol: 1e-9 });
  stepper.start(0, Float64Array.of(1));
  const times = [0.1, 0.7, 1.3, 2];
  const met: number[] = [];
  const stops = [0.5, 1.5];
  const watched: EventFunction = {
    name: 'watch',
    g: (t) => {
      if (stops.includes(t)) met.push(t);
      return 1;
    },
    direction: 'either',
    terminal: false,
  };
  const { outputs, t } = integrate(stepper, { tEnd: 2, stops, outputTimes: times, events: [watched] });
  expect(t).toBe(2);
  expect(met).toEqual(stops);
  expect(outputs.map((output) => output.t)).toEqual(times);
  // A few tolerances, also between steps.
  for (const { t: at, y } of outputs) expect(Math.abs(y[0]! - 1 / (1 + at * at))).toBeLessThan(2e-8);
});

test('a failure on the way is the outcome, with what was reached', () => {
  const stepper = steppers[1]!.create({ ...bell, rhs: (t, y, f) => bell.rhs(t < 1 ? t : Number.NaN, y, f) });
  stepper.start(0, Float64Array.of(1));
  const { outcome, t, outputs } = integrate(stepper, { tEnd: 2, outputTimes: [0.5, 1.5] });
  expect(outcome.kind).toBe('failed');
  expect(t).toBeLessThan(1);
  expect(outputs.map((output) => output.t)).toEqual([0.5]);
});
