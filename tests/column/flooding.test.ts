import { describe, expect, it } from 'vitest';
import type { Case } from '../../sim/case/case.ts';
import { createColumn, type Column } from '../../sim/column/column.ts';
import { GAS_CONSTANT, STANDARD_GRAVITY } from '../../sim/properties/constants.ts';
import { CLOSURE_TARGET } from '../../sim/run/closure.ts';
import { billetFloodVelocity } from '../../sim/transfer/billet-limits.ts';
import { stichlmairFloodVelocity } from '../../sim/transfer/stichlmair-flood.ts';
import { absorber, bare, metalRing35, withBeds, withColumn } from '../support/column-cases.ts';
import {
  evenly,
  filled,
  march,
  outletAt,
  settled,
  steadyOf,
  worstClosure,
  type Event,
  type Outlet,
} from '../support/column-runs.ts';

// A column taken over its flood point and back. What a flooded bed shows quantitatively is a law of our own; tested is
// what the case promises: a bed floods at the correlation's velocity ([Stichlmair1989], [Billet1999]), stays flooded down
// to `deflooding` times it, and loses nothing of what went in. Costs some five to ten seconds.

const DEFLOODING = absorber.column.flooding.deflooding;
const RUNNING = absorber.gas.feed.rate;
/** Above what a test takes on a loaded machine, ms. */
const PATIENCE = { timeout: 60_000 };
const stichlmair = withBeds(bare(absorber), { segments: 12 });
const billet = withColumn(stichlmair, { hydraulics: { model: 'billet-schultes', staticHoldup: undefined } });

/** Gas rate that floods by the correlation at the state of the outlet, mol/s. */
function floodRate(plant: Case): number {
  const { outlet, column } = settled(plant);
  const { fluids } = column;
  const A = column.chains[0]![0]!.cell.crossSection;
  const uL = plant.liquid.feed.rate / A;
  const T = outlet.TG;
  const TL = plant.liquid.feed.temperature;
  const p = plant.column.topPressure;
  const rhoL = fluids.solventDensity(TL);
  const rhoG = (p * plant.carrier.molarMass) / (GAS_CONSTANT * T); // moist by 1 %, 0.3 % of the velocity
  const muG = fluids.gasViscosity(T);
  const geometry = { a: metalRing35.area, eps: metalRing35.voidFraction };
  const u =
    plant.column.hydraulics.model === 'billet-schultes'
      ? billetFloodVelocity(
          geometry,
          metalRing35.billet!.CFl,
          { rhoL, muL: fluids.solventViscosity(TL), rhoV: rhoG, muV: muG },
          { kind: 'velocity', value: uL },
        )
      : stichlmairFloodVelocity({ ...geometry, ...metalRing35.friction! }, uL, rhoL, rhoG, muG);
  return (u * A * p) / (GAS_CONSTANT * T);
}

const gasTo =
  (rate: number) =>
  (column: Column): void => {
    column.modes.channels.gasRate = rate;
  };

/** Marches through gas rates, each held for a time, and looks often. */
function course(plant: Case, levels: readonly (readonly [rate: number, seconds: number])[]) {
  const column = createColumn(plant);
  const start = steadyOf(column);
  const before = outletAt(column, 0, start);
  const events: Event[] = [];
  const ends: number[] = [];
  let t = 0;
  for (const [rate, seconds] of levels) {
    events.push({ at: t, act: gasTo(rate) });
    t += seconds;
    ends.push(t);
  }
  const seen: { t: number; outlet: Outlet }[] = [];
  const end = march(
    column,
    start,
    evenly(t, 10),
    (at, y) => {
      expect(y.every(Number.isFinite)).toBe(true);
      seen.push({ t: at, outlet: outletAt(column, at, y) });
    },
    { events, maxSteps: 5000 },
  );
  const atEnds = ends.map((at) => seen.filter((s) => s.t <= at).at(-1)!.outlet);
  return { before, seen: seen.map((s) => s.outlet), atEnds, closure: worstClosure(column, start, end) };
}

describe.each([
  ['Stichlmair, Bravo and Fair', stichlmair],
  ['Billet and Schultes', billet],
] as const)('by %s', (_, plant) => {
  const flood = floodRate(plant);

  it('floods, runs full, carries over, stays flooded below its flood point, and recovers', PATIENCE, () => {
    const between = 0.93 * flood;
    const { before, seen, atEnds, closure } = course(plant, [
      [1.2 * flood, 300],
      [between, 300],
      [0.9 * DEFLOODING * flood, 300],
      [RUNNING < 0.7 * flood ? RUNNING : 0.7 * flood, 900],
      [RUNNING, 900],
    ]);
    const [flooded, held, released, , after] = atEnds as [Outlet, Outlet, Outlet, Outlet, Outlet];
    // Flooded: more than a quarter of the liquid goes over, the bed holds more, the gas is hardly cleaned.
    expect(before.carryOver).toBe(0);
    expect(flooded.carryOver).toBeGreaterThan(0.25 * plant.liquid.feed.rate);
    expect(Math.max(...seen.map((o) => o.held))).toBeGreaterThan(1.5 * before.held);
    expect(flooded.y[0]!).toBeGreaterThan(5 * before.y[0]!);
    // The pressure drop peaks, beyond what the same bed shows short of flooding, and stays under the liquid's weight.
    const peak = Math.max(...seen.map((o) => o.drop));
    const short = settled({ ...plant, gas: { ...plant.gas, feed: { ...plant.gas.feed, rate: between } } }).outlet;
    expect(peak).toBeGreaterThan(1.2 * short.drop);
    expect(peak).toBeLessThan(1000 * STANDARD_GRAVITY * 5 * metalRing35.voidFraction);
    // Hysteresis: at the same gas rate the bed that comes from below does not flood, the one that comes from above is.
    expect(short.carryOver).toBe(0);
    expect(held.carryOver).toBeGreaterThan(0.1 * plant.liquid.feed.rate);
    // Below the de-flooding point nothing goes over any more, and in the end all is as before.
    expect(released.carryOver).toBe(0);
    expect(Math.abs(after.held / before.held - 1)).toBeLessThan(1e-4); // 900 s are some 12 liquid residence times
    expect(Math.abs(after.drop / before.drop - 1)).toBeLessThan(1e-4);
    expect(Math.abs(after.y[0]! / before.y[0]! - 1)).toBeLessThan(1e-2); // packing's heat lags
    expect(closure).toBeLessThan(CLOSURE_TARGET);
  });
});

describe('where a bed floods and clears', () => {
  const flood = floodRate(stichlmair);
  // Correlation at the top's pressure and temperature; within the bed both differ by some per cent of the velocity.
  it.each([
    [0.97, false],
    [1.04, true],
  ])('comes to flood from below at the correlation’s velocity: %d of it', PATIENCE, (part, floods) => {
    const { atEnds } = course(stichlmair, [[part * flood, 600]]);
    expect(atEnds[0]!.carryOver > 0).toBe(floods);
  });

  it.each([
    [0.88, true],
    [0.82, false],
  ])('clears at the de-flooding share of it: %d of the flooding rate', PATIENCE, (part, stays) => {
    const { atEnds } = course(stichlmair, [
      [1.15 * flood, 300],
      [part * flood, 600],
    ]);
    expect(atEnds[0]!.carryOver).toBeGreaterThan(0);
    expect(atEnds[1]!.carryOver > 0).toBe(stays);
  });
});

it('a bed full of liquid has a finite pressure drop and drains to its steady state', PATIENCE, () => {
  const column = createColumn(stichlmair);
  const steady = outletAt(column, 0, steadyOf(column));
  const start = filled(column, { liquidOn: true, gasOn: true, holdup: 0.95 * 0.9 * metalRing35.voidFraction });
  const drops: number[] = [];
  let last = steady;
  const end = march(column, start, evenly(1500, 5), (t, y) => {
    last = outletAt(column, t, y);
    drops.push(last.drop);
  });
  expect(drops.every((d) => d > 0 && d < 1000 * STANDARD_GRAVITY * 5 * metalRing35.voidFraction)).toBe(true);
  expect(Math.max(...drops)).toBeGreaterThan(5 * steady.drop);
  expect(Math.abs(last.held / steady.held - 1)).toBeLessThan(1e-3);
  expect(worstClosure(column, start, end)).toBeLessThan(CLOSURE_TARGET);
});
