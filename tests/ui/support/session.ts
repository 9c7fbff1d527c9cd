/** A session on an engine in this process and a store in memory. */
import { readFileSync } from 'node:fs';

import { Autosave, type Keeper } from '../../../ui/store/autosave.ts';
import { Session, type SessionState } from '../../../ui/store/session.ts';
import { workOn } from '../../../ui/store/work.ts';
import { EngineClient } from '../../../ui/worker/client.ts';
import { inProcessLine, type WatchedLine } from './in-process.ts';

/** A short case that computes in a moment: the demo on six segments, a minute and a half long. */
export function quickCase(): string {
  const document = JSON.parse(readFileSync('cases/acetone-absorber.json', 'utf8')) as {
    column: { beds: { segments: number }[] };
    scenarios: Record<string, { duration: string }>;
    run?: unknown;
  };
  document.column.beds[0]!.segments = 6;
  document.run = { rtol: 1e-3 };
  const { 'pump-trip': trip } = document.scenarios;
  document.scenarios = { 'pump-trip': { ...trip!, duration: '100 s' } };
  return `${JSON.stringify(document, null, 2)}\n`;
}

class MemoryKeeper implements Keeper {
  readonly kept = new Map<string, unknown>();
  get(key: string): Promise<unknown> {
    return Promise.resolve(structuredClone(this.kept.get(key)));
  }
  set(key: string, value: unknown): Promise<void> {
    this.kept.set(key, structuredClone(value));
    return Promise.resolve();
  }
}

export interface Rig {
  readonly session: Session;
  readonly line: WatchedLine;
  readonly keeper: MemoryKeeper;
}

export function createRig(text = quickCase(), keeper = new MemoryKeeper()): Rig {
  const line = inProcessLine();
  const session = new Session(
    {
      engine: new EngineClient(line.open),
      studyEngine: new EngineClient(inProcessLine().open),
      autosave: new Autosave(keeper),
      now: () => performance.now(),
    },
    workOn('quick.json', text),
  );
  return { session, line, keeper };
}

/** Resolves when the state is as wished; the test's own time limit ends the wait. */
export function until(session: Session, wish: (state: SessionState) => boolean): Promise<SessionState> {
  return new Promise((resolve) => {
    const look = (): void => {
      if (!wish(session.state)) return;
      unsubscribe();
      resolve(session.state);
    };
    const unsubscribe = session.subscribe(look);
    setImmediate(look);
  });
}

/** Whether the whole run of the present text is there. */
export function isWhole({ main }: SessionState): boolean {
  return !main.isStale && main.progress === undefined && main.packet?.quality === 'full';
}
