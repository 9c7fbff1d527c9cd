/**
 * A real browser on the built page with its real headers. Chromium: BROWSER_PATH, one on the PATH or in the usual places
 * of macOS and Windows, else the one in the npm package (Linux x64, no system package needed).
 */
import { existsSync, mkdirSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { delimiter, join } from 'node:path';

import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { build } from 'vite';

import { createPageServer } from '../../../sim/cli/page-server.ts';

const ROOT = join(import.meta.dirname, '../../..');
const CACHE = join(ROOT, 'node_modules/.cache/chromium');
const PAGE = join(ROOT, 'dist/ui');

/** A browser and the address of the page. */
export interface Rig {
  readonly address: string;
  /** A page of its own, with nothing kept; what went wrong in it is in `faults`. */
  open(options?: {
    width?: number;
    height?: number;
    theme?: 'light' | 'dark';
    hash?: string;
    path?: string;
  }): Promise<OpenPage>;
  close(): Promise<void>;
}

export interface OpenPage {
  readonly page: Page;
  readonly context: BrowserContext;
  /** Errors on the console and uncaught ones. */ readonly faults: string[];
}

/** Starts both. */
export async function startRig(): Promise<Rig> {
  await buildPage();
  const server = createPageServer(PAGE);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = `http://127.0.0.1:${(server.address() as AddressInfo).port}/`;
  const browser = await launch();
  return {
    address,
    async open({ width = 1440, height = 900, theme = 'light', hash = '' } = {}) {
      const context = await browser.newContext({
        viewport: { width, height },
        colorScheme: theme,
        acceptDownloads: true,
      });
      const page = await context.newPage();
      const faults: string[] = [];
      page.on('pageerror', (error) => faults.push(error.message));
      page.on('console', (message) => {
        if (message.type() === 'error') faults.push(message.text());
      });
      await page.goto(address + hash);
      return { page, context, faults };
    },
    async close() {
      await browser.close();
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
    },
  };
}

/** Builds the page when a source is newer than what is built. One at a time, whoever comes second waits. */
async function buildPage(): Promise<void> {
  const lock = join(ROOT, 'node_modules/.cache/page-build');
  mkdirSync(join(ROOT, 'node_modules/.cache'), { recursive: true });
  for (;;) {
    try {
      mkdirSync(lock);
      break;
    } catch {
      // A lock that nobody holds any more is left by a run that was killed.
      if (existsSync(lock) && Date.now() - statSync(lock).mtimeMs > 60_000)
        rmSync(lock, { recursive: true, force: true });
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  }
  try {
    const built = existsSync(join(PAGE, 'index.html')) ? statSync(join(PAGE, 'index.html')).mtimeMs : 0;
    if (newest(['ui', 'sim', 'cases', 'vite.config.ts', 'package-lock.json']) > built) {
      await build({ configFile: join(ROOT, 'vite.config.ts'), mode: 'ui', logLevel: 'error' });
    }
  } finally {
    rmSync(lock, { recursive: true, force: true });
  }
}

function newest(names: readonly string[]): number {
  let time = 0;
  for (const name of names) {
    const path = join(ROOT, name);
    const files = statSync(path).isDirectory()
      ? readdirSync(path, { recursive: true, withFileTypes: true })
          .filter((e) => e.isFile())
          .map((e) => join(e.parentPath, e.name))
      : [path];
    for (const file of files) time = Math.max(time, statSync(file).mtimeMs);
  }
  return time;
}

const NAMES = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'microsoft-edge'];
const PLACES = [
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
  'C:\\Program Files (x86)\\Microsoft\\Edge\\Application\\msedge.exe',
];

function installed(): string | undefined {
  const onPath = (process.env['PATH'] ?? '')
    .split(delimiter)
    .flatMap((folder) => NAMES.map((name) => join(folder, name)));
  return [process.env['BROWSER_PATH'] ?? '', ...onPath, ...PLACES].find((path) => path !== '' && existsSync(path));
}

async function launch(): Promise<Browser> {
  const found = installed();
  const args = ['--no-sandbox'];
  if (found !== undefined) return chromium.launch({ executablePath: found, args });
  mkdirSync(CACHE, { recursive: true });
  const before = process.env['TMPDIR'];
  // Without the first it leaves its libraries packed; it unpacks to the second.
  process.env['AWS_EXECUTION_ENV'] = 'AWS_Lambda_nodejs20.x';
  process.env['TMPDIR'] = CACHE;
  const { default: packed } = await import('@sparticuz/chromium');
  const executablePath = await packed.executablePath();
  if (before === undefined) delete process.env['TMPDIR'];
  else process.env['TMPDIR'] = before;
  const fonts = join(CACHE, 'fonts.conf');
  // Its own file names folders of another place; a browser without any font breaks off at the first list.
  writeFileSync(
    fonts,
    `<?xml version="1.0"?><!DOCTYPE fontconfig SYSTEM "fonts.dtd"><fontconfig><dir>${CACHE}/fonts</dir><cachedir>${CACHE}/font-cache</cachedir></fontconfig>\n`,
  );
  const env = Object.fromEntries(Object.entries(process.env).flatMap(([k, v]) => (v === undefined ? [] : [[k, v]])));
  return chromium.launch({ executablePath, args, env: { ...env, FONTCONFIG_FILE: fonts } });
}
