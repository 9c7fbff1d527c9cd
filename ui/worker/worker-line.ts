/** A line to a real worker. Notices its end by the lock that it holds, and by its error event. */
import type { OpenLine } from './client.ts';
import type { Answer } from './protocol.ts';

let count = 0;

/** Starts a worker and opens a line to it. */
export const workerLine: OpenLine = (onAnswer, onEnd) => {
  const name = `bedwave-engine-${Date.now()}-${count++}`;
  const worker = new Worker(new URL('./sim.worker.ts', import.meta.url), { type: 'module', name });
  const waiting = new AbortController();
  let isOver = false;
  const end = (why: string): void => {
    if (isOver) return;
    isOver = true;
    onEnd(why);
  };
  worker.onmessage = ({ data }: MessageEvent<Answer>) => {
    if (data.kind === 'ready' && 'locks' in navigator) {
      // Granted when the worker is gone, whatever ended it.
      navigator.locks
        .request(name, { signal: waiting.signal }, () => {
          end('it ended');
        })
        .catch(() => undefined);
    }
    if (!isOver) onAnswer(data);
  };
  worker.onerror = (event) => {
    event.preventDefault();
    end(event.message);
  };
  return {
    send: (request) => {
      worker.postMessage(request);
    },
    close: () => {
      isOver = true;
      waiting.abort();
      worker.terminate();
    },
  };
};
