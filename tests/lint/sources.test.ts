// Every source cited in the code, the cases and the tests stands in the bibliography of DEVELOPERS.md, and every
// entry there is cited by something. Reads some 250 small files, below 0.1 s.

import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const root = join(import.meta.dirname, '../..');
const guide = readFileSync(join(root, 'DEVELOPERS.md'), 'utf8');

/** Folders whose citations need an entry and keep an entry alive. */
const CITING = ['sim', 'cases', 'tests', 'ui'];
/** This file's examples are no citations. */
const SELF = 'tests/lint/sources.test.ts';
const READ = /\.(ts|js|json|csv|txt|html|css)$/;

/**
 * A key begins a bracket or follows a semicolon in it: names and a year, [Onda1968, eq. 1]; the number of a standard
 * or release, [R1-76], [ISA18.2]; or letters and digits alone, [IF97], which must then fill the bracket, so that an
 * array of constants in the code is not taken for one.
 */
const BRACKET = /(?<![\w)\]])\[([A-Za-z][^[\]\n]*)\]/g;
const KEY = /^(?:[A-Za-z]+(?:18|19|20)\d\d[a-z]?|[A-Z]+\d+(?:[-.]\d+)+)(?=$|[\s,])|^[A-Z]{2,}\d{2,3}$/;

function citedKeys(text: string): string[] {
  return [...text.matchAll(BRACKET)]
    .flatMap(([, inside = '']) => inside.split(';'))
    .map((part) => KEY.exec(part.trim())?.[0])
    .filter((key) => key !== undefined);
}

/** Keys of the entries, "- **[key]** ...", of the section Bibliography. */
function entryKeys(markdown: string): string[] {
  const [, section = ''] = /^## Bibliography$([\s\S]*?)(?=^## |$(?![\s\S]))/m.exec(markdown) ?? [];
  return [...section.matchAll(/^- \*\*\[([^\]]+)\]\*\* /gm)].map(([, key = '']) => key);
}

/** Keys that lack an entry, with the files that cite them. */
function missing(cited: ReadonlyMap<string, readonly string[]>, entries: readonly string[]): string[] {
  return [...cited].filter(([key]) => !entries.includes(key)).map(([key, files]) => `${key}: ${files.join(', ')}`);
}

function cited(): Map<string, string[]> {
  const found = new Map<string, string[]>();
  for (const folder of CITING) {
    if (!existsSync(join(root, folder))) continue;
    for (const name of readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })) {
      const file = `${folder}/${name}`;
      if (!READ.test(name) || file === SELF) continue;
      for (const key of new Set(citedKeys(readFileSync(join(root, file), 'utf8')))) {
        found.set(key, [...(found.get(key) ?? []), file]);
      }
    }
  }
  return found;
}

describe('sources', () => {
  const found = cited();
  const entries = entryKeys(guide);

  it('cited in the code, the cases or the tests stand in the bibliography', () => {
    expect(found.size).toBeGreaterThan(50); // else the search itself is broken
    expect(missing(found, entries)).toEqual([]);
  });

  it('cited in the guide itself stand in its bibliography', () => {
    expect(missing(new Map(citedKeys(guide).map((key) => [key, ['DEVELOPERS.md']])), entries)).toEqual([]);
  });

  it('of the bibliography are cited somewhere', () => {
    expect(entries.filter((key) => !found.has(key))).toEqual([]);
  });

  it('stand in the bibliography once, in alphabetical order', () => {
    const sorted = [...new Set(entries)].sort((a, b) => a.localeCompare(b, 'en', { sensitivity: 'base' }));
    expect(entries).toEqual(sorted);
  });
});

describe('the search for sources', () => {
  const madeUp = 'Nobody1999';

  it('finds a made-up key missing, and names who cites it', () => {
    const text = `/** As in [${madeUp}, p 3]. */`;
    expect(missing(new Map(citedKeys(text).map((key) => [key, ['a.ts']])), entryKeys(guide))).toEqual([
      `${madeUp}: a.ts`,
    ]);
  });

  it('reads one key or several, with or without a place in the work', () => {
    const inBrackets = (inside: string): string[] => citedKeys(`see [${inside}].`);
    expect(inBrackets(madeUp)).toEqual([madeUp]);
    expect(inBrackets(`${madeUp}, IV.8; Other2001b, eq. 2`)).toEqual([madeUp, 'Other2001b']);
    expect(inBrackets('vanOther1910')).toEqual(['vanOther1910']);
    expect(inBrackets('X1-76')).toEqual(['X1-76']);
    expect(inBrackets('XY18.2')).toEqual(['XY18.2']);
    expect(inBrackets('XY97')).toEqual(['XY97']);
  });

  it('takes arrays, indices and units for what they are', () => {
    expect(citedKeys('for (const m of [RODAS4, ROS34PW2]) use(table[AB12], [NOL99, 0.01], "[ppmv]");')).toEqual([]);
  });

  it('reads entries of the bibliography alone', () => {
    const text = `## Map\n\n- **[Not2000]** no entry\n\n## Bibliography\n\n- **[${madeUp}]** A. Nobody.\n\n## Decisions\n`;
    expect(entryKeys(text)).toEqual([madeUp]);
    expect(entryKeys(`## Bibliography\n\n- **[${madeUp}]** A. Nobody.\n`)).toEqual([madeUp]);
  });
});
