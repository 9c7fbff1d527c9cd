/** The printed answer of a run: the sentence, tables, events, warnings, the caution. Text in, text out. */
import {
  formatNumber,
  formatTime,
  massText,
  measuredText,
  quantityText,
  type Case,
  type LimitAnswer,
  type ResultDocument,
  type SetpointCrossing,
  type UnitSystem,
} from '../index.ts';
import type { Ink } from './ink.ts';
import { clock, textTable, wrapped } from './text-table.ts';

/** Columns of a line of prose. */
const WIDTH = 100;

/** What a report is made of. */
export interface ReportParts {
  readonly plant: Case;
  readonly result: ResultDocument;
  readonly sentence: string;
  readonly units: UnitSystem;
  readonly ink: Ink;
}

/** The report, ending in a line break. */
export function runReport(parts: ReportParts): string {
  const { result, sentence, ink } = parts;
  return blocksText([
    wrapped(sentence, WIDTH, '').map((line) => ink.strong(line)),
    [`${result.case.title}: ${result.scenario.title}`],
    section(ink, 'Limits', limitRows(parts)),
    section(ink, timesTitle(result), instantRows(parts), [1, 2, 3]),
    section(ink, 'Commands', commandRows(parts)),
    section(ink, 'Amounts', amountRows(parts)),
    section(ink, 'Events', eventRows(result)),
    section(ink, 'Checks', checkRows(parts)),
    section(ink, 'Twice the segments', convergenceRows(result), [1, 2, 3]),
    warningLines(result),
    wrapped(result.summary.caution, WIDTH, ''),
  ]);
}

/** Blocks of lines with a blank line between; empty ones leave nothing. */
export function blocksText(blocks: readonly (readonly string[])[]): string {
  const texts = blocks.filter((b) => b.length > 0).map((b) => b.join('\n'));
  return `${texts.join('\n\n')}\n`;
}

/** A table under a title; nothing without rows under the header. */
export function section(
  ink: Ink,
  title: string,
  rows: readonly (readonly string[])[],
  right: readonly number[] = [],
): string[] {
  if (rows.length < 2) return [];
  const [head = '', ...rest] = textTable(rows, right);
  const header = head.trim() === '' ? [] : [`  ${ink.quiet(head)}`];
  return [ink.strong(title), ...header, ...rest.map((line) => `  ${line}`)];
}

/** One row for each limit, a second one for its average. */
function limitRows({ plant, result, units, ink }: ReportParts): string[][] {
  const rows = [['', 'limit', 'at the start', 'worst', 'at', 'shown', 'beyond for', '']];
  for (const answer of result.answers.limits) {
    const limit = plant.limits.find((l) => l.id === answer.id);
    if (limit === undefined) continue;
    const text = (value: number): string => measuredText(plant, limit, value, units);
    const [shown] = answer.shown;
    const end = shown !== undefined && shown.atRangeEnd ? ' (range end)' : '';
    const isJudge = answer.average === null;
    rows.push([
      answer.label,
      `${answer.kind === 'max' ? '<=' : '>='} ${text(answer.limit.value)}${answer.basis === 'dry' ? ' dry' : ''}`,
      text(answer.initial.value),
      text(answer.peak.value),
      isFlat(answer) ? '-' : clock(answer.peak.time),
      shown === undefined ? '-' : `${text(shown.peak.value)}${end}`,
      isJudge ? beyond(answer.over.total) : '',
      isJudge ? verdict(answer, ink) : '',
    ]);
    if (answer.average !== null) rows.push(averageRow(answer, text, ink));
  }
  return rows;
}

/** A worst value that is the initial one has no time of its own. */
function isFlat({ peak, initial }: LimitAnswer): boolean {
  return Math.abs(peak.value - initial.value) <= 1e-3 * Math.abs(initial.value);
}

function averageRow(answer: LimitAnswer, text: (value: number) => string, ink: Ink): string[] {
  const { average, averaging } = answer;
  const peak = average?.peak ?? undefined;
  const seen = answer.shown[0]?.average ?? undefined;
  const shown = seen?.peak ?? undefined;
  const invalid = seen !== undefined && seen.invalidTime > 0 ? ` (invalid for ${formatTime(seen.invalidTime)})` : '';
  return [
    `  ${formatTime(averaging.window ?? 0)} ${averaging.kind} average`,
    '',
    '',
    peak === undefined ? 'invalid' : text(peak.value),
    peak === undefined ? '' : clock(peak.time),
    shown === undefined ? `-${invalid}` : `${text(shown.value)}${invalid}`,
    beyond(average?.over.total ?? 0),
    verdict(answer, ink),
  ];
}

function verdict({ kept }: LimitAnswer, ink: Ink): string {
  return kept ? 'kept' : ink.bad('NOT KEPT');
}

function beyond(total: number): string {
  return total > 0 ? formatTime(total) : 'never';
}

function timesTitle({ answers }: ResultDocument): string {
  return answers.firstUpset === null ? 'Times from the start' : 'Times from the first upset';
}

/** When true and shown values pass setpoints and limits, and what acts when. */
function instantRows({ plant, result, units }: ReportParts): string[][] {
  const { answers } = result;
  const from = answers.firstUpset ?? 0;
  const at = (t: number | null | undefined): string =>
    t === null || t === undefined ? '-' : t === 0 && from > 0 ? 'from the start' : clock(t - from, true);
  const rows = [['', 'true value', 'shown value', 'acts']];
  const put = (tag: string, setpoint: SetpointCrossing, act: string): void => {
    if (setpoint.trueCrossing === null && setpoint.shownCrossing === null) return;
    rows.push([
      `${tag} (${setpointText(plant, setpoint, units)})`,
      at(setpoint.trueCrossing),
      at(setpoint.shownCrossing),
      act,
    ]);
  };
  for (const { tag, setpoint, annunciations } of answers.instants.alarms) put(tag, setpoint, at(annunciations[0]));
  for (const { tag, inService, conditions, acts } of answers.instants.interlocks) {
    for (const condition of conditions) put(tag, condition, inService ? at(acts[0]) : 'not in service');
  }
  for (const answer of answers.limits) {
    const limit = plant.limits.find((l) => l.id === answer.id);
    const { first } = answer.average?.over ?? answer.over;
    if (limit === undefined || first === null) continue;
    const what =
      answer.average === null ? answer.label : `${formatTime(answer.averaging.window ?? 0)} average, ${answer.label}`;
    rows.push([`limit ${measuredText(plant, limit, limit.value, units)} (${what})`, at(first), '', '']);
  }
  return rows;
}

function setpointText(plant: Case, { instrument: tag, side, value }: SetpointCrossing, units: UnitSystem): string {
  const instrument = plant.instruments.find((i) => i.tag === tag);
  return instrument === undefined ? tag : `${tag} ${side} ${measuredText(plant, instrument, value, units)}`;
}

/** Commands, and what the headline quantity still did after each. */
function commandRows({ plant, result, units }: ReportParts): string[][] {
  const limit = plant.limits.find((l) => l.id === result.summary.headline);
  const rows = [['at', 'command', 'worst after it', '']];
  for (const { time, text, by, peakAfter } of result.answers.instants.commands) {
    if (by === 'upset' || limit === undefined || peakAfter === null) continue;
    rows.push([
      clock(time),
      text,
      measuredText(plant, limit, peakAfter.value, units),
      `${formatTime(peakAfter.time - time)} later`,
    ]);
  }
  return rows;
}

function amountRows({ plant, result, units }: ReportParts): string[][] {
  const { answers } = result;
  const mass = (kg: number): string => massText(kg, units);
  const rows = [['', '']];
  for (const { solute, stack, aboveStart, diverted } of answers.emissions) {
    const name = plant.solutes.find((s) => s.id === solute)?.name ?? solute;
    rows.push([`${name} emitted at the stack`, `${mass(stack)} (${mass(aboveStart)} above the rate at the start)`]);
    if (diverted > 0) rows.push([`${name} diverted, counted apart`, mass(diverted)]);
  }
  for (const answer of answers.limits) {
    const limit = plant.limits.find((l) => l.id === answer.id);
    if (answer.massOver === null || limit === undefined) continue;
    rows.push([`emitted above ${measuredText(plant, limit, limit.value, units)}`, mass(answer.massOver)]);
  }
  rows.push(['liquid carried over', quantityText(answers.carriedOver, 'volume', units)]);
  for (const answer of answers.limits) {
    const label =
      answers.limits.filter((l) => l.label === answer.label).length > 1
        ? `${answer.label} (${answer.id})`
        : answer.label;
    rows.push([`recovery, ${label}`, recoveryText(answer)]);
  }
  return rows;
}

function recoveryText({ recovery }: LimitAnswer): string {
  switch (recovery.outcome) {
    case 'recovered':
      return `${formatTime(recovery.after ?? 0)} after the first upset`;
    case 'not-recovered':
      return 'not recovered by the end';
    case 'never-left':
      return 'never left its normal band';
    case 'no-steady-start':
      return 'not defined: the run does not start at the steady state';
  }
}

/** Events: from the start, and from the first upset. */
function eventRows({ events, answers }: ResultDocument): string[][] {
  const since = answers.firstUpset !== null;
  return [
    since ? ['from start', 'from upset', ''] : ['from start', ''],
    ...events.map(({ time, afterUpset, text }) =>
      since ? [clock(time), afterUpset === null ? '' : clock(afterUpset), text] : [clock(time), text],
    ),
  ];
}

function checkRows({ result, ink }: ReportParts): string[][] {
  const { closure, statistics: s, settings, secondOpinion, outcome } = result;
  const worst = closure.worst === null ? 'none' : formatNumber(closure.worst, 2);
  const state = closure.ok
    ? closure.worst !== null && closure.worst <= closure.target
      ? 'closed'
      : 'above target'
    : ink.bad('BROKEN');
  const rows = [
    ['', ''],
    [
      'balance',
      `${state}, worst error ${worst} (target ${formatNumber(closure.target, 2)}, broken above ${formatNumber(closure.limit, 2)})`,
    ],
    [
      'solver',
      `${settings.method}, tolerance ${formatNumber(settings.rtol, 2)}: ${s.steps} steps, ${s.rejected} tried again, ${s.rightHandSides} right-hand sides`,
    ],
    ['segments', settings.segments.join(' + ')],
  ];
  if (outcome.failure !== null) rows.push(['stopped', ink.bad(outcome.failure.text)]);
  if (secondOpinion !== null) {
    const within =
      secondOpinion.agreesWithin === null
        ? secondOpinion.note
        : `agrees within ${formatNumber(secondOpinion.agreesWithin, 2)} of each signal's span`;
    rows.push(['second opinion', `${secondOpinion.method}: ${within}`]);
  }
  return rows;
}

function convergenceRows({ convergence }: ResultDocument): string[][] {
  if (convergence === null) return [];
  const [N = 0, twice = 0] = convergence.segments;
  const text = (v: number | null): string => (v === null ? '-' : formatNumber(v, 4));
  return [
    ['figure', `N = ${N}`, `2 N = ${twice}`, 'difference'],
    ...convergence.headline.map(({ id, unit, valueN, value2N, difference }) => [
      `${id} [${unit}]`,
      text(valueN),
      text(value2N),
      difference === null ? '-' : `${formatNumber(100 * difference, 2)} %`,
    ]),
  ];
}

function warningLines({ warnings }: ResultDocument): string[] {
  if (warnings.length === 0) return [];
  return [
    'Warnings',
    ...warnings.flatMap(({ kind, time, text }) => {
      // The list of remembered values is long; the document has it with the sources.
      const said =
        kind === 'from-memory'
          ? `${text.slice(0, text.indexOf(':'))} (the result document lists them under assumptions)`
          : text;
      return wrapped(`${time === null ? '' : `${clock(time)}  `}${said}`, WIDTH - 2, '  ').map((line) => `  ${line}`);
    }),
  ];
}
