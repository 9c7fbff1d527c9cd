/** The answers of a run, finished or not: pure functions over its record and what it has integrated. */
import type { Case } from '../case/case.ts';
import type { Layout } from '../column/layout.ts';
import { LEAST_VALID_SHARE } from './averages.ts';
import { alarmInstants, commandInstants, interlockInstants } from './instants.ts';
import { limitAnswers, RECOVERY_BAND } from './limit-answers.ts';
import type { Answers, Emission, LimitAnswer } from './result-schema.ts';
import { firstUpset, traceOf, type RunRecord } from './run-record.ts';

/** Amounts that the run integrated beside the states. */
export interface Integrated {
  /** By solute, mol. */ readonly stack: readonly number[];
  readonly diverted: readonly number[];
  /** m3 */ readonly carriedOver: number;
}

/** Reads the accumulators of a state. */
export function integratedOf(layout: Layout, y: ArrayLike<number>): Integrated {
  const solutes = Array.from({ length: layout.solutes }, (_, k) => k + 1);
  return {
    stack: solutes.map((k) => y[layout.stack + k]),
    diverted: solutes.map((k) => y[layout.diverted + k]),
    carriedOver: Math.max(0, y[layout.carryOver]), // rounding may leave it a shade below zero
  };
}

/** Everything that is asked of a run. */
export function answersOf(record: RunRecord, integrated: Integrated): Answers {
  const limits = limitAnswers(record);
  return {
    firstUpset: firstUpset(record) ?? null,
    limits,
    emissions: emissionsOf(record, integrated),
    carriedOver: integrated.carriedOver,
    instants: {
      alarms: alarmInstants(record),
      interlocks: interlockInstants(record),
      commands: commandInstants(record, headlineLimit(limits)),
    },
    rules: rulesOf(record.plant),
  };
}

function emissionsOf(record: RunRecord, { stack, diverted }: Integrated): Emission[] {
  const length = (record.time[record.time.length - 1] ?? 0) - (record.time[0] ?? 0);
  return record.plant.solutes.map(({ id, molarMass }, k) => ({
    solute: id,
    molarMass,
    stack: stack[k] * molarMass,
    aboveStart: (stack[k] - traceOf(record, `stack-flow.${id}`).value[0] * length) * molarMass,
    diverted: diverted[k] * molarMass,
  }));
}

/**
 * The limit that the answer is about: of those not kept the one exceeded most, else the one that is come nearest to;
 * strengths of the gas outlet before all else.
 */
export function headlineLimit(limits: readonly LimitAnswer[]): LimitAnswer | undefined {
  const outlet = limits.filter((l) => l.quantity.startsWith('gas-outlet.'));
  const among = outlet.length > 0 ? outlet : limits;
  const rank = (l: LimitAnswer): number => (l.kept ? 0 : 1e6) + severity(l);
  return among.reduce<LimitAnswer | undefined>(
    (best, l) => (best === undefined || rank(l) > rank(best) ? l : best),
    undefined,
  );
}

/** Worst judged value over the limit, or the limit over it. */
function severity({ kind, peak, average, limit }: LimitAnswer): number {
  const { value } = average?.peak ?? peak;
  const ratio = kind === 'max' ? value / limit.value : limit.value / value;
  return Number.isFinite(ratio) ? ratio : 0;
}

/** A figure that studies and estimates compare. */
export interface HeadlineFigure {
  readonly id: string;
  readonly unit: string;
  readonly value: number | null;
}

/** Peak, worst average and time beyond of every limit, and what was emitted. */
export function headlineFigures(answers: Answers): HeadlineFigure[] {
  const figures: HeadlineFigure[] = [];
  for (const l of answers.limits) {
    figures.push({ id: `${l.id}.initial`, unit: l.unit, value: l.initial.value });
    figures.push({ id: `${l.id}.peak`, unit: l.unit, value: l.peak.value });
    if (l.average !== null) figures.push({ id: `${l.id}.average`, unit: l.unit, value: l.average.peak?.value ?? null });
    figures.push({ id: `${l.id}.over`, unit: 's', value: (l.average?.over ?? l.over).total });
    if (l.massOver !== null) figures.push({ id: `${l.id}.massOver`, unit: 'kg', value: l.massOver });
  }
  for (const e of answers.emissions) figures.push({ id: `stack.${e.solute}`, unit: 'kg', value: e.stack });
  return figures;
}

/** How the figures are made, for whoever reads the document alone. */
function rulesOf(plant: Case): string[] {
  const rules = [
    'Times count from the start of the scenario; afterUpset from its first upset.',
    'Strengths per normal volume refer to 273.15 K and 101.325 kPa; dry means y / (1 - y of solvent vapour), with the computed vapour, for shown values too.',
    'Crossings and times beyond a limit are read off the record by straight lines; peaks of true values are refined by a parabola through three points.',
    'Averages are exact integrals of the record; before the start a quantity stands at its first value.',
    `Shown averages leave out the time in which the instrument is frozen or failed; one with less than ${percent(LEAST_VALID_SHARE)} of valid data in its window is invalid and counts neither as kept nor as exceeded (engineering judgement; permits differ).`,
    'A reading at an end of the range of its instrument counts as valid.',
    'Mass over the limit is the integral of max(0, emitted rate - limit strength x gas rate) at the stack; what is diverted is counted apart.',
    `Recovered: within ${percent(RECOVERY_BAND)} of the initial value or of the limit, whichever is larger (temperatures: of their distance), until the end of the record.`,
  ];
  if (plant.limits.some((l) => l.averaging.kind === 'block')) {
    rules.push(
      'Blocks follow each other from the start of the scenario; one that the record does not finish is filled up with the last value. worstAlignment is the worst that blocks beginning at any other moment would give.',
    );
  }
  return rules;
}

function percent(share: number): string {
  return `${Math.round(100 * share)} %`;
}
