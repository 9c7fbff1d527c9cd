/**
 * Keeps each slot's run up to date: a quick draft, then the whole run; the newest wish wins. Finished packets are kept,
 * so that undo shows its curve at once.
 */
import { CaseRefused, EngineLost, type EngineClient } from '../worker/client.ts';
import type { RunPacket } from '../worker/packet.ts';
import type { RunRequest } from '../worker/protocol.ts';

/** How a slot stands. */
export interface RunState {
  /** The newest packet that there is; of an earlier wish while `isStale`. */ readonly packet: RunPacket | undefined;
  readonly isStale: boolean;
  /** Share computed of the run under way; undefined when none is. */ readonly progress: number | undefined;
  /** Why there is no newer packet, in words. */ readonly trouble: string | undefined;
}

/** What a slot is to show. */
export type Wish = Omit<RunRequest, 'quality'>;

interface Slot {
  key: string;
  state: RunState;
  /** What the whole run took, ms; a quick one needs no draft. */ took: number;
}

const EMPTY: RunState = { packet: undefined, isStale: false, progress: undefined, trouble: undefined };
/** Whole runs that are quicker than this are not drafted, ms. */
const QUICK = 200;
const KEPT_PACKETS = 12;
/** Attempts after the engine was lost. */
const ATTEMPTS = 2;

export class RunSlots {
  readonly #engine: EngineClient;
  readonly #tell: () => void;
  readonly #now: () => number;
  readonly #slots = new Map<string, Slot>();
  readonly #kept = new Map<string, RunPacket>();

  /** `now`: ms, to know how long runs take. */
  constructor(engine: EngineClient, tell: () => void, now: () => number) {
    this.#engine = engine;
    this.#tell = tell;
    this.#now = now;
  }

  state(slot: string): RunState {
    return this.#slots.get(slot)?.state ?? EMPTY;
  }

  /** Wishes a run; the same wish again changes nothing. */
  want(name: string, wish: Wish): void {
    const key = [wish.scenario, wish.text, JSON.stringify(wish.files)].join('\u0000');
    const slot = this.#slots.get(name) ?? { key: '', state: EMPTY, took: Infinity };
    this.#slots.set(name, slot);
    if (slot.key === key) return;
    slot.key = key;
    const kept = this.#kept.get(key);
    if (kept !== undefined) {
      this.#engine.stop(name);
      this.#set(slot, { packet: kept, isStale: false, progress: undefined, trouble: undefined });
      return;
    }
    this.#set(slot, { ...slot.state, isStale: true, progress: 0, trouble: undefined });
    if (slot.took > QUICK) void this.#draft(name, slot, key, wish);
    void this.#whole(name, slot, key, wish, ATTEMPTS);
  }

  /** Marks a slot's packet as not that of the present case, and computes nothing. */
  hold(name: string, why: string | undefined): void {
    const slot = this.#slots.get(name);
    if (slot === undefined) return;
    this.#engine.stop(name);
    slot.key = '';
    this.#set(slot, { ...slot.state, isStale: true, progress: undefined, trouble: why });
  }

  /** Stops what a slot computes; what is there stays. */
  stop(name: string): void {
    const slot = this.#slots.get(name);
    if (slot?.state.progress === undefined) return;
    this.hold(name, 'stopped');
  }

  /** Computes again what was stopped. */
  again(name: string): void {
    const slot = this.#slots.get(name);
    if (slot !== undefined) slot.key = '';
  }

  remove(name: string): void {
    if (!this.#slots.has(name)) return;
    this.#engine.stop(name);
    this.#slots.delete(name);
  }

  names(): string[] {
    return [...this.#slots.keys()];
  }

  #set(slot: Slot, state: RunState): void {
    slot.state = state;
    this.#tell();
  }

  async #draft(name: string, slot: Slot, key: string, wish: Wish): Promise<void> {
    try {
      const end = await this.#engine.run(name, { ...wish, quality: 'draft' });
      if (end.kind !== 'packet' || slot.key !== key || (!slot.state.isStale && slot.state.packet?.quality === 'full'))
        return;
      this.#set(slot, { ...slot.state, packet: end.packet, isStale: false });
    } catch {
      // The whole run says what is wrong.
    }
  }

  async #whole(name: string, slot: Slot, key: string, wish: Wish, attempts: number): Promise<void> {
    const began = this.#now();
    try {
      const end = await this.#engine.run(name, { ...wish, quality: 'full' }, (share) => {
        if (slot.key === key) this.#set(slot, { ...slot.state, progress: share });
      });
      if (end.kind !== 'packet') return;
      this.#keep(key, end.packet);
      if (slot.key !== key) return;
      slot.took = this.#now() - began;
      this.#set(slot, { packet: end.packet, isStale: false, progress: undefined, trouble: undefined });
    } catch (error) {
      if (slot.key !== key) return;
      if (error instanceof EngineLost && attempts > 0) {
        await this.#whole(name, slot, key, wish, attempts - 1);
        return;
      }
      this.#set(slot, { ...slot.state, isStale: true, progress: undefined, trouble: troubleText(error) });
    }
  }

  #keep(key: string, packet: RunPacket): void {
    this.#kept.delete(key);
    this.#kept.set(key, packet);
    for (const old of this.#kept.keys()) {
      if (this.#kept.size <= KEPT_PACKETS) break;
      this.#kept.delete(old);
    }
  }
}

function troubleText(error: unknown): string {
  if (error instanceof EngineLost) return `the engine ended (${error.message})`;
  if (error instanceof CaseRefused) return error.issues.map((i) => `${i.path}: expected ${i.expected}`).join('; ');
  return error instanceof Error ? `a fault of the program: ${error.message}` : String(error);
}
