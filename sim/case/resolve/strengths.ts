// Compositions of gas and liquid, and humidity, as mole fractions.

import type { Solute, Solvent } from '../case.ts';
import { curveValue } from '../curve.ts';
import { join } from '../issues.ts';
import type { StrengthBasis } from '../measured.ts';
import { readStrength } from '../measured.ts';
import type { Default, Reading } from '../reading.ts';
import type { Kelvin, Pascal } from '../../units.ts';
import { parseQuantity } from '../../units.ts';

/** What strengths need to know of the substances. */
export interface Substances {
  readonly solvent: Solvent;
  readonly solutes: readonly Solute[];
}

/** The basis of one solute's strengths; the liquid's density is taken at `temperature`, K. */
export function basisOf(substances: Substances, solute: number, temperature: number): StrengthBasis {
  return {
    solute: substances.solutes[solute]?.molarMass ?? Number.NaN,
    solvent: substances.solvent.molarMass,
    density: curveValue(substances.solvent.density, temperature),
  };
}

/** Index of a solute by its id, or undefined after noting that there is none. */
export function soluteIndex(reading: Reading, path: string, substances: Substances, id: string): number | undefined {
  const index = substances.solutes.findIndex((solute) => solute.id === id);
  if (index >= 0) return index;
  reading.unknown(
    path,
    'a solute of this case',
    id,
    substances.solutes.map((solute) => solute.id),
  );
  return undefined;
}

/**
 * Mole fractions in the order of the solutes.
 *
 * @param temperature - Of the stream, K; for mass per volume of liquid.
 * @returns undefined after noting an issue.
 */
export function readComposition(
  reading: Reading,
  path: string,
  given: Readonly<Record<string, string>> | undefined,
  gas: boolean,
  substances: Substances,
  temperature: number,
  absent: Default<number>,
): readonly number[] | undefined {
  const before = reading.issues.length;
  const out = substances.solutes.map((solute) => {
    if (given === undefined || !Object.hasOwn(given, solute.id)) reading.fill(join(path, solute.id), undefined, absent);
    return 0;
  });
  for (const [id, text] of Object.entries(given ?? {})) {
    const where = join(path, id);
    const index = soluteIndex(reading, where, substances, id);
    if (index === undefined) continue;
    const strength = readStrength(reading, where, text, gas, basisOf(substances, index, temperature));
    if (strength === undefined) continue;
    if (strength < 0 || strength >= 1) {
      reading.refuse('range', where, 'a strength from 0 to below 1', text);
      continue;
    }
    reading.stated(where);
    out[index] = strength;
  }
  const sum = out.reduce((total, part) => total + part, 0);
  if (sum >= 1) {
    reading.object(
      'contradiction',
      path,
      gas ? 'strengths that leave room for the carrier' : 'strengths that leave room for the solvent',
      `a sum of ${(100 * sum).toPrecision(3)} mol%`,
    );
  }
  return reading.issues.length > before ? undefined : out;
}

/**
 * Relative humidity of the feed, 0..1, from "50 %", a dew point ("12 degC") or a mole fraction ("1.2 mol%").
 *
 * @param T - Gas temperature, K.
 * @param p - Pressure, Pa, absolute.
 */
export function readHumidity(
  reading: Reading,
  path: string,
  text: string | undefined,
  solvent: Solvent,
  T: Kelvin,
  p: Pascal,
  absent: Default<number>,
): number | undefined {
  if (text === undefined) return reading.fill(path, undefined, absent);
  reading.stated(path);
  const relative = parseQuantity(text, 'fraction');
  const dewPoint = parseQuantity(text, 'temperature');
  const fraction = parseQuantity(text, 'mole-fraction');
  let humidity: number;
  if (relative.ok) {
    humidity = relative.value;
  } else if (!dewPoint.ok && !fraction.ok) {
    reading.refuse('unit', path, 'a humidity', text, 'write "50 %" (relative), "12 degC" (dew point) or "1.2 mol%"');
    return undefined;
  } else if (solvent.vapourPressure === undefined) {
    reading.refuse('contradiction', path, 'no humidity over an involatile solvent', text);
    return undefined;
  } else {
    const saturated = curveValue(solvent.vapourPressure, T);
    const partial = dewPoint.ok
      ? curveValue(solvent.vapourPressure, dewPoint.value)
      : fraction.ok
        ? fraction.value * p
        : 0;
    humidity = partial / saturated;
  }
  if (humidity >= 0 && humidity <= 1 + 1e-9) return Math.min(humidity, 1);
  reading.refuse(
    'range',
    path,
    `a humidity from 0 to 100 % at ${T.toFixed(1)} K`,
    text,
    'a gas with droplets is outside the model',
  );
  return undefined;
}
