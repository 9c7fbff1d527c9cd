// Tags: each belongs to one thing, and looks like ISA-5.1 where the trade expects it.

import { join } from '../issues.ts';
import type { Reading } from '../reading.ts';

/** A tag with where it stands and what carries it. */
export interface TagUse {
  readonly tag: string;
  readonly path: string;
  readonly what: string;
}

/** Letters of function, a dash, a loop number, perhaps a suffix: `PDT-310`, `P-310A`. */
const SHAPE = /^[A-Z]{1,5}-\d{1,5}[A-Z]?$/;

/** Notes tags that two things carry, and warns of unusual ones. */
export function checkTags(reading: Reading, uses: readonly TagUse[]): void {
  const first = new Map<string, TagUse>();
  for (const use of uses) {
    const other = first.get(use.tag);
    if (other !== undefined) {
      reading.object(
        'duplicate',
        use.path,
        'a tag that nothing else carries',
        `"${use.tag}", the tag of ${other.what}`,
      );
      continue;
    }
    first.set(use.tag, use);
    if (!SHAPE.test(use.tag)) {
      reading.warn('style', use.path, 'a tag such as "FT-311" (letters, dash, loop number)', `"${use.tag}"`);
    }
  }
}

/** Tags that are the keys of a section. */
export function keyedTags(section: string, entries: Readonly<Record<string, unknown>>, what: string): TagUse[] {
  return Object.keys(entries).map((tag) => ({ tag, path: join(section, tag), what }));
}
