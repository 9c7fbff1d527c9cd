/** The answer of a run in one sentence, for people: what the headline quantity did, against which limits, and how much. */
import type { Case, Limit } from '../case/case.ts';
import { formatTime } from '../units.ts';
import { headlineLimit } from './answers.ts';
import { massText, measuredText, normalMassText, quantityText, type UnitSystem } from './quantity-text.ts';
import type { Answers, LimitAnswer, ResultDocument } from './result-schema.ts';
import { recordOf, traceOf, type RunRecord } from './run-record.ts';
import type { Run } from './simulate.ts';

/** A peak this close to the initial value is no peak, over the initial value: what a steady state drifts by stays below. */
const FLAT = 1e-3;

/** What results are not; said once where they are shown. */
export const CAUTION =
  'These figures are an engineering estimate, not a certificate: confirm them against plant tests. The hazard review, the responsible engineer and local codes decide; never defeat a trip to follow a model.';

/**
 * The sentence.
 *
 * "Acetone at the outlet peaks at 3020 ppmv (7.96 g/Nm3 dry) 1 min after P-310A trips; over 1000 mg/Nm3 for 1 min 52 s,
 * 0.46 kg above it."
 *
 * @param stopped - When the calculation could not go on, s; undefined for a run that did.
 */
export function sentenceOf(
  record: RunRecord,
  answers: Answers,
  stopped: number | undefined,
  system: UnitSystem = 'case',
): string {
  if (stopped === 0) return 'The calculation could not begin: no state was found to start from.';
  const prefix = stopped === undefined ? '' : `The calculation stopped after ${formatTime(stopped)}; until then: `;
  const body = answerSentence(record, answers, system);
  return prefix + (prefix === '' ? capital(body) : body);
}

/** The sentence of a document's run in other units. */
export function measuredSentence(run: Run, result: ResultDocument, system: UnitSystem): string {
  const stopped = result.outcome.failure === null ? undefined : result.outcome.time;
  return sentenceOf(recordOf(run), result.answers, stopped, system);
}

function answerSentence(record: RunRecord, answers: Answers, system: UnitSystem): string {
  const headline = headlineLimit(answers.limits);
  if (headline === undefined) return unlimited(record, system);
  const { plant } = record;
  const together = answers.limits.filter((l) => l.quantity === headline.quantity && l.kind === headline.kind);
  const verdicts = together
    .sort((a, b) => Number(b.averaging.kind === 'none') - Number(a.averaging.kind === 'none'))
    .map((l) => verdict(plant, l, system));
  const others = answers.limits
    .filter((l) => !together.includes(l) && !l.kept)
    .map((l) => `${l.label} breaks its limit`);
  return `${[course(record, headline, system), ...verdicts, ...others].join('; ')}.`;
}

/** What the quantity did: worst value, for a gas also per normal volume, and when, counted from the upset. */
function course(record: RunRecord, headline: LimitAnswer, system: UnitSystem): string {
  const { plant } = record;
  const { peak, initial, basis, quantity, kind } = headline;
  const limit = plant.limits.find((l) => l.id === headline.id);
  const name = subject(plant, headline);
  const value =
    peak.mgPerNm3 !== null
      ? `${quantityText(nearestValue(record, quantity, peak.time), 'gas-strength', system)} (${normalMassText(peak.mgPerNm3)} ${basis})`
      : limit === undefined
        ? String(peak.value)
        : measuredText(plant, limit, peak.value, system);
  if (Math.abs(peak.value - initial.value) <= FLAT * Math.abs(initial.value)) {
    return `${name} ${isLevel(record, quantity) ? 'stays at' : 'is worst at the start,'} ${value}`;
  }
  return `${name} ${kind === 'max' ? 'peaks at' : 'falls to'} ${value} ${afterUpset(record, peak.time)}`;
}

/** Whether a quantity hardly moves over the whole record. */
function isLevel(record: RunRecord, id: string): boolean {
  const { value } = traceOf(record, id);
  return Array.from(value).every((v) => Math.abs(v - value[0]) <= FLAT * Math.abs(value[0]));
}

/** "1 min after P-310A trips", "2 min after the start". */
function afterUpset(record: RunRecord, time: number): string {
  const upset = record.events.filter((e) => e.kind === 'upset' && e.time <= time).pop();
  if (upset === undefined) return `${formatTime(time)} after the start`;
  return `${formatTime(time - upset.time)} after ${upset.text}`;
}

function verdict(plant: Case, answer: LimitAnswer, system: UnitSystem): string {
  const limit = plant.limits.find((l) => l.id === answer.id);
  if (limit === undefined) return '';
  const value = measuredText(plant, limit, answer.limit.value, system);
  const beyond = answer.kind === 'max' ? 'over' : 'under';
  const { average } = answer;
  if (average !== null) return averageVerdict(plant, limit, answer, value, system);
  if (answer.kept) return `never ${beyond} ${value}`;
  const mass = answer.massOver === null ? '' : `, ${massText(answer.massOver, system)} above it`;
  const still = answer.over.intervals.some((i) => i.open) ? ' and still at the end' : '';
  return `${beyond} ${value} for ${formatTime(answer.over.total)}${still}${mass}`;
}

function averageVerdict(plant: Case, limit: Limit, answer: LimitAnswer, value: string, system: UnitSystem): string {
  const { average, averaging } = answer;
  const name = `the ${formatTime(averaging.window ?? 0)} average`;
  if (average?.peak === null || average?.peak === undefined) return `${name} has too little valid data`;
  const worst = measuredText(plant, limit, average.peak.value, system);
  const reaches = answer.kind === 'max' ? 'reaches' : 'falls to';
  if (answer.kept) return `${name} ${reaches} ${worst} and keeps ${value}`;
  return `${name} ${reaches} ${worst}, ${answer.kind === 'max' ? 'over' : 'under'} ${value} for ${formatTime(average.over.total)}`;
}

/** A case without limits: the first solute at the outlet. */
function unlimited(record: RunRecord, system: UnitSystem): string {
  const { solutes } = record.plant;
  if (solutes.length === 0) return 'the case states no limit.';
  const { value, time } = traceOf(record, `gas-outlet.${solutes[0].id}`);
  let top = 0;
  for (let i = 1; i < value.length; i++) if (value[i] > value[top]) top = i;
  const name = `${solutes[0].name} at the outlet`;
  if (value[top] - value[0] <= FLAT * value[0])
    return `${name} stays at ${quantityText(value[0], 'gas-strength', system)}; the case states no limit.`;
  return `${name} peaks at ${quantityText(value[top], 'gas-strength', system)} ${afterUpset(record, time[top])}; the case states no limit.`;
}

/** "acetone at the outlet" for outlet strengths, else the label. */
function subject(plant: Case, { quantity, label, solute }: LimitAnswer): string {
  const name = plant.solutes.find((k) => k.id === solute)?.name;
  return quantity.startsWith('gas-outlet.') && name !== undefined ? `${name} at the outlet` : label;
}

/** Recorded value nearest to a moment: of the gas as it is, whatever a limit refers to. */
function nearestValue(record: RunRecord, id: string, time: number): number {
  let near = 0;
  for (let i = 1; i < record.time.length; i++) {
    if (Math.abs(record.time[i] - time) < Math.abs(record.time[near] - time)) near = i;
  }
  return traceOf(record, id).value[near];
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
