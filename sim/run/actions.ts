/** Carries out commands: machines, valves, controllers, instruments, channels. What cannot be done is said. */
import type { Action, Case } from '../case/case.ts';
import type { PlantModes } from '../column/modes.ts';
import type { Programs } from './programs.ts';
import type { Signals } from './signals.ts';

/** What the actions work on. */
export interface ActionTargets {
  readonly plant: Case;
  readonly modes: PlantModes;
  readonly programs: Programs;
  readonly signals: Signals;
  /** Shown value of an instrument now, SI. */ shownNow(i: number, t: number): number;
  /** Output of a controller now, for a bumpless change to manual. */ controllerOutput(i: number, t: number): number;
  /** Puts actions off to a later time, s. */ later(time: number, actions: readonly Action[], text: string): void;
  interlock(tag: string, command: 'reset' | 'bypass' | 'restore', t: number): string | undefined;
}

/** Carries one action out at t; returns why not, or undefined. */
export function carryOut(action: Action, t: number, targets: ActionTargets): string | undefined {
  const { plant, modes, signals } = targets;
  switch (action.kind) {
    case 'change':
      targets.programs.change(action, t);
      targets.programs.apply(t);
      return undefined;
    case 'machine':
      return machine(action.tag, action.command, targets);
    case 'valve':
      if (action.command === 'stick') modes.valveStuck[action.valve] = true;
      else if (action.command === 'release') modes.valveStuck[action.valve] = false;
      else modes.valveCommand[action.valve] = action.command;
      return undefined;
    case 'controller': {
      const i = plant.controllers.findIndex((c) => c.tag === action.tag);
      const mode = modes.controllers[i];
      if (action.mode === 'manual' && mode.automatic) mode.manualOutput = targets.controllerOutput(i, t);
      if (action.mode !== undefined) mode.automatic = action.mode === 'automatic';
      if (action.setpoint !== undefined) mode.setpoint = action.setpoint;
      if (action.output !== undefined) {
        if (mode.automatic) return `${action.tag} is in automatic and takes no output by hand`;
        mode.manualOutput = action.output;
      }
      return undefined;
    }
    case 'instrument': {
      const i = plant.instruments.findIndex((x) => x.tag === action.tag);
      const mode = signals.modes[i];
      const { fault } = action;
      if (fault === 'freeze') {
        mode.held = targets.shownNow(i, t);
        mode.fault = 'frozen';
      } else if (fault === 'fail-high') mode.fault = 'failed-high';
      else if (fault === 'fail-low') mode.fault = 'failed-low';
      else if (fault === 'restore') {
        mode.fault = 'none';
        mode.bias = 0;
        mode.drift = 0;
      } else if ('bias' in fault) mode.bias = fault.bias;
      else {
        mode.bias += mode.drift * (t - mode.since);
        mode.drift = fault.drift;
        mode.since = t;
      }
      return undefined;
    }
    case 'interlock':
      return targets.interlock(action.tag, action.command, t);
    case 'power-dip': {
      const running = action.tags.filter((tag) => isRunning(tag, targets));
      for (const tag of action.tags) machine(tag, 'stop', targets);
      if (action.duration !== undefined) {
        const starts = running.map((tag): Action => ({ kind: 'machine', tag, command: 'start' }));
        targets.later(t + action.duration, starts, 'power returns');
      }
      return undefined;
    }
  }
}

function isRunning(tag: string, { plant, modes }: ActionTargets): boolean {
  if (tag === plant.liquid.pumps.duty) return modes.pumpRunning[0];
  if (tag === plant.liquid.pumps.standby) return modes.pumpRunning[1];
  return modes.fanRunning;
}

function machine(
  tag: string,
  command: 'start' | 'stop' | 'lock-out' | 'release',
  targets: ActionTargets,
): string | undefined {
  const { plant, modes } = targets;
  const pump = tag === plant.liquid.pumps.duty ? 0 : tag === plant.liquid.pumps.standby ? 1 : undefined;
  const available = pump !== undefined ? modes.pumpAvailable[pump] : modes.fanAvailable;
  const run = (on: boolean): void => {
    if (pump !== undefined) modes.pumpRunning[pump] = on;
    else modes.fanRunning = on;
  };
  const allow = (on: boolean): void => {
    if (pump !== undefined) modes.pumpAvailable[pump] = on;
    else modes.fanAvailable = on;
  };
  switch (command) {
    case 'start':
      if (!available) return `${tag} does not start: it is locked out`;
      run(true);
      return undefined;
    case 'stop':
      run(false);
      return undefined;
    case 'lock-out':
      run(false);
      allow(false);
      return undefined;
    case 'release':
      allow(true);
      return undefined;
  }
}
