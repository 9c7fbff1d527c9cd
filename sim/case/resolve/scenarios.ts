// Scenarios: steps with their triggers, checked to have a beginning, an end and no circle.

import type { Action, Scenario, Step } from '../case.ts';
import { SCENARIO } from '../defaults.ts';
import { join } from '../issues.ts';
import { suggestion } from '../nearest.ts';
import type { Reading } from '../reading.ts';
import type { ActionText, ScenarioText, StepText } from '../schema/actions.ts';
import { formatTime } from '../../units.ts';
import type { Directory } from './actions.ts';
import { knownTag, readAction, readCondition } from './actions.ts';

/** One scenario, or undefined after noting why not. */
export function readScenario(
  reading: Reading,
  path: string,
  id: string,
  given: ScenarioText,
  directory: Directory,
): Scenario | undefined {
  const before = reading.issues.length;
  const ids = given.steps.map((step, index) => step.id ?? `step-${index + 1}`);
  ids.forEach((name, index) => {
    if (ids.indexOf(name) < index) {
      reading.refuse('duplicate', `${path}.steps[${index}].id`, 'an id that no other step has', name);
    }
  });
  const steps = given.steps.map((step, index) =>
    readStep(reading, `${path}.steps[${index}]`, ids[index] ?? '', step, ids, directory),
  );
  refuseCycle(reading, path, given.steps, ids);
  const initial = reading.fill(join(path, 'initial'), given.initial, SCENARIO.initial);
  checkDuration(reading, path, given);
  const service = reading.fill<ScenarioText['interlocks'] | 'all'>(
    join(path, 'interlocks'),
    given.interlocks,
    SCENARIO.interlocks,
  );
  if (Array.isArray(service)) {
    service.forEach((tag, index) => {
      knownTag(reading, `${path}.interlocks[${index}]`, 'the tag of an interlock', tag, directory.interlockTags);
    });
  }
  if (reading.issues.length > before) return undefined;
  return {
    id,
    title: given.title,
    initial,
    steps: steps.filter((step) => step !== undefined),
    duration: given.duration,
    interlocksInService: Array.isArray(service) ? service : service === 'none' ? [] : 'all',
  };
}

function readStep(
  reading: Reading,
  path: string,
  id: string,
  given: StepText,
  ids: readonly string[],
  directory: Directory,
): Step | undefined {
  const before = reading.issues.length;
  const trigger = readTrigger(reading, path, given, ids, directory);
  const actions = readStepActions(reading, path, given, directory);
  if (trigger === undefined || actions === undefined || reading.issues.length > before) return undefined;
  const [first] = actions;
  return {
    id,
    label: given.label ?? (first === undefined ? id : actions.map(describe).join('; ')),
    trigger,
    actions,
    role: given.role ?? (first === undefined ? 'action' : roleOf(first)),
  };
}

function readTrigger(
  reading: Reading,
  path: string,
  given: StepText,
  ids: readonly string[],
  directory: Directory,
): Step['trigger'] | undefined {
  const { at, when, after, delay } = given;
  if (at !== undefined && (when !== undefined || after !== undefined)) {
    reading.object(
      'contradiction',
      path,
      'either "at", or "when", or "after"',
      'a time and a condition',
      'a delay after a step is "delay"',
    );
    return undefined;
  }
  if (at === undefined && when === undefined && after === undefined) {
    reading.object('missing', path, 'when it happens: "at", "when" or "after"', 'none of them');
    return undefined;
  }
  if (after !== undefined && !ids.includes(after)) {
    reading.refuse(
      'reference',
      join(path, 'after'),
      'the id of a step of this scenario',
      after,
      suggestion(after, ids),
    );
    return undefined;
  }
  if (delay !== undefined && (after === undefined || when !== undefined)) {
    reading.object(
      'contradiction',
      join(path, 'delay'),
      'a delay only beside "after" alone',
      'one',
      'with "when" use its "for"',
    );
    return undefined;
  }
  if (when !== undefined) {
    const condition = readCondition(reading, join(path, 'when'), when, directory);
    return condition === undefined ? undefined : { kind: 'condition', condition, after };
  }
  if (at !== undefined) return { kind: 'time', at };
  return after === undefined ? undefined : { kind: 'after', after, delay: delay ?? 0 };
}

const STEP_KEYS: ReadonlySet<string> = new Set(['id', 'label', 'role', 'at', 'when', 'after', 'delay', 'do']);

function readStepActions(
  reading: Reading,
  path: string,
  given: StepText,
  directory: Directory,
): readonly Action[] | undefined {
  const inline: ActionText = Object.fromEntries(
    Object.entries(given).filter(([key, value]) => !STEP_KEYS.has(key) && value !== undefined),
  );
  const hasInline = Object.keys(inline).length > 0;
  if (given.do === undefined) return readAction(reading, path, inline, directory);
  if (hasInline) {
    const keys = Object.keys(inline).join(', ');
    reading.object(
      'contradiction',
      path,
      'either "do" or one action in the step',
      `"do" beside ${keys}`,
      'move it into "do"',
    );
    return undefined;
  }
  return given.do.flatMap((action, index) => readAction(reading, `${path}.do[${index}]`, action, directory) ?? []);
}

/** Steps that wait for each other in a circle never happen; the circle is printed. */
function refuseCycle(reading: Reading, path: string, steps: readonly StepText[], ids: readonly string[]): void {
  const afterOf = new Map(ids.map((id, index) => [id, steps[index]?.after]));
  const done = new Set<string>();
  for (const start of ids) {
    const chain: string[] = [];
    let at: string | undefined = start;
    while (at !== undefined && !done.has(at) && !chain.includes(at)) {
      chain.push(at);
      at = afterOf.get(at);
    }
    if (at !== undefined && chain.includes(at)) {
      const circle = [...chain.slice(chain.indexOf(at)), at];
      reading.object(
        'cycle',
        `${path}.steps[${ids.indexOf(at)}].after`,
        'steps that do not wait for each other in a circle',
        circle.join(' waits for '),
      );
    }
    for (const id of chain) done.add(id);
  }
}

/** Timed steps must lie within the duration, with their end. */
function checkDuration(reading: Reading, path: string, given: ScenarioText): void {
  const { duration } = given;
  const earliest = new Map<string, number>();
  given.steps.forEach((step, index) => {
    const base = step.at ?? (step.after === undefined ? 0 : (earliest.get(step.after) ?? 0) + (step.delay ?? 0));
    earliest.set(step.id ?? `step-${index + 1}`, base);
    if (base > duration) {
      reading.object(
        'contradiction',
        join(path, 'duration'),
        `a duration that covers step ${index + 1} at ${formatTime(base)}`,
        formatTime(duration),
      );
    } else if (step.for !== undefined && step.change !== undefined && base + step.for > duration) {
      reading.warn(
        'style',
        join(path, 'duration'),
        `a duration that covers the end of step ${index + 1} at ${formatTime(base + step.for)}`,
        formatTime(duration),
      );
    }
  });
}

/** Whether an action starts trouble or answers it, when the step does not say. */
function roleOf(action: Action): Step['role'] {
  if (action.kind === 'change' || action.kind === 'instrument' || action.kind === 'power-dip') return 'upset';
  if (action.kind === 'machine') return action.command === 'start' || action.command === 'release' ? 'action' : 'upset';
  return action.kind === 'valve' && action.command === 'stick' ? 'upset' : 'action';
}

/** An action in words, for steps without a label. */
function describe(action: Action): string {
  switch (action.kind) {
    case 'change': {
      const { how } = action;
      if (how.kind === 'trace') return `${action.channel.name} follows a trace`;
      const size = how.kind === 'times' ? `x ${how.value}` : `to ${Number(how.value.toPrecision(4))}`;
      return `${action.channel.name} ${size}${how.duration === undefined ? '' : ` for ${formatTime(how.duration)}`}`;
    }
    case 'machine':
      return `${action.command.replace('-', ' ')} ${action.tag}`;
    case 'valve':
      if (typeof action.command !== 'number') return `${action.command} ${action.valve}`;
      if (action.command === 0) return `close ${action.valve}`;
      return action.command === 1 ? `open ${action.valve}` : `${action.valve} to ${100 * action.command} %`;
    case 'controller':
      return `${action.tag} ${action.mode ?? 'changed'}`;
    case 'instrument':
      return `${action.tag} ${typeof action.fault === 'string' ? action.fault : 'off'}`;
    case 'interlock':
      return `${action.command} ${action.tag}`;
    case 'power-dip':
      return `power dip of ${action.tags.join(', ')}`;
  }
}
