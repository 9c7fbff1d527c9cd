/**
 * The part of a sparse factorisation that depends on the pattern alone, done once: fill-in, and rows of like
 * structure gathered into panels ("supernodes") [DuffErismanReid2017, ch. 10-11]. Rows keep the order given; nothing is pivoted.
 *
 * A panel is a dense block of consecutive rows over its own ascending list of columns: first whole earlier panels
 * (multipliers of L), then its own columns, then the tail (U beyond the panel). Some entries of it stay zero.
 */

import { invariant } from '../errors.ts';
import type { SparsePattern } from './sparse-pattern.ts';

/** More rows than this in a panel only spoil the cache. */
const MAX_PANEL_ROWS = 8;
/** A row joins a panel when at most this share of the panel's entries becomes stored zeros; measured, flat between 0 and 0.25. */
const MAX_ZERO_SHARE = 0.1;

/** Consecutive rows first .. last-1 that share their columns. */
export interface Panel {
  readonly first: number;
  readonly last: number;
  /** Start of its row-major block in the value array; a row is `width` long. */
  readonly base: number;
  readonly width: number;
  /** Position of its own first column within a row; what precedes are multipliers. */
  readonly own: number;
  /** Positions own, own + 1, ... width - 1. */
  readonly ownPlaces: Int32Array;
  /** Columns of a row, ascending. */
  readonly columns: Int32Array;
  /** Earlier panels that are eliminated from this one, ascending. */
  readonly sources: readonly PanelSource[];
}

/** One earlier panel as seen from a later one. */
interface PanelSource {
  readonly panel: Panel;
  /** Position, within a row of the later panel, of each column of the earlier one from its own first on. */
  readonly places: Int32Array;
}

/** Panels plus the place of every entry of the pattern among the values. */
export interface SymbolicFactors {
  readonly panels: readonly Panel[];
  /** Place of each pattern entry, in pattern order. */
  readonly entryPlace: Int32Array;
  /** Place of each diagonal entry. */
  readonly diagonalPlace: Int32Array;
  /** Number of stored values. */
  readonly size: number;
}

/** Rows still being gathered. */
interface OpenPanel {
  first: number;
  last: number;
  columns: Set<number>;
}

/** Fill-in and panels of a pattern. */
export function symbolicFactors(pattern: SparsePattern): SymbolicFactors {
  const groups = gatherRows(pattern);
  const panels = layPanels(groups);
  const { rowStart, column, n } = pattern;
  const entryPlace = new Int32Array(column.length);
  const diagonalPlace = new Int32Array(n);
  for (const panel of panels) {
    const position = new Map<number, number>();
    panel.columns.forEach((col, at) => position.set(col, at));
    for (let i = panel.first; i < panel.last; i++) {
      const rowBase = panel.base + (i - panel.first) * panel.width;
      for (let e = rowStart[i]; e < rowStart[i + 1]; e++) {
        entryPlace[e] = rowBase + placeIn(position, column[e]);
      }
      diagonalPlace[i] = rowBase + panel.own + (i - panel.first);
    }
  }
  const end = panels.at(-1);
  const size = end === undefined ? 0 : end.base + (end.last - end.first) * end.width;
  return { panels, entryPlace, diagonalPlace, size };
}

function gatherRows(pattern: SparsePattern): OpenPanel[] {
  const closed: OpenPanel[] = [];
  let open: OpenPanel | undefined;
  for (let i = 0; i < pattern.n; i++) {
    const row = new Set<number>();
    for (let e = pattern.rowStart[i]; e < pattern.rowStart[i + 1]; e++) row.add(pattern.column[e]);
    for (const group of closed) eliminate(row, group);
    const joined = open && joinedColumns(open, row, i);
    if (open !== undefined && joined !== undefined) {
      open.columns = joined;
      open.last = i + 1;
      continue;
    }
    if (open !== undefined) {
      closed.push(open);
      eliminate(row, open);
    }
    open = { first: i, last: i + 1, columns: row };
  }
  if (open !== undefined) closed.push(open);
  return closed;
}

/** A row that touches a panel fills with all the panel's columns from its first own column on. */
function eliminate(row: Set<number>, group: OpenPanel): void {
  let touched = false;
  for (let c = group.first; c < group.last && !touched; c++) touched = row.has(c);
  if (!touched) return;
  for (const c of group.columns) if (c >= group.first) row.add(c);
}

/** Columns of the panel with row i added, or undefined when too many zeros would be stored. */
function joinedColumns(open: OpenPanel, row: Set<number>, i: number): Set<number> | undefined {
  const rows = i + 1 - open.first;
  if (rows > MAX_PANEL_ROWS) return undefined;
  const filled = new Set(row);
  eliminate(filled, open);
  const joined = new Set(open.columns);
  for (const c of filled) joined.add(c);
  for (let c = open.first; c <= i; c++) joined.add(c);
  const stored = rows * joined.size;
  const needed = (rows - 1) * open.columns.size + filled.size;
  return stored - needed <= MAX_ZERO_SHARE * stored ? joined : undefined;
}

function layPanels(groups: readonly OpenPanel[]): Panel[] {
  const panels: Panel[] = [];
  let base = 0;
  for (const { first, last, columns: set } of groups) {
    const columns = Int32Array.from(set).sort();
    const position = new Map<number, number>();
    columns.forEach((col, at) => position.set(col, at));
    const sources: PanelSource[] = [];
    for (const panel of panels) {
      if (!position.has(panel.first)) continue;
      const places = panel.columns.subarray(panel.own).map((col) => placeIn(position, col));
      sources.push({ panel, places });
    }
    const width = columns.length;
    const own = placeIn(position, first);
    const ownPlaces = Int32Array.from({ length: width - own }, (_, at) => own + at);
    panels.push({ first, last, base, width, own, ownPlaces, columns, sources });
    base += (last - first) * columns.length;
  }
  return panels;
}

function placeIn(position: ReadonlyMap<number, number>, col: number): number {
  const at = position.get(col);
  invariant(at !== undefined, 'the fill-in of every column is foreseen');
  return at;
}
