import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

import type { Kind } from '../../sim/units.ts';
import {
  KINDS,
  formatNumber,
  formatQuantity,
  formatTime,
  kindsWithUnit,
  normaliseUnit,
  parseQuantity,
  unitsOf,
} from '../../sim/units.ts';

const KIND_NAMES = Object.keys(KINDS) as Kind[];

function si(text: unknown, kind: Kind): number {
  const parsed = parseQuantity(text, kind);
  return parsed.ok ? parsed.value : Number.NaN;
}

function reason(text: unknown, kind: Kind): string {
  const parsed = parseQuantity(text, kind);
  return parsed.ok ? 'none' : parsed.issue.reason;
}

// Factors as printed with seven figures in [SP811] appendix B.8 (recalled, not re-read).
const PRINTED: readonly (readonly [string, Kind, number])[] = [
  ['1 ft', 'length', 0.3048],
  ['1 in', 'length', 0.0254],
  ['1 gal/min', 'volume-flow', 6.30902e-5],
  ['1 cfm', 'volume-flow', 4.719474e-4],
  ['1 lb/h', 'mass-flow', 1.259979e-4],
  ['1 psi', 'pressure-difference', 6894.757],
  ['1 inH2O', 'pressure-difference', 249.0889],
  ['1 mmHg', 'pressure-difference', 133.3224],
  ['1 lb/ft3', 'density', 16.01846],
  ['1 lb/gal', 'density', 119.8264],
  ['1 lb/(ft s)', 'viscosity', 1.488164],
  ['1 ft2/h', 'diffusivity', 2.58064e-5],
  ['1 Btu/(h ft2 degF)', 'heat-transfer-coefficient', 5.678263],
  ['1 Btu/(h ft degF)', 'conductivity', 1.730735],
  ['1 cP', 'viscosity', 1e-3],
  ['1 ft3/min', 'volume-flow', 4.719474e-4],
  ['1 ft/min', 'velocity', 5.08e-3],
];

describe('conversion factors', () => {
  test.each(PRINTED)('%s as %s is %d in SI, as printed', (text, kind, printed) => {
    // Seven figures printed.
    expect(Math.abs(si(text, kind) / printed - 1)).toBeLessThan(1e-6);
  });

  test('a normal cubic metre is one over the molar volume of [CODATA2018]', () => {
    // 22.413 969 54e-3 m3/mol, ten figures printed.
    expect(Math.abs(si('1 Nm3/s', 'molar-flow') * 22.41396954e-3 - 1)).toBeLessThan(1e-9);
  });

  test('379.5 standard cubic feet at 60 degF and 14.696 psi are one pound-mole', () => {
    // Handbook figure of four digits, from memory.
    expect(Math.abs(si('379.5 scf/h', 'molar-flow') / si('1 lbmol/h', 'molar-flow') - 1)).toBeLessThan(2e-4);
  });

  test('every kind has an SI unit first, with factor one', () => {
    for (const kind of KIND_NAMES) expect(KINDS[kind].units[0]?.factor).toBe(1);
  });

  test('every example is read by its own kind', () => {
    for (const kind of KIND_NAMES) expect(si(KINDS[kind].example, kind)).not.toBeNaN();
  });

  test('no spelling stands twice within a kind', () => {
    for (const kind of KIND_NAMES) {
      const units: readonly { symbol: string; aliases: readonly string[] }[] = KINDS[kind].units;
      const spellings = units.flatMap(({ symbol, aliases }) => [symbol, ...aliases]);
      expect(new Set(spellings).size).toBe(spellings.length);
      for (const spelling of spellings) expect(normaliseUnit(spelling)).toBe(spelling);
    }
  });
});

describe('kinds, not strings', () => {
  test('a temperature and a temperature difference are not the same thing', () => {
    expect(si('25 degC', 'temperature')).toBeCloseTo(298.15, 10); // rounding of one addition
    expect(si('77 degF', 'temperature')).toBeCloseTo(298.15, 10); // exact by definition
    expect(si('9 delta degF', 'temperature-difference')).toBeCloseTo(5, 12);
    expect(reason('25 degC', 'temperature-difference')).toBe('unknown-unit');
    expect(si('25 K', 'temperature-difference')).toBe(25);
  });

  test('an absolute pressure says absolute or gauge', () => {
    expect(si('101.325 kPa(a)', 'absolute-pressure')).toBeCloseTo(101_325, 6);
    expect(si('0 kPa(g)', 'absolute-pressure')).toBeCloseTo(101_325, 6);
    expect(si('14.696 psia', 'absolute-pressure')).toBeCloseTo(101_325.35, 1); // 14.696 is rounded
    expect(si('1 atm', 'absolute-pressure')).toBe(101_325);
    expect(parseQuantity('101 kPa', 'absolute-pressure')).toMatchObject({
      ok: false,
      issue: { hint: 'say absolute or gauge: kPa(a) or kPa(g)' },
    });
    expect(si('2.6 kPa', 'pressure-difference')).toBeCloseTo(2600, 9);
    expect(reason('2.6 kPa(g)', 'pressure-difference')).toBe('unknown-unit');
  });

  test('a normal flow is no actual flow', () => {
    expect(reason('3870 m3/h', 'molar-flow')).toBe('unknown-unit');
    expect(reason('3870 Nm3/h', 'volume-flow')).toBe('unknown-unit');
    // 3870 Nm3/h over 22.414 L/mol is 47.96 mol/s.
    expect(si('3870 Nm3/h', 'molar-flow')).toBeCloseTo(47.961, 3);
  });

  test('ppm alone is refused in favour of ppmv or ppmw', () => {
    for (const kind of ['mole-fraction', 'mass-fraction'] as const) {
      const parsed = parseQuantity('400 ppm', kind);
      expect(parsed.ok ? '' : parsed.issue.hint).toContain('ppmv');
    }
    expect(si('400 ppmv', 'mole-fraction')).toBeCloseTo(4e-4, 15);
    expect(reason('400 ppmv', 'mass-fraction')).toBe('other-kind');
  });

  test('a mass where a length belongs is named as a mass', () => {
    expect(parseQuantity('6 kg', 'length')).toEqual({
      ok: false,
      issue: { expected: 'a length', hint: 'kg is a mass; write for example "5 m"', reason: 'other-kind' },
    });
  });
});

describe('spellings', () => {
  test('superscripts, degree and micro signs, blanks and thousands are understood', () => {
    expect(si('12\u00a0000\u202fNm\u00b3/h', 'molar-flow')).toBe(si('12000 Nm3/h', 'molar-flow'));
    expect(si('15 °C', 'temperature')).toBe(si('15 degC', 'temperature'));
    expect(si('15 ℃', 'temperature')).toBe(si('15 degC', 'temperature'));
    expect(si('10 µg/L', 'mass-concentration')).toBe(si('10 ug/L', 'mass-concentration'));
    expect(si('139 m^2/m^3', 'packing-area')).toBe(139);
    expect(si('75.3 J/(mol·K)', 'molar-heat-capacity')).toBe(75.3);
    expect(si('−3 K', 'temperature-difference')).toBe(-3);
    expect(si('.5 m', 'length')).toBe(0.5);
  });

  test('a decimal comma, a bare number and a missing unit are refused', () => {
    expect(reason('3,5 m', 'length')).toBe('no-number');
    expect(reason(5, 'length')).toBe('not-text');
    expect(reason('5', 'length')).toBe('no-unit');
    expect(reason('five m', 'length')).toBe('no-number');
    expect(reason('', 'length')).toBe('no-number');
    expect(reason('1e999 m', 'length')).toBe('no-number');
    expect(reason('1e307 km', 'length')).toBe('no-number');
  });

  test('the case of letters matters, and a slip is named', () => {
    const parsed = parseQuantity('3 KPA', 'pressure-difference');
    expect(parsed.ok ? '' : parsed.issue.hint).toBe('did you mean kPa?');
    expect(si('1 mPa s', 'viscosity')).toBe(1e-3);
  });
});

describe('times', () => {
  test.each([
    ['6 min 20 s', 380],
    ['1:05:00', 3900],
    ['90 s', 90],
    ['1.5 h', 5400],
    ['2 h 3 min 4.5 s', 7384.5],
    ['1h30min', 5400],
  ] as const)('%s is %d s', (text, seconds) => {
    expect(si(text, 'time')).toBe(seconds);
  });

  test('a sum in the wrong order, a unit twice and a two-part clock are refused', () => {
    expect(reason('20 s 6 min', 'time')).not.toBe('none');
    expect(reason('6 min 6 min', 'time')).not.toBe('none');
    expect(reason('1:05', 'time')).not.toBe('none');
  });

  test('what is written for people is read back', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 400_000 }), (seconds) => {
        expect(si(formatTime(seconds), 'time')).toBe(seconds);
      }),
    );
  });
});

describe('writing and reading back', () => {
  const unitOfKind = fc
    .constantFrom(...KIND_NAMES)
    .chain((kind) => fc.record({ kind: fc.constant(kind), unit: fc.constantFrom(...unitsOf(kind)) }));
  const size = fc.double({ min: 1e-9, max: 1e9, noNaN: true });

  test('parse(format(x)) is x in every unit of every kind', () => {
    fc.assert(
      fc.property(unitOfKind, size, fc.boolean(), ({ kind, unit }, magnitude, negative) => {
        const x = negative ? -magnitude : magnitude;
        const back = si(formatQuantity(x, kind, unit, 17), kind);
        // A few rounding errors of the value, and of the offset where the scale has its own zero.
        expect(Math.abs(back - x)).toBeLessThanOrEqual(
          4e-15 * Math.abs(x) + 4e-10 * Number(kind === 'absolute-pressure') + 4e-13 * Number(kind === 'temperature'),
        );
      }),
    );
  });

  test('n significant figures are within half of the last one', () => {
    fc.assert(
      fc.property(size, fc.integer({ min: 1, max: 15 }), (x, digits) => {
        // The last of n figures is worth at most 10^(1-n) of the number.
        expect(Math.abs(Number(formatNumber(x, digits)) / x - 1)).toBeLessThanOrEqual(0.5000001 * 10 ** (1 - digits));
      }),
    );
  });

  test('numbers are written without needless zeros', () => {
    expect(formatNumber(3870, 4)).toBe('3870');
    expect(formatNumber(0.5, 4)).toBe('0.5');
    expect(formatNumber(1.28e-9, 4)).toBe('1.28e-9');
    expect(formatNumber(123_456, 2)).toBe('120000');
    expect(formatNumber(0, 3)).toBe('0');
    expect(formatQuantity(288.15, 'temperature', 'degC', 4)).toBe('15 degC');
    expect(formatQuantity(0.5, 'fraction', '%', 3)).toBe('50 %');
  });

  test('any text is either read to a finite number or refused, never thrown at', () => {
    fc.assert(
      fc.property(fc.string(), fc.constantFrom(...KIND_NAMES), (text, kind) => {
        const parsed = parseQuantity(text, kind);
        expect(parsed.ok ? Number.isFinite(parsed.value) : parsed.issue.hint.length > 0).toBe(true);
      }),
    );
  });

  test('kinds can be found by their unit', () => {
    expect(kindsWithUnit('Nm3/h')).toEqual(['molar-flow']);
    expect(kindsWithUnit('furlong')).toEqual([]);
  });
});
