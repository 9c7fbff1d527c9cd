/**
 * The hydraulic law of a bed as its case asks for it: gas load from the friction correlation, then drainage.
 * Deposits narrow the voids (the law is made anew for the narrower packing); foam divides the gas load.
 */
import type { Bed, Case } from '../case/case.ts';
import { STANDARD_GRAVITY } from '../properties/constants.ts';
import { staticHoldup as engelStaticHoldup } from '../transfer/static-holdup.ts';
import type { Fluids } from './fluids.ts';
import { createBilletDrainage } from './billet-drainage.ts';
import { powerLawDrainage, stichlmairDrainage, type HydraulicLaw, type HydraulicState } from './hydraulic-law.ts';

/** What changes in a bed's hydraulics during a run. */
interface HydraulicConditions {
  readonly fouling: number;
  readonly foaming: number;
}

export interface Hydraulics {
  /**
   * @param holdup - m3/m3.
   * @param massFlux - Gas, kg/(m2 s), not negative.
   * @param gasDensity - kg/m3; `gasViscosity` Pa s.
   * @param liquidDensity - kg/m3; `liquidViscosity` Pa s.
   */
  evaluate(
    holdup: number,
    massFlux: number,
    gasDensity: number,
    gasViscosity: number,
    liquidDensity: number,
    liquidViscosity: number,
    conditions: HydraulicConditions,
    out: HydraulicState,
  ): void;
}

/** Gas mass flux below which friction is taken at this flux, kg/(m2 s): keeps Re positive; dp there is under 1e-8 Pa/m. */
const LEAST_MASS_FLUX = 1e-9;

function staticHoldupOf(plant: Case, fluids: Fluids, bed: Bed): number {
  const { hydraulics } = plant.column;
  if (hydraulics.model !== 'stichlmair-bravo-fair' && hydraulics.model !== 'billet-schultes') return 0;
  const T = plant.liquid.feed.temperature;
  return (
    hydraulics.staticHoldup ?? engelStaticHoldup(bed.packing.area, fluids.solventDensity(T), fluids.surfaceTension(T))
  );
}

/** Builds the law; the static hold-up is taken at the liquid feed's temperature. */
export function createHydraulicLaw(plant: Case, fluids: Fluids, bed: Bed): Hydraulics {
  const { hydraulics, flooding } = plant.column;
  const { packing } = bed;
  const clean = packing.voidFraction;
  if (hydraulics.model === 'power-law' || hydraulics.model === 'prescribed') {
    const k = hydraulics.model === 'power-law' ? hydraulics.k : 0;
    const n = hydraulics.model === 'power-law' ? hydraulics.n : 1;
    const law = powerLawDrainage(k, n, flooding.fullShare * clean, clean);
    return {
      evaluate: (h, _Gm, _rhoG, _muG, _rhoL, _muL, _conditions, out) => {
        law.evaluate(h, 0, 0, out);
      },
    };
  }
  if (hydraulics.model === 'billet-schultes')
    return createBilletDrainage(plant, bed, staticHoldupOf(plant, fluids, bed));
  const staticHoldup = staticHoldupOf(plant, fluids, bed);
  const friction = packing.friction ?? { C1: 0, C2: 0, C3: 0 };
  const { C1, C2, C3 } = friction;
  const lawFor = (eps: number): HydraulicLaw =>
    stichlmairDrainage({
      voidFraction: eps,
      area: packing.area,
      staticHoldup,
      holdupFactor: hydraulics.holdupFactor,
      loadingFactor: hydraulics.loadingFactor,
      deflooding: flooding.deflooding,
      fullHoldup: flooding.fullShare * eps,
      gravity: STANDARD_GRAVITY,
    });
  let fouling = 0;
  let eps = clean;
  let law = lawFor(eps);
  let diameter = (6 * (1 - eps)) / packing.area;
  let group = (0.75 * (1 - eps)) / (Math.pow(eps, 4.65) * diameter);
  return {
    evaluate(holdup, massFlux, gasDensity, gasViscosity, liquidDensity, _liquidViscosity, conditions, out) {
      if (conditions.fouling !== fouling) {
        fouling = conditions.fouling;
        eps = clean * (1 - fouling);
        law = lawFor(eps);
        diameter = (6 * (1 - eps)) / packing.area;
        group = (0.75 * (1 - eps)) / (Math.pow(eps, 4.65) * diameter);
      }
      const Gm = massFlux > LEAST_MASS_FLUX ? massFlux : LEAST_MASS_FLUX;
      const Re = (Gm * diameter) / gasViscosity;
      const root = Math.sqrt(Re);
      const f0 = C1 / Re + C2 / root + C3;
      const c = -(C1 / Re + C2 / (2 * root)) / f0;
      const dry = (group * f0 * massFlux * massFlux) / (gasDensity * liquidDensity * STANDARD_GRAVITY);
      law.evaluate(holdup, dry / (conditions.foaming * conditions.foaming), c, out);
    },
  };
}
