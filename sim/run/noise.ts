/**
 * Measurement noise with a correlation time: a first-order autoregressive sequence at fixed knots, straight between
 * them, so that a signal stays continuous and an alarm's crossing can be located. Seeded: same seed, same noise.
 */

/** Knots in one correlation time. */
const KNOTS_PER_TIME = 4;
/** Closest knots, s. */
const LEAST_SPACING = 0.25;

export interface Noise {
  /** Distance of the knots, s. */ readonly spacing: number;
  /** Value at t >= 0 (the value at 0 before). */ at(t: number): number;
}

/** 32-bit mixing generator (a counter through an avalanche of xor-shifts and multiplications); uniform in (0, 1). */
function uniformSource(seed: number): () => number {
  let counter = seed >>> 0;
  return () => {
    counter = (counter + 0x9e3779b9) >>> 0;
    let z = counter;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    z = (z ^ (z >>> 16)) >>> 0;
    return (z + 0.5) / 4294967296;
  };
}

/**
 * @param sigma - Standard deviation.
 * @param correlationTime - s, positive.
 * @param seed - Integer; instruments of one run take different ones.
 * @remarks Stationary from the first knot. Normal variates by Box and Muller (1958).
 */
export function createNoise(sigma: number, correlationTime: number, seed: number): Noise {
  const spacing = Math.max(correlationTime / KNOTS_PER_TIME, LEAST_SPACING);
  const rho = Math.exp(-spacing / correlationTime);
  const fresh = Math.sqrt(1 - rho * rho);
  const uniform = uniformSource(seed);
  const normal = (): number => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
  const knots: number[] = [normal()];
  const knot = (k: number): number => {
    while (knots.length <= k) knots.push(rho * knots[knots.length - 1] + fresh * normal());
    return knots[k];
  };
  return {
    spacing,
    at(t) {
      const u = Math.max(0, t / spacing);
      const k = Math.floor(u);
      const a = knot(k);
      return sigma * (a + (knot(k + 1) - a) * (u - k));
    },
  };
}
