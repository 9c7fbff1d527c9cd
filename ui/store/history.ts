/** What was, what is, what was taken back. Values are never changed in place. */

/** Most steps back. */
const LONGEST = 300;

/** A value with its past and its future. */
export class History<T> {
  #past: T[] = [];
  #present: T;
  #future: T[] = [];
  /** Edits in a row with the same name are one step back: a drag, typing in one field. */ #merging: string | undefined;

  constructor(present: T) {
    this.#present = present;
  }

  get present(): T {
    return this.#present;
  }
  get canUndo(): boolean {
    return this.#past.length > 0;
  }
  get canRedo(): boolean {
    return this.#future.length > 0;
  }

  /** A new present; with the same `merge` as the last one it takes its place. */
  push(next: T, merge?: string): void {
    if (next === this.#present) return;
    if (merge === undefined || merge !== this.#merging || this.#past.length === 0) {
      this.#past.push(this.#present);
      if (this.#past.length > LONGEST) this.#past.shift();
    }
    this.#merging = merge;
    this.#present = next;
    this.#future = [];
  }

  /** Ends a row of merged edits. */
  settle(): void {
    this.#merging = undefined;
  }

  /** One step back; false when there is none. */
  undo(): boolean {
    const before = this.#past.pop();
    if (before === undefined) return false;
    this.#future.push(this.#present);
    this.#present = before;
    this.settle();
    return true;
  }

  redo(): boolean {
    const after = this.#future.pop();
    if (after === undefined) return false;
    this.#past.push(this.#present);
    this.#present = after;
    this.settle();
    return true;
  }

  /** Forgets past and future. */
  reset(present: T): void {
    this.#past = [];
    this.#future = [];
    this.#present = present;
    this.settle();
  }
}
