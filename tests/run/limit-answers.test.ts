import { describe, expect, test } from 'vitest';

import { limitAnswers } from '../../sim/run/limit-answers.ts';
import { handMade, outletLimit, upsetAt } from './support.ts';

/** Rounding. */
const DIGITS = 10;
const M = 0.05808; // kg/mol of acetone, as the case states it
const MOLAR_VOLUME = 0.022413969545; // m3/mol at 273.15 K and 101.325 kPa [CODATA2018]

/** A triangular peak: base 40 s from t = 10 on, top h at 30. */
const TIME = [0, 10, 20, 30, 40, 50, 300];
const triangle = (h: number) => [0, 0, h / 2, h, h / 2, 0, 0];

const answer = (given: Parameters<typeof handMade>[0]) => limitAnswers(handMade(given))[0]!;

describe('a triangular peak', () => {
  const h = 4e-3;
  const found = answer({
    time: TIME,
    quantities: { 'gas-outlet.acetone': triangle(h) },
    limits: [outletLimit(1e-3)],
    events: [upsetAt(5)],
  });

  test('has its top, and is over the limit for the share of its base that is left there', () => {
    // Smooth tops only are refined: the parabola through (20, h/2), (30, h), (40, h/2) has its top at the point.
    expect(found.peak).toMatchObject({ time: 30, value: h });
    expect(found.over.first).toBeCloseTo(15, DIGITS);
    expect(found.over.total).toBeCloseTo(30, DIGITS);
    expect(found.kept).toBe(false);
  });

  test('carries its strength per normal volume', () => {
    // 3: the molar volume is computed from R, not typed.
    expect(found.peak.mgPerNm3).toBeCloseTo((h * M * 1e6) / MOLAR_VOLUME, 3);
    expect(found.limit.mgPerNm3).toBeCloseTo((1e-3 * M * 1e6) / MOLAR_VOLUME, 3);
  });

  test('is kept by a limit that it touches', () => {
    const touched = answer({ time: TIME, quantities: { 'gas-outlet.acetone': triangle(h) }, limits: [outletLimit(h)] });
    expect(touched).toMatchObject({ kept: true, over: { first: null, total: 0 } });
  });
});

describe('mass over the permit', () => {
  const G = 50; // mol/s at the stack
  const [h, L] = [4e-3, 1e-3];
  const emitted = triangle(h).map((y) => y * G);
  const quantities = {
    'gas-outlet.acetone': triangle(h),
    'stack-flow.acetone': emitted,
    'stack-flow': TIME.map(() => G),
  };

  test('is the triangle above the limit: M G (h - L)^2 w / h over half base w', () => {
    const { massOver } = answer({ time: TIME, quantities, limits: [outletLimit(L)] });
    expect(massOver).toBeCloseTo((M * G * (h - L) ** 2 * 20) / h, DIGITS);
  });

  test('counts a dry limit on the dry gas only', () => {
    const moist = { ...quantities, 'gas-outlet.moisture': TIME.map(() => 0.1) };
    const { massOver } = answer({ time: TIME, quantities: moist, limits: [outletLimit(L, { basis: 'dry' })] });
    const dryL = 0.9 * L; // of the wet gas
    expect(massOver).toBeCloseTo((M * G * (h - dryL) ** 2 * 20) / h, DIGITS);
  });

  test('belongs to upper limits of the gas outlet alone', () => {
    const dp = { ...outletLimit(5000), measured: { quantity: 'bed-dp' as const }, unit: 'kPa' };
    expect(answer({ time: TIME, limits: [dp] }).massOver).toBeNull();
  });
});

test('a dry limit is held against y / (1 - y of solvent vapour)', () => {
  const found = answer({
    time: [0, 10],
    quantities: { 'gas-outlet.acetone': [9e-5, 9e-5], 'gas-outlet.moisture': [0.1, 0.1] },
    limits: [outletLimit(9.5e-5, { basis: 'dry' })],
  });
  expect(found.initial.value).toBeCloseTo(1e-4, 12);
  expect(found.kept).toBe(false);
});

describe('averages', () => {
  const window = 100;
  const rolling = { averaging: { kind: 'rolling', window } } as const;

  test('an instantaneous excess within the allowance keeps an averaged limit', () => {
    // Area of the triangle over the window: 4e-3 x 20 / 100.
    const found = answer({
      time: TIME,
      quantities: { 'gas-outlet.acetone': triangle(4e-3) },
      limits: [outletLimit(1e-3, rolling)],
    });
    expect(found.average?.peak?.value).toBeCloseTo(8e-4, DIGITS);
    expect(found.kept).toBe(true);
    expect(found.over.total).toBeCloseTo(30, DIGITS);
  });

  test('blocks that split a peak keep what the worst alignment would not', () => {
    const found = answer({
      time: [0, 80, 80, 120, 120, 300],
      quantities: { 'gas-outlet.acetone': [0, 0, 4e-3, 4e-3, 0, 0] },
      limits: [outletLimit(1e-3, { averaging: { kind: 'block', window } })],
    });
    expect(found.average?.blocks?.map((b) => b.value)).toEqual(
      [8e-4, 8e-4, 0].map((v): unknown => expect.closeTo(v, DIGITS)),
    );
    expect(found.average?.worstAlignment?.value).toBeCloseTo(1.6e-3, DIGITS);
    expect(found.kept).toBe(true);
  });

  test('the history before the start is the first value', () => {
    // Half the window at 2e-3, half of it history at 1e-3.
    const found = answer({
      time: [0, 0, 50],
      quantities: { 'gas-outlet.acetone': [1e-3, 2e-3, 2e-3] },
      limits: [outletLimit(1.6e-3, rolling)],
    });
    expect(found.average?.peak?.value).toBeCloseTo(1.5e-3, DIGITS);
  });
});

describe('what the instrument shows', () => {
  const shown = { 'AT-310': [1, 1, 2, 5, 2, 1, 1].map((v) => v * 1e-4) };

  test('has a peak of its own, and says when that is the end of the range', () => {
    const clipped = [0, 0, 1e-3, 1e-3, 1e-3, 0, 0]; // AT-310 ends at 1000 ppmv
    const found = answer({ time: TIME, shown: { 'AT-310': clipped }, limits: [outletLimit(1e-3)] });
    expect(found.shown).toMatchObject([{ instrument: 'AT-310', atRangeEnd: true, peak: { value: 1e-3 } }]);
    expect(answer({ time: TIME, shown, limits: [outletLimit(1e-3)] }).shown[0]?.atRangeEnd).toBe(false);
  });

  test('leaves out of its average the time in which it is frozen', () => {
    const freeze = (fault: 'freeze' | 'restore', time: number) => ({
      time,
      actions: [{ kind: 'instrument', tag: 'AT-310', fault } as const],
    });
    const found = answer({
      time: [0, 100, 100, 120, 120, 300],
      shown: { 'AT-310': [1e-4, 1e-4, 9e-4, 9e-4, 1e-4, 1e-4] },
      limits: [outletLimit(1e-3, { averaging: { kind: 'rolling', window: 100 } })],
      interventions: [freeze('freeze', 100), freeze('restore', 120)],
    });
    expect(found.shown[0]?.bad).toEqual([{ from: 100, to: 120, open: false }]);
    expect(found.shown[0]?.average?.peak?.value).toBeCloseTo(1e-4, DIGITS);
    expect(found.shown[0]?.average?.leastValidShare).toBeCloseTo(0.8, DIGITS);
  });
});

describe('recovery', () => {
  // Band: 5 % of the limit, 5e-5; the triangle's tail passes it at 50 - 20 (5e-5/4e-3).
  const quantities = { 'gas-outlet.acetone': triangle(4e-3) };

  test('is when the quantity is back in its band for good, counted from the first upset', () => {
    const { recovery } = answer({ time: TIME, quantities, limits: [outletLimit(1e-3)], events: [upsetAt(5)] });
    expect(recovery).toMatchObject({ outcome: 'recovered', band: expect.closeTo(5e-5, DIGITS) as number });
    expect(recovery.time).toBeCloseTo(49.75, DIGITS);
    expect(recovery.after).toBeCloseTo(44.75, DIGITS);
  });

  test('is not there while the quantity is away at the end', () => {
    const cut = { time: TIME.slice(0, 4), quantities: { 'gas-outlet.acetone': triangle(4e-3).slice(0, 4) } };
    expect(answer({ ...cut, limits: [outletLimit(1e-3)] }).recovery.outcome).toBe('not-recovered');
  });

  test('is not asked of what never left, nor of a start that was not steady', () => {
    expect(answer({ time: TIME, limits: [outletLimit(1e-3)] }).recovery.outcome).toBe('never-left');
    const dry = answer({ time: TIME, quantities, limits: [outletLimit(1e-3)], scenario: { initial: 'dry' } });
    expect(dry.recovery.outcome).toBe('no-steady-start');
  });
});

test('a lower limit mirrors an upper one', () => {
  const found = answer({
    time: [0, 10, 20],
    quantities: { 'gas-flow': [50, 30, 50] },
    limits: [{ ...outletLimit(40), id: 'flow', kind: 'min', measured: { quantity: 'gas-flow' }, unit: 'mol/s' }],
  });
  expect(found).toMatchObject({ kept: false, peak: { time: 10, value: 30 } });
  expect(found.over.total).toBeCloseTo(10, DIGITS);
});
