// Tables from CSV files that strangers wrote: delimiter and decimal sign are looked at first, units stand
// in the header, and every bad row is named by its line. No file is opened here: the caller resolves names.

import Papa from 'papaparse';

import { parseQuantity, unitEntry } from '../units.ts';
import type { Reading } from './reading.ts';
import { suggestion } from './nearest.ts';

/** A column's name and unit, from `acetone [ppmv]` or `acetone (ppmv)`. */
export interface TableColumn {
  readonly name: string;
  readonly unit: string;
}

/** Text cells under their columns; rows keep the line of the file they came from. */
export interface Table {
  readonly columns: readonly TableColumn[];
  readonly rows: readonly { readonly line: number; readonly cells: readonly string[] }[];
  readonly decimalComma: boolean;
}

/** Issues of one file beyond this many are counted, not listed. */
const LISTED_ROWS = 5;
const HEADER = /^(.*?)\s*(?:\[([^\]]*)\]|\(([^()]*(?:\([^()]*\)[^()]*)*)\))?$/;
const DELIMITERS: readonly string[] = ['\t', ';', ','];

/**
 * Reads a CSV text.
 *
 * @param name - Of the file, for issues.
 * @returns undefined after noting the issue.
 */
export function parseTable(reading: Reading, path: string, name: string, text: string): Table | undefined {
  const head = text
    .split(/\r?\n/)
    .slice(0, 20)
    .filter((line) => line.trim() !== '');
  const delimiter = DELIMITERS.find((sign) => head.length > 0 && head.every((line) => line.includes(sign)));
  if (delimiter === undefined) {
    reading.object(
      'trace',
      path,
      'a table with columns set apart by tab, semicolon or comma',
      `"${name}" without such columns`,
    );
    return undefined;
  }
  const result = Papa.parse<string[]>(text.replace(/^\uFEFF/, ''), { delimiter, skipEmptyLines: false });
  const all = result.data.map((cells, index) => ({ line: index + 1, cells: cells.map((cell) => cell.trim()) }));
  const filled = all.filter(({ cells }) => cells.some((cell) => cell !== ''));
  const [header, ...rows] = filled;
  if (header === undefined || rows.length === 0) {
    reading.object('trace', path, 'a header and at least one row', `"${name}" with ${filled.length} rows`);
    return undefined;
  }
  const columns = header.cells.map(columnOf);
  const decimalComma = delimiter !== ',' && rows.some(({ cells }) => cells.some((cell) => /^[+-]?\d+,\d+/.test(cell)));
  return { columns, rows, decimalComma };
}

/** Name and unit of a header cell. */
export function columnOf(cell: string): TableColumn {
  const match = HEADER.exec(cell);
  return { name: (match?.[1] ?? cell).trim(), unit: (match?.[2] ?? match?.[3] ?? '').trim() };
}

/** A sampled quantity over time. */
export interface Trace {
  /** s, ascending. */ readonly time: readonly number[];
  /** SI. */ readonly value: readonly number[];
}

/**
 * A trace from a file: the first column that is a time, and one column of values.
 *
 * @param column - Name of the column of values; may be left out when there is just one.
 * @param read - Value with unit to SI, noting its own issues.
 */
export function readTrace(
  reading: Reading,
  path: string,
  name: string,
  column: string | undefined,
  read: (where: string, text: string) => number | undefined,
): Trace | undefined {
  const text = fileText(reading, path, name);
  const table = text === undefined ? undefined : parseTable(reading, path, name, text);
  if (table === undefined) return undefined;
  const timeIndex = table.columns.findIndex(
    ({ name: title, unit }) => /^(time|t)$/i.test(title) || /^(s|min|h|d|h:mm:ss)$/.test(unit),
  );
  if (timeIndex < 0) {
    reading.object('trace', path, 'a column "time [s]" (or min, h, h:mm:ss)', `"${name}" without one`);
    return undefined;
  }
  const others = table.columns.map((_, i) => i).filter((i) => i !== timeIndex);
  const names = others.map((i) => table.columns[i]?.name ?? '');
  const found = column === undefined ? others : others.filter((i) => table.columns[i]?.name === column);
  const valueIndex = found[0];
  if (valueIndex === undefined || found.length > 1) {
    const received = column === undefined ? `columns ${names.join(', ')}` : `"${column}"`;
    const hint = column === undefined ? 'say which one with "column"' : suggestion(column, names);
    reading.object('trace', path, `one column of values in "${name}"`, received, hint);
    return undefined;
  }
  const faults = new RowFaults(reading, path, name);
  const time: number[] = [];
  const value: number[] = [];
  const unit = table.columns[valueIndex]?.unit ?? '';
  const timeUnit = table.columns[timeIndex]?.unit ?? '';
  // The unit once, so that a wrong one is one issue and not one a row.
  if (read(path, `1 ${unit}`.trim()) === undefined) return undefined;
  for (const { line, cells } of table.rows) {
    const t = timeOf(cells[timeIndex] ?? '', timeUnit, table.decimalComma);
    const number = numberOf(cells[valueIndex] ?? '', table.decimalComma);
    if (t === undefined) {
      faults.note(line, 'a time', cells[timeIndex] ?? '');
    } else if (number === undefined) {
      faults.note(line, 'a number', cells[valueIndex] ?? '');
    } else if (t <= (time.at(-1) ?? Number.NEGATIVE_INFINITY)) {
      faults.note(line, 'a time after that of the row before', cells[timeIndex] ?? '');
    } else {
      time.push(t);
      value.push(read(path, `${number} ${unit}`.trim()) ?? Number.NaN);
    }
  }
  if (faults.finish()) return undefined;
  return { time, value };
}

/** Text of a named file, or undefined after noting that there is none. */
export function fileText(reading: Reading, path: string, name: string): string | undefined {
  const text = reading.resolveFile?.(name);
  if (text === undefined) {
    reading.refuse('reference', path, 'a file that can be read', name, 'paths are relative to the case file');
  }
  return text;
}

/** The number of a cell; undefined for anything else. */
export function numberOf(cell: string, decimalComma: boolean): number | undefined {
  const text = decimalComma ? cell.replace(',', '.') : cell;
  if (!/^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/.test(text)) return undefined;
  const number = Number(text);
  return Number.isFinite(number) ? number : undefined;
}

function timeOf(cell: string, unit: string, decimalComma: boolean): number | undefined {
  if (cell.includes(':')) {
    const clock = parseQuantity(cell, 'time');
    return clock.ok ? clock.value : undefined;
  }
  const number = numberOf(cell, decimalComma);
  const factor = unit === '' ? 1 : unitEntry('time', unit)?.factor;
  return number === undefined || factor === undefined ? undefined : number * factor;
}

/** Bad rows of one file: the first few one by one, the rest as a count. */
export class RowFaults {
  #count = 0;
  readonly #reading: Reading;
  readonly #path: string;
  readonly #name: string;

  constructor(reading: Reading, path: string, name: string) {
    this.#reading = reading;
    this.#path = path;
    this.#name = name;
  }

  note(line: number, expected: string, received: string): void {
    this.#count += 1;
    if (this.#count > LISTED_ROWS) return;
    const shown = received === '' ? 'an empty cell' : `"${received.slice(0, 40)}"`;
    this.#reading.object('trace', this.#path, `${expected} in row ${line} of "${this.#name}"`, shown);
  }

  /** Whether there were faults; notes how many are not listed. */
  finish(): boolean {
    const rest = this.#count - LISTED_ROWS;
    if (rest > 0) {
      this.#reading.object('trace', this.#path, `no bad rows in "${this.#name}"`, `${rest} more bad rows`);
    }
    return this.#count > 0;
  }
}
