// Every value that a case may leave out, with its origin and mark. A default marked `judgement` or
// `from memory` is a starting point to be replaced by site data, and is shown as such.

import type { Default } from './reading.ts';

const JUDGEMENT = 'engineering judgement, no source';

function judged<T>(value: T, source = JUDGEMENT): Default<T> {
  return { value, source, verified: 'judgement' };
}

function seen<T>(value: T, source: string): Default<T> {
  return { value, source, verified: 'seen' };
}

function remembered<T>(value: T, source: string): Default<T> {
  return { value, source, verified: 'from memory' };
}

/** Column. SI; shares 0..1. */
export const COLUMN = {
  topPressure: judged(101_325, 'standard atmosphere [CGPM1954]'),
  segments: {
    value: 40,
    source: 'steady outlet within 0.02 % of the closed form [Colburn1939] up to NOG 12, computed',
    verified: 'computed',
  } satisfies Default<number>,
  /** Liquid held by a redistributor, as seconds of the design rate. */
  redistributorSeconds: judged(8),
  hydraulics: judged('stichlmair-bravo-fair' as const, '[Stichlmair1989]; choice of the program'),
  holdupFactor: seen(0.555, '[Stichlmair1989] equation for the hold-up below loading'),
  loadingFactor: seen(20, '[Stichlmair1989] equation for the hold-up above loading'),
  staticHoldup: remembered(undefined, '[Engel2001]'),
  transfer: judged('onda' as const, '[Onda1968]; choice of the program'),
  kLFactor: remembered(0.0051, '[Onda1968]'),
  kGFactor: remembered(undefined, '[Onda1968]: 5.23, or 2.00 below 15 mm'),
  areaFactor: remembered(1.45, '[Onda1968]'),
  scale: judged(1, 'the correlation as published'),
  measuredExponent: judged(0, 'coefficient taken as constant'),
  deflooding: judged(0.9),
  transferLeft: judged(0.2),
  fullShare: judged(0.95),
  staticAreaShare: judged(0.1),
  heatLoss: judged(0, 'insulated shell'),
  ambientTemperature: judged(293.15),
  isothermal: judged(false, 'heat balance on'),
  evaporation: judged(true, 'solvent evaporates and condenses'),
} as const;

/** Gas supply. */
export const GAS = {
  humidity: judged(0, 'dry gas'),
  composition: judged(0, 'solute absent'),
  lag: judged(3),
  coastDown: judged(30),
  runUp: judged(10),
  inletValveTag: judged('HV-1', 'name given by the program'),
  /** About 1 s for each inch of bore; a 20 cm damper. */
  stroke: judged(8, 'about 1 s for each inch of bore, practitioners rule'),
} as const;

/** Liquid supply. */
export const LIQUID = {
  composition: judged(0, 'solute absent'),
  staticHeadShare: judged(0.5),
  coastDown: judged(0.6, 'inertia of a small motor pump, judgement'),
  runUp: judged(1.5),
  minimumLevel: judged(0.15),
  valveTag: judged('FV-1', 'name given by the program'),
  stroke: judged(5, 'about 1 s for each inch of bore, practitioners rule'),
  drainStroke: judged(2),
  /** Liquid held by the distributor, as seconds of the design rate. */
  distributorSeconds: judged(8),
  /** Sump cross-section over the column's. */
  sumpAreaShare: judged(1, "the column's own cross-section"),
  normalLevel: judged(0.6),
  /** Overflow over normal level. */
  overflowShare: judged(2),
  drainTag: judged('LV-1', 'name given by the program'),
  /** Valve fully open over the design rate. */
  capacityShare: judged(2),
} as const;

/** Instruments, by what is measured. Lags in s. */
export const INSTRUMENT = {
  lag: {
    strength: judged(15, 'analyser, judgement'),
    flow: judged(0.5),
    pressure: judged(1),
    level: judged(1),
    temperature: judged(12, 'thermowell, judgement'),
    other: judged(0),
  },
  deadTime: judged(0, 'none stated'),
  bias: judged(0, 'none stated'),
  drift: judged(0, 'none stated'),
  correlationTime: judged(5),
} as const;

/**
 * Alarms. Deadband as share of the instrument's range by signal: the widely repeated starting table of
 * [ISA18.2]; compute it from noise and transient where it matters.
 */
export const ALARM = {
  deadband: {
    strength: judged(0.05),
    flow: remembered(0.05, '[ISA18.2] starting table'),
    level: remembered(0.05, '[ISA18.2] starting table'),
    pressure: remembered(0.02, '[ISA18.2] starting table'),
    temperature: remembered(0.01, '[ISA18.2] starting table'),
    other: judged(0),
  },
  noRangeDeadband: judged(0, 'instrument without a range'),
  onDelay: judged(0, 'none stated'),
  offDelay: judged(0, 'none stated'),
  priority: judged('medium' as const),
} as const;

/** Interlocks, controllers, limits. */
export const CONTROL = {
  votes: judged(1, 'any one condition'),
  delay: judged(0, 'none stated'),
  outputRange: judged([0, 1] as readonly [number, number], 'whole travel'),
  mode: judged('automatic' as const),
  manualOutput: judged(0.5),
  averaging: judged({ kind: 'none' } as const, 'at any time'),
  basis: judged('wet' as const, 'as the gas is'),
} as const;

/** Scenarios. */
export const SCENARIO = {
  initial: judged('steady' as const),
  interlocks: judged('all' as const),
} as const;

/** Settings of a run. */
export const RUN = {
  rtol: judged(1e-5, 'own measurements: 1e-4 was visibly off after a trip and restart'),
  method: judged('default', 'choice of the program'),
  axialScheme: judged('exponential' as const, 'exact for a linear counter-current bed'),
  recordEvery: judged(10),
  maxSteps: judged(200_000),
  seed: judged(1),
  noise: judged(false),
} as const;
