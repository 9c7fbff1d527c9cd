/** Reads a table of tests/reference: lines with # are its heading, the first other line names the columns. */
import { readFileSync } from 'node:fs';

export function referenceTable(name: string): Record<string, string>[] {
  const text = readFileSync(new URL(`../reference/${name}`, import.meta.url), 'utf8');
  const [head, ...rows] = text
    .trim()
    .split('\n')
    .filter((line) => !line.startsWith('#'))
    .map((line) => line.split(','));
  return rows.map((row) => Object.fromEntries((head ?? []).map((key, i) => [key, row[i] ?? ''])));
}
