import { describe, expect, it } from 'vitest';
import { TRACE } from '../support/column-cases.ts';
import { at, feedAnalyser, ramp, runThrough, shownAt, smallPlant } from './support.ts';

// What an instrument shows of a step or ramp that is known exactly. Strengths in units of the design feed.

const show = (
  more: Parameters<typeof feedAnalyser>[1],
  steps: Parameters<typeof runThrough>[1],
  duration = 60,
): ((time: number) => number) => {
  const run = runThrough(smallPlant({ instruments: [feedAnalyser('AT-1', more)] }), steps, duration);
  return (time) => shownAt(run, 0, time) / TRACE;
};
/** 10 times the integration tolerance. */
const CLOSE = 1e-5;
/** Whether a shown value is the expected one. */
const near = (seen: number, expected: number): boolean => Math.abs(seen - expected) < CLOSE;

describe('a lag', () => {
  it('answers a step as 1 - exp(-t/T)', () => {
    const seen = show({ lag: 8 }, [at(10, ramp(2, 0))]);
    for (const t of [5, 10, 14, 18, 26, 50])
      expect(near(seen(t), 1 + (t > 10 ? 1 - Math.exp(-(t - 10) / 8) : 0))).toBe(true);
  });
  it('trails a ramp by its time constant in the end', () => {
    // y = k (t - T (1 - exp(-t/T)))
    const seen = show({ lag: 4 }, [at(10, ramp(2, 50))]);
    for (const t of [12, 20, 40])
      expect(near(seen(t), 1 + (t - 10 - 4 * (1 - Math.exp(-(t - 10) / 4))) / 50)).toBe(true);
  });
});

describe('a dead time', () => {
  it('shows a ramp later, unchanged', () => {
    const seen = show({ deadTime: 7 }, [at(10, ramp(2, 20))]);
    for (const t of [5, 16, 20, 30, 37, 50])
      expect(near(seen(t), 1 + Math.min(1, Math.max(0, (t - 17) / 20)))).toBe(true);
  });
  it('shows a step later, behind a lag', () => {
    const seen = show({ deadTime: 7, lag: 5 }, [at(10, ramp(2, 0))]);
    for (const t of [16, 20, 30, 50]) expect(near(seen(t), 1 + (t > 17 ? 1 - Math.exp(-(t - 17) / 5) : 0))).toBe(true);
  });
});

describe('an instrument that is not quite right', () => {
  it('with a bias and a drift shows them on top, the drift from the start', () => {
    const seen = show({ bias: 0.2 * TRACE, drift: 0.01 * TRACE }, []);
    for (const t of [0, 10, 50]) expect(near(seen(t), 1.2 + 0.01 * t)).toBe(true);
  });
  it('shows no more than its range', () => {
    const seen = show({ range: [0, 1.5 * TRACE] }, [at(10, ramp(2, 20)), at(40, ramp(1, 10))]);
    for (const [t, value] of [
      [15, 1.25],
      [20, 1.5],
      [35, 1.5],
      [45, 1.5],
      [48, 1.2],
    ] as const)
      expect(near(seen(t), value)).toBe(true);
  });
  it('that samples shows the last sample until the next', () => {
    const seen = show({ sampleInterval: 6 }, [at(10, ramp(2, 20))]);
    for (const t of [5, 11, 13, 17, 19, 28, 41]) {
      expect(near(seen(t), 1 + Math.min(1, Math.max(0, (6 * Math.floor(t / 6) - 10) / 20)))).toBe(true);
    }
  });
});

describe('faults', () => {
  const fault = (kind: 'freeze' | 'fail-high' | 'fail-low' | 'restore' | { bias: number } | { drift: number }) =>
    ({ kind: 'instrument', tag: 'AT-1', fault: kind }) as const;

  it('frozen, it stands where it stood, and is right again when restored', () => {
    const seen = show({}, [at(10, ramp(2, 20)), at(15, fault('freeze')), at(25, fault('restore'))]);
    for (const [t, value] of [
      [14, 1.2],
      [20, 1.25],
      [24, 1.25],
      [26, 1.8],
    ] as const)
      expect(near(seen(t), value)).toBe(true);
  });
  it('failed, it stands at the end of its range', () => {
    const seen = show({ range: [0.1 * TRACE, 3 * TRACE] }, [at(10, fault('fail-high')), at(20, fault('fail-low'))]);
    expect(near(seen(15), 3)).toBe(true);
    expect(near(seen(25), 0.1)).toBe(true);
  });
  it('a bias comes at once, a drift from when it begins', () => {
    const seen = show({}, [at(10, fault({ bias: 0.3 * TRACE })), at(20, fault({ drift: 0.02 * TRACE }))]);
    expect(near(seen(9), 1)).toBe(true);
    expect(near(seen(15), 1.3)).toBe(true);
    expect(near(seen(45), 1.3 + 0.02 * 25)).toBe(true);
  });
});
