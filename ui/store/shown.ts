/** What elements get to see of the simulator: types of runs, cases and issues, through the store. */
export type { RunState } from './run-slots.ts';
export type { Branch, Units } from './work.ts';
export type { MapQuantity, RunPacket } from '../worker/packet.ts';
export type { Study } from '../worker/protocol.ts';
export { issueSentence, type Issue, type QuantityKind } from '../../sim/index.ts';
