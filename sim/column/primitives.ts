/**
 * What a cell's states mean: offsets of the quantities that `cell.ts` derives from one cell's states, gas flow and
 * pressure, and that faces and balances are made of. Index k = 0 is the solvent, 1..K the solutes.
 */
export interface Primitives {
  /** Liquid temperature, K. */ readonly TL: number;
  /** Hold-up, m3/m3 of bed. */ readonly holdup: number;
  /** Volumetric rate that the hold-up lets go, m3/s (never above the cell's capacity). */ readonly demand: number;
  /** Volumetric rate that the cell can take in, m3/s; `NO_LIMIT` below flooding. */ readonly supply: number;
  /** Gas temperature, K. */ readonly TG: number;
  /** Reported pressure drop over the cell, Pa. */ readonly pressureDrop: number;
  /** Sensible heat from gas to liquid and packing, W. */ readonly heat: number;
  /** Moles of gas in the cell (carrier included), its heat capacity, J/K, and its volume, m3. */
  readonly gasMoles: number;
  readonly gasHeat: number;
  readonly gasVolume: number;
  /** Concentrations of the solutes, mol/m3 of liquid: first of K. */ readonly concentration: number;
  /** Mole fractions in the gas: first of K + 1. */ readonly y: number;
  /** Transfer from gas to liquid, mol/s in the cell: first of K + 1. */ readonly transfer: number;
  /** How far the hold-up's feedback has gone: 0 at low load, 1 at the flood point. */ readonly loading: number;
  /** Primitives to which slopes are taken come first; what one half of a cell's evaluation leaves to the other follows. */
  readonly differentiated: number;
  /** Row of the liquid table, then mole fractions in the liquid, the gas's molar mass and its vapours' share. */
  readonly liquidRow: number;
  readonly x: number;
  readonly gasMass: number;
  readonly vapours: number;
  readonly size: number;
}

/** A supply that limits nothing, m3/s. */
export const NO_LIMIT = 1e9;

/** Offsets for K solutes and a liquid table of so many columns. */
export function primitivesFor(solutes: number, liquidColumns: number): Primitives {
  const concentration = 11;
  const y = concentration + solutes;
  const transfer = y + solutes + 1;
  const differentiated = transfer + solutes + 1;
  const x = differentiated + liquidColumns;
  return {
    TL: 0,
    holdup: 1,
    demand: 2,
    supply: 3,
    TG: 4,
    pressureDrop: 5,
    heat: 6,
    gasMoles: 7,
    gasHeat: 8,
    gasVolume: 9,
    loading: 10,
    concentration,
    y,
    transfer,
    differentiated,
    liquidRow: differentiated,
    x,
    gasMass: x + solutes + 1,
    vapours: x + solutes + 2,
    size: x + solutes + 3,
  };
}
