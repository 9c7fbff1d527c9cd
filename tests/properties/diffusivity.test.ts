import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { diffusionVolume, fullerDiffusivity } from '../../sim/properties/gas-diffusivity.ts';
import {
  carbonDioxideDiffusivity,
  scaledDiffusivity,
  wilkeChangDiffusivity,
} from '../../sim/properties/liquid-diffusivity.ts';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);

const M_AIR = 28.96e-3;
const V_AIR = 19.7;
const gases: Record<string, { M: number; v: number }> = {
  acetone: { M: 58.08e-3, v: diffusionVolume({ C: 3, H: 6, O: 1 }) },
  methanol: { M: 32.04e-3, v: diffusionVolume({ C: 1, H: 4, O: 1 }) },
  ethanol: { M: 46.07e-3, v: diffusionVolume({ C: 2, H: 6, O: 1 }) },
  ammonia: { M: 17.031e-3, v: 20.7 },
  'sulphur dioxide': { M: 64.066e-3, v: 41.8 },
  'hydrogen chloride': { M: 36.461e-3, v: diffusionVolume({ H: 1, Cl: 1 }) },
  'hydrogen sulphide': { M: 34.082e-3, v: diffusionVolume({ H: 2, S: 1 }) },
  'carbon dioxide': { M: 44.01e-3, v: 26.9 },
  chlorine: { M: 70.906e-3, v: 38.4 },
  chloroform: { M: 119.38e-3, v: diffusionVolume({ C: 1, H: 1, Cl: 3 }) },
  benzene: { M: 78.11e-3, v: diffusionVolume({ C: 6, H: 6 }, 1) },
  toluene: { M: 92.14e-3, v: diffusionVolume({ C: 7, H: 8 }, 1) },
  trichloroethylene: { M: 131.39e-3, v: diffusionVolume({ C: 2, H: 1, Cl: 3 }) },
  water: { M: 18.015e-3, v: 13.1 },
};
const gas = (name: string): { M: number; v: number } => {
  const found = gases[name];
  if (found === undefined) throw new Error(`no gas ${name}`);
  return found;
};

describe('gas diffusivity', () => {
  // [Fuller1966] with the volumes of [Fuller1969], evaluated independently; cm2/s, four decimals.
  it.each([
    ['acetone', 0.106],
    ['methanol', 0.1602],
    ['ethanol', 0.1228],
    ['ammonia', 0.2202],
    ['sulphur dioxide', 0.1258],
    ['hydrogen chloride', 0.1724],
    ['hydrogen sulphide', 0.1652],
    ['carbon dioxide', 0.1577],
    ['chlorine', 0.1279],
    ['chloroform', 0.0896],
    ['benzene', 0.0898],
    ['toluene', 0.0807],
    ['trichloroethylene', 0.0825],
    ['water', 0.2509],
  ])('of %s in air at 25 degC and 1 atm is as computed elsewhere', (name, expected) => {
    const { M, v } = gas(name);
    const D = 1e4 * fullerDiffusivity(298.15, 101_325, M, M_AIR, v, V_AIR);
    expect(Math.abs(D - expected)).toBeLessThan(6e-5); // last printed digit
  });

  it('of allyl chloride in air is that of the textbook example', () => {
    // [Poling2001] chapter 11, example: 0.096 cm2/s at 298 K, 1 bar (0.0958 with more digits); measured 0.098.
    const v = diffusionVolume({ C: 3, H: 5, Cl: 1 });
    const D = 1e4 * fullerDiffusivity(298, 1e5, 76.53e-3, 28.97e-3, v, V_AIR);
    expect(relative(D, 0.0958)).toBeLessThan(0.01); // 0.2 % between two published constants, rounding
    expect(relative(D, 0.098)).toBeLessThan(0.05);
  });

  // Measured at 0 degC and 1 atm, cm2/s: [Perry2008] table of diffusivities of gases and vapours.
  it.each([
    ['carbon dioxide', 0.138],
    ['benzene', 0.077],
    ['ethanol', 0.102],
  ])('of %s in air at 0 degC is near the measured one', (name, measured) => {
    const { M, v } = gas(name);
    const D = 1e4 * fullerDiffusivity(273.15, 101_325, M, M_AIR, v, V_AIR);
    expect(relative(D, measured)).toBeLessThan(0.05); // stated mean error of the method
  });

  it('falls with pressure, rises as T^1.75 and does not care which gas is named first', () => {
    const positive = fc.double({ min: 0.01, max: 0.2, noNaN: true });
    const volume = fc.double({ min: 5, max: 200, noNaN: true });
    fc.assert(
      fc.property(positive, positive, volume, volume, (M1, M2, v1, v2) => {
        const D = fullerDiffusivity(300, 1e5, M1, M2, v1, v2);
        // Exact laws of the form: 1e-12 is rounding.
        expect(relative(fullerDiffusivity(300, 1e5, M2, M1, v2, v1), D)).toBeLessThan(1e-12);
        expect(relative(fullerDiffusivity(300, 2e5, M1, M2, v1, v2), D / 2)).toBeLessThan(1e-12);
        expect(relative(fullerDiffusivity(600, 1e5, M1, M2, v1, v2), D * 2 ** 1.75)).toBeLessThan(1e-12);
      }),
    );
  });
});

describe('liquid diffusivity', () => {
  // [Wilke1955] with phi 2.6 and mu 0.890 cP, v in cm3/mol; evaluated independently, 1e-9 m2/s.
  it.each([
    ['acetone', 74.0, 1.282],
    ['methanol', 37.0, 1.944],
    ['ethanol', 59.2, 1.466],
    ['carbon dioxide', 34.0, 2.045],
    ['sulphur dioxide', 44.8, 1.733],
    ['benzene', 96.0, 1.097],
    ['toluene', 118.2, 0.968],
    ['chloroform', 92.3, 1.123],
  ])('of %s in water at 25 degC is as computed elsewhere', (_name, v, expected) => {
    const D = 1e9 * wilkeChangDiffusivity(298.15, 0.89e-3, 18.015e-3, 2.6, v * 1e-6);
    expect(Math.abs(D - expected)).toBeLessThan(6e-4); // last printed digit
  });

  it('of carbon dioxide in water is that of the published fit, near the estimate', () => {
    // [Versteeg1988] at 298.15 K: 1.925e-9 m2/s, four digits.
    expect(relative(carbonDioxideDiffusivity(298.15), 1.925e-9)).toBeLessThan(1e-3);
    const estimate = wilkeChangDiffusivity(298.15, 0.89e-3, 18.015e-3, 2.6, 34e-6);
    expect(relative(estimate, carbonDioxideDiffusivity(298.15))).toBeLessThan(0.11); // stated error
  });

  it('carried to another temperature follows T/mu and returns to where it was measured', () => {
    const mu = fc.double({ min: 1e-4, max: 1e-2, noNaN: true });
    const T = fc.double({ min: 273, max: 373, noNaN: true });
    fc.assert(
      fc.property(mu, mu, T, T, (muRef, muAt, TRef, TAt) => {
        expect(relative(scaledDiffusivity(1e-9, TRef, muRef, TRef, muRef), 1e-9)).toBeLessThan(1e-14);
        const there = scaledDiffusivity(1e-9, TRef, muRef, TAt, muAt);
        const back = scaledDiffusivity(there, TAt, muAt, TRef, muRef);
        expect(relative(back, 1e-9)).toBeLessThan(1e-13); // rounding
        // The estimate obeys the same rule exactly.
        const ratio =
          wilkeChangDiffusivity(TAt, muAt, 0.018, 2.6, 5e-5) / wilkeChangDiffusivity(TRef, muRef, 0.018, 2.6, 5e-5);
        expect(relative(there / 1e-9, ratio)).toBeLessThan(1e-12);
      }),
    );
  });
});
