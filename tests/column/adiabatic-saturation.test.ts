import { describe, expect, it } from 'vitest';
import type { Case } from '../../sim/case/case.ts';
import { createColumn, type Column } from '../../sim/column/column.ts';
import { WATER_MOLAR_MASS } from '../../sim/properties/library/solvents.ts';
import {
  absorber,
  airCarrier,
  bare,
  ceramicSaddle25,
  withBeds,
  withColumn,
  withGas,
  withLiquid,
} from '../support/column-cases.ts';
import { settled, type Outlet } from '../support/column-runs.ts';

// Air and water in a full bed, heat and mass transfer together, against psychrometry at 101325 Pa.

/** Water over dry air, molar masses. */
const MASS_RATIO = WATER_MOLAR_MASS / airCarrier.molarMass;
const CELSIUS = 273.15;

/** An insulated bed with much water and little air; no solute in either. */
function airAndWater(T: number, W: number, height: number, waterT: number): Case {
  const saturation = createColumn(absorber).fluids.vapourPressure(CELSIUS + T);
  const y = W / (W + MASS_RATIO);
  const bed = withBeds(bare(absorber), { packing: ceramicSaddle25, height, segments: 20 });
  const column = withColumn(bed, { hydraulics: { model: 'power-law', k: 2, n: 1.5 }, heatLoss: { coefficient: 0 } });
  const plant = withLiquid(column, {
    feed: { rate: 0.004, temperature: CELSIUS + waterT, composition: [0] },
    distributorVolume: 0,
  });
  return withGas(plant, {
    rate: 10,
    temperature: CELSIUS + T,
    humidity: (y * 101_325) / saturation,
    composition: [0],
  });
}

/** The same with the water going round; what evaporates is made up at `makeUpT`, and the rest runs over. */
function goingRound(plant: Case, makeUpT: number): Case {
  const stream = { rate: 2e-5, temperature: CELSIUS + makeUpT, composition: [0] };
  return withLiquid(plant, {
    mode: 'recirculated',
    makeUp: { tag: 'LV-1', capacity: 2e-5, stroke: 0, ...stream },
  });
}

/** kg of water over kg of dry air in the gas outlet. */
function humidityRatio(column: Column): number {
  const y = column.chains[0]![0]!.work.outputs[column.outputs.y]!;
  return (MASS_RATIO * y) / (1 - y);
}

/**
 * Dry bulb, C, and humidity ratio; adiabatic saturation temperature and the humidity ratio there, from the formulas of
 * [ASHRAE2017] chapter 1, equations 20, 30 and 33, evaluated by a general psychrometric library; an independent balance
 * with the steam formulation's saturation line and constant heat capacities agrees within 0.003 K.
 */
const rows = [
  { T: 40, W: 0, Ts: 14.587, Ws: 0.010363 },
  { T: 40, W: 0.01, Ts: 22.584, Ws: 0.017288 },
  { T: 60, W: 0.01, Ts: 27.646, Ws: 0.023605 },
  { T: 80, W: 0, Ts: 26.529, Ws: 0.022053 },
  { T: 80, W: 0.03, Ts: 39.612, Ws: 0.047802 },
  { T: 25, W: 0.008, Ts: 16.314, Ws: 0.0116 },
  { T: 120, W: 0.02, Ts: 41.725, Ws: 0.053967 },
];

describe('a tall insulated bed fed with water at the adiabatic saturation temperature', () => {
  it.each(rows)('air of $T C, $W kg/kg leaves saturated at $Ts C and the water as it came', ({ T, W, Ts, Ws }) => {
    const { column, outlet } = settled(airAndWater(T, W, 8, Ts));
    // 3 mK measured: the two formulations' difference. In the humidity ratio 0.02 %, that of the saturation lines.
    expect(Math.abs(outlet.TG - CELSIUS - Ts)).toBeLessThan(0.01);
    expect(Math.abs(outlet.TL - CELSIUS - Ts)).toBeLessThan(0.01);
    expect(Math.abs(humidityRatio(column) / Ws - 1)).toBeLessThan(5e-4);
  });
});

describe('water that goes round an insulated bed', () => {
  const loop = (
    T: number,
    W: number,
    height: number,
    Ts: number,
  ): { column: Column; outlet: Outlet; y: Float64Array } => settled(goingRound(airAndWater(T, W, height, Ts + 5), Ts));

  it.each(rows.slice(1, 4))('under air of $T C, $W kg/kg comes to $Ts C from 5 K above it', ({ T, W, Ts, Ws }) => {
    const { column, outlet } = loop(T, W, 8, Ts);
    expect(Math.abs(column.machinery.sump.temperature - CELSIUS - Ts)).toBeLessThan(0.1); // what runs through is at Ts
    expect(Math.abs(outlet.TG - CELSIUS - Ts)).toBeLessThan(0.1);
    expect(Math.abs(humidityRatio(column) / Ws - 1)).toBeLessThan(0.01); // 0.1 K of it
  });

  it('under air that it hardly changes comes to the wet bulb, below the adiabatic saturation temperature', () => {
    // 60 C, 0.010 kg/kg: 26.88 C with Le^(2/3) = 0.90, 27.64 C with 1; Le^(2/3) of air and water lies at 0.89-0.92
    // [Chilton1934; Treybal1980, chapter 7], which is 0.2 K either way.
    const wetBulb = 26.88;
    const plant = goingRound(airAndWater(60, 0.01, 0.02, wetBulb), wetBulb);
    // Heat passes over all of the packing, vapour over its wetted part; the wet bulb has both on one area.
    const first = settled(plant).column.chains[0]![0]!.cell.film.area;
    const { transfer } = plant.column;
    if (transfer.model !== 'onda') throw new Error('not the law whose area is scaled');
    const scaleArea = ceramicSaddle25.area / first;
    const { column } = settled(withColumn(plant, { transfer: { ...transfer, scaleArea } }));
    expect(Math.abs(column.machinery.sump.temperature - CELSIUS - wetBulb)).toBeLessThan(0.25);
  });
});

describe('water colder or warmer than the air’s adiabatic saturation temperature', () => {
  it.each([
    { waterT: 10, warms: true },
    { waterT: 45, warms: false },
  ])('of $waterT C is drawn towards it, and enthalpy is kept', ({ waterT, warms }) => {
    const { column, outlet } = settled(airAndWater(60, 0.01, 8, waterT));
    expect(outlet.TL > CELSIUS + waterT).toBe(warms);
    // Tall bed, much water: the air leaves saturated at the water's inlet temperature.
    expect(Math.abs(outlet.TG - CELSIUS - waterT)).toBeLessThan(0.1);
    const saturated = createColumn(absorber).fluids.vapourPressure(outlet.TG) / 101_325;
    expect(Math.abs(humidityRatio(column) / ((MASS_RATIO * saturated) / (1 - saturated)) - 1)).toBeLessThan(0.005);
  });
});
