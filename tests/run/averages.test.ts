import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

import {
  averageIntervals,
  averagePeak,
  blockAverages,
  invalidTime,
  LEAST_VALID_SHARE,
  rollingAverage,
} from '../../sim/run/averages.ts';
import { totalTime } from '../../sim/run/piecewise.ts';

/** Rounding of integrals of order 1e3 and their differences. */
const DIGITS = 10;

/** A rectangular spike of level s from t = 0 for d seconds over a running level b; the record goes on to `end`. */
const spike = (b: number, s: number, d: number, end: number) => ({
  time: [-100, 0, 0, d, d, end],
  value: [b, b, s, s, b, b],
});

describe('rolling average', () => {
  const window = 1800;
  const b = 0.3;

  // Exact: inside a window T a spike of level s over b averages b + (s - b) d/T, which is the limit 1 at
  // d = T (1 - b)/(s - b).
  test.each([2, 5, 10, 50])('a spike of %d times the limit is kept for just T (1 - b)/(s - b)', (s) => {
    const allowed = (window * (1 - b)) / (s - b);
    const peak = (d: number): number => averagePeak(rollingAverage(spike(b, s, d, 5000), window), 'above')!.value;
    expect(peak(allowed)).toBeCloseTo(1, DIGITS);
    expect(peak(0.999 * allowed)).toBeLessThan(1);
    expect(peak(1.001 * allowed)).toBeGreaterThan(1);
  });

  test('a longer spike puts the average over from its allowance until a window after the rest', () => {
    // The average passes 1 when the spike has lasted for the allowance, and again when all but that has left.
    const [s, d] = [5, 900];
    const allowed = (window * (1 - b)) / (s - b);
    const over = averageIntervals(rollingAverage(spike(b, s, d, 5000), window), 1, 'above');
    expect(over).toHaveLength(1);
    expect(over[0]!.from).toBeCloseTo(allowed, 6); // root tolerance 1e-9 s
    expect(over[0]!.to).toBeCloseTo(window + d - allowed, 6);
    expect(totalTime(over)).toBeCloseTo(window + d - 2 * allowed, 6);
  });

  test('a triangle longer than the window peaks at h (1 - T/(4 w)), half a window after its top', () => {
    // Mean of a symmetric triangle (height h, half base w) over the T around its top.
    const [h, w, T] = [8, 100, 60];
    const peak = averagePeak(rollingAverage({ time: [0, w, 2 * w, 500], value: [0, h, 0, 0] }, T), 'above')!;
    expect(peak.value).toBeCloseTo(h * (1 - T / (4 * w)), DIGITS);
    expect(peak.time).toBeCloseTo(w + T / 2, 6); // a parabola's top: half the digits of its value
  });

  test('a triangle within the window counts with its area', () => {
    const peak = averagePeak(rollingAverage({ time: [0, 10, 20, 500], value: [1, 9, 1, 1] }, 100), 'above')!;
    expect(peak.value).toBeCloseTo(1 + 80 / 100, DIGITS);
  });

  test('a ramp lags by half the window once its history is gone', () => {
    const average = rollingAverage({ time: [0, 400], value: [0, 400] }, 60);
    expect(average.at(300)).toBeCloseTo(270, DIGITS);
    expect(average.at(30)).toBeCloseTo(7.5, DIGITS); // 30^2/2 over 60: before the start it stood at 0
  });

  test('a lowest average mirrors the highest', () => {
    const flow = { time: [0, 0, 50, 50, 500], value: [2, 1, 1, 2, 2] };
    expect(averagePeak(rollingAverage(flow, 100), 'below')!.value).toBeCloseTo(1.5, DIGITS);
  });

  test('stays between the least and the largest value', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 10, noNaN: true }), { minLength: 2, maxLength: 20 }),
        fc.double({ min: 0.1, max: 30, noNaN: true }),
        (value, T) => {
          const average = rollingAverage({ time: value.map((_, i) => i), value }, T);
          // 1e-9: rounding of differences of the running integral over the shortest window.
          for (const v of average.value) {
            expect(v).toBeGreaterThanOrEqual(Math.min(...value) - 1e-9);
            expect(v).toBeLessThanOrEqual(Math.max(...value) + 1e-9);
          }
        },
      ),
    );
  });
});

describe('bad data', () => {
  const level = { time: [0, 1000], value: [4, 4] };

  test('is left out, whatever it reads', () => {
    // Frozen at 50 from 200 to 220 while the rest reads 4.
    const trace = { time: [0, 200, 200, 220, 220, 1000], value: [4, 4, 50, 50, 4, 4] };
    const average = rollingAverage(trace, 100, [{ from: 200, to: 220, open: false }]);
    expect(averagePeak(average, 'above')!.value).toBeCloseTo(4, DIGITS);
    expect(average.validShare.reduce((a, s) => Math.min(a, s), 1)).toBeCloseTo(0.8, DIGITS);
    expect(invalidTime(average)).toBe(0);
  });

  test('beyond the stated share it makes the average invalid for as long', () => {
    // 60 s bad in a window of 100 s: the share falls to 0.4. Invalid while more than a third is bad: from 33.3 s after
    // the begin until 33.3 s before the window has passed the end.
    const average = rollingAverage(level, 100, [{ from: 300, to: 360, open: false }]);
    const third = 100 * (1 - LEAST_VALID_SHARE);
    const exact = 100 + 60 - 2 * third;
    expect(average.validShare.reduce((a, s) => Math.min(a, s), 1)).toBeCloseTo(0.4, DIGITS);
    expect(invalidTime(average)).toBeCloseTo(exact, DIGITS);
    expect(averageIntervals(average, 3, 'above').map(({ from }) => from)[0]).toBe(0);
  });

  test('an average without any valid data has no value', () => {
    const average = rollingAverage(level, 100, [{ from: 0, to: 1000, open: true }]);
    expect(average.at(900)).toBeNaN();
    expect(averagePeak(average, 'above')!.time).toBeLessThan(100 * (1 - LEAST_VALID_SHARE) + 1e-9);
  });
});

describe('block average', () => {
  test('blocks follow the clock of the record, the last filled up with its last value', () => {
    const blocks = blockAverages({ time: [0, 30, 30, 90, 90, 150], value: [1, 1, 7, 7, 1, 1] }, 60);
    expect(blocks.map((b) => [b.from, b.to, b.value, b.complete])).toEqual([
      [0, 60, 4, true],
      [60, 120, 4, true],
      [120, 180, 1, false],
    ]);
  });

  test('a spike across two blocks is seen by the rolling average alone', () => {
    const trace = { time: [0, 30, 30, 90, 90, 180], value: [1, 1, 7, 7, 1, 1] };
    expect(averagePeak(rollingAverage(trace, 60), 'above')!.value).toBeCloseTo(7, DIGITS);
  });

  test('complete blocks hold what the record holds', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -3, max: 3, noNaN: true }), { minLength: 9, maxLength: 9 }), (value) => {
        // Eight seconds in blocks of two.
        const sum = blockAverages({ time: value.map((_, i) => i), value }, 2).reduce((s, b) => s + 2 * b.value, 0);
        const trapezoids = value.reduce((s, v, i) => (i === 0 ? 0 : s + (v + value[i - 1]!) / 2), 0);
        expect(sum).toBeCloseTo(trapezoids, DIGITS);
      }),
    );
  });
});
