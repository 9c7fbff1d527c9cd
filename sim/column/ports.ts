/**
 * What passes between a chain of cells and the plant around it: offsets of a chain's inputs and outputs.
 * Gas enters at the bottom, liquid at the top. k = 0 solvent, 1..K solutes.
 */
export interface InputPorts {
  /** mol/s into the bottom cell. */ readonly gasFlow: number;
  /** Mole fractions, first of K + 1. */ readonly y: number;
  /** K */ readonly TG: number;
  /** Offered at the top, m3/s. */ readonly liquidFlow: number;
  /** Concentrations of the solutes, mol/m3, first of K. */ readonly concentration: number;
  /** K */ readonly TL: number;
  /** At the top of the bed, Pa. */ readonly topPressure: number;
  /** Lagged pressure drop of the bed, Pa. */ readonly pressureDrop: number;
  /** Rates of the last two, Pa/s; no slopes are taken to them. */
  readonly topPressureRate: number;
  readonly pressureDropRate: number;
  /** Inputs to which slopes are taken come first. */ readonly differentiated: number;
  readonly size: number;
}

export interface OutputPorts {
  /** mol/s out of the top cell. */ readonly gasFlow: number;
  /** Mole fractions at the top face, first of K + 1. */ readonly y: number;
  /** K */ readonly TG: number;
  /** m3/s out of the bottom cell. */ readonly liquidFlow: number;
  /** Concentrations at the bottom face, first of K. */ readonly concentration: number;
  /** K */ readonly TL: number;
  /** Molar volume of the solvent at the bottom face, m3/mol. */ readonly molarVolume: number;
  /** Taken in at the top, m3/s; the rest of what was offered is carried over. */ readonly accepted: number;
  /** Sums over the chain: pressure drop, Pa; heat lost, W; liquid held, m3. */
  readonly pressureDrop: number;
  readonly heatLoss: number;
  readonly liquidHeld: number;
  readonly size: number;
}

export function inputPorts(solutes: number): InputPorts {
  const y = 1;
  const TG = y + solutes + 1;
  const liquidFlow = TG + 1;
  const concentration = liquidFlow + 1;
  const TL = concentration + solutes;
  return {
    gasFlow: 0,
    y,
    TG,
    liquidFlow,
    concentration,
    TL,
    topPressure: TL + 1,
    pressureDrop: TL + 2,
    differentiated: TL + 3,
    topPressureRate: TL + 3,
    pressureDropRate: TL + 4,
    size: TL + 5,
  };
}

export function outputPorts(solutes: number): OutputPorts {
  const y = 1;
  const TG = y + solutes + 1;
  const liquidFlow = TG + 1;
  const concentration = liquidFlow + 1;
  const TL = concentration + solutes;
  return {
    gasFlow: 0,
    y,
    TG,
    liquidFlow,
    concentration,
    TL,
    molarVolume: TL + 1,
    accepted: TL + 2,
    pressureDrop: TL + 3,
    heatLoss: TL + 4,
    liquidHeld: TL + 5,
    size: TL + 6,
  };
}
