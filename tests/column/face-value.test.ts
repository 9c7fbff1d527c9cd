import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { inletFace, interiorFace, outletFace, type FaceValue } from '../../sim/column/face-value.ts';

const face: FaceValue = { value: 0, d1: 0, d2: 0, d3: 0 };
type FaceRule = (a: number, b: number, c: number, out: FaceValue) => void;

const valueOf = (rule: FaceRule, a: number, b: number, c: number): number => {
  rule(a, b, c, face);
  return face.value;
};

/** Mean of a + b q^(z) over cell [j, j + 1] in units of the cell, and its value at z. */
const profile = (a: number, b: number, q: number) => ({
  mean: (j: number): number =>
    Math.abs(q - 1) < 1e-9 ? a + b * (1 + (q - 1) * (j + 0.5)) : a + (b * q ** j * (q - 1)) / Math.log(q),
  at: (z: number): number => a + b * q ** z,
});

/** Growth over one cell; resolved profiles only. Away from 1 by more than rounding of the differences allows. */
const growth = fc.double({ min: 0.3, max: 3, noNaN: true }).filter((q) => Math.abs(q - 1) > 1e-3);
const level = fc.double({ min: -2, max: 2, noNaN: true });
const share = fc.double({ min: 0, max: 1, noNaN: true });

describe('an exponential profile is carried through a face exactly', () => {
  // Rounding of the three differences: some 1e-13 at |q - 1| = 1e-3; the series' next term is below 1e-9.
  it('inside the chain', () => {
    fc.assert(
      fc.property(level, growth, (a, q) => {
        const f = profile(a, 1, q);
        const value = valueOf(interiorFace, f.mean(0), f.mean(1), f.mean(2));
        expect(Math.abs(value - f.at(2))).toBeLessThan(2e-9 * q * q);
      }),
    );
  });

  it('behind the inlet, from the inlet value and two means', () => {
    fc.assert(
      fc.property(level, growth, (a, q) => {
        const f = profile(a, 1, q);
        const value = valueOf(inletFace, f.at(0), f.mean(0), f.mean(1));
        // A table of the inlet's weight: 600 cubics with difference slopes.
        expect(Math.abs(value - f.at(1))).toBeLessThan(2e-6 * q);
      }),
    );
  });

  it('at the outlet, from the last three means', () => {
    fc.assert(
      // Levels that keep the profile well above zero, where nothing is bounded.
      fc.property(fc.double({ min: 2, max: 5, noNaN: true }), growth, fc.constantFrom(1, -0.02), (a, q, b) => {
        const f = profile(a, b, q);
        const value = valueOf(outletFace, f.mean(0), f.mean(1), f.mean(2));
        expect(Math.abs(value - f.at(3))).toBeLessThan(2e-9 * q ** 3);
      }),
    );
  });

  it('and so is a straight line, and a flat one', () => {
    expect(valueOf(interiorFace, 1, 2, 3)).toBeCloseTo(2.5, 14);
    expect(valueOf(inletFace, 0.5, 1, 2)).toBeCloseTo(1.5, 6); // the table's node spacing
    expect(valueOf(outletFace, 1, 2, 3)).toBeCloseTo(3.5, 14);
    for (const rule of [interiorFace, inletFace, outletFace]) expect(valueOf(rule, 7, 7, 7)).toBe(7);
  });
});

describe('faces make no new extremes', () => {
  it('inside, the value lies between the cell and its downstream neighbour', () => {
    fc.assert(
      fc.property(level, level, level, (u, c, d) => {
        const value = valueOf(interiorFace, u, c, d);
        expect(value).toBeGreaterThanOrEqual(Math.min(c, d) - 1e-12);
        expect(value).toBeLessThanOrEqual(Math.max(c, d) + 1e-12);
      }),
    );
  });

  it('behind the inlet likewise', () => {
    fc.assert(
      fc.property(level, level, level, (f, c1, c2) => {
        const value = valueOf(inletFace, f, c1, c2);
        expect(value).toBeGreaterThanOrEqual(Math.min(c1, c2) - 1e-15);
        expect(value).toBeLessThanOrEqual(Math.max(c1, c2) + 1e-15);
      }),
    );
  });

  it('at the outlet a quantity that is not negative stays so, and a front is not thrown past its own height', () => {
    fc.assert(
      fc.property(share, share, share, (uu, u, c) => {
        const value = valueOf(outletFace, uu, u, c);
        expect(value).toBeGreaterThanOrEqual(0);
        // At most four times the difference before, see the rule.
        expect(Math.abs(value - c)).toBeLessThanOrEqual(4 * Math.abs(u - uu) + 1e-12);
      }),
    );
    // A front that is about to leave: three cells hold 1, 0.9 and 0.1, or 0, 0.1 and 0.9.
    expect(valueOf(outletFace, 1, 0.9, 0.1)).toBeGreaterThan(0);
    expect(valueOf(outletFace, 0, 0.1, 0.9)).toBeLessThan(1.12);
  });

  it('at an extreme the cell itself leaves', () => {
    expect(valueOf(interiorFace, 1, 2, 1)).toBe(2);
    expect(valueOf(inletFace, 1, 2, 1)).toBe(2);
    expect(valueOf(outletFace, 1, 2, 1)).toBe(1);
  });
});

describe('slopes', () => {
  const rules: [string, FaceRule][] = [
    ['interior', interiorFace],
    ['inlet', inletFace],
    ['outlet', outletFace],
  ];
  it.each(rules)('of the %s face agree with central differences', (_name, rule) => {
    fc.assert(
      fc.property(share, share, share, (a, b, c) => {
        const first = b - a;
        const second = c - b;
        // Not across a kink: an extreme, the ratios where a bound begins, or a node of the inlet's table.
        fc.pre(Math.abs(first) > 0.02 && Math.abs(second) > 0.02);
        const ratio = second / first;
        fc.pre([0, 1, 3.4, 3.5, 4].every((kink) => Math.abs(ratio - kink) > 0.15));
        const h = 1e-6;
        const around = (da: number, db: number, dc: number): number =>
          (valueOf(rule, a + h * da, b + h * db, c + h * dc) - valueOf(rule, a - h * da, b - h * db, c - h * dc)) /
          (2 * h);
        const differences = [around(1, 0, 0), around(0, 1, 0), around(0, 0, 1)];
        rule(a, b, c, face);
        const slopes = [face.d1, face.d2, face.d3];
        slopes.forEach((slope, i) => {
          // Kinks at the bounds remain possible within h of a sample; 1e-5 is their size times their rarity's bound.
          expect(Math.abs(slope - differences[i]!)).toBeLessThan(1e-5 * (1 + Math.abs(slope)));
        });
      }),
    );
  });

  it('add up to one: a shift of all three moves the face by as much, but where the outlet is bounded by zero', () => {
    fc.assert(
      fc.property(share, share, share, (a, b, c) => {
        for (const [, rule] of rules) {
          rule(a + 2, b + 2, c + 2, face);
          expect(face.d1 + face.d2 + face.d3).toBeCloseTo(1, 9);
        }
      }),
    );
  });
});
