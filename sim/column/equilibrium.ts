/**
 * The equilibrium of a solute as a cell evaluates it: a pressure scale that depends on temperature alone (tabulated)
 * times an activity that depends on composition alone, or a table of the user's that does not separate.
 */
import type { Antoine, Equilibrium } from '../case/case.ts';
import { GAS_CONSTANT } from '../properties/constants.ts';
import { vanLaarHenryLaw, vanLaarLaw } from '../properties/equilibrium/van-laar.ts';
import { henryLaw } from '../properties/equilibrium/henry.ts';
import { tableLaw } from '../properties/equilibrium/table.ts';
import type { EquilibriumLaw, SeparableLaw, TemperatureFunction } from '../properties/equilibrium/law.ts';

export interface SoluteEquilibrium {
  /**
   * `linear`: p* = scale(T) x; `ratio`: p* = scale x p; `activity`: p* = scale(T) activity(x); `table`: p*(T, x).
   */
  readonly kind: 'linear' | 'ratio' | 'activity' | 'table';
  /** Pressure per mole fraction at infinite dilution, Pa (`ratio`: dimensionless m). */
  readonly pressureScale: (T: number) => number;
  readonly activity: (x: number) => number;
  readonly activitySlope: (x: number) => number;
  readonly partialPressure: (T: number, x: number) => number;
  readonly slope: (T: number, x: number) => number;
}

function antoine(constants: Antoine): TemperatureFunction {
  return {
    value: (T) => Math.exp(constants.A - constants.B / (T + constants.C)),
    relativeSlope: (T) => constants.B / (T + constants.C) ** 2,
  };
}

function separable(law: SeparableLaw, kind: 'linear' | 'activity'): SoluteEquilibrium {
  return {
    kind,
    pressureScale: (T) => law.referencePressure(T),
    activity: (x) => law.activity(x),
    activitySlope: (x) => law.activitySlope(x),
    partialPressure: (T, x) => law.partialPressure(T, x, 0),
    slope: (T, x) => law.slope(T, x, 0),
  };
}

function scaleOnly(kind: 'linear' | 'ratio', scale: (T: number) => number): SoluteEquilibrium {
  return {
    kind,
    pressureScale: scale,
    activity: (x) => x,
    activitySlope: () => 1,
    partialPressure: (T, x) => scale(T) * x,
    slope: (T) => scale(T),
  };
}

function fromTable(law: EquilibriumLaw): SoluteEquilibrium {
  return {
    kind: 'table',
    pressureScale: (T) => law.slope(T, 0, 0),
    activity: (x) => x,
    activitySlope: () => 1,
    partialPressure: (T, x) => law.partialPressure(T, x, 0),
    slope: (T, x) => law.slope(T, x, 0),
  };
}

/**
 * @param equilibrium - As the case states it.
 * @param density - Of the solvent, kg/m3, against T in K.
 * @param molarMass - Of the solvent, kg/mol.
 */
export function equilibriumOf(
  equilibrium: Equilibrium,
  density: (T: number) => number,
  molarMass: number,
): SoluteEquilibrium {
  const concentration: TemperatureFunction = {
    value: (T) => density(T) / molarMass,
    relativeSlope: (T) => (Math.log(density(T + 0.05)) - Math.log(density(T - 0.05))) / 0.1,
  };
  switch (equilibrium.model) {
    case 'henry':
      return separable(
        henryLaw({ H: equilibrium.solubility, B: equilibrium.temperatureFactor }, concentration),
        'linear',
      );
    case 'henry-van-laar': {
      const henry = henryLaw({ H: equilibrium.solubility, B: equilibrium.temperatureFactor }, concentration);
      const scale: TemperatureFunction = {
        value: (T) => henry.referencePressure(T),
        relativeSlope: (T) => henry.vaporisationEnthalpy(T) / (GAS_CONSTANT * T * T),
      };
      return separable(vanLaarHenryLaw(equilibrium, scale), 'activity');
    }
    case 'van-laar':
      return separable(vanLaarLaw(equilibrium, antoine(equilibrium.vapourPressure)), 'activity');
    case 'raoult':
      return scaleOnly('linear', antoine(equilibrium.vapourPressure).value);
    case 'constant-ratio':
      return scaleOnly('ratio', () => equilibrium.m);
    case 'table':
      return fromTable(
        tableLaw({
          T: equilibrium.temperature,
          x: equilibrium.moleFraction.slice(1),
          p: equilibrium.pressure.map((row) => row.slice(1)),
        }),
      );
  }
}
