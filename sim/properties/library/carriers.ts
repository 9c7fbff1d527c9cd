// Carrier gases: what is not transferred. Also steam, so that a case over water with a condensable
// carrier can be refused with a reason, and so that the solvent's own vapour has its gas properties.

import { antoinePressure } from '../antoine.ts';
import type { AntoineConstants } from '../antoine.ts';
import type { HeatCapacityPolynomial } from '../ideal-gas.ts';
import { fromMemory, seen } from '../provenance.ts';
import type { Sourced } from '../provenance.ts';
import type { SutherlandConstants } from '../sutherland.ts';
import { waterSaturationPressure } from '../water-saturation-pressure.ts';
import type { Solvent } from './solvents.ts';

/** A carrier gas with the origin of each constant. */
export interface Carrier {
  readonly id: string;
  readonly name: string;
  /** kg/mol. */
  readonly molarMass: Sourced;
  /** J/(mol K) as a polynomial. */
  readonly heatCapacity: Sourced<HeatCapacityPolynomial>;
  /** Pa s. */
  readonly viscosity: Sourced<SutherlandConstants>;
  /** W/(m K). */
  readonly thermalConductivity: Sourced<SutherlandConstants>;
  /** Dimensionless, 1969 set. */
  readonly diffusionVolume: Sourced;
  /** Critical temperature, K; above it the gas cannot condense. */
  readonly criticalTemperature: Sourced;
  /** Critical pressure, Pa. */
  readonly criticalPressure: Sourced;
  /** Pure vapour pressure below the critical temperature where it matters; absent for others. */
  readonly saturation?: Sourced<AntoineConstants | 'IF97'>;
}

const KYLE = '[Kyle1984] ideal-gas heat capacities, as reprinted in open course tables';
const WHITE_MU = '[White2006] table 1-2 (constants seen quoted)';
const WHITE_K = '[White2006] table 1-3';
const FULLER = '[Fuller1969], as restated in [Poling2001] table 11-1';

function kelvinPolynomial(a: number, b: number, c: number, d: number, TMax: number) {
  return { a, b, c, d, offset: 0, TMin: 273, TMax };
}

export const air: Carrier = {
  id: 'air',
  name: 'air',
  molarMass: fromMemory(0.0289647, '[Picard2008] dry air (0.02896546 with 400 ppm CO2)'),
  heatCapacity: seen(kelvinPolynomial(28.11, 0.1967e-2, 0.4802e-5, -1.966e-9, 1800), KYLE),
  viscosity: seen({ f0: 1.716e-5, T0: 273, S: 111 }, WHITE_MU),
  thermalConductivity: fromMemory({ f0: 0.0241, T0: 273, S: 194 }, WHITE_K),
  diffusionVolume: seen(19.7, FULLER),
  criticalTemperature: seen(132.5, '[Cengel2002] table A-1'),
  criticalPressure: seen(3.77e6, '[Cengel2002] table A-1'),
};

export const nitrogen: Carrier = {
  id: 'nitrogen',
  name: 'nitrogen',
  molarMass: seen(0.028013, '[Cengel2002] table A-1'),
  heatCapacity: seen(kelvinPolynomial(28.9, -0.1571e-2, 0.8081e-5, -2.873e-9, 1800), KYLE),
  viscosity: seen({ f0: 1.663e-5, T0: 273, S: 107 }, WHITE_MU),
  thermalConductivity: fromMemory({ f0: 0.0242, T0: 273, S: 150 }, WHITE_K),
  diffusionVolume: seen(18.5, FULLER),
  criticalTemperature: seen(126.2, '[Cengel2002] table A-1'),
  criticalPressure: seen(3.39e6, '[Cengel2002] table A-1'),
};

export const carbonDioxideCarrier: Carrier = {
  id: 'carbon-dioxide',
  name: 'carbon dioxide',
  molarMass: seen(0.04401, '[Cengel2002] table A-1'),
  heatCapacity: seen(kelvinPolynomial(22.26, 5.981e-2, -3.501e-5, 7.469e-9, 1800), KYLE),
  viscosity: seen({ f0: 1.37e-5, T0: 273, S: 222 }, WHITE_MU),
  thermalConductivity: fromMemory({ f0: 0.0146, T0: 273, S: 1800 }, WHITE_K),
  diffusionVolume: seen(26.9, FULLER),
  criticalTemperature: seen(304.2, '[Cengel2002] table A-1'),
  criticalPressure: seen(7.39e6, '[Cengel2002] table A-1'),
};

/** Water vapour: carrier over oil, and the vapour of water as solvent over another carrier. */
export const steam: Carrier = {
  id: 'steam',
  name: 'steam',
  molarMass: seen(0.018015268, '[IF97]'),
  heatCapacity: seen(kelvinPolynomial(32.24, 0.1923e-2, 1.055e-5, -3.595e-9, 1800), KYLE),
  viscosity: seen({ f0: 1.12e-5, T0: 350, S: 1064 }, WHITE_MU),
  thermalConductivity: fromMemory({ f0: 0.0181, T0: 300, S: 2200 }, WHITE_K),
  diffusionVolume: seen(13.1, FULLER),
  criticalTemperature: seen(647.096, '[R1-76]'),
  criticalPressure: fromMemory(22.064e6, '[IF97]'),
  saturation: seen('IF97', '[IF97] equation 30'),
};

/** Carriers by the word a case uses. */
export const CARRIERS: Readonly<Record<string, Carrier>> = {
  air,
  nitrogen,
  'carbon-dioxide': carbonDioxideCarrier,
  steam,
};

/** Vapour pressure of a carrier, Pa; infinite above its critical point or where none is needed. */
function carrierSaturationPressure(carrier: Carrier, T: number): number {
  if (carrier.saturation === undefined || T >= carrier.criticalTemperature.value) return Infinity;
  const law = carrier.saturation.value;
  return law === 'IF97' ? waterSaturationPressure(T) : antoinePressure(law, T);
}

/** Why a carrier cannot be used; undefined when it can. */
export type CarrierRefusal =
  | { readonly kind: 'same-as-solvent'; readonly carrier: string; readonly solvent: string }
  | {
      readonly kind: 'carrier-condenses';
      readonly carrier: string;
      /** Coldest temperature asked for, K. */
      readonly T: number;
      /** Pressure at which the carrier condenses there, Pa. */
      readonly saturationPressure: number;
    };

/**
 * Whether a carrier stays a gas at the coldest place and the highest pressure of a case.
 *
 * @param carrier - The carrier.
 * @param solvent - The solvent; a carrier that is the solvent's own vapour is refused at any state.
 * @param TMin - Lowest temperature of gas or liquid, K.
 * @param p - Highest total pressure, Pa; the carrier's partial pressure is at most this.
 * @returns The reason for a refusal, or undefined.
 */
export function carrierRefusal(
  carrier: Carrier,
  solvent: Solvent,
  TMin: number,
  p: number,
): CarrierRefusal | undefined {
  if (carrier.id === 'steam' && solvent.id === 'water') {
    return { kind: 'same-as-solvent', carrier: carrier.id, solvent: solvent.id };
  }
  const saturationPressure = carrierSaturationPressure(carrier, TMin);
  if (p >= saturationPressure) {
    return { kind: 'carrier-condenses', carrier: carrier.id, T: TMin, saturationPressure };
  }
  return undefined;
}
