// The quantities that a scenario can change: their names, kinds, allowed values, and the case's own value.

import type { Kind } from '../../units.ts';
import { KINDS } from '../../units.ts';
import type { Channel } from '../case.ts';
import { readStrength } from '../measured.ts';
import { suggestion } from '../nearest.ts';
import type { Reading } from '../reading.ts';
import type { Plant } from './plant-tags.ts';
import { basisOf, soluteIndex } from './strengths.ts';

type PlainName = Exclude<Channel['name'], `${string}.composition`>;

interface PlainChannel {
  readonly kind: Kind;
  readonly min: number;
  readonly max: number;
  /** The case's value, SI; undefined when the plant does not have the part. */
  readonly base: (plant: Plant) => number | undefined;
}

const PLAIN: Readonly<Record<PlainName, PlainChannel>> = {
  'gas.rate': { kind: 'molar-flow', min: 0, max: 1e6, base: ({ gas }) => gas.feed.rate },
  'gas.temperature': { kind: 'temperature', min: 200, max: 600, base: ({ gas }) => gas.feed.temperature },
  'gas.humidity': { kind: 'fraction', min: 0, max: 1, base: ({ gas }) => gas.feed.humidity },
  'liquid.temperature': { kind: 'temperature', min: 200, max: 500, base: ({ liquid }) => liquid.feed.temperature },
  'pump.speed': { kind: 'fraction', min: 0, max: 1.5, base: () => 1 },
  'makeUp.temperature': { kind: 'temperature', min: 200, max: 500, base: ({ liquid }) => liquid.makeUp?.temperature },
  cooling: { kind: 'fraction', min: 0, max: 1, base: ({ liquid }) => (liquid.cooler === undefined ? undefined : 1) },
  'coolant.temperature': {
    kind: 'temperature',
    min: 200,
    max: 500,
    base: ({ liquid }) => liquid.cooler?.coolantTemperature,
  },
  'packing.fouling': { kind: 'fraction', min: 0, max: 0.9, base: () => 0 },
  'packing.foaming': { kind: 'fraction', min: 0.05, max: 1, base: () => 1 },
  'distribution.liquidShare': {
    kind: 'fraction',
    min: 0,
    max: 1,
    base: ({ column }) => column.distribution?.liquidShare,
  },
  'ambient.temperature': { kind: 'temperature', min: 200, max: 350, base: ({ column }) => column.ambientTemperature },
  topPressure: { kind: 'absolute-pressure', min: 1e3, max: 1e7, base: ({ column }) => column.topPressure },
  'nonReturnValve.leak': { kind: 'fraction', min: 0, max: 1, base: () => 0 },
};

const COMPOSITIONS = ['gas.composition', 'liquid.composition', 'makeUp.composition'] as const;
type CompositionName = (typeof COMPOSITIONS)[number];

/** A channel with all that reading its values needs. */
export interface ChannelUse {
  readonly channel: Channel;
  /** The case's value, SI. */
  readonly base: number;
  /** Whether a factor on the value makes sense: not for scales with their own zero. */
  readonly canMultiply: boolean;
  /** A value in SI, its range checked, or undefined after noting the issue. */
  readonly read: (path: string, given: string | number) => number | undefined;
  /** A difference in SI, or undefined after noting the issue. */
  readonly readDifference: (path: string, given: string | number) => number | undefined;
  /** Whether an SI value is allowed. */
  readonly allows: (value: number) => boolean;
}

/** The channel of a name such as `gas.rate` or `gas.composition.acetone`, or undefined after noting why not. */
export function findChannel(reading: Reading, path: string, name: string, plant: Plant): ChannelUse | undefined {
  if (Object.hasOwn(PLAIN, name)) return plainChannel(reading, path, name as PlainName, plant);
  const composition = COMPOSITIONS.find((start) => name === start || name.startsWith(`${start}.`));
  if (composition !== undefined)
    return compositionChannel(reading, path, composition, name.slice(composition.length + 1), plant);
  const known = [
    ...Object.keys(PLAIN),
    ...COMPOSITIONS.flatMap((start) => plant.solutes.map(({ id }) => `${start}.${id}`)),
  ];
  reading.refuse(
    'reference',
    path,
    'a quantity that can change',
    name,
    suggestion(name, known) ?? `known: ${known.join(', ')}`,
  );
  return undefined;
}

function plainChannel(reading: Reading, path: string, name: PlainName, plant: Plant): ChannelUse | undefined {
  const { kind, min, max, base } = PLAIN[name];
  const value = base(plant);
  if (value === undefined) {
    reading.object('contradiction', path, `a plant with what "${name}" changes`, 'a plant without it');
    return undefined;
  }
  const own = (text: string | number, as: Kind, where: string): number | undefined => {
    if (typeof text === 'number') {
      if (as === 'fraction') return text;
      reading.refuse(
        'type',
        where,
        KINDS[as].noun,
        text,
        `a quantity is text with its unit; write for example "${KINDS[as].example}"`,
      );
      return undefined;
    }
    return reading.quantity(where, text, as);
  };
  return {
    channel: { name },
    base: value,
    canMultiply: kind !== 'temperature' && kind !== 'absolute-pressure',
    allows: (v) => v >= min && v <= max,
    read: (where, text) => inRange(reading, where, text, own(text, kind, where), min, max),
    readDifference: (where, text) => {
      const of =
        kind === 'temperature' ? 'temperature-difference' : kind === 'absolute-pressure' ? 'pressure-difference' : kind;
      return own(text, of, where);
    },
  };
}

function compositionChannel(
  reading: Reading,
  path: string,
  name: CompositionName,
  id: string,
  plant: Plant,
): ChannelUse | undefined {
  if (name === 'makeUp.composition' && plant.liquid.makeUp === undefined) {
    reading.object('contradiction', path, 'a plant with a make-up', 'a plant without one');
    return undefined;
  }
  const solute = id === '' && plant.solutes.length === 1 ? 0 : soluteIndex(reading, path, plant, id);
  if (solute === undefined) return undefined;
  const gas = name === 'gas.composition';
  const stream = gas ? plant.gas.feed : name === 'liquid.composition' ? plant.liquid.feed : plant.liquid.makeUp;
  const basis = basisOf(plant, solute, plant.liquidTemperature);
  const read = (where: string, text: string | number): number | undefined =>
    readStrength(reading, where, String(text), gas, basis);
  return {
    channel: { name, solute },
    base: stream?.composition[solute] ?? 0,
    canMultiply: true,
    allows: (v) => v >= 0 && v < 1,
    read: (where, text) => inRange(reading, where, text, read(where, text), 0, 1),
    readDifference: read,
  };
}

function inRange(
  reading: Reading,
  path: string,
  text: string | number,
  value: number | undefined,
  min: number,
  max: number,
): number | undefined {
  if (value === undefined || (value >= min && value <= max)) return value;
  reading.refuse('range', path, `a value from ${min} to ${max} (SI)`, text);
  return undefined;
}
