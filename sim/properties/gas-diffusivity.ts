// Binary diffusivity in a dilute gas and the diffusion volumes it needs.

/** Atomic diffusion volumes, dimensionless, [Fuller1969] as restated in [Poling2001] table 11-1. */
const ATOMIC_DIFFUSION_VOLUMES: Readonly<Record<string, number>> = {
  C: 15.9,
  H: 2.31,
  O: 6.11,
  N: 4.54,
  F: 14.7,
  Cl: 21.0,
  S: 22.9,
};

/** Taken off once for each aromatic or heterocyclic ring, [Fuller1969]. */
const RING_DECREMENT = 18.3;

/** Sum of atomic diffusion volumes: the molecule's atoms, less the decrement for each ring. */
export function diffusionVolume(atoms: Readonly<Record<string, number>>, rings = 0): number {
  let sum = -RING_DECREMENT * rings;
  for (const [element, count] of Object.entries(atoms)) {
    sum += (ATOMIC_DIFFUSION_VOLUMES[element] ?? Number.NaN) * count;
  }
  return sum;
}

/**
 * Gas diffusivity by Fuller, Schettler and Giddings.
 *
 *   D / (cm2/s) = 1.00e-3 T^1.75 (1/M1 + 1/M2)^(1/2) / {p [v1^(1/3) + v2^(1/3)]^2}, M in g/mol, p in atm
 *
 * @param T - Temperature, K; scalar.
 * @param p - Pressure, Pa; scalar.
 * @param M1 - Molar mass of the solute, kg/mol.
 * @param M2 - Molar mass of the carrier, kg/mol.
 * @param v1 - Diffusion volume of the solute; dimensionless, 1969 set.
 * @param v2 - Diffusion volume of the carrier; the same set, never mixed with that of 1966.
 * @returns Diffusivity, m2/s.
 * @remarks Range: dilute gases to about 10 bar. Error: 4-5 % on average, 10-20 % for polar pairs.
 *   D goes as T^1.75/p: sample once and scale.
 * Source: [Fuller1966], volumes of [Fuller1969]. Departs: SI units. The constant 0.00143
 *   with p in bar of [Poling2001] gives 0.2 % less.
 */
export function fullerDiffusivity(T: number, p: number, M1: number, M2: number, v1: number, v2: number): number {
  const size = Math.cbrt(v1) + Math.cbrt(v2);
  const power = Math.exp(1.75 * Math.log(T));
  const atmospheres = p / 101_325;
  return (1e-4 * 1e-3 * power * Math.sqrt(1e-3 / M1 + 1e-3 / M2)) / (atmospheres * size * size);
}
