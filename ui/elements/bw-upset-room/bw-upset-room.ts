import { html, LitElement, nothing, type PropertyValues, type TemplateResult } from 'lit';

import { answerChart, headlineLanes, type ComparedRun } from '../../charts/answer-chart.ts';
import type { ChartSpec, Palette, TimeAxis } from '../../charts/chart.ts';
import { laneChart } from '../../charts/lane-chart.ts';
import { cividis } from '../../charts/cividis.ts';
import { chosenMap, colorScale, mapChart, mapChoices, type MapChoice } from '../../charts/map-chart.ts';
import { formatNumber } from '../../format/numbers.ts';
import { StoreController } from '../../controllers/store-controller.ts';
import { clock, clockMarks, fieldTime } from '../../format/clock.ts';
import { displayOf } from '../../format/units.ts';
import { compareRuns } from '../../store/comparison.ts';
import type { Path } from '../../store/json-text.ts';
import { pathText, valueAt } from '../../store/json-text.ts';
import { omit } from '../../store/omit.ts';
import type { Session, SessionState } from '../../store/session.ts';
import { issueSentence, type MapQuantity, type RunPacket } from '../../store/shown.ts';
import { stepChoices, type StepChoice } from '../../store/step-choices.ts';
import { blocksOf, moveEdit, stepId, stretchEdit, type Block, type StepText } from '../../store/timeline.ts';
import { MOST_BRANCHES } from '../../store/work.ts';
import { controls, tables } from '../../styles/shared.ts';
import { CLOSE, MINUS, PLUS } from '../icons.ts';
import { EVENT_SIGN, SIGN } from '../signs.ts';
import { closeOnEscape, closeOnLeave, closeOnPressBeside } from '../menus.ts';
import { readPalette } from '../palette.ts';
import '../bw-branches/bw-branches.ts';
import '../bw-chart/bw-chart.ts';
import '../bw-column/bw-column.ts';
import '../bw-readout/bw-readout.ts';
import '../bw-step-editor/bw-step-editor.ts';
import '../bw-timeline/bw-timeline.ts';
import '../bw-transport/bw-transport.ts';
import { styles } from './bw-upset-room.styles.ts';

/** Heights of the charts, px. */
const ANSWER = 170;
const MAP = 150;
const LANE = 78;
/** Room that a time label takes, px. */
const LABEL = 84;
/** Parts of the shown time that a key step moves. */
const PARTS = 200;

/** The colour scale of maps, for a bar. */
const SHADES = [0, 0.25, 0.5, 0.75, 1].map(cividis).join(',');

/** What a room's charts are made of; a change of any makes them anew. */
type Inputs = readonly unknown[];

/** The upset, played out: the answer, the bed map, the instruments, the timeline, one playhead over all. */
export class BwUpsetRoom extends LitElement {
  static override styles = [controls, tables, styles];
  static override properties = { session: { attribute: false }, selected: { state: true }, width: { state: true } };
  declare session: Session;
  /** Step that is open in the editor; -1: none. */ declare private selected: number;
  /** Of the plots, px. */ declare private width: number;

  #palette: Palette | undefined;
  #inputs: Inputs = [];
  #runs: readonly ComparedRun[] = [];
  #answer: ChartSpec | undefined;
  #map: ChartSpec | undefined;
  #choice: MapChoice | undefined;
  #lanes: readonly (readonly [string, ChartSpec | undefined])[] = [];
  readonly follow = new StoreController(this, () => this.session);
  readonly head = new StoreController(
    this,
    () => this.session.playhead,
    () => {
      this.#placeHead();
    },
  );
  readonly #size = new ResizeObserver(() => {
    this.width = this.#plotWidth();
  });

  constructor() {
    super();
    this.selected = -1;
    this.width = 0;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.#size.observe(this);
    document.addEventListener('bw-theme', this.#onTheme);
    document.addEventListener('keydown', this.#onKey);
  }
  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#size.disconnect();
    document.removeEventListener('bw-theme', this.#onTheme);
    document.removeEventListener('keydown', this.#onKey);
  }

  readonly #onTheme = (): void => {
    this.#palette = undefined;
    this.requestUpdate();
  };

  // The time axis.

  get #packet(): RunPacket | undefined {
    return this.session.state.main.packet;
  }
  get #upset(): number {
    return this.#packet?.document.answers.firstUpset ?? 0;
  }
  get #window(): readonly [number, number] {
    const { window } = this.session.state.view;
    return window ?? [0, Math.max(1, this.session.playhead.end)];
  }
  #sides(): { left: number; right: number } {
    const style = getComputedStyle(this);
    return {
      left: parseFloat(style.getPropertyValue('--plot-left')) || 64,
      right: parseFloat(style.getPropertyValue('--plot-right')) || 12,
    };
  }
  #plotWidth(): number {
    const stack = this.renderRoot.querySelector('.stack');
    const { left, right } = this.#sides();
    return Math.max(0, (stack?.clientWidth ?? this.clientWidth) - left - right);
  }

  protected override willUpdate(changed: PropertyValues): void {
    super.willUpdate(changed);
    this.#palette ??= readPalette(document.documentElement);
    const { state } = this.session;
    const { main, branches, work, view } = state;
    const packets = work.branches.map((b) => branches.get(b.id)?.packet);
    const inputs: Inputs = [
      main.packet,
      ...packets,
      ...work.branches,
      work.units,
      view,
      this.width,
      this.#palette,
      this.session.playhead.end,
    ];
    if (inputs.length === this.#inputs.length && inputs.every((x, i) => x === this.#inputs[i])) return;
    this.#inputs = inputs;
    this.#makeCharts(state, this.#palette);
  }

  #makeCharts({ main, work, branches, view }: SessionState, palette: Palette): void {
    const { packet } = main;
    if (packet === undefined) return;
    const others = work.branches.flatMap((b): ComparedRun[] => {
      const own = branches.get(b.id)?.packet;
      return own === undefined ? [] : [{ label: b.label, line: b.line, packet: own }];
    });
    const runs = [{ label: packet.document.scenario.title, line: 0, packet }, ...others];
    const [from, to] = this.#window;
    const axis: TimeAxis = { from, to, upset: this.#upset, ...this.#sides() };
    const mostMarks = Math.max(2, Math.floor((this.width || 600) / LABEL));
    const { units } = work;
    const common = { axis, units, palette, mostMarks };
    this.#runs = runs;
    this.#answer = answerChart({ runs, ...common, height: ANSWER, isLog: view.isLog });
    this.#choice = chosenMap(packet, view.map, units);
    this.#map =
      this.#choice === undefined ? undefined : mapChart({ packet, choice: this.#choice, ...common, height: MAP });
    this.#lanes = packet.instruments
      .filter(({ tag }) => !view.hiddenLanes.includes(tag))
      .map(({ tag }) => [tag, laneChart({ tag, runs, ...common, height: LANE })]);
  }

  protected override render(): TemplateResult {
    const { state, playhead } = this.session;
    const { packet } = state.main;
    return html`
      <div class="room">
        <aside aria-label="The column at the playhead">
          <bw-column
            .packet=${packet}
            .choice=${this.#choice}
            .playhead=${playhead}
            .units=${state.work.units}
            .upset=${this.#upset}
          ></bw-column>
        </aside>
        <div class="story">
          ${this.#renderAnswer(state)}
          <div class="stack" @pointerdown=${this.#onScrub}>
            ${packet === undefined ? html`<p class="state">Computing the scenario…</p>` : this.#renderCharts(packet, state)}
            <div class="head" id="head"></div>
          </div>
          <div class="below">${packet === undefined ? nothing : this.#renderBelow(packet, state)}</div>
        </div>
        ${this.#renderDesk(state)}
      </div>
    `;
  }

  #renderAnswer({ main, read, work }: SessionState): TemplateResult {
    const { packet, isStale, progress, trouble } = main;
    const isDraft = packet?.quality === 'draft';
    return html`
      ${
        read.issues.length === 0
          ? nothing
          : html`<div class="issues" role="alert">
              <strong>The case cannot be computed as it stands.</strong>
              ${packet === undefined ? '' : 'Shown is the last one that could.'}
              <ul>
                ${read.issues.slice(0, 12).map((i) => html`<li>${issueSentence(i)}</li>`)}
              </ul>
            </div>`
      }
      <h2 class="hidden-text">The answer</h2>
      <p class="sentence ${isStale ? 'stale' : ''}" aria-live="polite">${packet?.sentence[work.units.system]}</p>
      <div class="state">
        ${
          progress === undefined
            ? trouble === undefined
              ? nothing
              : html`<span>Not up to date: ${trouble}.</span
                  ><button @click=${() => this.session.again()}>Compute</button>`
            : html`<span class="work">
                <progress max="1" value=${progress} aria-label="Share computed"></progress>
                ${isStale ? 'computing' : isDraft ? 'draft shown, computing the whole run' : 'computing'}
                <button @click=${() => this.session.stop()}>Stop</button></span
              >`
        }
      </div>
    `;
  }

  #renderCharts(packet: RunPacket, { view, work }: SessionState): TemplateResult {
    const { playhead } = this.session;
    const { units } = work;
    const colors = this.#palette?.lines ?? [];
    const lanes = headlineLanes(packet);
    const first = lanes[0];
    const answerValues =
      first === undefined
        ? []
        : this.#runs.flatMap(({ packet: p, line }) => {
            const lane = p.limits.find((l) => l.id === first.id);
            return lane === undefined
              ? []
              : [
                  {
                    label: '',
                    time: p.time,
                    value: lane.value,
                    display: displayOf(lane, units),
                    color: this.#runs.length > 1 ? colors[line] : undefined,
                  },
                ];
          });
    return html`
      <bw-chart .spec=${this.#answer} height=${ANSWER}>
        <label slot="tools"
          ><input
            type="checkbox"
            .checked=${view.isLog}
            @change=${(e: Event) => {
              this.session.setView({ isLog: (e.target as HTMLInputElement).checked });
            }}
          />
          log</label
        >
        <bw-readout slot="readout" .values=${answerValues} .playhead=${playhead}></bw-readout>
      </bw-chart>
      <bw-chart .spec=${this.#map} height=${MAP}>
        <label slot="tools"
          ><span class="hidden-text">Quantity of the map</span
          ><select
            @change=${(e: Event) => {
              this.session.setView({ map: (e.target as HTMLSelectElement).value as MapQuantity });
            }}
          >
            ${mapChoices(packet, units).map((c) => html`<option value=${c.id} ?selected=${c.id === this.#choice?.id}>${c.label}</option>`)}
          </select></label
        >
        ${this.#renderScale(packet)}
      </bw-chart>
      <div class="lanes-head">
        <h2>Instruments</h2>
        <span class="legend"
          >dotted: true, full: shown; ${SIGN.truth}true value passes, ${SIGN.shown}shown value passes,
          ${SIGN.alarm}annunciates or acts</span
        >
      </div>
      ${this.#lanes.map(([tag, spec]) => {
        const lane = packet.instruments.find((l) => l.tag === tag);
        const display = lane === undefined ? undefined : displayOf(lane, units);
        return html`<bw-chart .spec=${spec} height=${LANE}>
          <button
            slot="tools"
            class="plain"
            aria-label="Put the lane of ${tag} away"
            title="Put away"
            @click=${() => this.#hide(tag)}
          >
            ${CLOSE}
          </button>
          ${
            lane === undefined || display === undefined
              ? nothing
              : html`<bw-readout
                  slot="readout"
                  .values=${[
                    { label: 'true', time: packet.time, value: lane.truth, display },
                    { label: 'shown', time: packet.time, value: lane.shown, display },
                  ]}
                  .playhead=${playhead}
                ></bw-readout>`
          }
        </bw-chart>`;
      })}
      ${
        view.hiddenLanes.length === 0
          ? nothing
          : html`<div class="lanes-head">
              <span class="legend">put away:</span>
              ${view.hiddenLanes.map((tag) => html`<button class="plain" @click=${() => this.#show(tag)}>${tag} +</button>`)}
            </div>`
      }
    `;
  }

  /** What the colours of the map mean. */
  #renderScale(packet: RunPacket): TemplateResult | typeof nothing {
    const choice = this.#choice;
    if (choice === undefined) return nothing;
    const { low, high } = colorScale(packet.map, choice);
    const unit = choice.display.unit === '1' ? '' : ` ${choice.display.unit}`;
    return html`<span slot="readout" class="scale"
      >${formatNumber(low, 2)}<span class="bar" style="background:linear-gradient(to right, ${SHADES})"></span
      >${formatNumber(high, 2)}${unit}${choice.isLog ? ', log' : ''}</span
    >`;
  }

  #renderBelow(packet: RunPacket, { work, main, branches, read }: SessionState): TemplateResult {
    const all = [main.packet, ...work.branches.map((b) => branches.get(b.id)?.packet)];
    const stale = [main.isStale, ...work.branches.map((b) => branches.get(b.id)?.isStale === true)];
    const { playhead } = this.session;
    return html`
      <h2>Branches: what if something else were done</h2>
      <bw-branches
        .branches=${work.branches}
        .comparison=${compareRuns(all, work.units)}
        .choices=${read.plant === undefined ? [] : stepChoices(read.plant).filter((c) => c.role === 'action')}
        .mainLabel=${packet.document.scenario.title}
        .most=${MOST_BRANCHES}
        .stale=${stale}
        when="the playhead"
        @bw-branch-add=${(e: CustomEvent<{ choice: StepChoice; keepsLater: boolean }>) => {
          this.#addBranch(e.detail.choice, e.detail.keepsLater);
        }}
        @bw-branch-remove=${(e: CustomEvent<{ id: string }>) => {
          this.session.removeBranch(e.detail.id);
        }}
        @bw-branch-keep=${(e: CustomEvent<{ id: string }>) => {
          this.session.keepBranch(e.detail.id);
        }}
      ></bw-branches>
      <h2>What happened</h2>
      <table class="events">
        <thead>
          <tr>
            <th scope="col">from the upset</th>
            <th scope="col" style="text-align:left">event</th>
          </tr>
        </thead>
        <tbody>
          ${packet.document.events.map(
            (event) =>
              html`<tr>
                <td>
                  <button class="plain" title="Playhead there" @click=${() => playhead.seek(event.time)}>
                    ${clock(event.time - this.#upset, true)}
                  </button>
                </td>
                <td>${EVENT_SIGN[event.kind]} ${event.text}</td>
              </tr>`,
          )}
        </tbody>
      </table>
    `;
  }

  // The desk: scenario, playing, time axis, blocks.

  get #base(): Path {
    return ['scenarios', this.session.work.scenario, 'steps'];
  }
  get #steps(): readonly StepText[] {
    const steps = this.session.valueAt(this.#base);
    return Array.isArray(steps) ? (steps as StepText[]) : [];
  }
  #blocks(): readonly Block[] {
    const { read, work } = this.session.state;
    const scenario = read.plant?.scenarios.find((s) => s.id === work.scenario);
    const labels = new Map(scenario?.steps.map((s) => [s.id, s.label]));
    const packet = this.#packet;
    const fired = new Map((packet?.scenario === work.scenario ? packet.steps : []).map((s) => [s.id, s.time]));
    return blocksOf(this.#steps, labels, fired);
  }

  #renderDesk({ work, read }: SessionState): TemplateResult {
    const [from, to] = this.#window;
    const { playhead } = this.session;
    const blocks = this.#blocks();
    const step = this.#steps[this.selected];
    const scenarios = valueAt(this.session.document, ['scenarios']);
    const choices = read.plant === undefined ? [] : stepChoices(read.plant);
    return html`<section class="desk ${step === undefined ? '' : 'is-long'}" aria-label="Timeline">
      <div class="controls">
        <label
          ><span class="hidden-text">Scenario</span
          ><select class="scenario" @change=${this.#onScenario}>
            ${Object.entries((scenarios ?? {}) as Record<string, { title?: string }>).map(
              ([id, s]) => html`<option value=${id} ?selected=${id === work.scenario}>${s.title ?? id}</option>`,
            )}
          </select></label
        >
        <bw-transport .playhead=${playhead} .upset=${this.#upset} .grain=${this.#grain()}></bw-transport>
        <span class="zoom">
          <button aria-label="Show less time" title="Show less time (+)" @click=${() => this.#zoom(0.5)}>
            ${PLUS}
          </button>
          <button aria-label="Show more time" title="Show more time (−)" @click=${() => this.#zoom(2)}>${MINUS}</button>
          <button title="All of it (0)" @click=${() => this.session.setView({ window: undefined })}>all</button>
        </span>
        <span class="space"></span>
        ${this.#renderAdd(choices)} ${this.#renderScenario(work.scenario)}
      </div>
      <div class="desk-side">
        <span
          >${blocks.length} ${blocks.length === 1 ? 'step' : 'steps'}: ${SIGN.upset}upset, ${SIGN.action}action. Drag a
          block to move it, its right edge to stretch it; click for its fields.</span
        >
      </div>
      <div class="axis">
        <div
          class="ruler"
          role="slider"
          tabindex="0"
          aria-label="Playhead"
          aria-valuemin="0"
          aria-valuemax=${playhead.end}
          aria-valuenow=${Math.round(playhead.time)}
          aria-valuetext="${clock(playhead.time - this.#upset)} from the upset"
          @pointerdown=${this.#onScrub}
        >
          ${this.#renderTicks(from, to)}
        </div>
        <bw-timeline
          .blocks=${blocks}
          .from=${from}
          .to=${to}
          .upset=${this.#upset}
          .selected=${this.selected}
          @bw-block-move=${this.#onMove}
          @bw-block-stretch=${this.#onStretch}
          @bw-block-select=${(e: CustomEvent<{ index: number }>) => {
            this.selected = e.detail.index;
          }}
          @bw-block-remove=${(e: CustomEvent<{ index: number }>) => {
            this.#removeStep(e.detail.index);
          }}
          @bw-block-settle=${() => {
            this.session.settle();
          }}
        ></bw-timeline>
        ${this.#renderMarks(from, to)}
        <div class="head" id="desk-head"></div>
        ${step === undefined ? nothing : this.#renderEditor(step, blocks[this.selected])}
      </div>
    </section>`;
  }

  #renderTicks(from: number, to: number): TemplateResult {
    const marks = clockMarks(from, to, this.#upset, Math.max(2, Math.floor((this.width || 600) / LABEL)));
    const share = (t: number): number => (t - from) / (to - from);
    return html`${marks.map(({ at, text }) => {
      const place = share(at);
      const edge = place < 0.02 ? 'first' : place > 0.98 ? 'last' : '';
      return html`<span class="tick ${edge}" style="left:${100 * place}%"><span>${text}</span></span>`;
    })}`;
  }

  /** Alarms, trips and limits on the axis. */
  #renderMarks(from: number, to: number): TemplateResult {
    const events = (this.#packet?.document.events ?? []).filter(
      (e) => e.time >= from && e.time <= to && e.kind in MARKED,
    );
    return html`<div class="marks" aria-hidden="true">
      ${events.map(
        (e) =>
          html`<span
            class="mark ${MARKED[e.kind] ?? ''}"
            style="left:${(100 * (e.time - from)) / (to - from)}%"
            title="${clock(e.time - this.#upset, true)} ${e.text}"
            >${EVENT_SIGN[e.kind]}</span
          >`,
      )}
    </div>`;
  }

  #renderAdd(choices: readonly StepChoice[]): TemplateResult {
    const list = (role: StepChoice['role'], title: string): TemplateResult =>
      html`<div>
        <h3>${title}</h3>
        ${choices
          .filter((c) => c.role === role)
          .map((c) => html`<button class="plain" @click=${(e: Event) => this.#onAdd(e, c)}>${c.label}</button>`)}
      </div>`;
    return html`<details class="up" @keydown=${closeOnEscape} @focusout=${closeOnLeave} @toggle=${closeOnPressBeside}>
      <summary>Add at the playhead</summary>
      <div class="menu two">${list('upset', 'Upsets')}${list('action', 'Actions')}</div>
    </details>`;
  }

  #renderScenario(id: string): TemplateResult {
    const base: Path = ['scenarios', id];
    const field = (key: string, label: string): TemplateResult =>
      html`<label
        >${label}
        <input
          .value=${shownText(this.session.valueAt([...base, key]))}
          @change=${(e: Event) => {
            this.session.setField([...base, key], (e.target as HTMLInputElement).value);
          }}
      /></label>`;
    return html`<details class="up" @keydown=${closeOnEscape} @toggle=${closeOnPressBeside}>
      <summary>Scenario</summary>
      <div class="menu">
        ${field('title', 'Title')} ${field('duration', 'Duration')}
        <label
          >Begins
          <select
            @change=${(e: Event) => {
              this.session.setField([...base, 'initial'], (e.target as HTMLSelectElement).value);
            }}
          >
            ${['steady', 'dry', 'hot-standby'].map((s) => html`<option ?selected=${(this.session.valueAt([...base, 'initial']) ?? 'steady') === s}>${s}</option>`)}
          </select></label
        >
        <label
          >Interlocks
          <select @change=${this.#onInterlocks}>
            ${this.#interlockChoices(base).map(([value, name, isOn]) => html`<option value=${value} ?selected=${isOn}>${name}</option>`)}
          </select></label
        >
        <button class="plain" @click=${this.#onCopyScenario}>Copy this scenario</button>
        <button class="plain" @click=${this.#onRemoveScenario}>Remove this scenario</button>
      </div>
    </details>`;
  }

  #interlockChoices(base: Path): readonly (readonly [string, string, boolean])[] {
    const now = this.session.valueAt([...base, 'interlocks']) ?? 'all';
    const listed: readonly (readonly [string, string, boolean])[] = Array.isArray(now)
      ? [['listed', now.join(', '), true]]
      : [];
    return [['all', 'all in service', now === 'all'], ['none', 'none in service', now === 'none'], ...listed];
  }

  #renderEditor(step: StepText, block: Block | undefined): TemplateResult {
    const base: Path = [...this.#base, this.selected];
    const where = pathText(base);
    const { issues } = this.session.state.read;
    return html`<bw-step-editor
      .step=${step}
      .base=${base}
      .label=${block?.label ?? ''}
      .issues=${issues.filter((i) => i.path === where || i.path.startsWith(`${where}.`) || i.path.startsWith(`${where}[`))}
      @bw-step-field=${(e: CustomEvent<{ key: string; value: string | number | undefined }>) => {
        this.session.setField([...base, e.detail.key], e.detail.value);
      }}
      @bw-step-remove=${() => {
        this.#removeStep(this.selected);
      }}
      @bw-step-close=${() => {
        this.selected = -1;
      }}
    ></bw-step-editor>`;
  }

  // Edits.

  readonly #onMove = (event: CustomEvent<{ index: number; value: number }>): void => {
    const { index, value } = event.detail;
    const edit = moveEdit(this.#base, this.#steps, this.#blocks(), index, Math.min(value, this.session.playhead.end));
    if (edit !== undefined) this.session.setField(edit[0], edit[1], `move-${index}`);
  };
  readonly #onStretch = (event: CustomEvent<{ index: number; value: number }>): void => {
    const { index, value } = event.detail;
    const edit = stretchEdit(this.#base, this.#blocks(), index, value);
    if (edit !== undefined) this.session.setField(edit[0], edit[1], `stretch-${index}`);
  };

  /** Takes a step away; what waited for it comes when it came. */
  #removeStep(index: number): void {
    const steps = this.#steps;
    const blocks = this.#blocks();
    const removed = steps[index];
    if (removed === undefined) return;
    const id = stepId(removed, index);
    const rest = steps.flatMap((step, i) => {
      if (i === index) return [];
      if (step['after'] !== id) return [step];
      const others = omit(step, 'after', 'delay');
      const start = blocks[i]?.start;
      return ['when' in step || start === undefined ? others : { ...others, at: fieldTime(start) }];
    });
    this.selected = -1;
    this.session.setField(this.#base, rest);
  }

  #onAdd(event: Event, choice: StepChoice): void {
    (event.currentTarget as HTMLElement).closest('details')?.removeAttribute('open');
    const steps = this.#steps;
    this.session.setField([...this.#base, steps.length], { at: fieldTime(this.session.playhead.time), ...choice.step });
    this.selected = steps.length;
  }

  #addBranch(choice: StepChoice, keepsLater: boolean): void {
    const action = omit(choice.step, 'label', 'role');
    const at = Math.round(this.session.playhead.time * 10) / 10;
    this.session.addBranch({ label: `${choice.label} at ${clock(at - this.#upset)}`, at, action, keepsLater });
  }

  readonly #onScenario = (event: Event): void => {
    this.selected = -1;
    this.session.chooseScenario((event.target as HTMLSelectElement).value);
  };
  readonly #onInterlocks = (event: Event): void => {
    const { value } = event.target as HTMLSelectElement;
    if (value !== 'listed') this.session.setField(['scenarios', this.session.work.scenario, 'interlocks'], value);
  };
  readonly #onCopyScenario = (): void => {
    const { scenario } = this.session.work;
    const given = this.session.valueAt(['scenarios', scenario]) as Record<string, unknown>;
    const all = Object.keys(this.session.valueAt(['scenarios']) as object);
    let name = `${scenario}-copy`;
    for (let n = 2; all.includes(name); n++) name = `${scenario}-copy-${n}`;
    this.session.setField(['scenarios', name], { ...given, title: `${String(given['title'])} (copy)` });
    this.session.chooseScenario(name);
  };
  readonly #onRemoveScenario = (): void => {
    const { scenario } = this.session.work;
    const others = Object.keys(this.session.valueAt(['scenarios']) as object).filter((id) => id !== scenario);
    const [next] = others;
    if (next === undefined) {
      this.session.notify('plain', 'A case keeps at least one scenario.');
      return;
    }
    this.session.setField(['scenarios', scenario], undefined);
    this.session.chooseScenario(next);
  };

  #hide(tag: string): void {
    this.session.setView({ hiddenLanes: [...this.session.state.view.hiddenLanes, tag] });
  }
  #show(tag: string): void {
    this.session.setView({ hiddenLanes: this.session.state.view.hiddenLanes.filter((t) => t !== tag) });
  }

  // The playhead.

  #grain(): number {
    const [from, to] = this.#window;
    const step = (to - from) / PARTS;
    return step > 1 ? Math.round(step) : step > 0.1 ? 1 : 0.1;
  }

  #zoom(factor: number): void {
    const [from, to] = this.#window;
    const { time, end } = this.session.playhead;
    const span = Math.min(end, Math.max(10, (to - from) * factor));
    const start = Math.min(Math.max(0, time - span / 2), end - span);
    this.session.setView({ window: span >= end ? undefined : [start, start + span] });
  }

  protected override updated(): void {
    if (this.width === 0) {
      const width = this.#plotWidth();
      if (width > 0) this.width = width;
    }
    this.#placeHead();
  }

  /** Moves the lines, and nothing else. */
  #placeHead(): void {
    const [from, to] = this.#window;
    const { time } = this.session.playhead;
    const x = ((time - from) / (to - from)) * this.width;
    const isIn = time >= from && time <= to;
    for (const line of this.renderRoot.querySelectorAll<HTMLElement>('.head')) {
      line.style.transform = `translateX(${x}px)`;
      line.style.visibility = isIn ? 'visible' : 'hidden';
    }
    const ruler = this.renderRoot.querySelector('.ruler');
    ruler?.setAttribute('aria-valuenow', String(Math.round(time)));
    ruler?.setAttribute('aria-valuetext', `${clock(time - this.#upset)} from the upset`);
  }

  readonly #onScrub = (event: PointerEvent): void => {
    const area = event.currentTarget as HTMLElement;
    const target = event.composedPath()[0];
    if (
      event.button !== 0 ||
      (target instanceof Element && target.closest('button, select, input, label, summary, .menu, .table') !== null)
    )
      return;
    const isRuler = area.classList.contains('ruler');
    const left = isRuler ? 0 : this.#sides().left;
    const seek = (e: PointerEvent): void => {
      const x = e.clientX - area.getBoundingClientRect().left - left;
      const [from, to] = this.#window;
      this.session.playhead.seek(Math.min(to, Math.max(from, from + (x / this.width) * (to - from))));
    };
    if (event.clientX - area.getBoundingClientRect().left < left) return;
    area.setPointerCapture(event.pointerId);
    area.addEventListener('pointermove', seek);
    const end = (): void => {
      area.removeEventListener('pointermove', seek);
      area.removeEventListener('pointerup', end);
      area.removeEventListener('pointercancel', end);
    };
    area.addEventListener('pointerup', end);
    area.addEventListener('pointercancel', end);
    seek(event);
  };

  readonly #onKey = (event: KeyboardEvent): void => {
    if (event.ctrlKey || event.metaKey || event.altKey || event.defaultPrevented) return;
    const onWidget = event
      .composedPath()
      .some((e) => e instanceof HTMLElement && e.matches('input, select, textarea, dialog, [role="region"]'));
    if (onWidget) return;
    const onButton = event.composedPath().some((e) => e instanceof HTMLElement && e.matches('button, summary'));
    const { playhead } = this.session;
    const step = this.#grain() * (event.shiftKey ? 10 : 1);
    switch (event.key) {
      case 'ArrowLeft':
        playhead.seek(playhead.time - step);
        break;
      case 'ArrowRight':
        playhead.seek(playhead.time + step);
        break;
      case 'Home':
        playhead.seek(0);
        break;
      case 'End':
        playhead.seek(playhead.end);
        break;
      case ' ':
        if (onButton) return;
        playhead.play(!playhead.isPlaying);
        break;
      case '+':
        this.#zoom(0.5);
        break;
      case '-':
        this.#zoom(2);
        break;
      case '0':
        this.session.setView({ window: undefined });
        break;
      case 'b':
        this.renderRoot.querySelector('bw-branches')?.renderRoot.querySelector<HTMLElement>('#action')?.focus();
        break;
      default:
        return;
    }
    event.preventDefault();
  };
}

/** Events that stand on the axis; `bad` ones in the colour of trouble. */
const MARKED: Readonly<Record<string, string>> = {
  alarm: '',
  interlock: '',
  'limit-crossed': 'bad',
  'limit-kept-again': '',
  flooding: 'bad',
};

/** A value of a case as a field shows it. */
function shownText(value: unknown): string {
  return typeof value === 'string' || typeof value === 'number' ? String(value) : '';
}

customElements.define('bw-upset-room', BwUpsetRoom);
declare global {
  interface HTMLElementTagNameMap {
    'bw-upset-room': BwUpsetRoom;
  }
}
