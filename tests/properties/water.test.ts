import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { GAS_CONSTANT } from '../../sim/properties/constants.ts';
import { WATER_MOLAR_MASS } from '../../sim/properties/library/solvents.ts';
import { waterDensity, waterDensitySlope } from '../../sim/properties/water-density.ts';
import { waterHeatCapacity } from '../../sim/properties/water-heat-capacity.ts';
import {
  waterBoilingTemperature,
  waterSaturationPressure,
  waterSaturationSlope,
} from '../../sim/properties/water-saturation-pressure.ts';
import { waterSurfaceTension } from '../../sim/properties/water-surface-tension.ts';
import { waterThermalConductivity } from '../../sim/properties/water-thermal-conductivity.ts';
import { waterViscosity } from '../../sim/properties/water-viscosity.ts';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);
const temperature = fc.double({ min: 273.15, max: 373.15, noNaN: true });

describe('saturation pressure of water', () => {
  // [IF97] table 35; nine digits printed, so half a unit of the ninth.
  it.each([
    [300, 0.353658941e-2],
    [500, 0.263889776e1],
    [600, 0.123443146e2],
  ])('gives the release value at %d K', (T, megapascal) => {
    expect(relative(waterSaturationPressure(T) / 1e6, megapascal)).toBeLessThan(2e-9);
  });

  // [IF97] table 36 is the inverse; nine digits printed.
  it.each([
    [0.1e6, 372.755919],
    [1e6, 453.035632],
    [10e6, 584.149488],
  ])('boils at the release temperature at %d Pa', (p, T) => {
    expect(Math.abs(waterBoilingTemperature(p) - T)).toBeLessThan(5.1e-7);
  });

  // [ASHRAE2017] chapter 1, table 3, another formulation: 0.03 % between the two.
  it.each([
    [5, 872.6],
    [25, 3169.7],
    [50, 12351.3],
    [100, 101418.0],
    [150, 476101.4],
  ])('agrees with the handbook table at %d degC', (t, p) => {
    expect(relative(waterSaturationPressure(t + 273.15), p)).toBeLessThan(3e-4);
  });

  it('has the slope of its own curve', () => {
    fc.assert(
      fc.property(temperature, (T) => {
        const h = 1e-3;
        const difference = Math.log(waterSaturationPressure(T + h) / waterSaturationPressure(T - h)) / (2 * h);
        // Central difference over 2 mK: truncation and rounding both below 1e-8.
        expect(relative(waterSaturationSlope(T), difference)).toBeLessThan(1e-7);
      }),
    );
  });

  // Heat of vaporisation from the IF97 enthalpies: 2441.71 kJ/kg at 25 degC, 2381.97 at 50 degC.
  it.each([
    [25, 2441.71],
    [50, 2381.97],
  ])('implies the heat of vaporisation at %d degC', (t, kilojoule) => {
    const T = t + 273.15;
    const heat = (GAS_CONSTANT * T * T * waterSaturationSlope(T)) / WATER_MOLAR_MASS / 1e3;
    // Ideal vapour and no liquid volume: 0.1 % at 25 degC, 0.4 % at 50 degC.
    expect(relative(heat, kilojoule)).toBeLessThan(5e-3);
  });

  it('returns the temperature it boils at', () => {
    fc.assert(
      fc.property(fc.double({ min: 273.16, max: 640, noNaN: true }), (T) => {
        // The release calls the two forms one quadratic; 1e-9 K is rounding.
        expect(Math.abs(waterBoilingTemperature(waterSaturationPressure(T)) - T)).toBeLessThan(1e-8);
      }),
    );
  });
});

describe('liquid water at 0.1 MPa', () => {
  // Values of [SR6-08] at 298.15 K, seven digits: rho, cp, mu, k.
  it('gives the release values at 298.15 K', () => {
    expect(relative(waterDensity(298.15), 997.047)).toBeLessThan(1e-6);
    expect(relative(waterHeatCapacity(298.15), 4181.446)).toBeLessThan(1e-6);
    expect(relative(waterViscosity(298.15), 889.9968e-6)).toBeLessThan(1e-6);
    expect(relative(waterThermalConductivity(298.15), 0.6065023)).toBeLessThan(1e-6);
  });

  // rho kg/m3, cp kJ/(kg K), mu uPa s from [SR6-08] evaluated with an independent implementation,
  // digits as tabulated: half a unit of the last.
  it.each([
    [0.01, 999.843, 4.21928, 1791.16],
    [10, 999.702, 4.19514, 1305.9],
    [20, 998.207, 4.18419, 1001.57],
    [40, 992.216, 4.17936, 652.73],
    [60, 983.195, 4.1849, 466.04],
    [80, 971.79, 4.19686, 354.05],
    [100, 958.348, 4.21557, 281.58],
  ])('gives density, heat capacity and viscosity at %d degC', (t, rho, cp, mu) => {
    const T = t + 273.15;
    expect(Math.abs(waterDensity(T) - rho)).toBeLessThan(6e-4);
    expect(Math.abs(waterHeatCapacity(T) / 1e3 - cp)).toBeLessThan(6e-6);
    expect(Math.abs(waterViscosity(T) * 1e6 - mu)).toBeLessThan(6e-3);
  });

  // [R1-76] test values, thirteen decimals.
  it.each([
    [300, 0.0716859625271],
    [450, 0.0428914991565],
    [600, 0.0083756108728],
  ])('has the release surface tension at %d K', (T, sigma) => {
    expect(Math.abs(waterSurfaceTension(T) - sigma)).toBeLessThan(1e-13); // one unit of the last
  });

  it('is densest at 4 degC', () => {
    // 277.13 K is the maximum of the IAPWS formulation at 0.1 MPa.
    expect(waterDensitySlope(277.12)).toBeGreaterThan(0);
    expect(waterDensitySlope(277.14)).toBeLessThan(0);
  });

  it('has the density slope of its own curve', () => {
    fc.assert(
      fc.property(temperature, (T) => {
        const h = 1e-2;
        const difference = Math.log(waterDensity(T + h) / waterDensity(T - h)) / (2 * h);
        // Rounding of the density (1e-16) over 20 mK is 1e-14; truncation below 1e-10.
        expect(Math.abs(waterDensitySlope(T) - difference)).toBeLessThan(1e-10);
      }),
    );
  });

  it('flows more easily and holds its surface less when warmer', () => {
    fc.assert(
      fc.property(temperature, (T) => {
        expect(waterViscosity(T + 1)).toBeLessThan(waterViscosity(T));
        expect(waterSurfaceTension(T + 1)).toBeLessThan(waterSurfaceTension(T));
        expect(waterSaturationPressure(T + 1)).toBeGreaterThan(waterSaturationPressure(T));
      }),
    );
  });
});
