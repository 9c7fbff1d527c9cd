/**
 * What a reader should know before trusting a figure: ranges of correlations and properties that the run left, at
 * which moment first, and values that rest on memory. Looks at the recorded rows; changes nothing.
 */
import type { Case, Curve } from '../case/case.ts';
import type { Fluids } from '../column/fluids.ts';
import { ondaRangeLeft } from '../transfer/onda.ts';
import { formatNumber } from '../units.ts';
import { quantityIndex, traceOf, type RunRecord } from './run-record.ts';
import type { Warning } from './result-schema.ts';

/** Gas velocity over the flooding velocity from which transfer rests on no published correlation; common practice, no source. */
const TRANSFER_LIMIT = 0.9;
/** Mole fraction up to which a Henry constant is used for a solute that has nothing better; common practice, no source. */
const HENRY_LIMIT = 0.01;
/** Loading that is the flood point. */
const FLOOD = 1;
/** Least velocity over that of the design rate with which a segment counts as drained. */
const DRAINED_SHARE = 0.01;
/** Share of an instrument's range by which the true value must lie beyond: more than rounding. */
const RANGE_MARGIN = 1e-3;
/** Range that the library's functions of liquid water share, K: saturation pressure from 273.15, viscosity and density to 383.15. */
const WATER_RANGE: readonly [number, number] = [273.15, 383.15];

const PLACES = ['top', 'middle', 'bottom'] as const;

/** Every warning, in order of time; those without a time last. */
export function rangeWarnings(record: RunRecord, fluids: Fluids): Warning[] {
  const found: Warning[] = [
    ...ondaWarnings(record, fluids),
    ...temperatureWarnings(record),
    ...floodWarnings(record),
    ...henryWarnings(record),
    ...instrumentWarnings(record),
  ].sort((a, b) => (a.time ?? Infinity) - (b.time ?? Infinity));
  return [...found, ...memoryWarnings(record.plant)];
}

/** First leaving of each of Onda's ranges, in the first of the watched segments that leaves it. */
function ondaWarnings(record: RunRecord, fluids: Fluids): Warning[] {
  const { plant } = record;
  if (plant.column.transfer.model !== 'onda') return [];
  const first = new Map<string, Warning>();
  PLACES.forEach((place) => {
    const load = quantityIndex(record, `liquid-load.${place}`);
    const temperature = quantityIndex(record, `liquid-temperature.${place}`);
    if (load < 0 || temperature < 0) return;
    const bed = plant.column.beds[place === 'bottom' ? plant.column.beds.length - 1 : 0];
    const { packing } = bed;
    const geometry = { a: packing.area, eps: packing.voidFraction };
    const design = (4 * plant.liquid.feed.rate) / (Math.PI * plant.column.diameter ** 2);
    let drained = false;
    record.rows.forEach((row, r) => {
      const u = row[load];
      const T = row[temperature];
      const rho = fluids.solventDensity(T);
      const isDrained = !(u > DRAINED_SHARE * design);
      if (isDrained && drained) return;
      const left = ondaRangeLeft(
        geometry,
        packing.criticalSurfaceTension,
        u * rho,
        rho,
        fluids.solventViscosity(T),
        fluids.surfaceTension(T),
      );
      if (isDrained) {
        drained = true;
        note(
          first,
          'drained',
          record.time[r],
          `the ${place} segment is drained (under 1 % of the design liquid rate): the wetted area of a draining film is an assumption, not [Onda1968]`,
        );
        return;
      }
      if (left === undefined) return;
      const { range, value } = left;
      const how = value < range.min ? `below ${formatNumber(range.min, 2)}` : `above ${formatNumber(range.max, 2)}`;
      note(
        first,
        range.name,
        record.time[r],
        `${range.name} in the ${place} segment is ${formatNumber(value, 2)}, ${how}: outside the data behind wetted area and coefficients [Onda1968]`,
      );
    });
  });
  return [...first.values()];
}

/** Keeps the earliest of a kind. */
function note(first: Map<string, Warning>, key: string, time: number, text: string): void {
  const known = first.get(key);
  if (known === undefined || (known.time ?? 0) > time) first.set(key, { kind: 'range-left', time, text });
}

/** Temperatures outside the range that the solvent's property functions share. */
function temperatureWarnings(record: RunRecord): Warning[] {
  const [low, high] = propertyRange(record.plant);
  const first = new Map<string, Warning>();
  for (const phase of ['liquid', 'gas'] as const) {
    for (const place of PLACES) {
      const { value, time } = traceOf(record, `${phase}-temperature.${place}`);
      const r = Array.from(value).findIndex((T) => T < low || T > high);
      if (r < 0) continue;
      const span = `${formatNumber(low - 273.15, 4)} to ${formatNumber(high - 273.15, 4)} degC`;
      note(
        first,
        phase,
        time[r],
        `${phase} temperature in the ${place} segment is ${formatNumber(value[r] - 273.15, 3)} degC, outside ${span}, the range of the property functions`,
      );
    }
  }
  return [...first.values()];
}

/** Range that the solvent's curves share, K. */
function propertyRange({ solvent }: Case): readonly [number, number] {
  const curves: (Curve | undefined)[] = [
    solvent.density,
    solvent.viscosity,
    solvent.surfaceTension,
    solvent.vapourPressure,
  ];
  let low = 0;
  let high = Infinity;
  for (const curve of curves) {
    if (curve === undefined || curve.kind === 'constant') continue;
    const ends =
      curve.kind === 'points'
        ? [curve.temperature[0], curve.temperature[curve.temperature.length - 1]]
        : libraryRange(curve.id);
    low = Math.max(low, ends[0]);
    high = Math.min(high, ends[1]);
  }
  return [low, high];
}

function libraryRange(id: string): readonly [number, number] {
  return id.startsWith('water.') ? WATER_RANGE : [0, Infinity];
}

function floodWarnings(record: RunRecord): Warning[] {
  const found: Warning[] = [];
  const when = (id: string, least: number): number | undefined => {
    const { value, time } = traceOf(record, id);
    const r = Array.from(value).findIndex((v) => v > least);
    return r < 0 ? undefined : time[r];
  };
  const near = when('flood-approach', TRANSFER_LIMIT);
  if (near !== undefined) {
    found.push({
      kind: 'near-flood',
      time: near,
      text: `gas velocity above ${100 * TRANSFER_LIMIT} % of the flooding velocity: transfer there is not backed by a published correlation`,
    });
  }
  const flooded = when('loading', FLOOD);
  if (flooded !== undefined) {
    const N = record.plant.column.beds.reduce((sum, bed) => sum + bed.segments, 0);
    found.push({
      kind: 'flooded',
      time: flooded,
      text: `past the flood point the pressure drop is indicative and depends on the number of segments (here ${N})`,
    });
  }
  return found;
}

function henryWarnings(record: RunRecord): Warning[] {
  return record.plant.solutes.flatMap(({ id, name, equilibrium }) => {
    if (equilibrium.model !== 'henry') return [];
    const { value, time } = traceOf(record, `liquid-strength-highest.${id}`);
    const r = Array.from(value).findIndex((x) => x > HENRY_LIMIT);
    if (r < 0) return [];
    const text = `${name} in the liquid passes ${100 * HENRY_LIMIT} mol%: a constant Henry coefficient is for dilute liquid`;
    return [{ kind: 'range-left', time: time[r], text }];
  });
}

/** Instruments that stand at an end of their range while the plant is beyond it. */
function instrumentWarnings(record: RunRecord): Warning[] {
  return record.plant.instruments.flatMap(({ tag, range }, i) => {
    if (range === undefined) return [];
    const margin = RANGE_MARGIN * (range[1] - range[0]);
    const r = record.truth.findIndex((row, k) => {
      const shown = record.shown[k][i];
      return (shown === range[1] && row[i] > range[1] + margin) || (shown === range[0] && row[i] < range[0] - margin);
    });
    if (r < 0) return [];
    return [
      {
        kind: 'instrument-range',
        time: record.time[r],
        text: `${tag} stands at the end of its range; the true value is beyond it`,
      },
    ];
  });
}

function memoryWarnings(plant: Case): Warning[] {
  const paths = plant.provenance.filter((p) => p.isDefault && p.verified === 'from memory').map((p) => p.path);
  if (paths.length === 0) return [];
  const text = `${paths.length} ${paths.length === 1 ? 'value rests' : 'values rest'} on memory of a publication, not compared with it: ${paths.join(', ')}`;
  return [{ kind: 'from-memory', time: null, text }];
}
