/** Draws charts one after the other, a frame between two, so that the page stays alive. A newer wish takes the place of an older one. */

type Draw = () => Promise<void>;

const waiting = new Map<object, Draw>();
let isBusy = false;

/** Puts a drawing in the queue; `owner` has at most one there. */
export function queueDraw(owner: object, draw: Draw): void {
  waiting.set(owner, draw);
  if (!isBusy) void work();
}

/** Takes an owner's drawing out. */
export function dropDraw(owner: object): void {
  waiting.delete(owner);
}

async function work(): Promise<void> {
  isBusy = true;
  for (;;) {
    const [next] = waiting;
    if (next === undefined) break;
    const [owner, draw] = next;
    waiting.delete(owner);
    try {
      await draw();
    } catch (error) {
      console.error(error);
    }
    await new Promise((resolve) => {
      setTimeout(resolve, 0);
    });
  }
  isBusy = false;
}
