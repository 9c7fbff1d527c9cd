// Checks of the plant as a whole that need properties and no balances: what freezes, boils or condenses.

import { CARRIERS, carrierRefusal } from '../../properties/library/carriers.ts';
import { SOLVENTS, heavyOil } from '../../properties/library/solvents.ts';
import type { Carrier, ColumnSpec, GasSupply, LiquidSupply, Solvent } from '../case.ts';
import { curveValue } from '../curve.ts';
import type { Reading } from '../reading.ts';
import { listed } from './listed.ts';

/** Refuses what the model cannot be: a condensing carrier, a frozen or boiling solvent. */
export function checkPhases(
  reading: Reading,
  parts: {
    readonly solvent: Solvent;
    readonly carrier: Carrier;
    readonly column: ColumnSpec;
    readonly gas: GasSupply;
    readonly liquid: LiquidSupply;
  },
): void {
  const { solvent, carrier, column, gas, liquid } = parts;
  const coldest = Math.min(liquid.feed.temperature, gas.feed.temperature);
  const library = listed(SOLVENTS, solvent.id);
  const gasEntry = listed(CARRIERS, carrier.id);
  // An own solvent has no library entry; the oil stands in, for only its name is looked at.
  const refusal =
    gasEntry === undefined ? undefined : carrierRefusal(gasEntry, library ?? heavyOil, coldest, column.topPressure);
  if (refusal !== undefined) {
    const received =
      refusal.kind === 'same-as-solvent'
        ? `${refusal.carrier} over ${refusal.solvent}`
        : `${refusal.carrier}, which condenses at ${(refusal.saturationPressure / 1e3).toPrecision(3)} kPa(a)`;
    reading.object(
      'contradiction',
      'carrier',
      `a carrier that stays a gas at ${coldest.toFixed(1)} K`,
      received,
      'a condensing carrier is outside the model',
    );
  }
  const streams: [string, number][] = [['liquid.feed.temperature', liquid.feed.temperature]];
  if (liquid.makeUp !== undefined) streams.push(['liquid.makeUp.temperature', liquid.makeUp.temperature]);
  if (liquid.emergencyWater !== undefined)
    streams.push(['liquid.emergencyWater.temperature', liquid.emergencyWater.temperature]);
  for (const [path, T] of streams) {
    if (solvent.vapourPressure !== undefined && curveValue(solvent.vapourPressure, T) >= column.topPressure) {
      reading.object(
        'contradiction',
        path,
        `a temperature at which ${solvent.name} is liquid at the top pressure`,
        `${T.toFixed(1)} K, above its boiling point`,
      );
    } else if (library !== undefined && T < library.TMin) {
      const frozen = library.id === 'water';
      const received = `${T.toFixed(2)} K, below ${library.TMin} K`;
      if (frozen) reading.object('contradiction', path, 'a temperature at which water is liquid', received);
      else reading.warn('range', path, "a temperature in the range of the solvent's properties", received);
    } else if (library !== undefined && T > library.TMax) {
      reading.warn(
        'range',
        path,
        "a temperature in the range of the solvent's properties",
        `${T.toFixed(2)} K, above ${library.TMax} K`,
      );
    }
  }
  if (liquid.cooler !== undefined && liquid.cooler.coolantTemperature > liquid.feed.temperature) {
    reading.warn(
      'style',
      'liquid.cooler.coolantTemperature',
      'a coolant colder than the solvent',
      'a warmer one',
      'this cooler heats',
    );
  }
}
