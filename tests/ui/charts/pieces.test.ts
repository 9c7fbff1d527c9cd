// Costs some 1 s: two runs on six segments.
import { describe, expect, test } from 'vitest';

import { createRun, readCase } from '../../../sim/index.ts';
import { answerChart, headlineLanes } from '../../../ui/charts/answer-chart.ts';
import { trailingMean } from '../../../ui/charts/average.ts';
import { decimate, valueAtTime } from '../../../ui/charts/decimate.ts';
import { laneChart } from '../../../ui/charts/lane-chart.ts';
import { chosenMap, fieldAt, mapChart } from '../../../ui/charts/map-chart.ts';
import { tableCsv } from '../../../ui/charts/chart.ts';
import { clock, clockMarks, fieldTime } from '../../../ui/format/clock.ts';
import { displayOf } from '../../../ui/format/units.ts';
import { packRun } from '../../../ui/worker/pack.ts';
import { quickCase } from '../support/session.ts';

const palette = {
  paper: '#fff',
  ink: '#000',
  quiet: '#555',
  rule: '#ccc',
  bad: '#a30',
  badSoft: '#fdd',
  shown: '#05a',
  lines: ['#000', '#111'],
};
const axis = { from: 0, to: 100, upset: 30, left: 60, right: 10 };
const units = { system: 'case' as const, own: {} };

function packet(text = quickCase()) {
  const read = readCase(text);
  if (!read.ok) throw new Error('the case does not read');
  const run = createRun(read.value, read.value.scenarios[0]!);
  run.takeProfiles([0, 50, 100]);
  run.advance(Infinity);
  return packRun(run, text, 'full');
}
const run = packet();
const runs = [{ label: 'run', line: 0, packet: run }];

describe('a run drawn', () => {
  test('the average in the answer lane reaches the worst average of the answers', () => {
    const limit = headlineLanes(run).find((l) => l.averaging !== undefined)!;
    const answer = run.document.answers.limits.find((l) => l.id === limit.id)!;
    const mean = trailingMean(run.time, limit.value, limit.averaging!.window);
    // The lane is in mg/Nm3, the answer a mole fraction: compared by the limit that both hold. Between recorded moments.
    expect(Math.max(...mean) / limit.limit).toBeCloseTo(answer.average!.peak!.value / answer.limit.value, 5);
  });

  test('the lane of the answer has its peak', () => {
    const spec = answerChart({ runs, axis, units, palette, height: 170, isLog: false, mostMarks: 8 })!;
    expect(spec.title).toBe('acetone in the gas outlet, mg/Nm3 dry');
    const { columns, rows } = spec.table();
    expect(columns[0]).toBe('time from the upset [s]');
    expect(rows).toHaveLength(run.time.length);
    const worst = Math.max(...rows.map((r) => Number(r[1])));
    expect(worst / run.document.answers.limits[0]!.peak.mgPerNm3!).toBeCloseTo(1, 3); // a parabola refines the answer
  });

  test('text of a case is shown letter by letter, never as markup', () => {
    const text = quickCase().replaceAll('AAH-310', 'A<b>$x$</b>&H');
    const spec = laneChart({
      tag: 'AT-310',
      runs: [{ label: 'r', line: 0, packet: packet(text) }],
      axis,
      units,
      palette,
      height: 80,
      mostMarks: 8,
    })!;
    const said = JSON.stringify(spec.layout.annotations);
    expect(said).toContain('A&lt;b&gt;&#36;x&#36;&lt;/b&gt;&amp;H');
    expect(said).not.toContain('<b>');
  });

  test('US customary units are those that the command line writes', () => {
    const us = { system: 'us' as const, own: {} };
    expect(displayOf({ kind: 'temperature', unit: 'K', ownUnit: 'degC' }, us).text(300)).toBe('80.33 degF');
    expect(displayOf({ kind: 'temperature', unit: 'K', ownUnit: 'degC' }, units).text(300)).toBe('26.85 degC');
    expect(displayOf({ kind: 'length', unit: 'm' }, { system: 'us', own: { length: 'cm' } }).text(0.5)).toBe('50 cm');
    expect(displayOf({ kind: 'gas-strength', unit: 'mg/Nm3' }, us).text(350)).toBe('350 mg/Nm3');
  });

  test('the map takes the profile at its moments and the straight line between', () => {
    const { map } = run;
    const field = map.fields.holdup!;
    expect(fieldAt(map, field, 3, 50)).toBe(field[map.cells + 3]);
    expect(fieldAt(map, field, 3, 25)).toBeCloseTo(0.5 * (field[3]! + field[map.cells + 3]!), 12);
    const choice = chosenMap(run, 'holdup', units)!;
    const spec = mapChart({ packet: run, choice, axis, units, palette, height: 150, mostMarks: 8 });
    expect(spec.table().rows).toHaveLength(3);
    expect(spec.table().columns).toHaveLength(1 + map.cells);
  });
});

describe('thinning out', () => {
  test('keeps every extreme and the ends', () => {
    const time = Array.from({ length: 100_000 }, (_, i) => i);
    const value = time.map((t) => (t === 77_777 ? 9 : t === 12_345 ? -9 : Math.sin(t)));
    const { x, y } = decimate(time, value, 0, 99_999);
    expect(x.length).toBeLessThan(2001);
    expect([Math.max(...y), Math.min(...y), x[0], x[x.length - 1]]).toEqual([9, -9, 0, 99_999]);
  });

  test('a short series stays whole, with a neighbour beyond each edge', () => {
    expect(decimate([0, 1, 2, 3, 4, 5], [0, 1, 2, 3, 4, 5], 1.5, 3.5).x).toEqual([1, 2, 3, 4]);
  });

  test('reads between moments, and the later value where two share a time', () => {
    expect(valueAtTime([0, 2], [0, 10], 0.5)).toBe(2.5);
    expect(valueAtTime([0, 2, 2, 4], [0, 1, 5, 5], 2)).toBe(5);
    expect(valueAtTime([1, 2], [3, 4], 0)).toBe(3);
  });
});

describe('the average over a window', () => {
  test('of a step is the share of the window behind it', () => {
    // 0 until 10 s, then 1: after 5 s more a 20 s window holds a quarter.
    expect(trailingMean([0, 10, 10, 15, 40], [0, 0, 1, 1, 1], 20)[3]).toBeCloseTo(0.25, 12);
    expect(trailingMean([0, 10, 10, 15, 40], [0, 0, 1, 1, 1], 20)[4]).toBeCloseTo(1, 12);
  });
  test('before the start the first value holds', () => {
    expect(trailingMean([0, 10], [2, 2], 100)[1]).toBeCloseTo(2, 12);
  });
});

describe('times', () => {
  test('are h:mm:ss from the upset, with a minus before it', () => {
    expect([clock(0), clock(3725), clock(-30), clock(61.06, true), clock(-0.01)]).toEqual([
      '0:00:00',
      '1:02:05',
      '\u22120:00:30',
      '0:01:01.1',
      '0:00:00',
    ]);
    expect(clockMarks(0, 300, 30, 6).map((m) => m.text)).toEqual([
      '0:00:00',
      '0:01:00',
      '0:02:00',
      '0:03:00',
      '0:04:00',
    ]);
    expect(fieldTime(41.26)).toBe('41.3 s');
  });
});

test('a table as CSV quotes what needs it', () => {
  expect(tableCsv({ columns: ['a, "b"', 'c'], rows: [[1, 2.5]] })).toBe('"a, ""b""",c\r\n1,2.5\r\n');
});
