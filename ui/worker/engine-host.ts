/**
 * The worker's side of the protocol, without the worker: takes requests, works them off by priority, posts answers.
 * Long runs are computed in slices, so that a newer request or a stop is heard in between; the integrator's steps stay
 * the same (a run is left between two steps and gone on with). A second opinion cannot be left: it runs to its end.
 */
import {
  checkPlant,
  convergenceOf,
  createRun,
  readCase,
  resultOf,
  secondOpinionOf,
  steadyAnswers,
  steadyScenario,
  writeCsv,
  writeResult,
  type Case,
  type Issue,
  type ReadResult,
  type Run,
  type Scenario,
} from '../../sim/index.ts';
import { buffersOf, packMap, packRun } from './pack.ts';
import type { Answer, CaseSource, Quality, Request, RunRequest, SteadyReport } from './protocol.ts';

/** What the host needs from its surroundings. */
export interface Surroundings {
  post(answer: Answer, transfer: ArrayBuffer[]): void;
  /** ms, for slices only. */ now(): number;
  /** Lets waiting messages in. */ pause(): Promise<void>;
}

type Job = Exclude<Request, { kind: 'stop' }>;
interface Waiting {
  readonly job: Job;
  stopped: boolean;
}

/** Work between two looks at the messages, ms. */
const SLICE = 40;
/** Segments of a draft in all, and its tolerance: within some per cent of the whole run (engineering judgement). */
const DRAFT_SEGMENTS = 12;
const DRAFT_TOLERANCE = 1e-3;
/** Most moments of a bed map. */
const MAP_MOMENTS = 480;
/** Cases and finished runs that are kept. */
const KEPT_CASES = 8;
const KEPT_RUNS = 3;

const PRIORITY: Readonly<Record<Job['kind'], number>> = { read: 0, export: 1, run: 2, steady: 2, study: 4 };

/** Urgent first: drafts before whole runs. */
function priorityOf(job: Job): number {
  return PRIORITY[job.kind] + (job.kind === 'run' && job.quality === 'full' ? 1 : 0);
}

/** Leaves a run between two steps. */
class Leave extends Error {}

/** Takes requests and answers them. */
export class EngineHost {
  readonly #around: Surroundings;
  readonly #queue: Waiting[] = [];
  #current: Waiting | undefined;
  #isWorking = false;
  readonly #cases = new Map<string, ReadResult>();
  readonly #runs = new Map<string, Run>();

  constructor(around: Surroundings) {
    this.#around = around;
  }

  /** Hears a request. */
  receive(request: Request): void {
    if (request.kind === 'stop') {
      this.#stop(request.slot);
      return;
    }
    if (request.kind === 'run') this.#stop(request.slot, request.quality);
    this.#queue.push({ job: request, stopped: false });
    if (!this.#isWorking) void this.#work();
  }

  /** Stops a slot's runs; a whole run that follows its own draft leaves the draft alone. */
  #stop(slot: string, before?: Quality): void {
    const isMeant = ({ job }: Waiting): boolean =>
      job.kind === 'run' && job.slot === slot && !(before === 'full' && job.quality === 'draft');
    for (const waiting of this.#queue.filter(isMeant)) {
      this.#queue.splice(this.#queue.indexOf(waiting), 1);
      this.#post({ kind: 'stopped', id: waiting.job.id });
    }
    if (this.#current !== undefined && isMeant(this.#current)) this.#current.stopped = true;
  }

  #post(answer: Answer): void {
    this.#around.post(answer, answer.kind === 'run' || answer.kind === 'steady' ? buffersOf(answer) : []);
  }

  async #work(): Promise<void> {
    this.#isWorking = true;
    for (;;) {
      await this.#around.pause();
      const next = this.#queue.reduce<Waiting | undefined>(
        (best, w) => (best === undefined || priorityOf(w.job) < priorityOf(best.job) ? w : best),
        undefined,
      );
      if (next === undefined) break;
      this.#queue.splice(this.#queue.indexOf(next), 1);
      this.#current = next;
      try {
        await this.#do(next);
      } catch (error) {
        const message = error instanceof Error ? (error.stack ?? error.message) : String(error);
        this.#post({ kind: 'fault', id: next.job.id, message });
      }
      this.#current = undefined;
    }
    this.#isWorking = false;
  }

  async #do(waiting: Waiting): Promise<void> {
    const { job } = waiting;
    const { id } = job;
    const read = this.#read(job);
    if (job.kind === 'read') {
      const { warnings } = read;
      const result = read.ok
        ? ({ ok: true, plant: read.value, warnings } as const)
        : ({ ok: false, issues: read.issues, warnings } as const);
      this.#post({ kind: 'read', id, result });
      return;
    }
    if (!read.ok) {
      this.#post({ kind: 'refused', id, issues: read.issues });
      return;
    }
    if (job.kind === 'steady') {
      this.#post({ kind: 'steady', id, report: steadyReport(read.value) });
      return;
    }
    const scenario = read.value.scenarios.find((s) => s.id === job.scenario);
    if (scenario === undefined) {
      this.#post({ kind: 'refused', id, issues: [noScenario(job.scenario, read.value)] });
      return;
    }
    const run = await this.#run(waiting, job, read.value, scenario);
    if (run === undefined) this.#post({ kind: 'stopped', id });
    else if (job.kind === 'run') this.#post({ kind: 'run', id, packet: packRun(run, job.text, job.quality) });
    else if (job.kind === 'export') {
      const result = { ...resultOf(run, { caseText: job.text }), profiles: [] };
      this.#post({ kind: 'export', id, text: job.form === 'csv' ? writeCsv(result) : writeResult(result) });
    } else {
      const onStep = this.#progress(id, scenario.duration);
      const answer =
        job.study === 'convergence'
          ? ({ study: job.study, block: convergenceOf(run, onStep) } as const)
          : ({ study: job.study, block: secondOpinionOf(run, onStep) } as const);
      this.#post({ kind: 'study', id, answer });
    }
  }

  /** The case of a request, read once. */
  #read({ text, files }: CaseSource): ReadResult {
    const key = `${text}\u0000${JSON.stringify(files)}`;
    const known = this.#cases.get(key);
    const result = known ?? readCase(text, { resolveFile: (name) => files[name] });
    keep(this.#cases, key, result, KEPT_CASES);
    return result;
  }

  /** Tells the share computed, at most ten times a second. */
  #progress(id: number, duration: number): (t: number) => void {
    let told = this.#around.now();
    return (t) => {
      const now = this.#around.now();
      if (now - told < 100) return;
      told = now;
      this.#post({ kind: 'progress', id, share: Math.min(1, t / duration) });
    };
  }

  /** A finished (or failed) run, kept or computed; undefined when it was stopped on the way. */
  async #run(
    waiting: Waiting,
    request: RunRequest & { readonly id: number },
    plant: Case,
    scenario: Scenario,
  ): Promise<Run | undefined> {
    const { text, files, quality, id } = request;
    const key = [quality, scenario.id, text, JSON.stringify(files)].join('\u0000');
    const known = this.#runs.get(key);
    if (known !== undefined) return known;
    const run = createRun(quality === 'draft' ? draftOf(plant) : plant, scenario);
    const tell = this.#progress(id, scenario.duration);
    const spacing = scenario.duration / MAP_MOMENTS;
    let mapped = 0;
    run.takeProfiles([0]);
    while (run.outcome.kind === 'running') {
      const until = this.#around.now() + SLICE;
      try {
        run.advance(scenario.duration, (t) => {
          if (t - mapped >= spacing || t >= scenario.duration) {
            mapped = t;
            run.takeProfiles([t]);
          }
          tell(t);
          if (this.#around.now() > until && t < scenario.duration) throw new Leave();
        });
      } catch (error) {
        if (!(error instanceof Leave)) throw error;
        await this.#around.pause();
        if (waiting.stopped) return undefined;
      }
    }
    keep(this.#runs, key, run, KEPT_RUNS);
    return run;
  }
}

/** The case on few segments and a loose tolerance. */
function draftOf(plant: Case): Case {
  const height = plant.column.beds.reduce((sum, bed) => sum + bed.height, 0);
  const beds = plant.column.beds.map((bed) => ({
    ...bed,
    segments: Math.min(bed.segments, Math.max(4, Math.round((DRAFT_SEGMENTS * bed.height) / height))),
  }));
  return {
    ...plant,
    column: { ...plant.column, beds },
    run: { ...plant.run, rtol: Math.max(plant.run.rtol, DRAFT_TOLERANCE) },
  };
}

function steadyReport(plant: Case): SteadyReport {
  const issues = checkPlant(plant);
  const errors = issues.filter((i) => i.severity === 'error');
  const warnings = issues.filter((i) => i.severity === 'warning');
  const run = createRun(plant, steadyScenario(plant));
  if (run.outcome.kind === 'failed') return { answer: undefined, issues: errors, warnings, profile: undefined };
  run.takeProfiles([0]);
  return { answer: steadyAnswers(run), issues: errors, warnings, profile: packMap(plant, run.profiles) };
}

function noScenario(id: string, plant: Case): Issue {
  const known = plant.scenarios.map((s) => s.id).join(', ');
  return {
    path: `scenarios.${id}`,
    expected: known === '' ? 'a case with scenarios' : `one of ${known}`,
    received: `"${id}"`,
    severity: 'error',
    kind: 'reference',
  };
}

/** Puts an entry at the end of a map and drops the oldest beyond a number. */
function keep<T>(map: Map<string, T>, key: string, value: T, most: number): void {
  map.delete(key);
  map.set(key, value);
  for (const old of map.keys()) {
    if (map.size <= most) break;
    map.delete(old);
  }
}
