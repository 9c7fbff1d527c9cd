/**
 * Gas space between two beds, well mixed: gathers the gas of the bed below and feeds the bed above.
 * Conserves every component; its outflow follows from constant volume and the pressure's own rate, as in a cell.
 */
import type { Case } from '../case/case.ts';
import { GAS_CONSTANT } from '../properties/constants.ts';
import { DATUM_TEMPERATURE, type Fluids } from './fluids.ts';

/** Height of the space between two beds, m: support, risers and distributor. Judgement, no source. */
const PLENUM_HEIGHT = 0.3;

/**
 * Temperature of a gas at fixed pressure and volume from its enthalpy: root of a quadratic, since the moles of the
 * carrier follow from the temperature.
 *
 * @param excess - Sum of m_k (cp_k - cp_carrier), J/K.
 * @param sensible - Enthalpy less the heats of vaporisation, J.
 * @param PV - J.
 * @param carrierHeat - J/(mol K).
 * @returns K.
 */
function gasTemperature(excess: number, sensible: number, PV: number, carrierHeat: number): number {
  const b = excess * DATUM_TEMPERATURE + (PV * carrierHeat) / GAS_CONSTANT - sensible;
  const root = Math.sqrt(b * b + 4 * excess * sensible * DATUM_TEMPERATURE);
  return DATUM_TEMPERATURE + (2 * sensible * DATUM_TEMPERATURE) / (b + root);
}

export interface Plenum {
  readonly volume: number;
  temperature: number;
  readonly y: Float64Array;
  moles: number;
  /** Reads the states. */
  read(y: Float64Array, at: number, pressure: number): void;
  /** Gas that leaves for an inflow given as component fluxes, enthalpy, carrier; mol/s. */
  outflow(inflow: Float64Array, pressureRate: number): number;
  /** Rates of the states for an outflow. */
  rates(inflow: Float64Array, outflow: number, dydt: Float64Array, at: number): void;
  /** Writes the states of a gas of the given fractions. */
  fill(y: Float64Array, at: number, pressure: number, temperature: number, fractions: Float64Array): void;
}

export function createPlenum(plant: Case, fluids: Fluids): Plenum {
  const volume = 0.25 * Math.PI * plant.column.diameter ** 2 * PLENUM_HEIGHT;
  const { components, vapourHeat, vaporisation, carrierHeat } = fluids;
  const { isothermal } = plant.column;
  const fixed = plant.gas.feed.temperature;
  let pressure = plant.column.topPressure;
  let heat = 1;
  const self: Plenum = {
    volume,
    temperature: fixed,
    y: new Float64Array(components),
    moles: 1,
    read(y, at, p) {
      pressure = p;
      let excess = 0;
      let sensible = y[at + components];
      for (let k = 0; k < components; k++) {
        excess += y[at + k] * (vapourHeat[k] - carrierHeat);
        sensible -= y[at + k] * vaporisation[k];
      }
      self.temperature = isothermal ? fixed : gasTemperature(excess, sensible, p * volume, carrierHeat);
      self.moles = (p * volume) / (GAS_CONSTANT * self.temperature);
      heat = excess + self.moles * carrierHeat;
      for (let k = 0; k < components; k++) self.y[k] = y[at + k] / self.moles;
    },
    outflow(inflow, pressureRate) {
      let total = inflow[components + 1];
      let X = inflow[components];
      const theta = self.temperature - DATUM_TEMPERATURE;
      X -= inflow[components + 1] * carrierHeat * theta;
      for (let k = 0; k < components; k++) {
        total += inflow[k];
        X -= inflow[k] * (vaporisation[k] + vapourHeat[k] * theta);
      }
      const storage = (self.moles * pressureRate) / pressure;
      if (isothermal) return total - storage;
      return total - storage + (self.moles * X) / (self.temperature * heat);
    },
    rates(inflow, outflow, dydt, at) {
      const theta = self.temperature - DATUM_TEMPERATURE;
      let inert = 1;
      let h = 0;
      for (let k = 0; k < components; k++) {
        dydt[at + k] = inflow[k] - outflow * self.y[k];
        inert -= self.y[k];
        h += self.y[k] * (vaporisation[k] + vapourHeat[k] * theta);
      }
      dydt[at + components] = isothermal ? 0 : inflow[components] - outflow * (h + inert * carrierHeat * theta);
    },
    fill(y, at, p, temperature, fractions) {
      const moles = (p * volume) / (GAS_CONSTANT * temperature);
      const theta = temperature - DATUM_TEMPERATURE;
      let inert = 1;
      let h = 0;
      for (let k = 0; k < components; k++) {
        y[at + k] = moles * fractions[k];
        inert -= fractions[k];
        h += fractions[k] * (vaporisation[k] + vapourHeat[k] * theta);
      }
      y[at + components] = moles * (h + inert * carrierHeat * theta);
    },
  };
  return self;
}
