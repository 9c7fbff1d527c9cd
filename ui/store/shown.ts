/** What elements get to see of the simulator: types of runs, cases and issues, through the store. */
export type { RunState } from './run-slots.ts';
export type { Branch, Units, Work } from './work.ts';
export type { BedMap, InstrumentLane, LimitLane, MapQuantity, RunPacket, SetpointLine } from '../worker/packet.ts';
export type { ExportForm, SteadyReport, Study, StudyAnswer } from '../worker/protocol.ts';
export { issueSentence, type Case, type Issue, type QuantityKind } from '../../sim/index.ts';
