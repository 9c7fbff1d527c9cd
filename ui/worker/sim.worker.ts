/** The worker's edge: messages in, messages out. Holds a lock for its life, so that the page notices its end. */
import { EngineHost } from './engine-host.ts';
import type { Answer, Request } from './protocol.ts';

/** The part of a worker's global scope that is used here. */
interface WorkerScope {
  readonly name: string;
  onmessage: ((event: MessageEvent<Request>) => void) | null;
  postMessage(answer: Answer, transfer: ArrayBuffer[]): void;
}
const scope = self as unknown as WorkerScope;

/** A message to oneself comes after those that wait. */
const channel = new MessageChannel();
function pause(): Promise<void> {
  return new Promise((resolve) => {
    channel.port1.onmessage = () => {
      resolve();
    };
    channel.port2.postMessage(null);
  });
}

const host = new EngineHost({
  post: (answer, transfer) => {
    scope.postMessage(answer, transfer);
  },
  now: () => performance.now(),
  pause,
});
scope.onmessage = ({ data }) => {
  host.receive(data);
};

function ready(): void {
  scope.postMessage({ kind: 'ready' }, []);
}
if ('locks' in navigator) {
  void navigator.locks.request(scope.name, () => {
    ready();
    return new Promise(() => undefined);
  });
} else {
  ready();
}
