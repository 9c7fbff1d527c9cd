// Origins of library numbers in the words of a case.

import type { Sourced } from '../../properties/provenance.ts';
import type { Provenance } from '../case.ts';

/** Origin of a library number in the words of a case. */
export function origin(entry: Sourced<unknown> | undefined): Pick<Provenance, 'source' | 'verified'> {
  if (entry === undefined) return { source: 'library', verified: 'from memory' };
  return { source: entry.source, verified: entry.verified === 'demo' ? 'judgement' : entry.verified };
}
