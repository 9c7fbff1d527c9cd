/** A liquid stream by volume: rate, temperature, concentrations; and the fluxes it makes. */
import { DATUM_TEMPERATURE, type Fluids } from './fluids.ts';

export interface LiquidStream {
  /** m3/s */ rate: number;
  /** K */ temperature: number;
  /** Solutes, mol/m3. */ readonly concentration: Float64Array;
  /** Solvent, m3/mol at the temperature. */ molarVolume: number;
}

export function createStream(solutes: number): LiquidStream {
  return { rate: 0, temperature: DATUM_TEMPERATURE, concentration: new Float64Array(solutes), molarVolume: 1 };
}

/** Concentrations, mol/m3, of a liquid of the given mole fractions of the solutes. */
export function concentrations(
  fluids: Fluids,
  moleFraction: Float64Array,
  molarVolume: number,
  out: Float64Array,
): void {
  let solvent = 1;
  let perMole = 0;
  for (let k = 0; k < moleFraction.length; k++) {
    solvent -= moleFraction[k];
    perMole += moleFraction[k] * fluids.soluteVolume[k + 1];
  }
  const volume = solvent * molarVolume + perMole;
  for (let k = 0; k < moleFraction.length; k++) out[k] = moleFraction[k] / volume;
}

/**
 * Adds the stream's molar fluxes and enthalpy, mol/s and W, times `sign`, to `out[at..at + K + 1]`.
 * The solvent fills the volume that the solutes leave.
 */
export function addStream(fluids: Fluids, stream: LiquidStream, sign: number, out: Float64Array, at: number): void {
  const { components, soluteVolume, liquidHeat } = fluids;
  let free = 1;
  let heat = 0;
  const rate = sign * stream.rate;
  for (let k = 1; k < components; k++) {
    const c = stream.concentration[k - 1];
    free -= c * soluteVolume[k];
    out[at + k] += rate * c;
    heat += rate * c * liquidHeat[k];
  }
  const solvent = (rate * free) / stream.molarVolume;
  out[at] += solvent;
  out[at + components] += (heat + solvent * liquidHeat[0]) * (stream.temperature - DATUM_TEMPERATURE);
}
