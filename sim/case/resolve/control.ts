// Instruments, alarms, controllers and limits: every setpoint in the kind of what its instrument measures.

import { unitEntry, splitQuantity } from '../../units.ts';
import type { Alarm, Controller, Instrument, Limit, Measured } from '../case.ts';
import { ALARM, CONTROL, INSTRUMENT } from '../defaults.ts';
import { join } from '../issues.ts';
import type { MeasuredScale, StrengthBasis } from '../measured.ts';
import { kindOfMeasured, readMeasured, signalOf, unitSize } from '../measured.ts';
import type { Reading } from '../reading.ts';
import type { AlarmText, ControllerText, InstrumentText, LimitText } from '../schema/control.ts';
import type { Plant } from './plant-tags.ts';
import { basisOf, soluteIndex } from './strengths.ts';

/** An instrument with the scale on which its values are read. */
export interface ScaledInstrument {
  readonly instrument: Instrument;
  readonly scale: MeasuredScale;
}

/** One instrument, or undefined after noting why not. */
export function readInstrument(
  reading: Reading,
  path: string,
  tag: string,
  given: InstrumentText,
  plant: Plant,
): ScaledInstrument | undefined {
  const measured = readMeasures(reading, path, given.measures, given.solute, plant);
  if (measured === undefined) return undefined;
  const before = reading.issues.length;
  const bare: MeasuredScale = { quantity: given.measures, basis: basisFor(measured, plant), range: undefined };
  checkUnit(reading, join(path, 'unit'), given.unit, bare);
  const range = readRange(reading, join(path, 'range'), given.range, bare);
  const scale: MeasuredScale = { ...bare, range };
  const signal = signalOf(given.measures);
  const difference = (key: string, text: string | undefined): number | undefined =>
    text === undefined ? undefined : readMeasured(reading, join(path, key), text, scale, 'difference');
  const sigma = difference('noise.sigma', given.noise?.sigma);
  const instrument: Instrument = {
    tag,
    measured,
    unit: given.unit,
    lag: reading.fill(join(path, 'lag'), given.lag, INSTRUMENT.lag[signal]),
    deadTime: reading.fill(join(path, 'deadTime'), given.deadTime, INSTRUMENT.deadTime),
    bias: reading.fill(join(path, 'bias'), difference('bias', given.bias), INSTRUMENT.bias),
    drift: reading.fill(
      join(path, 'drift'),
      given.drift === undefined ? undefined : readDrift(reading, join(path, 'drift'), given.drift, scale),
      INSTRUMENT.drift,
    ),
    noise:
      sigma === undefined
        ? undefined
        : {
            sigma,
            correlationTime: reading.fill(
              join(path, 'noise.correlationTime'),
              given.noise?.correlationTime,
              INSTRUMENT.correlationTime,
            ),
          },
    range,
    sampleInterval: given.sampleInterval,
  };
  if (sigma !== undefined && sigma < 0)
    reading.refuse('range', join(path, 'noise.sigma'), 'a standard deviation of at least 0', given.noise?.sigma);
  return reading.issues.length > before ? undefined : { instrument, scale };
}

/** What is measured or limited, with its solute. */
function readMeasures(
  reading: Reading,
  path: string,
  quantity: Measured['quantity'],
  solute: string | undefined,
  plant: Plant,
): Measured | undefined {
  if (
    quantity === 'gas-outlet' ||
    quantity === 'gas-inlet' ||
    quantity === 'liquid-outlet' ||
    quantity === 'sump-strength'
  ) {
    const key = join(path, 'solute');
    if (solute === undefined) {
      if (plant.solutes.length === 1) return { quantity, solute: 0 };
      reading.object(
        'missing',
        key,
        'which solute',
        'nothing',
        `one of ${plant.solutes.map(({ id }) => id).join(', ')}`,
      );
      return undefined;
    }
    const index = soluteIndex(reading, key, plant, solute);
    return index === undefined ? undefined : { quantity, solute: index };
  }
  if (solute !== undefined)
    reading.object('contradiction', join(path, 'solute'), `no solute with ${quantity}`, `"${solute}"`);
  if (quantity === 'make-up-flow' && !plant.valves.has('make-up')) {
    reading.object('contradiction', join(path, 'measures'), 'a plant with a make-up', 'a plant without one');
  }
  if (quantity === 'bleed-flow' && !plant.valves.has('bleed')) {
    reading.object('contradiction', join(path, 'measures'), 'a plant with a bleed', 'a plant without one');
  }
  return { quantity };
}

function basisFor(measured: Measured, plant: Plant): StrengthBasis | undefined {
  return 'solute' in measured ? basisOf(plant, measured.solute, plant.liquidTemperature) : undefined;
}

function checkUnit(reading: Reading, path: string, unit: string, scale: MeasuredScale): void {
  // Reading "1 unit" notes the right issue for a unit of another kind.
  readMeasured(reading, path, `1 ${unit}`, scale);
}

function readRange(
  reading: Reading,
  path: string,
  given: readonly [string, string] | undefined,
  scale: MeasuredScale,
): readonly [number, number] | undefined {
  if (given === undefined) return undefined;
  const low = readMeasured(reading, `${path}[0]`, given[0], scale);
  const high = readMeasured(reading, `${path}[1]`, given[1], scale);
  if (low === undefined || high === undefined) return undefined;
  if (low < high) return [low, high];
  reading.refuse('contradiction', path, 'a lower and a higher end', given);
  return undefined;
}

/** SI per second from "2 ppmv/h": a difference over a time. */
export function readDrift(reading: Reading, path: string, text: string, scale: MeasuredScale): number | undefined {
  const slash = text.lastIndexOf('/');
  const time = slash < 0 ? undefined : unitEntry('time', text.slice(slash + 1).trim());
  if (time === undefined) {
    reading.refuse('unit', path, 'a difference per time', text, 'write for example "2 ppmv/h"');
    return undefined;
  }
  const size = readMeasured(reading, path, text.slice(0, slash).trim(), scale, 'difference');
  return size === undefined ? undefined : size / time.factor;
}

/** A measured value whose instrument is named; the instrument must exist. */
export function readSetpoint(
  reading: Reading,
  path: string,
  text: string,
  scale: MeasuredScale,
  as: 'value' | 'difference' = 'value',
): number | undefined {
  const value = readMeasured(reading, path, text, scale, as);
  if (value !== undefined && as === 'value' && scale.range !== undefined) {
    const [low, high] = scale.range;
    const slack = 1e-9 * (high - low);
    if (value < low - slack || value > high + slack) {
      reading.warn(
        'range',
        path,
        "a value within the instrument's range",
        `"${text}"`,
        'the instrument can never show it',
      );
    }
  }
  return value;
}

/** One alarm, or undefined after noting why not. */
export function readAlarm(
  reading: Reading,
  path: string,
  tag: string,
  given: AlarmText,
  instruments: ReadonlyMap<string, ScaledInstrument>,
): Alarm | undefined {
  const scaled = instruments.get(given.instrument);
  const text = given.high ?? given.low;
  if (text === undefined || (given.high !== undefined && given.low !== undefined)) {
    reading.object(
      'contradiction',
      path,
      'either "high" or "low" with the setpoint',
      text === undefined ? 'neither' : 'both',
      'two setpoints are two alarms',
    );
    return undefined;
  }
  if (scaled === undefined) return undefined;
  const kind = given.high === undefined ? 'low' : 'high';
  const { scale } = scaled;
  const setpoint = readSetpoint(reading, join(path, kind), text, scale);
  const share = ALARM.deadband[signalOf(scale.quantity)];
  const fallback =
    scale.range === undefined
      ? ALARM.noRangeDeadband
      : { ...share, value: share.value * (scale.range[1] - scale.range[0]) };
  const own =
    given.deadband === undefined
      ? undefined
      : readSetpoint(reading, join(path, 'deadband'), given.deadband, scale, 'difference');
  if (own !== undefined && own < 0) {
    reading.refuse(
      'range',
      join(path, 'deadband'),
      'a deadband of at least 0',
      given.deadband,
      'its size, without a sign',
    );
    return undefined;
  }
  if (setpoint === undefined) return undefined;
  return {
    tag,
    instrument: given.instrument,
    kind,
    setpoint,
    deadband: reading.fill(join(path, 'deadband'), own, fallback),
    onDelay: reading.fill(join(path, 'onDelay'), given.onDelay, ALARM.onDelay),
    offDelay: reading.fill(join(path, 'offDelay'), given.offDelay, ALARM.offDelay),
    priority: reading.fill(join(path, 'priority'), given.priority, ALARM.priority),
  };
}

/**
 * Quantities that are states themselves. Any other follows from the flows that a controller's output decides, so a
 * controller on it without a lag would be a loop with no time in it.
 */
const STATES: ReadonlySet<string> = new Set(['sump-level', 'sump-temperature', 'sump-strength', 'distributor-volume']);

/** One controller, or undefined after noting why not. */
export function readController(
  reading: Reading,
  path: string,
  tag: string,
  given: ControllerText,
  instruments: ReadonlyMap<string, ScaledInstrument>,
  plant: Plant,
): Controller | undefined {
  const before = reading.issues.length;
  if (!plant.outputs.has(given.output)) {
    reading.object('contradiction', join(path, 'output'), `a plant with a ${given.output}`, 'a plant without one');
  }
  const outputRange = reading.fill<readonly [number, number]>(
    join(path, 'outputRange'),
    given.outputRange,
    CONTROL.outputRange,
  );
  if (outputRange[0] >= outputRange[1]) {
    reading.refuse('contradiction', join(path, 'outputRange'), 'a lower and a higher output', given.outputRange);
  }
  const scaled = instruments.get(given.instrument);
  if (scaled === undefined) return undefined;
  if (!(scaled.instrument.lag > 0) && !STATES.has(scaled.instrument.measured.quantity)) {
    const hint = `give ${given.instrument} a lag, such as "0.5 s"`;
    reading.refuse('contradiction', join(path, 'instrument'), 'an instrument with a lag', given.instrument, hint);
  }
  const setpoint = readSetpoint(reading, join(path, 'setpoint'), given.setpoint, scaled.scale);
  const gain = readGain(reading, join(path, 'gain'), given.gain, scaled.scale);
  if (setpoint === undefined || gain === undefined || reading.issues.length > before) return undefined;
  return {
    tag,
    instrument: given.instrument,
    output: given.output,
    setpoint,
    gain,
    integralTime: given.integralTime,
    action: given.action,
    outputRange,
    mode: reading.fill(join(path, 'mode'), given.mode, CONTROL.mode),
    manualOutput: reading.fill(join(path, 'manualOutput'), given.manualOutput, CONTROL.manualOutput),
  };
}

/** Output share per SI unit from "2 1/m", "5 %/K", "0.8 %/% of range". */
function readGain(reading: Reading, path: string, given: string | number, scale: MeasuredScale): number | undefined {
  const expected = 'an output share per unit of the measurement, above 0';
  const example = `write for example "2 1/${kindOfMeasured(scale.quantity) === 'length' ? 'm' : 'unit'}"`;
  const { number, unit } = splitQuantity(String(given));
  const match = /^(%|1)?\/(.+)$/.exec(unit);
  const per = match?.[2] ?? '';
  const size =
    per === '% of range'
      ? scale.range === undefined
        ? undefined
        : (scale.range[1] - scale.range[0]) / 100
      : unitSize(per.replace(/^\((.*)\)$/, '$1'), scale);
  if (!Number.isFinite(number) || match === null || size === undefined) {
    reading.refuse('unit', path, expected, given, example);
    return undefined;
  }
  const gain = (number * (match[1] === '%' ? 0.01 : 1)) / size;
  if (gain > 0) return gain;
  reading.refuse('range', path, expected, given, 'the sign goes into "action": direct or reverse');
  return undefined;
}

/** One limit, or undefined after noting why not. */
export function readLimit(
  reading: Reading,
  path: string,
  id: string,
  given: LimitText,
  plant: Plant,
): Limit | undefined {
  const measured = readMeasures(reading, path, given.measures, given.solute, plant);
  const text = given.max ?? given.min;
  if (text === undefined || (given.max !== undefined && given.min !== undefined)) {
    reading.object(
      'contradiction',
      path,
      'either "max" or "min"',
      text === undefined ? 'neither' : 'both',
      'two limits are two entries',
    );
    return undefined;
  }
  if (measured === undefined) return undefined;
  const scale: MeasuredScale = { quantity: given.measures, basis: basisFor(measured, plant), range: undefined };
  const kind = given.max === undefined ? 'min' : 'max';
  const value = readMeasured(reading, join(path, kind), text, scale);
  const { unit } = splitQuantity(text);
  const perNormal = unitEntry('normal-mass-concentration', unit) !== undefined;
  const gas = kindOfMeasured(given.measures) === 'gas-strength';
  if (gas && perNormal && given.basis === undefined) {
    reading.object(
      'missing',
      join(path, 'basis'),
      '"dry" or "wet" beside a mass per normal volume',
      'nothing',
      'permits mostly mean dry gas',
    );
    return undefined;
  }
  if (!gas && given.basis !== undefined) {
    reading.object(
      'contradiction',
      join(path, 'basis'),
      'no basis: the limit is not a gas strength',
      `"${given.basis}"`,
    );
  }
  if (value === undefined) return undefined;
  const averaging = given.averaging === 'none' ? ({ kind: 'none' } as const) : given.averaging;
  return {
    id,
    measured,
    kind,
    value,
    averaging: reading.fill<Limit['averaging']>(join(path, 'averaging'), averaging, CONTROL.averaging),
    basis: gas ? reading.fill(join(path, 'basis'), given.basis, CONTROL.basis) : 'wet',
    unit,
  };
}

/** Low above high, on one instrument, is allowed and hardly ever meant. */
export function warnCrossedAlarms(reading: Reading, alarms: readonly Alarm[]): void {
  for (const low of alarms) {
    if (low.kind !== 'low') continue;
    const high = alarms.find(
      (alarm) => alarm.kind === 'high' && alarm.instrument === low.instrument && alarm.setpoint <= low.setpoint,
    );
    if (high !== undefined) {
      reading.warn(
        'contradiction',
        `alarms.${low.tag}.low`,
        `a setpoint below that of ${high.tag}`,
        'one at or above it',
        'one of the two is always in alarm',
      );
    }
  }
}
