// Random packings as generic shapes. Geometry and constants carry their own origin: a set belongs to
// its author's area and voidage, the same nominal packing differs by 10 % between tables. A constant
// that is not known is absent: a case may state it, nobody guesses it here.

import { fromMemory, seen } from '../../properties/provenance.ts';
import type { Sourced } from '../../properties/provenance.ts';
import type { PackingMaterial } from '../packing-material.ts';
import { CRITICAL_SURFACE_TENSION } from '../packing-material.ts';
import type { BilletConstants, StichlmairConstants } from '../packing.ts';

/** A packing with the origin of each number. */
export interface PackingEntry {
  readonly id: string;
  readonly name: string;
  readonly shape: string;
  readonly material: PackingMaterial;
  /** Nominal size, m. */
  readonly size: Sourced;
  /** Specific area, m2/m3. */
  readonly a: Sourced;
  /** Void fraction. */
  readonly eps: Sourced;
  /** Packing factor of the pressure-drop charts, 1/m; not the dry factor of Robbins. */
  readonly packingFactor?: Sourced;
  /** Packing factor of Treybal's flood chart, 1/m: another number than the packing factor. */
  readonly treybalFactor?: Sourced;
  /** Friction constants; absent for most packings. */
  readonly stichlmair?: Sourced<StichlmairConstants>;
  readonly billet?: Sourced<BilletConstants>;
  /** Critical surface tension of the material, N/m. */
  readonly sigmaC: Sourced;
  readonly note?: string;
}

const SINNOTT = '[Sinnott2005] table of packing data';
const BILLET = '[Billet1999] tables of packings';

function entry(data: Omit<PackingEntry, 'name' | 'sigmaC'>): PackingEntry {
  const millimetres = Math.round(data.size.value * 1000);
  return {
    ...data,
    name: `${data.shape}, ${data.material}, ${String(millimetres)} mm`,
    sigmaC: CRITICAL_SURFACE_TENSION[data.material],
  };
}

const ENTRIES: readonly PackingEntry[] = [
  entry({
    id: 'RR-CER-13',
    shape: 'Raschig ring',
    material: 'ceramic',
    size: fromMemory(0.013, SINNOTT),
    a: fromMemory(368, SINNOTT),
    eps: fromMemory(0.64, SINNOTT),
    packingFactor: fromMemory(2100, SINNOTT),
  }),
  entry({
    id: 'RR-CER-25a',
    shape: 'Raschig ring',
    material: 'ceramic',
    size: fromMemory(0.025, BILLET),
    a: fromMemory(190, BILLET),
    eps: fromMemory(0.68, BILLET),
    packingFactor: fromMemory(525, SINNOTT),
    billet: fromMemory({ Ch: 0.577, Cp0: 1.329, CL: 1.361, CV: 0.412, CS: 2.454, CFl: 1.899 }, BILLET),
  }),
  entry({
    id: 'RR-CER-38',
    shape: 'Raschig ring',
    material: 'ceramic',
    size: fromMemory(0.038, SINNOTT),
    a: fromMemory(128, SINNOTT),
    eps: fromMemory(0.73, SINNOTT),
    packingFactor: fromMemory(310, SINNOTT),
  }),
  entry({
    id: 'RR-CER-50',
    shape: 'Raschig ring',
    material: 'ceramic',
    size: fromMemory(0.05, BILLET),
    a: fromMemory(95, BILLET),
    eps: fromMemory(0.83, BILLET),
    packingFactor: fromMemory(210, SINNOTT),
    billet: fromMemory({ CL: 1.416, CV: 0.21, CS: 2.482, CFl: 1.547 }, BILLET),
    note: 'handbooks often give a voidage of 0.74 for this size',
  }),
  entry({
    id: 'RR-MET-25',
    shape: 'Raschig ring',
    material: 'metal',
    size: fromMemory(0.025, SINNOTT),
    a: fromMemory(207, SINNOTT),
    eps: fromMemory(0.86, SINNOTT),
    packingFactor: fromMemory(375, SINNOTT),
  }),
  entry({
    id: 'RR-MET-50',
    shape: 'Raschig ring',
    material: 'metal',
    size: fromMemory(0.051, SINNOTT),
    a: fromMemory(102, SINNOTT),
    eps: fromMemory(0.92, SINNOTT),
    packingFactor: fromMemory(190, SINNOTT),
  }),
  entry({
    id: 'PR-MET-16',
    shape: 'Pall ring',
    material: 'metal',
    size: fromMemory(0.016, SINNOTT),
    a: fromMemory(341, SINNOTT),
    eps: fromMemory(0.93, SINNOTT),
    packingFactor: fromMemory(230, SINNOTT),
  }),
  entry({
    id: 'PR-MET-25',
    shape: 'Pall ring',
    material: 'metal',
    size: fromMemory(0.025, BILLET),
    a: fromMemory(223.5, BILLET),
    eps: fromMemory(0.954, BILLET),
    packingFactor: fromMemory(160, SINNOTT),
    stichlmair: fromMemory({ C1: 0.05, C2: 1, C3: 3 }, '[Stichlmair1989] table of constants; low confidence'),
    billet: fromMemory({ Ch: 0.719, Cp0: 0.957, CL: 1.44, CV: 0.336, CS: 2.627, CFl: 2.083 }, BILLET),
    note: 'area of the friction constants: about 215 m2/m3',
  }),
  entry({
    id: 'PR-MET-35',
    shape: 'Pall ring',
    material: 'metal',
    size: fromMemory(0.035, BILLET),
    a: fromMemory(139.4, BILLET),
    eps: fromMemory(0.965, BILLET),
    packingFactor: fromMemory(92, SINNOTT),
    stichlmair: fromMemory({ C1: 0.1, C2: 0.1, C3: 2.1 }, '[Stichlmair1989] table of constants; low confidence'),
    billet: fromMemory({ Ch: 0.644, Cp0: 0.967, CL: 1.012, CV: 0.341, CS: 2.629, CFl: 1.679 }, BILLET),
  }),
  entry({
    id: 'PR-MET-50',
    shape: 'Pall ring',
    material: 'metal',
    size: fromMemory(0.05, BILLET),
    a: fromMemory(112.6, BILLET),
    eps: fromMemory(0.951, BILLET),
    packingFactor: fromMemory(66, SINNOTT),
    billet: fromMemory({ Ch: 0.784, Cp0: 0.763, CL: 1.192, CV: 0.41, CS: 2.725, CFl: 1.58 }, BILLET),
  }),
  entry({
    id: 'PR-PLA-25',
    shape: 'Pall ring',
    material: 'plastic',
    size: fromMemory(0.025, BILLET),
    a: fromMemory(225, BILLET),
    eps: fromMemory(0.887, BILLET),
    packingFactor: fromMemory(170, SINNOTT),
    billet: fromMemory({ Ch: 0.528, Cp0: 0.865, CL: 0.905, CV: 0.446, CS: 2.696, CFl: 2.064 }, BILLET),
  }),
  entry({
    id: 'PR-PLA-35',
    shape: 'Pall ring',
    material: 'plastic',
    size: fromMemory(0.035, BILLET),
    a: fromMemory(151.1, BILLET),
    eps: fromMemory(0.906, BILLET),
    packingFactor: fromMemory(130, SINNOTT),
    billet: fromMemory({ Ch: 0.718, Cp0: 0.927, CL: 0.856, CV: 0.38, CS: 2.654, CFl: 1.742 }, BILLET),
  }),
  entry({
    id: 'PR-PLA-50',
    shape: 'Pall ring',
    material: 'plastic',
    size: fromMemory(0.05, BILLET),
    a: fromMemory(111.1, BILLET),
    eps: fromMemory(0.919, BILLET),
    packingFactor: fromMemory(82, SINNOTT),
    billet: fromMemory({ Ch: 0.593, Cp0: 0.698, CL: 1.239, CV: 0.368, CS: 2.816, CFl: 1.757 }, BILLET),
  }),
  entry({
    id: 'PR-PLA-90',
    shape: 'Pall ring',
    material: 'plastic',
    size: fromMemory(0.089, SINNOTT),
    a: fromMemory(85, SINNOTT),
    eps: fromMemory(0.95, SINNOTT),
    packingFactor: fromMemory(52, SINNOTT),
  }),
  entry({
    id: 'BS-CER-13',
    shape: 'Berl saddle',
    material: 'ceramic',
    size: fromMemory(0.013, SINNOTT),
    a: seen(546, '[Kolev2006] table 1, after Billet'),
    eps: seen(0.65, '[Kolev2006] table 1, after Billet'),
    billet: fromMemory({ Ch: 0.833, CL: 1.364, CV: 0.232 }, BILLET),
  }),
  entry({
    id: 'BS-CER-25',
    shape: 'Berl saddle',
    material: 'ceramic',
    size: fromMemory(0.025, SINNOTT),
    a: seen(260, '[Stichlmair1989] worked example (seen quoted)'),
    eps: seen(0.68, '[Stichlmair1989] worked example (seen quoted)'),
    packingFactor: fromMemory(360, 'handbook table of packing factors'),
    stichlmair: seen({ C1: 32, C2: 7, C3: 1 }, '[Stichlmair1989] worked example (seen quoted)'),
    billet: fromMemory({ Ch: 0.62, CL: 1.246, CV: 0.387 }, BILLET),
    note: 'the shape of the example is from memory',
  }),
  entry({
    id: 'BS-CER-38',
    shape: 'Berl saddle',
    material: 'ceramic',
    size: fromMemory(0.038, SINNOTT),
    a: seen(164, '[Kolev2006] table 1, after Billet'),
    eps: seen(0.7, '[Kolev2006] table 1, after Billet'),
    packingFactor: fromMemory(215, 'handbook table of packing factors'),
    note: 'another text gives a voidage of 0.75',
  }),
  entry({
    id: 'SAD-CER-13',
    shape: 'rounded saddle',
    material: 'ceramic',
    size: fromMemory(0.013, SINNOTT),
    a: fromMemory(480, SINNOTT),
    eps: fromMemory(0.71, SINNOTT),
    packingFactor: fromMemory(660, SINNOTT),
  }),
  entry({
    id: 'SAD-CER-25',
    shape: 'rounded saddle',
    material: 'ceramic',
    size: fromMemory(0.025, SINNOTT),
    a: fromMemory(253, SINNOTT),
    eps: fromMemory(0.73, SINNOTT),
    packingFactor: fromMemory(300, SINNOTT),
    treybalFactor: seen(98, '[Treybal1980] illustration 6.5'),
  }),
  entry({
    id: 'SAD-CER-38',
    shape: 'rounded saddle',
    material: 'ceramic',
    size: fromMemory(0.038, SINNOTT),
    a: fromMemory(194, SINNOTT),
    eps: fromMemory(0.74, SINNOTT),
    packingFactor: fromMemory(170, SINNOTT),
  }),
  entry({
    id: 'SAD-CER-50',
    shape: 'rounded saddle',
    material: 'ceramic',
    size: fromMemory(0.051, SINNOTT),
    a: fromMemory(108, SINNOTT),
    eps: fromMemory(0.75, SINNOTT),
    packingFactor: fromMemory(130, SINNOTT),
  }),
];

/** Packings by the word a case uses. */
export const PACKINGS: Readonly<Record<string, PackingEntry>> = Object.fromEntries(
  ENTRIES.map((packing) => [packing.id, packing]),
);
