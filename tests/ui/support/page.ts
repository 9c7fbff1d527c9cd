/** What tests do on the page, in the words of a person. */
import { readFileSync } from 'node:fs';

import type { Page } from 'playwright-core';

// The page's element with its session.
import type {} from '../../../ui/elements/bw-app/bw-app.ts';

import { packWork } from '../../../ui/store/share.ts';
import { workOn, type Work } from '../../../ui/store/work.ts';
import type { OpenPage, Rig } from './browser.ts';
import { quickCase } from './session.ts';

/** Waits for the whole run of what is on the screen. */
export async function whole(page: Page): Promise<void> {
  await page.waitForFunction(
    () => {
      const state = document.querySelector('bw-app')?.session?.state;
      return (
        state !== undefined &&
        !state.main.isStale &&
        state.main.progress === undefined &&
        state.main.packet?.quality === 'full' &&
        state.read.text === state.work.text
      );
    },
    undefined,
    { timeout: 30_000 },
  );
}

/** The sentence. */
export function sentence(page: Page): Promise<string> {
  return page.locator('.sentence').innerText();
}

/** The case text of the page. */
export function caseText(page: Page): Promise<string> {
  return page.evaluate(() => document.querySelector('bw-app')?.session?.work.text ?? '');
}

/** The text of a file that the page hands over while something is done. */
export async function download(page: Page, act: () => Promise<void>): Promise<{ name: string; text: string }> {
  const [file] = await Promise.all([page.waitForEvent('download'), act()]);
  return { name: file.suggestedFilename(), text: readFileSync(await file.path(), 'utf8') };
}

/** A link with a case in it, as the page makes it. */
export async function linkOf(work: Partial<Work> & { readonly text: string }): Promise<string> {
  const packed = await packWork({ ...workOn('quick.json', work.text), ...work });
  if (!packed.ok) throw new Error('the case is too large for a link');
  return packed.fragment;
}

/** One page for many tests: loading it is most of what a test costs. Each begins with the quick case, computed. */
export function sharedPage(rig: () => Rig): () => Promise<OpenPage> {
  let shared: OpenPage | undefined;
  return async () => {
    if (shared === undefined) {
      shared = await rig().open({ hash: await linkOf({ text: quickCase() }) });
    } else {
      await shared.page.evaluate((text) => {
        const session = document.querySelector('bw-app')!.session!;
        for (const { id } of session.state.notices) session.dismiss(id);
        session.setView({ room: 'upset', window: undefined, hiddenLanes: [], map: 'gas.0' });
        session.open('quick.json', text);
      }, quickCase());
    }
    await whole(shared.page);
    return shared;
  };
}
