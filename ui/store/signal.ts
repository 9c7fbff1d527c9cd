/** Who wants to hear of a change. */
export class Listeners {
  readonly #all = new Set<() => void>();

  /** Hears from now on; the returned function ends it. */
  subscribe(listener: () => void): () => void {
    this.#all.add(listener);
    return () => {
      this.#all.delete(listener);
    };
  }

  tell(): void {
    for (const listener of [...this.#all]) listener();
  }
}
