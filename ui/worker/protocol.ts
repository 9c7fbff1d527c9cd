/**
 * What the page and its worker say to each other. Requests carry an id that the answers repeat; a computation also
 * names its slot: a newer one for the same slot takes the place of an older one, queued or running. Arrays of numbers
 * are transferred, never copied; whoever receives a packet owns it.
 */
import type { BedMap, RunPacket } from './packet.ts';
import type { Case, ConvergenceBlock, Issue, SecondOpinionBlock, SteadyAnswer } from '../../sim/index.ts';

/** A case as its reader needs it: the text, and the texts of the files that it names. */
export interface CaseSource {
  readonly text: string;
  /** By the name that the case uses. */ readonly files: Readonly<Record<string, string>>;
}

/** `draft`: few segments, loose tolerance, to show something at once; `full`: as the case asks. */
export type Quality = 'draft' | 'full';

/** A scenario of a case to be computed. */
export interface RunRequest extends CaseSource {
  readonly scenario: string;
  readonly quality: Quality;
}

/** A file made of a run: as the command line writes it. */
export type ExportForm = 'json' | 'csv';

/** Long looks at a run, on request. */
export type Study = 'second-opinion' | 'convergence';

/** From the page to the worker. */
export type Request =
  | ({ readonly kind: 'read'; readonly id: number } & CaseSource)
  | ({ readonly kind: 'run'; readonly id: number; readonly slot: string } & RunRequest)
  | ({ readonly kind: 'steady'; readonly id: number } & CaseSource)
  | ({ readonly kind: 'export'; readonly id: number; readonly form: ExportForm } & RunRequest)
  | ({ readonly kind: 'study'; readonly id: number; readonly study: Study } & RunRequest)
  /** Stops what runs or waits in a slot. */
  | { readonly kind: 'stop'; readonly slot: string };

/** What reading a case gave. */
export type ReadAnswer =
  | { readonly ok: true; readonly plant: Case; readonly warnings: readonly Issue[] }
  | { readonly ok: false; readonly issues: readonly Issue[]; readonly warnings: readonly Issue[] };

/** What the steady state gave: the answer, and why the plant cannot run where it cannot. */
export interface SteadyReport {
  readonly answer: SteadyAnswer | undefined;
  readonly issues: readonly Issue[];
  readonly warnings: readonly Issue[];
  /** Profile along the depth at the steady state; one moment. */ readonly profile: BedMap | undefined;
}

/** What a study gave. */
export type StudyAnswer =
  | { readonly study: 'second-opinion'; readonly block: SecondOpinionBlock }
  | { readonly study: 'convergence'; readonly block: ConvergenceBlock };

/** From the worker to the page. */
export type Answer =
  | { readonly kind: 'ready' }
  | { readonly kind: 'read'; readonly id: number; readonly result: ReadAnswer }
  /** Share of the scenario's time that is computed, 0..1. */
  | { readonly kind: 'progress'; readonly id: number; readonly share: number }
  | { readonly kind: 'run'; readonly id: number; readonly packet: RunPacket }
  | { readonly kind: 'steady'; readonly id: number; readonly report: SteadyReport }
  | { readonly kind: 'export'; readonly id: number; readonly text: string }
  | { readonly kind: 'study'; readonly id: number; readonly answer: StudyAnswer }
  /** The case has issues, or no such scenario. */
  | { readonly kind: 'refused'; readonly id: number; readonly issues: readonly Issue[] }
  /** Stopped on request, or by a newer request for the same slot. */
  | { readonly kind: 'stopped'; readonly id: number }
  /** A mistake of the program: the message for a report. */
  | { readonly kind: 'fault'; readonly id: number; readonly message: string };
