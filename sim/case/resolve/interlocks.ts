// Interlocks: conditions, votes, actions.

import type { Action, Interlock } from '../case.ts';
import { CONTROL } from '../defaults.ts';
import { join } from '../issues.ts';
import type { Reading } from '../reading.ts';
import type { InterlockText } from '../schema/control.ts';
import type { Directory } from './actions.ts';
import { readAction, readCondition } from './actions.ts';

/** One interlock, or undefined after noting why not. */
export function readInterlock(
  reading: Reading,
  path: string,
  tag: string,
  given: InterlockText,
  directory: Directory,
): Interlock | undefined {
  const before = reading.issues.length;
  const whenPath = join(path, 'when');
  const conditions = Array.isArray(given.when)
    ? given.when.map((condition, index) => readCondition(reading, `${whenPath}[${index}]`, condition, directory))
    : [readCondition(reading, whenPath, given.when, directory)];
  const doPath = join(path, 'do');
  const actions: (readonly Action[] | undefined)[] = Array.isArray(given.do)
    ? given.do.map((action, index) => readAction(reading, `${doPath}[${index}]`, action, directory))
    : [readAction(reading, doPath, given.do, directory)];
  const resetPermissive =
    given.resetPermissive === undefined
      ? undefined
      : readCondition(reading, join(path, 'resetPermissive'), given.resetPermissive, directory);
  if (given.resetPermissive !== undefined && given.kind === 'auto-start') {
    reading.object(
      'contradiction',
      join(path, 'resetPermissive'),
      'no reset of an auto-start',
      'one',
      'only a trip latches',
    );
  }
  const votes = reading.fill(join(path, 'votes'), given.votes, CONTROL.votes);
  if (votes > conditions.length) {
    reading.object(
      'contradiction',
      join(path, 'votes'),
      `at most ${conditions.length}, the number of conditions`,
      String(votes),
    );
  }
  const delay = reading.fill(join(path, 'delay'), given.delay, CONTROL.delay);
  const whole = conditions.filter((condition) => condition !== undefined);
  if (reading.issues.length > before || whole.length < conditions.length) return undefined;
  return {
    tag,
    kind: given.kind,
    conditions: whole,
    votes,
    delay,
    actions: actions.flatMap((list) => list ?? []),
    resetPermissive,
  };
}
