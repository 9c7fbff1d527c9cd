/**
 * What the control room sees of each instrument: the lagged value, dead time later, with bias, drift and noise, held
 * between samples, clipped to its range, or stuck. Alarms, interlocks, controllers and reports all read it here.
 */
import type { Case, Instrument } from '../case/case.ts';
import type { ShownValues } from '../column/plant.ts';
import { createNoise, type Noise } from './noise.ts';
import { createSignalHistory, type SignalHistory, type SignalHistoryState } from './signal-history.ts';

/** An instrument's fault and memory. */
interface InstrumentMode {
  fault: 'none' | 'frozen' | 'failed-high' | 'failed-low';
  /** Value it stands at while frozen or between samples, SI. */
  held: number;
  /** Added by faults, SI; drift per second from `since`. */
  bias: number;
  drift: number;
  since: number;
  /** Next sample, s; Infinity when continuous. */
  nextSample: number;
}

export interface SignalsState {
  readonly modes: readonly InstrumentMode[];
  readonly history: SignalHistoryState;
}

export interface Signals extends ShownValues {
  readonly modes: InstrumentMode[];
  readonly history: SignalHistory;
  /**
   * While the plant is brought to its steady state: no time passes, so there is neither dead time, drift, noise nor
   * sampling; bias, range and faults stay.
   */
  isAtRest: boolean;
  /** Slot of an instrument in the history, -1 without dead time. */ readonly slot: readonly number[];
  /** Before sampling, freezing and failing: dead time, bias, drift, noise. */
  conditioned(i: number, t: number, value: number): number;
  /** Longest dead time of an instrument that a controller reads, s; Infinity for none: no step may be longer. */
  readonly controlDeadTime: number;
  /** Kinks of the shown signal in (from, to). */
  kinks(i: number, from: number, to: number): number[];
  save(): SignalsState;
  restore(state: SignalsState): void;
}

function newMode(instrument: Instrument): InstrumentMode {
  return {
    fault: 'none',
    held: 0,
    bias: 0,
    drift: 0,
    since: 0,
    nextSample: instrument.sampleInterval === undefined ? Infinity : 0,
  };
}

/** Builds the signals of a case. */
export function createSignals(plant: Case): Signals {
  const { instruments } = plant;
  const modes = instruments.map(newMode);
  const slot: number[] = [];
  let count = 0;
  for (const instrument of instruments) slot.push(instrument.deadTime > 0 ? count++ : -1);
  const span = instruments.reduce((longest, i) => Math.max(longest, i.deadTime), 0);
  const history = createSignalHistory(count, span);
  const noise: (Noise | undefined)[] = instruments.map((instrument, i) =>
    plant.run.noise && instrument.noise !== undefined
      ? createNoise(instrument.noise.sigma, instrument.noise.correlationTime, plant.run.seed + 7919 * (i + 1))
      : undefined,
  );
  const controlled = new Set(plant.controllers.map((c) => c.instrument));
  let controlDeadTime = Infinity;
  for (const i of instruments) {
    if (i.deadTime > 0 && controlled.has(i.tag)) controlDeadTime = Math.min(controlDeadTime, i.deadTime);
  }
  const clipped = (i: number, value: number): number => {
    const { range } = instruments[i];
    if (range === undefined) return value;
    return value < range[0] ? range[0] : value > range[1] ? range[1] : value;
  };
  let isAtRest = false;
  const conditioned = (i: number, t: number, value: number): number => {
    const instrument = instruments[i];
    const mode = modes[i];
    if (isAtRest) return value + instrument.bias + mode.bias;
    const base = slot[i] >= 0 ? history.at(slot[i], t - instrument.deadTime) : value;
    const slip = instrument.bias + instrument.drift * t + mode.bias + mode.drift * (t - mode.since);
    return base + slip + (noise[i]?.at(t) ?? 0);
  };
  return {
    modes,
    history,
    slot,
    controlDeadTime,
    conditioned,
    get isAtRest() {
      return isAtRest;
    },
    set isAtRest(value) {
      isAtRest = value;
    },
    shown(i, t, value) {
      const mode = modes[i];
      switch (mode.fault) {
        case 'frozen':
          return mode.held;
        case 'failed-high':
          return instruments[i].range?.[1] ?? Infinity;
        case 'failed-low':
          return instruments[i].range?.[0] ?? 0;
        case 'none':
          return clipped(
            i,
            isAtRest || instruments[i].sampleInterval === undefined ? conditioned(i, t, value) : mode.held,
          );
      }
    },
    kinks(i, from, to) {
      const list: number[] = [];
      if (slot[i] >= 0) {
        const { deadTime } = instruments[i];
        for (const edge of history.edges(from - deadTime, to - deadTime)) list.push(edge + deadTime);
      }
      const n = noise[i];
      if (n !== undefined) {
        for (let k = Math.floor(from / n.spacing) + 1; k * n.spacing < to; k++) list.push(k * n.spacing);
        list.sort((a, b) => a - b);
      }
      return list;
    },
    save: () => ({ modes: modes.map((m) => ({ ...m })), history: history.save() }),
    restore(state) {
      state.modes.forEach((m, i) => {
        modes[i] = { ...m, nextSample: m.nextSample ?? Infinity };
      });
      history.restore(state.history);
    },
  };
}
