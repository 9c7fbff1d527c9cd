/** `bedwave open`: the page, served to this machine alone, and a browser when there is one. */
import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { basename } from 'node:path';
import { fileURLToPath } from 'node:url';

import { badOption, EXIT } from '../exit.ts';
import { loadCase, readText } from '../files.ts';
import type { Options } from '../options.ts';
import { createPageServer } from '../page-server.ts';
import { say, sayIssues } from '../talk.ts';

/** First port that is tried; the system picks one when it is taken. */
const PORT = 4310;

/** Serves the page until it is stopped. @throws BadInput */
export function openCommand(path: string | undefined, { port, browser }: Options): void {
  // The built command line stands in dist/cli, the page beside it.
  const folder = fileURLToPath(new URL('../ui', import.meta.url));
  if (!existsSync(folder)) {
    throw badOption('open', 'the built page', 'none', 'run "npm run build" in the project folder');
  }
  if (path !== undefined) sayIssues(loadCase(path).warnings);
  const server = createPageServer(
    folder,
    path === undefined ? undefined : () => ({ name: basename(path), text: readText(path, 'case file') }),
  );
  const listen = (at: number): void => {
    server.listen(at, '127.0.0.1', () => {
      const address = server.address();
      const url = `http://127.0.0.1:${typeof address === 'object' && address !== null ? address.port : at}/${path === undefined ? '' : '#open'}`;
      process.stdout.write(`${url}\n`);
      say('serving to this machine alone; stop with Ctrl C');
      if (browser !== false) showInBrowser(url);
    });
  };
  server.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code === 'EADDRINUSE' && port === undefined) {
      listen(0);
      return;
    }
    say(`cannot serve: ${error.message}`);
    process.exitCode = EXIT.badInput;
  });
  listen(port ?? PORT);
}

/** Asks the system to show an address; where it cannot, the printed one is there. */
function showInBrowser(url: string): void {
  if (
    process.platform === 'linux' &&
    process.env['DISPLAY'] === undefined &&
    process.env['WAYLAND_DISPLAY'] === undefined
  )
    return;
  const [program, ...rest] =
    process.platform === 'darwin'
      ? ['open', url]
      : process.platform === 'win32'
        ? ['explorer.exe', url]
        : ['xdg-open', url];
  const child = spawn(program, rest, { detached: true, stdio: 'ignore' });
  child.on('error', () => {
    say('no browser could be started; open the address by hand');
  });
  child.unref();
}
