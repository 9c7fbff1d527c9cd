/**
 * One segment: from its own states, the gas flow that enters it and its pressure, everything that its balances need.
 * Pure in its arguments (plus the slowly changing conditions of its bed), so that its slopes are taken by differences
 * one segment at a time. This is the hottest code of the engine: flat arrays, no allocation, no powers.
 */
import type { Bed, Case } from '../case/case.ts';
import { readHermiteTable } from '../numerics/hermite-table.ts';
import { GAS_CONSTANT, STANDARD_GRAVITY } from '../properties/constants.ts';
import {
  createFluidTables,
  DATUM_TEMPERATURE,
  GAS,
  LIQUID,
  LIQUID_SOLUTE,
  SOLUTE_COLUMNS,
  SOLUTE_PRESSURE,
  type Fluids,
} from './fluids.ts';
import { createFilmLaw, type FilmState } from './film-law.ts';
import { createHydraulicLaw } from './hydraulics.ts';
import type { HydraulicState } from './hydraulic-law.ts';
import { NO_LIMIT, type Primitives } from './primitives.ts';

/** Conditions of a bed that change during a run; owned by the column, read by its cells. */
interface BedConditions {
  /** Share of the voids lost to deposits, 0..1; acts on friction and drainage, not on the inventories. */
  fouling: number;
  /** Foaming: capacity factor, 1 clean; divides the gas load that hold-up feels. */
  foaming: number;
  /** K */ ambient: number;
  /** Liquid that enters the bed's zone, m3/s; read by the prescribed hold-up only. */
  liquidIn: number;
}

export interface Cell {
  /**
   * First half: temperatures, hold-up, compositions, inventories.
   *
   * @param s - States; the cell's block starts at `so`.
   * @param pressure - Pa.
   * @param out - Primitives; the cell's start at `oo`.
   */
  settle(s: Float64Array, so: number, pressure: number, out: Float64Array, oo: number): void;
  /**
   * Second half, on what the first left in `out`: drainage, pressure drop, transfer, heat.
   *
   * @param flow - Gas flow that enters from below, mol/s.
   */
  exchange(flow: number, pressure: number, out: Float64Array, oo: number): void;
  readonly conditions: BedConditions;
  /** Cross-section of the zone, m2, and height of a cell, m. */
  readonly crossSection: number;
  readonly height: number;
  /** Heat capacity of the packing in a cell, J/K. */
  readonly packingHeat: number;
  /** Gas and liquid space together, m3. */
  readonly voidVolume: number;
  /** Heat lost per kelvin above ambient, W/K. */
  readonly heatLoss: number;
  /** Film and hydraulic state of the last call, for reports. */
  readonly film: FilmState;
  readonly hydraulic: HydraulicState;
}

/** Liquid below which concentrations fade, as a share of the cell's volume: a film of some molecules' thickness. */
const TRACE_HOLDUP = 1e-7;
/** Largest reported gradient: the weight of the liquid that could fill the voids; reached smoothly (fourth power). */
function capped(gradient: number, eps: number): number {
  const r = gradient / eps;
  const r2 = r * r;
  return gradient / Math.sqrt(Math.sqrt(1 + r2 * r2));
}

/**
 * Partial pressure of the inert part, log mean of bulk and interface, over the total pressure.
 *   series of the mean for near values (next term below 1e-9), exact otherwise
 */
function logMeanInert(bulk: number, interfacial: number): number {
  const sum = bulk + interfacial;
  const z = (bulk - interfacial) / sum;
  const z2 = z * z;
  if (z2 < 0.0025) return 0.5 * sum * (1 - z2 * (1 / 3 + z2 * (4 / 45 + z2 * (44 / 945))));
  return (bulk - interfacial) / Math.log(bulk / interfacial);
}

/** Builds the evaluation of one bed's cells (one zone of it). */
export function createCell(plant: Case, fluids: Fluids, bed: Bed, areaShare: number, index: Primitives): Cell {
  const { column } = plant;
  const K = fluids.solutes;
  const components = K + 1;
  const crossSection = 0.25 * Math.PI * column.diameter ** 2 * areaShare;
  const height = bed.height / bed.segments;
  const volume = crossSection * height;
  const { packing } = bed;
  const eps = packing.voidFraction;
  const packingHeat = volume * (1 - eps) * packing.solidHeatCapacity;
  const voidVolume = volume * eps;
  const heatLoss = column.heatLoss.coefficient * Math.PI * column.diameter * height * areaShare;
  const conditions: BedConditions = { fouling: 0, foaming: 1, ambient: column.ambientTemperature, liquidIn: 0 };

  const hydraulics = createHydraulicLaw(plant, fluids, bed);
  const films = createFilmLaw(plant, fluids, bed, areaShare);
  const tables = createFluidTables(fluids, bed, films.constants);
  const hydraulic: HydraulicState = { demand: 0, supply: 0, gradient: 0, loading: 0 };
  const film = films.state;
  const liquid = new Float64Array(tables.liquid.columns);
  const liquidColumns = tables.liquid.columns;
  const gas = new Float64Array(tables.gas.columns);
  const partial = new Float64Array(components); // p* of each component, Pa
  const slope = new Float64Array(components); // dp*/dx, Pa
  const { molarMass, liquidHeat, vapourHeat, vaporisation, soluteVolume, carrierMass, carrierHeat, equilibrium } =
    fluids;
  const vapours = fluids.isVolatile;
  const isPrescribed = column.hydraulics.model === 'prescribed';
  const { isothermal } = column;
  const fixedLiquidT = plant.liquid.feed.temperature;
  const fixedGasT = plant.gas.feed.temperature;
  const traceVolume = TRACE_HOLDUP * volume;
  const traceMoles = traceVolume / (fluids.molarMass[0] / fluids.solventDensity(fluids.meanTemperature));

  return {
    conditions,
    crossSection,
    height,
    packingHeat,
    voidVolume,
    heatLoss,
    film,
    hydraulic,
    settle(s, so, pressure, out, oo) {
      // Liquid: temperature from enthalpy, volume and concentrations from moles.
      let capacity = packingHeat;
      let soluteLiquid = 0;
      let moles = 0;
      for (let k = 0; k < components; k++) {
        const n = s[so + k];
        capacity += n * liquidHeat[k];
        soluteLiquid += n * soluteVolume[k];
        moles += n;
      }
      const TL = isothermal ? fixedLiquidT : DATUM_TEMPERATURE + s[so + components] / capacity;
      readHermiteTable(tables.liquid, TL, out, oo + index.liquidRow);
      const v0 = out[oo + index.liquidRow + LIQUID.molarVolume];
      const liquidVolume = s[so] * v0 + soluteLiquid;
      const holdup = liquidVolume / volume;
      const perVolume = 1 / ((liquidVolume > 0 ? liquidVolume : 0) + traceVolume);
      const perMole = 1 / ((moles > 0 ? moles : 0) + traceMoles);

      // Gas: temperature from enthalpy (a quadratic, since the moles at fixed pressure depend on it), then fractions.
      const go = so + components + 1;
      const gasVolume = voidVolume - liquidVolume;
      const PV = pressure * gasVolume;
      let TG = fixedGasT;
      let excess = 0; // sum m_k (cp_k - cp_carrier)
      let sensible = s[go + components];
      for (let k = 0; k < components; k++) {
        const m = s[go + k];
        excess += m * (vapourHeat[k] - carrierHeat);
        sensible -= m * vaporisation[k];
      }
      if (!isothermal) {
        const b = excess * DATUM_TEMPERATURE + (PV * carrierHeat) / GAS_CONSTANT - sensible;
        const root = Math.sqrt(b * b + 4 * excess * sensible * DATUM_TEMPERATURE);
        TG = DATUM_TEMPERATURE + (2 * sensible * DATUM_TEMPERATURE) / (b + root);
      }
      const gasMoles = PV / (GAS_CONSTANT * TG);
      const perGasMole = 1 / gasMoles;
      let mixtureMass = carrierMass;
      let vapourPressure = 0;
      for (let k = 0; k < components; k++) {
        const y = s[go + k] * perGasMole;
        out[oo + index.y + k] = y;
        mixtureMass += y * (molarMass[k] - carrierMass);
        vapourPressure += y;
      }
      for (let k = 0; k < components; k++) {
        const n = s[so + k];
        out[oo + index.x + k] = n * perMole;
        if (k > 0) out[oo + index.concentration + k - 1] = n * perVolume;
      }
      out[oo + index.TL] = TL;
      out[oo + index.holdup] = holdup;
      out[oo + index.TG] = TG;
      out[oo + index.gasMoles] = gasMoles;
      out[oo + index.gasHeat] = excess + gasMoles * carrierHeat;
      out[oo + index.gasVolume] = gasVolume;
      out[oo + index.gasMass] = mixtureMass;
      out[oo + index.vapours] = vapourPressure;
    },
    exchange(flow, pressure, out, oo) {
      const TL = out[oo + index.TL];
      const TG = out[oo + index.TG];
      const holdup = out[oo + index.holdup];
      const mixtureMass = out[oo + index.gasMass];
      for (let i = 0; i < liquidColumns; i++) liquid[i] = out[oo + index.liquidRow + i];
      const v0 = liquid[LIQUID.molarVolume];
      readHermiteTable(tables.gas, TG, gas, 0);
      const forward = flow > 0 ? flow : 0;
      const massFlux = (forward * mixtureMass) / crossSection;
      const gasDensity = (pressure * mixtureMass) / (GAS_CONSTANT * TG);

      // Hold-up lets liquid go; gas and hold-up make the pressure drop.
      const liquidDensity = molarMass[0] / v0;
      const weight = liquidDensity * STANDARD_GRAVITY;
      let uL: number;
      if (isPrescribed) {
        uL = conditions.liquidIn / crossSection;
        out[oo + index.demand] = conditions.liquidIn;
        out[oo + index.supply] = NO_LIMIT;
        out[oo + index.pressureDrop] = 0;
        hydraulic.loading = 0;
      } else {
        hydraulics.evaluate(
          holdup,
          massFlux,
          gasDensity,
          gas[GAS.viscosity],
          liquidDensity,
          liquid[LIQUID.viscosity],
          conditions,
          hydraulic,
        );
        uL = hydraulic.demand;
        out[oo + index.demand] = uL * crossSection;
        const supply = hydraulic.supply * crossSection;
        out[oo + index.supply] = supply < NO_LIMIT ? supply : NO_LIMIT;
        out[oo + index.pressureDrop] = capped(hydraulic.gradient, eps) * weight * height;
      }

      // Equilibrium at the bulk liquid.
      let interfacial = 0;
      if (vapours) {
        partial[0] = out[oo + index.x] * liquid[LIQUID.vapourPressure];
        interfacial += partial[0];
      }
      for (let k = 1; k < components; k++) {
        const x = out[oo + index.x + k];
        const scale = liquid[LIQUID_SOLUTE + SOLUTE_COLUMNS * (k - 1) + SOLUTE_PRESSURE];
        const e = equilibrium[k - 1];
        if (e.kind === 'linear') {
          slope[k] = scale;
          partial[k] = scale * x;
        } else if (e.kind === 'activity') {
          partial[k] = scale * e.activity(x);
          slope[k] = scale * e.activitySlope(x);
        } else if (e.kind === 'ratio') {
          slope[k] = scale * pressure;
          partial[k] = slope[k] * x;
        } else {
          partial[k] = e.partialPressure(TL, x);
          slope[k] = e.slope(TL, x);
        }
        interfacial += partial[k];
      }

      // Films. The inert's log mean corrects the gas film for the flux itself.
      films.evaluate(
        uL,
        liquidDensity,
        holdup,
        massFlux,
        gasDensity,
        liquid,
        gas,
        pressure,
        hydraulic.loading,
        forward,
        TG,
      );
      const least = 1e-3 * pressure;
      const bulkInert = pressure * (1 - out[oo + index.vapours]);
      const interfaceInert = pressure - interfacial;
      const drift =
        pressure / logMeanInert(bulkInert > least ? bulkInert : least, interfaceInert > least ? interfaceInert : least);
      const perRT = (film.corrected ? drift : 1) / (GAS_CONSTANT * TG);
      const wetted = film.area * volume;
      let heatCarried = 0;
      if (vapours) {
        const flux = film.gas[0] * perRT * (pressure * out[oo + index.y] - partial[0]);
        out[oo + index.transfer] = wetted * flux;
        heatCarried += wetted * flux * vapourHeat[0];
      } else {
        out[oo + index.transfer] = 0;
      }
      for (let k = 1; k < components; k++) {
        const driving = pressure * out[oo + index.y + k] - partial[k];
        let conductance: number; // mol/(s Pa) in the cell
        if (film.overall > 0) {
          conductance = (film.overall * volume) / pressure;
        } else {
          conductance = wetted / (1 / (film.gas[k] * perRT) + (slope[k] * v0) / film.liquid[k]);
        }
        const rate = conductance * driving;
        out[oo + index.transfer + k] = rate;
        heatCarried += rate * vapourHeat[k];
      }

      // Sensible heat over the dry area, with Ackermann's factor for the flux that carries heat along.
      let heat = 0;
      if (!isothermal) {
        const conductance = film.heat * packing.area * volume; // W/K
        if (conductance > 0) {
          const a = heatCarried / conductance;
          const factor = Math.abs(a) < 1e-3 ? 1 + 0.5 * a + (a * a) / 12 : a / (1 - Math.exp(-a));
          heat = conductance * factor * (TG - TL);
        }
      }
      out[oo + index.heat] = heat;
      out[oo + index.loading] = hydraulic.loading;
    },
  };
}
