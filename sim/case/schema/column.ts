// Schema of the column: shell, beds and their packing, hydraulics, transfer, flooding.

import * as v from 'valibot';

import { count, group, maybe, number, quantity, text, yesNo } from './primitives.ts';
import type { Range } from './primitives.ts';

const POSITIVE: Range = { above: 0 };
const SHARE: Range = { min: 0, max: 1 };
const FACTOR: Range = { above: 0, max: 100 };

/** An own packing, or what replaces a library one's. */
const packingEntries = {
  base: maybe(text('the library packing that the numbers here replace', 'PR-MET-35')),
  id: maybe(text('a short name')),
  shape: maybe(text('a generic shape, such as "Pall ring"')),
  material: maybe(text('a material, such as "metal"')),
  nominalSize: maybe(quantity('length', { above: 0, max: 0.5 })),
  area: maybe(quantity('packing-area', { above: 0, max: 2000 })),
  voidFraction: maybe(quantity('fraction', { above: 0, below: 1 })),
  packingFactor: maybe(quantity('packing-factor', POSITIVE)),
  friction: maybe(
    group({
      C1: maybe(number({ min: 0 }, 'C1 of Stichlmair, Bravo and Fair')),
      C2: maybe(number({ min: 0 }, 'C2 of Stichlmair, Bravo and Fair')),
      C3: maybe(number({ min: 0 }, 'C3 of Stichlmair, Bravo and Fair')),
    }),
  ),
  billet: maybe(
    group({
      CL: maybe(number(POSITIVE, 'liquid film')),
      CV: maybe(number(POSITIVE, 'gas film')),
      Ch: maybe(number(POSITIVE, 'hold-up')),
      Cp0: maybe(number(POSITIVE, 'pressure drop')),
      CS: maybe(number(POSITIVE, 'loading')),
      CFl: maybe(number(POSITIVE, 'flooding')),
    }),
  ),
  criticalSurfaceTension: maybe(quantity('surface-tension', POSITIVE)),
  solidHeatCapacity: maybe(quantity('volumetric-heat-capacity', POSITIVE)),
};

const packing = v.union([text('a library packing', 'PR-MET-35'), group(packingEntries)]);

const bed = group({
  packing,
  height: quantity('length', { above: 0, max: 100 }, 'packed height'),
  segments: maybe(count(3, 400, 'segments of this bed')),
  redistributorVolume: maybe(quantity('volume', { above: 0, max: 100 }, 'liquid held above this bed')),
});

const staticHoldup = maybe(
  v.union([v.literal('correlation'), quantity('fraction', { min: 0, max: 0.3 }, 'static hold-up')]),
);
const hydraulics = v.variant('model', [
  group({
    model: v.literal('stichlmair-bravo-fair'),
    holdupFactor: maybe(number(FACTOR, '0.555 in h0 = 0.555 Fr^(1/3)')),
    loadingFactor: maybe(number({ min: 0, max: 1000 }, '20 in 1 + 20 (dp/(rho g dz))^2')),
    staticHoldup,
  }),
  group({ model: v.literal('billet-schultes'), staticHoldup }),
  group({
    model: v.literal('power-law'),
    k: quantity('velocity', { above: 0 }, 'k of u = k h^n'),
    n: number({ min: 1, max: 10 }, 'n of u = k h^n'),
  }),
  group({ model: v.literal('prescribed'), holdup: quantity('fraction', { above: 0, below: 1 }, 'hold-up') }),
]);

const scales = {
  scaleArea: maybe(number(FACTOR, 'multiplies the wetted area')),
  scaleKL: maybe(number(FACTOR, 'multiplies the liquid film coefficient')),
  scaleKG: maybe(number(FACTOR, 'multiplies the gas film coefficient')),
};
const transfer = v.variant('model', [
  group({
    model: v.literal('onda'),
    kLFactor: maybe(number({ above: 0, max: 1 }, '0.0051 in the liquid film equation')),
    kGFactor: maybe(number(FACTOR, '5.23 (2.00 below 15 mm) in the gas film equation')),
    areaFactor: maybe(number(FACTOR, '1.45 in the wetted area equation')),
    ...scales,
  }),
  group({ model: v.literal('billet-schultes'), ...scales }),
  group({
    model: v.literal('measured'),
    NOG: maybe(number({ above: 0, max: 1000 }, 'overall gas units of the whole packed height, design rates')),
    HOG: maybe(quantity('length', POSITIVE, 'height of an overall gas unit, design rates')),
    KGa: maybe(quantity('volumetric-coefficient-on-pressure', POSITIVE)),
    Kya: maybe(quantity('volumetric-coefficient', POSITIVE)),
    HG: maybe(quantity('length', POSITIVE, 'height of a gas film unit')),
    HL: maybe(quantity('length', POSITIVE, 'height of a liquid film unit')),
    gasExponent: maybe(number({ min: -2, max: 2 }, 'of the coefficient on the gas rate')),
    liquidExponent: maybe(number({ min: -2, max: 2 }, 'of the coefficient on the liquid rate')),
  }),
]);

export const columnSchema = group({
  diameter: quantity('length', { above: 0, max: 30 }, 'inside'),
  shellHeight: maybe(quantity('length', { above: 0, max: 200 }, 'tangent height')),
  topPressure: maybe(quantity('absolute-pressure', { above: 1e3, max: 1e7 }, 'at the top of the bed')),
  beds: v.pipe(v.array(bed), v.minLength(1, 'at least one bed'), v.maxLength(20, 'at most 20 beds')),
  hydraulics: maybe(hydraulics),
  transfer: maybe(transfer),
  flooding: maybe(
    group({
      deflooding: maybe(
        quantity('fraction', { above: 0, max: 1 }, 'share of the flooding velocity at which a flooded bed recovers'),
      ),
      transferLeft: maybe(quantity('fraction', SHARE, 'share of the transfer left in a flooded segment')),
      fullShare: maybe(quantity('fraction', { above: 0, max: 1 }, 'largest share of the voids that liquid fills')),
    }),
  ),
  staticAreaShare: maybe(quantity('fraction', SHARE, 'share of the packing area that a drained film keeps')),
  heatLoss: maybe(group({ coefficient: quantity('heat-transfer-coefficient', { min: 0, max: 1000 }, 'of the shell') })),
  ambientTemperature: maybe(quantity('temperature', { min: 200, max: 350 })),
  distribution: maybe(
    group({
      areaShare: quantity('fraction', { above: 0, below: 1 }, 'share of the cross-section in the first zone'),
      liquidShare: quantity('fraction', SHARE, 'share of the liquid that the first zone gets'),
    }),
  ),
  axialMixing: maybe(
    group({
      gas: maybe(number(POSITIVE, "Peclet number on each bed's height")),
      liquid: maybe(number(POSITIVE, "Peclet number on each bed's height")),
    }),
  ),
  isothermal: maybe(yesNo('no heat balance')),
  evaporation: maybe(yesNo('the solvent evaporates and condenses')),
});

export const packingSchema = packing;
export type ColumnText = v.InferOutput<typeof columnSchema>;
export type PackingText = v.InferOutput<typeof packingSchema>;
export type TransferText = NonNullable<ColumnText['transfer']>;
