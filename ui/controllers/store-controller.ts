/** Draws an element again when a store tells of a change. */
import type { ReactiveController, ReactiveControllerHost } from 'lit';

/** Anything that can be listened to. */
export interface Subscribable {
  subscribe(listener: () => void): () => void;
}

/** Follows the store that an element has at the time; `onChange` in place of a new drawing. */
export class StoreController implements ReactiveController {
  readonly #store: () => Subscribable | undefined;
  readonly #onChange: () => void;
  #followed: Subscribable | undefined;
  #unsubscribe: (() => void) | undefined;

  constructor(host: ReactiveControllerHost, store: () => Subscribable | undefined, onChange?: () => void) {
    this.#store = store;
    this.#onChange =
      onChange ??
      (() => {
        host.requestUpdate();
      });
    host.addController(this);
  }

  hostConnected(): void {
    this.#follow();
  }
  hostUpdate(): void {
    this.#follow();
  }
  hostDisconnected(): void {
    this.#unsubscribe?.();
    this.#unsubscribe = undefined;
    this.#followed = undefined;
  }

  #follow(): void {
    const store = this.#store();
    if (store === this.#followed) return;
    this.#unsubscribe?.();
    this.#followed = store;
    this.#unsubscribe = store?.subscribe(this.#onChange);
  }
}
