// Equilibrium as a table: read from CSV, its axes and rows checked.

import type { Kind } from '../../units.ts';
import { parseQuantity, unitEntry } from '../../units.ts';
import type { Equilibrium } from '../case.ts';
import { join } from '../issues.ts';
import type { Reading } from '../reading.ts';
import { RowFaults, fileText, numberOf, parseTable } from '../table.ts';
import { isAscending } from './curves.ts';

/** Reads an equilibrium table of long form: temperature, liquid mole fraction, partial pressure. */
export function readEquilibriumFile(reading: Reading, path: string, name: string): Equilibrium | undefined {
  const text = fileText(reading, path, name);
  const table = text === undefined ? undefined : parseTable(reading, path, name, text);
  if (table === undefined) return undefined;
  const find = (kind: Kind): number =>
    table.columns.findIndex(({ unit }) => unit !== '' && unitEntry(kind, unit) !== undefined);
  const index = { T: find('temperature'), x: find('mole-fraction'), p: find('pressure-difference') };
  if (index.T < 0 || index.x < 0 || index.p < 0) {
    const titles = table.columns.map(({ name: title, unit }) => `${title} [${unit}]`).join(', ');
    reading.object('trace', path, 'columns such as "temperature [degC]", "x [mol/mol]", "p [Pa]"', titles);
    return undefined;
  }
  const faults = new RowFaults(reading, path, name);
  const cell = (kind: Kind, at: number, cells: readonly string[]): number | undefined => {
    const number = numberOf(cells[at] ?? '', table.decimalComma);
    const parsed = number === undefined ? undefined : parseQuantity(`${number} ${table.columns[at]?.unit ?? ''}`, kind);
    return parsed?.ok === true ? parsed.value : undefined;
  };
  const points = new Map<number, Map<number, number>>();
  for (const { line, cells } of table.rows) {
    const T = cell('temperature', index.T, cells);
    const x = cell('mole-fraction', index.x, cells);
    const p = cell('pressure-difference', index.p, cells);
    if (T === undefined || x === undefined || p === undefined) {
      faults.note(line, 'three numbers', cells.join(' | '));
      continue;
    }
    const row = points.get(T) ?? new Map<number, number>();
    if (row.has(x)) faults.note(line, 'each temperature and strength once', cells.join(' | '));
    points.set(T, row.set(x, p));
  }
  if (faults.finish()) return undefined;
  const temperature = [...points.keys()].sort((a, b) => a - b);
  const moleFraction = [...new Set([...points.values()].flatMap((row) => [...row.keys()]))].sort((a, b) => a - b);
  const pressure = temperature.map((T) => moleFraction.map((x) => points.get(T)?.get(x) ?? Number.NaN));
  if (pressure.some((row) => row.some(Number.isNaN))) {
    reading.object('trace', path, 'a pressure for each temperature at each strength', `gaps in "${name}"`);
    return undefined;
  }
  return checkTable(reading, path, temperature, moleFraction, pressure);
}

/** A table whose axes ascend, start at zero strength, and whose rows are complete. */
export function checkTable(
  reading: Reading,
  path: string,
  temperature: readonly number[],
  moleFraction: readonly number[],
  pressure: readonly (readonly number[])[],
): Equilibrium | undefined {
  const before = reading.issues.length;
  const fault = (key: string, expected: string, received: string): void => {
    reading.object('contradiction', join(path, key), expected, received);
  };
  if (temperature.length === 0 || !isAscending(temperature))
    fault('temperature', 'ascending temperatures', 'another order');
  if (moleFraction.length < 2 || !isAscending(moleFraction))
    fault('moleFraction', 'two or more ascending strengths', 'another order');
  if (moleFraction[0] !== 0) fault('moleFraction', 'a first strength of 0', 'another one');
  if (pressure.length !== temperature.length) {
    fault('pressure', `${temperature.length} rows, one for each temperature`, `${pressure.length} rows`);
  }
  pressure.forEach((row, i) => {
    const where = `pressure[${i}]`;
    if (row.length !== moleFraction.length) fault(where, `${moleFraction.length} pressures`, `${row.length}`);
    else if (row[0] !== 0) fault(where, 'a first pressure of 0 Pa', 'another one');
    else if (row.some((p, j) => j > 0 && p < (row[j - 1] ?? p)))
      fault(where, 'pressures that do not fall with strength', 'a fall');
  });
  return reading.issues.length > before ? undefined : { model: 'table', temperature, moleFraction, pressure };
}
