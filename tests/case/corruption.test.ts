import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

import { issueSentence } from '../../sim/case/issues.ts';
import { readCase } from '../../sim/case/read.ts';
import type { Tree } from './support.ts';
import { caseText } from './support.ts';

const TEXTS = ['acetone-absorber', 'methanol-recirculated', 'constant-coefficients', 'chloroform-stripper'].map(
  caseText,
);

/** Either a case (true), or issues that a person can read. Anything else is a defect. */
function survives(text: string): boolean {
  const result = readCase(text, { resolveFile: () => 'time [s],x [ppmv]\n0,1\n1,2\n' });
  if (result.ok) return true;
  expect(result.issues.length).toBeGreaterThan(0);
  for (const issue of result.issues) {
    const sentence = issueSentence(issue);
    expect(sentence).not.toMatch(/\[object|undefined|NaN/);
    expect(sentence.length).toBeLessThan(1200);
  }
  return false;
}

interface Spot {
  readonly holder: Tree;
  readonly key: string;
}

/** Every key and index of a tree. */
function spotsOf(tree: Tree): Spot[] {
  const out: Spot[] = [];
  const walk = (value: unknown): void => {
    if (typeof value !== 'object' || value === null) return;
    for (const key of Object.keys(value)) {
      out.push({ holder: value as Tree, key });
      walk((value as Tree)[key]);
    }
  };
  walk(tree);
  return out;
}

const text = fc.constantFrom(...TEXTS);
const wild = fc.oneof(
  fc.jsonValue(),
  fc.constantFrom<unknown>(
    '5 m',
    '-1 s',
    '1e308 km',
    '0 ppmv',
    '200 mol%',
    '-400 degC',
    '1:00:00',
    0,
    -1,
    '',
    null,
    [],
    {},
    'P-310A',
    'gas.rate',
    '__proto__',
    'constructor',
  ),
);

// Some thousand readings a test, 1-2 ms each; the limit leaves room for a busy machine.
describe('corrupted cases', { timeout: 60_000 }, () => {
  test('characters replaced, removed or added never make the reader throw', () => {
    const edits = fc.array(
      fc.tuple(fc.double({ min: 0, max: 1, noNaN: true }), fc.nat({ max: 3 }), fc.string({ maxLength: 4 })),
      { minLength: 1, maxLength: 6 },
    );
    fc.assert(
      fc.property(text, edits, (original, list) => {
        let changed = original;
        for (const [share, removed, added] of list) {
          const at = Math.floor(share * changed.length);
          changed = changed.slice(0, at) + added + changed.slice(at + removed);
        }
        survives(changed);
      }),
      { numRuns: 300 },
    );
  });

  test('a case cut off anywhere is a syntax issue', () => {
    fc.assert(
      fc.property(text, fc.double({ min: 0, max: 0.99, noNaN: true }), (original, share) => {
        const result = readCase(original.slice(0, Math.floor(share * original.length)));
        expect(result.ok ? '' : result.issues[0]?.kind).toBe('syntax');
      }),
      { numRuns: 100 },
    );
  });

  test('any value in any place never makes the reader throw', () => {
    const changes = fc.array(fc.tuple(fc.nat(), wild), { minLength: 1, maxLength: 4 });
    fc.assert(
      fc.property(text, changes, (original, list) => {
        const tree = JSON.parse(original) as Tree;
        for (const [number, value] of list) {
          const spots = spotsOf(tree);
          const spot = spots[number % spots.length];
          if (spot !== undefined) spot.holder[spot.key] = value;
        }
        survives(JSON.stringify(tree));
      }),
      { numRuns: 500 },
    );
  });

  test('values that moved to another place never make the reader throw', () => {
    fc.assert(
      fc.property(text, fc.array(fc.tuple(fc.nat(), fc.nat()), { minLength: 1, maxLength: 5 }), (original, list) => {
        const tree = JSON.parse(original) as Tree;
        for (const [from, to] of list) {
          const spots = spotsOf(tree);
          const source = spots[from % spots.length];
          const target = spots[to % spots.length];
          if (source === undefined || target === undefined) continue;
          target.holder[target.key] = structuredClone(source.holder[source.key]);
        }
        survives(JSON.stringify(tree));
      }),
      { numRuns: 500 },
    );
  });

  test('a key left out anywhere is either a default or an issue', () => {
    let read = 0;
    let refused = 0;
    for (const original of TEXTS) {
      const count = spotsOf(JSON.parse(original) as Tree).length;
      for (let index = 0; index < count; index += 1) {
        const tree = JSON.parse(original) as Tree;
        const spot = spotsOf(tree)[index];
        if (spot === undefined || Array.isArray(spot.holder)) continue;
        Reflect.deleteProperty(spot.holder, spot.key);
        if (survives(JSON.stringify(tree))) read += 1;
        else refused += 1;
      }
    }
    expect(read).toBeGreaterThan(100);
    expect(refused).toBeGreaterThan(100);
  });
});
