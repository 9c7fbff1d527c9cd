import { describe, expect, test } from 'vitest';

import { branchScenario } from '../../../ui/store/branch-case.ts';
import { blocksOf, moveEdit, stretchEdit, type StepText } from '../../../ui/store/timeline.ts';
import { workOn } from '../../../ui/store/work.ts';

const STEPS: readonly StepText[] = [
  { id: 'trip', at: '30 s', stop: 'P-1' },
  { id: 'restart', after: 'trip', delay: '1 min', start: 'P-2', label: 'operator starts P-2' },
  { at: '2 min', change: 'gas.rate', times: 1.3, over: '10 s', for: '5 min' },
  { id: 'gas', when: { instrument: 'FT-1', above: '2 L/s' }, open: 'gas-inlet' },
];
const BASE = ['scenarios', 's', 'steps'];
const blocks = blocksOf(STEPS, new Map([['trip', 'stop P-1']]), new Map([['gas', 200]]));

describe('steps as blocks', () => {
  test('stand where their time, the step before them or the last run puts them', () => {
    expect(blocks.map((b) => [b.id, b.start, b.lasts, b.trigger, b.role])).toEqual([
      ['trip', 30, undefined, 'time', 'upset'],
      ['restart', 90, undefined, 'after', 'action'],
      ['step-3', 120, 300, 'time', 'upset'],
      ['gas', 200, undefined, 'condition', 'action'],
    ]);
    expect(blocks.map((b) => b.label)).toEqual(['stop P-1', 'operator starts P-2', 'step-3', 'gas']);
  });

  test('a block is moved by its time, or by its delay; one that waits for a condition is not', () => {
    expect(moveEdit(BASE, STEPS, blocks, 0, 41.26)).toEqual([[...BASE, 0, 'at'], '41.3 s']);
    expect(moveEdit(BASE, STEPS, blocks, 1, 75)).toEqual([[...BASE, 1, 'delay'], '45 s']);
    expect(moveEdit(BASE, STEPS, blocks, 1, 10)).toEqual([[...BASE, 1, 'delay'], '0 s']);
    expect(moveEdit(BASE, STEPS, blocks, 3, 10)).toBeUndefined();
  });

  test('a block lasts at least as long as its ramp', () => {
    expect(stretchEdit(BASE, blocks, 2, 90)).toEqual([[...BASE, 2, 'for'], '90 s']);
    expect(stretchEdit(BASE, blocks, 2, 3)).toEqual([[...BASE, 2, 'for'], '10 s']);
    expect(stretchEdit(BASE, blocks, 0, 90)).toBeUndefined();
  });
});

describe('the scenario of a branch', () => {
  const document = { scenarios: { s: { title: 'T', duration: '20 min', steps: STEPS } } };
  const work = { ...workOn('c.json', JSON.stringify(document)), scenario: 's' };
  const fired = new Map([
    ['trip', 30],
    ['restart', 90],
    ['step-3', 120],
    ['gas', 200],
  ]);
  const branch = { id: 'b1', label: 'sooner', at: 60, action: { start: 'P-2' }, keepsLater: false, line: 1 };
  const labels = (keepsLater: boolean, at = 60): unknown[] => {
    const scenario = branchScenario(document, work, { ...branch, keepsLater, at }, fired);
    return (scenario?.['steps'] as StepText[]).map((s) => s['id']);
  };

  test('keeps what had happened, every upset, and none of the later actions', () => {
    expect(labels(false)).toEqual(['trip', 'step-3', 'branch-b1']);
    expect(labels(false, 100)).toEqual(['trip', 'restart', 'step-3', 'branch-b1']);
  });
  test('keeps all of it when asked', () => {
    expect(labels(true)).toEqual(['trip', 'restart', 'step-3', 'gas', 'branch-b1']);
  });
});
