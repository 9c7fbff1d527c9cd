/** The steps of a scenario as blocks on a time axis, and the edits that dragging them means. Pure. */
import { parseQuantity } from '../../sim/index.ts';
import { fieldTime } from '../format/clock.ts';
import { isUpset } from './branch-case.ts';
import type { Path } from './json-text.ts';

/** A step as the case file writes it. */
export type StepText = Readonly<Record<string, unknown>>;

/** One step on the axis. */
export interface Block {
  /** Place in the list of steps. */ readonly index: number;
  readonly id: string;
  readonly label: string;
  readonly role: 'upset' | 'action';
  /** s from the start; undefined while nobody knows (a condition that has not come true). */ readonly start:
    number | undefined;
  /** How long it lasts, s; undefined: it stays, or it is over at once. */ readonly lasts: number | undefined;
  /** Ramp at its beginning, s. */ readonly ramp: number;
  readonly trigger: 'time' | 'after' | 'condition';
  readonly canMove: boolean;
  readonly canStretch: boolean;
}

/** Least length of a block, s. */
const LEAST = 1;

/** Seconds of a time as text; undefined when it is none. */
function seconds(text: unknown): number | undefined {
  const parsed = parseQuantity(text, 'time');
  return parsed.ok ? parsed.value : undefined;
}

/** Id of a step, as the reader of cases gives it. */
export function stepId(step: StepText, index: number): string {
  return typeof step['id'] === 'string' ? step['id'] : `step-${index + 1}`;
}

/**
 * Blocks of a scenario.
 *
 * @param steps - As the case file has them.
 * @param labels - What each step is called, by id; made by the reader of the case.
 * @param fired - When each step came in the last run, s, by id: for those that wait for a condition.
 */
export function blocksOf(
  steps: readonly StepText[],
  labels: ReadonlyMap<string, string>,
  fired: ReadonlyMap<string, number>,
): Block[] {
  const starts = new Map<string, number>();
  const startOf = (step: StepText, id: string): number | undefined => {
    if ('when' in step) return fired.get(id);
    if (typeof step['after'] === 'string') {
      const before = starts.get(step['after']) ?? fired.get(step['after']);
      return before === undefined ? undefined : before + (seconds(step['delay']) ?? 0);
    }
    return seconds(step['at']);
  };
  // A step may wait for one that stands further down.
  for (let round = 0; round < 2; round++) {
    steps.forEach((step, i) => {
      const start = startOf(step, stepId(step, i));
      if (start !== undefined) starts.set(stepId(step, i), start);
    });
  }
  return steps.map((step, index) => {
    const id = stepId(step, index);
    const trigger = 'when' in step ? 'condition' : 'after' in step ? 'after' : 'time';
    const start = starts.get(id);
    return {
      index,
      id,
      label: typeof step['label'] === 'string' ? step['label'] : (labels.get(id) ?? id),
      role: isUpset(step) ? 'upset' : 'action',
      start,
      lasts: seconds(step['for']),
      ramp: seconds(step['over']) ?? 0,
      trigger,
      canMove: trigger !== 'condition' && start !== undefined,
      canStretch: ['change', 'set', 'powerDip'].some((verb) => verb in step),
    };
  });
}

/** The edit that puts a block at a time; undefined when it cannot be moved. */
export function moveEdit(
  base: Path,
  steps: readonly StepText[],
  blocks: readonly Block[],
  index: number,
  start: number,
): [Path, string] | undefined {
  const step = steps[index];
  const block = blocks[index];
  if (step === undefined || block?.canMove !== true) return undefined;
  const to = Math.max(0, start);
  if (block.trigger === 'time') return [[...base, index, 'at'], fieldTime(to)];
  const before = blocks.find((b) => b.id === step['after'])?.start ?? 0;
  return [[...base, index, 'delay'], fieldTime(Math.max(0, to - before))];
}

/** The edit that makes a block last. */
export function stretchEdit(
  base: Path,
  blocks: readonly Block[],
  index: number,
  lasts: number,
): [Path, string] | undefined {
  const block = blocks[index];
  if (block?.canStretch !== true) return undefined;
  return [[...base, index, 'for'], fieldTime(Math.max(LEAST, block.ramp, lasts))];
}
