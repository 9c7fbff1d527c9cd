import { describe, expect, test } from 'vitest';

import { columnOf } from '../../sim/case/table.ts';
import { acetone, faults, issuesOf, mustRead, put } from './support.ts';

function withTrace(step: Record<string, unknown>): string {
  return JSON.stringify(put(acetone(), 'scenarios/feed-spike/steps', [{ at: '0 s', trace: 'feed.csv', ...step }]));
}

function trace(csv: string, step: Record<string, unknown> = { change: 'gas.composition.acetone' }) {
  const value = mustRead(withTrace(step), { resolveFile: () => csv });
  const action = value.scenarios.find(({ id }) => id === 'feed-spike')?.steps[0]?.actions[0];
  return action?.kind === 'change' && action.how.kind === 'trace' ? action.how : undefined;
}

function fault(csv: string, step: Record<string, unknown> = { change: 'gas.composition.acetone' }) {
  return issuesOf(withTrace(step), { resolveFile: () => csv });
}

describe('traces from strangers', () => {
  test('commas, units in the header, seconds', () => {
    const read = trace('time [s],acetone [ppmv]\n0,4000\n60,8000\n');
    expect(read?.time).toEqual([0, 60]);
    expect(read?.value[1]).toBeCloseTo(8e-3, 12);
  });

  test('semicolons, decimal commas, minutes, a byte order mark, Windows line ends, blank lines', () => {
    const read = trace('\uFEFFt (min);acetone (vol%)\r\n0;0,4\r\n\r\n1,5;0,8\r\n\r\n');
    expect(read?.time).toEqual([0, 90]);
    expect(read?.value[1]).toBeCloseTo(8e-3, 12);
  });

  test('tabs and clock times', () => {
    const read = trace('time\tgas [Nm3/h]\n0:00:00\t3870\n0:01:30\t4000\n', { change: 'gas.rate' });
    expect(read?.time).toEqual([0, 90]);
  });

  test('one column among several, by name', () => {
    const csv = 'time [s],a [ppmv],b [ppmv]\n0,1,2\n1,3,4\n';
    expect(trace(csv, { change: 'gas.composition.acetone', column: 'b' })?.value[0]).toBeCloseTo(2e-6, 15);
    expect(fault(csv)[0]).toMatchObject({ kind: 'trace', received: 'columns a, b' });
    expect(fault(csv, { change: 'gas.composition.acetone', column: 'c' })[0]).toMatchObject({ kind: 'trace' });
  });

  test('a unit of another kind is one issue, not one a row', () => {
    const issues = fault('time [s],acetone [degC]\n0,1\n1,2\n2,3\n');
    expect(issues.map(({ kind }) => kind)).toEqual(['kind']);
  });

  test('a thousand bad rows are five issues and a count', () => {
    const rows = Array.from({ length: 1000 }, (_, i) => `${i},x`).join('\n');
    const issues = fault(`time [s],acetone [ppmv]\n${rows}\n`);
    expect(issues).toHaveLength(6);
    expect(issues.at(-1)?.received).toBe('995 more bad rows');
  });

  test.each([
    ['', 'empty'],
    ['time [s]\n0\n1\n', 'one column'],
    ['time [s],acetone [ppmv]\n', 'no rows'],
    ['hour of day,acetone [ppmv]\n0,1\n', 'no time'],
    ['\u0000\u0001,;\t', 'binary'],
  ])('%j (%s) is an issue', (csv) => {
    expect(fault(csv).map(({ kind }) => kind)).toContain('trace');
  });

  test('values beyond what the quantity allows are issues', () => {
    expect(
      faults(withTrace({ change: 'gas.humidity' }), { resolveFile: () => 'time [s],h [%]\n0,50\n1,150\n' }),
    ).toEqual(['scenarios.feed-spike.steps[0].trace: range']);
  });

  test('headers with units in either bracket', () => {
    expect(columnOf('acetone [mg/Nm3]')).toEqual({ name: 'acetone', unit: 'mg/Nm3' });
    expect(columnOf('h (kJ/(mol K))')).toEqual({ name: 'h', unit: 'kJ/(mol K)' });
    expect(columnOf('time')).toEqual({ name: 'time', unit: '' });
  });
});
