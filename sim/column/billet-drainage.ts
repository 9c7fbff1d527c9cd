import type { Bed, Case } from '../case/case.ts';
import type { Fluids } from './fluids.ts';
import type { Hydraulics } from './hydraulics.ts';
export function createBilletDrainage(_p: Case, _f: Fluids, _b: Bed, _s: number): Hydraulics {
  throw new Error('later');
}
