import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

import { parsePath, pathText, removeAt, setAt, valueAt, type Path } from '../../../ui/store/json-text.ts';

const TEXT = `{
  "a": { "b": [1, "two", { "c": 3.50 }], "d": null },
  "long": [
    { "x": 1 },
    { "x": 2 }
  ]
}
`;

describe('editing a JSON text at a path', () => {
  test('only the value changes; numbers, order and spacing stay as typed', () => {
    expect(setAt(TEXT, ['a', 'b', 1], 'zwei')).toBe(TEXT.replace('"two"', '"zwei"'));
    expect(setAt(TEXT, ['a', 'd'], 'x')).toBe(TEXT.replace('null', '"x"'));
  });

  test('a missing key is added at the end of its object, in the style of its neighbours', () => {
    expect(setAt(TEXT, ['a', 'e'], true)).toContain('"d": null, "e": true }');
    expect(setAt(TEXT, ['new', 'deep'], 1)).toContain('  ],\n  "new": { "deep": 1 }\n}');
    expect(setAt(TEXT, ['long', 2], { x: 3 })).toContain('    { "x": 2 },\n    { "x": 3 }\n  ]');
    expect(setAt('{}', ['a'], 1)).toBe('{\n  "a": 1\n}');
  });

  test('an entry is taken away with its comma', () => {
    expect(JSON.parse(removeAt(TEXT, ['a', 'b']))).toEqual({ a: { d: null }, long: [{ x: 1 }, { x: 2 }] });
    expect(JSON.parse(removeAt(TEXT, ['long', 1]))).toMatchObject({ long: [{ x: 1 }] });
    expect(removeAt('{ "a": 1 }', ['a'])).toBe('{}');
    expect(removeAt(TEXT, ['nothing', 'there'])).toBe(TEXT);
  });

  test('strings that look like structure are left alone', () => {
    const tricky = '{ "a": "}],\\"{", "b": 2 }';
    expect(setAt(tricky, ['b'], 3)).toBe('{ "a": "}],\\"{", "b": 3 }');
  });

  test('set, then read: the value is there and everything else is as before', () => {
    const key = fc.string({ minLength: 1, maxLength: 6 }).filter((k) => k !== '__proto__');
    fc.assert(
      fc.property(
        fc.dictionary(key, fc.jsonValue({ maxDepth: 3 })),
        key,
        fc.jsonValue({ maxDepth: 2 }),
        fc.integer({ min: 0, max: 4 }),
        (document, name, value, indent) => {
          const text = JSON.stringify(document, null, indent);
          const next = JSON.parse(setAt(text, [name], value)) as unknown;
          expect(next).toEqual(JSON.parse(JSON.stringify({ ...document, [name]: value })));
          const rest = Object.fromEntries(Object.entries(document).filter(([k]) => k !== name));
          expect(JSON.parse(removeAt(text, [name]))).toEqual(JSON.parse(JSON.stringify(rest)));
        },
      ),
    );
  });

  test('paths are written as issues write them', () => {
    const path: Path = ['column', 'beds', 0, 'height'];
    expect(pathText(path)).toBe('column.beds[0].height');
    expect(parsePath('column.beds[0].height')).toEqual(path);
    expect(valueAt({ column: { beds: [{ height: '5 m' }] } }, path)).toBe('5 m');
  });
});
