// Library functions of temperature by name, `<entry>.<property>`, in the units a case uses (molar heat capacities).

import { idealGasHeatCapacity } from '../ideal-gas.ts';
import { sutherland } from '../sutherland.ts';
import { CARRIERS } from './carriers.ts';
import { SOLVENTS } from './solvents.ts';

/**
 * A library function of temperature.
 *
 * @param id - `<solvent>.density | viscosity | surface-tension | molar-heat-capacity | vapour-pressure`, or
 *   `<carrier>.viscosity | molar-heat-capacity | conductivity`, such as `water.density` or `air.viscosity`.
 * @returns The function of T in K (kg/m3, Pa s, N/m, J/(mol K), Pa, W/(m K)), or undefined for an unknown name.
 */
export function libraryCurve(id: string): ((T: number) => number) | undefined {
  const dot = id.indexOf('.');
  const entry = id.slice(0, dot);
  const property = id.slice(dot + 1);
  const solvent = SOLVENTS[entry];
  if (solvent !== undefined) {
    switch (property) {
      case 'density':
        return (T) => solvent.density(T);
      case 'viscosity':
        return (T) => solvent.viscosity(T);
      case 'surface-tension':
        return (T) => solvent.surfaceTension(T);
      case 'molar-heat-capacity':
        return (T) => solvent.heatCapacity(T) * solvent.molarMass;
      case 'vapour-pressure':
        return (T) => solvent.saturationPressure(T);
    }
  }
  const carrier = CARRIERS[entry];
  if (carrier !== undefined) {
    switch (property) {
      case 'viscosity':
        return (T) => sutherland(carrier.viscosity.value, T);
      case 'molar-heat-capacity':
        return (T) => idealGasHeatCapacity(carrier.heatCapacity.value, T);
      case 'conductivity':
        return (T) => sutherland(carrier.thermalConductivity.value, T);
    }
  }
  return undefined;
}
