import { expect, test } from 'vitest';
import { readHermiteColumn } from '../../sim/numerics/hermite-table.ts';
import {
  createFluids,
  createFluidTables,
  GAS_FILM,
  LIQUID,
  LIQUID_SOLUTE,
  SOLUTE_COLUMNS,
  SOLUTE_DIFFUSIVITY,
  SOLUTE_FILM,
  SOLUTE_PRESSURE,
} from '../../sim/column/fluids.ts';
import { GAS_CONSTANT, STANDARD_GRAVITY } from '../../sim/properties/constants.ts';
import { caseText, mustRead } from '../case/support.ts';

// The tables against the functions that they were made of, off their nodes, over the temperatures of columns.
// Target: 1e-6 of each value, a hundredth of what any correlation behind them is good for.

const plant = mustRead(caseText('acetone-absorber'));
const fluids = createFluids(plant);
const bed = plant.column.beds[0]!;
const constants = { area: 1.45, liquid: 0.0051, gas: 5.23 };
const tables = createFluidTables(fluids, bed, constants);
const temperatures = Array.from({ length: 400 }, (_, i) => 273.4 + 0.2493 * i);

function worstError(table: 'liquid' | 'gas', column: number, exact: (T: number) => number): number {
  return Math.max(...temperatures.map((T) => Math.abs(readHermiteColumn(tables[table], column, T) / exact(T) - 1)));
}

const { packing } = bed;
const rho = fluids.solventDensity;
const mu = fluids.solventViscosity;
const D = fluids.liquidDiffusivity[0]!;

test.each<[string, number, (T: number) => number]>([
  ['molar volume', LIQUID.molarVolume, (T) => plant.solvent.molarMass / rho(T)],
  ['viscosity', LIQUID.viscosity, mu],
  ['surface tension', LIQUID.surfaceTension, fluids.surfaceTension],
  ['vapour pressure', LIQUID.vapourPressure, fluids.vapourPressure],
  ['pressure scale of the solute', LIQUID_SOLUTE + SOLUTE_PRESSURE, fluids.equilibrium[0]!.pressureScale],
  ['diffusivity of the solute', LIQUID_SOLUTE + SOLUTE_DIFFUSIVITY, D],
  [
    'liquid film group, [Onda1968] equation 2',
    LIQUID_SOLUTE + SOLUTE_FILM,
    (T) =>
      constants.liquid *
      (mu(T) / rho(T) / D(T)) ** -0.5 *
      (packing.area * packing.nominalSize) ** 0.4 *
      ((rho(T) / (mu(T) * STANDARD_GRAVITY)) ** (1 / 3)) ** -1 *
      mu(T) ** (-2 / 3),
  ],
])('liquid: %s', (_, column, exact) => {
  expect(worstError('liquid', column, exact)).toBeLessThan(1e-6);
});

test('gas film groups, [Onda1968] equation 1', () => {
  const muG = fluids.gasViscosity;
  [0, 1].forEach((k) => {
    const Dk = fluids.gasDiffusivity[k]!;
    const exact = (T: number): number => {
      const density = (101_325 * fluids.carrierMass) / (GAS_CONSTANT * T);
      const ap = packing.area;
      return (
        ((constants.gas * Dk(T) * ap * (muG(T) / (density * Dk(T))) ** (1 / 3)) / (ap * muG(T)) ** 0.7) *
        (ap * packing.nominalSize) ** -2
      );
    };
    expect(worstError('gas', GAS_FILM + k, exact)).toBeLessThan(1e-6);
  });
});

test('one column for each solute', () => {
  expect(tables.liquid.columns).toBe(LIQUID_SOLUTE + SOLUTE_COLUMNS * fluids.solutes);
});
