import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { wilkeViscosity } from '../../sim/properties/gas-mixture-viscosity.ts';
import {
  gasConcentration,
  gasDensity,
  idealGasEnthalpyChange,
  idealGasHeatCapacity,
} from '../../sim/properties/ideal-gas.ts';
import {
  air,
  carbonDioxideCarrier,
  CARRIERS,
  carrierRefusal,
  nitrogen,
  steam,
} from '../../sim/properties/library/carriers.ts';
import { SOLUTES } from '../../sim/properties/library/solutes.ts';
import { heavyOil, water } from '../../sim/properties/library/solvents.ts';
import { gasDiffusivityOf, liquidDiffusivityOf } from '../../sim/properties/solute-diffusivity.ts';
import { sutherland } from '../../sim/properties/sutherland.ts';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);

describe('carrier gases', () => {
  // Viscosity at 300 K, uPa s, from reference formulations: air 18.54 and nitrogen 17.89 [Lemmon2004],
  // carbon dioxide 15.02 [Fenghour1998]; steam at 400 K 13.3 [IAPWS2008]. 2 % is the stated error of
  // Sutherland's law with these constants (steam 4 %).
  it.each([
    [air, 300, 18.54, 0.02],
    [nitrogen, 300, 17.89, 0.02],
    [carbonDioxideCarrier, 300, 15.02, 0.02],
    [steam, 400, 13.3, 0.04],
  ])('have the measured viscosity: %o', (carrier, T, microPascalSecond, error) => {
    expect(relative(sutherland(carrier.viscosity.value, T) * 1e6, microPascalSecond)).toBeLessThan(error);
  });

  it('agree with the standard atmosphere on air', () => {
    // [USSA1976] equation 51 and 53 at 288.15 K: mu 1.7894e-5 Pa s, k 2.5326e-2 W/(m K).
    expect(relative(sutherland(air.viscosity.value, 288.15), 1.7894e-5)).toBeLessThan(2e-3);
    expect(relative(sutherland(air.thermalConductivity.value, 288.15), 2.5326e-2)).toBeLessThan(0.02);
  });

  // cp at 298.15 K, J/(mol K): [CRC2004] standard values, 29.1 air, 29.12 N2, 37.13 CO2, 33.59 H2O.
  it.each([
    [air, 29.1],
    [nitrogen, 29.12],
    [carbonDioxideCarrier, 37.13],
    [steam, 33.59],
  ])('have the standard heat capacity: %o', (carrier, cp) => {
    // Stated worst error of the polynomials 0.6-0.7 %.
    expect(relative(idealGasHeatCapacity(carrier.heatCapacity.value, 298.15), cp)).toBeLessThan(8e-3);
  });

  it('have a density of 1.184 kg/m3 as air at 25 degC', () => {
    expect(relative(gasDensity(air.molarMass.value, 101_325, 298.15), 1.184)).toBeLessThan(1e-3);
    expect(relative(gasConcentration(101_325, 273.15), 44.615)).toBeLessThan(1e-5); // CODATA molar volume
  });

  it('are refused where they would condense', () => {
    expect(carrierRefusal(air, water, 280, 1e6)).toBeUndefined();
    expect(carrierRefusal(steam, water, 400, 1e5)?.kind).toBe('same-as-solvent');
    expect(carrierRefusal(steam, heavyOil, 372, 101_418)?.kind).toBe('carrier-condenses');
    expect(carrierRefusal(steam, heavyOil, 400, 1e5)).toBeUndefined();
  });
});

describe('ideal-gas enthalpy', () => {
  it('is the integral of the heat capacity', () => {
    const T = fc.double({ min: 273, max: 400, noNaN: true });
    fc.assert(
      fc.property(fc.constantFrom(...Object.values(SOLUTES)), T, T, (solute, T0, T1) => {
        const polynomial = solute.gasHeatCapacity.value;
        const middle = idealGasHeatCapacity(polynomial, (T0 + T1) / 2);
        const ends = idealGasHeatCapacity(polynomial, T0) + idealGasHeatCapacity(polynomial, T1);
        // Simpson's rule is exact for a cubic; 1e-9 J/mol is rounding.
        const simpson = ((T1 - T0) * (ends + 4 * middle)) / 6;
        expect(Math.abs(idealGasEnthalpyChange(polynomial, T0, T1) - simpson)).toBeLessThan(1e-8);
        expect(middle).toBeGreaterThan(25); // no gas here has less than 3 R
      }),
    );
  });

  // Standard gas heat capacities at 298.15 K, J/(mol K), [CRC2004].
  it.each([
    ['acetone', 74.5],
    ['methanol', 44.1],
    ['ethanol', 65.6],
    ['2-propanol', 89.3],
    ['ammonia', 35.1],
    ['sulphur-dioxide', 39.9],
    ['hydrogen-sulphide', 34.2],
    ['chlorine', 33.9],
    ['hydrogen-chloride', 29.1],
    ['chloroform', 65.7],
    ['benzene', 82.4],
    ['toluene', 103.7],
    ['trichloroethylene', 80.3],
  ])('belongs to %s', (id, cp) => {
    const solute = SOLUTES[id];
    if (solute === undefined) throw new Error(id);
    // 3 %: stated error of the wide-range polynomials at their cold end.
    expect(relative(idealGasHeatCapacity(solute.gasHeatCapacity.value, 298.15), cp)).toBeLessThan(0.035);
  });
});

describe('viscosity of a mixture', () => {
  it('of nitrogen and oxygen is as computed elsewhere', () => {
    // 0.8/0.2 by mass at 300 K with [White2006] constants (O2 1.919e-5, 273, 139) and M 28, 32.
    const muN2 = sutherland(nitrogen.viscosity.value, 300);
    const muO2 = sutherland({ f0: 1.919e-5, T0: 273, S: 139 }, 300);
    const y = 0.8 / 28 / (0.8 / 28 + 0.2 / 32);
    expect(relative(wilkeViscosity(y, muN2, muO2, 0.028, 0.032), 1.84005e-5)).toBeLessThan(1e-5); // six digits
  });

  it('is that of the pure gas at either end and does not care for the order', () => {
    const mu = fc.double({ min: 5e-6, max: 3e-5, noNaN: true });
    const M = fc.double({ min: 0.01, max: 0.1, noNaN: true });
    fc.assert(
      fc.property(mu, mu, M, M, fc.double({ min: 0, max: 1, noNaN: true }), (mu1, mu2, M1, M2, y) => {
        expect(relative(wilkeViscosity(1, mu1, mu2, M1, M2), mu1)).toBeLessThan(1e-12);
        expect(relative(wilkeViscosity(0, mu1, mu2, M1, M2), mu2)).toBeLessThan(1e-12);
        const one = wilkeViscosity(y, mu1, mu2, M1, M2);
        expect(relative(wilkeViscosity(1 - y, mu2, mu1, M2, M1), one)).toBeLessThan(1e-10); // 1 - (1 - y)
      }),
    );
  });
});

describe('diffusivity of library entries', () => {
  it('is positive and of the usual size for every pair', () => {
    for (const solute of Object.values(SOLUTES)) {
      for (const carrier of Object.values(CARRIERS)) {
        const D = gasDiffusivityOf(solute, carrier, 298.15, 101_325);
        expect(D).toBeGreaterThan(3e-6);
        expect(D).toBeLessThan(4e-5);
      }
      const D = liquidDiffusivityOf(solute, water, 298.15);
      expect(D).toBeGreaterThan(8e-10);
      expect(D).toBeLessThan(3.2e-9);
      expect(liquidDiffusivityOf(solute, water, 310)).toBeGreaterThan(D);
    }
  });

  it('of benzene in the wash oil is the textbook value', () => {
    // [Treybal1980] illustration 6.6: 4.71e-10 m2/s at 300 K.
    const solute = SOLUTES['benzene'];
    if (solute === undefined) throw new Error('benzene');
    expect(relative(liquidDiffusivityOf(solute, heavyOil, 300), 4.71e-10)).toBeLessThan(1e-12);
  });
});
