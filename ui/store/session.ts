/**
 * The session: one work, what its case means, its runs, and what the person is told. Framework-free; elements read
 * `state` (never changed in place) and call the acts below; nothing else writes.
 *
 * To edit a field of the case with undo:   session.setField(['column', 'beds', 0, 'height'], '6 m')
 *   The value is what a case file holds (text with its unit, or JSON); `undefined` removes the key, back to its default.
 *   A third argument names a row of edits that is one step back (a drag, typing in one field); `settle()` ends it.
 *   The case text is edited in place, read again in the worker, and run: `state.read` has the plant or the issues (by
 *   `path`, as `pathText` writes it), `state.main` the run, `state.steady` the steady answer while the plant room is open.
 *   What a path holds now: `session.valueAt(path)`; where a default comes from: `state.read.plant.provenance`.
 *
 * To add a room: give its name in `store/view.ts` (all five are there), write `elements/bw-<name>-room/`, and add its
 *   line in `elements/bw-app`. Elements get `.session`, and hear of changes by `new StoreController(this, session)`.
 *   What moves with every frame is in `session.playhead`, a store of its own.
 */
import type { Case, Issue } from '../../sim/index.ts';
import { EngineLost, type EngineClient } from '../worker/client.ts';
import type { RunPacket } from '../worker/packet.ts';
import type { ExportForm, ReadAnswer, SteadyReport, Study, StudyAnswer } from '../worker/protocol.ts';
import type { Autosave } from './autosave.ts';
import { branchScenario, branchScenarioId, branchText } from './branch-case.ts';
import { History } from './history.ts';
import { removeAt, setAt, valueAt, type Path } from './json-text.ts';
import { Playhead } from './playhead.ts';
import { RunSlots, type RunState, type Wish } from './run-slots.ts';
import { Listeners } from './signal.ts';
import { asView, FIRST_VIEW, type View } from './view.ts';
import { MOST_BRANCHES, workOn, type Branch, type Units, type Work } from './work.ts';

/** What the case text means. */
export interface ReadState {
  /** The text that was read; another than the work's while a newer one is being read. */ readonly text: string;
  /** Of the last text that reads; drawn while `issues` are mended. */ readonly plant: Case | undefined;
  readonly issues: readonly Issue[];
  readonly warnings: readonly Issue[];
}

/** A look at a run that takes long. */
export interface StudyState {
  readonly progress: number | undefined;
  readonly answer: StudyAnswer | undefined;
  readonly trouble: string | undefined;
}

/** Something to be told, until it is put away. */
export interface Notice {
  readonly id: number;
  readonly tone: 'plain' | 'problem';
  readonly text: string;
  /** More lines, such as the issues of a file. */ readonly details: readonly string[];
}

export interface SessionState {
  readonly work: Work;
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  readonly read: ReadState;
  readonly main: RunState;
  readonly branches: ReadonlyMap<string, RunState>;
  readonly steady: SteadyReport | undefined;
  readonly studies: Readonly<Partial<Record<Study, StudyState>>>;
  readonly notices: readonly Notice[];
  readonly view: View;
}

/** What a session works with. */
export interface Surroundings {
  readonly engine: EngineClient;
  /** For long looks; may be ended at any time. */ readonly studyEngine: EngineClient;
  readonly autosave: Autosave;
  /** ms. */ readonly now: () => number;
}

const UNREAD: ReadState = { text: '', plant: undefined, issues: [], warnings: [] };
const MAIN = 'main';

export class Session {
  readonly playhead = new Playhead();
  readonly #around: Surroundings;
  readonly #listeners = new Listeners();
  readonly #slots: RunSlots;
  readonly #history: History<Work>;
  #view: View = FIRST_VIEW;
  #read: ReadState = UNREAD;
  #readFiles: Work['files'] = {};
  #steady: SteadyReport | undefined;
  #steadyText: string | undefined;
  #studies: SessionState['studies'] = {};
  #studiedKey = '';
  /** Scenario whose worst moment has been gone to. */ #lookedAt = '';
  #notices: readonly Notice[] = [];
  #nextNotice = 1;
  #isReading = false;
  /** Stopped on request: nothing new until the next edit. */ #isHalted = false;
  #document: { text: string; value: unknown } = { text: '', value: undefined };
  #state: SessionState | undefined;

  constructor(around: Surroundings, work: Work) {
    this.#around = around;
    this.#history = new History(work);
    this.#slots = new RunSlots(
      around.engine,
      () => {
        this.#afterRun();
      },
      around.now,
    );
    around.engine.onLost = (why) => {
      this.notify(
        'problem',
        `The calculation stopped unexpectedly (${why}). It was started again; nothing typed is lost.`,
      );
    };
    around.autosave.onTrouble = (failed) => {
      if (failed)
        this.notify('problem', 'This browser refuses to keep the work between visits. Save the case to a file.');
    };
  }

  /** Everything there is to show, as it stands. */
  get state(): SessionState {
    this.#state ??= {
      work: this.#history.present,
      canUndo: this.#history.canUndo,
      canRedo: this.#history.canRedo,
      read: this.#read,
      main: this.#slots.state(MAIN),
      branches: new Map(this.work.branches.map((b) => [b.id, this.#slots.state(b.id)])),
      steady: this.#steady,
      studies: this.#studies,
      notices: this.#notices,
      view: this.#view,
    };
    return this.#state;
  }

  get work(): Work {
    return this.#history.present;
  }

  subscribe(listener: () => void): () => void {
    return this.#listeners.subscribe(listener);
  }

  /** Begins: takes what was kept and computes. */
  start(view: unknown): void {
    this.#view = asView(view);
    this.#changed();
  }

  // The work.

  /** Puts a value into the case; `undefined` takes the key out. Throws when the text is no JSON. */
  setField(path: Path, value: unknown, merge?: string): void {
    const { text } = this.work;
    this.edit({ text: value === undefined ? removeAt(text, path) : setAt(text, path, value) }, merge);
  }

  /** Several fields at once, one step back. */
  setFields(entries: readonly (readonly [Path, unknown])[], merge?: string): void {
    const text = entries.reduce(
      (t, [path, value]) => (value === undefined ? removeAt(t, path) : setAt(t, path, value)),
      this.work.text,
    );
    this.edit({ text }, merge);
  }

  /** What the case text holds at a path, as written. */
  valueAt(path: Path): unknown {
    return valueAt(this.document, path);
  }

  /** The case text as parsed JSON; undefined when it is none. */
  get document(): unknown {
    const { text } = this.work;
    if (this.#document.text !== text) this.#document = { text, value: parsed(text) };
    return this.#document.value;
  }

  edit(change: Partial<Work>, merge?: string): void {
    const next = { ...this.work, ...change };
    if ((Object.keys(change) as (keyof Work)[]).every((key) => change[key] === this.work[key])) return;
    this.#history.push(next, merge);
    this.#changed();
  }

  /** Ends a row of merged edits. */
  settle(): void {
    this.#history.settle();
  }

  undo(): void {
    if (this.#history.undo()) this.#changed();
  }
  redo(): void {
    if (this.#history.redo()) this.#changed();
  }

  rename(name: string): void {
    const trimmed = name.trim();
    if (trimmed !== '') this.edit({ name: trimmed });
  }

  /** Opens a case; what cannot be read at all is refused and said. */
  open(name: string, text: string, files: Work['files'] = {}): boolean {
    const clean = text.replace(/^\uFEFF/, '');
    const document = parsed(clean);
    if (typeof document !== 'object' || document === null || Array.isArray(document)) {
      void this.#refuse(name, clean);
      return false;
    }
    this.take({ ...workOn(name, clean, files), units: this.work.units });
    return true;
  }

  /** Takes another work in place of this one, which undo brings back. */
  take(work: Work): void {
    this.#history.push(work);
    this.#view = { ...this.#view, window: undefined };
    this.#lookedAt = '';
    this.playhead.seek(0);
    this.#changed();
  }

  async #refuse(name: string, text: string): Promise<void> {
    const result = await this.#around.engine.read({ text, files: {} }).catch(() => undefined);
    const issues = result?.ok === false ? result.issues : [];
    this.notify('problem', `${name} is not a case file; the work stays as it is.`, issues.map(issueLine));
  }

  /** Adds texts of files that the case names. */
  addFiles(files: Work['files']): void {
    this.edit({ files: { ...this.work.files, ...files } });
  }

  chooseScenario(id: string): void {
    this.#view = { ...this.#view, window: undefined };
    this.playhead.seek(0);
    this.edit({ scenario: id, branches: [] });
  }

  setUnits(units: Partial<Units>): void {
    this.edit({ units: { ...this.work.units, ...units } });
  }

  /** Adds a branch; false when there are as many as there may be. */
  addBranch(branch: Omit<Branch, 'id' | 'line'>): boolean {
    const { branches } = this.work;
    if (branches.length >= MOST_BRANCHES) return false;
    const lines = branches.map((b) => b.line);
    const line = Array.from({ length: MOST_BRANCHES }, (_, i) => i + 1).find((n) => !lines.includes(n)) ?? 1;
    const id = `b${Math.max(0, ...branches.map((b) => Number(b.id.slice(1)) || 0)) + 1}`;
    this.edit({ branches: [...branches, { ...branch, id, line }] });
    return true;
  }
  changeBranch(id: string, change: Partial<Omit<Branch, 'id'>>, merge?: string): void {
    this.edit({ branches: this.work.branches.map((b) => (b.id === id ? { ...b, ...change } : b)) }, merge);
  }
  removeBranch(id: string): void {
    this.edit({ branches: this.work.branches.filter((b) => b.id !== id) });
  }

  /** Makes a branch a scenario of the case. */
  keepBranch(id: string): void {
    const branch = this.work.branches.find((b) => b.id === id);
    if (branch === undefined) return;
    const scenario = branchScenario(this.document, this.work, branch, this.#fired());
    if (scenario === undefined) return;
    const name = freeKey(valueAt(this.document, ['scenarios']), `${this.work.scenario}-${slug(branch.label)}`);
    this.edit({
      text: setAt(this.work.text, ['scenarios', name], scenario),
      branches: this.work.branches.filter((b) => b.id !== id),
    });
  }

  // Computing.

  /** Stops what is being computed. */
  stop(): void {
    this.#isHalted = true;
    for (const name of this.#slots.names()) this.#slots.stop(name);
  }

  /** Computes again what was stopped or lost. */
  again(): void {
    this.#isHalted = false;
    for (const name of this.#slots.names()) this.#slots.again(name);
    this.#wantRuns();
  }

  /** The run on the screen as a file of the command line. */
  async exportRun(form: ExportForm, branch?: string): Promise<string> {
    const wish = branch === undefined ? this.#wish() : this.#branchWish(branch);
    if (wish === undefined) throw new Error('the case has no such scenario');
    return this.#around.engine.export(form, { ...wish, quality: 'full' });
  }

  /** Takes a long look at the run on the screen. */
  async study(study: Study): Promise<void> {
    const wish = this.#wish();
    const put = (state: StudyState): void => {
      this.#studies = { ...this.#studies, [study]: state };
      this.#tell();
    };
    const key = wish.text + wish.scenario;
    const isCurrent = (): boolean => this.#studiedKey === key && this.#studies[study]?.progress !== undefined;
    this.#studiedKey = key;
    put({ progress: 0, answer: undefined, trouble: undefined });
    try {
      const answer = await this.#around.studyEngine.study(study, { ...wish, quality: 'full' }, (progress) => {
        if (isCurrent()) put({ progress, answer: undefined, trouble: undefined });
      });
      if (isCurrent()) put({ progress: undefined, answer, trouble: undefined });
    } catch (error) {
      if (isCurrent())
        put({
          progress: undefined,
          answer: undefined,
          trouble: error instanceof EngineLost ? 'stopped' : String(error),
        });
    }
  }

  stopStudies(): void {
    this.#around.studyEngine.close();
  }

  // The eye.

  setView(change: Partial<View>): void {
    this.#view = { ...this.#view, ...change };
    this.#keep();
    this.#wantSteady();
    this.#tell();
  }

  notify(tone: Notice['tone'], text: string, details: readonly string[] = []): void {
    if (this.#notices.some((n) => n.text === text)) return;
    this.#notices = [...this.#notices.slice(-3), { id: this.#nextNotice++, tone, text, details }];
    this.#tell();
  }
  dismiss(id: number): void {
    this.#notices = this.#notices.filter((n) => n.id !== id);
    this.#tell();
  }

  // Behind.

  #tell(): void {
    this.#state = undefined;
    this.#listeners.tell();
  }

  #keep(): void {
    this.#around.autosave.save({ work: this.work, view: this.#view });
  }

  #changed(): void {
    this.#isHalted = false;
    this.#keep();
    if (this.#studiedKey !== '' && this.#studiedKey !== this.work.text + this.work.scenario) {
      this.#studiedKey = '';
      if (Object.values(this.#studies).some((s) => s.progress !== undefined)) this.stopStudies();
      this.#studies = {};
    }
    this.#tell();
    if (!this.#isReading) void this.#readAll();
  }

  /** Reads the newest text, and again when it changed meanwhile; then runs it. */
  async #readAll(): Promise<void> {
    this.#isReading = true;
    let losses = 0;
    while (this.#read.text !== this.work.text || this.#readFiles !== this.work.files) {
      const { text, files } = this.work;
      let result: ReadAnswer;
      try {
        result = await this.#around.engine.read({ text, files });
      } catch (error) {
        if (error instanceof EngineLost && losses++ < 2) continue;
        this.notify('problem', `The case could not be read: ${String(error)}`);
        break;
      }
      this.#readFiles = files;
      this.#read = {
        text,
        plant: result.ok ? result.plant : this.#read.plant,
        issues: result.ok ? [] : result.issues,
        warnings: result.warnings,
      };
      this.#wantRuns();
      this.#tell();
    }
    this.#isReading = false;
    this.#wantRuns();
    this.#wantSteady();
  }

  #wish(): Wish {
    const { text, files, scenario } = this.work;
    return { text, files, scenario };
  }

  #branchWish(id: string): Wish | undefined {
    const branch = this.work.branches.find((b) => b.id === id);
    if (branch === undefined) return undefined;
    const text = branchText(this.work, branch, this.#fired());
    return text === undefined
      ? undefined
      : { text, files: this.work.files, scenario: branchScenarioId(this.work, branch) };
  }

  /** When each step of the scenario came, s. */
  #fired(): ReadonlyMap<string, number> {
    const packet: RunPacket | undefined = this.#slots.state(MAIN).packet;
    return new Map((packet?.steps ?? []).map(({ id, time }) => [id, time]));
  }

  #wantRuns(): void {
    if (this.#read.text !== this.work.text) return;
    if (this.#read.issues.length > 0) {
      for (const name of this.#slots.names()) this.#slots.hold(name, undefined);
      return;
    }
    const { plant } = this.#read;
    const scenario = plant?.scenarios.find((s) => s.id === this.work.scenario);
    if (scenario === undefined) {
      const first = plant?.scenarios[0];
      if (first === undefined) this.#slots.hold(MAIN, 'the case has no scenario');
      else this.edit({ scenario: first.id });
      return;
    }
    this.playhead.limit(scenario.duration);
    this.#slots.want(MAIN, this.#wish());
    this.#wantBranches();
  }

  #wantBranches(): void {
    const { branches } = this.work;
    for (const name of this.#slots.names()) {
      if (name !== MAIN && !branches.some((b) => b.id === name)) this.#slots.remove(name);
    }
    if (this.#slots.state(MAIN).packet === undefined) return;
    for (const { id } of branches) {
      const wish = this.#branchWish(id);
      if (wish !== undefined) this.#slots.want(id, wish);
    }
  }

  #afterRun(): void {
    const main = this.#slots.state(MAIN);
    this.#lookAtWorst(main.packet);
    if (!this.#isHalted && !main.isStale && main.packet !== undefined && this.#read.issues.length === 0)
      this.#wantBranches();
    this.#tell();
  }

  /** The first look at a scenario goes to the worst moment of what is limited. */
  #lookAtWorst(packet: RunPacket | undefined): void {
    if (packet === undefined || packet.scenario !== this.work.scenario || this.#lookedAt === packet.scenario) return;
    this.#lookedAt = packet.scenario;
    const { answers, summary } = packet.document;
    const worst = answers.limits.find((l) => l.id === summary.headline)?.peak.time;
    if (this.playhead.time === 0) this.playhead.seek(worst ?? answers.firstUpset ?? 0);
  }

  #wantSteady(): void {
    const { text, files } = this.work;
    if (
      this.#view.room !== 'plant' ||
      this.#steadyText === text ||
      this.#read.text !== text ||
      this.#read.issues.length > 0
    )
      return;
    this.#steadyText = text;
    this.#around.engine
      .steady({ text, files })
      .then((report) => {
        if (this.#steadyText !== text) return;
        this.#steady = report;
        this.#tell();
      })
      .catch((error: unknown) => {
        this.#steadyText = undefined;
        if (!(error instanceof EngineLost)) this.notify('problem', `No steady answer: ${String(error)}`);
      });
  }
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

/** An issue on one line. */
function issueLine({ path, line, column, expected, received, hint }: Issue): string {
  const where = line === undefined ? path : `line ${line}, column ${column ?? 1}`;
  return `${where === '' ? '' : `${where}: `}expected ${expected}, received ${received}${hint === undefined ? '' : ` (${hint})`}`;
}

function slug(text: string): string {
  return text
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '')
    .slice(0, 40);
}

function freeKey(taken: unknown, wish: string): string {
  const has = (key: string): boolean => typeof taken === 'object' && taken !== null && Object.hasOwn(taken, key);
  let key = wish;
  for (let n = 2; has(key); n++) key = `${wish}-${n}`;
  return key;
}
