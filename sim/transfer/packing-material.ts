// Materials of packings: what the bed's heat storage and its wetting need.

import { fromMemory, seen } from '../properties/provenance.ts';
import type { Sourced } from '../properties/provenance.ts';

/** Materials by the word of the packing library. */
export type PackingMaterial = 'ceramic' | 'metal' | 'plastic';

/** Density and heat capacity of a solid. */
export interface SolidProperties {
  /** kg/m3. */
  readonly density: Sourced;
  /** J/(kg K). */
  readonly heatCapacity: Sourced;
}

/** Solids at about 300 K: stoneware, stainless steel, polypropylene. */
export const SOLIDS: Readonly<Record<PackingMaterial, SolidProperties>> = {
  ceramic: {
    density: fromMemory(2300, 'chemical stoneware, [Perry2008] section 2'),
    heatCapacity: fromMemory(840, 'chemical stoneware, [Perry2008] section 2'),
  },
  metal: {
    density: seen(8238, '[Bergman2011] table A.1, AISI 316'),
    heatCapacity: seen(468, '[Bergman2011] table A.1, AISI 316'),
  },
  plastic: {
    density: fromMemory(905, 'polypropylene, [Martienssen2005] table 3.3-5'),
    heatCapacity: seen(1680, 'polypropylene at 293 K, [Martienssen2005] table 3.3-6'),
  },
};

/** Critical surface tension of packing materials, N/m: the larger, the easier it wets. */
export const CRITICAL_SURFACE_TENSION: Readonly<Record<PackingMaterial, Sourced>> = {
  ceramic: fromMemory(0.061, '[Onda1967], as in [Sinnott2005] section 11.14'),
  metal: fromMemory(0.075, '[Onda1967], as in [Sinnott2005] section 11.14 (steel)'),
  plastic: fromMemory(0.033, '[Onda1967], as in [Sinnott2005] section 11.14 (polyethylene)'),
};

/**
 * Heat capacity of the packing in one cubic metre of bed.
 *
 *   C = (1 - eps) rhoS cS
 *
 * @param eps - Void fraction.
 * @param density - Density of the solid, kg/m3.
 * @param heatCapacity - Heat capacity of the solid, J/(kg K).
 * @returns Heat capacity, J/(m3 K) of bed.
 * Source: definition.
 */
export function packingHeatCapacity(eps: number, density: number, heatCapacity: number): number {
  return (1 - eps) * density * heatCapacity;
}
