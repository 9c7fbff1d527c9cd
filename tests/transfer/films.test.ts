import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ackermannFactor, driftFactor, logarithmicMean } from '../../sim/transfer/drift.ts';
import { gasHeatCoefficient } from '../../sim/transfer/gas-heat-coefficient.ts';
import { shulmanGasCoefficient, shulmanLiquidCoefficient } from '../../sim/transfer/shulman.ts';
import { gasFilmShare, interfacePressure, overallGasCoefficient } from '../../sim/transfer/two-film.ts';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);
const positive = fc.double({ min: 1e-6, max: 1e6, noNaN: true });

describe('two films', () => {
  it('pass the same flux', () => {
    fc.assert(
      fc.property(positive, positive, positive, positive, positive, (kG, kL, H, p, pStar) => {
        const KG = overallGasCoefficient(kG, kL, H, 1);
        const pi = interfacePressure(p, pStar, gasFilmShare(kG, kL, H, 1));
        const scale = KG * Math.max(p, pStar);
        // Both fluxes cancel two pressures: compare on the scale of the larger; 1e-9 covers 1e6 kG/KG.
        const share = KG / kG;
        expect(Math.abs(kG * (p - pi) - KG * (p - pStar))).toBeLessThan((1e-14 / share + 1e-12) * scale);
        expect(KG).toBeLessThanOrEqual(kG * (1 + 1e-12));
        expect(KG).toBeLessThanOrEqual((kL / H) * (1 + 1e-12));
      }),
    );
  });

  it('add resistances', () => {
    // 1/KG = 1/2e-6 + 4e6/(1e-4 x 55345): [Whitman1923], by hand.
    expect(relative(1 / overallGasCoefficient(2e-6, 1e-4, 4e6, 55_345), 1 / 2e-6 + 4e6 / 5.5345)).toBeLessThan(1e-14);
  });

  it('stop when either phase stops', () => {
    expect(overallGasCoefficient(0, 1e-4, 1e6, 5e4)).toBe(0);
    expect(overallGasCoefficient(1e-6, 0, 1e6, 5e4)).toBe(0);
    expect(overallGasCoefficient(0, 0, 1e6, 5e4)).toBe(0);
    expect(gasFilmShare(0, 0, 1e6, 5e4)).toBe(1);
  });
});

describe('drift', () => {
  it('is the logarithmic mean of the carrier, smooth through equality', () => {
    expect(relative(logarithmicMean(2, 1), 1 / Math.LN2)).toBeLessThan(1e-15);
    // The two branches meet where (a - b)/(a + b) = 1e-3.
    for (const r of [0.999e-3, 1.001e-3]) {
      const a = 1 + r;
      const b = 1 - r;
      expect(relative(logarithmicMean(a, b), (a - b) / (Math.log1p(r) - Math.log1p(-r)))).toBeLessThan(1e-12);
    }
    expect(logarithmicMean(3, 3)).toBe(3);
  });

  it('raises the coefficient by 1/(1 - y) at equal ends and not at all for a trace', () => {
    expect(relative(driftFactor(1e5, 0.9e5, 0.9e5), 1 / 0.9)).toBeLessThan(1e-14);
    expect(relative(driftFactor(1e5, 99_999, 1e5), 1)).toBeLessThan(1e-5);
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        (a, b) => {
          const mean = logarithmicMean(a, b);
          expect(mean).toBeGreaterThanOrEqual(Math.min(a, b) * (1 - 1e-14));
          expect(mean).toBeLessThanOrEqual(((a + b) / 2) * (1 + 1e-14)); // below the arithmetic mean
          expect(relative(logarithmicMean(b, a), mean)).toBeLessThan(1e-13);
        },
      ),
    );
  });

  it('makes condensation carry heat and evaporation shield', () => {
    expect(ackermannFactor(0)).toBe(1);
    expect(relative(ackermannFactor(1), 1 / (1 - Math.exp(-1)))).toBeLessThan(1e-15); // [Ackermann1937]
    fc.assert(
      fc.property(fc.double({ min: -5, max: 5, noNaN: true }), (phi) => {
        // f(phi) - f(-phi) = phi exactly.
        expect(Math.abs(ackermannFactor(phi) - ackermannFactor(-phi) - phi)).toBeLessThan(1e-12);
      }),
    );
  });
});

describe('heat by analogy', () => {
  it('of air and water has the psychrometric ratio of the textbooks', () => {
    // Air at 300 K: k 0.0263, cp 1007, rho 1.161 [Bergman2011] table A.4; D 2.54e-5 m2/s for water
    // vapour. Le 0.885, Le^(2/3) 0.92: textbooks give 0.90-0.92 [Treybal1980].
    const h = gasHeatCoefficient(0.02, 1.161, 1007, 0.0263, 2.54e-5);
    const ratio = h / (0.02 * 1.161 * 1007);
    expect(ratio).toBeGreaterThan(0.9);
    expect(ratio).toBeLessThan(0.93);
  });

  it('is rho cp kc where heat and mass diffuse alike, and proportional to kc', () => {
    const D = 0.0263 / (1.161 * 1007);
    expect(relative(gasHeatCoefficient(0.02, 1.161, 1007, 0.0263, D), 0.02 * 1.161 * 1007)).toBeLessThan(1e-12);
    expect(
      relative(
        gasHeatCoefficient(0.04, 1.161, 1007, 0.0263, 1e-5),
        2 * gasHeatCoefficient(0.02, 1.161, 1007, 0.0263, 1e-5),
      ),
    ).toBeLessThan(1e-14);
  });
});

describe('Shulman coefficients', () => {
  // [Treybal1980] illustration 6.6, 38 mm ceramic saddle: G 0.716, L 2.71 kg/(m2 s), M 11/260,
  // muG 1e-5, muL 2e-3, rhoL 840, DG 1.30e-5, DL 4.71e-10, 107 kPa, 300 K, Ds 0.0472, voidage 0.75.
  // Operating hold-up 0.0200..., area from the printed fits, evaluated here as in the text.
  const L = 2.71;
  const G = 0.716;
  const rhoG = (11 / 22.41) * (107 / 101.33) * (273 / 300);
  const Ds = 0.0472;
  const beta = 1.508 * Ds ** 0.376;
  const waterStatic = 5.014e-5 / Ds ** 1.56;
  const waterTotal = (2.32e-6 * (737.5 * L) ** beta) / Ds ** 2;
  const waterMoving = waterTotal - waterStatic;
  const H =
    ((1404 * L ** 0.57 * 2e-3 ** 0.13) / (840 ** 0.84 * (3.24 * L ** 0.413 - 1))) *
    (0.03 / 0.073) ** (0.2817 - 0.262 * Math.log10(L));
  const moving = waterMoving * H;
  const resting = (4.23e-3 * 2e-3 ** 0.04 * 0.03 ** 0.55) / (Ds ** 1.56 * 840 ** 0.37);
  const area = 62.4 * ((808 * G) / rhoG ** 0.5) ** (0.024 * L - 0.0996) * L ** -0.1355 * (moving / waterMoving);

  it('times area give the book values of the gas film', () => {
    const FG = shulmanGasCoefficient(Ds, G, 0.011, rhoG, 1e-5, 1.3e-5, 0.75 - (moving + resting));
    expect(relative(FG * area * 1e-3, 0.07064)).toBeLessThan(1e-3); // recomputed with more digits
    expect(relative(FG * area * 1e-3, 0.0719)).toBeLessThan(0.025); // book, rounded on the way
  });

  it('times area give the book values of the liquid film', () => {
    const kL = shulmanLiquidCoefficient(Ds, L, 840, 2e-3, 4.71e-10);
    const FLa = (kL * 840 * area) / 260;
    expect(relative(FLa, 0.0138)).toBeLessThan(2e-3);
    expect(relative(FLa, 0.01377)).toBeLessThan(0.025);
  });
});
