/**
 * The checked, complete case: what the text of a case file means, in SI units, with every default filled in.
 * Made by `readCase`; everything behind it (column, run) reads only this. Knows words and ranges, no equations.
 * Gas strengths are mole fractions of the wet gas unless a `basis` says dry.
 */

/** A property of temperature as data: a library function by name, a constant, or points to interpolate. */
export type Curve =
  /** Name as in `properties/library/curves.ts`: `water.density`, `air.viscosity`, `steam.molar-heat-capacity`. */
  | { readonly kind: 'library'; readonly id: string }
  | { readonly kind: 'constant'; readonly value: number }
  | {
      readonly kind: 'points';
      /** Temperatures, K, ascending. */
      readonly temperature: readonly number[];
      readonly value: readonly number[];
      /** `log`: straight in ln(value) against 1/T (viscosity, vapour pressure); `linear`: straight in T. */
      readonly interpolation: 'linear' | 'log';
    };

/** Where a number comes from; shown beside it. */
export interface Provenance {
  /** Path of the case key. */
  readonly path: string;
  /** Publication key, `case file` or a remark such as `common practice, no source`. */
  readonly source: string;
  readonly verified: 'seen' | 'computed' | 'from memory' | 'user' | 'judgement';
  /** True when the case file did not state it. */
  readonly isDefault: boolean;
}

/** The liquid that absorbs: constants and functions of temperature. */
export interface Solvent {
  readonly id: string;
  readonly name: string;
  /** kg/mol */ readonly molarMass: number;
  /** kg/m3 */ readonly density: Curve;
  /** Pa s */ readonly viscosity: Curve;
  /** N/m */ readonly surfaceTension: Curve;
  /** Liquid, J/(mol K) */ readonly heatCapacity: Curve;
  /** Pa; undefined: treated as involatile. */ readonly vapourPressure: Curve | undefined;
  /** Vapour, J/(mol K) */ readonly vapourHeatCapacity: Curve;
  /** Wilke-Chang association factor. */ readonly association: number;
  /** Fuller diffusion volume of the vapour, cm3/mol as published. */ readonly diffusionVolume: number;
}

/** The gas that does not dissolve. */
export interface Carrier {
  readonly id: string;
  readonly name: string;
  /** kg/mol */ readonly molarMass: number;
  /** Pa s */ readonly viscosity: Curve;
  /** J/(mol K) */ readonly heatCapacity: Curve;
  /** W/(m K) */ readonly conductivity: Curve;
  /** Fuller diffusion volume, cm3/mol as published. */ readonly diffusionVolume: number;
}

/** ln(p/Pa) = A - B/(T/K + C). */
export interface Antoine {
  readonly A: number;
  readonly B: number;
  readonly C: number;
}

/** How a solute shares itself between gas and liquid. */
export type Equilibrium =
  | {
      readonly model: 'henry';
      /** Hscp at 298.15 K, mol/(m3 Pa). */ readonly solubility: number;
      /** d ln Hscp / d(1/T), K. */ readonly temperatureFactor: number;
    }
  | {
      readonly model: 'henry-van-laar';
      readonly solubility: number;
      readonly temperatureFactor: number;
      readonly A12: number;
      readonly A21: number;
    }
  | { readonly model: 'van-laar'; readonly A12: number; readonly A21: number; readonly vapourPressure: Antoine }
  | { readonly model: 'raoult'; readonly vapourPressure: Antoine }
  | { readonly model: 'constant-ratio'; /** y* = m x. */ readonly m: number }
  | {
      readonly model: 'table';
      /** K, ascending. */ readonly temperature: readonly number[];
      /** Liquid mole fractions, ascending, first 0. */ readonly moleFraction: readonly number[];
      /** Partial pressures, Pa, one row for each temperature. */ readonly pressure: readonly (readonly number[])[];
    };

/** What is absorbed or stripped. */
export interface Solute {
  readonly id: string;
  readonly name: string;
  /** kg/mol */ readonly molarMass: number;
  /** Vapour, J/(mol K) */ readonly vapourHeatCapacity: Curve;
  /** Dissolved, J/(mol K) */ readonly heatCapacity: number;
  /** Partial molar volume in the solvent, m3/mol */ readonly molarVolume: number;
  /** In the solvent, m2/s; the correlation when undefined (Wilke-Chang on `boilingVolume`). */
  readonly liquidDiffusivity: { readonly value: number; readonly temperature: number } | undefined;
  /** Molar volume at the boiling point, cm3/mol as published (Wilke-Chang). */ readonly boilingVolume: number;
  /** In the carrier, m2/s at the stated T and p; Fuller when undefined. */
  readonly gasDiffusivity:
    { readonly value: number; readonly temperature: number; readonly pressure: number } | undefined;
  readonly diffusionVolume: number;
  readonly equilibrium: Equilibrium;
  /** Heat given off on absorption, J/mol; undefined: from the equilibrium's temperature slope. */
  readonly heatOfAbsorption: number | undefined;
}

/** Geometry and constants of a packing. */
export interface Packing {
  readonly id: string;
  readonly shape: string;
  readonly material: string;
  /** m */ readonly nominalSize: number;
  /** m2/m3 */ readonly area: number;
  readonly voidFraction: number;
  /** 1/m */ readonly packingFactor: number | undefined;
  /** Stichlmair-Bravo-Fair friction constants. */
  readonly friction: { readonly C1: number; readonly C2: number; readonly C3: number } | undefined;
  /** Billet-Schultes constants. */
  readonly billet:
    | {
        readonly CL: number;
        readonly CV: number;
        readonly Ch: number;
        readonly Cp0: number;
        readonly CS: number;
        readonly CFl: number;
      }
    | undefined;
  /** N/m */ readonly criticalSurfaceTension: number;
  /** Of the solid, J/(m3 K). */ readonly solidHeatCapacity: number;
}

/** One packed bed. */
export interface Bed {
  readonly packing: Packing;
  /** m */ readonly height: number;
  readonly segments: number;
  /** Liquid held by the redistributor above this bed at the design rate, m3; ignored for the top bed. */
  readonly redistributorVolume: number;
}

/** Hold-up and pressure drop: which law, and its constants. */
export type Hydraulics =
  | {
      readonly model: 'stichlmair-bravo-fair';
      /** Factor in h0 = 0.555 Fr^(1/3), and in 1 + 20 P^2. */
      readonly holdupFactor: number;
      readonly loadingFactor: number;
      /** Static hold-up, m3/m3; undefined: Engel et al. */ readonly staticHoldup: number | undefined;
    }
  | { readonly model: 'billet-schultes'; readonly staticHoldup: number | undefined }
  /** Liquid velocity u = k h^n, no pressure drop. */
  | { readonly model: 'power-law'; readonly k: number; readonly n: number }
  /** Fixed hold-up; liquid passes at the rate it enters; no pressure drop. */
  | { readonly model: 'prescribed'; readonly holdup: number };

/** Mass transfer: which law, and its constants. */
export type Transfer =
  | {
      readonly model: 'onda';
      readonly kLFactor: number; // 0.0051
      readonly kGFactor: number | undefined; // 5.23, or 2.00 below 15 mm
      readonly areaFactor: number; // 1.45
      /** Multipliers on the results, for uncertainty and fitting; 1 by default. */
      readonly scaleArea: number;
      readonly scaleKL: number;
      readonly scaleKG: number;
    }
  | {
      readonly model: 'billet-schultes';
      readonly scaleArea: number;
      readonly scaleKL: number;
      readonly scaleKG: number;
    }
  | {
      readonly model: 'measured';
      /** How the user stated it. NOG and HOG are taken at the design gas rate. */
      readonly statedAs:
        | { readonly kind: 'NOG'; readonly value: number }
        | { readonly kind: 'HOG'; /** m */ readonly value: number }
        | { readonly kind: 'KGa'; /** mol/(m3 s Pa) */ readonly value: number }
        | { readonly kind: 'Kya'; /** mol/(m3 s) */ readonly value: number }
        | { readonly kind: 'HG-HL'; /** m */ readonly HG: number; readonly HL: number };
      /** Exponents of the coefficient on gas and liquid rate, relative to the design rates. */
      readonly gasExponent: number;
      readonly liquidExponent: number;
    };

/** The column itself. */
export interface ColumnSpec {
  /** m */ readonly diameter: number;
  /** Tangent height of the shell, m; undefined: not checked. */ readonly shellHeight: number | undefined;
  /** Absolute, at the top of the bed, Pa. */ readonly topPressure: number;
  /** Top to bottom; at least one. */ readonly beds: readonly Bed[];
  readonly hydraulics: Hydraulics;
  readonly transfer: Transfer;
  readonly flooding: {
    /** A flooded bed recovers when the gas falls below this share of its flooding velocity. */ readonly deflooding: number;
    /** Share of area and film coefficients left in a fully flooded segment. */ readonly transferLeft: number;
    /** Largest share of the voids that liquid can fill. */ readonly fullShare: number;
  };
  /** Share of the packing area that a drained film keeps. */ readonly staticAreaShare: number;
  readonly heatLoss: { /** W/(m2 K) of shell */ readonly coefficient: number };
  /** K */ readonly ambientTemperature: number;
  /** Undefined: one zone. Else two zones; shares of the first one. */
  readonly distribution: { readonly areaShare: number; readonly liquidShare: number } | undefined;
  /** Peclet numbers on the height of each bed; undefined: plug flow. */
  readonly axialMixing: { readonly gas: number | undefined; readonly liquid: number | undefined };
  readonly isothermal: boolean;
  readonly evaporation: boolean;
}

/** Where the gas comes from and what it passes before the bed. */
export interface GasSupply {
  readonly feed: {
    /** Wet total, mol/s. */ readonly rate: number;
    /** K */ readonly temperature: number;
    /** Relative humidity (of the solvent's vapour), 0..1. */ readonly humidity: number;
    /** Mole fractions by solute, in the order of `solutes`. */ readonly composition: readonly number[];
  };
  /** Rates the plant is meant for, mol/s; informative. */ readonly range: readonly [number, number] | undefined;
  readonly source:
    | { readonly kind: 'forced'; /** s */ readonly lag: number }
    | {
        readonly kind: 'fan';
        readonly tag: string;
        /** Pa at no flow and full speed. */ readonly shutOffPressure: number;
        /** m3/s at feed conditions, and Pa there. */ readonly ratedFlow: number;
        readonly ratedPressure: number;
        /** Flow lag, s. */ readonly lag: number;
        /** Speed time constants, s. */ readonly coastDown: number;
        readonly runUp: number;
      };
  /** Stroke times (full travel), s. */
  readonly inletValve: { readonly tag: string; readonly stroke: number };
  readonly diversion: { readonly tag: string; readonly stroke: number } | undefined;
}

/** A liquid stream. */
export interface Stream {
  /** m3/s */ readonly rate: number;
  /** K */ readonly temperature: number;
  /** Mole fractions by solute. */ readonly composition: readonly number[];
}

/** Where the liquid comes from, and the vessels, pumps and valves around the bed. */
export interface LiquidSupply {
  readonly mode: 'once-through' | 'recirculated';
  /** Once-through: the header. Recirculated: design circulation rate, initial guess of the sump. */ readonly feed: Stream;
  readonly pumps: {
    readonly duty: string;
    readonly standby: string | undefined;
    /** Static head over shut-off head, 0..1. */ readonly staticHeadShare: number;
    /** Inertial time constant of w = 1/(1 + t/T), s. */ readonly coastDown: number;
    /** To 95 % of speed, s. */ readonly runUp: number;
    /** Sump level below which suction starves, m (recirculated). */ readonly minimumLevel: number;
  };
  /** Control valve in the solvent line. */ readonly valve: { readonly tag: string; readonly stroke: number };
  /** Liquid held at the design rate, m3. */ readonly distributorVolume: number;
  readonly sump: {
    /** m2 */ readonly area: number;
    /** m */ readonly normalLevel: number;
    /** m; above it liquid leaves by the overflow. */ readonly overflowLevel: number;
    readonly drain: {
      readonly tag: string;
      /** m3/s, open at normal level */ readonly capacity: number;
      readonly stroke: number;
    };
  };
  readonly cooler:
    | {
        readonly tag: string;
        /** Share of the way to the coolant's temperature, 0..1. */ readonly effectiveness: number;
        readonly coolantTemperature: number;
      }
    | undefined;
  /** Recirculated only. */ readonly makeUp:
    (Stream & { readonly tag: string; readonly capacity: number; readonly stroke: number }) | undefined;
  readonly bleed:
    | {
        readonly tag: string;
        /** Design rate, m3/s. */ readonly rate: number;
        readonly capacity: number;
        readonly stroke: number;
      }
    | undefined;
  readonly emergencyWater: (Stream & { readonly tag: string; readonly stroke: number }) | undefined;
}

/** What an instrument measures or a limit limits. SI: mole fraction, Pa, m3/s, mol/s, m, K, 1, kg/s. */
export type Measured =
  | { readonly quantity: 'gas-outlet' | 'gas-inlet' | 'liquid-outlet' | 'sump-strength'; readonly solute: number }
  | {
      readonly quantity:
        | 'bed-dp'
        | 'liquid-flow'
        | 'gas-flow'
        | 'sump-level'
        | 'sump-temperature'
        | 'liquid-inlet-temperature'
        | 'gas-outlet-temperature'
        | 'gas-inlet-temperature'
        | 'liquid-outlet-temperature'
        | 'distributor-volume'
        | 'flood-approach'
        | 'carry-over'
        | 'pump-speed'
        | 'make-up-flow'
        | 'bleed-flow'
        | 'holdup';
    };

/** A measurement and how it shows its quantity. */
export interface Instrument {
  readonly tag: string;
  readonly measured: Measured;
  /** Unit in which it is shown, as typed. */ readonly unit: string;
  /** First-order lag and pure dead time, s. */ readonly lag: number;
  readonly deadTime: number;
  readonly bias: number;
  /** Per second. */ readonly drift: number;
  readonly noise:
    { /** Standard deviation. */ readonly sigma: number; /** s */ readonly correlationTime: number } | undefined;
  /** Clipping range. */ readonly range: readonly [number, number] | undefined;
  /** s; undefined: continuous. */ readonly sampleInterval: number | undefined;
}

/** An alarm on an instrument. */
export interface Alarm {
  readonly tag: string;
  readonly instrument: string;
  readonly kind: 'high' | 'low';
  readonly setpoint: number;
  readonly deadband: number;
  readonly onDelay: number;
  readonly offDelay: number;
  readonly priority: 'low' | 'medium' | 'high' | 'critical';
}

/** A shown value beyond a number for a time. */
export interface Condition {
  readonly instrument: string;
  readonly kind: 'above' | 'below';
  readonly value: number;
  /** Must hold without break, s. */ readonly holdFor: number;
}

/** A condition, voted where there are several, with the actions it takes. */
export interface Interlock {
  readonly tag: string;
  /** `trip`: latched until reset; `auto-start`: acts once each time its condition becomes true. */
  readonly kind: 'trip' | 'auto-start';
  readonly conditions: readonly Condition[];
  /** Trips when at least this many conditions hold. */ readonly votes: number;
  /** From vote to the actions, s. */ readonly delay: number;
  readonly actions: readonly Action[];
  readonly resetPermissive: Condition | undefined;
}

/** What a controller can move. */
export type ControlledDevice = 'drain' | 'solvent-valve' | 'make-up' | 'bleed' | 'gas-damper' | 'cooler' | 'pump-speed';

/** A proportional-integral controller. */
export interface Controller {
  readonly tag: string;
  readonly instrument: string;
  readonly output: ControlledDevice;
  readonly setpoint: number;
  /** Output share per unit (SI) of measured value; positive. */ readonly gain: number;
  /** s */ readonly integralTime: number;
  /** `direct`: output rises when the measurement rises. */ readonly action: 'direct' | 'reverse';
  readonly outputRange: readonly [number, number];
  readonly mode: 'automatic' | 'manual';
  /** In manual, and the first guess in automatic. */ readonly manualOutput: number;
}

/** A limit that is to be kept. */
export interface Limit {
  readonly id: string;
  readonly measured: Measured;
  readonly kind: 'max' | 'min';
  /** SI (mole fraction for a strength). */ readonly value: number;
  readonly averaging:
    { readonly kind: 'none' } | { readonly kind: 'rolling' | 'block'; /** s */ readonly window: number };
  /** Reference state of a strength limit. */ readonly basis: 'wet' | 'dry';
  /** Unit as typed, for people. */ readonly unit: string;
}

/** A quantity that a scenario can change over time. Composition channels carry the solute's index. */
export type Channel =
  | { readonly name: 'gas.composition' | 'liquid.composition' | 'makeUp.composition'; readonly solute: number }
  | {
      readonly name:
        | 'gas.rate'
        | 'gas.temperature'
        | 'gas.humidity'
        | 'liquid.temperature'
        | 'pump.speed'
        | 'makeUp.temperature'
        | 'cooling' // availability, 0..1
        | 'coolant.temperature'
        | 'packing.fouling' // share of the voids lost, 0..1
        | 'packing.foaming' // capacity factor, 0..1; multiplies the flooding velocity
        | 'distribution.liquidShare'
        | 'ambient.temperature'
        | 'topPressure'
        | 'nonReturnValve.leak'; // share of the delivery lost through the idle pump, 0..1
    };

/** Valves that an action can move. */
export type ValveName =
  'gas-inlet' | 'diversion' | 'solvent' | 'drain' | 'make-up' | 'bleed' | 'emergency-water' | 'gas-damper';

/** What is done to the plant at once. */
export type Action =
  | {
      readonly kind: 'change';
      readonly channel: Channel;
      /** `to`: absolute, SI; `times`: factor on the value that the case gives; `trace`: sampled. */
      readonly how:
        | {
            readonly kind: 'to' | 'times';
            readonly value: number;
            /** Ramp time, s. */ readonly over: number;
            /** Back to the case's value after this, s from the start; undefined: stays. */ readonly duration:
              number | undefined;
          }
        | {
            readonly kind: 'trace';
            /** s from the start, ascending. */ readonly time: readonly number[];
            readonly value: readonly number[];
          };
    }
  | { readonly kind: 'machine'; readonly tag: string; readonly command: 'start' | 'stop' | 'lock-out' | 'release' }
  | {
      readonly kind: 'valve';
      readonly valve: ValveName;
      /** 0..1, or stuck where it is, or free again. */ readonly command: number | 'stick' | 'release';
    }
  | {
      readonly kind: 'controller';
      readonly tag: string;
      readonly mode: 'automatic' | 'manual' | undefined;
      readonly setpoint: number | undefined;
      readonly output: number | undefined;
    }
  | {
      readonly kind: 'instrument';
      readonly tag: string;
      readonly fault:
        'freeze' | 'fail-high' | 'fail-low' | 'restore' | { readonly bias: number } | { readonly drift: number };
    }
  | { readonly kind: 'interlock'; readonly tag: string; readonly command: 'reset' | 'bypass' | 'restore' }
  /** Several machines lose power together and come back (or not) after `duration`. */
  | { readonly kind: 'power-dip'; readonly tags: readonly string[]; readonly duration: number | undefined };

/** One step of a scenario: when, and what. */
export interface Step {
  readonly id: string;
  readonly label: string;
  readonly trigger:
    | { readonly kind: 'time'; /** s */ readonly at: number }
    | {
        readonly kind: 'condition';
        readonly condition: Condition;
        /** Step that must have fired before, or undefined. */ readonly after: string | undefined;
      }
    | { readonly kind: 'after'; readonly after: string; /** s */ readonly delay: number };
  readonly actions: readonly Action[];
  /** An upset starts trouble, an action answers it. */ readonly role: 'upset' | 'action';
}

/** A timeline of upsets and actions. */
export interface Scenario {
  readonly id: string;
  readonly title: string;
  readonly initial: 'steady' | 'dry' | 'hot-standby';
  /** Time before the first upset that is computed and shown, s. */ readonly steps: readonly Step[];
  /** s */ readonly duration: number;
  /** Interlocks that act; `all` or tags. */ readonly interlocksInService: 'all' | readonly string[];
}

/** A named uncertain input; read and checked here, used by setpoint studies. */
export interface Uncertain {
  readonly path: string;
  readonly distribution: 'normal' | 'uniform' | 'triangular' | 'lognormal';
  /** Whether `low` and `high` are factors on the case's value, or values in SI. */ readonly as: 'factor' | 'value';
  readonly low: number;
  readonly high: number;
  readonly source: string;
}

/** How a run is computed and recorded. */
export interface RunSettings {
  readonly rtol: number;
  readonly method: string;
  readonly axialScheme: 'exponential' | 'well-mixed';
  /** Largest spacing of the recorded series, s. */ readonly recordEvery: number;
  /** Work limit, steps. */ readonly maxSteps: number;
  readonly seed: number;
  readonly noise: boolean;
}

/** A whole case. */
export interface Case {
  readonly formatVersion: 1;
  readonly title: string;
  readonly shows: string;
  readonly solvent: Solvent;
  readonly carrier: Carrier;
  readonly solutes: readonly Solute[];
  readonly column: ColumnSpec;
  readonly gas: GasSupply;
  readonly liquid: LiquidSupply;
  readonly instruments: readonly Instrument[];
  readonly alarms: readonly Alarm[];
  readonly interlocks: readonly Interlock[];
  readonly controllers: readonly Controller[];
  readonly limits: readonly Limit[];
  readonly scenarios: readonly Scenario[];
  readonly uncertainty: readonly Uncertain[];
  readonly run: RunSettings;
  readonly provenance: readonly Provenance[];
}
