import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { GAS_CONSTANT, STANDARD_ATMOSPHERE } from '../../sim/properties/constants.ts';
import { antoinePressure, antoineSlope } from '../../sim/properties/antoine.ts';
import { constantRatioLaw } from '../../sim/properties/equilibrium/constant-ratio.ts';
import { henryLaw, henryPressure, henrySolubility } from '../../sim/properties/equilibrium/henry.ts';
import type { EquilibriumLaw } from '../../sim/properties/equilibrium/law.ts';
import { curveSlope, curveValue, monotoneCubic } from '../../sim/properties/equilibrium/monotone-cubic.ts';
import { nrtlLaw, nrtlLogGamma } from '../../sim/properties/equilibrium/nrtl.ts';
import { raoultLaw } from '../../sim/properties/equilibrium/raoult.ts';
import { tableCovers, tableLaw } from '../../sim/properties/equilibrium/table.ts';
import { vanLaarHenryLaw, vanLaarLaw, vanLaarLogGamma } from '../../sim/properties/equilibrium/van-laar.ts';
import {
  acetone,
  benzene,
  chloroform,
  ethanol,
  methanol,
  propanol,
  toluene,
  trichloroethylene,
} from '../../sim/properties/library/solutes.ts';
import type { Solute } from '../../sim/properties/library/solutes.ts';
import {
  antoineSaturation,
  heavyOil,
  solventConcentration,
  solventSaturation,
  water,
} from '../../sim/properties/library/solvents.ts';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);
const inWater = solventConcentration(water);

function known<V>(entry: { readonly value: V } | undefined): V {
  if (entry === undefined) throw new Error('the library has no such value');
  return entry.value;
}
const saturation = (solute: Solute) => antoineSaturation(known(solute.antoine));

describe('Henry constants in water', () => {
  it('put chloroform at 20 degC where a regulator has it', () => {
    // p/c = 310 Pa m3/mol in an EU risk assessment (range 279-337); 10 % between compilations.
    const volatility = 1 / henrySolubility(known(chloroform.henryInWater), 293.15);
    expect(relative(volatility, 309)).toBeLessThan(2e-3); // the entry's own figure, three digits
    expect(relative(volatility, 310)).toBeLessThan(0.1);
  });

  // y/x at 25 degC and 1 atm from c_water/(H p), three digits.
  it.each([
    [acetone, 2.02],
    [methanol, 0.273],
    [ethanol, 0.288],
    [chloroform, 219],
    [benzene, 321],
  ])('give the slope y/x of %o at 25 degC', (solute, m) => {
    const law = henryLaw(known(solute.henryInWater), inWater);
    const slope = law.slope(298.15, 0, STANDARD_ATMOSPHERE) / STANDARD_ATMOSPHERE;
    expect(relative(slope, m)).toBeLessThan(4e-3); // three digits
  });

  // gamma_inf = K/psat: acetone 6.68, methanol 1.63, ethanol 3.70 from the compiled constants and
  // remembered vapour pressures; 10 %, the spread of either.
  it.each([
    [acetone, 6.68],
    [methanol, 1.63],
    [ethanol, 3.7],
  ])('agree with vapour pressure on the activity coefficient of %o', (solute, gamma) => {
    const K = henryPressure(known(solute.henryInWater), inWater).value(298.15);
    expect(relative(K / saturation(solute).value(298.15), gamma)).toBeLessThan(0.1);
  });

  it('carry the heat of dissolution of their own temperature slope', () => {
    // Acetone: B 5500 K gives 45.7 kJ/mol on the concentration scale, 0.2 kJ less by water's expansion.
    const law = henryLaw(known(acetone.henryInWater), inWater);
    expect(relative(law.vaporisationEnthalpy(298.15), 45.7e3)).toBeLessThan(6e-3);
  });
});

describe('vapour pressures', () => {
  // Normal boiling points, degC, [Smith2018] table B.2 and [CRC2004] for the last.
  it.each([
    [acetone, 56.2],
    [benzene, 80.0],
    [chloroform, 61.1],
    [ethanol, 78.2],
    [methanol, 64.7],
    [propanol, 82.2],
    [toluene, 110.6],
    [trichloroethylene, 87.2],
  ])('of %o reach one atmosphere at the boiling point', (solute, t) => {
    const p = antoinePressure(known(solute.antoine), t + 273.15);
    expect(relative(p, STANDARD_ATMOSPHERE)).toBeLessThan(0.01); // 0.1 K printed is 0.3 %, fit 0.5 %
  });

  it('of benzene at 26 degC is that of the wash-oil example', () => {
    // [Treybal1980] illustration 8.2: 13.33 kPa (100 mmHg, read from a table).
    expect(relative(antoinePressure(known(benzene.antoine), 299.15), 13_330)).toBeLessThan(0.01);
    const law = raoultLaw(saturation(benzene));
    // The equilibrium line of the example: y* = 0.125 x at 107 kPa; three digits.
    expect(relative(law.slope(299.15, 0.1, 107e3) / 107e3, 0.125)).toBeLessThan(0.01);
  });

  it('slope as they should', () => {
    fc.assert(
      fc.property(fc.double({ min: 275, max: 380, noNaN: true }), (T) => {
        const constants = known(toluene.antoine);
        const h = 1e-3;
        const d = Math.log(antoinePressure(constants, T + h) / antoinePressure(constants, T - h)) / (2 * h);
        expect(relative(antoineSlope(constants, T), d)).toBeLessThan(1e-7); // central difference
      }),
    );
  });
});

describe('activity coefficients', () => {
  // [Perry2008] table 13-3 constants: infinite dilution at the boiling conditions 8.20, 2.23, 5.36.
  it.each([
    [acetone, 8.2],
    [methanol, 2.23],
    [ethanol, 5.36],
  ])('of van Laar for %o start at the fitted infinite dilution', (solute, gamma) => {
    const constants = known(solute.vanLaarInWater);
    expect(relative(Math.exp(vanLaarLogGamma(constants, 0)), gamma)).toBeLessThan(3e-3); // three digits
    expect(vanLaarLogGamma(constants, 1)).toBe(0);
  });

  it('of NRTL and van Laar for one pair tell the same story where both were fitted', () => {
    // Two published fits of one data set near the boiling range of acetone-water: within 10 % of gamma.
    for (const x of [0.1, 0.3, 0.5, 0.8]) {
      const one = Math.exp(nrtlLogGamma(known(acetone.nrtlInWater), 335, x));
      const other = Math.exp(vanLaarLogGamma(known(acetone.vanLaarInWater), x));
      expect(relative(one, other)).toBeLessThan(0.1);
    }
  });

  it('anchored on Henry equals Henry at dilution and falls below it with strength', () => {
    const henry = henryPressure(known(acetone.henryInWater), inWater);
    const law = vanLaarHenryLaw(known(acetone.vanLaarInWater), henry);
    expect(law.slope(298.15, 0, 1e5)).toBe(henry.value(298.15));
    expect(law.partialPressure(298.15, 0.05, 1e5)).toBeLessThan(0.85 * 0.05 * henry.value(298.15));
  });
});

const T = fc.double({ min: 280, max: 330, noNaN: true });
const x = fc.double({ min: 0, max: 0.2, noNaN: true });
/** Off the points of the table below, where a curve's second derivative jumps. */
const between = fc.integer({ min: 0, max: 1999 }).map((i) => 1e-4 * i + 5e-5);
const table = {
  T: [283.15, 293.15, 303.15],
  x: [0.02, 0.05, 0.1, 0.2],
  p: [
    [1000, 2600, 5600, 13000],
    [1600, 4200, 9000, 20500],
    [2500, 6400, 13800, 31000],
  ],
};
const laws: readonly (readonly [string, EquilibriumLaw])[] = [
  ['henry', henryLaw(known(acetone.henryInWater), inWater)],
  ['van Laar', vanLaarLaw(known(acetone.vanLaarInWater), saturation(acetone))],
  [
    'van Laar on Henry',
    vanLaarHenryLaw(known(ethanol.vanLaarInWater), henryPressure(known(ethanol.henryInWater), inWater)),
  ],
  ['NRTL', nrtlLaw(known(methanol.nrtlInWater), saturation(methanol))],
  ['Raoult', raoultLaw(saturation(benzene))],
  ['constant ratio', constantRatioLaw(1.3, 0)],
  ['table', tableLaw(table)],
];

describe.each(laws)('%s', (_name, law) => {
  it('has no pressure without solute and the slope of its own curve', () => {
    fc.assert(
      fc.property(T, between, (at, strength) => {
        expect(law.partialPressure(at, 0, 1e5)).toBe(0);
        const h = 1e-6;
        const d = (law.partialPressure(at, strength + h, 1e5) - law.partialPressure(at, strength - h, 1e5)) / (2 * h);
        expect(relative(law.slope(at, strength, 1e5), d)).toBeLessThan(1e-6); // central difference
      }),
    );
  });

  it('rises with the solute in the liquid', () => {
    fc.assert(
      fc.property(T, x, (at, strength) => {
        expect(law.slope(at, strength, 1e5)).toBeGreaterThan(0);
      }),
    );
  });
});

describe.each(laws.filter(([name]) => name !== 'constant ratio'))('%s with temperature', (name, law) => {
  it('has the heat of its temperature slope in the reference state', () => {
    fc.assert(
      fc.property(T, (at) => {
        const strength = name === 'van Laar' || name === 'Raoult' ? 1 : name === 'table' ? table.x[0] : 1e-9;
        fc.pre(!table.T.some((row) => Math.abs(row - at) < 1e-2));
        const h = 1e-3;
        const above = law.partialPressure(at + h, strength ?? 0, 1e5);
        const below = law.partialPressure(at - h, strength ?? 0, 1e5);
        const heat = (GAS_CONSTANT * at * at * Math.log(above / below)) / (2 * h);
        expect(relative(law.vaporisationEnthalpy(at), heat)).toBeLessThan(1e-5); // difference; x = 1e-9
      }),
    );
  });
});

describe('a table', () => {
  it('is met at every point and straight beyond its last', () => {
    const law = tableLaw(table);
    for (const [i, row] of table.p.entries()) {
      for (const [j, p] of row.entries()) {
        expect(relative(law.partialPressure(table.T[i] ?? 0, table.x[j] ?? 0, 1e5), p)).toBeLessThan(1e-12);
      }
    }
    const end = law.slope(283.15, 0.2, 1e5);
    expect(relative(law.partialPressure(283.15, 0.3, 1e5), 13000 + 0.1 * end)).toBeLessThan(1e-12);
    expect(tableCovers(table, 290, 0.1)).toBe(true);
    expect(tableCovers(table, 290, 0.21)).toBe(false);
    expect(tableCovers(table, 310, 0.1)).toBe(false);
  });

  it('with one temperature uses the stated heat', () => {
    const law = tableLaw({ T: [293.15], x: [0.1, 0.2], p: [[900, 2000]], heat: 35e3 });
    expect(law.vaporisationEnthalpy(300)).toBe(35e3);
    expect(law.partialPressure(350, 0.1, 1e5)).toBeCloseTo(900, 9); // a point of the table
  });
});

describe('monotone cubic', () => {
  it('never overshoots the points it joins', () => {
    const steps = fc.array(
      fc.tuple(fc.double({ min: 0.1, max: 5, noNaN: true }), fc.double({ min: 0, max: 9, noNaN: true })),
      {
        minLength: 2,
        maxLength: 8,
      },
    );
    fc.assert(
      fc.property(steps, fc.double({ min: 0, max: 1, noNaN: true }), (pairs, fraction) => {
        const xs = [0];
        const ys = [0];
        for (const [dx, dy] of pairs) {
          xs.push((xs.at(-1) ?? 0) + dx);
          ys.push((ys.at(-1) ?? 0) + dy);
        }
        const curve = monotoneCubic(xs, ys);
        const at = fraction * (xs.at(-1) ?? 0);
        const k = xs.findIndex((value, i) => value <= at && at <= (xs[i + 1] ?? Infinity));
        const value = curveValue(curve, at);
        expect(value).toBeGreaterThanOrEqual((ys[k] ?? 0) - 1e-12); // rounding
        expect(value).toBeLessThanOrEqual((ys[k + 1] ?? ys[k] ?? 0) + 1e-12);
        expect(curveSlope(curve, at)).toBeGreaterThanOrEqual(-1e-12);
      }),
    );
  });

  it('is exact for a straight line and third order for a smooth monotone curve', () => {
    const line = monotoneCubic([0, 1, 3, 4], [1, 3, 7, 9]);
    expect(curveValue(line, 2.2)).toBeCloseTo(5.4, 12); // rounding
    const error = (n: number): number => {
      const xs = Array.from({ length: n + 1 }, (_, i) => i / n);
      const curve = monotoneCubic(
        xs,
        xs.map((value) => Math.exp(value)),
      );
      let worst = 0;
      for (let i = 0; i <= 1000; i++) {
        worst = Math.max(worst, Math.abs(curveValue(curve, i / 1000) - Math.exp(i / 1000)));
      }
      return worst;
    };
    // Halving the spacing must cut the error by about 8 (third order); 6 leaves room for the end slopes.
    expect(error(20) / error(40)).toBeGreaterThan(6);
  });
});

describe('solvents', () => {
  it('give Raoult the saturation line', () => {
    const law = raoultLaw(solventSaturation(water));
    expect(relative(law.partialPressure(298.15, 1, 1e5), 3169.75)).toBeLessThan(1e-5); // IF97, six digits
    expect(law.partialPressure(298.15, 0.99, 1e5)).toBeCloseTo(0.99 * law.partialPressure(298.15, 1, 1e5), 9); // linear
  });

  it('include the wash oil of the benzene example, and mark what was made up', () => {
    // [Treybal1980] illustration 6.6.
    expect(heavyOil.density(300)).toBe(840);
    expect(heavyOil.viscosity(300)).toBe(2e-3);
    expect(heavyOil.surfaceTension(300)).toBe(0.03);
    expect(heavyOil.saturationPressure(340)).toBe(0);
    expect(heavyOil.viscosity(320)).toBeLessThan(heavyOil.viscosity(300));
    expect(heavyOil.provenance['viscosityExponent']?.verified).toBe('demo');
    expect(heavyOil.provenance['viscosity']?.verified).toBe('seen');
  });
});
