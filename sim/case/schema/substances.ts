// Schema of what flows: solvent, carrier, solutes. Each is a name from the library, a library entry with
// some numbers replaced ("base"), or a whole substance of the user's own.

import * as v from 'valibot';

import type { Kind } from '../../units.ts';
import { choice, group, maybe, number, quantity, text } from './primitives.ts';
import type { Range } from './primitives.ts';

/** A property over temperature: one value, points, or a library substance's function. */
function curve(kind: Kind, description: string) {
  return v.union([
    quantity(kind, { above: 0 }, description),
    group({
      temperature: v.array(quantity('temperature', { above: 0 })),
      value: v.array(quantity(kind, { above: 0 })),
      interpolation: maybe(choice(['linear', 'log'], 'log: straight in ln(value) against 1/T')),
    }),
    group({ library: text('a library substance whose function is taken', 'water') }),
  ]);
}

/** An own solvent, or what replaces a library one's. */
const solventEntries = {
  base: maybe(text('the library solvent that the numbers here replace', 'water')),
  id: maybe(text('a short name')),
  name: maybe(text('a name for people')),
  molarMass: maybe(quantity('molar-mass', { above: 0, max: 2 })),
  density: maybe(curve('density', 'of the liquid')),
  viscosity: maybe(curve('viscosity', 'of the liquid')),
  surfaceTension: maybe(curve('surface-tension', 'of the liquid')),
  heatCapacity: maybe(curve('molar-heat-capacity', 'of the liquid')),
  vapourPressure: maybe(v.union([v.literal('none'), curve('pressure-difference', 'vapour pressure')])),
  vapourHeatCapacity: maybe(curve('molar-heat-capacity', 'of the vapour')),
  association: maybe(number({ above: 0, max: 5 }, 'association factor of Wilke and Chang')),
  diffusionVolume: maybe(number({ above: 0 }, "diffusion volume of the vapour (Fuller), cm3/mol's number")),
};

/** An own carrier, or what replaces a library one's. */
const carrierEntries = {
  base: maybe(text('the library carrier that the numbers here replace', 'air')),
  id: maybe(text('a short name')),
  name: maybe(text('a name for people')),
  molarMass: maybe(quantity('molar-mass', { above: 0, max: 1 })),
  viscosity: maybe(curve('viscosity', 'of the gas')),
  heatCapacity: maybe(curve('molar-heat-capacity', 'of the gas')),
  conductivity: maybe(curve('conductivity', 'of the gas')),
  diffusionVolume: maybe(number({ above: 0 }, "diffusion volume (Fuller), cm3/mol's number")),
};

const POSITIVE: Range = { above: 0 };
const antoine = group({
  A: number({}, 'A of ln(p/Pa) = A - B/(T/K + C)'),
  B: number(POSITIVE, 'B of ln(p/Pa) = A - B/(T/K + C)'),
  C: number({}, 'C of ln(p/Pa) = A - B/(T/K + C)'),
});
const henry = {
  solubility: quantity('henry-solubility', POSITIVE, 'at 298.15 K'),
  temperatureFactor: quantity('temperature-difference', { min: 0, max: 20_000 }, 'd ln H / d(1/T)'),
};
const vanLaar = {
  A12: number({ above: 0, max: 20 }, 'solute at infinite dilution'),
  A21: number({ above: 0, max: 20 }, 'solvent at infinite dilution'),
};

/** How a solute's partial pressure over the liquid is found. */
export const equilibrium = v.variant('model', [
  group({
    model: v.literal('henry'),
    solubility: maybe(henry.solubility),
    temperatureFactor: maybe(henry.temperatureFactor),
  }),
  group({
    model: v.literal('henry-van-laar'),
    solubility: maybe(henry.solubility),
    temperatureFactor: maybe(henry.temperatureFactor),
    A12: maybe(vanLaar.A12),
    A21: maybe(vanLaar.A21),
  }),
  group({
    model: v.literal('van-laar'),
    A12: maybe(vanLaar.A12),
    A21: maybe(vanLaar.A21),
    vapourPressure: maybe(antoine),
  }),
  group({ model: v.literal('raoult'), vapourPressure: maybe(antoine) }),
  group({ model: v.literal('constant-ratio'), m: number({ min: 0, max: 1e6 }, 'm of y* = m x') }),
  group({
    model: v.literal('table'),
    file: maybe(text('CSV file with the columns temperature, liquid strength and partial pressure', 'equilibrium.csv')),
    temperature: maybe(v.array(quantity('temperature', POSITIVE))),
    moleFraction: maybe(v.array(quantity('mole-fraction', { min: 0, max: 1 }))),
    pressure: maybe(v.array(v.array(quantity('pressure-difference', { min: 0 })))),
  }),
]);

/** An own solute, or what replaces a library one's. */
const soluteEntries = {
  base: maybe(text('the library solute that the numbers here replace', 'acetone')),
  id: maybe(text('a short name; the composition uses it')),
  name: maybe(text('a name for people')),
  molarMass: maybe(quantity('molar-mass', { above: 0, max: 2 })),
  vapourHeatCapacity: maybe(curve('molar-heat-capacity', 'of the vapour')),
  heatCapacity: maybe(quantity('molar-heat-capacity', POSITIVE, 'dissolved')),
  molarVolume: maybe(quantity('molar-volume', POSITIVE, 'partial molar volume in the solvent')),
  liquidDiffusivity: maybe(
    v.union([
      v.literal('correlation'),
      group({ value: quantity('diffusivity', POSITIVE), temperature: quantity('temperature', POSITIVE) }),
    ]),
  ),
  boilingVolume: maybe(number(POSITIVE, "molar volume at the boiling point (Wilke and Chang), cm3/mol's number")),
  gasDiffusivity: maybe(
    v.union([
      v.literal('correlation'),
      group({
        value: quantity('diffusivity', POSITIVE),
        temperature: quantity('temperature', POSITIVE),
        pressure: quantity('absolute-pressure', POSITIVE),
      }),
    ]),
  ),
  diffusionVolume: maybe(number(POSITIVE, "diffusion volume (Fuller), cm3/mol's number")),
  equilibrium: maybe(equilibrium),
  heatOfAbsorption: maybe(
    v.union([v.literal('from equilibrium'), quantity('molar-energy', { min: 0 }, 'given off on absorption')]),
  ),
};

export const solventSchema = v.union([text('a library solvent', 'water'), group(solventEntries)]);
export const carrierSchema = v.union([text('a library carrier', 'air'), group(carrierEntries)]);
export const soluteSchema = v.union([text('a library solute', 'acetone'), group(soluteEntries)]);
export type SolventText = v.InferOutput<typeof solventSchema>;
export type CarrierText = v.InferOutput<typeof carrierSchema>;
export type SoluteText = v.InferOutput<typeof soluteSchema>;
export type EquilibriumText = v.InferOutput<typeof equilibrium>;
