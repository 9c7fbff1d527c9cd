import { describe, expect, it } from 'vitest';
import type { Case } from '../../sim/case/case.ts';
import { createColumn, type Column } from '../../sim/column/column.ts';
import { gravityOutflow, gravityVolume } from '../../sim/column/vessel.ts';
import { STANDARD_GRAVITY } from '../../sim/properties/constants.ts';
import { linearBed, linearSlope, TRACE, withColumn, withGas, withLiquid } from '../support/column-cases.ts';
import { filled, march, outletAt, steadyOf } from '../support/column-runs.ts';

// Vessels against closed forms of the stirred tank, of tanks in series and of an emptying tank.

describe('a sump that gathers what the bed takes up', () => {
  it('builds up as (W/B)(1 - exp(-B t/V)) when as much is bled as made up', () => {
    // V 2 m3, B 0.5 m3/h, W 3 kg/h; kg/m3 after 1, 2, 4, 8, 16 h, stirred tank (derivable).
    const molarMass = 0.05808;
    const B = 0.5 / 3600;
    const W = 3 / 3600 / molarMass;
    const expected = [1.327195, 2.360816, 3.792723, 5.187988, 5.890106];
    const base = linearBed({ NOG: 20, A: 1e6, segments: 10, tauL: 10, height: 0.5, scheme: 'well-mixed' });
    const solute = {
      ...base.solutes[0]!,
      molarVolume: 1e-9,
      equilibrium: { model: 'constant-ratio', m: 1e-9 },
    } as const;
    const valve = { temperature: 298.15, composition: [0], stroke: 0, rate: B, capacity: B };
    const loop = withLiquid(
      { ...base, solutes: [solute] },
      {
        mode: 'recirculated',
        feed: { rate: 1e-3, temperature: 298.15, composition: [0] },
        sump: { area: 2, normalLevel: 1, overflowLevel: 2, drain: { tag: 'LV-1', capacity: 1e-3, stroke: 0 } },
        makeUp: { tag: 'LV-2', ...valve },
        bleed: { tag: 'LV-3', ...valve },
      },
    );
    const column = createColumn(withGas(withColumn(loop, { diameter: 0.3 }), { rate: 1, composition: [W] }));
    const start = filled(column, { liquidOn: true, gasOn: true, holdup: 0.05 });
    const seen: number[] = [];
    march(
      column,
      start,
      [1, 2, 4, 8, 16].map((h) => h * 3600),
      (t, y) => {
        outletAt(column, t, y);
        seen.push(column.machinery.sump.concentration[0]! * molarMass);
      },
    );
    // The bed's 1.8 L belong to the 2 m3 too (0.09 %), and ten well-mixed cells pass 1e-5 of the solute.
    seen.forEach((c, i) => expect(Math.abs(c / expected[i]! - 1)).toBeLessThan(1e-3));
  });
});

describe('a tracer in the liquid', () => {
  // Step response of N equal tanks in series, F = 1 - exp(-N theta) sum (N theta)^i/i!, at theta 0.25 to 2 (derivable).
  it.each([
    { tanks: 5, F: [0.009124, 0.108822, 0.559507, 0.867938, 0.970747] },
    { tanks: 10, F: [0.000277, 0.031828, 0.54207, 0.930146, 0.995005] },
  ])('passes $tanks well-mixed segments as $tanks tanks in series', ({ tanks, F }) => {
    const tauL = 20;
    const plant = linearBed({ NOG: 1e-9, A: 1, tauL, segments: tanks, scheme: 'well-mixed' });
    const column = createColumn(plant);
    column.modes.channels.gasComposition[0] = 0;
    const start = steadyOf(column);
    const x = TRACE / linearSlope(plant);
    const molar = 1000 / plant.solvent.molarMass;
    const seen: number[] = [];
    march(
      column,
      start,
      [0.25, 0.5, 1, 1.5, 2].map((theta) => theta * tauL),
      (t, y) => seen.push(outletAt(column, t, y).c[0]! / molar / x),
      { rtol: 1e-8, events: [{ at: 0, act: (c) => (c.modes.channels.liquidComposition[0] = x) }] },
    );
    seen.forEach((f, i) => expect(Math.abs(f - F[i]!)).toBeLessThan(4e-6)); // six digits, and the table of densities
  });

  it('leaves the distributor as one tank', () => {
    const plant = withLiquid(linearBed({ NOG: 1e-9, A: 1, segments: 5 }), { distributorVolume: 0.02 });
    const column = createColumn(plant);
    column.modes.channels.gasComposition[0] = 0;
    const start = steadyOf(column);
    const x = TRACE / linearSlope(plant);
    const molar = 1000 / plant.solvent.molarMass;
    const tau = 0.02 / plant.liquid.feed.rate;
    const expected = [0.221199, 0.393469, 0.632121, 0.77687, 0.864665];
    const seen: number[] = [];
    march(
      column,
      start,
      [0.25, 0.5, 1, 1.5, 2].map((theta) => theta * tau),
      (t, y) => {
        outletAt(column, t, y);
        seen.push(column.machinery.vessels[0]!.concentration[0]! / molar / x);
      },
      { rtol: 1e-8, events: [{ at: 0, act: (c) => (c.modes.channels.liquidComposition[0] = x) }] },
    );
    seen.forEach((f, i) => expect(Math.abs(f - expected[i]!)).toBeLessThan(4e-6));
  });
});

describe('an emptying vessel', () => {
  /** Torricelli: h/h0 = (1 - t/T)^2. T = (2 S/(Cd s)) (h0/(2 g))^(1/2) for 0.5 m2, 5 cm2, Cd 0.6, 0.15 m. */
  const T = 291.51;
  const capacity = 0.6 * 5e-4 * Math.sqrt(2 * STANDARD_GRAVITY * 0.15);
  const tank = (): Case =>
    withLiquid(linearBed({ NOG: 1, A: 1, segments: 4 }), {
      sump: { area: 0.5, normalLevel: 0.15, overflowLevel: 1, drain: { tag: 'LV-312', capacity, stroke: 0 } },
      valve: { tag: 'FV-311', stroke: 0 },
    });
  const open = (column: Column): void => {
    column.modes.valveCommand.drain = 1;
    column.modes.valveCommand.solvent = 0;
  };

  it('runs out of the sump as Torricelli has it, down to a quarter of its level', () => {
    const column = createColumn(tank());
    open(column);
    const start = filled(column, { liquidOn: false, gasOn: true, holdup: 0 });
    march(column, start, [50, 100, 0.5 * T], (t, y) => {
      outletAt(column, t, y);
      const share = column.machinery.sumpLevel() / 0.15;
      // Time to empty as seen from here; the outlet's rounded foot slows the fall by 0.5 % at a quarter.
      expect(Math.abs(t / (1 - Math.sqrt(share)) / T - 1)).toBeLessThan(0.006);
    });
  });

  it('runs dry with its rounded foot as the integral of the rounded law', () => {
    // dv/dt = -(2/T) v [(1 + f)/(v + f)]^(1/2): t = (T/2) [2 s + f^(1/2) ln((s - f^(1/2))/(s + f^(1/2)))]/(1 + f)^(1/2)
    // between s = (v + f)^(1/2) at the two ends; f = 0.01.
    const f = 0.01;
    const primitive = (v: number): number => {
      const s = Math.sqrt(v + f);
      return (2 * s + Math.sqrt(f) * Math.log((s - Math.sqrt(f)) / (s + Math.sqrt(f)))) / Math.sqrt(1 + f);
    };
    const column = createColumn(tank());
    open(column);
    const start = filled(column, { liquidOn: false, gasOn: true, holdup: 0 });
    march(
      column,
      start,
      [100, 200, 290, 400],
      (t, y) => {
        outletAt(column, t, y);
        const v = column.machinery.sumpLevel() / 0.15;
        expect(v).toBeGreaterThan(0);
        expect(Math.abs((0.5 * T * (primitive(1) - primitive(v))) / t - 1)).toBeLessThan(2e-5); // T has five digits
      },
      { rtol: 1e-8 },
    );
  });

  it('a distributor of volume V feeds the bed for 2 V/q after its supply stops', () => {
    const plant = withLiquid(linearBed({ NOG: 1, A: 1, segments: 4 }), {
      distributorVolume: 0.02,
      valve: { tag: 'FV-311', stroke: 0 },
    });
    const column = createColumn(plant);
    const start = steadyOf(column);
    const empty = (2 * 0.02) / plant.liquid.feed.rate;
    march(
      column,
      start,
      [0.25 * empty, 0.5 * empty],
      (t, y) => {
        outletAt(column, t, y);
        const share = column.machinery.vessels[0]!.volume / 0.02;
        expect(Math.abs(Math.sqrt(share) - (1 - t / empty))).toBeLessThan(0.006); // the rounded foot
      },
      { events: [{ at: 0, act: (c) => (c.modes.valveCommand.solvent = 0) }] },
    );
  });

  it('the outflow and its inverse undo each other, from empty to overfull', () => {
    for (const v of [0, 1e-6, 0.01, 0.3, 1, 2]) {
      expect(Math.abs(gravityVolume(gravityOutflow(v)) - v)).toBeLessThan(1e-12 + 1e-12 * v);
    }
    expect(gravityOutflow(1)).toBe(1);
  });
});
