import { describe, expect, it } from 'vitest';
import { createColumn, type Column } from '../../sim/column/column.ts';
import { absorber, linearBed, withBeds } from '../support/column-cases.ts';
import { filled, march, steadyOf } from '../support/column-runs.ts';

// The column's Jacobian, auxiliary unknowns eliminated, against differences of its right-hand side, all entries.
// Entries are scaled by the states' typical magnitudes and seen against the largest of their row.

/** Dense Jacobian of the states: 0 = a + B w defines the auxiliary unknowns w, which Gauss's elimination takes out. */
function reduced(column: Column, y: Float64Array): Float64Array[] {
  const n = column.size + (column.auxiliary ?? 0);
  const { rowStart, column: columns } = column.pattern;
  const values = new Float64Array(columns.length);
  column.jacobian(0, y, values);
  const rows = Array.from({ length: n }, () => new Float64Array(n));
  rows.forEach((row, i) => {
    for (let e = rowStart[i]!; e < rowStart[i + 1]!; e++) row[columns[e]!] = values[e]!;
  });
  for (let p = n - 1; p >= column.size; p--) {
    let best = p;
    for (let r = column.size; r < p; r++) if (Math.abs(rows[r]![p]!) > Math.abs(rows[best]![p]!)) best = r;
    [rows[p], rows[best]] = [rows[best]!, rows[p]!];
    const pivot = rows[p]!;
    for (let r = 0; r < p; r++) {
      const factor = rows[r]![p]! / pivot[p]!;
      if (factor !== 0) for (let c = 0; c <= p; c++) rows[r]![c]! -= factor * pivot[c]!;
    }
  }
  return rows;
}

interface Difference {
  readonly row: number;
  readonly column: number;
  /** Jacobian less difference, over the largest of the row (or 1e-3 1/s where the row is that slow). */
  readonly error: number;
}

/** Central differences; forward ones at zero, where a share, an opening or an amount cannot go below. */
function differences(column: Column, y: Float64Array): Difference[] {
  const { size, scales } = column;
  const exact = reduced(column, y);
  const up = new Float64Array(size);
  const down = new Float64Array(size);
  const list: Difference[] = [];
  const largest = new Float64Array(size);
  for (let j = 0; j < size; j++) {
    const scale = scales[j]!;
    const isZero = Math.abs(y[j]!) < 1e-3 * scale;
    const h = isZero ? 1e-7 * Math.max(Math.abs(y[j]!), 0.01 * scale) : 1e-6 * Math.abs(y[j]!);
    const high = Float64Array.from(y);
    const low = Float64Array.from(y);
    high[j]! += h;
    if (!isZero) low[j]! -= h;
    column.rhs(0, high, up);
    column.rhs(0, low, down);
    for (let i = 0; i < size; i++) {
      const per = scale / scales[i]!;
      const slope = ((up[i]! - down[i]!) / (high[j]! - low[j]!)) * per;
      largest[i] = Math.max(largest[i]!, Math.abs(slope));
      list.push({ row: i, column: j, error: exact[i]![j]! * per - slope });
    }
  }
  return list.map((d) => ({ ...d, error: Math.abs(d.error) / Math.max(largest[d.row]!, 1e-3) }));
}

const worst = (list: readonly Difference[]): Difference =>
  list.reduce((a, b) => (a.error > b.error ? a : b), { row: -1, column: -1, error: 0 });

const tripped = (c: Column): void => {
  c.modes.pumpRunning[0] = false;
};
const plant = withBeds(absorber, { segments: 6 });

describe('the Jacobian of a bed with constant coefficients', () => {
  // Nothing displaces gas here, so the entries are meant exactly. Not meant: what the pressure's own rate does to the
  // storage of gas, and a change of the liquid supply, which a prescribed hold-up passes to all segments at once.
  it.each(['exponential', 'well-mixed'] as const)('is that of the right-hand side, %s faces', (scheme) => {
    const column = createColumn(linearBed({ NOG: 5, A: 1.3, segments: 6, scheme }));
    const start = steadyOf(column);
    const after = march(column, start, [3], () => undefined, {
      events: [{ at: 0, act: (c) => (c.modes.channels.gasComposition[0]! *= 2) }],
    });
    const { layout } = column;
    const left = [layout.topPressure, ...layout.pumpSpeed, layout.valves.solvent];
    for (const y of [start, after]) {
      const list = differences(column, y).filter((d) => !left.includes(d.column));
      expect(worst(list).error).toBeLessThan(1e-4);
    }
  });
});

describe('the Jacobian of a column with everything in it', () => {
  const states: { name: string; state: () => { column: Column; y: Float64Array } }[] = [
    {
      name: 'steady',
      state: () => {
        const column = createColumn(plant);
        return { column, y: steadyOf(column) };
      },
    },
    {
      name: 'draining, 12 s after the pump trips',
      state: () => {
        const column = createColumn(plant);
        const start = steadyOf(column);
        return { column, y: march(column, start, [12], () => undefined, { events: [{ at: 0, act: tripped }] }) };
      },
    },
    {
      name: 'filling from dry',
      state: () => {
        const column = createColumn(plant);
        const start = filled(column, { liquidOn: true, gasOn: true, holdup: 1e-4 });
        return { column, y: march(column, start, [8], () => undefined) };
      },
    },
  ];
  it.each(states)(
    '$name: is that of the right-hand side but for the gas that changing hold-up displaces',
    ({ state }) => {
      const { column, y } = state();
      const { layout } = column;
      const dropRows = [...layout.pressureDrop, layout.instruments[2]!]; // the third instrument shows the drop
      const list = differences(column, y).filter((d) => d.column !== layout.topPressure);
      // The cells' laws read the gas flow before, the linear systems after what the liquid's own rates displace: 1.8 % of
      // a row's largest entry measured, 6 % where the row is the pressure drop, which goes as the flow's square.
      const others = list.filter((d) => !dropRows.includes(d.row));
      expect(worst(others).error).toBeLessThan(0.025);
      expect(worst(list).error).toBeLessThan(0.08);
      // Most entries are far closer: 87 % and more measured.
      const close = others.filter((d) => d.error < 1e-4).length / others.length;
      expect(close).toBeGreaterThan(0.8);
    },
  );
});
