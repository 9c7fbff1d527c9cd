// The equilibrium of a solute: the model that the case names, its constants from the case or the library,
// or a table typed in or read from CSV.

import type { Solute as LibrarySolute } from '../../properties/library/solutes.ts';
import type { Equilibrium, Provenance } from '../case.ts';
import { join } from '../issues.ts';
import type { Reading } from '../reading.ts';
import type { EquilibriumText } from '../schema/substances.ts';
import { checkTable, readEquilibriumFile } from './equilibrium-table.ts';
import { origin } from './origin.ts';

const CELSIUS_ZERO = 273.15;
const LN_THOUSAND = Math.log(1000);

/** The equilibrium, or undefined after noting why not. */
export function readEquilibrium(
  reading: Reading,
  path: string,
  given: EquilibriumText | undefined,
  base: LibrarySolute | undefined,
  solventId: string,
): Equilibrium | undefined {
  const text = given ?? chosen(reading, path, base, solventId);
  if (text === undefined) return undefined;
  const inWater = solventId === 'water';
  const need = (
    key: string,
    own: number | undefined,
    listed: number | undefined,
    from: Origin | undefined,
  ): number | undefined => {
    const where = join(path, key);
    if (own !== undefined) {
      reading.stated(where);
      return own;
    }
    if (listed === undefined) {
      reading.object('missing', where, 'a value', 'nothing', `the library has none for this solute in ${solventId}`);
      return undefined;
    }
    reading.taken(where, from?.source ?? 'library', from?.verified ?? 'from memory');
    return listed;
  };
  const henry = inWater ? base?.henryInWater : undefined;
  const laar = inWater ? base?.vanLaarInWater : undefined;
  switch (text.model) {
    case 'constant-ratio':
      reading.stated(join(path, 'm'));
      return { model: 'constant-ratio', m: text.m };
    case 'table':
      return readTable(reading, path, text);
    case 'henry':
    case 'henry-van-laar': {
      const solubility = need('solubility', text.solubility, henry?.value.H, origin(henry));
      const temperatureFactor = need('temperatureFactor', text.temperatureFactor, henry?.value.B, origin(henry));
      if (solubility === undefined || temperatureFactor === undefined) return undefined;
      if (text.model === 'henry') return { model: 'henry', solubility, temperatureFactor };
      const A12 = need('A12', text.A12, laar?.value.A12, origin(laar));
      const A21 = need('A21', text.A21, laar?.value.A21, origin(laar));
      if (A12 === undefined || A21 === undefined) return undefined;
      return { model: 'henry-van-laar', solubility, temperatureFactor, A12, A21 };
    }
    case 'van-laar':
    case 'raoult': {
      const antoine = base?.antoine;
      const own = text.vapourPressure;
      const A = need(
        'vapourPressure.A',
        own?.A,
        antoine === undefined ? undefined : antoine.value.A + LN_THOUSAND,
        origin(antoine),
      );
      const B = need('vapourPressure.B', own?.B, antoine?.value.B, origin(antoine));
      const C = need(
        'vapourPressure.C',
        own?.C,
        antoine === undefined ? undefined : antoine.value.C - CELSIUS_ZERO,
        origin(antoine),
      );
      if (A === undefined || B === undefined || C === undefined) return undefined;
      const vapourPressure = { A, B, C };
      if (text.model === 'raoult') return { model: 'raoult', vapourPressure };
      const A12 = need('A12', text.A12, laar?.value.A12, origin(laar));
      const A21 = need('A21', text.A21, laar?.value.A21, origin(laar));
      if (A12 === undefined || A21 === undefined) return undefined;
      return { model: 'van-laar', A12, A21, vapourPressure };
    }
  }
}

type Origin = Pick<Provenance, 'source' | 'verified'>;

/** The model for a case that names none: Henry where it is listed, Raoult in other solvents. */
function chosen(
  reading: Reading,
  path: string,
  base: LibrarySolute | undefined,
  solventId: string,
): EquilibriumText | undefined {
  const model = join(path, 'model');
  if (solventId === 'water' && base?.henryInWater !== undefined) {
    reading.taken(model, "Henry's law; choice of the program for a dilute solute in water", 'judgement');
    return { model: 'henry' };
  }
  if (solventId !== 'water' && base?.antoine !== undefined) {
    reading.taken(model, "Raoult's law; choice of the program for an organic solvent", 'judgement');
    return { model: 'raoult' };
  }
  reading.object('missing', path, 'an equilibrium', 'nothing', `the library has none for this solute in ${solventId}`);
  return undefined;
}

function readTable(
  reading: Reading,
  path: string,
  text: Extract<EquilibriumText, { model: 'table' }>,
): Equilibrium | undefined {
  const { file, temperature, moleFraction, pressure } = text;
  const typed = temperature !== undefined || moleFraction !== undefined || pressure !== undefined;
  if (file !== undefined) {
    if (typed) {
      reading.object('contradiction', path, 'a file or typed numbers', 'both', 'leave one out');
      return undefined;
    }
    return readEquilibriumFile(reading, join(path, 'file'), file);
  }
  if (temperature === undefined || moleFraction === undefined || pressure === undefined) {
    reading.object('missing', path, 'temperature, moleFraction and pressure, or a file', 'a part of them');
    return undefined;
  }
  return checkTable(reading, path, temperature, moleFraction, pressure);
}
