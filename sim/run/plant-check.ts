/** Whether the plant of a case can run: what its equations say at the design point, as issues beside those of the text. */
import type { Case } from '../case/case.ts';
import type { Issue } from '../case/issues.ts';
import { createColumn } from '../column/column.ts';
import { fitDuct } from './initial-state.ts';
import { measuredText, quantityText } from './quantity-text.ts';
import { createRun } from './simulate.ts';
import { steadyAnswers, steadyScenario, type BedAnswer, type SteadyAnswer } from './steady-answers.ts';

/** Loading from which a segment counts as flooded; 1 at the flood point, less what a steady search leaves. */
const FLOODED = 0.999;
/** Gas velocity over the flooding velocity above which a design is unusual; common practice 0.6 to 0.8, no source. */
const HIGH_LOAD = 0.85;
/** The same from which a bed is too wide for its gas. */
const LOW_LOAD = 0.2;

/** Issues of the design point: errors where the plant cannot run, warnings where it deserves a look. */
export function checkPlant(plant: Case): Issue[] {
  const fan = plant.gas.source.kind === 'fan' ? fitDuct(createColumn(plant)) : undefined;
  const small =
    fan === undefined
      ? []
      : [issue('error', 'gas.source', 'a fan that gives the design rate', fan, 'raise its rated flow or pressure')];
  const run = createRun(plant, steadyScenario(plant));
  if (run.outcome.kind === 'failed') {
    const { failure } = run.outcome;
    const hint = 'a scenario that begins dry shows where the plant goes';
    const received = `none found; what moves most: ${failure.where}`;
    const unsteady = issue('error', 'column', 'a plant with a steady state', received, hint);
    // The search ended somewhere: a flooded bed there is the likely reason.
    const flooded = failure.kind === 'no-steady-state' ? floodIssues(steadyAnswers(run)) : [];
    return [...small, ...flooded, unsteady];
  }
  const answer = steadyAnswers(run);
  return [...small, ...loadIssues(answer), ...answer.beds.flatMap(bedIssues), ...limitIssues(plant, answer)];
}

function issue(severity: Issue['severity'], path: string, expected: string, received: string, hint?: string): Issue {
  const base = { path, expected, received, severity, kind: 'physics' } as const;
  return hint === undefined ? base : { ...base, hint };
}

function floodIssues({ profile }: SteadyAnswer): Issue[] {
  return profile.beds
    .filter((bed) => bed.rows.some((row) => row.loading >= FLOODED))
    .map(({ bed }) => {
      const hint = 'a larger diameter, an opener packing, less gas or less liquid';
      const path = `column.beds[${bed - 1}]`;
      return issue('error', path, 'a bed that does not flood at the design point', 'a flooded one', hint);
    });
}

function loadIssues(answer: SteadyAnswer): Issue[] {
  const flooded = floodIssues(answer);
  if (flooded.length > 0) return flooded;
  const { floodApproach } = answer;
  if (floodApproach === null) return [];
  const share = quantityText(floodApproach, 'fraction', 'si');
  if (floodApproach > HIGH_LOAD) {
    return [
      issue('warning', 'column.diameter', 'gas below 85 % of the flooding velocity', share, 'little room for more gas'),
    ];
  }
  if (floodApproach < LOW_LOAD) {
    return [issue('warning', 'column.diameter', 'gas above 20 % of the flooding velocity', share, 'wide for its gas')];
  }
  return [];
}

function bedIssues(bed: BedAnswer): Issue[] {
  const path = `column.beds[${bed.bed - 1}]`;
  const found: Issue[] = [];
  if (bed.liquidVelocity < bed.wettingVelocity) {
    const [has, needs] = [bed.liquidVelocity, bed.wettingVelocity].map((u) => quantityText(u, 'velocity', 'si'));
    found.push(
      issue(
        'warning',
        path,
        `liquid of at least ${needs}, which wets the packing`,
        has,
        'more liquid, or a smaller diameter',
      ),
    );
  }
  if (bed.floodGradient !== null && bed.worstGradient > bed.floodGradient) {
    const [has, most] = [bed.worstGradient, bed.floodGradient].map((g) => quantityText(g, 'pressure-gradient', 'si'));
    found.push(issue('warning', path, `a pressure gradient below ${most}, flooding by the packing factor`, has));
  }
  return found;
}

function limitIssues(plant: Case, answer: SteadyAnswer): Issue[] {
  return answer.limits.flatMap(({ id, value, kept }) => {
    const limit = plant.limits.find((l) => l.id === id);
    if (kept || limit === undefined) return [];
    const text = (v: number): string => measuredText(plant, limit, v, 'case');
    const expected = `a steady state that keeps ${limit.kind === 'max' ? 'at most' : 'at least'} ${text(limit.value)}`;
    return [issue('warning', `limits.${id}`, expected, text(value))];
  });
}
