// Which diffusivity a solute has in a given gas or liquid: the choice between measured and estimated.

import { REFERENCE_TEMPERATURE } from './constants.ts';
import { fullerDiffusivity } from './gas-diffusivity.ts';
import type { Carrier } from './library/carriers.ts';
import type { Solute } from './library/solutes.ts';
import type { Solvent } from './library/solvents.ts';
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
 * Liquid diffusivity of a solute in a solvent: the listed value scaled with T/mu where there is one,
 * otherwise Wilke and Chang (2.5 times the textbook value for benzene in a heavy oil).
 *
 * @param solute - The solute.
 * @param solvent - The solvent.
 * @param T - Temperature, K; scalar.
 * @returns Diffusivity, m2/s.
 * @remarks Range, error and source: as the two correlations; the entry says which applies.
 */
export function liquidDiffusivityOf(solute: Solute, solvent: Solvent, T: number): number {
  if (solvent.id === 'water' && solute.diffusivityInWater !== undefined) {
    const TRef = REFERENCE_TEMPERATURE;
    return scaledDiffusivity(solute.diffusivityInWater.value, TRef, solvent.viscosity(TRef), T, solvent.viscosity(T));
  }
  const measured = solute.liquidDiffusivity?.[solvent.id]?.value;
  if (measured !== undefined) {
    return scaledDiffusivity(measured.D, measured.T, measured.mu, T, solvent.viscosity(T));
  }
  return wilkeChangDiffusivity(
    T,
    solvent.viscosity(T),
    solvent.molarMass,
    solvent.association,
    solute.boilingVolume.value,
  );
}
