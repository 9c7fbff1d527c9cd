/** Colours of the page as it is, for charts. */
import type { Palette } from '../charts/chart.ts';

/** Reads the tokens that hold at an element. */
export function readPalette(element: Element): Palette {
  const style = getComputedStyle(element);
  const token = (name: string): string => style.getPropertyValue(name).trim();
  return {
    paper: token('--paper'),
    ink: token('--ink'),
    quiet: token('--ink-2'),
    rule: token('--rule'),
    bad: token('--bad'),
    badSoft: token('--bad-soft'),
    shown: token('--accent'),
    lines: [0, 1, 2, 3, 4].map((k) => token(`--line-${k}`)),
  };
}
