/** Keeps the work between visits. Every change is written at once; while one write is under way only the last waits. */
import { asWork, type Work } from './work.ts';

/** Where things are kept: a key and a value that can be cloned. */
export interface Keeper {
  get(key: string): Promise<unknown>;
  set(key: string, value: unknown): Promise<void>;
}

/** What is kept. */
export interface Kept {
  readonly work: Work;
  /** Choices of the eye: room, theme, map. */ readonly view: unknown;
}

const KEY = 'bedwave-work';

/** Writes and reads what is kept. */
export class Autosave {
  readonly #keeper: Keeper;
  #waiting: Kept | undefined;
  #writing: Promise<void> | undefined;
  /** Told when the last write failed, and when one works again. */ onTrouble: ((failed: boolean) => void) | undefined;

  constructor(keeper: Keeper) {
    this.#keeper = keeper;
  }

  async load(): Promise<Kept | undefined> {
    try {
      const value = await this.#keeper.get(KEY);
      if (typeof value !== 'object' || value === null) return undefined;
      const { work, view } = value as { work?: unknown; view?: unknown };
      const read = asWork(work);
      return read === undefined ? undefined : { work: read, view };
    } catch {
      return undefined;
    }
  }

  save(kept: Kept): void {
    this.#waiting = kept;
    this.#writing ??= this.#write();
  }

  /** Resolves when everything given so far is written, or has failed. */
  async settled(): Promise<void> {
    await this.#writing;
  }

  async #write(): Promise<void> {
    while (this.#waiting !== undefined) {
      const kept = this.#waiting;
      this.#waiting = undefined;
      try {
        await this.#keeper.set(KEY, kept);
        this.onTrouble?.(false);
      } catch {
        this.onTrouble?.(true);
      }
    }
    this.#writing = undefined;
  }
}
