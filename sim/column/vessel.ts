/**
 * A stirred liquid vessel: distributor, redistributor, sump. States: moles n_0..n_K and enthalpy (contents and metal).
 */
import { DATUM_TEMPERATURE, type Fluids } from './fluids.ts';

/** What a vessel's states mean; one object reused. */
export interface VesselState {
  /** m3 */ volume: number;
  /** K */ temperature: number;
  /** Solutes, mol/m3. */ readonly concentration: Float64Array;
  /** m3/mol of solvent at its temperature. */ molarVolume: number;
}

/** Scale of volume over normal volume on which a gravity outlet's root is rounded. */
const FOOT = 0.01;
/**
 * Heat capacity of a vessel's metal over that of its normal contents. It also keeps the temperature defined when the
 * vessel is empty. Judgement: some 2 kg of steel for 20 kg of water.
 */
const METAL_SHARE = 0.01;
/** Volume below which concentrations fade, over the normal volume. */
const TRACE = 1e-7;

/**
 * Outflow of a gravity vessel over its design rate: (V/Vn)^(1/2), rounded at its foot, 1 at V = Vn.
 * Torricelli's law (derivable).
 */
export function gravityOutflow(volumeShare: number): number {
  if (volumeShare <= 0) return 0;
  return volumeShare * Math.sqrt((1 + FOOT) / (volumeShare + FOOT));
}

/** Volume share at which the outflow is `share` of the design rate; inverse of `gravityOutflow`. */
export function gravityVolume(share: number): number {
  // v^2 (1 + f) = s^2 (v + f)
  const s2 = share * share;
  return (s2 + Math.sqrt(s2 * s2 + 4 * (1 + FOOT) * s2 * FOOT)) / (2 * (1 + FOOT));
}

/** Heat capacity of a vessel's metal, J/K. */
export function metalHeat(fluids: Fluids, normalVolume: number): number {
  const T = fluids.meanTemperature;
  return (METAL_SHARE * normalVolume * fluids.solventDensity(T) * fluids.liquidHeat[0]) / fluids.molarMass[0];
}

/** Reads a vessel's states at `at`. */
export function readVessel(
  fluids: Fluids,
  molarVolume: (T: number) => number,
  y: Float64Array,
  at: number,
  metal: number,
  normalVolume: number,
  out: VesselState,
): void {
  const { components, liquidHeat, soluteVolume } = fluids;
  let capacity = metal;
  let solutes = 0;
  for (let k = 0; k < components; k++) {
    capacity += y[at + k] * liquidHeat[k];
    solutes += y[at + k] * soluteVolume[k];
  }
  const T = DATUM_TEMPERATURE + y[at + components] / capacity;
  const v0 = molarVolume(T);
  const volume = y[at] * v0 + solutes;
  const per = 1 / ((volume > 0 ? volume : 0) + TRACE * normalVolume);
  for (let k = 1; k < components; k++) out.concentration[k - 1] = y[at + k] * per;
  out.volume = volume;
  out.temperature = T;
  out.molarVolume = v0;
}

/** Writes the states of a vessel that holds `volume` of a liquid of the given mole fractions and temperature. */
export function fillVessel(
  fluids: Fluids,
  molarVolume: (T: number) => number,
  y: Float64Array,
  at: number,
  metal: number,
  volume: number,
  temperature: number,
  moleFraction: Float64Array,
): void {
  const { components, liquidHeat, soluteVolume } = fluids;
  const v0 = molarVolume(temperature);
  let solvent = 1;
  let perMole = 0;
  for (let k = 1; k < components; k++) {
    solvent -= moleFraction[k - 1];
    perMole += moleFraction[k - 1] * soluteVolume[k];
  }
  const moles = volume / (solvent * v0 + perMole);
  let capacity = metal;
  y[at] = moles * solvent;
  capacity += y[at] * liquidHeat[0];
  for (let k = 1; k < components; k++) {
    y[at + k] = moles * moleFraction[k - 1];
    capacity += y[at + k] * liquidHeat[k];
  }
  y[at + components] = capacity * (temperature - DATUM_TEMPERATURE);
}
