import { css, html, LitElement, nothing, type TemplateResult } from 'lit';

import type { Path } from '../../store/json-text.ts';
import { issueSentence, type Issue } from '../../store/shown.ts';
import type { StepText } from '../../store/timeline.ts';
import { controls } from '../../styles/shared.ts';

/** Keys of a step in words, in the order of the form. */
const WORDS: Readonly<Record<string, string>> = {
  label: 'name',
  at: 'at, from the start',
  after: 'after the step',
  delay: 'delay after it',
  role: 'role',
  change: 'changes',
  to: 'to',
  by: 'by',
  times: 'times',
  over: 'ramp',
  for: 'lasts',
  start: 'start',
  stop: 'stop',
  lockOut: 'cannot be started',
  release: 'release',
  open: 'open',
  close: 'close',
  valve: 'valve',
  stick: 'sticks',
  free: 'moves again',
  controller: 'controller',
  mode: 'mode',
  setpoint: 'setpoint',
  output: 'output',
  fault: 'fault',
  instrument: 'instrument',
  perTime: 'drift',
  interlock: 'interlock',
  command: 'command',
};
/** Keys that may be added where a step lacks them. */
const OPTIONAL: Readonly<Record<string, readonly string[]>> = { change: ['over', 'for'], powerDip: ['for'] };

/** One step, exactly: a field for each key, with what is wrong where it stands. @fires bw-step-field @fires bw-step-remove @fires bw-step-close */
export class BwStepEditor extends LitElement {
  static override styles = [
    controls,
    css`
      form {
        display: flex;
        flex-wrap: wrap;
        gap: 6px 14px;
        align-items: end;
        padding: 6px 0;
      }
      label {
        display: grid;
        gap: 1px;
        font-size: 12px;
        color: var(--ink-2);
      }
      input {
        width: 11em;
        color: var(--ink);
      }
      .name input {
        width: 18em;
      }
      .when,
      .do {
        font-size: 12px;
        color: var(--ink-2);
        align-self: center;
      }
      .issue {
        flex-basis: 100%;
        color: var(--bad);
        font-size: 12.5px;
      }
    `,
  ];
  static override properties = {
    step: { attribute: false },
    base: { attribute: false },
    label: { type: String },
    issues: { attribute: false },
  };
  declare step: StepText;
  /** Path of the step in the case. */ declare base: Path;
  declare label: string;
  /** Of the step. */ declare issues: readonly Issue[];

  constructor() {
    super();
    this.step = {};
    this.base = [];
    this.label = '';
    this.issues = [];
  }

  protected override render(): TemplateResult {
    const { step } = this;
    const given = Object.keys(WORDS).filter(
      (k) => k !== 'label' && k !== 'role' && (typeof step[k] === 'string' || typeof step[k] === 'number'),
    );
    const more = Object.entries(OPTIONAL).flatMap(([verb, keys]) =>
      verb in step ? keys.filter((k) => !given.includes(k)) : [],
    );
    const waits = 'after' in step && !('when' in step) && !given.includes('delay') ? ['delay'] : [];
    return html`<form aria-label="Step: ${this.label}" @submit=${this.#onSubmit}>
      ${this.#renderField('label', this.label, 'name')}
      ${[...given, ...waits, ...more].map((key) => this.#renderField(key, step[key] ?? ''))}
      ${'when' in step ? html`<span class="when">when ${conditionText(step['when'])}</span>` : nothing}
      ${Array.isArray(step['do']) ? html`<span class="do">does ${step['do'].map((a) => actionText(a)).join(', ')}</span>` : nothing}
      <button type="button" @click=${() => this.dispatchEvent(new CustomEvent('bw-step-remove', { bubbles: true }))}>
        Remove
      </button>
      <button
        type="button"
        class="plain"
        @click=${() => this.dispatchEvent(new CustomEvent('bw-step-close', { bubbles: true }))}
      >
        Close
      </button>
      ${this.issues.map((issue) => html`<div class="issue" role="alert">${issueSentence(issue)}</div>`)}
    </form>`;
  }

  #renderField(key: string, value: unknown, kind = ''): TemplateResult {
    const isBad = this.issues.some((i) => i.path.endsWith(`.${key}`));
    return html`<label class=${kind}
      >${WORDS[key]}<input
        name=${key}
        .value=${String(value)}
        aria-invalid=${isBad ? 'true' : 'false'}
        autocomplete="off"
        spellcheck="false"
        @change=${this.#onChange}
    /></label>`;
  }

  #onChange(event: Event): void {
    const { name, value } = event.target as HTMLInputElement;
    const text = value.trim();
    const before = this.step[name];
    // A number stays one where the case had a number.
    const next =
      text === '' ? undefined : typeof before === 'number' && Number.isFinite(Number(text)) ? Number(text) : text;
    this.dispatchEvent(new CustomEvent('bw-step-field', { detail: { key: name, value: next }, bubbles: true }));
  }
  #onSubmit(event: Event): void {
    event.preventDefault();
  }
}

function conditionText(when: unknown): string {
  const { instrument, above, below, for: hold } = (when ?? {}) as Record<string, string | undefined>;
  const side = above === undefined ? `below ${below ?? ''}` : `above ${above}`;
  return `${instrument ?? ''} is ${side}${hold === undefined ? '' : ` for ${hold}`}`;
}

function actionText(action: unknown): string {
  return Object.entries((action ?? {}) as Record<string, unknown>)
    .map(([k, v]) => `${WORDS[k] ?? k} ${String(v)}`)
    .join(' ');
}

customElements.define('bw-step-editor', BwStepEditor);
declare global {
  interface HTMLElementTagNameMap {
    'bw-step-editor': BwStepEditor;
  }
  interface HTMLElementEventMap {
    'bw-step-field': CustomEvent<{ key: string; value: string | number | undefined }>;
    'bw-step-remove': CustomEvent;
    'bw-step-close': CustomEvent;
  }
}
