// Solvent, carrier and solutes: the library's entry, the case's own numbers over it, or a whole own one.

import { CARRIERS, steam } from '../../properties/library/carriers.ts';
import { SOLUTES } from '../../properties/library/solutes.ts';
import type { Solute as LibrarySolute } from '../../properties/library/solutes.ts';
import { SOLVENTS } from '../../properties/library/solvents.ts';
import { idealGasHeatCapacity } from '../../properties/ideal-gas.ts';
import type { Sourced } from '../../properties/provenance.ts';
import type { Carrier, Curve, Solute, Solvent } from '../case.ts';
import { join } from '../issues.ts';
import type { Default, Reading } from '../reading.ts';
import type { CarrierText, SoluteText, SolventText } from '../schema/substances.ts';
import type { CurveProperty, CurveText } from './curves.ts';
import { readCurve } from './curves.ts';
import { readEquilibrium } from './equilibrium.ts';
import { listed } from './listed.ts';
import { origin } from './origin.ts';

/** Fuller's volume of an oil's vapour stands for C18H38, 18 x 15.9 + 38 x 2.31 [Fuller1969]. */
const OIL_DIFFUSION_VOLUME = 374;
/** J/(mol K); vapour of an involatile oil never counts. */
const OIL_VAPOUR_HEAT_CAPACITY = 400;

/** The solvent, or undefined after noting why not. */
export function readSolvent(reading: Reading, given: SolventText): Solvent | undefined {
  const path = 'solvent';
  const own = typeof given === 'string' ? { base: given } : given;
  const base = listed(SOLVENTS, own.base);
  if (own.base !== undefined && base === undefined) {
    reading.unknown(
      typeof given === 'string' ? path : join(path, 'base'),
      'a library solvent',
      own.base,
      Object.keys(SOLVENTS),
    );
    return undefined;
  }
  const take = taker(reading, path, base !== undefined);
  const curve = curveTaker(reading, path, base !== undefined);
  const from = (property: CurveProperty, key: string): Default<Curve> | undefined =>
    base === undefined
      ? undefined
      : {
          value: { kind: 'library', id: `${base.id}.${property}` },
          ...origin(base.provenance[key] ?? base.provenance['liquid']),
        };
  const isWater = base?.id === 'water';
  const source = base === undefined ? undefined : `library solvent ${base.id}`;
  const molarMass = take('molarMass', own.molarMass, plain(base?.molarMass, source));
  const density = curve('density', own.density, from('density', 'density'), 'density');
  const viscosity = curve('viscosity', own.viscosity, from('viscosity', 'viscosity'), 'viscosity');
  const surfaceTension = curve(
    'surfaceTension',
    own.surfaceTension,
    from('surface-tension', 'surfaceTension'),
    'surface-tension',
  );
  const heatCapacity = curve(
    'heatCapacity',
    own.heatCapacity,
    from('molar-heat-capacity', 'heatCapacity'),
    'molar-heat-capacity',
  );
  const vapourHeatCapacity = curve(
    'vapourHeatCapacity',
    own.vapourHeatCapacity,
    isWater
      ? { value: { kind: 'library', id: 'steam.molar-heat-capacity' }, ...origin(steam.heatCapacity) }
      : plain<Curve>({ kind: 'constant', value: OIL_VAPOUR_HEAT_CAPACITY }, 'placeholder of an involatile solvent'),
    'molar-heat-capacity',
  );
  const association = take('association', own.association, plain(base?.association ?? 1, '[Wilke1955]'));
  const diffusionVolume = take(
    'diffusionVolume',
    own.diffusionVolume,
    isWater
      ? sourced(steam.diffusionVolume)
      : plain(base === undefined ? undefined : OIL_DIFFUSION_VOLUME, 'C18H38 by [Fuller1969]'),
  );
  const vapourPressure =
    own.vapourPressure === 'none'
      ? undefined
      : own.vapourPressure === undefined
        ? base?.volatile === true
          ? from('vapour-pressure', 'saturation')?.value
          : undefined
        : readCurve(reading, join(path, 'vapourPressure'), own.vapourPressure, 'vapour-pressure');
  if (
    molarMass === undefined ||
    density === undefined ||
    viscosity === undefined ||
    surfaceTension === undefined ||
    heatCapacity === undefined ||
    vapourHeatCapacity === undefined ||
    association === undefined ||
    diffusionVolume === undefined
  ) {
    return undefined;
  }
  const id = own.id ?? base?.id ?? 'own-solvent';
  return {
    id,
    name: own.name ?? base?.name ?? id,
    molarMass,
    density,
    viscosity,
    surfaceTension,
    heatCapacity,
    vapourPressure,
    vapourHeatCapacity,
    association,
    diffusionVolume,
  };
}

/** The carrier, or undefined after noting why not. */
export function readCarrier(reading: Reading, given: CarrierText): Carrier | undefined {
  const path = 'carrier';
  const own = typeof given === 'string' ? { base: given } : given;
  const base = listed(CARRIERS, own.base);
  if (own.base !== undefined && base === undefined) {
    reading.unknown(
      typeof given === 'string' ? path : join(path, 'base'),
      'a library carrier',
      own.base,
      Object.keys(CARRIERS),
    );
    return undefined;
  }
  const take = taker(reading, path, base !== undefined);
  const curve = curveTaker(reading, path, base !== undefined);
  const from = (property: CurveProperty, entry: Sourced<unknown> | undefined): Default<Curve> | undefined =>
    base === undefined ? undefined : { value: { kind: 'library', id: `${base.id}.${property}` }, ...origin(entry) };
  const molarMass = take('molarMass', own.molarMass, sourced(base?.molarMass));
  const viscosity = curve('viscosity', own.viscosity, from('viscosity', base?.viscosity), 'viscosity');
  const heatCapacity = curve(
    'heatCapacity',
    own.heatCapacity,
    from('molar-heat-capacity', base?.heatCapacity),
    'molar-heat-capacity',
  );
  const conductivity = curve(
    'conductivity',
    own.conductivity,
    from('conductivity', base?.thermalConductivity),
    'conductivity',
  );
  const diffusionVolume = take('diffusionVolume', own.diffusionVolume, sourced(base?.diffusionVolume));
  if (
    molarMass === undefined ||
    viscosity === undefined ||
    heatCapacity === undefined ||
    conductivity === undefined ||
    diffusionVolume === undefined
  ) {
    return undefined;
  }
  const id = own.id ?? base?.id ?? 'own-carrier';
  return { id, name: own.name ?? base?.name ?? id, molarMass, viscosity, heatCapacity, conductivity, diffusionVolume };
}

/** One solute, or undefined after noting why not. */
export function readSolute(reading: Reading, path: string, given: SoluteText, solventId: string): Solute | undefined {
  const own = typeof given === 'string' ? { base: given } : given;
  const base = listed(SOLUTES, own.base);
  if (own.base !== undefined && base === undefined) {
    reading.unknown(
      typeof given === 'string' ? path : join(path, 'base'),
      'a library solute',
      own.base,
      Object.keys(SOLUTES),
    );
    return undefined;
  }
  const take = taker(reading, path, base !== undefined);
  const curve = curveTaker(reading, path, base !== undefined);
  const molarMass = take('molarMass', own.molarMass, sourced(base?.molarMass));
  const vapourHeatCapacity = curve(
    'vapourHeatCapacity',
    own.vapourHeatCapacity,
    vapourCurve(base),
    'molar-heat-capacity',
  );
  const heatCapacity = take('heatCapacity', own.heatCapacity, sourced(base?.liquidHeatCapacity));
  const molarVolume = take('molarVolume', own.molarVolume, sourced(base?.liquidVolume));
  const boilingVolume = take('boilingVolume', own.boilingVolume, sourced(base?.boilingVolume, 1e6));
  const diffusionVolume = take('diffusionVolume', own.diffusionVolume, sourced(base?.diffusionVolume));
  const equilibrium = readEquilibrium(reading, join(path, 'equilibrium'), own.equilibrium, base, solventId);
  const liquidDiffusivity = liquidDiffusivityOf(reading, path, own.liquidDiffusivity, base, solventId);
  if (
    molarMass === undefined ||
    vapourHeatCapacity === undefined ||
    heatCapacity === undefined ||
    molarVolume === undefined ||
    boilingVolume === undefined ||
    diffusionVolume === undefined ||
    equilibrium === undefined
  ) {
    return undefined;
  }
  const id = own.id ?? base?.id ?? `solute-${path.replace(/\D/g, '')}`;
  return {
    id,
    name: own.name ?? base?.name ?? id,
    molarMass,
    vapourHeatCapacity,
    heatCapacity,
    molarVolume,
    liquidDiffusivity,
    boilingVolume,
    gasDiffusivity: own.gasDiffusivity === 'correlation' ? undefined : own.gasDiffusivity,
    diffusionVolume,
    equilibrium,
    heatOfAbsorption: own.heatOfAbsorption === 'from equilibrium' ? undefined : own.heatOfAbsorption,
  };
}

/** K at which the library lists diffusivities in water. */
const DIFFUSIVITY_TEMPERATURE = 298.15;
const WILKE_CHANG = { source: '[Wilke1955]', verified: 'from memory' } as const;

function liquidDiffusivityOf(
  reading: Reading,
  path: string,
  given: 'correlation' | { readonly value: number; readonly temperature: number } | undefined,
  base: LibrarySolute | undefined,
  solventId: string,
): Solute['liquidDiffusivity'] {
  const key = join(path, 'liquidDiffusivity');
  if (given === 'correlation') return undefined;
  if (given !== undefined) {
    reading.stated(key);
    return given;
  }
  const inWater = solventId === 'water' ? base?.diffusivityInWater : undefined;
  const elsewhere = listed(base?.liquidDiffusivity ?? {}, solventId);
  const known = inWater ?? elsewhere;
  const { source, verified } = known === undefined ? WILKE_CHANG : origin(known);
  reading.taken(key, source, verified);
  if (inWater !== undefined) return { value: inWater.value, temperature: DIFFUSIVITY_TEMPERATURE };
  return elsewhere === undefined ? undefined : { value: elsewhere.value.D, temperature: elsewhere.value.T };
}

/** Points every 10 K of the library's polynomial; straight lines between them are within 1e-4. */
function vapourCurve(base: LibrarySolute | undefined): Default<Curve> | undefined {
  if (base === undefined) return undefined;
  const temperature = Array.from({ length: 16 }, (_, i) => 253.15 + 10 * i);
  const value = temperature.map((T) => idealGasHeatCapacity(base.gasHeatCapacity.value, T));
  return {
    value: { kind: 'points', temperature, value, interpolation: 'linear' },
    ...origin(base.gasHeatCapacity),
  };
}

function sourced(entry: Sourced | undefined, factor = 1): Default<number> | undefined {
  return entry === undefined ? undefined : { value: entry.value * factor, ...origin(entry) };
}

function plain<T>(value: T | undefined, source: string | undefined): Default<T> | undefined {
  return value === undefined ? undefined : { value, source: source ?? 'library', verified: 'judgement' };
}

/** Takes the case's number, else the library's, else notes that it is missing. */
function taker(reading: Reading, path: string, hasBase: boolean) {
  return <T>(key: string, given: T | undefined, fallback: Default<T> | undefined): T | undefined => {
    const where = join(path, key);
    if (given === undefined && fallback === undefined) {
      reading.object(
        'missing',
        where,
        'a value',
        'nothing',
        hasBase ? 'the library has none' : 'without "base" every number is needed',
      );
      return undefined;
    }
    return fallback === undefined ? given : reading.fill(where, given, fallback);
  };
}

function curveTaker(reading: Reading, path: string, hasBase: boolean) {
  const take = taker(reading, path, hasBase);
  return (
    key: string,
    given: CurveText | undefined,
    fallback: Default<Curve> | undefined,
    property: CurveProperty,
  ): Curve | undefined => {
    if (given === undefined) return take<Curve>(key, undefined, fallback);
    reading.stated(join(path, key));
    return readCurve(reading, join(path, key), given, property);
  };
}
