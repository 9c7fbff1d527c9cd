import { describe, expect, it } from 'vitest';
import type { Case, Hydraulics } from '../../sim/case/case.ts';
import { createColumn, type Column } from '../../sim/column/column.ts';
import {
  bare,
  ceramicSaddle25,
  linearBed,
  TRACE,
  withBeds,
  withColumn,
  withGas,
  withLiquid,
} from '../support/column-cases.ts';
import { evenly, filled, march, outletAt, steadyOf } from '../support/column-runs.ts';

// Liquid in a bed as a kinematic wave, dh/dt + d(k h^n)/dz = 0, by the method of characteristics (derivable
// [Whitham1974, chapter 2]): after the feed stops, the outflow stays u0 until t1 = Z h0/(n u0) and then falls as
// u/u0 = (t1/t)^(n/(n - 1)); what is left, V/V0 = 1 - t/(n t1) up to t1 and (n - 1)/n (t1/t)^(1/(n - 1)) after it.
// A front into a dry bed arrives at Z h0/u0.

const Z = 3;
const U0 = 0.005;
const DIAMETER = 0.8;
const CROSS_SECTION = 0.25 * Math.PI * DIAMETER ** 2;
/** Hold-up of the worked example in [Stichlmair1989] at 0.005 m/s, below loading: 0.555 (u^2 a/(g eps^4.65))^(1/3). */
const H0 = 0.087977;

/** A bed that only passes liquid: isothermal, no evaporation, no distributor, valves that move at once. */
function wet(hydraulics: Hydraulics, segments = 40): Case {
  const base = linearBed({ NOG: 1, A: 1.3, yIn: TRACE });
  const plant = withLiquid(withBeds(bare(base), { packing: ceramicSaddle25, height: Z, segments }), {
    feed: { ...base.liquid.feed, rate: 1.5 * U0 * CROSS_SECTION },
    valve: { tag: 'FV-311', stroke: 0 },
  });
  return withGas(withColumn(plant, { diameter: DIAMETER, hydraulics }), { rate: 1 });
}

const powerLaw = (n: number): Hydraulics => ({ model: 'power-law', k: U0 / H0 ** n, n });

/** Settled at U0: the valve stands at two thirds. */
function running(plant: Case) {
  const column = createColumn(plant);
  column.modes.valveCommand.solvent = 2 / 3;
  const start = steadyOf(column);
  return { column, start };
}

const cut = (column: Column): void => {
  column.modes.valveCommand.solvent = 0;
};

/** Outflow and liquid held over what they were, at multiples of t1 after the feed is cut. */
function drained(hydraulics: Hydraulics, segments: number, t1: number, multiples: readonly number[]) {
  const { column, start } = running(wet(hydraulics, segments));
  const before = outletAt(column, 0, start);
  const flow: number[] = [];
  const held: number[] = [];
  march(
    column,
    start,
    multiples.map((x) => x * t1),
    (t, y) => {
      const o = outletAt(column, t, y);
      flow.push(o.L / before.L);
      held.push(o.held / before.held);
    },
    { events: [{ at: 0, act: cut }] },
  );
  return { before, flow, held };
}

/** Error of the mesh, and what is left when two meshes are extrapolated to none. */
const MESH = 0.007; // 0.6 % measured at 40 segments, first order: all characteristics of the wave start in the top cell
const EXTRAPOLATED = 5e-4; // second order of the same, 0.03 % measured

describe('a bed whose feed is cut', () => {
  const times = [1.5, 2, 3, 5, 10];
  it.each([
    { n: 1.5, u: [0.296296, 0.125, 0.037037, 0.008, 0.001], V: [0.148148, 0.083333, 0.037037, 0.013333, 0.003333] },
    { n: 2, u: [0.444444, 0.25, 0.111111, 0.04, 0.01], V: [0.333333, 0.25, 0.166667, 0.1, 0.05] },
    { n: 3, u: [0.544331, 0.353553, 0.19245, 0.089443, 0.031623], V: [0.544331, 0.471405, 0.3849, 0.298142, 0.210819] },
  ])('drains as the closed form for n = $n', ({ n, u, V }) => {
    const t1 = (Z * H0) / (n * U0);
    const fine = drained(powerLaw(n), 40, t1, times);
    const coarse = drained(powerLaw(n), 20, t1, times);
    expect(Math.abs(fine.before.L / CROSS_SECTION / U0 - 1)).toBeLessThan(1e-6); // the steady search's own bound
    expect(Math.abs(fine.before.held / (H0 * Z * CROSS_SECTION) - 1)).toBeLessThan(1e-5); // H0 has five digits
    times.forEach((x, i) => {
      expect(Math.abs(fine.flow[i]! - u[i]!)).toBeLessThan(MESH);
      expect(Math.abs(fine.held[i]! - V[i]!)).toBeLessThan(MESH);
      expect(Math.abs(2 * fine.flow[i]! - coarse.flow[i]! - u[i]!)).toBeLessThan(EXTRAPOLATED);
      expect(Math.abs(2 * fine.held[i]! - coarse.held[i]! - V[i]!)).toBeLessThan(EXTRAPOLATED);
    });
  });

  it.each([1.5, 2, 3])('lets its liquid go at the old rate until the wave is through, n = %d', (n) => {
    const t1 = (Z * H0) / (n * U0);
    const { flow, held } = drained(powerLaw(n), 40, t1, [0.25, 0.5, 0.75]);
    [0.25, 0.5, 0.75].forEach((x, i) => {
      expect(Math.abs(flow[i]! - 1)).toBeLessThan(1e-4); // the mesh smears the wave by some cells only
      expect(Math.abs(held[i]! - (1 - x / n))).toBeLessThan(1e-4);
    });
  });

  it('drains as n = 3/2 by the hold-up of Stichlmair, Bravo and Fair with no gas and no static part', () => {
    const law = { model: 'stichlmair-bravo-fair', holdupFactor: 0.555, loadingFactor: 20, staticHoldup: 0 } as const;
    const { before, flow, held } = drained(law, 40, 35.19, [1.5, 2, 5]);
    expect(Math.abs(before.held / (Z * CROSS_SECTION) / H0 - 1)).toBeLessThan(1e-4); // g 9.81 or 9.80665, cube root
    [1.5, 2, 5].forEach((x, i) => {
      expect(Math.abs(flow[i]! - x ** -3)).toBeLessThan(MESH);
      expect(Math.abs(held[i]! - x ** -2 / 3)).toBeLessThan(MESH);
    });
  });

  it('keeps its static hold-up', () => {
    const staticHoldup = 0.02;
    const law = { model: 'stichlmair-bravo-fair', holdupFactor: 0.555, loadingFactor: 20, staticHoldup } as const;
    const { column, start } = running(wet(law));
    const before = outletAt(column, 0, start);
    expect(Math.abs(before.held / (Z * CROSS_SECTION) / H0 - 1)).toBeLessThan(1e-4); // the static part is inside
    const end = march(column, start, [1e6], () => undefined, { events: [{ at: 0, act: cut }] });
    const after = outletAt(column, 0, end).held / (Z * CROSS_SECTION);
    expect(after).toBeGreaterThan(staticHoldup);
    expect(after).toBeLessThan(1.1 * staticHoldup); // drains ever slower towards it
  });
});

describe('a bed whose feed comes or grows', () => {
  it.each([1.5, 2, 3])('a front into the dry bed arrives when the liquid behind it fills the bed, n = %d', (n) => {
    const column = createColumn(wet(powerLaw(n)));
    column.modes.valveCommand.solvent = 2 / 3;
    const start = filled(column, { liquidOn: true, gasOn: true, holdup: 1e-6 });
    const arrival = (Z * H0) / U0;
    const dt = arrival / 200;
    let half = Number.NaN; // when half the flow has come
    let collected = 0;
    march(column, start, evenly(1.5 * arrival, dt), (t, y) => {
      const { L } = outletAt(column, t, y);
      if (Number.isNaN(half) && L > 0.5 * U0 * CROSS_SECTION) half = t;
      collected += L * dt;
    });
    expect(Math.abs(half / arrival - 1)).toBeLessThan(0.01); // half a cell of 40
    // What has come out by 1.5 arrivals is what was fed in half an arrival.
    expect(Math.abs(collected / (0.5 * arrival * U0 * CROSS_SECTION) - 1)).toBeLessThan(0.01); // the sum's own step
  });

  it('a step up of half comes through as a shock', () => {
    // [(u)]/[(h)]: 0.0025/(0.115282 - 0.087977) = 0.09156 m/s, through 3 m in 32.77 s.
    const { column, start } = running(wet(powerLaw(1.5)));
    let half = Number.NaN;
    march(
      column,
      start,
      evenly(60, 0.05),
      (t, y) => {
        if (Number.isNaN(half) && outletAt(column, t, y).L > 1.25 * U0 * CROSS_SECTION) half = t;
      },
      {
        events: [
          {
            at: 0,
            act: (c) => {
              c.modes.valveCommand.solvent = 1;
            },
          },
        ],
      },
    );
    expect(Math.abs(half / 32.77 - 1)).toBeLessThan(0.01); // half a cell of 40
  });
});
