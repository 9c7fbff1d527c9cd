import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createBilletDrainage } from '../../sim/column/billet-drainage.ts';
import type { HydraulicState } from '../../sim/column/hydraulic-law.ts';
import { billetHoldup, billetLoadedHoldup } from '../../sim/transfer/billet-holdup.ts';
import { billetFloodHoldup, billetFloodVelocity } from '../../sim/transfer/billet-limits.ts';
import { billetDryPressureDrop, billetWetFactor } from '../../sim/transfer/billet-pressure-drop.ts';
import { absorber, withColumn } from '../support/column-cases.ts';

// The drainage law is Billet and Schultes' correlations [Billet1999] read backwards: put in the hold-up that they give for
// a pair of rates, and the liquid rate must come out. Fluids: air over water at 20 degC, rounded.

const fluids = { rhoL: 998, muL: 1.0e-3, rhoV: 1.2, muV: 1.8e-5 };
const STATIC = 0.007;
const plant = withColumn(absorber, { hydraulics: { model: 'billet-schultes', staticHoldup: STATIC } });
const bed = plant.column.beds[0]!;
const { packing } = bed;
const geometry = { a: packing.area, eps: packing.voidFraction };
const { Ch, Cp0, CFl } = packing.billet!;
const law = createBilletDrainage(plant, bed, STATIC);
const clean = { fouling: 0, foaming: 1 };

function at(holdup: number, uG: number, conditions = clean): HydraulicState {
  const out = { demand: 0, supply: 0, gradient: 0, loading: 0 };
  law.evaluate(holdup, uG * fluids.rhoV, fluids.rhoV, fluids.muV, fluids.rhoL, fluids.muL, conditions, out);
  return out;
}
const floodVelocity = (uL: number): number =>
  billetFloodVelocity(geometry, CFl, fluids, { kind: 'velocity', value: uL });
const unloadedHoldup = (uL: number): number => billetHoldup(geometry, Ch, uL, fluids.rhoL, fluids.muL);
function holdup(uL: number, uG: number): number {
  const flood = billetFloodHoldup(geometry, uL, fluids.rhoL, fluids.muL);
  return billetLoadedHoldup(unloadedHoldup(uL), flood, uG / floodVelocity(uL));
}

const rates = [
  [0.002, 0.5],
  [0.0045, 2.0],
  [0.012, 1.5],
  [0.02, 0.8],
] as const;

describe('below flooding', () => {
  it.each(rates)('gives back the liquid rate of the correlation, uL %d m/s, uG %d m/s', (uL, uG) => {
    // Branch changes of the correlation leave 5e-5 (see `billetHoldup` and the flooding exponents); static part above 3 hs 1e-6.
    expect(Math.abs(at(holdup(uL, uG), uG).demand / uL - 1)).toBeLessThan(2e-4);
  });

  it.each(rates)('gives the correlation’s pressure drop, uL %d m/s, uG %d m/s', (uL, uG) => {
    const h = holdup(uL, uG);
    const dry = billetDryPressureDrop(geometry, Cp0, uG, fluids.rhoV, fluids.muV, plant.column.diameter);
    const expected = dry * billetWetFactor(geometry, h, unloadedHoldup(uL), uL);
    expect(Math.abs((at(h, uG).gradient * fluids.rhoL * 9.80665) / expected - 1)).toBeLessThan(2e-4);
  });

  it('is loaded to 1 at the flood velocity and to 0.39 at nine tenths of it', () => {
    for (const [uL] of rates) {
      const flood = floodVelocity(uL);
      expect(Math.abs(at(holdup(uL, 0.999 * flood), 0.999 * flood).loading - 0.999 ** 9)).toBeLessThan(1e-3);
      expect(Math.abs(at(holdup(uL, 0.9 * flood), 0.9 * flood).loading - 0.9 ** 9)).toBeLessThan(1e-3);
    }
  });

  it('drains nothing at the static hold-up, and more with more hold-up', () => {
    expect(at(STATIC, 2).demand).toBe(0);
    let last = 0;
    for (let h = STATIC + 1e-4; at(h, 1.5).loading < 1; h += 1e-3) {
      const { demand } = at(h, 1.5);
      expect(demand).toBeGreaterThan(last);
      last = demand;
    }
    expect(Math.abs(floodVelocity(last) / 1.5 - 1)).toBeLessThan(0.01); // one step of 1e-3 short of flooding
  });

  it('lets go of the same at both sides of the flood point', () => {
    // The hold-up whose rate is the one that floods: by bisection of the loading.
    let low = 0.05;
    let high = 0.6;
    for (let i = 0; i < 60; i++) {
      const middle = 0.5 * (low + high);
      if (at(middle, 2.5).loading < 1) low = middle;
      else high = middle;
    }
    expect(Math.abs(at(low, 2.5).demand / at(high, 2.5).demand - 1)).toBeLessThan(1e-9); // the search's 1e-13 on ln u
    expect(Math.abs(floodVelocity(at(high, 2.5).demand) / 2.5 - 1)).toBeLessThan(2e-4); // as above
  });
});

describe('beyond flooding', () => {
  const uG = 2.5;
  it('lets go of less the fuller it is, down to the capacity at a higher gas rate', () => {
    const full = at(0.7, uG).demand;
    expect(at(0.3, uG).demand).toBeGreaterThan(at(0.4, uG).demand);
    expect(at(0.4, uG).demand).toBeGreaterThan(full);
    expect(Math.abs(floodVelocity(full) / (uG / plant.column.flooding.deflooding) - 1)).toBeLessThan(0.02);
  });

  it('takes in whatever comes until it is full', () => {
    const { voidFraction } = packing;
    expect(at(0.8, uG).supply).toBeGreaterThan(1);
    expect(at(0.895 * voidFraction, uG).supply).toBeLessThan(20 * at(0.895 * voidFraction, uG).demand);
    expect(at(voidFraction, uG).supply).toBe(0);
  });

  it('comes sooner with foam and with deposits', () => {
    const h = holdup(0.0045, 2.5);
    expect(at(h, 2.5, { fouling: 0, foaming: 0.8 }).loading).toBeGreaterThan(at(h, 2.5).loading);
    expect(at(h, 2.5, { fouling: 0.1, foaming: 1 }).loading).toBeGreaterThan(at(h, 2.5).loading);
  });
});

it('is finite for any hold-up and gas rate', () => {
  fc.assert(
    fc.property(fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 0, max: 30, noNaN: true }), (h, uG) => {
      const { demand, supply, gradient, loading } = at(h, uG);
      for (const v of [demand, supply, gradient, loading]) {
        expect(Number.isFinite(v)).toBe(true);
        expect(v).toBeGreaterThanOrEqual(0);
      }
    }),
    { seed: 7, numRuns: 2000 },
  );
});
