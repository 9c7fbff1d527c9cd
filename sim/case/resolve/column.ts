// The column: packing from the library or own, hydraulics, transfer and flooding with their constants.

import { PACKINGS } from '../../transfer/library/packings.ts';
import type { PackingEntry } from '../../transfer/library/packings.ts';
import { SOLIDS } from '../../transfer/packing-material.ts';
import type { Bed, ColumnSpec, Hydraulics, Packing, Transfer } from '../case.ts';
import { COLUMN } from '../defaults.ts';
import { join } from '../issues.ts';
import type { Default, Reading } from '../reading.ts';
import type { ColumnText, PackingText, TransferText } from '../schema/column.ts';
import { origin } from './origin.ts';
import { listed } from './listed.ts';

/** The column, or undefined after noting why not. `liquidRate`: design, m3/s. */
export function readColumn(
  reading: Reading,
  given: ColumnText,
  liquidRate: number | undefined,
): ColumnSpec | undefined {
  const path = 'column';
  const key = (name: string): string => join(path, name);
  const beds = given.beds.map((bed, index): Bed | undefined => {
    const at = `${key('beds')}[${index}]`;
    const packing = readPacking(reading, join(at, 'packing'), bed.packing);
    const held: Default<number> = {
      ...COLUMN.redistributorSeconds,
      value: COLUMN.redistributorSeconds.value * (liquidRate ?? 0),
    };
    const redistributorVolume =
      index === 0 && bed.redistributorVolume === undefined
        ? 0
        : reading.fill(join(at, 'redistributorVolume'), bed.redistributorVolume, held);
    const segments = reading.fill(join(at, 'segments'), bed.segments, COLUMN.segments);
    return packing === undefined ? undefined : { packing, height: bed.height, segments, redistributorVolume };
  });
  const hydraulics = readHydraulics(reading, key('hydraulics'), given.hydraulics);
  const transfer = readTransfer(reading, key('transfer'), given.transfer);
  const complete = beds.filter((bed) => bed !== undefined);
  if (transfer === undefined || complete.length < beds.length) return undefined;
  checkConstants(reading, complete, hydraulics, transfer);
  checkHeight(reading, given);
  const flooding = given.flooding ?? {};
  return {
    diameter: given.diameter,
    shellHeight: given.shellHeight,
    topPressure: reading.fill(key('topPressure'), given.topPressure, COLUMN.topPressure),
    beds: complete,
    hydraulics,
    transfer,
    flooding: {
      deflooding: reading.fill(key('flooding.deflooding'), flooding.deflooding, COLUMN.deflooding),
      transferLeft: reading.fill(key('flooding.transferLeft'), flooding.transferLeft, COLUMN.transferLeft),
      fullShare: reading.fill(key('flooding.fullShare'), flooding.fullShare, COLUMN.fullShare),
    },
    staticAreaShare: reading.fill(key('staticAreaShare'), given.staticAreaShare, COLUMN.staticAreaShare),
    heatLoss: { coefficient: reading.fill(key('heatLoss.coefficient'), given.heatLoss?.coefficient, COLUMN.heatLoss) },
    ambientTemperature: reading.fill(key('ambientTemperature'), given.ambientTemperature, COLUMN.ambientTemperature),
    distribution: given.distribution,
    axialMixing: { gas: given.axialMixing?.gas, liquid: given.axialMixing?.liquid },
    isothermal: reading.fill(key('isothermal'), given.isothermal, COLUMN.isothermal),
    evaporation: reading.fill(key('evaporation'), given.evaporation, COLUMN.evaporation),
  };
}

function readHydraulics(reading: Reading, path: string, given: ColumnText['hydraulics']): Hydraulics {
  const text = given ?? { model: reading.fill(join(path, 'model'), undefined, COLUMN.hydraulics) };
  if (text.model === 'power-law' || text.model === 'prescribed') {
    reading.stated(join(path, 'model'));
    return text;
  }
  const share = text.staticHoldup === 'correlation' ? undefined : text.staticHoldup;
  const staticHoldup = reading.fill<number | undefined>(join(path, 'staticHoldup'), share, COLUMN.staticHoldup);
  if (text.model === 'billet-schultes') return { model: text.model, staticHoldup };
  return {
    model: text.model,
    holdupFactor: reading.fill(join(path, 'holdupFactor'), text.holdupFactor, COLUMN.holdupFactor),
    loadingFactor: reading.fill(join(path, 'loadingFactor'), text.loadingFactor, COLUMN.loadingFactor),
    staticHoldup,
  };
}

function readTransfer(reading: Reading, path: string, given: TransferText | undefined): Transfer | undefined {
  const text = given ?? { model: reading.fill(join(path, 'model'), undefined, COLUMN.transfer) };
  if (text.model === 'measured') return readMeasuredTransfer(reading, path, text);
  const scales = {
    scaleArea: reading.fill(join(path, 'scaleArea'), text.scaleArea, COLUMN.scale),
    scaleKL: reading.fill(join(path, 'scaleKL'), text.scaleKL, COLUMN.scale),
    scaleKG: reading.fill(join(path, 'scaleKG'), text.scaleKG, COLUMN.scale),
  };
  if (text.model === 'billet-schultes') return { model: text.model, ...scales };
  return {
    model: text.model,
    kLFactor: reading.fill(join(path, 'kLFactor'), text.kLFactor, COLUMN.kLFactor),
    kGFactor: reading.fill<number | undefined>(join(path, 'kGFactor'), text.kGFactor, COLUMN.kGFactor),
    areaFactor: reading.fill(join(path, 'areaFactor'), text.areaFactor, COLUMN.areaFactor),
    ...scales,
  };
}

type MeasuredText = Extract<TransferText, { model: 'measured' }>;

function readMeasuredTransfer(reading: Reading, path: string, text: MeasuredText): Transfer | undefined {
  const { NOG, HOG, KGa, Kya, HG, HL } = text;
  const stated = Object.entries({ NOG, HOG, KGa, Kya, 'HG and HL': HG ?? HL }).filter(
    ([, value]) => value !== undefined,
  );
  if (stated.length !== 1) {
    const received = stated.length === 0 ? 'none' : stated.map(([name]) => name).join(', ');
    reading.object('contradiction', path, 'exactly one of NOG, HOG, KGa, Kya, or HG and HL', received);
    return undefined;
  }
  if ((HG === undefined) !== (HL === undefined)) {
    reading.object('missing', join(path, HG === undefined ? 'HG' : 'HL'), 'both HG and HL', 'one of them');
    return undefined;
  }
  const exponents = {
    gasExponent: reading.fill(join(path, 'gasExponent'), text.gasExponent, COLUMN.measuredExponent),
    liquidExponent: reading.fill(join(path, 'liquidExponent'), text.liquidExponent, COLUMN.measuredExponent),
  };
  for (const [name] of stated) reading.stated(join(path, name));
  const measured = (statedAs: Extract<Transfer, { model: 'measured' }>['statedAs']): Transfer => ({
    model: 'measured',
    statedAs,
    ...exponents,
  });
  if (NOG !== undefined) return measured({ kind: 'NOG', value: NOG });
  if (HOG !== undefined) return measured({ kind: 'HOG', value: HOG });
  if (KGa !== undefined) return measured({ kind: 'KGa', value: KGa });
  if (Kya !== undefined) return measured({ kind: 'Kya', value: Kya });
  if (HG !== undefined && HL !== undefined) return measured({ kind: 'HG-HL', HG, HL });
  return undefined;
}

/** A packing, or undefined after noting why not. */
function readPacking(reading: Reading, path: string, given: PackingText): Packing | undefined {
  const own: Exclude<PackingText, string> = typeof given === 'string' ? { base: given } : given;
  const base = listed(PACKINGS, own.base);
  if (own.base !== undefined && base === undefined) {
    reading.unknown(
      typeof given === 'string' ? path : join(path, 'base'),
      'a library packing',
      own.base,
      Object.keys(PACKINGS),
    );
    return undefined;
  }
  const need = (name: string, value: number | undefined, entry: PackingEntry['a'] | undefined): number | undefined => {
    const where = join(path, name);
    if (entry !== undefined) return reading.fill(where, value, { value: entry.value, ...origin(entry) });
    if (value === undefined)
      reading.object('missing', where, 'a value', 'nothing', 'without "base" this number is needed');
    else reading.stated(where);
    return value;
  };
  const nominalSize = need('nominalSize', own.nominalSize, base?.size);
  const area = need('area', own.area, base?.a);
  const voidFraction = need('voidFraction', own.voidFraction, base?.eps);
  const criticalSurfaceTension = need('criticalSurfaceTension', own.criticalSurfaceTension, base?.sigmaC);
  const solidHeatCapacity = need('solidHeatCapacity', own.solidHeatCapacity, solidOf(base));
  if (
    nominalSize === undefined ||
    area === undefined ||
    voidFraction === undefined ||
    criticalSurfaceTension === undefined ||
    solidHeatCapacity === undefined
  ) {
    return undefined;
  }
  const before = reading.issues.length;
  const friction = constants(
    reading,
    join(path, 'friction'),
    ['C1', 'C2', 'C3'] as const,
    own.friction,
    base?.stichlmair,
  );
  const billet = constants(
    reading,
    join(path, 'billet'),
    ['CL', 'CV', 'Ch', 'Cp0', 'CS', 'CFl'] as const,
    own.billet,
    base?.billet,
  );
  if (reading.issues.length > before) return undefined;
  return {
    id: own.id ?? base?.id ?? 'own-packing',
    shape: own.shape ?? base?.shape ?? 'own packing',
    material: own.material ?? base?.material ?? 'not stated',
    nominalSize,
    area,
    voidFraction,
    packingFactor: own.packingFactor ?? base?.packingFactor?.value,
    friction,
    billet,
    criticalSurfaceTension,
    solidHeatCapacity,
  };
}

/** A set of constants, the case's over the library's; undefined when some are missing and none is the case's. */
function constants<K extends string>(
  reading: Reading,
  path: string,
  names: readonly K[],
  own: { readonly [N in K]?: number | undefined } | undefined,
  known:
    | {
        readonly value: { readonly [N in K]?: number };
        readonly source: string;
        readonly verified: 'seen' | 'from memory' | 'computed' | 'demo';
      }
    | undefined,
): Record<K, number> | undefined {
  const out: Partial<Record<K, number>> = {};
  const missing: K[] = [];
  for (const name of names) {
    const value = own?.[name] ?? known?.value[name];
    if (value === undefined) missing.push(name);
    else out[name] = value;
  }
  if (missing.length > 0) {
    for (const name of own === undefined ? [] : missing) {
      reading.object('missing', join(path, name), 'a value', 'nothing', 'the library has none for this packing');
    }
    return undefined;
  }
  if (own !== undefined) reading.stated(path);
  else if (known !== undefined) reading.taken(path, known.source, origin(known).verified);
  return out as Record<K, number>;
}

/** J/(m3 K) of the solid. */
function solidOf(base: PackingEntry | undefined): PackingEntry['a'] | undefined {
  const solid = base === undefined ? undefined : SOLIDS[base.material];
  if (solid === undefined) return undefined;
  return { ...solid.heatCapacity, value: solid.density.value * solid.heatCapacity.value };
}

/** The correlations that were chosen need constants that every packing has. */
function checkConstants(reading: Reading, beds: readonly Bed[], hydraulics: Hydraulics, transfer: Transfer): void {
  const billet = hydraulics.model === 'billet-schultes' || transfer.model === 'billet-schultes';
  beds.forEach(({ packing }, index) => {
    const path = `column.beds[${index}].packing`;
    if (hydraulics.model === 'stichlmair-bravo-fair' && packing.friction === undefined) {
      reading.object(
        'missing',
        join(path, 'friction'),
        'friction constants C1, C2, C3, which the hydraulics need',
        `${packing.id} without them`,
        `write for example {"base": "${packing.id}", "friction": {"C1": ..., "C2": ..., "C3": ...}} or choose other hydraulics`,
      );
    }
    if (billet && packing.billet === undefined) {
      reading.object(
        'missing',
        join(path, 'billet'),
        'the constants CL, CV, Ch, Cp0, CS, CFl, which the correlation needs',
        `${packing.id} without all of them`,
      );
    }
  });
}

function checkHeight(reading: Reading, given: ColumnText): void {
  const packed = given.beds.reduce((sum, bed) => sum + bed.height, 0);
  if (given.shellHeight !== undefined && packed > given.shellHeight) {
    reading.object(
      'contradiction',
      'column.beds',
      `beds that fit into the shell of ${given.shellHeight} m`,
      `${packed} m of packing`,
      'lower the beds or raise shellHeight',
    );
  }
}
