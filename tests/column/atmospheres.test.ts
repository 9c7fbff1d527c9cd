import { describe, expect, it } from 'vitest';
import type { Case, Equilibrium } from '../../sim/case/case.ts';
import type { Column } from '../../sim/column/column.ts';
import { CLOSURE_TARGET } from '../../sim/run/closure.ts';
import { atmosphere, type Atmosphere } from '../support/column-cases.ts';
import { settled, type Outlet } from '../support/column-runs.ts';

// The same equations from 20 mbar to 20 bar, over water and over oil, in several carriers, with every kind of
// equilibrium: each comes to a steady state that balances and lies between equilibrium and feed; limits that are exact
// are met. Costs five seconds.

const WATER = { solvent: 'water', uL: 0.005 } as const;
const OIL = { solvent: 'heavy-oil', uL: 0.005 } as const;
const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);

/** Table of acetone over water, 10 K and 0.5 mol% apart; bends like no law in the library. */
const bentTable = {
  base: 'acetone',
  equilibrium: {
    model: 'table',
    temperature: ['273.15 K', '283.15 K', '293.15 K', '303.15 K', '313.15 K'],
    moleFraction: ['0 mol/mol', '0.005 mol/mol', '0.01 mol/mol', '0.02 mol/mol', '0.05 mol/mol'],
    // Demo data: 50 kPa per mole fraction at 273 K, doubling every 10 K, a fifth less at 5 mol%.
    pressure: [0, 1, 2, 3, 4].map((i) =>
      [0, 0.005, 0.01, 0.02, 0.05].map((x) => `${5e4 * 2 ** i * x * (1 - 4 * x)} Pa`),
    ),
  },
};

const atmospheres: Readonly<Record<string, Atmosphere>> = {
  'air over water at 20 mbar, acetone by Henry': {
    ...WATER,
    carrier: 'air',
    solutes: ['acetone'],
    pressure: 2000,
    gasTemperature: 285,
    liquidTemperature: 278,
    gas: { acetone: 0.004 },
    humidity: 0.5,
    load: 0.8,
  },
  'air over water at 1 atm, acetone by a table': {
    ...WATER,
    carrier: 'air',
    solutes: [bentTable],
    pressure: 101_325,
    gasTemperature: 303,
    liquidTemperature: 288,
    gas: { acetone: 0.01 },
    humidity: 0.5,
    load: 1.5,
  },
  'air over water at 20 bar, acetone by Henry': {
    ...WATER,
    carrier: 'air',
    solutes: ['acetone'],
    pressure: 2e6,
    gasTemperature: 303,
    liquidTemperature: 288,
    gas: { acetone: 0.004 },
    humidity: 0.5,
    load: 1.5,
  },
  'nitrogen over water at 1 atm, methanol and acetone by van Laar': {
    ...WATER,
    carrier: 'nitrogen',
    solutes: [
      { base: 'methanol', equilibrium: { model: 'van-laar' } },
      { base: 'acetone', equilibrium: { model: 'van-laar' } },
    ],
    pressure: 101_325,
    gasTemperature: 303,
    liquidTemperature: 293,
    gas: { methanol: 0.01, acetone: 0.004 },
    load: 1.5,
  },
  'carbon dioxide over water at 5 bar, ammonia by Henry': {
    ...WATER,
    carrier: 'carbon-dioxide',
    solutes: ['ammonia'],
    pressure: 5e5,
    gasTemperature: 310,
    liquidTemperature: 290,
    gas: { ammonia: 0.01 },
    humidity: 0.2,
    load: 1.5,
  },
  'nitrogen over oil at 20 mbar, benzene and toluene by Raoult': {
    ...OIL,
    carrier: 'nitrogen',
    solutes: ['benzene', 'toluene'],
    pressure: 2000,
    gasTemperature: 300,
    liquidTemperature: 300,
    gas: { benzene: 0.01, toluene: 0.01 },
    load: 0.8,
  },
  'carbon dioxide over oil at 20 bar, benzene and toluene by Raoult': {
    ...OIL,
    carrier: 'carbon-dioxide',
    solutes: ['benzene', 'toluene'],
    pressure: 2e6,
    gasTemperature: 310,
    liquidTemperature: 300,
    gas: { benzene: 0.001, toluene: 0.001 },
    load: 1.2,
  },
  'steam over hot oil at 100 mbar strips benzene': {
    ...OIL,
    uL: 0.003,
    carrier: 'steam', // does not condense: saturated at 340 K at 273 mbar [IF97]
    solutes: ['benzene'],
    pressure: 1e4,
    gasTemperature: 340,
    liquidTemperature: 335,
    gas: { benzene: 0 },
    liquid: { benzene: 0.02 },
    load: 1,
  },
};

/** Net over gross flow across the boundary, worst of components, carrier and energy. */
function imbalance(column: Column, y: Float64Array): number {
  const { layout } = column;
  const rates = new Float64Array(column.size);
  column.rhs(0, y, rates);
  return Math.max(
    ...Array.from({ length: layout.components + 2 }, (_, i) => {
      const gross = Math.abs(rates[layout.grossIn + i]!);
      const net = Math.abs(rates[layout.netIn + i]!);
      return gross > 0 ? net / gross : net;
    }),
  );
}

/** Solute in less out over what comes in, from the bed's ends alone. */
function bedImbalance(column: Column, outlet: Outlet, k: number): number {
  const { flows } = column.machinery;
  const gasIn = flows.gasToBed * flows.feedY[k + 1]!;
  const inputs = column.chains[0]![0]!.work.inputs;
  const liquidIn = inputs[column.inputs.liquidFlow]! * inputs[column.inputs.concentration + k]!;
  return Math.abs(gasIn + liquidIn - outlet.G * outlet.y[k]! - outlet.L * outlet.c[k]!) / (gasIn + liquidIn);
}

/** Gas fraction in balance with the entering liquid, at the temperature of the top segment. */
function balanceAtTop(plant: Case, column: Column, k: number): number {
  const chain = column.chains[0]![0]!;
  const T = chain.work.primitives[column.index.TL]!;
  const x = plant.liquid.feed.composition[k]!;
  return column.fluids.equilibrium[k]!.partialPressure(T, x) / plant.column.topPressure;
}

describe.each(Object.entries(atmospheres))('%s', (_, given) => {
  const plant = atmosphere(given);
  const { column, y, outlet } = settled(plant);

  it('balances, component by component and in energy', () => {
    expect(imbalance(column, y)).toBeLessThan(CLOSURE_TARGET);
    plant.solutes.forEach((_solute, k) => {
      expect(bedImbalance(column, outlet, k)).toBeLessThan(CLOSURE_TARGET);
    });
  });

  it('sends out gas between its feed and equilibrium with the entering liquid', () => {
    expect(outlet.carryOver).toBe(0);
    plant.solutes.forEach((_solute, k) => {
      const feed = plant.gas.feed.composition[k]!;
      const balance = balanceAtTop(plant, column, k);
      expect(outlet.y[k]!).toBeGreaterThan(Math.min(feed, balance));
      expect(outlet.y[k]!).toBeLessThan(Math.max(feed, balance));
    });
  });
});

/** Dilute and still: one temperature, no evaporation, traces of solute. */
const still = (given: Omit<Atmosphere, 'gasTemperature' | 'liquidTemperature' | 'still'> & { T: number }): Case =>
  atmosphere({ ...given, gasTemperature: given.T, liquidTemperature: given.T, still: true });

describe('a very tall bed', () => {
  // NOG is 19 and more: what is left of the way to equilibrium, exp(-NOG (1 - 1/A)) by [Colburn1939], is below 1e-6.
  // The pressure of a segment is that of its middle, half a segment's pressure drop from the bed's end.
  const HEIGHT = 10;
  it.each<[string, Parameters<typeof still>[0]]>([
    [
      'air over water at 20 mbar',
      { ...WATER, carrier: 'air', solutes: ['acetone'], pressure: 2000, T: 278, gas: { acetone: 1e-4 }, load: 0.2 },
    ],
    [
      'nitrogen over water at 20 bar',
      { ...WATER, carrier: 'nitrogen', solutes: ['acetone'], pressure: 2e6, T: 288, gas: { acetone: 1e-5 }, load: 0.4 },
    ],
    [
      'carbon dioxide over oil at 1 bar',
      {
        ...OIL,
        carrier: 'carbon-dioxide',
        solutes: ['toluene'],
        pressure: 1e5,
        T: 300,
        gas: { toluene: 1e-4 },
        load: 0.4,
      },
    ],
  ])('with plenty of liquid: the gas leaves in equilibrium with what enters, %s', (_, given) => {
    const id = Object.keys(given.gas)[0]!;
    const plant = still({ ...given, liquid: { [id]: 2e-6 }, height: HEIGHT });
    const { outlet, column } = settled(plant);
    const p = given.pressure + (0.5 * outlet.drop) / 20;
    const expected = column.fluids.equilibrium[0]!.partialPressure(given.T, 2e-6) / p;
    // How the liquid's pressure scale is tabulated, 1e-6; at 20 mbar the pressure's slope in the last segment.
    expect(relative(outlet.y[0]!, expected)).toBeLessThan(given.pressure < 1e4 ? 2e-4 : 1e-5);
  });

  it('with little liquid: the liquid leaves in equilibrium with the gas that enters', () => {
    const plant = still({
      ...WATER,
      uL: 0.0004,
      carrier: 'air',
      solutes: ['acetone'],
      pressure: 101_325,
      T: 303,
      gas: { acetone: 1e-5 },
      load: 0.5,
      height: HEIGHT,
    });
    const { outlet, column } = settled(plant);
    const x = (outlet.c[0]! * plant.solvent.molarMass) / column.fluids.solventDensity(303);
    const p = 101_325 + (19.5 * outlet.drop) / 20;
    expect(relative(x * column.fluids.equilibrium[0]!.pressureScale(303), 1e-5 * p)).toBeLessThan(3e-4); // as above, in the segment where all happens
  });
});

describe('solutes and laws in the limit', () => {
  const base = { ...WATER, carrier: 'air', pressure: 101_325, T: 293, load: 1.5 } as const;

  it('two dilute solutes leave each as if it were alone', () => {
    const gas = { acetone: 1e-7, methanol: 1e-7 };
    const both = settled(still({ ...base, solutes: ['acetone', 'methanol'], gas })).outlet;
    const one = settled(still({ ...base, solutes: ['acetone'], gas: { acetone: 1e-7 } })).outlet;
    const other = settled(still({ ...base, solutes: ['methanol'], gas: { methanol: 1e-7 } })).outlet;
    expect(relative(both.y[0]!, one.y[0]!)).toBeLessThan(1e-6); // dilution 1e-7; steady search
    expect(relative(both.y[1]!, other.y[0]!)).toBeLessThan(1e-6);
    expect(relative(both.c[0]!, one.c[0]!)).toBeLessThan(1e-6);
  });

  const withEquilibrium = (plant: Case, equilibrium: Equilibrium): Case => ({
    ...plant,
    solutes: plant.solutes.map((s) => ({ ...s, equilibrium })),
  });

  it('a table made from Henry’s law gives the answer of Henry’s law, also where temperature moves', () => {
    const warm: Atmosphere = {
      ...WATER,
      carrier: 'air',
      solutes: ['acetone'],
      pressure: 101_325,
      gasTemperature: 303,
      liquidTemperature: 288,
      gas: { acetone: 0.004 },
      humidity: 0.5,
      load: 1.5,
    };
    const henry = atmosphere(warm);
    const reference = settled(henry);
    const { pressureScale } = reference.column.fluids.equilibrium[0]!;
    const temperature = Array.from({ length: 17 }, (_, i) => 273.15 + 2.5 * i);
    const moleFraction = [0, 0.001, 0.01, 0.05];
    const pressure = temperature.map((T) => moleFraction.map((x) => pressureScale(T) * x));
    const table = settled(withEquilibrium(henry, { model: 'table', temperature, moleFraction, pressure })).outlet;
    // Interpolation between temperatures 2.5 K apart.
    expect(relative(table.y[0]!, reference.outlet.y[0]!)).toBeLessThan(2e-4);
    expect(Math.abs(table.TL - reference.outlet.TL)).toBeLessThan(1e-3);
  });

  it('van Laar’s law without deviation is Raoult’s', () => {
    const plant = atmosphere({
      ...OIL,
      carrier: 'nitrogen',
      solutes: ['benzene'],
      pressure: 107_000,
      gasTemperature: 299,
      liquidTemperature: 299,
      gas: { benzene: 0.01 },
      load: 1.5,
    });
    const law = plant.solutes[0]!.equilibrium;
    if (law.model !== 'raoult') throw new Error('expected Raoult’s law in oil');
    const ideal = settled(plant).outlet;
    const bent = (A: number): number =>
      settled(withEquilibrium(plant, { ...law, model: 'van-laar', A12: A, A21: A })).outlet.y[0]!;
    expect(relative(bent(1e-9), ideal.y[0]!)).toBeLessThan(1e-7); // constants 1e-9, times the transfer units
    expect(bent(0.5)).toBeGreaterThan(1.2 * ideal.y[0]!); // and with deviation it is another
  });
});
