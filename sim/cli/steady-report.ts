/** The printed steady state. */
import {
  CAUTION,
  formatNumber,
  measuredText,
  normalMassText,
  quantityText,
  type Case,
  type ProfileRow,
  type SteadyAnswer,
  type UnitSystem,
} from '../index.ts';
import type { Ink } from './ink.ts';
import { blocksText, section } from './report.ts';
import { wrapped } from './text-table.ts';

/** Rows of a profile that are printed for each bed. */
const PROFILE_ROWS = 12;
const WIDTH = 100;

/** What the report is made of. */
export interface SteadyParts {
  readonly plant: Case;
  readonly answer: SteadyAnswer;
  readonly units: UnitSystem;
  readonly ink: Ink;
  /** Why the figures are not those of a steady state; undefined when they are. */
  readonly trouble: string | undefined;
}

/** The report, ending in a line break. */
export function steadyReport(parts: SteadyParts): string {
  const { plant, answer, ink, trouble } = parts;
  return blocksText([
    [ink.strong(plant.title)],
    trouble === undefined ? [] : [ink.bad(`NOT STEADY: ${trouble}`)],
    section(ink, 'Outlet', outletRows(parts)),
    section(ink, 'Limits', limitRows(parts)),
    section(ink, 'Load', loadRows(parts)),
    section(ink, 'Transfer', transferRows(parts)),
    ...answer.profile.beds.map((bed) => {
      const name = answer.profile.beds.length > 1 ? `Profile, bed ${bed.bed}, zone ${bed.zone}` : 'Profile';
      return section(ink, name, profileRows(parts, bed.rows), [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
    }),
    wrapped(CAUTION, WIDTH, ''),
  ]);
}

function outletRows({ plant, answer, units }: SteadyParts): string[][] {
  const rows = [['', 'gas in', 'gas out', 'dry', 'left in the gas', 'liquid out']];
  for (const { solute, gasIn, gasOut, dryMgPerNm3, gasLeft, liquidOut } of answer.outlets) {
    rows.push([
      plant.solutes.find((s) => s.id === solute)?.name ?? solute,
      quantityText(gasIn, 'gas-strength', units),
      quantityText(gasOut, 'gas-strength', units),
      dryMgPerNm3 === null ? '-' : normalMassText(dryMgPerNm3),
      quantityText(gasLeft, 'fraction', units),
      quantityText(liquidOut, 'liquid-strength', units),
    ]);
  }
  return rows;
}

function limitRows({ plant, answer, units, ink }: SteadyParts): string[][] {
  const rows = [['', 'limit', 'value', '']];
  for (const { id, value, limit: bound, kept } of answer.limits) {
    const limit = plant.limits.find((l) => l.id === id);
    if (limit === undefined) continue;
    const text = (v: number): string => measuredText(plant, limit, v, units);
    rows.push([
      id,
      `${limit.kind === 'max' ? '<=' : '>='} ${text(bound)}`,
      text(value),
      kept ? 'kept' : ink.bad('NOT KEPT'),
    ]);
  }
  return rows;
}

function loadRows({ answer, units }: SteadyParts): string[][] {
  const rows = [['', '']];
  const { floodApproach, beds } = answer;
  rows.push([
    'gas velocity over flooding velocity, worst segment',
    floodApproach === null ? 'the law has no flooding' : quantityText(floodApproach, 'fraction', units),
  ]);
  for (const bed of beds) {
    const of = beds.length > 1 ? `, bed ${bed.bed}` : '';
    const flood =
      bed.floodGradient === null
        ? 'no packing factor to judge it by'
        : `${quantityText(bed.worstGradient / bed.floodGradient, 'fraction', units)} of ${quantityText(bed.floodGradient, 'pressure-gradient', units)} at flooding by the packing factor`;
    const wet = bed.liquidVelocity / bed.wettingVelocity;
    rows.push(
      [
        `pressure drop${of}`,
        `${quantityText(bed.pressureDrop, 'pressure-difference', units)}, ${quantityText(bed.gradient, 'pressure-gradient', units)} mean`,
      ],
      [`worst pressure gradient${of}`, `${quantityText(bed.worstGradient, 'pressure-gradient', units)}, ${flood}`],
      [
        `liquid load${of}`,
        `${quantityText(bed.liquidVelocity, 'velocity', units)}, ${formatNumber(wet, 3)} x the least that wets (${quantityText(bed.wettingVelocity, 'velocity', units)})${wet < 1 ? ': TOO LITTLE' : ''}`,
      ],
      [`hold-up${of}`, quantityText(bed.holdup, 'fraction', units)],
    );
  }
  return rows;
}

function transferRows({ plant, answer, units }: SteadyParts): string[][] {
  const rows = [['', 'NOG', 'HOG', 'absorption factor L/(m G): top', 'bottom', 'mean']];
  for (const { bed, solute, NOG, HOG, absorptionFactor: a } of answer.transfer) {
    const name = plant.solutes.find((s) => s.id === solute)?.name ?? solute;
    rows.push([
      answer.beds.length > 1 ? `${name}, bed ${bed}` : name,
      formatNumber(NOG, 3),
      quantityText(HOG, 'length', units),
      formatNumber(a.top, 3),
      formatNumber(a.bottom, 3),
      formatNumber(a.mean, 3),
    ]);
  }
  return rows;
}

/** Evenly spaced segments, the first and the last among them. */
function profileRows({ plant, units }: SteadyParts, rows: readonly ProfileRow[]): string[][] {
  const count = Math.min(PROFILE_ROWS, rows.length);
  const picked = Array.from(
    { length: count },
    (_, i) => rows[Math.round((i * (rows.length - 1)) / Math.max(1, count - 1))],
  );
  return [
    [
      'segment',
      'depth',
      'T liquid',
      'T gas',
      'hold-up',
      'dp',
      'of flood',
      ...plant.solutes.flatMap((s) => [`${s.id} gas`, `${s.id} liquid`]),
    ],
    ...picked
      .filter((row) => row !== undefined)
      .map((row) => [
        String(row.segment),
        quantityText(row.depth, 'length', units),
        quantityText(row.liquidTemperature, 'temperature', units),
        quantityText(row.gasTemperature, 'temperature', units),
        quantityText(row.holdup, 'fraction', units),
        quantityText(row.pressureGradient, 'pressure-gradient', units),
        row.floodApproach === null ? '-' : quantityText(row.floodApproach, 'fraction', units),
        ...plant.solutes.flatMap((_, k) => [
          quantityText(row.gas[k] ?? Number.NaN, 'gas-strength', units),
          quantityText(row.liquid[k] ?? Number.NaN, 'liquid-strength', units),
        ]),
      ]),
  ];
}
