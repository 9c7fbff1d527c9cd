import { describe, expect, test } from 'vitest';

import { issueSentence } from '../../sim/case/issues.ts';
import { LONGEST_TEXT, readCase } from '../../sim/case/read.ts';
import { acetone, caseText, changed, faults, issuesOf, put } from './support.ts';

describe('broken cases', () => {
  test('a unit that does not exist', () => {
    expect(faults(changed('column/diameter', '0.82 metres'))).toEqual(['column.diameter: unit']);
  });

  test('a unit of another kind says what it is', () => {
    const [issue, ...rest] = issuesOf(changed('column/beds/0/height', '6 kg'));
    expect(rest).toEqual([]);
    expect(issue).toMatchObject({ path: 'column.beds[0].height', kind: 'kind', received: '"6 kg"' });
    expect(issue === undefined ? '' : issueSentence(issue)).toBe(
      'column.beds[0].height: expected a length in (0 m, 100 m], received "6 kg" - kg is a mass; write for example "5 m"',
    );
  });

  test('an unknown key names the nearest known one', () => {
    const [issue] = issuesOf(changed('column/diamter', '1 m'));
    expect(issue).toMatchObject({ path: 'column.diamter', kind: 'unknown-key', hint: 'did you mean "diameter"?' });
  });

  test('a missing field', () => {
    expect(faults(changed('column/diameter', undefined))).toEqual(['column.diameter: missing']);
    expect(faults(changed('gas/feed/rate', undefined))).toEqual(['gas.feed.rate: missing']);
    expect(faults(changed('liquid', undefined))).toEqual(['liquid: missing']);
  });

  test('a plant that contradicts itself', () => {
    expect(faults(changed('column/shellHeight', '4 m'))).toEqual(['column.beds: contradiction']);
    expect(faults(changed('liquid/sump/overflowLevel', '0.5 m'))).toEqual(['liquid.sump.overflowLevel: contradiction']);
    expect(faults(changed('liquid/mode', 'recirculated'))).toEqual(['liquid.makeUp: missing']);
    expect(faults(changed('gas/feed/composition', { acetone: '120 vol%' }))).toContain(
      'gas.feed.composition.acetone: range',
    );
  });

  test('a control loop with no time in it, a redistributor without liquid, a bed of two segments', () => {
    const tree = acetone();
    put(tree, 'instruments/FT-311/lag', '0 s');
    put(tree, 'controllers/LIC-312/instrument', 'FT-311');
    put(tree, 'controllers/LIC-312/setpoint', '2 L/s');
    put(tree, 'controllers/LIC-312/gain', '0.1 1/(L/s)');
    expect(faults(JSON.stringify(tree))).toEqual(['controllers.LIC-312.instrument: contradiction']);
    expect(faults(changed('column/beds/0/redistributorVolume', '0 L'))).toEqual([
      'column.beds[0].redistributorVolume: range',
    ]);
    expect(faults(changed('column/beds/0/segments', 2))).toEqual(['column.beds[0].segments: range']);
  });

  test('JSON cut off in the middle tells line and column', () => {
    const text = caseText('acetone-absorber');
    const cut = text.slice(0, text.indexOf('"humidity"') + 14);
    const [issue] = issuesOf(cut);
    expect(issue).toMatchObject({ kind: 'syntax', path: '', line: cut.split('\n').length });
    expect(issue?.column).toBeGreaterThan(1);
  });

  test('a trace with gaps names its rows', () => {
    const text = changed('scenarios/feed-spike/steps', [
      { at: '0 s', change: 'gas.composition.acetone', trace: 'feed.csv' },
    ]);
    const csv = 'time [s],acetone [ppmv]\n0,4000\n10,\n20,5000\n20,5100\n30,many\n';
    const issues = issuesOf(text, { resolveFile: () => csv });
    expect(issues.map(({ path, kind }) => `${path}: ${kind}`)).toEqual(
      Array.from({ length: 3 }, () => 'scenarios.feed-spike.steps[0].trace: trace'),
    );
    expect(issues.map(({ expected }) => /row (\d+)/.exec(expected)?.[1])).toEqual(['3', '5', '6']);
    expect(issues.map(({ received }) => received)).toEqual(['an empty cell', '"20"', '"many"']);
  });

  test('a file of 50 MB is refused before it is parsed', () => {
    const huge = ' '.repeat(50_000_000);
    expect(faults(huge)).toEqual([': too-large']);
    expect(issuesOf(huge)[0]?.received).toBe('50.0 MB');
    expect(faults(' '.repeat(LONGEST_TEXT))).toEqual([': syntax']);
  });

  test('an interlock on an instrument that does not exist names the nearest tag', () => {
    const [issue, ...rest] = issuesOf(changed('interlocks/IS-311/when/instrument', 'FT-3111'));
    expect(rest).toEqual([]);
    expect(issue).toMatchObject({
      path: 'interlocks.IS-311.when.instrument',
      kind: 'reference',
      hint: 'did you mean "FT-311"?',
    });
  });

  test('steps that wait for each other in a circle are refused with the circle', () => {
    const steps = [
      { id: 'a', after: 'c', start: 'P-310A' },
      { id: 'b', after: 'a', delay: '1 s', stop: 'P-310A' },
      { id: 'c', after: 'b', start: 'P-310B' },
    ];
    const [issue, ...rest] = issuesOf(changed('scenarios/pump-trip/steps', steps));
    expect(rest).toEqual([]);
    expect(issue).toMatchObject({ kind: 'cycle', received: 'a waits for c waits for b waits for a' });
  });

  test('all issues come at once, from every section', () => {
    const tree = acetone();
    put(tree, 'column/diameter', '0 m');
    put(tree, 'colour', 'red');
    put(tree, 'gas/feed/temperature', '30');
    put(tree, 'alarms/AAH-310/priority', 'urgent');
    put(tree, 'alarms/AAH-310/sound', 'loud');
    put(tree, 'controllers/LIC-312/instrument', 'LT-321');
    put(tree, 'carrier', 'airr');
    put(tree, 'run', { rtol: 1 });
    expect(faults(JSON.stringify(tree)).sort()).toEqual(
      [
        'alarms.AAH-310.priority: choice',
        'alarms.AAH-310.sound: unknown-key',
        'carrier: reference',
        'colour: unknown-key',
        'column.diameter: range',
        'controllers.LIC-312.instrument: reference',
        'gas.feed.temperature: unit',
        'run.rtol: range',
      ].sort(),
    );
  });
});

describe('cross checks', () => {
  test('a key that stands twice is an issue with its line', () => {
    const text = '{\n  "title": "a",\n  "title": "b"\n}';
    expect(issuesOf(text)[0]).toMatchObject({ path: 'title', kind: 'syntax', line: 3, column: 3 });
  });

  test('another format version is refused alone', () => {
    expect(faults(changed('formatVersion', 2))).toEqual(['formatVersion: version']);
    expect(faults(changed('formatVersion', undefined))).toEqual(['formatVersion: missing']);
  });

  test('a standby pump that does not exist cannot be started', () => {
    const issues = issuesOf(changed('liquid/pumps/standby', undefined));
    expect(issues.every(({ kind }) => kind === 'reference')).toBe(true);
    expect(issues.map(({ path }) => path)).toContain('scenarios.pump-trip.steps[1].start');
    expect(issues[0]?.hint).toContain('no standby pump');
  });

  test('steam over water is refused, in its own name and by what condenses', () => {
    expect(faults(changed('carrier', 'steam'))).toEqual(['carrier: contradiction']);
    const brine = put(JSON.parse(changed('carrier', 'steam')) as Record<string, unknown>, 'solvent', {
      base: 'water',
      id: 'brine',
    });
    expect(issuesOf(JSON.stringify(brine))[0]?.received).toContain('condenses');
  });

  test('water that is frozen or boils is refused', () => {
    expect(faults(changed('liquid/feed/temperature', '-3 degC'))).toEqual(['liquid.feed.temperature: contradiction']);
    expect(faults(changed('liquid/feed/temperature', '105 degC'))).toEqual(['liquid.feed.temperature: contradiction']);
  });

  test('a limit per normal volume must say wet or dry', () => {
    expect(faults(changed('limits/outlet-any-time/basis', undefined))).toEqual([
      'limits.outlet-any-time.basis: missing',
    ]);
    expect(faults(changed('limits/bed-dp/basis', 'dry'))).toEqual(['limits.bed-dp.basis: contradiction']);
  });

  test('an alarm has one side, in the kind of its instrument', () => {
    expect(faults(changed('alarms/FAL-311/high', '3 L/s'))).toEqual(['alarms.FAL-311: contradiction']);
    expect(faults(changed('alarms/FAL-311/low', '1.9 m'))).toEqual(['alarms.FAL-311.low: kind']);
    expect(faults(changed('alarms/FAL-311/deadband', '-0.1 L/s'))).toEqual(['alarms.FAL-311.deadband: range']);
    expect(faults(changed('alarms/AAH-310/deadband', '10 degC'))).toEqual(['alarms.AAH-310.deadband: kind']);
  });

  test('a controller gain needs the unit of its measurement', () => {
    expect(faults(changed('controllers/LIC-312/gain', '2 1/s'))).toEqual(['controllers.LIC-312.gain: unit']);
    expect(faults(changed('controllers/LIC-312/gain', 2))).toEqual(['controllers.LIC-312.gain: unit']);
    expect(faults(changed('controllers/LIC-312/gain', '-2 1/m'))).toEqual(['controllers.LIC-312.gain: range']);
    expect(faults(changed('controllers/LIC-312/output', 'cooler'))).toEqual([
      'controllers.LIC-312.output: contradiction',
    ]);
  });

  test('an action has one verb and only keys that go with it', () => {
    const at = 'scenarios/pump-trip/steps/0';
    expect(faults(changed(at, { at: '0 s', stop: 'P-310A', start: 'P-310B', id: 'trip' }))).toEqual([
      'scenarios.pump-trip.steps[0]: contradiction',
    ]);
    expect(faults(changed(at, { id: 'trip', at: '0 s' }))).toEqual(['scenarios.pump-trip.steps[0]: contradiction']);
    expect(faults(changed(at, { id: 'trip', at: '0 s', stop: 'P-310A', times: 2 }))).toEqual([
      'scenarios.pump-trip.steps[0].times: contradiction',
    ]);
    expect(faults(changed(at, { id: 'trip', at: '0 s', change: 'gas.rat', times: 2 }))).toEqual([
      'scenarios.pump-trip.steps[0].change: reference',
    ]);
    expect(faults(changed(at, { id: 'trip', at: '0 s', change: 'gas.temperature', times: 2 }))).toEqual([
      'scenarios.pump-trip.steps[0].times: contradiction',
    ]);
    expect(faults(changed(at, { id: 'trip', at: '0 s', change: 'gas.rate', to: '30 degC' }))).toEqual([
      'scenarios.pump-trip.steps[0].to: kind',
    ]);
    expect(faults(changed(at, { id: 'trip', stop: 'P-310A' }))).toEqual(['scenarios.pump-trip.steps[0]: missing']);
  });

  test('a duration covers its steps', () => {
    expect(faults(changed('scenarios/pump-trip/duration', '20 s'))).toContain(
      'scenarios.pump-trip.duration: contradiction',
    );
  });

  test('one tag belongs to one thing', () => {
    expect(faults(changed('liquid/valve/tag', 'P-310A'))).toEqual(['liquid.valve.tag: duplicate']);
  });

  test('a packing without friction constants does not go with hydraulics that need them', () => {
    expect(faults(changed('column/beds/0/packing', 'PR-MET-50'))).toEqual(['column.beds[0].packing.friction: missing']);
    expect(faults(changed('column/beds/0/packing', 'PR-MET-36'))).toEqual(['column.beds[0].packing: reference']);
  });

  test('exactly one measured coefficient', () => {
    expect(faults(changed('column/transfer', { model: 'measured' }))).toContain('column.transfer: contradiction');
    expect(faults(changed('column/transfer', { model: 'measured', HOG: '0.8 m', NOG: 6 }))).toContain(
      'column.transfer: contradiction',
    );
    expect(faults(changed('column/transfer', { model: 'measured', HG: '0.8 m' }))).toContain(
      'column.transfer.HL: missing',
    );
    expect(faults(changed('column/transfer', { model: 'guess' }))).toContain('column.transfer.model: choice');
  });

  test('an uncertain input names a number of the case', () => {
    expect(faults(changed('uncertainty/0/path', 'column.transfer.scaleAera'))).toEqual([
      'uncertainty[0].path: reference',
    ]);
    expect(faults(changed('uncertainty/0/times', [1.2, 0.8]))).toEqual(
      ['uncertainty[0]: contradiction'].map(() => 'uncertainty[0].times: contradiction'),
    );
  });

  test('a trace that nobody can resolve is an issue', () => {
    const text = changed('scenarios/feed-spike/steps', [{ at: '0 s', change: 'gas.rate', trace: 'no.csv' }]);
    expect(faults(text)).toEqual(['scenarios.feed-spike.steps[0].trace: reference']);
  });
});

describe('warnings', () => {
  const warned = (text: string): string[] => readCase(text).warnings.map(({ path, kind }) => `${path}: ${kind}`);

  test('the shipped case has none', () => {
    expect(warned(caseText('acetone-absorber'))).toEqual([]);
  });

  test('a setpoint that the instrument can never show', () => {
    expect(warned(changed('alarms/PDAH-310/high', '12 kPa'))).toEqual(['alarms.PDAH-310.high: range']);
  });

  test('a low alarm above the high one of the same instrument', () => {
    expect(warned(changed('alarms/LAL-312/low', '0.9 m'))).toEqual(['alarms.LAL-312.low: contradiction']);
  });

  test('a tag in an unusual shape', () => {
    expect(warned(changed('liquid/valve/tag', 'main water valve'))).toEqual(['liquid.valve.tag: style']);
  });
});
