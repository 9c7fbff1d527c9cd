#!/usr/bin/env node
// Starts the built command line. Committed, so that its x-bit survives a rebuild of dist/.
import { existsSync } from 'node:fs';

const main = new URL('../../dist/cli/main.js', import.meta.url);
if (existsSync(main)) {
  await import(main.href);
} else {
  process.stderr.write('bedwave: the command line is not built; run "npm run build" in the project folder\n');
  process.exitCode = 2;
}
