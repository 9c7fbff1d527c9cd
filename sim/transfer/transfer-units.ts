// Closed forms for straight lines: transfer units, stages, and how a unit splits between the films.
// A = L/(m G) is the absorption factor, S = 1/A the stripping factor; some books swap the letters.

/**
 * Overall gas transfer units.
 *
 *   NOG = ln{(1 - 1/A) r + 1/A}/(1 - 1/A),  r = (y1 - m x2)/(y2 - m x2)
 *
 * @param r - Ratio of the driving forces at gas inlet and outlet against the entering liquid; above 1.
 * @param A - Absorption factor; positive.
 * @returns NOG; r - 1 at A = 1, without a singularity there. NaN where no column reaches r.
 * @remarks Range: dilute, both lines straight. Source: [Colburn1939].
 */
export function transferUnits(r: number, A: number): number {
  const d = 1 - 1 / A;
  if (d === 0) return r - 1;
  return Math.log1p(d * (r - 1)) / d;
}

/**
 * Share of the entering driving force that is left, the inverse of the above.
 *
 *   1/r = (1 - 1/A)/{exp[N (1 - 1/A)] - 1/A}
 *
 * @param N - Overall gas transfer units; not negative.
 * @param A - Absorption factor; positive.
 * @returns (y2 - m x2)/(y1 - m x2); 1/(1 + N) at A = 1, exp(-N) for a large A.
 * Source: [Colburn1939].
 */
export function gasLeft(N: number, A: number): number {
  const d = 1 - 1 / A;
  if (d === 0) return 1 / (1 + N);
  return 1 / (Math.expm1(N * d) / d + 1);
}

/**
 * Overall liquid transfer units of a stripper.
 *
 *   NOL = ln{(1 - A) r + A}/(1 - A),  r = (x2 - y1/m)/(x1 - y1/m)
 *
 * @param r - Ratio of the driving forces at liquid inlet and outlet against the entering gas; above 1.
 * @param A - Absorption factor; positive, below 1 for a deep strip.
 * @returns NOL; r - 1 at A = 1.
 * @remarks The mirror of the absorber: A and 1/A change places. Source: [Colburn1939].
 */
export function strippingUnits(r: number, A: number): number {
  return transferUnits(r, 1 / A);
}

/** Share of the strippable solute left in the liquid after NOL units. Source: [Colburn1939]. */
export function liquidLeft(N: number, A: number): number {
  return gasLeft(N, 1 / A);
}

/**
 * Equilibrium stages.
 *
 *   n = ln{(1 - 1/A) r + 1/A}/ln A
 *
 * @param r - As in `transferUnits`.
 * @param A - Absorption factor; positive.
 * @returns Stages; r - 1 at A = 1.
 * Source: [Kremser1930], in the form of [Souders1932].
 */
export function stages(r: number, A: number): number {
  const d = 1 - 1 / A;
  if (d === 0) return r - 1;
  return Math.log1p(d * (r - 1)) / Math.log(A);
}

/**
 * Share left after equilibrium stages, clean solvent.
 *
 *   1/r = (A - 1)/(A^(n+1) - 1)
 *
 * @param n - Stages; not negative.
 * @param A - Absorption factor; positive.
 * @returns Share; 1/(1 + n) at A = 1.
 * Source: [Kremser1930].
 */
export function gasLeftAfterStages(n: number, A: number): number {
  const logA = Math.log(A);
  if (logA === 0) return 1 / (1 + n);
  return Math.expm1(logA) / Math.expm1((n + 1) * logA);
}

/**
 * Transfer units for one equilibrium stage, which is also HETP over HOG.
 *
 *   NOG/n = A ln A/(A - 1)
 *
 * @param A - Absorption factor; positive.
 * @returns Ratio; 1 at A = 1.
 * Source: quotient of the two forms above.
 */
export function unitsPerStage(A: number): number {
  const e = A - 1;
  return e === 0 ? 1 : (A * Math.log1p(e)) / e;
}

/**
 * Height of an overall gas transfer unit from those of the films.
 *
 *   HOG = HG + HL/A
 *
 * @param HG - Height of a gas-film unit, m.
 * @param HL - Height of a liquid-film unit, m.
 * @param A - Absorption factor; positive.
 * @returns Height, m.
 * Source: two films in series [Whitman1923]; [Colburn1939].
 */
export function overallUnitHeight(HG: number, HL: number, A: number): number {
  return HG + HL / A;
}
