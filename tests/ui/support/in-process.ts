/** An engine in this process behind the same protocol: messages are copied as a worker's would be. */
import type { OpenLine } from '../../../ui/worker/client.ts';
import { EngineHost } from '../../../ui/worker/engine-host.ts';
import type { Request } from '../../../ui/worker/protocol.ts';

/** What a test sees of the line. */
export interface WatchedLine {
  readonly open: OpenLine;
  readonly sent: Request[];
  /** Ends the engine as a crash would. */ crash(): void;
}

export function inProcessLine(): WatchedLine {
  const sent: Request[] = [];
  let end: ((why: string) => void) | undefined;
  const open: OpenLine = (onAnswer, onEnd) => {
    let isOver = false;
    const host = new EngineHost({
      post: (answer, transfer) => {
        const copy = structuredClone(answer, { transfer });
        if (!isOver) onAnswer(copy);
      },
      now: () => performance.now(),
      pause: () => new Promise((resolve) => setImmediate(resolve)),
    });
    end = (why) => {
      isOver = true;
      onEnd(why);
    };
    return {
      send: (request) => {
        sent.push(request);
        host.receive(structuredClone(request));
      },
      close: () => {
        isOver = true;
      },
    };
  };
  return { open, sent, crash: () => end?.('it was killed') };
}
