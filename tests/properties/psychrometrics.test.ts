import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  adiabaticSaturationTemperature,
  dewPoint,
  humidAirEnthalpy,
  humidAirVolume,
  humidityRatio,
  ratioFromWetBulb,
  relativeHumidity,
  saturatedHumidityRatio,
  vapourFraction,
  vapourFractionOfRatio,
  wetBulbTemperature,
} from '../../sim/properties/psychrometrics.ts';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);
const K = (t: number): number => t + 273.15;
const P = 101_325;

describe('humid air', () => {
  it('reproduces the first handbook example', () => {
    // [ASHRAE2017] chapter 1, example 1: 40 degC dry, 20 degC wet: W 0.0065, dew point 7 degC, RH 14 %,
    // h 56.7 kJ/kg, v 0.896 m3/kg, printed to the digits; with more digits 0.006401, 7.434, 0.13979,
    // 56724.6, 0.89625 from the handbook's own equations.
    const W = ratioFromWetBulb(K(40), K(20), P);
    expect(Math.abs(W - 0.0065)).toBeLessThan(1e-4);
    expect(relative(W, 0.006401)).toBeLessThan(1e-3); // another saturation formula, 0.01-0.03 %
    const y = vapourFractionOfRatio(W);
    expect(Math.abs(relativeHumidity(y, K(40), P) - 0.14)).toBeLessThan(0.01);
    expect(Math.abs(dewPoint(y, P) - K(7.434))).toBeLessThan(0.02);
    expect(Math.abs(humidAirEnthalpy(K(40), W) - 56_700)).toBeLessThan(100);
    expect(relative(humidAirVolume(K(40), W, P), 0.896)).toBeLessThan(1e-3);
  });

  // [ASHRAE2017] chapter 1, table 2 at 1 atm; the table has the enhancement factor, this has not.
  it.each([
    [5, 0.005425, 0.005],
    [25, 0.020173, 0.005],
    [50, 0.086863, 0.01],
    [85, 0.838105, 0.02],
  ])('saturated at %d degC holds the tabulated water', (t, W, error) => {
    expect(relative(saturatedHumidityRatio(K(t), P), W)).toBeLessThan(error);
  });

  // Adiabatic saturation from the handbook equations and from an independent balance, degC.
  const states = [
    [40, 0, 14.587, 0.010363],
    [40, 0.01, 22.584, 0.017288],
    [60, 0.01, 27.646, 0.023605],
    [80, 0, 26.529, 0.022053],
    [80, 0.03, 39.612, 0.047802],
    [25, 0.008, 16.314, 0.0116],
    [120, 0.02, 41.725, 0.053967],
  ] as const;
  it.each(states)('of %d degC with %d kg/kg saturates where the handbook has it', (t, W, tAs, WAs) => {
    const T = adiabaticSaturationTemperature(K(t), W, P);
    expect(Math.abs(T - K(tAs))).toBeLessThan(0.01); // 0.003 K between two saturation formulas
    expect(relative(saturatedHumidityRatio(T, P), WAs)).toBeLessThan(1e-3);
    expect(relative(ratioFromWetBulb(K(t), T, P) + 1, W + 1)).toBeLessThan(1e-9); // the same balance
  });

  it('follows the adiabatic line of the textbook to 90 %', () => {
    // [Treybal1980] illustration 7.8: 83 degC, 0.030 kg/kg; chart 41.5 degC, 0.0485; computed 41.60 degC,
    // 0.04823, adiabatic saturation 40.02 degC.
    const T0 = K(83);
    const tAs = adiabaticSaturationTemperature(T0, 0.03, P);
    expect(Math.abs(tAs - K(40.02))).toBeLessThan(0.02);
    const water = 4186 * (tAs - 273.15);
    let low = tAs;
    let high = T0;
    for (let k = 0; k < 60; k++) {
      const T = 0.5 * (low + high);
      const W = 0.9 * saturatedHumidityRatio(T, P);
      const excess = humidAirEnthalpy(T0, 0.03) + (W - 0.03) * water - humidAirEnthalpy(T, W);
      if (excess > 0) low = T;
      else high = T;
    }
    expect(Math.abs(low - K(41.6))).toBeLessThan(0.02); // two decimals
    expect(Math.abs(low - K(41.5))).toBeLessThan(0.3); // read from a chart
    expect(relative(0.9 * saturatedHumidityRatio(low, P), 0.0485)).toBeLessThan(0.01);
  });

  it('has the wet bulb of the textbook with its own Lewis factor', () => {
    // [Treybal1980] illustration 7.9: 65 degC dry, 35 degC wet: Y' = 0.0365 - 950 x 30/2419300 = 0.0247.
    // There h/kY = 950 J/(kg K); on the humid heat of 0.0247 kg/kg that is a factor 0.903.
    const f = 950 / (1006 + 1860 * 0.02472);
    const T = wetBulbTemperature(K(65), 0.02472, P, f);
    expect(Math.abs(T - K(35))).toBeLessThan(0.1); // Yw' read from a chart, 0.5 % of W
  });

  it('with a Lewis factor of 0.90 is cooled below the adiabatic saturation', () => {
    // 60 degC, 0.010 kg/kg: 26.88 degC against 27.64, computed independently with the same balance.
    expect(Math.abs(wetBulbTemperature(K(60), 0.01, P, 0.9) - K(26.88))).toBeLessThan(0.02); // two decimals
  });

  it('has the partial pressure of the textbook', () => {
    // [Treybal1980] illustration 7.6: Y' 0.030 kg/kg at 101.33 kPa: 4.66 kPa, three digits.
    expect(relative(vapourFractionOfRatio(0.03) * 101.33, 4.66)).toBeLessThan(5e-3);
  });

  it('returns from every round trip and never has a wet bulb above the dry one', () => {
    const RH = fc.double({ min: 0.01, max: 1, noNaN: true });
    fc.assert(
      fc.property(RH, fc.double({ min: 280, max: 350, noNaN: true }), (humidity, T) => {
        const y = vapourFraction(humidity, T, P);
        expect(relative(relativeHumidity(y, T, P), humidity)).toBeLessThan(1e-13);
        expect(relative(vapourFractionOfRatio(humidityRatio(y)), y)).toBeLessThan(1e-12);
        const wet = wetBulbTemperature(T, humidityRatio(y), P);
        expect(wet).toBeLessThanOrEqual(T + 1e-6);
        // The wet bulb is not followed below freezing.
        expect(wet).toBeGreaterThanOrEqual(Math.max(273.15, dewPoint(y, P)) - 1e-6);
      }),
    );
  });
});
