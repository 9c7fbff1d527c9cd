/** What happened when: the entries of a run's event list. */

/** Sorts of event. */
export type EventKind =
  | 'upset'
  | 'action'
  | 'alarm'
  | 'alarm-cleared'
  | 'interlock'
  | 'interlock-bypassed'
  | 'interlock-reset'
  | 'interlock-refused'
  | 'command-refused'
  | 'true-crossing'
  | 'shown-crossing'
  | 'limit-crossed'
  | 'limit-kept-again'
  | 'flooding'
  | 'flooding-over'
  | 'carry-over'
  | 'carry-over-over'
  | 'range-left';

/** An entry of the event list. */
export interface RunEvent {
  /** s from the start of the scenario. */ readonly time: number;
  readonly kind: EventKind;
  /** Tag or id that it is about. */ readonly tag: string;
  /** In words, without the time. */ readonly text: string;
  /** SI value where there is one. */ readonly value?: number;
}
