/**
 * Hold-up and pressure drop of one segment as a drainage law: what lets liquid go, given the hold-up that is there and
 * the gas that passes. The rising branch is a published correlation solved for the liquid rate. Past the flood point
 * more hold-up drains slower, down to the capacity that the segment would have at a higher gas rate, u_G / deflooding:
 * a deliberate law, stated in the case, since no correlation holds there. So a segment that has flooded fills until it
 * is full, and does not recover before the gas is below deflooding times the velocity that floods it.
 *
 * Gas load enters as `dry`, the dry pressure gradient over the liquid's weight, rho_L g.
 */

import { bracketedRoot } from '../numerics/bracketed-root.ts';

/** What the law finds; one object reused. */
export interface HydraulicState {
  /** Superficial liquid velocity that leaves, and that can enter, m/s. */
  demand: number;
  supply: number;
  /** Irrigated pressure gradient over rho_L g, uncapped. */
  gradient: number;
  /** 0 at low load, 1 at the flood point, above it beyond. */
  loading: number;
}

export interface HydraulicLaw {
  /**
   * @param holdup - m3/m3; total.
   * @param dry - Dry pressure gradient / (rho_L g).
   * @param c - Friction exponent of the gas side (Stichlmair's c).
   * @param out - Filled in place.
   */
  evaluate(holdup: number, dry: number, c: number, out: HydraulicState): void;
  /** Hold-up that drains no further, m3/m3. */
  readonly staticHoldup: number;
  /** Liquid velocity at the flood point for a gas load, m/s. */
  capacity(dry: number, c: number): number;
}

/** Parameters of Stichlmair, Bravo and Fair's drainage law. */
export interface StichlmairDrainage {
  readonly voidFraction: number;
  /** m2/m3 */ readonly area: number;
  readonly staticHoldup: number;
  /** 0.555 and 20 in the paper. */
  readonly holdupFactor: number;
  readonly loadingFactor: number;
  readonly deflooding: number;
  /** Largest hold-up, m3/m3. */ readonly fullHoldup: number;
  readonly gravity: number;
}

/** Share of the voids over which a filling segment closes, and what it takes in at half of that, over what it lets go. */
const CLOSING_BAND = 0.03;
const HALF_OPEN = 10;
/** Accuracy of the flood point's hold-up; the velocity there is at its top, so its own error is the square of this. */
const FLOOD_POINT = 1e-8;
const LEAST_LOADING = 1e-30;
/** Effective supply of a segment that takes all there is, m/s. */
export const UNLIMITED_VELOCITY = 1e6;

/**
 * What a segment can take in, m/s: without limit while there is room, falling smoothly to nothing over the last of its
 * voids, so that a full one takes in what it lets go.
 *
 * @param full - The most that it holds, m3/m3.
 * @param demand - What it lets go, m/s.
 */
export function closingSupply(holdup: number, full: number, voidFraction: number, demand: number): number {
  const room = (full - holdup) / (CLOSING_BAND * voidFraction);
  if (room >= 1) return UNLIMITED_VELOCITY;
  if (room <= 0) return 0;
  const supply = (HALF_OPEN * demand * room) / (1 - room);
  return supply < UNLIMITED_VELOCITY ? supply : UNLIMITED_VELOCITY;
}

/**
 * Stichlmair, Bravo and Fair's hold-up solved for the liquid velocity, with the static part carved out.
 *
 *   h0 = 0.555 (u^2 a / (g eps^4.65))^(1/3),  h = h0 [1 + 20 P^2],  P = dp/(rho_L g)
 *   P  = dry [(1 - eps + h)/(1 - eps)]^((2 + c)/3) [eps/(eps - h)]^4.65    at the hold-up h that is there
 *   u  = (g eps^4.65 / a)^(1/2) [hd / (0.555 (1 + 20 P^2))]^(3/2),   hd = h {1 - exp[-((h - hs)/(hs/2))^2]}
 *
 * hd as in `drainableHoldup`: nothing drains at or below hs, and from 3 hs on the law is the paper's to 1e-6.
 * Past the flood point u falls from u_max to nothing; let go is u_min + (u_max - u_min) u/u_max, u_min being u_max at
 * u_G / deflooding.
 *
 * @remarks Below the flood point u rises with h; `loading` is the ratio of the two relative slopes, 1 at the flood point,
 *   which makes it Stichlmair's own flood condition. Source: [Stichlmair1989]; static part [Engel2001].
 *   Departs: carving out of the static part; the branch past the flood point (see the file's head).
 */
export function stichlmairDrainage(p: StichlmairDrainage): HydraulicLaw {
  const { voidFraction: eps, staticHoldup: hs, loadingFactor, fullHoldup } = p;
  const scale = Math.sqrt((p.gravity * Math.pow(eps, 4.65)) / p.area);
  const solid = 1 - eps;
  const spread = Math.max(0.5 * hs, 1e-9);

  /** Velocity, gradient and loading at a hold-up within (hs, full); fields, since closed-over numbers would be boxed. */
  const branch = { u: 0.5, gradient: 0.5, loading: 0.5 };
  const rising = (h: number, dry: number, c: number): void => {
    let hd = h;
    let slope = 1; // of hd
    const above = (h - hs) / spread;
    if (above <= 0) {
      hd = 0;
    } else if (above < 6) {
      const fade = Math.exp(-above * above);
      hd = h * (1 - fade);
      slope = 1 - fade + (2 * h * above * fade) / spread;
    }
    const exponent = (2 + c) / 3;
    const P = dry * Math.exp(exponent * Math.log((solid + h) / solid) + 4.65 * Math.log(eps / (eps - h)));
    const lift = loadingFactor * P * P;
    const kappa = exponent / (solid + h) + 4.65 / (eps - h);
    const r = hd > 0 ? hd / (p.holdupFactor * (1 + lift)) : 0;
    branch.u = scale * r * Math.sqrt(r);
    branch.gradient = P;
    branch.loading = hd > 0 ? (2 * lift * kappa * hd) / ((1 + lift) * slope) : 0;
  };
  /** Logarithm of the loading at h for the gas load in `load`. */
  const load = { dry: 0.5, c: 0.5 };
  const lnLoading = (h: number): number => {
    rising(h, load.dry, load.c);
    return Math.log(branch.loading > LEAST_LOADING ? branch.loading : LEAST_LOADING);
  };
  /** Hold-up at the flood point, where the loading is 1; a full bed's when it is less there. */
  const floodHoldup = (dry: number, c: number): number => {
    load.dry = dry;
    load.c = c;
    let high = fullHoldup;
    let atHigh = lnLoading(high);
    if (atHigh <= 0) return fullHoldup;
    // Down by a third of the room above the static part at a time, to a bracket in which the curve is nearly straight.
    for (;;) {
      const low = hs + (2 / 3) * (high - hs);
      const atLow = lnLoading(low);
      if (atLow < 0) return bracketedRoot(lnLoading, low, high, atLow, atHigh, FLOOD_POINT).after;
      high = low;
      atHigh = atLow;
    }
  };
  const capacity = (dry: number, c: number): number => {
    rising(floodHoldup(dry, c), dry, c);
    return branch.u;
  };
  const froth = 1 / (p.deflooding * p.deflooding);
  return {
    staticHoldup: hs,
    capacity,
    evaluate(holdup, dry, c, out) {
      const h = holdup < fullHoldup ? holdup : fullHoldup;
      rising(h > 0 ? h : 0, dry, c);
      const { u, gradient, loading } = branch;
      out.gradient = gradient;
      out.loading = loading;
      if (loading < 1) {
        out.demand = u;
      } else {
        const most = capacity(dry, c);
        const least = capacity(dry * froth, c);
        out.demand = least + (u / most) * (most - least);
      }
      out.supply = closingSupply(holdup, fullHoldup, eps, out.demand);
    },
  };
}

/** u = k h^n, no pressure drop, never floods but closes when full. For closed forms and user fits. */
export function powerLawDrainage(k: number, n: number, fullHoldup: number, voidFraction: number): HydraulicLaw {
  return {
    staticHoldup: 0,
    capacity: () => UNLIMITED_VELOCITY,
    evaluate(holdup, _dry, _c, out) {
      out.demand = holdup > 0 ? k * Math.exp(n * Math.log(holdup)) : 0;
      out.supply = closingSupply(holdup, fullHoldup, voidFraction, out.demand);
      out.gradient = 0;
      out.loading = 0;
    },
  };
}
