// Nothing typed is lost, nothing leaves, everybody can use it. The built page in a real browser; costs some 20 s.
import { source as axe } from 'axe-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';

import { startRig, type Rig } from '../support/browser.ts';
import { caseText, download, linkOf, sentence, sharedPage, whole } from '../support/page.ts';
import { quickCase } from '../support/session.ts';

let rig: Rig;
beforeAll(async () => {
  rig = await startRig();
}, 120_000);
afterAll(() => rig.close());

const quick = sharedPage(() => rig);

describe('the page', () => {
  test.each([
    ['light', 1440, 900],
    ['dark', 390, 844],
    ['dark', 1440, 900],
    ['light', 390, 844],
  ] as const)(
    '%s at %i x %i: axe finds nothing, and nothing is wider than the screen',
    { timeout: 60_000 },
    async (theme, width, height) => {
      const { page, faults } = await quick();
      await page.emulateMedia({ colorScheme: theme });
      await page.setViewportSize({ width, height });
      await page.waitForTimeout(100); // a frame or two, for what follows the size
      await page.locator('bw-step-editor, bw-timeline .block').first().click();
      const violations = await page
        .evaluate(async (source) => {
          // The page's policy lets no script in; this one comes through the debugger.
          (0, eval)(source);
          const { axe } = globalThis as unknown as {
            axe: {
              run(): Promise<{ violations: { id: string; nodes: { html: string; failureSummary: string }[] }[] }>;
            };
          };
          const result = await axe.run();
          return result.violations.map(
            (v) => `${v.id}: ${v.nodes.map((n) => `${n.html.slice(0, 160)} ${n.failureSummary}`).join(' | ')}`,
          );
        }, axe)
        .catch((error: unknown) => [String(error)]);
      expect(violations).toEqual([]);
      expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(
        0,
      );
      expect(faults).toEqual([]);
    },
  );

  test('asks nobody but its own server, and runs no script from elsewhere', { timeout: 60_000 }, async () => {
    const { page, context } = await rig.open({
      hash: await linkOf({ text: quickCase().replace('P-310A trips', '<img src=x onerror=alert(1)>') }),
    });
    const asked: string[] = [];
    page.on('request', (r) => asked.push(r.url()));
    await page.reload();
    await whole(page);
    expect(asked.filter((u) => !u.startsWith(rig.address) && !u.startsWith('blob:') && !u.startsWith('data:'))).toEqual(
      [],
    );
    expect(await page.locator('bw-timeline .block').first().innerText()).toContain('<img src=x');
    expect(await page.evaluate(() => [...document.querySelectorAll('img')].length)).toBe(0);
    const policy = (await page.request.get(rig.address)).headers()['content-security-policy'];
    expect(policy).toContain("default-src 'self'");
    expect(
      await page.evaluate(
        () =>
          new Promise((resolve) => {
            document.addEventListener(
              'securitypolicyviolation',
              (e) => {
                resolve(e.effectiveDirective);
              },
              { once: true },
            );
            const script = document.createElement('script');
            script.textContent = 'window.hurt = 1';
            document.body.append(script);
          }),
      ),
    ).toMatch(/script-src/);
    await context.close();
  });
});

describe('the work', () => {
  test('survives a reload', { timeout: 60_000 }, async () => {
    const { page } = await quick();
    await page.getByLabel('Name of the case file').fill('mine.json');
    await page.getByLabel('Name of the case file').press('Enter');
    await page.locator('bw-timeline .block').first().focus();
    await page.keyboard.press('ArrowRight');
    const text = await caseText(page);
    expect(text).toContain('"31 s"');
    await page.reload();
    await whole(page);
    expect(await caseText(page)).toBe(text);
    expect(await page.getByLabel('Name of the case file').inputValue()).toBe('mine.json');
  });

  test(
    'a broken file is refused with its line, a case with a wrong value is opened with its issue',
    { timeout: 60_000 },
    async () => {
      const { page } = await quick();
      const before = await caseText(page);
      await page.locator('#file').setInputFiles({
        name: 'broken.json',
        mimeType: 'application/json',
        buffer: Buffer.from('{\n "title": "x"\n "y"'),
      });
      await page.getByText('broken.json is not a case file').waitFor();
      expect(await page.locator('bw-notices li').innerText()).toMatch(/line 3/);
      expect(await caseText(page)).toBe(before);
      await page.locator('#file').setInputFiles({
        name: 'wrong.json',
        mimeType: 'application/json',
        buffer: Buffer.from(before.replace('"0.82 m"', '"0.82 kg"')),
      });
      await page.locator('.issues li').first().waitFor();
      expect(await page.locator('.issues').innerText()).toContain('column.diameter');
      await page.getByRole('button', { name: 'Undo' }).click();
      await whole(page);
    },
  );

  test('goes round by a link', { timeout: 60_000 }, async () => {
    const { page, context } = await quick();
    await page.locator('bw-timeline .block').first().focus();
    await page.keyboard.press('Shift+ArrowRight');
    await context.grantPermissions(['clipboard-read', 'clipboard-write']);
    await page.locator('bw-bar summary', { hasText: 'Case' }).click();
    await page.getByRole('button', { name: 'Copy a link with the case in it' }).click();
    await page.getByText(/The link is copied: \d+ characters/).waitFor();
    const link = await page.evaluate(() => navigator.clipboard.readText());
    const other = await rig.open({ hash: link.slice(rig.address.length) });
    await whole(other.page);
    expect(await caseText(other.page)).toBe(await caseText(page));
    expect(await sentence(other.page)).toBe(await sentence(page));
    expect(new URL(other.page.url()).hash).toBe('');
    await other.context.close();
  });

  test('is saved as the file it is', { timeout: 60_000 }, async () => {
    const { page } = await quick();
    const saved = await download(page, () => page.keyboard.press('Control+s'));
    expect(saved).toEqual({ name: 'quick.json', text: quickCase() });
  });
});

describe('the engine', () => {
  test('that is killed in the middle of a run comes again, and so does the run', { timeout: 60_000 }, async () => {
    const { page } = await quick();
    const [worker] = page.workers();
    await page.locator('bw-timeline .block').first().focus();
    const killed = worker!.evaluate(() => {
      self.close();
    });
    await page.keyboard.press('ArrowRight');
    await killed.catch(() => undefined);
    await page.getByText('It was started again').waitFor();
    await whole(page);
    expect(await sentence(page)).toMatch(/^Acetone/);
  });

  test('shows the last of two rapid edits', { timeout: 60_000 }, async () => {
    const { page } = await quick();
    await page.evaluate(() => {
      const session = document.querySelector('bw-app')!.session!;
      session.setField(['column', 'beds', 0, 'height'], '2 m');
      session.setField(['column', 'beds', 0, 'height'], '8 m');
    });
    await whole(page);
    expect(
      await page.evaluate(
        () => document.querySelector('bw-app')!.session!.state.main.packet!.plant.column.beds[0]!.height,
      ),
    ).toBe(8);
  });
});
