import { describe, expect, it } from 'vitest';
import { createColumn } from '../../sim/column/column.ts';
import { linearBed, linearSlope, TRACE, type LinearBed } from '../support/column-cases.ts';
import { evenly, march, outletAt, settled, steadyOf } from '../support/column-runs.ts';

// Axial mixing by a Peclet number in each phase, closed ends [Danckwerts1953], against closed forms and exact solutions.
// Mixing through a face is a central difference: its error goes as (Pe/N)^2 and (NOG/N)^2.

/** Steady gas outlet over its inlet. */
const gasOut = (bed: LinearBed): number => settled(linearBed(bed)).outlet.y[0]! / TRACE;

describe('gas with axial mixing over liquid without end', () => {
  // y2/y1 = 4 a exp(Pe/2)/[(1 + a)^2 exp(a Pe/2) - (1 - a)^2 exp(-a Pe/2)], a = (1 + 4 N/Pe)^(1/2): first order in a
  // closed vessel [Danckwerts1953, derivable].
  it.each([
    { NOG: 2, Pe: 5 },
    { NOG: 5, Pe: 10 },
    { NOG: 5, Pe: 30 },
  ])('NOG $NOG, Pe $Pe leaves what the closed vessel leaves', ({ NOG, Pe }) => {
    const a = Math.sqrt(1 + (4 * NOG) / Pe);
    const exact =
      (4 * a * Math.exp(Pe / 2)) / ((1 + a) ** 2 * Math.exp((a * Pe) / 2) - (1 - a) ** 2 * Math.exp((-a * Pe) / 2));
    const at = (segments: number): number =>
      gasOut({ NOG, A: 1e6, segments, peclet: { gas: Pe, liquid: undefined } }) / exact - 1;
    const [coarse, fine] = [at(40), at(80)];
    expect(Math.abs(coarse)).toBeLessThan(0.005); // the project's bar for the steady outlet; 0.33 % measured
    expect(Math.abs(fine)).toBeLessThan(Math.abs(coarse) / 3); // second order
  });
});

describe('both phases with axial mixing', () => {
  // (1/PeG) y" - y' - N (y - X) = 0, (1/PeL) X" + X' + (N/A)(y - X) = 0 with closed ends: exponential of the 4 x 4
  // system's matrix in 30 digits, eight printed. Regenerate: state (y, y', X, X'); at the gas inlet y - y'/PeG = 1 and
  // X' = 0, at the other end y' = 0 and X + X'/PeL = 0.
  it.each([
    { NOG: 3, A: 0.7, gas: 10, liquid: 5, y: 0.46609465 },
    { NOG: 5, A: 1.3, gas: 20, liquid: 10, y: 0.17873606 },
    { NOG: 5, A: 1.3, gas: 5, liquid: 5, y: 0.27022899 },
    { NOG: 8, A: 2.5, gas: 40, liquid: 8, y: 0.035443115 },
  ])('NOG $NOG, A $A, Pe $gas and $liquid', ({ NOG, A, gas, liquid, y }) => {
    const at = (segments: number): number => gasOut({ NOG, A, segments, peclet: { gas, liquid } }) / y - 1;
    const [coarse, fine] = [at(40), at(80)];
    expect(Math.abs(coarse)).toBeLessThan(0.006); // 0.54 % measured at NOG 8, Pe 40 and 8, else below 0.2 %
    expect(Math.abs(fine)).toBeLessThan(Math.abs(coarse) / 3); // second order
  });
});

describe('a tracer in the liquid', () => {
  it.each([5, 20])('spreads with the variance of the closed vessel, Pe %d', (Pe) => {
    // sigma^2/tau^2 = 2/Pe - 2/Pe^2 [1 - exp(-Pe)] [Danckwerts1953].
    const tauL = 20;
    const plant = linearBed({ NOG: 1e-9, A: 1, tauL, peclet: { gas: undefined, liquid: Pe } });
    const column = createColumn(plant);
    column.modes.channels.gasComposition[0] = 0;
    const start = steadyOf(column);
    const x = TRACE / linearSlope(plant);
    const full = (x * 1000) / plant.solvent.molarMass;
    const dt = 0.1;
    let first = 0;
    let second = 0;
    march(
      column,
      start,
      evenly(10 * tauL, dt),
      (t, s) => {
        const left = (1 - outletAt(column, t, s).c[0]! / full) * dt * (t === 0 ? 0.5 : 1);
        first += left;
        second += 2 * t * left;
      },
      { rtol: 1e-7, events: [{ at: 0, act: (c) => (c.modes.channels.liquidComposition[0] = x) }] },
    );
    expect(Math.abs(first / tauL - 1)).toBeLessThan(1e-3); // trapezoids, and what is left of the tail
    const closed = 2 / Pe - (2 / Pe ** 2) * (1 - Math.exp(-Pe));
    expect(Math.abs((second / first ** 2 - 1) / closed - 1)).toBeLessThan(0.01); // the mesh
  });
});
