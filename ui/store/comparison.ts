/** Runs side by side: the figures by which branches are judged. Pure. */
import { formatTime, massText } from '../../sim/index.ts';
import { clock } from '../format/clock.ts';
import { displayOf } from '../format/units.ts';
import type { RunPacket } from '../worker/packet.ts';
import type { Units } from './work.ts';

/** Heads and cells of the table, a row for each run. */
export interface Comparison {
  readonly heads: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** Compares runs of the same case; missing packets give empty rows. */
export function compareRuns(packets: readonly (RunPacket | undefined)[], units: Units): Comparison {
  const first = packets[0];
  if (first === undefined) return { heads: [], rows: [] };
  const headline = first.document.summary.headline;
  const same = first.limits.find((l) => l.id === headline);
  const asked = first.limits.filter((l) => same === undefined || l.label === same.label);
  const heads = [
    'worst',
    'at',
    ...asked.flatMap((l) =>
      l.averaging === undefined
        ? [`beyond ${displayOf(l, units).text(l.limit, 3)} for`]
        : [`worst ${formatTime(l.averaging.window)} average`, `beyond ${displayOf(l, units).text(l.limit, 3)} for`],
    ),
    'above the limit',
    'emitted',
    'first alarm',
    'limits',
  ];
  return {
    heads,
    rows: packets.map((p) =>
      p === undefined
        ? []
        : rowOf(
            p,
            same?.id,
            asked.map((l) => l.id),
            units,
          ),
    ),
  };
}

function rowOf(packet: RunPacket, headline: string | undefined, asked: readonly string[], units: Units): string[] {
  const { answers } = packet.document;
  const upset = answers.firstUpset ?? 0;
  const answer = answers.limits.find((l) => l.id === headline);
  const lane = packet.limits.find((l) => l.id === headline);
  const value = (id: string, si: number): string => {
    const l = packet.limits.find((x) => x.id === id);
    const a = answers.limits.find((x) => x.id === id);
    if (l === undefined || a === undefined) return '';
    // Limits are given in SI and in the unit of the lane: the same ratio holds for a value (strengths start at zero).
    const inLane = l.unit === a.unit ? si : (si * l.limit) / a.limit.value;
    return displayOf(l, units).text(inLane, 3);
  };
  const alarms = answers.instants.alarms.flatMap((a) => a.annunciations).filter((t) => t >= upset);
  const firstAlarm = alarms.length === 0 ? 'none' : clock(Math.min(...alarms) - upset);
  const emitted = answers.emissions[0];
  return [
    answer === undefined || lane === undefined ? '' : value(lane.id, answer.peak.value),
    answer === undefined ? '' : clock(answer.peak.time - upset),
    ...asked.flatMap((id) => {
      const a = answers.limits.find((l) => l.id === id);
      if (a === undefined) return [''];
      const beyond = clock((a.average?.over ?? a.over).total);
      return a.average === null
        ? [beyond]
        : [a.average.peak === null ? 'invalid' : value(id, a.average.peak.value), beyond];
    }),
    answer?.massOver === null || answer === undefined ? '' : massText(answer.massOver, units.system),
    emitted === undefined ? '' : massText(emitted.stack, units.system),
    firstAlarm,
    answers.limits.every((l) => l.kept) ? 'all kept' : 'NOT KEPT',
  ];
}
