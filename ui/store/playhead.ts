/**
 * The moment that is looked at. A store of its own: it moves with every frame, and what follows it must not draw the
 * rest again. Times in s from the start of the scenario.
 */
import { Listeners } from './signal.ts';

/** Where, and whether it moves by itself. */
export class Playhead {
  readonly #listeners = new Listeners();
  #time = 0;
  #end = 0;
  #isPlaying = false;
  /** Plant seconds for each second of watching. */ speed = 30;

  get time(): number {
    return this.#time;
  }
  get end(): number {
    return this.#end;
  }
  get isPlaying(): boolean {
    return this.#isPlaying;
  }

  subscribe(listener: () => void): () => void {
    return this.#listeners.subscribe(listener);
  }

  /** Goes to a moment, kept within the scenario. */
  seek(time: number): void {
    const to = Math.min(Math.max(0, time), this.#end);
    if (to === this.#time || !Number.isFinite(to)) return;
    this.#time = to;
    this.#listeners.tell();
  }

  /** The scenario's length, s. */
  limit(end: number): void {
    if (end === this.#end) return;
    this.#end = end;
    this.#time = Math.min(this.#time, end);
    this.#listeners.tell();
  }

  play(on: boolean): void {
    if (on && this.#time >= this.#end) this.#time = 0;
    this.#isPlaying = on;
    this.#listeners.tell();
  }

  /** Moves on by a time of watching, s; stops at the end. */
  tick(watched: number): void {
    if (!this.#isPlaying) return;
    const to = this.#time + watched * this.speed;
    if (to >= this.#end) this.#isPlaying = false;
    this.#time = Math.min(to, this.#end);
    this.#listeners.tell();
  }
}
