/**
 * The page's side of the protocol: requests as promises, over whatever carries the messages. When the worker ends
 * unasked, every open request is refused with `EngineLost` and a new worker is started with the next one.
 */
import type { RunPacket } from './packet.ts';
import type {
  Answer,
  CaseSource,
  ExportForm,
  ReadAnswer,
  Request,
  RunRequest,
  SteadyReport,
  Study,
  StudyAnswer,
} from './protocol.ts';
import type { Issue } from '../../sim/index.ts';

/** What carries messages to an engine. */
export interface Line {
  send(request: Request): void;
  close(): void;
}
/** Opens a line; `onAnswer` hears what comes, `onEnd` that the other side is gone, unasked. */
export type OpenLine = (onAnswer: (answer: Answer) => void, onEnd: (why: string) => void) => Line;

/** The worker ended before it answered. */
export class EngineLost extends Error {}
/** A mistake of the program inside the worker. */
class EngineFault extends Error {}
/** The case has issues. */
export class CaseRefused extends Error {
  readonly issues: readonly Issue[];
  constructor(issues: readonly Issue[]) {
    super(`${issues.length} issues`);
    this.issues = issues;
  }
}

/** How a run ended; stopped: a newer one took its place, or it was asked to stop. */
export type RunEnd = { readonly kind: 'packet'; readonly packet: RunPacket } | { readonly kind: 'stopped' };

interface Open {
  readonly request: Exclude<Request, { kind: 'stop' }>;
  readonly resolve: (answer: Answer) => void;
  readonly reject: (error: Error) => void;
  readonly onProgress: ((share: number) => void) | undefined;
}

type Sent = Exclude<Request, { kind: 'stop' }>;
type Unnumbered<T> = T extends { readonly id: number } ? Omit<T, 'id'> : never;

/** One engine. */
export class EngineClient {
  readonly #openLine: OpenLine;
  #line: Line | undefined;
  #next = 1;
  readonly #open = new Map<number, Open>();
  /** Told when the engine was lost; the page says so. */ onLost: ((why: string) => void) | undefined;

  constructor(openLine: OpenLine) {
    this.#openLine = openLine;
  }

  /** Starts the engine before it is asked anything. */
  begin(): void {
    this.#line ??= this.#openLine(
      (answer) => {
        this.#hear(answer);
      },
      (why) => {
        this.#lose(why);
      },
    );
  }

  async read(source: CaseSource): Promise<ReadAnswer> {
    const answer = await this.#ask({ kind: 'read', ...source });
    return answer.kind === 'read' ? answer.result : unexpected(answer);
  }
  async steady(source: CaseSource): Promise<SteadyReport> {
    const answer = await this.#ask({ kind: 'steady', ...source });
    return answer.kind === 'steady' ? answer.report : unexpected(answer);
  }
  async run(slot: string, request: RunRequest, onProgress?: (share: number) => void): Promise<RunEnd> {
    const answer = await this.#ask({ kind: 'run', slot, ...request }, onProgress);
    if (answer.kind === 'run') return { kind: 'packet', packet: answer.packet };
    return answer.kind === 'stopped' ? { kind: 'stopped' } : unexpected(answer);
  }
  async export(form: ExportForm, request: RunRequest): Promise<string> {
    const answer = await this.#ask({ kind: 'export', form, ...request });
    return answer.kind === 'export' ? answer.text : unexpected(answer);
  }
  async study(study: Study, request: RunRequest, onProgress?: (share: number) => void): Promise<StudyAnswer> {
    const answer = await this.#ask({ kind: 'study', study, ...request }, onProgress);
    return answer.kind === 'study' ? answer.answer : unexpected(answer);
  }

  /** Stops the runs of a slot. */
  stop(slot: string): void {
    this.#line?.send({ kind: 'stop', slot });
  }

  /** Ends the engine; open requests are refused. The next request starts a new one. */
  close(): void {
    this.#line?.close();
    this.#line = undefined;
    this.#refuseAll(new EngineLost('closed'));
  }

  #ask(request: Unnumbered<Sent>, onProgress?: (share: number) => void): Promise<Answer> {
    const id = this.#next++;
    const numbered = { ...request, id } as Sent;
    return new Promise((resolve, reject) => {
      this.#open.set(id, { request: numbered, resolve, reject, onProgress });
      this.begin();
      this.#line?.send(numbered);
    });
  }

  #hear(answer: Answer): void {
    if (answer.kind === 'ready') return;
    const open = this.#open.get(answer.id);
    if (open === undefined) return;
    if (answer.kind === 'progress') {
      open.onProgress?.(answer.share);
      return;
    }
    this.#open.delete(answer.id);
    if (answer.kind === 'fault') open.reject(new EngineFault(answer.message));
    else if (answer.kind === 'refused') open.reject(new CaseRefused(answer.issues));
    else open.resolve(answer);
  }

  #lose(why: string): void {
    this.#line?.close();
    this.#line = undefined;
    this.#refuseAll(new EngineLost(why));
    this.onLost?.(why);
  }

  #refuseAll(error: Error): void {
    const open = [...this.#open.values()];
    this.#open.clear();
    for (const { reject } of open) reject(error);
  }
}

function unexpected(answer: Answer): never {
  throw new EngineFault(`an answer "${answer.kind}" to another question`);
}
