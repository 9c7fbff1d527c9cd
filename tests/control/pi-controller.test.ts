import { describe, expect, it } from 'vitest';
import type { Case, Controller } from '../../sim/case/case.ts';
import { createColumn, type Column } from '../../sim/column/column.ts';
import { controlError, integralRate, piOutput } from '../../sim/control/pi-controller.ts';
import { evenly, march, outletAt, steadyOf } from '../support/column-runs.ts';
import { at, feedAnalyser, runThrough, smallPlant } from './support.ts';

// A flow controller on a solvent valve that moves at once (1 ms): the flow is its opening z times the rate, and the
// transmitter's lag is a first-order process, T dm/dt = z - m. The loop is a linear second-order system with a closed form.

const T = 2;

/** Flow control with loop gain `kappa` (output per opening) and integral time `Ti`. */
function flowControl(kappa: number, Ti: number, more: Partial<Controller> = {}): Case {
  const plant = smallPlant();
  const { rate } = plant.liquid.feed;
  return {
    ...plant,
    instruments: [feedAnalyser('FT-311', { measured: { quantity: 'liquid-flow' }, lag: T })],
    controllers: [
      {
        tag: 'FIC-311',
        instrument: 'FT-311',
        output: 'solvent-valve',
        setpoint: 0.5 * rate,
        gain: kappa / rate,
        integralTime: Ti,
        action: 'reverse',
        outputRange: [0, 1],
        mode: 'automatic',
        manualOutput: 0.5,
        ...more,
      },
    ],
  };
}

/**
 * Measured flow after a setpoint step from 0.5 to 0.5 + s: T m" + (1 + k) m' + (k/Ti)(m - m1) = 0, m(0) = 0.5,
 * m'(0) = k s/T.
 */
function closedForm(kappa: number, Ti: number, s: number): (t: number) => number {
  const half = (1 + kappa) / (2 * T);
  const square = kappa / (Ti * T);
  const disc = half * half - square;
  const slope = (kappa * s) / T;
  return (t) => {
    // e = m - m1 starts at -s with slope k s/T.
    const w = Math.sqrt(Math.abs(disc));
    const b = (slope - half * s) / w;
    const decay = Math.exp(-half * t);
    const e =
      disc < 0
        ? decay * (-s * Math.cos(w * t) + b * Math.sin(w * t))
        : decay * (-s * Math.cosh(w * t) + b * Math.sinh(w * t));
    return 0.5 + s + e;
  };
}

const measured = (column: Column, y: Float64Array): number =>
  y[column.layout.instruments[0]!]! / column.plant.liquid.feed.rate;
const opening = (column: Column, y: Float64Array): number => y[column.layout.valves.solvent]!;

describe('a loop around a first-order process', () => {
  it.each([
    { name: 'swings', kappa: 2, Ti: 0.5 },
    { name: 'creeps', kappa: 1, Ti: 4 },
  ])('$name after a setpoint step as the closed form (gain $kappa, integral time $Ti s)', ({ kappa, Ti }) => {
    const plant = flowControl(kappa, Ti);
    const column = createColumn(plant);
    const start = steadyOf(column);
    const exact = closedForm(kappa, Ti, 0.1);
    march(
      column,
      start,
      evenly(20, 0.5),
      (t, y) => {
        expect(Math.abs(measured(column, y) - exact(t))).toBeLessThan(1e-4); // the valve's third of 1 ms over T
      },
      {
        rtol: 1e-8,
        events: [{ at: 0, act: (c) => (c.modes.controllers[0]!.setpoint = 0.6 * plant.liquid.feed.rate) }],
      },
    );
  });

  it('rests where measured value and setpoint agree', () => {
    const plant = flowControl(2, 1, { setpoint: 0.7 * smallPlant().liquid.feed.rate });
    const column = createColumn(plant);
    outletAt(column, 0, steadyOf(column));
    expect(Math.abs(column.machinery.flows.delivery.rate / plant.liquid.feed.rate - 0.7)).toBeLessThan(1e-6);
  });
});

describe('changes of mode', () => {
  it('from automatic to manual and back move nothing', () => {
    const plant = flowControl(2, 4);
    const mode = (m: 'automatic' | 'manual') =>
      ({ kind: 'controller', tag: 'FIC-311', mode: m, setpoint: undefined, output: undefined }) as const;
    const run = runThrough(plant, [at(10, mode('manual')), at(30, mode('automatic'))], 60);
    const half = 0.5 * plant.liquid.feed.rate;
    for (const row of run.recorder.truth) expect(Math.abs(row[0]! / half - 1)).toBeLessThan(1e-5); // 10 x rtol
  });

  it('in manual the output goes where the hand sets it, and automatic takes over from there', () => {
    const plant = flowControl(0.5, 20);
    const { rate } = plant.liquid.feed; // long after the change, so that the lag has gone and the integral follows
    const set = (m: 'automatic' | 'manual', output: number | undefined, setpoint: number | undefined) =>
      ({ kind: 'controller', tag: 'FIC-311', mode: m, setpoint, output }) as const;
    const steps = [at(10, set('manual', 0.8, 0.8 * rate)), at(60, set('automatic', undefined, undefined))];
    const run = runThrough(plant, steps, 100);
    const flow = (t: number): number => run.recorder.truth[run.recorder.time.lastIndexOf(t)]![0]! / rate;
    expect(Math.abs(flow(12) - 0.8)).toBeLessThan(1e-5);
    expect(Math.abs(flow(59) - 0.8)).toBeLessThan(1e-5);
    for (const t of [61, 70, 100]) expect(Math.abs(flow(t) - 0.8)).toBeLessThan(1e-5);
  });

  it('the hand cannot move an output that is in automatic', () => {
    const plant = flowControl(2, 4);
    const move = { kind: 'controller', tag: 'FIC-311', mode: undefined, setpoint: undefined, output: 0.9 } as const;
    const run = runThrough(plant, [at(10, move)], 20);
    expect(run.events.some((e) => e.kind === 'command-refused' && e.time === 10)).toBe(true);
    expect(Math.abs(run.recorder.truth.at(-1)![0]! / plant.liquid.feed.rate - 0.5)).toBeLessThan(1e-5);
  });
});

describe('an output at its end', () => {
  it('comes back at once when the setpoint does, however long it stood there', () => {
    const plant = flowControl(1, 4);
    const { rate } = plant.liquid.feed;
    const recovery = (wait: number): number => {
      const column = createColumn(plant);
      const start = steadyOf(column);
      let back = Number.NaN;
      march(
        column,
        start,
        evenly(wait + 30, 0.1),
        (t, y) => {
          if (t > wait && Number.isNaN(back) && opening(column, y) < 0.9) back = t - wait;
        },
        {
          events: [
            { at: 0, act: (c) => (c.modes.controllers[0]!.setpoint = 1.5 * rate) },
            { at: wait, act: (c) => (c.modes.controllers[0]!.setpoint = 0.5 * rate) },
          ],
        },
      );
      return back;
    };
    const [short, long] = [recovery(20), recovery(400)];
    expect(short).toBeLessThan(2 * T);
    expect(Math.abs(long - short)).toBeLessThan(0.11); // one reading: the integral did not grow meanwhile
  });
});

describe('the law itself', () => {
  const settings = { gain: 2, integralTime: 10, sign: 1, outputRange: [0, 1] } as const;
  it('is K e + I within its range, by either action', () => {
    expect(controlError(settings, 0.5, 0.6)).toBeCloseTo(0.1, 15);
    expect(controlError({ ...settings, sign: -1 }, 0.5, 0.6)).toBeCloseTo(-0.1, 15);
    expect(piOutput(settings, 0.3, 0.1)).toBeCloseTo(0.5, 15);
    expect(piOutput(settings, 0.9, 0.1)).toBe(1);
    expect(piOutput(settings, 0.1, -0.1)).toBe(0);
  });
  it('integrates K e/Ti within the range, and holds the integral that fits in manual', () => {
    expect(integralRate(settings, 0.3, 0.1, true, 0)).toBeCloseTo((2 * 0.1) / 10, 15);
    // Above the range the integral comes to rest at u - held = 0.1 K e [Astrom1995, back-calculation].
    expect(integralRate(settings, 0.9 - 0.1 * -0.2 + 0.12 - 0.1, 0.1, true, 0)).toBeLessThan(0.02);
    expect(integralRate(settings, 0.4 - 0.2, 0.1, false, 0.4)).toBeCloseTo(0, 15);
  });
});
