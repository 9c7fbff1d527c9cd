/**
 * Channels over time: each change of a scenario makes a program for its channel: a ramp (or step) from where the channel
 * stands, perhaps a return, or a sampled trace. A later change of the same channel replaces the earlier one.
 */
import type { Action, Channel } from '../case/case.ts';
import type { ChannelValues } from '../column/modes.ts';

/** One channel's course: straight lines between points, flat before the first and after the last; steps as double points. */
export interface Program {
  readonly channel: Channel;
  readonly time: readonly number[];
  readonly value: readonly number[];
}

export interface Programs {
  /** Starts a change at t. */
  change(action: Extract<Action, { kind: 'change' }>, t: number): void;
  /** Writes all channels' values at t: after a step at t, or with `before` just before it. */
  apply(t: number, before?: boolean): void;
  /** Next point after t, s; Infinity for none. */
  nextBreak(t: number): number;
  /** Whether anything ramps just after t. */
  varies(t: number): boolean;
  save(): readonly Program[];
  restore(programs: readonly Program[]): void;
}

/** Reads and writes a channel's value. */
function access(values: ChannelValues, channel: Channel): { get(): number; set(v: number): void } {
  const field = (key: keyof ChannelValues) => ({
    get: () => values[key] as number,
    set: (v: number) => {
      (values as unknown as Record<string, number>)[key] = v;
    },
  });
  const element = (array: Float64Array, i: number) => ({
    get: () => array[i],
    set: (v: number) => {
      array[i] = v;
    },
  });
  switch (channel.name) {
    case 'gas.composition':
      return element(values.gasComposition, channel.solute);
    case 'liquid.composition':
      return element(values.liquidComposition, channel.solute);
    case 'makeUp.composition':
      return element(values.makeUpComposition, channel.solute);
    case 'gas.rate':
      return field('gasRate');
    case 'gas.temperature':
      return field('gasTemperature');
    case 'gas.humidity':
      return field('gasHumidity');
    case 'liquid.temperature':
      return field('liquidTemperature');
    case 'pump.speed':
      return field('pumpSpeed');
    case 'makeUp.temperature':
      return field('makeUpTemperature');
    case 'cooling':
      return field('cooling');
    case 'coolant.temperature':
      return field('coolantTemperature');
    case 'packing.fouling':
      return field('fouling');
    case 'packing.foaming':
      return field('foaming');
    case 'distribution.liquidShare':
      return field('liquidShare');
    case 'ambient.temperature':
      return field('ambientTemperature');
    case 'topPressure':
      return field('topPressure');
    case 'nonReturnValve.leak':
      return field('nonReturnValveLeak');
  }
}

function key(channel: Channel): string {
  return 'solute' in channel ? `${channel.name}.${channel.solute}` : channel.name;
}

/** Value of a program at t; at a step the later one, or with `before` the earlier. */
function valueAt(program: Program, t: number, before: boolean): number {
  const { time, value } = program;
  let k = time.length - 1;
  while (k >= 0 && (before ? time[k] >= t : time[k] > t)) k--;
  if (k < 0) return value[0];
  if (k === time.length - 1) return value[k];
  return value[k] + ((value[k + 1] - value[k]) * (t - time[k])) / (time[k + 1] - time[k]);
}

/**
 * @param design - The channels as the case gives them: what `times` multiplies and a pulse returns to.
 * @param values - The live channels, written by `apply`.
 */
export function createPrograms(design: ChannelValues, values: ChannelValues): Programs {
  let programs: Program[] = [];
  return {
    change(action, t) {
      const { channel, how } = action;
      const now = access(values, channel).get();
      const base = access(design, channel).get();
      const time: number[] = [];
      const value: number[] = [];
      if (how.kind === 'trace') {
        how.time.forEach((s, i) => {
          time.push(t + s);
          value.push(how.value[i]);
        });
      } else {
        const target = how.kind === 'to' ? how.value : base * how.value;
        time.push(t, t + how.over);
        value.push(how.over > 0 ? now : target, target);
        if (how.duration !== undefined) {
          const back = Math.max(t + how.duration, t + how.over);
          time.push(back, back + how.over);
          value.push(how.over > 0 ? target : base, base);
          if (how.over === 0) {
            // A step back: stay at the target up to it.
            time.splice(2, 0, back);
            value.splice(2, 0, target);
          }
        }
      }
      const name = key(channel);
      programs = programs.filter((p) => key(p.channel) !== name);
      programs.push({ channel, time, value });
    },
    apply(t, before = false) {
      for (const program of programs) access(values, program.channel).set(valueAt(program, t, before));
    },
    nextBreak(t) {
      let next = Infinity;
      for (const program of programs) for (const s of program.time) if (s > t && s < next) next = s;
      return next;
    },
    varies(t) {
      return programs.some(({ time, value }) =>
        time.some((s, k) => k + 1 < time.length && s <= t && time[k + 1] > t && value[k] !== value[k + 1]),
      );
    },
    save: () => programs.map((p) => ({ ...p, time: [...p.time], value: [...p.value] })),
    restore(saved) {
      programs = saved.map((p) => ({ ...p }));
    },
  };
}
