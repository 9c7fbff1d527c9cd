import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

import { parseJson } from '../../sim/case/json.ts';
import { nearest, suggestion } from '../../sim/case/nearest.ts';

const PIECES = [
  '{',
  '}',
  '[',
  ']',
  ':',
  ',',
  '"',
  '\\',
  ' ',
  '\n',
  '-',
  '+',
  '0',
  '1',
  'e',
  'E',
  '.',
  't',
  'u',
  'true',
  'null',
  '"a"',
];

describe('JSON with line and column', () => {
  test('any JSON value is read as the platform reads it', () => {
    fc.assert(
      fc.property(fc.json(), (text) => {
        const parsed = parseJson(text);
        expect(parsed.ok ? JSON.stringify(parsed.value) : 'refused').toBe(JSON.stringify(JSON.parse(text)));
      }),
    );
  });

  test('what the platform refuses is refused, what it takes is taken', () => {
    // Small texts of JSON's own characters hit the grammar far more often than any text.
    const near = fc.array(fc.constantFrom(...PIECES), { maxLength: 8 });
    fc.assert(
      fc.property(near, (pieces) => {
        const text = pieces.join('');
        let taken = true;
        try {
          JSON.parse(text);
        } catch {
          taken = false;
        }
        expect(parseJson(text).ok).toBe(taken);
      }),
      { numRuns: 3000 },
    );
  });

  test.each([
    ['{"a": 1,}', 1, 9, 'a key in double quotes'],
    ['{\n  "a": 1\n  "b": 2\n}', 3, 3, 'a comma or }'],
    ["{'a': 1}", 1, 2, 'a key in double quotes'],
    ['{"a": tru}', 1, 7, 'a value: text in double quotes, a number, a list or an object'],
    ['{"a": "x\ny"}', 1, 9, 'text on one line; write a line break as \\n'],
    ['[1, 2', 1, 6, 'a comma or ]'],
    ['{} {}', 1, 4, 'the end of the file'],
    ['', 1, 1, 'a value: text in double quotes, a number, a list or an object'],
  ])('%j stops at line %d, column %d', (text, line, column, expected) => {
    expect(parseJson(text)).toMatchObject({ ok: false, fault: { line, column, expected } });
  });

  test('every key that stands twice is found, in place', () => {
    const parsed = parseJson('{"a": [{"b": 1, "b": 2}], "a": 3}');
    expect(parsed.ok ? parsed.duplicates.map(({ path }) => path.join('/')) : []).toEqual(['a/0/b', 'a']);
  });

  test('endless nesting ends with a fault, not with a crash', () => {
    expect(parseJson('['.repeat(100_000))).toMatchObject({ ok: false });
  });

  test('a key named __proto__ is only a key', () => {
    const parsed = parseJson('{"__proto__": {"polluted": true}}');
    expect(parsed.ok ? Object.keys(parsed.value as object) : []).toEqual(['__proto__']);
    expect(({} as Record<string, unknown>)['polluted']).toBeUndefined();
  });
});

describe('nearest known word', () => {
  test.each([
    ['diamter', 'diameter'],
    ['heigth', 'height'],
    ['FT-3111', 'FT-311'],
    ['Solvent', 'solvent'],
  ])('%s is near %s', (word, known) => {
    expect(nearest(word, ['solvent', 'diameter', 'height', 'FT-311', 'AT-310'])).toBe(known);
  });

  test('a word that is near nothing gets the list, when it is short', () => {
    expect(nearest('xylophone', ['duty', 'standby'])).toBeUndefined();
    expect(suggestion('xylophone', ['duty', 'standby'])).toBe('known: duty, standby');
    expect(suggestion('xylophone', [])).toBeUndefined();
  });
});
