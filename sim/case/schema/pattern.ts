// Regular expressions for editors: what a quantity of a kind looks like as text.

import type { Kind } from '../../units.ts';
import { KINDS } from '../../units.ts';

const NUMBER = String.raw`[+-]?\d[\d ]*(\.\d*)?([eE][+-]?\d+)?`;
const CLOCK = String.raw`\d+:[0-5]\d:[0-5]\d(\.\d+)?`;
const DURATION = String.raw`(\d+(\.\d+)? ?(d|h|min|s) ?)+`;

/** The pattern of a kind; superscripts and degree signs are allowed beside their plain spellings. */
export function quantityPattern(kind: Kind): string {
  const spellings: string[] = [];
  for (const unit of KINDS[kind].units) spellings.push(unit.symbol, ...unit.aliases);
  const bare = spellings.includes('');
  const units = spellings
    .filter((unit) => unit !== '')
    .map(unitPattern)
    .join('|');
  const one = `${NUMBER} ?(${units})${bare ? '?' : ''}`;
  return kind === 'time' ? `^(${one}|${DURATION}|${CLOCK})$` : `^${one}$`;
}

function unitPattern(unit: string): string {
  return unit
    .replace(/[.*+?^${}()|[\]\\/]/g, String.raw`\$&`)
    .replace(/2/g, '[2²₂]')
    .replace(/3/g, '[3³]')
    .replace(/deg ?/g, '(deg ?|°)')
    .replace(/^u/, '[uµμ]')
    .replace(/ /g, '[ ·]');
}
