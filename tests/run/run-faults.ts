// What must never be seen in a run, in words; empty when all is well.

import { closureOf } from '../../sim/run/closure.ts';
import type { Run } from '../../sim/run/simulate.ts';

/**
 * Components that are not closed.
 *
 * @param target - Largest error allowed, of what came in or was there; by component.
 */
export function lost(run: Run, target: (component: string) => number): string[] {
  return closureOf(run.column, 0, run.initial, run.time, run.state)
    .filter(({ component, error }) => !(error < target(component)))
    .map(({ component, error }) => `${component} is lost: ${error}`);
}

/** How far below zero a quantity may fall, of its largest value in the run: ten times the default relative tolerance. */
const UNDERSHOOT = 1e-4;
/**
 * Share of the largest liquid load below which the strength of the liquid that leaves is not judged: where nothing drips,
 * it is the continuation of the bed's profile, and of a trace it is a quotient of two amounts within the tolerance.
 */
const LEAST_LOAD = 1e-3;

/** What is negative, and what is known at times only: NaN stands for a figure that the case's law does not have at all. */
export function impossible({ recorder: { observer, rows } }: Run): string[] {
  const load = observer.indexOf('liquid-load.bottom');
  const least = LEAST_LOAD * rows.reduce((m, row) => Math.max(m, row[load]!), 0);
  const dripping = rows.filter((row) => row[load]! > least);
  return observer.quantities.flatMap(({ id, kind }, i) => {
    const known = rows.map((row) => row[i]!).filter((v) => !Number.isNaN(v));
    if (known.length > 0 && known.length < rows.length) return [`${id} is not a number at times`];
    if (known.some((v) => !Number.isFinite(v))) return [`${id} is infinite at times`];
    if (kind === 'molar-flow' || kind === 'pressure-difference') return []; // these have a sign
    const judged = id.startsWith('liquid-outlet.') ? dripping.map((row) => row[i]!) : known;
    const highest = judged.reduce((m, v) => Math.max(m, v), 0);
    const lowest = judged.reduce((m, v) => Math.min(m, v), 0);
    return lowest < -UNDERSHOOT * highest - 1e-15 ? [`${id} falls to ${lowest}, at most ${highest}`] : [];
  });
}
