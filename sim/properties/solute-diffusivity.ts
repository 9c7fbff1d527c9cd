// Which diffusivity a solute has in a given gas or liquid: the choice between measured and estimated.

import { fullerDiffusivity } from './gas-diffusivity.ts';
import type { Carrier } from './library/carriers.ts';
import type { Solute } from './library/solutes.ts';
import type { Solvent } from './library/solvents.ts';
import { REFERENCE_TEMPERATURE } from './constants.ts';
import { scaledDiffusivity, wilkeChangDiffusivity } from './liquid-diffusivity.ts';

/**
 * Gas diffusivity of a solute in a carrier, after Fuller, Schettler and Giddings.
 *
 * @param solute - The solute; for water vapour pass the carrier entry `steam`, which has both fields.
 * @param carrier - The carrier.
 * @param T - Temperature, K; scalar.
 * @param p - Pressure, Pa; scalar.
 * @returns Diffusivity, m2/s.
 * @remarks Range, error and source: as `fullerDiffusivity`.
 */
export function gasDiffusivityOf(
  solute: Pick<Solute, 'molarMass' | 'diffusionVolume'>,
  carrier: Carrier,
  T: number,
  p: number,
): number {
  return fullerDiffusivity(
    T,
    p,
    solute.molarMass.value,
    carrier.molarMass.value,
    solute.diffusionVolume.value,
    carrier.diffusionVolume.value,
  );
}

/**
 * Liquid diffusivity of a solute in a solvent: in water the listed value at 298.15 K scaled with T/mu,
 * otherwise Wilke and Chang.
 *
 * @param solute - The solute.
 * @param solvent - The solvent.
 * @param T - Temperature, K; scalar.
 * @returns Diffusivity, m2/s.
 * @remarks Range, error and source: as the two correlations; the entry says which applies.
 */
export function liquidDiffusivityOf(solute: Solute, solvent: Solvent, T: number): number {
  if (solvent.id === 'water' && solute.diffusivityInWater !== undefined) {
    return scaledDiffusivity(
      solute.diffusivityInWater.value,
      REFERENCE_TEMPERATURE,
      solvent.viscosity(REFERENCE_TEMPERATURE),
      T,
      solvent.viscosity(T),
    );
  }
  return wilkeChangDiffusivity(
    T,
    solvent.viscosity(T),
    solvent.molarMass,
    solvent.association,
    solute.boilingVolume.value,
  );
}
