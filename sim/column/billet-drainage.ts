/**
 * Billet and Schultes' hold-up between loading and flooding as a drainage law: solved for the liquid rate at the hold-up
 * that is there. At their flood point the liquid rate is the most that can pass; a segment that holds more passes ever
 * less, down to the capacity at a higher gas rate, u_G / deflooding: a deliberate law, stated in the case, since no
 * correlation holds there (see `hydraulic-law.ts`). Static part carved out as in Stichlmair's law.
 */
import type { Bed, Case } from '../case/case.ts';
import { invariant } from '../errors.ts';
import { STANDARD_GRAVITY } from '../properties/constants.ts';
import { billetDryPressureDrop } from '../transfer/billet-pressure-drop.ts';
import { drainableHoldup } from '../transfer/static-holdup.ts';
import { closingSupply, UNLIMITED_VELOCITY, type HydraulicState } from './hydraulic-law.ts';
import type { Hydraulics } from './hydraulics.ts';

/** Factors and powers of the hydraulic area below and above Re = 5.08, [Billet1999]; see `billetHoldup`. */
const LOW = { factor: 1, power: 0.15 };
const HIGH = { factor: 0.85, power: 0.25 };
/** Exponent of u_G/u_G,Fl between loading and flooding, [Billet1999]. */
const LOADING_POWER = 13;
/** Flooding: exponents of the flow parameter below and above 0.4 and the factors there, [Billet1999]; see `billetFloodVelocity`. */
const FLOOD_LOW = { n: -0.194, factor: 1, ratioPower: 0 };
const FLOOD_HIGH = { n: -0.708, factor: 0.6244, ratioPower: 0.1028 };
/** `loading` = (u_G/u_G,Fl)^9: 0.39 at 90 % of the flood velocity, about what Stichlmair's slope ratio is there. */
const REPORTED_POWER = 9;
/** Share of the room above the flood hold-up over which a flooded segment slows to the de-flooding capacity; judgement. */
const SLOWING = 0.25;
/** Share of the voids up to which the flood film is followed in the search for the capacity. */
const FULLEST = 0.98;
/** Newton's steps: it comes from the right on a convex function; seen at most 9 for 1e-13. */
const MAX_STEPS = 40;
const CONVERGED = 1e-13;
/** Gas velocity below which flooding is taken at this one, m/s; (1e-6/2)^13 is nothing. */
const LEAST_VELOCITY = 1e-6;

const holdupExponent = (power: number): number => 1 / 3 + (2 / 3) * (power + 0.2);

/** Hold-up at a liquid rate and what comes with it; one object reused. */
interface Held {
  /** Logarithms of the unloaded hold-up and of the loaded one, and d(the latter)/d ln u. */
  lnUnloaded: number;
  lnHoldup: number;
  slope: number;
  /** Gas velocity over the flooding one at this liquid rate, as ln, and its slope in ln u. */
  lnShare: number;
  shareSlope: number;
  /** Hold-up at flooding above the unloaded one. */
  rise: number;
}

/** Builds the law of one bed; the case has made sure that the packing has its constants. */
export function createBilletDrainage(plant: Case, bed: Bed, staticHoldup: number): Hydraulics {
  const { billet, area: a, voidFraction: clean } = bed.packing;
  invariant(billet !== undefined, 'a bed with Billet and Schultes’ hydraulics has their constants');
  const { Ch, Cp0, CFl } = billet;
  const { deflooding, fullShare } = plant.column.flooding;
  const { diameter } = plant.column;
  const C1 = 13_300 / (a * Math.sqrt(a)); // [Billet1999]; see `billetWetFactor`
  const held: Held = { lnUnloaded: 0.5, lnHoldup: 0.5, slope: 0.5, lnShare: 0.5, shareSlope: 0.5, rise: 0.5 };
  const nLow = holdupExponent(LOW.power);
  const nHigh = holdupExponent(HIGH.power);
  /** Of the fluids at hand: scales of the two branches, of the flood film, of the flooding velocity. */
  const fluid = { low: 0.5, high: 0.5, film: 0.5, floodLow: 0.5, floodHigh: 0.5, eps: clean };

  const setFluids = (eps: number, rhoL: number, muL: number, rhoG: number, muG: number): void => {
    const film = Math.log((12 * muL * a * a) / (STANDARD_GRAVITY * rhoL)) / 3;
    const lnRe = Math.log(rhoL / (a * muL));
    const lnFr = Math.log(a / STANDARD_GRAVITY);
    const scale = (b: typeof LOW): number => film + (2 / 3) * (Math.log(b.factor * Ch) + b.power * lnRe + 0.1 * lnFr);
    fluid.eps = eps;
    fluid.low = scale(LOW);
    fluid.high = scale(HIGH);
    fluid.film = (6 * a * a * eps * muL) / (STANDARD_GRAVITY * rhoL);
    const ratio = Math.log(muL / muG);
    const half = 0.5 * Math.log(rhoL / rhoG); // X = (uL/uG) (rhoL/rhoG)^0.5
    const flood = (b: typeof FLOOD_LOW): number =>
      Math.log(b.factor * CFl) + b.ratioPower * ratio + b.n * (half + 0.2 * ratio) + half;
    fluid.floodLow = flood(FLOOD_LOW);
    fluid.floodHigh = flood(FLOOD_HIGH);
  };

  /** Root of h^3 (3 h - eps) = film u between eps/3 and eps, from the right; eps when no film of that rate fits. */
  const floodHoldup = (u: number): number => {
    const { eps } = fluid;
    const right = fluid.film * u;
    let h = Math.min(eps, eps / 3 + Math.sqrt(Math.sqrt(right / 3)));
    if (right >= 2 * eps * eps * eps * eps) return eps;
    for (let k = 0; k < MAX_STEPS; k++) {
      const h2 = h * h;
      const step = (h2 * h * (3 * h - eps) - right) / (h2 * (12 * h - 3 * eps));
      h -= step;
      if (Math.abs(step) < CONVERGED * h) break;
    }
    return h;
  };

  /** Fills `held` at ln u and the gas velocity. */
  const holdAt = (x: number, lnGas: number): void => {
    const { eps } = fluid;
    const u = Math.exp(x);
    const low = fluid.low + nLow * x;
    const high = fluid.high + nHigh * x;
    const isLow = low > high;
    const lnUnloaded = isLow ? low : high;
    const h = floodHoldup(u);
    const free = eps - h;
    // ln of the flooding velocity: u^(1 + n) = K u_L^n S(h), the lower of the two branches, which cross at X = 0.4.
    const space = free > 0 ? 0.5 * Math.log(((2 * free * free * free) / eps) * (h / a)) : -Infinity;
    const floodLow = (fluid.floodLow + FLOOD_LOW.n * x + space) / (1 + FLOOD_LOW.n);
    const floodHigh = (fluid.floodHigh + FLOOD_HIGH.n * x + space) / (1 + FLOOD_HIGH.n);
    const n = floodLow < floodHigh ? FLOOD_LOW.n : FLOOD_HIGH.n;
    const lnShare = lnGas - Math.min(floodLow, floodHigh);
    const weight = Math.exp(Math.min(LOADING_POWER * lnShare, 300));
    const unloaded = Math.exp(lnUnloaded);
    const rise = h > unloaded ? h - unloaded : 0; // a film so thick that it floods without gas has nothing to rise to
    const holdup = unloaded + rise * weight;
    const floodSlope = free > 0 ? (fluid.film * u) / (h * h * (12 * h - 3 * eps)) : 0; // dh/d ln u
    const shareSlope = free > 0 ? -(n + (0.5 / h - 1.5 / free) * floodSlope) / (1 + n) : 0;
    const n0 = isLow ? nLow : nHigh;
    held.lnUnloaded = lnUnloaded;
    held.lnHoldup = Math.log(holdup);
    const riseSlope = rise > 0 ? floodSlope - unloaded * n0 : 0;
    held.slope = (unloaded * n0 + weight * (riseSlope + LOADING_POWER * rise * shareSlope)) / holdup;
    held.lnShare = lnShare;
    held.shareSlope = shareSlope;
    held.rise = rise;
  };

  /** ln u at which the law holds what ln H says, coming from the right; leaves `held` there. */
  const rateAt = (start: number, lnH: number, lnGas: number): number => {
    let x = start;
    for (let k = 0; k < MAX_STEPS; k++) {
      holdAt(x, lnGas);
      const step = (held.lnHoldup - lnH) / held.slope;
      if (!(Math.abs(step) > CONVERGED * Math.max(1, Math.abs(x)))) break;
      x -= step;
    }
    return x;
  };

  /** ln of the liquid rate that floods at this gas velocity, from a rate above it. */
  const capacityAt = (start: number, lnGas: number): number => {
    let x = Math.min(start, Math.log((FULLEST * FULLEST * FULLEST * (3 * FULLEST - 1) * fluid.eps ** 4) / fluid.film));
    for (let k = 0; k < MAX_STEPS; k++) {
      holdAt(x, lnGas);
      const step = held.lnShare / held.shareSlope;
      if (!(Math.abs(step) > CONVERGED * Math.max(1, Math.abs(x)))) break;
      x -= step;
    }
    return x;
  };

  return {
    evaluate(holdup, massFlux, rhoG, muG, rhoL, muL, conditions, out: HydraulicState) {
      const eps = clean * (1 - conditions.fouling);
      const full = fullShare * eps;
      const h = Math.min(holdup, full);
      const uG = massFlux / (rhoG * conditions.foaming);
      const dry = billetDryPressureDrop({ a, eps }, Cp0, uG, rhoG, muG, diameter) / (rhoL * STANDARD_GRAVITY);
      const hd = drainableHoldup(h, staticHoldup);
      if (!(hd > 0)) {
        out.demand = 0;
        out.supply = UNLIMITED_VELOCITY;
        out.gradient = dry * Math.pow(eps / (eps - Math.max(h, 0)), 1.5);
        out.loading = 0;
        return;
      }
      setFluids(eps, rhoL, muL, rhoG, muG);
      const lnGas = Math.log(uG > LEAST_VELOCITY ? uG : LEAST_VELOCITY);
      const lnH = Math.log(hd);
      const unloaded = Math.min((lnH - fluid.low) / nLow, (lnH - fluid.high) / nHigh); // not less than the rate sought
      holdAt(unloaded, lnGas);
      // The rate that floods at this gas velocity, wanted only where the unloaded hold-up's rate floods.
      const isBelow = held.lnShare < 0;
      const capacity = isBelow ? Infinity : capacityAt(unloaded, lnGas);
      if (!isBelow) holdAt(capacity, lnGas);
      const isFlooded = !isBelow && lnH >= held.lnHoldup;
      const x = isFlooded ? capacity : rateAt(isBelow ? unloaded : capacity, lnH, lnGas);
      const u = Math.exp(x);
      const atFlood = Math.exp(held.lnHoldup);
      // Beyond flooding the share goes on with the slope that it has there.
      const beyond = isFlooded ? (LOADING_POWER * held.rise) / atFlood : 1;
      const lnShare = isFlooded ? (beyond > 0 ? (lnH - held.lnHoldup) / beyond : 0) : held.lnShare;
      out.loading = Math.exp(REPORTED_POWER * Math.min(lnShare, 10));
      out.gradient =
        dry *
        Math.exp(
          1.5 * Math.log(eps / (eps - h)) + 0.3 * (lnH - held.lnUnloaded) + C1 * u * Math.sqrt(a / STANDARD_GRAVITY),
        );
      if (isFlooded) {
        const least = Math.exp(capacityAt(capacity, lnGas - Math.log(deflooding)));
        const fuller = (hd - atFlood) / (SLOWING * (full - eps / 3));
        out.demand = least + (u - least) * Math.exp(-fuller * fuller);
      } else {
        out.demand = u;
      }
      out.supply = closingSupply(holdup, full, eps, out.demand);
    },
  };
}
