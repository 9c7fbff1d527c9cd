// Conditions and actions: who is told what. An action has one verb; tags must exist, values must fit.

import type { Action, Condition, ValveName } from '../case.ts';
import { join } from '../issues.ts';
import { readMeasured } from '../measured.ts';
import { nearest, suggestion } from '../nearest.ts';
import type { Reading } from '../reading.ts';
import type { ActionText, ConditionText, Verb } from '../schema/actions.ts';
import { VERBS } from '../schema/actions.ts';
import { readTrace } from '../table.ts';
import type { ChannelUse } from './channels.ts';
import { findChannel } from './channels.ts';
import type { ScaledInstrument } from './control.ts';
import { readDrift, readSetpoint } from './control.ts';
import type { Plant } from './plant-tags.ts';

/** What actions may refer to. Tags are those the file names, also when their entry has issues of its own. */
export interface Directory {
  readonly plant: Plant;
  readonly instruments: ReadonlyMap<string, ScaledInstrument>;
  readonly instrumentTags: readonly string[];
  readonly controllerTags: readonly string[];
  /** Instrument of each controller. */
  readonly controllerInstruments: ReadonlyMap<string, string>;
  readonly interlockTags: readonly string[];
}

/** Notes a tag that does not exist; true when it does. */
export function knownTag(reading: Reading, path: string, what: string, tag: string, known: readonly string[]): boolean {
  if (known.includes(tag)) return true;
  reading.unknown(path, what, tag, known);
  return false;
}

/** A condition, or undefined after noting why not. */
export function readCondition(
  reading: Reading,
  path: string,
  given: ConditionText,
  directory: Directory,
): Condition | undefined {
  const { instrument, above, below } = given;
  const text = above ?? below;
  if (text === undefined || (above !== undefined && below !== undefined)) {
    reading.object('contradiction', path, 'either "above" or "below"', text === undefined ? 'neither' : 'both');
    return undefined;
  }
  if (!knownTag(reading, join(path, 'instrument'), 'the tag of an instrument', instrument, directory.instrumentTags))
    return undefined;
  const scaled = directory.instruments.get(instrument);
  if (scaled === undefined) return undefined;
  const kind = above === undefined ? 'below' : 'above';
  const value = readSetpoint(reading, join(path, kind), text, scaled.scale);
  return value === undefined ? undefined : { instrument, kind, value, holdFor: given.for ?? 0 };
}

/** The actions of one entry (several for "set"), or undefined after noting why not. */
export function readAction(
  reading: Reading,
  path: string,
  given: ActionText,
  directory: Directory,
): readonly Action[] | undefined {
  const verb = verbOf(reading, path, given);
  if (verb === undefined) return undefined;
  if (verb === 'change') return one(readChange(reading, path, given, directory));
  if (verb === 'set') return readSet(reading, path, given, directory);
  if (verb === 'fault') return one(readFault(reading, path, given, directory));
  if (verb === 'controller') return one(readControllerAction(reading, path, given, directory));
  if (verb === 'interlock') return one(readInterlockAction(reading, path, given, directory));
  if (verb === 'powerDip') return one(readPowerDip(reading, path, given, directory));
  if (verb === 'start' || verb === 'stop' || verb === 'lockOut' || verb === 'release') {
    return one(readMachine(reading, path, verb, given, directory));
  }
  return one(readValve(reading, path, verb, given, directory));
}

function one(action: Action | undefined): readonly Action[] | undefined {
  return action === undefined ? undefined : [action];
}

/** The one verb of an action; keys that do not go with it are issues. */
function verbOf(reading: Reading, path: string, given: ActionText): Verb | undefined {
  const keys = Object.keys(given).filter((key) => given[key as keyof ActionText] !== undefined);
  const verbs = (Object.keys(VERBS) as Verb[]).filter((verb) => keys.includes(verb));
  const [verb] = verbs;
  if (verb === undefined || verbs.length > 1) {
    reading.object(
      'contradiction',
      path,
      'exactly one of the keys that say what is done',
      verbs.length === 0 ? `none among ${keys.join(', ') || 'no keys'}` : verbs.join(', '),
      verbs.length === 0 ? `one of ${Object.keys(VERBS).join(', ')}` : 'write two actions',
    );
    return undefined;
  }
  const beside: readonly string[] = VERBS[verb];
  for (const key of keys) {
    if (key === verb || beside.includes(key)) continue;
    reading.object(
      'contradiction',
      join(path, key),
      `a key that goes with "${verb}"`,
      `"${key}"`,
      beside.length === 0 ? `nothing goes with "${verb}"` : `with "${verb}" go ${beside.join(', ')}`,
    );
  }
  return verb;
}

function readChange(reading: Reading, path: string, given: ActionText, directory: Directory): Action | undefined {
  const use = findChannel(reading, join(path, 'change'), given.change ?? '', directory.plant);
  const ways = (['to', 'by', 'times', 'trace'] as const).filter((key) => given[key] !== undefined);
  if (ways.length !== 1) {
    reading.object(
      'contradiction',
      path,
      'exactly one of "to", "by", "times", "trace"',
      ways.length === 0 ? 'none' : ways.join(', '),
    );
    return undefined;
  }
  if (use === undefined) return undefined;
  if (given.trace !== undefined) return readTraceChange(reading, path, given, use);
  const timing = { over: given.over ?? 0, duration: given.for };
  if (given.for !== undefined && given.over !== undefined && given.over > given.for) {
    reading.object('contradiction', join(path, 'over'), 'a ramp that ends before the change does', 'a longer one');
  }
  const change = (kind: 'to' | 'times', value: number): Action => ({
    kind: 'change',
    channel: use.channel,
    how: { kind, value, ...timing },
  });
  if (given.times !== undefined) {
    const where = join(path, 'times');
    if (!use.canMultiply) {
      reading.refuse(
        'contradiction',
        where,
        'no factor on a quantity with its own zero',
        given.times,
        'use "to" or "by"',
      );
      return undefined;
    }
    if (!use.allows(given.times * use.base)) {
      reading.refuse('range', where, 'a factor that leaves the value possible', given.times);
      return undefined;
    }
    if (use.base === 0)
      reading.warn('style', where, 'a case value other than 0', '0', 'a factor on nothing changes nothing');
    return change('times', given.times);
  }
  if (given.by !== undefined) {
    const difference = use.readDifference(join(path, 'by'), given.by);
    if (difference === undefined) return undefined;
    if (!use.allows(use.base + difference)) {
      reading.refuse('range', join(path, 'by'), 'a difference that leaves the value possible', given.by);
      return undefined;
    }
    return change('to', use.base + difference);
  }
  const value = given.to === undefined ? undefined : use.read(join(path, 'to'), given.to);
  return value === undefined ? undefined : change('to', value);
}

function readTraceChange(reading: Reading, path: string, given: ActionText, use: ChannelUse): Action | undefined {
  for (const key of ['over', 'for'] as const) {
    if (given[key] !== undefined)
      reading.object(
        'contradiction',
        join(path, key),
        'no such key beside a trace',
        'one',
        'the trace has its own times',
      );
  }
  const trace = readTrace(reading, join(path, 'trace'), given.trace ?? '', given.column, (where, text) =>
    use.read(where, text),
  );
  return trace === undefined ? undefined : { kind: 'change', channel: use.channel, how: { kind: 'trace', ...trace } };
}

function readSet(
  reading: Reading,
  path: string,
  given: ActionText,
  directory: Directory,
): readonly Action[] | undefined {
  const actions: Action[] = [];
  for (const [name, value] of Object.entries(given.set ?? {})) {
    const where = join(join(path, 'set'), name);
    const use = findChannel(reading, where, name, directory.plant);
    const si = use?.read(where, value);
    if (use === undefined || si === undefined) continue;
    actions.push({
      kind: 'change',
      channel: use.channel,
      how: { kind: 'to', value: si, over: given.over ?? 0, duration: given.for },
    });
  }
  return actions;
}

type MachineVerb = 'start' | 'stop' | 'lockOut' | 'release';

function readMachine(
  reading: Reading,
  path: string,
  verb: MachineVerb,
  given: ActionText,
  directory: Directory,
): Action | undefined {
  const tag = given[verb] ?? '';
  if (!knownMachine(reading, join(path, verb), tag, directory)) return undefined;
  return { kind: 'machine', tag, command: verb === 'lockOut' ? 'lock-out' : verb };
}

function knownMachine(reading: Reading, path: string, tag: string, { plant }: Directory): boolean {
  if (plant.machines.includes(tag)) return true;
  const near = nearest(tag, plant.machines);
  const noStandby = plant.liquid.pumps.standby === undefined;
  const hint =
    plant.gas.source.kind !== 'fan' && noStandby && near === undefined
      ? `this plant has only ${plant.liquid.pumps.duty}: no standby pump, no fan`
      : noStandby
        ? `this plant has no standby pump; known: ${plant.machines.join(', ')}`
        : suggestion(tag, plant.machines);
  reading.refuse('reference', path, 'the tag of a pump or fan', tag, hint);
  return false;
}

type ValveVerb = 'open' | 'close' | 'valve' | 'stick' | 'free';

function readValve(
  reading: Reading,
  path: string,
  verb: ValveVerb,
  given: ActionText,
  { plant }: Directory,
): Action | undefined {
  const word = given[verb] ?? '';
  const valve = [...plant.valves].find(([name, tag]) => name === word || tag === word)?.[0];
  if (valve === undefined) {
    const known = [...plant.valves].flatMap(([name, tag]) => (tag === undefined ? [name] : [name, tag]));
    reading.unknown(join(path, verb), 'a valve of this plant', word, known);
    return undefined;
  }
  const command = valveCommand(reading, path, verb, given);
  return command === undefined ? undefined : { kind: 'valve', valve: valve satisfies ValveName, command };
}

function valveCommand(
  reading: Reading,
  path: string,
  verb: ValveVerb,
  given: ActionText,
): number | 'stick' | 'release' | undefined {
  if (verb === 'open') return 1;
  if (verb === 'close') return 0;
  if (verb === 'stick') return 'stick';
  if (verb === 'free') return 'release';
  const where = join(path, 'to');
  if (given.to === undefined) {
    reading.object('missing', where, 'an opening', 'nothing', 'write for example "to": "50 %"');
    return undefined;
  }
  const opening = typeof given.to === 'number' ? given.to : reading.quantity(where, given.to, 'fraction');
  if (opening === undefined || (opening >= 0 && opening <= 1)) return opening;
  reading.refuse('range', where, 'an opening from 0 to 100 %', given.to);
  return undefined;
}

function readControllerAction(
  reading: Reading,
  path: string,
  given: ActionText,
  directory: Directory,
): Action | undefined {
  const tag = given.controller ?? '';
  if (!knownTag(reading, join(path, 'controller'), 'the tag of a controller', tag, directory.controllerTags))
    return undefined;
  if (given.mode === undefined && given.setpoint === undefined && given.output === undefined) {
    reading.object('missing', path, 'a mode, a setpoint or an output', 'none');
    return undefined;
  }
  const scaled = directory.instruments.get(directory.controllerInstruments.get(tag) ?? '');
  const setpoint =
    given.setpoint === undefined || scaled === undefined
      ? undefined
      : readSetpoint(reading, join(path, 'setpoint'), given.setpoint, scaled.scale);
  return { kind: 'controller', tag, mode: given.mode, setpoint, output: given.output };
}

function readFault(reading: Reading, path: string, given: ActionText, directory: Directory): Action | undefined {
  const { fault, instrument: tag } = given;
  if (fault === undefined) return undefined;
  if (tag === undefined) {
    reading.object('missing', join(path, 'instrument'), 'the tag of an instrument', 'nothing');
    return undefined;
  }
  if (!knownTag(reading, join(path, 'instrument'), 'the tag of an instrument', tag, directory.instrumentTags))
    return undefined;
  const scaled = directory.instruments.get(tag);
  if (fault !== 'bias' && fault !== 'drift') return { kind: 'instrument', tag, fault };
  const key = fault === 'bias' ? 'by' : 'perTime';
  const text = given[key];
  if (text === undefined) {
    reading.object('missing', join(path, key), fault === 'bias' ? 'a difference' : 'a difference per time', 'nothing');
    return undefined;
  }
  if (scaled === undefined) return undefined;
  const value =
    fault === 'bias'
      ? readMeasured(reading, join(path, key), String(text), scaled.scale, 'difference')
      : readDrift(reading, join(path, key), String(text), scaled.scale);
  if (value === undefined) return undefined;
  return { kind: 'instrument', tag, fault: fault === 'bias' ? { bias: value } : { drift: value } };
}

function readInterlockAction(
  reading: Reading,
  path: string,
  given: ActionText,
  directory: Directory,
): Action | undefined {
  const tag = given.interlock ?? '';
  const known = knownTag(reading, join(path, 'interlock'), 'the tag of an interlock', tag, directory.interlockTags);
  if (given.command === undefined) {
    reading.object('missing', join(path, 'command'), 'one of reset, bypass, restore', 'nothing');
    return undefined;
  }
  return known ? { kind: 'interlock', tag, command: given.command } : undefined;
}

function readPowerDip(reading: Reading, path: string, given: ActionText, directory: Directory): Action | undefined {
  const tags = given.powerDip ?? [];
  const known = tags.filter((tag, index) =>
    knownMachine(reading, `${join(path, 'powerDip')}[${index}]`, tag, directory),
  );
  return known.length < tags.length ? undefined : { kind: 'power-dip', tags, duration: given.for };
}
