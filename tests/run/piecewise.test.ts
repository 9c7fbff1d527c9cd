import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

import {
  intervalsBeyond,
  peakOf,
  positiveIntegral,
  runningIntegral,
  totalTime,
  valueAt,
  type Trace,
} from '../../sim/run/piecewise.ts';

/** Rounding of a few operations on numbers of order 1 to 100. */
const DIGITS = 11;

/** Random traces, steps among them. */
const traces = fc
  .array(fc.record({ dt: fc.constantFrom(0, 0.5, 1, 3), v: fc.double({ min: -5, max: 5, noNaN: true }) }), {
    minLength: 2,
    maxLength: 30,
  })
  .map((points): Trace => {
    let t = 0;
    const time = points.map(({ dt }, i) => (t += i === 0 ? 0 : dt));
    return { time, value: points.map(({ v }) => v) };
  });

describe('integral', () => {
  // Trapezoids: 0..2 rises 0 to 4 (area 4), stands at 4 to 5 (12), steps down to 1, stands to 6 (1).
  const trace = { time: [0, 2, 5, 5, 6], value: [0, 4, 4, 1, 1] };

  test('is the sum of the trapezoids, at points and between them', () => {
    const integral = runningIntegral(trace);
    expect(integral(2)).toBe(4);
    expect(integral(1)).toBe(1); // t^2
    expect(integral(5)).toBe(16);
    expect(integral(5.5)).toBe(16.5);
    expect(integral(6)).toBe(17);
  });

  test('goes on before the start with the first value and after the end with the last', () => {
    const integral = runningIntegral({ time: [10, 20], value: [3, 7] });
    expect(integral(10) - integral(4)).toBe(18);
    expect(integral(22) - integral(20)).toBe(14);
  });

  test('of the part above zero counts the triangles beside a crossing', () => {
    // From -1 to 3 in 4 s: above zero for 3 s, up to 3: 4.5; back from 3 to -1: the same.
    expect(positiveIntegral({ time: [0, 4, 8], value: [-1, 3, -1] })).toBeCloseTo(9, DIGITS);
  });

  test('of the part above zero less that of the part below is the whole', () => {
    fc.assert(
      fc.property(traces, ({ time, value }) => {
        const below = positiveIntegral({ time, value: Array.from(value, (v) => -v) });
        const end = time[time.length - 1]!;
        expect(positiveIntegral({ time, value }) - below).toBeCloseTo(
          runningIntegral({ time, value })(end),
          DIGITS - 2,
        );
      }),
    );
  });
});

describe('crossings', () => {
  test('a triangle is above a level for the share of its base that is left there', () => {
    // Height 10 over a base of 20 s: above 4 for 20 (1 - 0.4) = 12 s, from 4 s on.
    const found = intervalsBeyond({ time: [0, 10, 20, 30], value: [0, 10, 0, 0] }, 4, 'above');
    expect(found).toEqual([{ from: 4, to: 16, open: false }]);
    expect(totalTime(found)).toBe(12);
  });

  test('a step crosses at its own time', () => {
    expect(intervalsBeyond({ time: [0, 5, 5, 9], value: [1, 1, 3, 3] }, 2, 'above')).toEqual([
      { from: 5, to: 9, open: true },
    ]);
  });

  test('what begins beyond is beyond from the start', () => {
    expect(intervalsBeyond({ time: [0, 4], value: [1, 3] }, 2, 'below')).toEqual([{ from: 0, to: 2, open: false }]);
  });

  test('touching a level is not being beyond it', () => {
    expect(intervalsBeyond({ time: [0, 1, 2], value: [0, 2, 0] }, 2, 'above')).toEqual([]);
  });

  test('time above and time not above make up the whole', () => {
    fc.assert(
      fc.property(traces, (trace) => {
        const above = totalTime(intervalsBeyond(trace, 0.3, 'above'));
        const below = totalTime(intervalsBeyond(trace, 0.3, 'below'));
        const { time, value } = trace;
        // Stretches that lie on the level belong to neither.
        const on = Array.from(time).reduce(
          (sum, t, i) => (i > 0 && value[i] === 0.3 && value[i - 1] === 0.3 ? sum + t - time[i - 1]! : sum),
          0,
        );
        expect(above + below + on).toBeCloseTo(time[time.length - 1]!, DIGITS);
      }),
    );
  });
});

describe('peaks', () => {
  test('the top of a parabola is found between its points', () => {
    // v = 7 - (t - 4.3)^2 at uneven points.
    const time = [2, 3, 4, 6, 7];
    const peak = peakOf({ time, value: time.map((t) => 7 - (t - 4.3) ** 2) }, 'above');
    expect(peak.time).toBeCloseTo(4.3, DIGITS);
    expect(peak.value).toBeCloseTo(7, DIGITS);
  });

  test('the bottom likewise', () => {
    const time = [0, 1, 2, 3];
    const peak = peakOf({ time, value: time.map((t) => 2 + (t - 1.4) ** 2) }, 'below');
    expect(peak.time).toBeCloseTo(1.4, DIGITS);
    expect(peak.value).toBeCloseTo(2, DIGITS);
  });

  test('a corner that a step marks is not rounded', () => {
    expect(peakOf({ time: [0, 9, 9, 9.5, 20], value: [0, 9, 9, 8.5, 0] }, 'above')).toEqual({ time: 9, value: 9 });
  });

  test('a corner between unlike intervals is not rounded', () => {
    expect(peakOf({ time: [0, 10, 10.01, 20], value: [0, 10, 9.99, 0] }, 'above')).toEqual({ time: 10, value: 10 });
  });

  test('at an end of the record the end itself counts', () => {
    expect(peakOf({ time: [0, 1, 2], value: [0, 1, 3] }, 'above')).toEqual({ time: 2, value: 3 });
  });

  test('a peak is never below the highest recorded value', () => {
    fc.assert(
      fc.property(traces, (trace) => {
        expect(peakOf(trace, 'above').value).toBeGreaterThanOrEqual(Math.max(...Array.from(trace.value)));
      }),
    );
  });
});

test('the value at a step is the later one', () => {
  const trace = { time: [0, 2, 2, 4], value: [0, 2, 10, 10] };
  expect([valueAt(trace, -1), valueAt(trace, 1), valueAt(trace, 2), valueAt(trace, 9)]).toEqual([0, 1, 10, 10]);
});
