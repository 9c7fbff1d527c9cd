/**
 * Alarms, interlocks and conditional steps as state machines over comparators (a shown value above or below a number).
 * Time enters by `since` marks only; nothing here looks at a clock or a signal: the run tells it which comparator
 * flipped, and when.
 */
import type { Action, Case, Condition, Scenario } from '../case/case.ts';
import type { RunEvent } from './events.ts';

/** A shown value against a number. */
interface Comparator {
  readonly instrument: number;
  readonly kind: 'above' | 'below';
  readonly value: number;
}

/** Actions that became due, for the run to carry out. */
interface Due {
  readonly actions: readonly Action[];
  readonly role: 'upset' | 'action' | 'interlock';
  readonly tag: string;
  readonly text: string;
}

/** Everything that changes, as plain data. */
export interface LogicState {
  readonly truth: readonly boolean[];
  readonly since: readonly (number | null)[];
  readonly alarmActive: readonly boolean[];
  readonly voteSince: readonly (number | null)[];
  readonly acted: readonly boolean[];
  readonly tripped: readonly boolean[];
  readonly bypassed: readonly boolean[];
  readonly fired: readonly (number | null)[];
  readonly postponed: readonly { readonly time: number; readonly actions: readonly Action[]; readonly text: string }[];
}

export interface Logic {
  readonly comparators: readonly Comparator[];
  readonly truth: boolean[];
  /** Lets every machine act on the truths at t; collects events and due actions until nothing more happens. */
  settle(t: number, emit: (event: RunEvent) => void): Due[];
  /** Next time at which a delay runs out, after t; Infinity for none. */
  nextDue(t: number): number;
  postpone(time: number, actions: readonly Action[], text: string): void;
  command(
    tag: string,
    command: 'reset' | 'bypass' | 'restore',
    t: number,
    emit: (event: RunEvent) => void,
  ): string | undefined;
  isTripped(tag: string): boolean;
  save(): LogicState;
  restore(state: LogicState): void;
}

interface Held {
  readonly comparator: number;
  readonly holdFor: number;
}

const NEVER = Number.NaN;

/** Builds the machines of a case and a scenario. */
export function createLogic(plant: Case, scenario: Scenario): Logic {
  const comparators: Comparator[] = [];
  const helds: Held[] = [];
  const indexOf = new Map(plant.instruments.map((instrument, i) => [instrument.tag, i]));
  const comparator = (tag: string, kind: 'above' | 'below', value: number): number => {
    const instrument = indexOf.get(tag) ?? -1;
    const found = comparators.findIndex((c) => c.instrument === instrument && c.kind === kind && c.value === value);
    if (found >= 0) return found;
    comparators.push({ instrument, kind, value });
    return comparators.length - 1;
  };
  const held = (tag: string, kind: 'above' | 'below', value: number, holdFor: number): number => {
    helds.push({ comparator: comparator(tag, kind, value), holdFor });
    return helds.length - 1;
  };
  const ofCondition = (c: Condition): number => held(c.instrument, c.kind, c.value, c.holdFor);

  const alarms = plant.alarms.map((alarm) => {
    const high = alarm.kind === 'high';
    const clear = high ? alarm.setpoint - alarm.deadband : alarm.setpoint + alarm.deadband;
    return {
      alarm,
      on: held(alarm.instrument, high ? 'above' : 'below', alarm.setpoint, alarm.onDelay),
      off: held(alarm.instrument, high ? 'below' : 'above', clear, alarm.offDelay),
    };
  });
  const inService = (tag: string): boolean =>
    scenario.interlocksInService === 'all' || scenario.interlocksInService.includes(tag);
  const interlocks = plant.interlocks
    .filter((i) => inService(i.tag))
    .map((interlock) => ({
      interlock,
      conditions: interlock.conditions.map(ofCondition),
      permissive: interlock.resetPermissive === undefined ? -1 : ofCondition(interlock.resetPermissive),
    }));
  const steps = scenario.steps.map((step) => ({
    step,
    condition: step.trigger.kind === 'condition' ? ofCondition(step.trigger.condition) : -1,
  }));
  const stepIndex = new Map(scenario.steps.map((s, i) => [s.id, i]));

  const truth = comparators.map(() => false);
  const since = helds.map(() => NEVER);
  const alarmActive = alarms.map(() => false);
  const voteSince = interlocks.map(() => NEVER);
  const acted = interlocks.map(() => false);
  const tripped = interlocks.map(() => false);
  const bypassed = interlocks.map(() => false);
  const fired = steps.map(() => NEVER);
  let postponed: { time: number; actions: readonly Action[]; text: string }[] = [];

  const holds = (h: number, t: number): boolean => t >= since[h] + helds[h].holdFor;
  const instrumentTag = (h: number): string => plant.instruments[comparators[helds[h].comparator].instrument].tag;

  const markSince = (t: number): void => {
    for (let h = 0; h < helds.length; h++) {
      if (!truth[helds[h].comparator]) since[h] = NEVER;
      else if (Number.isNaN(since[h])) since[h] = t;
    }
  };

  const settleAlarms = (t: number, emit: (event: RunEvent) => void): void => {
    alarms.forEach(({ alarm, on, off }, i) => {
      if (!alarmActive[i] && holds(on, t)) {
        alarmActive[i] = true;
        emit({
          time: t,
          kind: 'alarm',
          tag: alarm.tag,
          text: `${alarm.tag} annunciates (${alarm.priority} priority)`,
          value: alarm.setpoint,
        });
      } else if (alarmActive[i] && holds(off, t)) {
        alarmActive[i] = false;
        emit({ time: t, kind: 'alarm-cleared', tag: alarm.tag, text: `${alarm.tag} returns to normal` });
      }
    });
  };

  const settleInterlocks = (t: number, emit: (event: RunEvent) => void, due: Due[]): void => {
    interlocks.forEach(({ interlock, conditions }, i) => {
      const votes = conditions.reduce((n, h) => n + (holds(h, t) ? 1 : 0), 0);
      if (votes < interlock.votes) {
        voteSince[i] = NEVER;
        acted[i] = false;
        return;
      }
      if (Number.isNaN(voteSince[i])) voteSince[i] = t;
      if (acted[i] || t < voteSince[i] + interlock.delay) return;
      acted[i] = true;
      const by = instrumentTag(conditions[0]);
      if (bypassed[i]) {
        emit({
          time: t,
          kind: 'interlock-bypassed',
          tag: interlock.tag,
          text: `${interlock.tag} would act on ${by} but is bypassed`,
        });
        return;
      }
      if (interlock.kind === 'trip') {
        if (tripped[i]) return;
        tripped[i] = true;
      }
      const text = interlock.kind === 'trip' ? `${interlock.tag} trips on ${by}` : `${interlock.tag} acts on ${by}`;
      due.push({ actions: interlock.actions, role: 'interlock', tag: interlock.tag, text });
    });
  };

  const isDue = (i: number, t: number): boolean => {
    const { trigger } = steps[i].step;
    switch (trigger.kind) {
      case 'time':
        return t >= trigger.at;
      case 'after': {
        const before = fired[stepIndex.get(trigger.after) ?? -1];
        return t >= before + trigger.delay;
      }
      case 'condition': {
        if (trigger.after !== undefined && !(fired[stepIndex.get(trigger.after) ?? -1] <= t)) return false;
        return holds(steps[i].condition, t);
      }
    }
  };

  return {
    comparators,
    truth,
    settle(t, emit) {
      const due: Due[] = [];
      markSince(t);
      settleAlarms(t, emit);
      settleInterlocks(t, emit, due);
      let more = true;
      while (more) {
        more = false;
        steps.forEach(({ step }, i) => {
          if (!Number.isNaN(fired[i]) || !isDue(i, t)) return;
          fired[i] = t;
          more = true;
          due.push({ actions: step.actions, role: step.role, tag: step.id, text: step.label });
        });
      }
      for (const p of postponed)
        if (p.time <= t) due.push({ actions: p.actions, role: 'action', tag: '', text: p.text });
      postponed = postponed.filter((p) => p.time > t);
      return due;
    },
    nextDue(t) {
      let next = Infinity;
      const consider = (time: number): void => {
        if (time > t && time < next) next = time;
      };
      for (let h = 0; h < helds.length; h++) consider(since[h] + helds[h].holdFor);
      interlocks.forEach(({ interlock }, i) => {
        if (!acted[i]) consider(voteSince[i] + interlock.delay);
      });
      steps.forEach(({ step }, i) => {
        if (!Number.isNaN(fired[i])) return;
        if (step.trigger.kind === 'time') consider(step.trigger.at);
        else if (step.trigger.kind === 'after')
          consider(fired[stepIndex.get(step.trigger.after) ?? -1] + step.trigger.delay);
      });
      for (const p of postponed) consider(p.time);
      return next;
    },
    postpone(time, actions, text) {
      postponed.push({ time, actions, text });
    },
    command(tag, command, t, emit) {
      const i = interlocks.findIndex((x) => x.interlock.tag === tag);
      if (i < 0) return `${tag} is not in service in this scenario`;
      if (command === 'bypass') bypassed[i] = true;
      else if (command === 'restore') bypassed[i] = false;
      else {
        const { permissive, conditions, interlock } = interlocks[i];
        const votes = conditions.reduce((n, h) => n + (holds(h, t) ? 1 : 0), 0);
        if (votes >= interlock.votes) return `${tag} does not reset: its condition still holds`;
        if (permissive >= 0 && !holds(permissive, t))
          return `${tag} does not reset: ${instrumentTag(permissive)} does not permit it`;
        tripped[i] = false;
        emit({ time: t, kind: 'interlock-reset', tag, text: `${tag} is reset` });
      }
      return undefined;
    },
    isTripped: (tag) => tripped[interlocks.findIndex((x) => x.interlock.tag === tag)] ?? false,
    save() {
      const plain = (list: readonly number[]): (number | null)[] => list.map((v) => (Number.isNaN(v) ? null : v));
      return {
        truth: [...truth],
        since: plain(since),
        alarmActive: [...alarmActive],
        voteSince: plain(voteSince),
        acted: [...acted],
        tripped: [...tripped],
        bypassed: [...bypassed],
        fired: plain(fired),
        postponed: postponed.map((p) => ({ ...p })),
      };
    },
    restore(state) {
      const numbers = (to: number[], from: readonly (number | null)[]): void => {
        from.forEach((v, i) => {
          to[i] = v ?? NEVER;
        });
      };
      const flags = (to: boolean[], from: readonly boolean[]): void => {
        from.forEach((v, i) => {
          to[i] = v;
        });
      };
      flags(truth, state.truth);
      numbers(since, state.since);
      flags(alarmActive, state.alarmActive);
      numbers(voteSince, state.voteSince);
      flags(acted, state.acted);
      flags(tripped, state.tripped);
      flags(bypassed, state.bypassed);
      numbers(fired, state.fired);
      postponed = state.postponed.map((p) => ({ ...p }));
    },
  };
}
