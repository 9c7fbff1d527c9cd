/** The case text of a branch: the scenario with the branch's action added, and what it leaves out taken away. */
import { setAt, valueAt } from './json-text.ts';
import type { Branch, Work } from './work.ts';

type Step = Readonly<Record<string, unknown>>;

/** Id that a branch's scenario has in its text. */
export function branchScenarioId(work: Work, branch: Branch): string {
  return `${work.scenario}.${branch.id}`;
}

/**
 * The scenario of a branch as a case file writes it; undefined when the case has no such scenario.
 *
 * @param fired - When each step of the scenario came, s, by id; steps that came before the branch stay.
 */
export function branchScenario(
  document: unknown,
  work: Work,
  branch: Branch,
  fired: ReadonlyMap<string, number>,
): Record<string, unknown> | undefined {
  const scenario = valueAt(document, ['scenarios', work.scenario]);
  if (typeof scenario !== 'object' || scenario === null) return undefined;
  const given = scenario as Record<string, unknown>;
  const steps = (Array.isArray(given['steps']) ? given['steps'] : []) as Step[];
  const ids = steps.map((step, i) => (typeof step['id'] === 'string' ? step['id'] : `step-${i + 1}`));
  const stays = (step: Step, i: number): boolean =>
    branch.keepsLater || isUpset(step) || (fired.get(ids[i] ?? '') ?? Infinity) < branch.at;
  const kept = new Set(ids.filter((_, i) => stays(steps[i] ?? {}, i)));
  // What waits for a step that is left out can never come.
  for (let changed = true; changed;) {
    changed = false;
    steps.forEach((step, i) => {
      const after = step['after'];
      if (typeof after === 'string' && !kept.has(after) && kept.delete(ids[i] ?? '')) changed = true;
    });
  }
  const own = {
    id: `branch-${branch.id}`,
    at: `${branch.at} s`,
    role: 'action',
    label: branch.label,
    ...branch.action,
  };
  return {
    ...given,
    title: `${String(given['title'])}: ${branch.label}`,
    steps: [...steps.map((step, i) => ({ id: ids[i], ...step })).filter((_, i) => kept.has(ids[i] ?? '')), own],
  };
}

/** The case text with the branch's scenario in it; undefined when the case has no such scenario. */
export function branchText(work: Work, branch: Branch, fired: ReadonlyMap<string, number>): string | undefined {
  const scenario = branchScenario(JSON.parse(work.text), work, branch, fired);
  return scenario === undefined ? undefined : setAt(work.text, ['scenarios', branchScenarioId(work, branch)], scenario);
}

/** Whether a step starts trouble: as the case says, else by what it does. */
export function isUpset(step: Step): boolean {
  if (step['role'] !== undefined) return step['role'] === 'upset';
  return ['change', 'set', 'fault', 'powerDip', 'stop', 'lockOut', 'stick'].some((verb) => verb in step);
}
