import { describe, expect, it } from 'vitest';
import type { Alarm, Interlock } from '../../sim/case/case.ts';
import { TRACE } from '../support/column-cases.ts';
import { at, eventTimes, feedAnalyser, ramp, runThrough, smallPlant } from './support.ts';

// Alarms and interlocks on straight ramps of the feed's strength, whose crossings are known to the last digit.
// Strengths in units of the design feed: 1 at the start.

/** Event times are located to 1e-9 s on a ramp; 1e-6 leaves room for the quartic that keeps the dead time. */
const rounded = (times: readonly number[]): number[] => times.map((t) => Math.round(t * 1e6) / 1e6);

describe('an alarm', () => {
  const high: Alarm = {
    tag: 'AAH-1',
    instrument: 'AT-1',
    kind: 'high',
    setpoint: 1.5 * TRACE,
    deadband: 0.1 * TRACE,
    onDelay: 5,
    offDelay: 10,
    priority: 'high',
  };
  const plant = (alarm: Alarm, deadTime = 0) =>
    smallPlant({ instruments: [feedAnalyser('AT-1', { deadTime })], alarms: [alarm] });

  it('annunciates its on-delay after the setpoint, clears its off-delay after setpoint less deadband', () => {
    // Up by 0.01 a second from 10 s: 1.5 at 60 s. Down by 0.01 from 200 s: 1.4 at 260 s.
    const run = runThrough(plant(high), [at(10, ramp(2, 100)), at(200, ramp(1, 100))], 400);
    expect(rounded(eventTimes(run, 'alarm', 'AAH-1'))).toEqual([65]);
    expect(rounded(eventTimes(run, 'alarm-cleared', 'AAH-1'))).toEqual([270]);
  });

  it('waits for a dead time too', () => {
    const run = runThrough(plant(high, 12), [at(10, ramp(2, 100)), at(200, ramp(1, 100))], 400);
    expect(rounded(eventTimes(run, 'alarm', 'AAH-1'))).toEqual([77]);
    expect(rounded(eventTimes(run, 'alarm-cleared', 'AAH-1'))).toEqual([282]);
  });

  it('passes over a peak shorter than its on-delay', () => {
    // Above 1.5 from 60 to 64 s, then from 160 s on.
    const steps = [at(10, ramp(1.52, 52)), at(62, ramp(1, 52)), at(120, ramp(2, 80))];
    const run = runThrough(plant(high), steps, 240);
    expect(rounded(eventTimes(run, 'alarm', 'AAH-1'))).toEqual([165]);
  });

  it('does not clear within the deadband, nor on a dip shorter than its off-delay', () => {
    // Annunciates at 65 s; down to 1.42 and back; down to 1.36 and back within 8 s below 1.4; then for good.
    const steps = [
      at(10, ramp(1.6, 60)),
      at(100, ramp(1.42, 18)),
      at(120, ramp(1.6, 18)),
      at(150, ramp(1.36, 24)),
      at(174, ramp(1.6, 24)),
      at(220, ramp(1.2, 40)),
    ];
    const run = runThrough(plant(high), steps, 300);
    expect(rounded(eventTimes(run, 'alarm', 'AAH-1'))).toEqual([65]);
    expect(rounded(eventTimes(run, 'alarm-cleared', 'AAH-1'))).toEqual([250]);
  });

  it('low is the mirror of high', () => {
    const low: Alarm = { ...high, tag: 'AAL-1', kind: 'low', setpoint: 0.5 * TRACE };
    // Down by 0.01: 0.5 at 60 s; up again from 200 s: 0.6 at 260 s.
    const run = runThrough(plant(low), [at(10, ramp(0, 100)), at(200, ramp(1, 100))], 400);
    expect(rounded(eventTimes(run, 'alarm', 'AAL-1'))).toEqual([65]);
    expect(rounded(eventTimes(run, 'alarm-cleared', 'AAL-1'))).toEqual([270]);
  });
});

describe('an interlock', () => {
  const three = ['A', 'B', 'C'];
  const trip: Interlock = {
    tag: 'IS-1',
    kind: 'trip',
    conditions: three.map((t) => ({ instrument: t, kind: 'above', value: 1.5 * TRACE, holdFor: 2 })),
    votes: 2,
    delay: 3,
    actions: [{ kind: 'valve', valve: 'gas-inlet', command: 0 }],
    resetPermissive: { instrument: 'B', kind: 'below', value: 1.2 * TRACE, holdFor: 5 },
  };
  // A shows 0.1 too much, C 0.1 too little: on the ramp from 10 s they pass 1.5 at 50, 60 and 70 s.
  const plant = (interlock: Interlock) =>
    smallPlant({
      instruments: [
        feedAnalyser('A', { bias: 0.1 * TRACE }),
        feedAnalyser('B'),
        feedAnalyser('C', { bias: -0.1 * TRACE }),
      ],
      interlocks: [interlock],
    });
  const command = (what: 'reset' | 'bypass' | 'restore') =>
    ({ kind: 'interlock', tag: 'IS-1', command: what }) as const;

  it.each([
    { votes: 1, acts: 55 },
    { votes: 2, acts: 65 },
    { votes: 3, acts: 75 },
  ])('with $votes of three votes acts at $acts s: crossing, two seconds held, three of delay', ({ votes, acts }) => {
    const run = runThrough(plant({ ...trip, votes }), [at(10, ramp(2, 100))], 150);
    expect(rounded(eventTimes(run, 'interlock', 'IS-1'))).toEqual([acts]);
    expect(run.column.modes.valveCommand['gas-inlet']).toBe(0);
  });

  it('needs its votes at the same time', () => {
    // One after another: A alone is above 1.5 (1.45 + 0.1) for 20 s; then a fault holds C high while A is low.
    const steps = [
      at(10, ramp(1.45, 45)),
      at(75, ramp(1, 45)),
      at(150, { kind: 'instrument', tag: 'C', fault: { bias: TRACE } }),
    ];
    const run = runThrough(plant(trip), steps, 250);
    expect(rounded(eventTimes(run, 'interlock', 'IS-1'))).toEqual([]);
  });

  it('stays latched, refuses a reset until the permissive has held, then resets', () => {
    // Down by 0.01 from 200 s; B is below 1.2 from 280 s, which counts from 285 s.
    const steps = [at(10, ramp(2, 100)), at(150, command('reset')), at(200, ramp(1, 100)), at(283, command('reset'))];
    const run = runThrough(plant(trip), [...steps, at(290, command('reset'))], 400);
    expect(rounded(eventTimes(run, 'interlock', 'IS-1'))).toEqual([65]);
    expect(run.events.filter((e) => e.kind === 'interlock-refused').map((e) => e.time)).toEqual([150, 283]);
    expect(rounded(eventTimes(run, 'interlock-reset', 'IS-1'))).toEqual([290]);
  });

  it('does not act twice while latched, and again after a reset', () => {
    const wave = (from: number) => [at(from, ramp(2, 100)), at(from + 120, ramp(1, 100))];
    const twice = runThrough(plant(trip), [...wave(10), ...wave(300)], 600);
    expect(rounded(eventTimes(twice, 'interlock', 'IS-1'))).toEqual([65]);
    const reset = runThrough(plant(trip), [...wave(10), at(280, command('reset')), ...wave(300)], 600);
    expect(rounded(eventTimes(reset, 'interlock', 'IS-1'))).toEqual([65, 355]);
  });

  it('that starts a machine acts each time its condition comes', () => {
    const start: Interlock = {
      ...trip,
      kind: 'auto-start',
      actions: [{ kind: 'machine', tag: 'P-310B', command: 'start' }],
    };
    const wave = (from: number) => [at(from, ramp(2, 100)), at(from + 120, ramp(1, 100))];
    const run = runThrough(plant(start), [...wave(10), ...wave(300)], 600);
    expect(rounded(eventTimes(run, 'interlock', 'IS-1'))).toEqual([65, 355]);
    expect(run.column.modes.pumpRunning[1]).toBe(true);
  });

  it('bypassed, it says what it would have done and does nothing', () => {
    const run = runThrough(plant(trip), [at(5, command('bypass')), at(10, ramp(2, 100))], 150);
    expect(rounded(eventTimes(run, 'interlock', 'IS-1'))).toEqual([]);
    expect(rounded(eventTimes(run, 'interlock-bypassed', 'IS-1'))).toEqual([65]);
    expect(run.column.modes.valveCommand['gas-inlet']).toBe(1);
  });
});
