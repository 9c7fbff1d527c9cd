import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { STANDARD_GRAVITY } from '../../sim/properties/constants.ts';
import { drainableHoldup, staticHoldup } from '../../sim/transfer/static-holdup.ts';
import { stichlmairFloodPressureDrop, stichlmairFloodVelocity } from '../../sim/transfer/stichlmair-flood.ts';
import {
  stichlmairHoldup,
  stichlmairLiquidVelocity,
  stichlmairPreloadHoldup,
} from '../../sim/transfer/stichlmair-holdup.ts';
import {
  stichlmairDryPressureDrop,
  stichlmairExponent,
  stichlmairPressureDrop,
  stichlmairReynolds,
  stichlmairWetFactor,
  stichlmairWetFactorSlope,
} from '../../sim/transfer/stichlmair-pressure-drop.ts';
import { stichlmairSteadyHoldup, stichlmairSteadyPressureDrop } from '../../sim/transfer/stichlmair-steady.ts';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);

/** 25 mm ceramic saddle of the worked example in [Stichlmair1989]. */
const saddle = { a: 260, eps: 0.68, C1: 32, C2: 7, C3: 1 };
/** Air and water at 25 degC, 1 atm. */
const water = 997.05;
const air = { rho: 1.184, mu: 1.849e-5 };

describe('worked example of Stichlmair, Bravo and Fair 1989', () => {
  // uG 0.4 m/s, rhoG 5, muG 5e-5, uL 5e-3, rhoL 1200: results as quoted and recomputed twice.
  it('gives the dry and the irrigated pressure drop', () => {
    expect(relative(stichlmairDryPressureDrop(saddle, 0.4, 5, 5e-5), 236.809)).toBeLessThan(3e-6);
    const wet = stichlmairSteadyPressureDrop(saddle, 5e-3, 0.4, 1200, 5, 5e-5);
    expect(relative(wet, 539.8768)).toBeLessThan(1e-6); // seven digits printed
  });

  it('gives the hold-up and the exponent', () => {
    expect(relative(stichlmairPreloadHoldup(saddle, 5e-3), 0.0879768)).toBeLessThan(1e-6);
    expect(relative(stichlmairSteadyHoldup(saddle, 5e-3, 0.4, 1200, 5, 5e-5), 0.0916801)).toBeLessThan(1e-6);
    const c = stichlmairExponent(saddle, stichlmairReynolds(saddle, 0.4, 5, 5e-5));
    expect(relative(c, -0.2058417)).toBeLessThan(1e-6);
  });

  it('gives the flood velocity', () => {
    expect(relative(stichlmairFloodVelocity(saddle, 5e-3, 1200, 5, 5e-5), 0.639432)).toBeLessThan(1e-6);
  });
});

describe('air and water at 25 degC in the same packing', () => {
  // Evaluated with an independent implementation of the published form, digits as given.
  it.each([
    [0.002, 1.763153, 2294, 0.2346],
    [0.005, 1.215289, 1654, 0.1692],
    [0.01, 0.804449, 1269, 0.1298],
  ])('floods at the computed velocity for uL = %d m/s', (uL, uFlood, gradient, P) => {
    const u = stichlmairFloodVelocity(saddle, uL, water, air.rho, air.mu);
    expect(relative(u, uFlood)).toBeLessThan(1e-6);
    const g = stichlmairFloodPressureDrop(saddle, uL, u, water, air.rho, air.mu);
    expect(relative(g, gradient)).toBeLessThan(4e-4); // four digits given
    expect(Math.abs(g / (water * STANDARD_GRAVITY) - P)).toBeLessThan(6e-5);
  });

  it.each([
    [0.002, 1.057892, 356.341, 560.128, 0.050896],
    [0.005, 0.729173, 180.71, 410.144, 0.091073],
    [0.01, 0.482669, 86.387, 320.872, 0.142663],
  ])('at 60 %% of flood, uL = %d m/s, has the computed state', (uL, uG, dry, wet, h) => {
    expect(relative(stichlmairDryPressureDrop(saddle, uG, air.rho, air.mu), dry)).toBeLessThan(5e-6);
    const g = stichlmairSteadyPressureDrop(saddle, uL, uG, water, air.rho, air.mu);
    expect(relative(g, wet)).toBeLessThan(3e-6); // six digits given, uG rounded to seven
    expect(relative(stichlmairSteadyHoldup(saddle, uL, uG, water, air.rho, air.mu), h)).toBeLessThan(1e-5);
  });

  it.each([
    [0.002, 0.705261, 261.16],
    [0.005, 0.486116, 193.502],
    [0.01, 0.32178, 153.655],
    [0.002, 1.410522, 1020.036],
    [0.005, 0.972231, 741.445],
    [0.01, 0.643559, 574.699],
  ])('at 40 or 80 %% of flood, uL %d and uG %d m/s, has the computed pressure drop', (uL, uG, wet) => {
    const g = stichlmairSteadyPressureDrop(saddle, uL, uG, water, air.rho, air.mu);
    expect(relative(g, wet)).toBeLessThan(1e-5); // six digits given, uG rounded to six
  });
});

const liquid = fc.double({ min: 5e-4, max: 0.02, noNaN: true });
const share = fc.double({ min: 0.02, max: 0.98, noNaN: true });

describe('Stichlmair hydraulics', () => {
  it('has a steady state just below the flood velocity and none above', () => {
    fc.assert(
      fc.property(liquid, (uL) => {
        const u = stichlmairFloodVelocity(saddle, uL, water, air.rho, air.mu);
        expect(stichlmairSteadyPressureDrop(saddle, uL, 0.9999 * u, water, air.rho, air.mu)).toBeGreaterThan(0);
        expect(stichlmairSteadyPressureDrop(saddle, uL, 1.0001 * u, water, air.rho, air.mu)).toBeNaN();
      }),
    );
  });

  it('drains at the steady hold-up exactly what it is fed', () => {
    fc.assert(
      fc.property(liquid, share, (uL, fraction) => {
        const uG = fraction * stichlmairFloodVelocity(saddle, uL, water, air.rho, air.mu);
        const h = stichlmairSteadyHoldup(saddle, uL, uG, water, air.rho, air.mu);
        const g = stichlmairPressureDrop(saddle, uG, air.rho, air.mu, h);
        const steady = stichlmairSteadyPressureDrop(saddle, uL, uG, water, air.rho, air.mu);
        expect(relative(g, steady)).toBeLessThan(1e-9); // solver tolerance 1e-12, amplified near flood
        expect(relative(stichlmairLiquidVelocity(saddle, h, g, water), uL)).toBeLessThan(1e-9);
        expect(relative(stichlmairHoldup(saddle, uL, g, water), h)).toBeLessThan(1e-9);
      }),
    );
  });

  it('floods at a lower gas velocity the more liquid there is', () => {
    fc.assert(
      fc.property(liquid, (uL) => {
        const less = stichlmairFloodVelocity(saddle, uL, water, air.rho, air.mu);
        const more = stichlmairFloodVelocity(saddle, 1.1 * uL, water, air.rho, air.mu);
        expect(more).toBeLessThan(less);
      }),
    );
  });

  it('has the slope of its wet factor, below and beyond a full bed', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 0.9, noNaN: true }), (h) => {
        const c = -0.2;
        const d = 1e-6;
        fc.pre(Math.abs(h / 0.68 - 0.98) > 1e-5); // the two branches join there, once differentiable
        const lower = Math.log(stichlmairWetFactor(0.68, c, h - d));
        const upper = Math.log(stichlmairWetFactor(0.68, c, h + d));
        // Central difference over 2e-6: rounding 1e-10, truncation 1e-6 relative at the steepest place.
        expect(relative((upper - lower) / (2 * d), stichlmairWetFactorSlope(0.68, c, h))).toBeLessThan(1e-5);
      }),
    );
  });

  it('is zero without gas and turns with its direction', () => {
    expect(stichlmairDryPressureDrop(saddle, 0, air.rho, air.mu)).toBe(0);
    expect(stichlmairDryPressureDrop(saddle, -0.5, air.rho, air.mu)).toBe(
      -stichlmairDryPressureDrop(saddle, 0.5, air.rho, air.mu),
    );
    expect(stichlmairFloodVelocity(saddle, 0, water, air.rho, air.mu)).toBe(Infinity);
    expect(stichlmairFloodVelocity(saddle, 0.5, water, air.rho, air.mu)).toBe(0);
  });

  it('grows as the square of the gas velocity where only C3 acts', () => {
    const turbulent = { a: 260, eps: 0.68, C1: 0, C2: 0, C3: 1 };
    const one = stichlmairDryPressureDrop(turbulent, 1, air.rho, air.mu);
    expect(relative(stichlmairDryPressureDrop(turbulent, 2, air.rho, air.mu), 4 * one)).toBeLessThan(1e-14);
  });
});

describe('static hold-up', () => {
  // [Engel2001] as recalled, water at 25 degC, sigma 0.072, evaluated independently with g = 9.81.
  it.each([
    [110, 0.00279],
    [205, 0.01621],
    [250, 0.02046],
  ])('at a = %d 1/m is as computed elsewhere', (a, expected) => {
    expect(Math.abs(staticHoldup(a, 997, 0.072) - expected)).toBeLessThan(1.1e-5); // last digit; g
  });

  it('does not drain and does not change a running bed', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 0.033, noNaN: true }), share, (hs, part) => {
        expect(drainableHoldup(part * hs, hs)).toBe(0);
        expect(relative(drainableHoldup(3 * hs, hs), 3 * hs)).toBeLessThan(1e-6); // exp(-16)
        const h = hs * (1 + 3 * part);
        expect(drainableHoldup(h * 1.001, hs)).toBeGreaterThan(drainableHoldup(h, hs));
        expect(drainableHoldup(h, hs)).toBeLessThanOrEqual(h);
      }),
    );
  });
});
