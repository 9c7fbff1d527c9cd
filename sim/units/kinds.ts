// Kinds of quantity and the units each accepts. A kind is more than a dimension: a temperature is not
// a temperature difference, a normal volume flow is not an actual one, ppmv is not ppmw.

import {
  ATMOSPHERE,
  BTU,
  CALORIE_TH,
  CELSIUS_ZERO,
  FAHRENHEIT_ZERO,
  FOOT,
  INCH,
  INCH_WATER,
  MM_MERCURY,
  MM_WATER,
  NORMAL_MOLAR_VOLUME,
  POUND,
  PSI,
  RANKINE,
  STANDARD_MOLAR_VOLUME,
  US_GALLON,
} from './factors.ts';

/** One unit of a kind: SI value = (number + offset) x factor. */
export interface UnitEntry {
  readonly symbol: string;
  readonly factor: number;
  /** Added before the factor; 0 unless the scale has its own zero. */
  readonly offset: number;
  /** Other spellings that are accepted and never written. */
  readonly aliases: readonly string[];
}

/** What a kind is called in a sentence, an example of it, and its units, SI first. */
export interface KindEntry {
  readonly noun: string;
  readonly example: string;
  readonly units: readonly UnitEntry[];
}

function u(symbol: string, factor: number, ...aliases: string[]): UnitEntry {
  return { symbol, factor, offset: 0, aliases };
}

function scale(symbol: string, factor: number, offset: number, ...aliases: string[]): UnitEntry {
  return { symbol, factor, offset, aliases };
}

function kind(noun: string, example: string, ...units: UnitEntry[]): KindEntry {
  return { noun, example, units };
}

const MINUTE = 60;
const HOUR = 3600;
const DAY = 86_400;
const LITRE = 1e-3;
/** mol in a pound-mole: pounds in kilograms x 1000. */
const POUND_MOLE = POUND * 1000;

/**
 * Every kind. Bare Pa, kPa, bar, psi are differences of pressure only: an absolute pressure is marked
 * (a), or (g) and then read as above the standard atmosphere, 101.325 kPa.
 */
export const KINDS = {
  number: kind('a plain number', '0.5', u('1', 1, '')),
  fraction: kind('a share', '50 %', u('1', 1, ''), u('%', 0.01, 'percent')),
  time: kind(
    'a time',
    '6 min 20 s',
    u('s', 1, 'sec', 'second', 'seconds'),
    u('ms', 1e-3),
    u('min', MINUTE, 'minute', 'minutes'),
    u('h', HOUR, 'hr', 'hour', 'hours'),
    u('d', DAY, 'day', 'days'),
  ),
  temperature: kind(
    'a temperature',
    '15 degC',
    u('K', 1),
    scale('degC', 1, CELSIUS_ZERO, 'C', 'deg C', 'Celsius'),
    scale('degF', RANKINE, FAHRENHEIT_ZERO, 'F', 'deg F', 'Fahrenheit'),
    u('degR', RANKINE),
  ),
  'temperature-difference': kind(
    'a temperature difference',
    '2 K',
    u('K', 1, 'delta K'),
    u('delta degC', 1, 'delta C'),
    u('delta degF', RANKINE, 'delta F'),
  ),
  'absolute-pressure': kind(
    'an absolute or gauge pressure',
    '101.3 kPa(a)',
    u('Pa(a)', 1, 'Pa abs'),
    u('kPa(a)', 1e3, 'kPa abs', 'kPaa'),
    u('MPa(a)', 1e6, 'MPa abs'),
    u('mbar(a)', 100, 'mbar abs', 'mbara'),
    u('bar(a)', 1e5, 'bar abs', 'bara'),
    u('atm', ATMOSPHERE),
    u('mmHg(a)', MM_MERCURY, 'mmHg abs'),
    u('psi(a)', PSI, 'psia'),
    scale('Pa(g)', 1, ATMOSPHERE),
    scale('kPa(g)', 1e3, ATMOSPHERE / 1e3, 'kPag'),
    scale('mbar(g)', 100, ATMOSPHERE / 100, 'mbarg'),
    scale('bar(g)', 1e5, ATMOSPHERE / 1e5, 'barg'),
    scale('psi(g)', PSI, ATMOSPHERE / PSI, 'psig'),
    scale('inH2O(g)', INCH_WATER, ATMOSPHERE / INCH_WATER),
  ),
  'pressure-difference': kind(
    'a pressure difference',
    '2.6 kPa',
    u('Pa', 1),
    u('kPa', 1e3),
    u('MPa', 1e6),
    u('mbar', 100),
    u('bar', 1e5),
    u('mmH2O', MM_WATER),
    u('inH2O', INCH_WATER, 'inWC', 'in H2O'),
    u('mmHg', MM_MERCURY),
    u('psi', PSI),
  ),
  'pressure-gradient': kind(
    'a pressure gradient',
    '500 Pa/m',
    u('Pa/m', 1),
    u('kPa/m', 1e3),
    u('mbar/m', 100),
    u('mmH2O/m', MM_WATER),
    u('inH2O/ft', INCH_WATER / FOOT),
    u('psi/ft', PSI / FOOT),
  ),
  length: kind(
    'a length',
    '5 m',
    u('m', 1),
    u('cm', 0.01),
    u('mm', 1e-3),
    u('km', 1e3),
    u('ft', FOOT, 'feet', 'foot'),
    u('in', INCH, 'inch', 'inches'),
  ),
  area: kind('an area', '1.2 m2', u('m2', 1), u('cm2', 1e-4), u('ft2', FOOT ** 2), u('in2', INCH ** 2)),
  volume: kind(
    'a volume',
    '20 L',
    u('m3', 1),
    u('L', LITRE, 'l', 'litre', 'liter'),
    u('mL', 1e-6, 'ml'),
    u('ft3', FOOT ** 3, 'cu ft'),
    u('gal', US_GALLON, 'US gal'),
  ),
  mass: kind('a mass', '0.4 kg', u('kg', 1), u('g', 1e-3), u('mg', 1e-6), u('t', 1e3), u('lb', POUND)),
  amount: kind('an amount of substance', '10 mol', u('mol', 1), u('kmol', 1e3), u('lbmol', POUND_MOLE)),
  velocity: kind(
    'a velocity or a load per area',
    '2.1 m/s',
    u('m/s', 1),
    u('m/h', 1 / HOUR, 'm3/(m2 h)'),
    u('mm/s', 1e-3),
    u('ft/s', FOOT),
    u('ft/min', FOOT / MINUTE, 'fpm'),
    u('gal/(min ft2)', US_GALLON / MINUTE / FOOT ** 2, 'gpm/ft2'),
  ),
  'volume-flow': kind(
    'an actual volume flow',
    '8.6 m3/h',
    u('m3/s', 1),
    u('m3/min', 1 / MINUTE),
    u('m3/h', 1 / HOUR),
    u('L/s', LITRE, 'l/s'),
    u('L/min', LITRE / MINUTE, 'l/min'),
    u('L/h', LITRE / HOUR, 'l/h'),
    u('mL/min', 1e-6 / MINUTE, 'ml/min'),
    u('gal/min', US_GALLON / MINUTE, 'gpm', 'US gal/min'),
    u('gal/h', US_GALLON / HOUR, 'gph'),
    u('ft3/s', FOOT ** 3),
    u('ft3/min', FOOT ** 3 / MINUTE, 'cfm', 'acfm'),
    u('ft3/h', FOOT ** 3 / HOUR),
  ),
  'molar-flow': kind(
    'a molar or normal volume flow',
    '3870 Nm3/h',
    u('mol/s', 1),
    u('kmol/h', 1e3 / HOUR),
    u('mol/h', 1 / HOUR),
    u('Nm3/s', 1 / NORMAL_MOLAR_VOLUME),
    u('Nm3/h', 1 / NORMAL_MOLAR_VOLUME / HOUR),
    u('NL/min', LITRE / NORMAL_MOLAR_VOLUME / MINUTE, 'Nl/min'),
    u('scf/min', FOOT ** 3 / STANDARD_MOLAR_VOLUME / MINUTE, 'scfm'),
    u('scf/h', FOOT ** 3 / STANDARD_MOLAR_VOLUME / HOUR, 'scfh'),
    u('lbmol/h', POUND_MOLE / HOUR),
  ),
  'mass-flow': kind(
    'a mass flow',
    '2.4 kg/s',
    u('kg/s', 1),
    u('g/s', 1e-3),
    u('kg/min', 1 / MINUTE),
    u('kg/h', 1 / HOUR),
    u('g/h', 1e-3 / HOUR),
    u('t/h', 1e3 / HOUR),
    u('lb/s', POUND),
    u('lb/min', POUND / MINUTE),
    u('lb/h', POUND / HOUR),
  ),
  'mole-fraction': kind(
    'a mole fraction',
    '400 ppmv',
    u('mol/mol', 1, '1'),
    u('mol%', 0.01, 'mole %', 'mol %'),
    u('vol%', 0.01, 'vol %', '%v'),
    u('ppmv', 1e-6, 'ppm(v)', 'umol/mol'),
    u('ppbv', 1e-9, 'ppb(v)', 'nmol/mol'),
  ),
  'mass-fraction': kind(
    'a mass fraction',
    '50 ppmw',
    u('kg/kg', 1),
    u('wt%', 0.01, 'wt %', 'mass%', '%w'),
    u('g/kg', 1e-3),
    u('ppmw', 1e-6, 'ppm(w)', 'mg/kg'),
    u('ppbw', 1e-9, 'ppb(w)', 'ug/kg'),
  ),
  'mass-concentration': kind(
    'a mass concentration in the liquid',
    '10 ug/L',
    u('kg/m3', 1, 'g/L', 'g/l'),
    u('mg/L', 1e-3, 'mg/l', 'g/m3'),
    u('ug/L', 1e-6, 'ug/l', 'mg/m3'),
  ),
  'normal-mass-concentration': kind(
    'a mass concentration in the gas at 273.15 K and 101.325 kPa',
    '350 mg/Nm3',
    u('kg/Nm3', 1),
    u('g/Nm3', 1e-3),
    u('mg/Nm3', 1e-6),
    u('ug/Nm3', 1e-9),
  ),
  density: kind(
    'a density',
    '998 kg/m3',
    u('kg/m3', 1),
    u('g/cm3', 1e3, 'kg/L', 'g/mL'),
    u('lb/ft3', POUND / FOOT ** 3),
    u('lb/gal', POUND / US_GALLON),
  ),
  viscosity: kind(
    'a dynamic viscosity',
    '1.0 mPa s',
    u('Pa s', 1),
    u('mPa s', 1e-3, 'cP', 'cp'),
    u('uPa s', 1e-6),
    u('lb/(ft s)', POUND / FOOT),
  ),
  'surface-tension': kind('a surface tension', '72 mN/m', u('N/m', 1), u('mN/m', 1e-3, 'dyn/cm')),
  diffusivity: kind('a diffusivity', '1.2e-9 m2/s', u('m2/s', 1), u('cm2/s', 1e-4), u('ft2/h', FOOT ** 2 / HOUR)),
  'molar-mass': kind('a molar mass', '58.08 g/mol', u('kg/mol', 1), u('g/mol', 1e-3, 'kg/kmol', 'lb/lbmol')),
  'molar-volume': kind(
    'a molar volume',
    '74 cm3/mol',
    u('m3/mol', 1),
    u('cm3/mol', 1e-6, 'mL/mol'),
    u('L/mol', 1e-3, 'm3/kmol'),
  ),
  'molar-energy': kind(
    'a molar energy',
    '45.7 kJ/mol',
    u('J/mol', 1),
    u('kJ/mol', 1e3, 'MJ/kmol'),
    u('cal/mol', CALORIE_TH),
    u('kcal/mol', CALORIE_TH * 1e3),
    u('Btu/lbmol', BTU / POUND_MOLE),
  ),
  'molar-heat-capacity': kind(
    'a molar heat capacity',
    '75.3 J/(mol K)',
    u('J/(mol K)', 1, 'kJ/(kmol K)'),
    u('kJ/(mol K)', 1e3),
    u('cal/(mol K)', CALORIE_TH),
    u('Btu/(lbmol degF)', BTU / POUND_MOLE / RANKINE),
  ),
  'volumetric-heat-capacity': kind(
    'a heat capacity of a volume of solid',
    '3.8 MJ/(m3 K)',
    u('J/(m3 K)', 1),
    u('kJ/(m3 K)', 1e3),
    u('MJ/(m3 K)', 1e6),
    u('Btu/(ft3 degF)', BTU / FOOT ** 3 / RANKINE),
  ),
  conductivity: kind(
    'a thermal conductivity',
    '0.026 W/(m K)',
    u('W/(m K)', 1),
    u('mW/(m K)', 1e-3),
    u('Btu/(h ft degF)', BTU / HOUR / FOOT / RANKINE),
  ),
  'heat-transfer-coefficient': kind(
    'a heat transfer coefficient',
    '5 W/(m2 K)',
    u('W/(m2 K)', 1),
    u('kW/(m2 K)', 1e3),
    u('Btu/(h ft2 degF)', BTU / HOUR / FOOT ** 2 / RANKINE),
  ),
  'packing-area': kind('a packing area per volume', '139 m2/m3', u('m2/m3', 1, '1/m'), u('ft2/ft3', 1 / FOOT, '1/ft')),
  'packing-factor': kind('a packing factor', '92 1/m', u('1/m', 1), u('1/ft', 1 / FOOT)),
  'henry-solubility': kind(
    "a Henry solubility (amount in the liquid's volume per partial pressure)",
    '0.27 mol/(m3 Pa)',
    u('mol/(m3 Pa)', 1),
    u('mol/(L atm)', 1e3 / ATMOSPHERE, 'M/atm'),
    u('mol/(L bar)', 1e3 / 1e5, 'M/bar'),
  ),
  'volumetric-coefficient': kind(
    'a volumetric transfer coefficient on mole fractions',
    '40 mol/(m3 s)',
    u('mol/(m3 s)', 1),
    u('kmol/(m3 s)', 1e3),
    u('kmol/(m3 h)', 1e3 / HOUR),
    u('lbmol/(ft3 h)', POUND_MOLE / HOUR / FOOT ** 3),
  ),
  'volumetric-coefficient-on-pressure': kind(
    'a volumetric transfer coefficient on partial pressures',
    '4e-4 mol/(m3 s Pa)',
    u('mol/(m3 s Pa)', 1),
    u('kmol/(m3 h kPa)', 1 / HOUR),
    u('kmol/(m3 h bar)', 1e3 / HOUR / 1e5),
    u('kmol/(m3 h atm)', 1e3 / HOUR / ATMOSPHERE),
    u('lbmol/(ft3 h atm)', POUND_MOLE / HOUR / FOOT ** 3 / ATMOSPHERE),
  ),
  rate: kind('a rate per time', '0.1 1/h', u('1/s', 1), u('1/min', 1 / MINUTE), u('1/h', 1 / HOUR), u('1/d', 1 / DAY)),
} as const satisfies Record<string, KindEntry>;

/** Name of a kind of quantity. */
export type Kind = keyof typeof KINDS;

const KIND_NAMES = Object.keys(KINDS) as Kind[];

/** Symbols of the units that a kind accepts, SI first. */
export function unitsOf(of: Kind): readonly string[] {
  return KINDS[of].units.map((entry) => entry.symbol);
}

/**
 * The entry of a unit within a kind; the symbol or one of its other spellings, already normalised.
 *
 * @returns undefined when the kind does not have it.
 */
export function unitEntry(of: Kind, symbol: string): UnitEntry | undefined {
  const units: readonly UnitEntry[] = KINDS[of].units;
  return units.find((entry) => entry.symbol === symbol || entry.aliases.includes(symbol));
}

/** Kinds that know a unit, in the table's order; empty for an unknown unit. */
export function kindsWithUnit(symbol: string): readonly Kind[] {
  return KIND_NAMES.filter((name) => unitEntry(name, symbol) !== undefined);
}
