import { describe, expect, it } from 'vitest';
import type { Case } from '../../sim/case/case.ts';
import { floodedShare } from '../../sim/column/film-law.ts';
import { createFluids } from '../../sim/column/fluids.ts';
import { createHydraulicLaw } from '../../sim/column/hydraulics.ts';
import { billetFloodVelocity } from '../../sim/transfer/billet-limits.ts';
import { stichlmairFloodVelocity } from '../../sim/transfer/stichlmair-flood.ts';
import { caseText, mustRead } from '../case/support.ts';
import { withBeds, withColumn, withGas } from '../support/column-cases.ts';
import { settled } from '../support/column-runs.ts';

// What flooding costs transfer, on the shipped acetone absorber under both hydraulic laws. That transfer suffers from
// about nine tenths of the flooding velocity on is common practice, no source. Costs two seconds.

const shipped = withBeds(mustRead(caseText('acetone-absorber')), { segments: 20 });
const laws: readonly (readonly [string, Case])[] = [
  ['Stichlmair, Bravo and Fair', shipped],
  ['Billet and Schultes', withColumn(shipped, { hydraulics: { model: 'billet-schultes', staticHoldup: undefined } })],
];

/** Loading at a liquid velocity and a share of the gas velocity that floods it; air at 290 K, 1.2 kg/m3. */
function loadingAt(plant: Case, uL: number, share: number): number {
  const fluids = createFluids(plant);
  const bed = plant.column.beds[0]!;
  const { area: a, voidFraction: eps, friction, billet } = bed.packing;
  const rhoL = fluids.solventDensity(290);
  const muL = fluids.solventViscosity(290);
  const rhoG = 1.2;
  const muG = fluids.gasViscosity(290);
  const flood =
    plant.column.hydraulics.model === 'billet-schultes'
      ? billetFloodVelocity(
          { a, eps },
          billet!.CFl,
          { rhoL, muL, rhoV: rhoG, muV: muG },
          { kind: 'velocity', value: uL },
        )
      : stichlmairFloodVelocity({ a, eps, ...friction! }, uL, rhoL, rhoG, muG);
  const law = createHydraulicLaw(plant, fluids, bed);
  const out = { demand: 0, supply: 0, gradient: 0, loading: 0 };
  const clean = { fouling: 0, foaming: 1 };
  let low = 0;
  let high = 0.9 * eps;
  for (let i = 0; i < 60; i++) {
    const middle = 0.5 * (low + high);
    law.evaluate(middle, share * flood * rhoG, rhoG, muG, rhoL, muL, clean, out);
    if (out.demand < uL && out.loading < 1) low = middle;
    else high = middle;
  }
  law.evaluate(low, share * flood * rhoG, rhoG, muG, rhoL, muL, clean, out);
  return out.loading;
}

describe.each(laws)('%s', (_, plant) => {
  it.each([0.002, 0.0045, 0.01, 0.02])('flooding costs nothing up to 85 %% of the flood velocity, uL %d m/s', (uL) => {
    for (const share of [0.3, 0.6, 0.7, 0.8, 0.85]) expect(floodedShare(loadingAt(plant, uL, share), 0.3)).toBe(1);
    // Begins about nine tenths: under half a per cent there, some per cent at 0.95.
    expect(floodedShare(loadingAt(plant, uL, 0.9), 0.3)).toBeGreaterThan(0.995);
    expect(floodedShare(loadingAt(plant, uL, 0.95), 0.3)).toBeLessThan(0.995);
    expect(floodedShare(loadingAt(plant, uL, 0.95), 0.3)).toBeGreaterThan(0.9);
  });

  it('takes nothing from the column at its design point', () => {
    const whole = settled(withColumn(plant, { flooding: { ...plant.column.flooding, transferLeft: 1 } })).outlet;
    expect(settled(plant).outlet).toEqual(whole);
  });

  it('takes something where the bed is loaded', () => {
    // Between nine tenths of flooding and flooding.
    const loaded = withGas(plant, {
      rate: plant.gas.feed.rate * (plant.column.hydraulics.model === 'billet-schultes' ? 1.15 : 1.6),
    });
    const whole = settled(withColumn(loaded, { flooding: { ...plant.column.flooding, transferLeft: 1 } })).outlet;
    const less = settled(loaded).outlet;
    expect(less.carryOver).toBe(0);
    expect(less.y[0]!).toBeGreaterThan(1.001 * whole.y[0]!);
  });
});

it('leaves the stated share, no less, however flooded', () => {
  expect(floodedShare(0, 0.3)).toBe(1);
  expect(floodedShare(1, 0.3)).toBeLessThan(0.8);
  expect(floodedShare(10, 0.3)).toBeCloseTo(0.3, 12);
  let last = 1;
  for (let loading = 0.3; loading < 2; loading += 0.01) {
    const share = floodedShare(loading, 0.3);
    expect(share).toBeLessThanOrEqual(last);
    expect(last - share).toBeLessThan(0.01); // no step: at most 1.5 x 0.7/1.24 of 0.01
    last = share;
  }
});
