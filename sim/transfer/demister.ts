// Dry pressure drop of a wire-mesh mist eliminator.

/** Coefficients of the fit: constant, two poles' numerators, the second pole's offset, viscous term. */
interface MeshFit {
  readonly base: number;
  readonly first: number;
  readonly second: number;
  readonly offset: number;
  readonly viscous: number;
}

/** To the authors' own data, [Setekleiv2016]. */
const OWN_DATA: MeshFit = { base: 10.29, first: 565, second: 74.9, offset: 160.9, viscous: 45.33 };
/** With data of the literature as well, [Setekleiv2016]. */
const ALL_DATA: MeshFit = { base: 7.3, first: 320, second: 52.4, offset: 161, viscous: 27.2 };

/**
 * Dry pressure drop of a wire-mesh pad.
 *
 *   dp eps^2/(rho u^2) = k0 - k1/[69.6 SL - (SL)^2 - 779] - k2/(k3 - 4.85 SL) + k4 [mu eps S^2 L/(rho u)]^0.75
 *
 * @param S - Specific area of the mesh, m2/m3; 250-1000.
 * @param eps - Void fraction of the mesh; about 0.98.
 * @param u - Superficial gas velocity, m/s; scalar, its size is used.
 * @param rho - Gas density, kg/m3.
 * @param mu - Gas viscosity, Pa s.
 * @param L - Thickness of the pad, m.
 * @param fit - 'own' (default) or 'all': the authors' data, or with the literature's.
 * @returns Pressure drop, Pa; 0 at u = 0. The wet pad has more: not included.
 * @remarks Range: S L above 60. The fitted fractions have poles at S L = 14, 33 and 56: below 60 the form
 *   cannot be used and the result is NaN. Error: not stated; fitted by evolution, do not extrapolate.
 * Source: [Setekleiv2016]. Departs: refuses the neighbourhood of the poles.
 */
export function demisterPressureDrop(
  S: number,
  eps: number,
  u: number,
  rho: number,
  mu: number,
  L: number,
  fit: 'own' | 'all' = 'own',
): number {
  const SL = S * L;
  if (SL < 60) return Number.NaN;
  const speed = Math.abs(u);
  if (speed === 0) return 0;
  const k = fit === 'own' ? OWN_DATA : ALL_DATA;
  const inertial = k.base - k.first / (69.6 * SL - SL * SL - 779) - k.second / (k.offset - 4.85 * SL);
  const group = (mu * eps * S * S * L) / (rho * speed);
  const viscous = k.viscous * Math.exp(0.75 * Math.log(group));
  return ((inertial + viscous) * rho * speed * speed) / (eps * eps);
}
