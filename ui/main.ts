/** Starts the page: the engine first, then the work that was kept, shared or shown as an example, then the elements. */
import { get, set } from 'idb-keyval';

import './elements/bw-app/bw-app.ts';
import { Autosave } from './store/autosave.ts';
import { DEMO, exampleText } from './store/examples.ts';
import { Session } from './store/session.ts';
import { isShared, unpackWork } from './store/share.ts';
import { workOn, type Work } from './store/work.ts';
import { EngineClient } from './worker/client.ts';
import { workerLine } from './worker/worker-line.ts';

const engine = new EngineClient(workerLine);
engine.begin();
const autosave = new Autosave({ get: (key) => get(key), set: (key, value) => set(key, value) });

const kept = await autosave.load();
const fragment = location.hash;
const shared = isShared(fragment) ? await unpackWork(fragment) : undefined;
const taken = fragment === '#open' ? await namedCase() : shared;
const before = kept?.work ?? taken ?? workOn(`${DEMO}.json`, await exampleText(DEMO));
const session = new Session(
  { engine, studyEngine: new EngineClient(workerLine), autosave, now: () => performance.now() },
  before,
);
session.start(kept?.view);
if (taken !== undefined && taken !== before && taken.text !== before.text) {
  session.take(taken);
  session.notify('plain', `${taken.name} was opened. Undo brings back ${before.name}, which was here before.`);
}
if (isShared(fragment) && shared === undefined) {
  session.notify('problem', 'The link is damaged: it was cut or changed on its way.');
}
const app = document.querySelector('bw-app');
if (app !== null) app.session = session;
if (taken !== undefined || isShared(fragment)) {
  // Once it is kept: a reload is to show what was made of it since, not the link again.
  await autosave.settled();
  history.replaceState(null, '', location.pathname + location.search);
}

/** The case that the command line was given. */
async function namedCase(): Promise<Work | undefined> {
  try {
    const { name, text } = (await (await fetch('./case.json')).json()) as { name: string; text: string };
    return workOn(name, text);
  } catch {
    return undefined;
  }
}
