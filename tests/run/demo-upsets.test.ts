import { readdirSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { closureOf } from '../../sim/run/closure.ts';
import { createRun, type Run } from '../../sim/run/simulate.ts';
import { caseText, mustRead } from '../case/support.ts';

// Every scenario of every case beside the sources, at the case's own settings: it comes to its end, and what went in is
// what came out and what is stored, dry start, flood and recovery included. The target, 1e-6, is the one that the answers
// are judged by; seen: components 3e-11, carrier 9e-8, energy 6e-8.

const TARGET = 1e-6;
/**
 * How far below zero a quantity may fall, of its largest value in the run: ten times the relative tolerance. The strength
 * of a liquid that is hardly there (dry start) is a quotient of two amounts that are both within the absolute tolerance.
 */
const UNDERSHOOT = 1e-4;
const UNDERSHOOT_IN_A_TRACE = 4e-3;

const cases = readdirSync('cases')
  .filter((file) => file.endsWith('.json') && !file.endsWith('.schema.json'))
  .map((file) => file.replace('.json', ''));

/** What is lost, by component. */
function lost(run: Run): string[] {
  return closureOf(run.column, 0, run.initial, run.time, run.state)
    .filter(({ error }) => !(error < TARGET))
    .map(({ component, error }) => `${component} ${error}`);
}

/** What is negative, and what is known at times only: NaN stands for a figure that the case's law does not have at all. */
function impossible({ recorder: { observer, rows } }: Run): string[] {
  return observer.quantities.flatMap(({ id, kind }, i) => {
    const known = rows.map((row) => row[i]!).filter((v) => !Number.isNaN(v));
    if (known.length > 0 && known.length < rows.length) return [`${id} is not a number at times`];
    if (kind === 'molar-flow' || kind === 'pressure-difference') return []; // these have a sign
    const largest = known.reduce((m, v) => Math.max(m, v), 0);
    const least = known.reduce((m, v) => Math.min(m, v), 0);
    const allowed = kind === 'liquid-strength' ? UNDERSHOOT_IN_A_TRACE : UNDERSHOOT;
    return least < -allowed * largest - 1e-15 ? [`${id} falls to ${least}, at most ${largest}`] : [];
  });
}

describe.each(cases)('%s', (name) => {
  const plant = mustRead(caseText(name));
  test.each(plant.scenarios.map((s) => s.id))(
    '%s comes to its end, closed, with nothing negative',
    (id) => {
      const scenario = plant.scenarios.find((s) => s.id === id)!;
      const run = createRun(plant, scenario);
      expect(run.advance(scenario.duration).kind).toBe('completed');
      expect(lost(run)).toEqual([]);
      expect(impossible(run)).toEqual([]);
    },
    60_000,
  );
});
