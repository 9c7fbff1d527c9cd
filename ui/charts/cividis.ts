/**
 * The colour scale of maps: cividis, made for eyes with and without a colour-vision deficiency.
 * Source: Nunez, Anderton, Renslow, PLoS ONE 13 (2018) e0199239; eighteen stops as plotly.js publishes them.
 */
const STOPS: readonly (readonly [number, number, number])[] = [
  [0, 32, 76],
  [0, 42, 102],
  [0, 52, 110],
  [39, 63, 108],
  [60, 74, 107],
  [76, 85, 107],
  [91, 95, 109],
  [104, 106, 112],
  [117, 117, 117],
  [131, 129, 120],
  [146, 140, 120],
  [161, 152, 118],
  [176, 165, 114],
  [192, 177, 109],
  [209, 191, 102],
  [225, 204, 92],
  [243, 219, 79],
  [255, 233, 69],
];

/** Colour of a share 0..1 (held within) as CSS text. */
export function cividis(share: number): string {
  const at = Math.min(Math.max(share, 0), 1) * (STOPS.length - 1);
  const k = Math.min(Math.floor(at), STOPS.length - 2);
  const low = STOPS[k] ?? [0, 0, 0];
  const high = STOPS[k + 1] ?? low;
  const mix = low.map((v, i) => Math.round(v + (at - k) * ((high[i] ?? v) - v)));
  return `rgb(${mix.join(',')})`;
}

/** The scale as plotly takes it. */
export const CIVIDIS: [number, string][] = STOPS.map((stop, k) => [k / (STOPS.length - 1), `rgb(${stop.join(',')})`]);
