/** The event list of a result: what the run noted, with limits crossed, flooding and carry-over read off the record. */
import { intervalsBeyond } from './piecewise.ts';
import type { RunEvent } from './events.ts';
import { measuredText, type UnitSystem } from './quantity-text.ts';
import type { Answers, ResultEvent, Warning } from './result-schema.ts';
import { traceOf, type RunRecord } from './run-record.ts';

/** Carry-over that is worth an event, over the design liquid rate: beyond what rounding leaves. */
const LEAST_CARRY_OVER = 1e-6;

/** All events in order of time; those of the run before those read off at the same moment. */
export function timelineOf(
  record: RunRecord,
  answers: Answers,
  warnings: readonly Warning[],
  system: UnitSystem = 'case',
): ResultEvent[] {
  const derived: RunEvent[] = [
    ...limitEvents(record, answers, system),
    ...stretchEvents(
      record,
      'loading',
      1,
      ['flooding', 'a segment floods'],
      ['flooding-over', 'no segment is flooded any more'],
    ),
    ...stretchEvents(
      record,
      'carry-over',
      LEAST_CARRY_OVER * record.plant.liquid.feed.rate,
      ['carry-over', 'liquid goes over with the gas'],
      ['carry-over-over', 'no liquid goes over any more'],
    ),
    ...warnings.flatMap(({ kind, time, text }): RunEvent[] =>
      kind === 'range-left' && time !== null ? [{ time, kind: 'range-left', tag: '', text }] : [],
    ),
  ];
  return [...record.events, ...derived]
    .map((event, i) => ({ event, i }))
    .sort((a, b) => a.event.time - b.event.time || a.i - b.i)
    .map(({ event }) => ({
      time: event.time,
      afterUpset: answers.firstUpset === null ? null : event.time - answers.firstUpset,
      kind: event.kind,
      tag: event.tag,
      text: event.text,
      value: event.value ?? null,
    }));
}

/** Crossings of the judged value: the average where the limit asks for one. */
function limitEvents({ plant }: RunRecord, answers: Answers, system: UnitSystem): RunEvent[] {
  return answers.limits.flatMap((answer) => {
    const limit = plant.limits.find((l) => l.id === answer.id);
    if (limit === undefined) return [];
    const what = answer.average === null ? answer.label : `average of ${answer.label}`;
    const value = measuredText(plant, limit, limit.value, system);
    const beyond = answer.kind === 'max' ? 'over' : 'under';
    return (answer.average?.over ?? answer.over).intervals.flatMap(({ from, to, open }): RunEvent[] => [
      { time: from, kind: 'limit-crossed', tag: answer.id, text: `${what} is ${beyond} ${value}`, value: limit.value },
      ...(open
        ? []
        : [
            {
              time: to,
              kind: 'limit-kept-again',
              tag: answer.id,
              text: `${what} keeps ${value} again`,
              value: limit.value,
            } as const,
          ]),
    ]);
  });
}

type Said = readonly [RunEvent['kind'], string];

/** Begin and end of each stretch in which a quantity is above a level. */
function stretchEvents(record: RunRecord, id: string, level: number, begin: Said, end: Said): RunEvent[] {
  return intervalsBeyond(traceOf(record, id), level, 'above').flatMap(({ from, to, open }): RunEvent[] => [
    { time: from, kind: begin[0], tag: '', text: begin[1] },
    ...(open ? [] : [{ time: to, kind: end[0], tag: '', text: end[1] }]),
  ]);
}
