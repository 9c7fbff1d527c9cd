/** A driver over any stepper: stop times, output times and events. For general use; a simulation may have its own. */

import type { CrossingDirection } from './event-location.ts';
import { firstCrossing } from './event-location.ts';
import type { StepFailure, Stepper, StepperStats } from './stepper.ts';

/** A scalar whose change of sign is to be located. */
export interface EventFunction {
  readonly name: string;
  g(t: number, y: Float64Array): number;
  readonly direction: CrossingDirection;
  /** True: the integration ends there. */
  readonly terminal: boolean;
}

/** A located event. */
interface EventRecord {
  readonly name: string;
  /** First time, within the tolerance, at which g has crossed. */
  readonly t: number;
  /** Interpolated state there. */
  readonly y: Float64Array;
  readonly direction: 'rising' | 'falling';
}

/** What to do on the way to `tEnd`. */
export interface IntegrationPlan {
  readonly tEnd: number;
  /** Times at which a step must end exactly, ascending. */
  readonly stops?: readonly number[];
  /** Times at which the continuous solution is wanted, ascending. */
  readonly outputTimes?: readonly number[];
  readonly events?: readonly EventFunction[];
  /** Width of the bracket of an event, in the unit of t; default 1e-10. */
  readonly eventTolerance?: number;
  /** Parts in which each step is searched for events; default 4. More: shorter excursions are seen. */
  readonly eventParts?: number;
}

/** Why the integration ended. */
type IntegrationOutcome =
  | { readonly kind: 'reached-end' }
  | { readonly kind: 'event'; readonly name: string }
  | { readonly kind: 'failed'; readonly failure: StepFailure };

/** What came of it. `t` and `y`: where it ended; after a terminal event, the event. */
export interface IntegrationResult {
  readonly t: number;
  readonly y: Float64Array;
  readonly outcome: IntegrationOutcome;
  readonly events: readonly EventRecord[];
  /** Solution at the output times that were reached. */
  readonly outputs: readonly { readonly t: number; readonly y: Float64Array }[];
  readonly stats: Readonly<StepperStats>;
}

const DEFAULT_EVENT_TOLERANCE = 1e-10;
const DEFAULT_EVENT_PARTS = 4;

/** Integrates a started stepper according to the plan. */
export function integrate(stepper: Stepper, plan: IntegrationPlan): IntegrationResult {
  const stops = [...(plan.stops ?? []).filter((stop) => stop < plan.tEnd), plan.tEnd];
  const outputs: { t: number; y: Float64Array }[] = [];
  const events: EventRecord[] = [];
  const functions = plan.events ?? [];
  const outputTimes = plan.outputTimes ?? [];
  const gValues = functions.map((event) => event.g(stepper.t, stepper.y));
  let nextOutput = outputTimes.findIndex((t) => t > stepper.t);
  if (nextOutput < 0) nextOutput = outputTimes.length;

  function stateAt(t: number): Float64Array {
    const y = new Float64Array(stepper.y.length);
    stepper.interpolate(t, y);
    return y;
  }

  function collectOutputs(until: number): void {
    for (; nextOutput < outputTimes.length && outputTimes[nextOutput] <= until; nextOutput++) {
      outputs.push({ t: outputTimes[nextOutput], y: stateAt(outputTimes[nextOutput]) });
    }
  }

  /** Events of the last step in order of time, and the values of g at its end. */
  function locateEvents(): { record: EventRecord; terminal: boolean }[] {
    const found: { record: EventRecord; terminal: boolean }[] = [];
    functions.forEach((event, index) => {
      const gEnd = event.g(stepper.t, stepper.y);
      const crossing = firstCrossing(
        (t) => event.g(t, stateAt(t)),
        stepper.tPrevious,
        stepper.t,
        gValues[index],
        gEnd,
        {
          direction: event.direction,
          parts: plan.eventParts ?? DEFAULT_EVENT_PARTS,
          tolerance: plan.eventTolerance ?? DEFAULT_EVENT_TOLERANCE,
        },
      );
      gValues[index] = gEnd;
      if (crossing === undefined) return;
      const { after, direction } = crossing;
      const record = { name: event.name, t: after, y: stateAt(after), direction };
      found.push({ record, terminal: event.terminal });
    });
    return found.sort((a, b) => a.record.t - b.record.t);
  }

  function result(t: number, y: Float64Array, outcome: IntegrationOutcome): IntegrationResult {
    return { t, y: y.slice(), outcome, events, outputs, stats: stepper.stats };
  }

  for (const stop of stops) {
    while (stepper.t < stop) {
      const outcome = stepper.step(stop);
      if (outcome.kind === 'failed') return result(stepper.t, stepper.y, outcome);
      for (const { record, terminal } of locateEvents()) {
        events.push(record);
        if (!terminal) continue;
        collectOutputs(record.t);
        return result(record.t, record.y, { kind: 'event', name: record.name });
      }
      collectOutputs(stepper.t);
    }
  }
  return result(stepper.t, stepper.y, { kind: 'reached-end' });
}
