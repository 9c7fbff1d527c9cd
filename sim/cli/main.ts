/** The command line: words to commands, errors to sentences and exit codes. The only place that catches. */
import { Command, CommanderError } from 'commander';

import { VERSION } from '../index.ts';
import { checkCommand } from './commands/check.ts';
import { openCommand } from './commands/open.ts';
import { runCommand } from './commands/run.ts';
import { steadyCommand } from './commands/steady.ts';
import { BadInput, EXIT } from './exit.ts';
import { addOptions, joinPairs, type Options } from './options.ts';
import { say, sayIssues } from './talk.ts';

const EXAMPLES = {
  open: ['bedwave open', 'bedwave open my-case.json --port 8080', 'bedwave open --no-browser'],
  check: ['bedwave check cases/acetone-absorber.json'],
  steady: ['bedwave steady cases/acetone-absorber.json', 'bedwave steady my-case.json --units us --json steady.json'],
  run: [
    'bedwave run cases/acetone-absorber.json --list',
    'bedwave run cases/acetone-absorber.json --scenario pump-trip',
    'bedwave run cases/acetone-absorber.json --scenario pump-trip --json result.json --csv series.csv',
    'bedwave run cases/acetone-absorber.json --scenario feed-spike --hold outlet-half-hour --until "15 min"',
    'bedwave run cases/acetone-absorber.json --scenario feed-spike --segments 20 --estimate',
    'bedwave run cases/acetone-absorber.json --save "60 s" trip.state --profiles "0 s, 60 s, 2 min"',
    'bedwave run cases/acetone-absorber.json --resume trip.state',
  ],
} as const;

const EXIT_STATUS = `
Exit status: 0 done; 1 it ran, but the balance does not close or a limit asked to hold is not kept;
2 bad input; 3 the calculation could not go on (what it has is still written).`;

function examplesText(lines: readonly string[]): string {
  return `\nExamples:\n${lines.map((line) => `  ${line}`).join('\n')}\n${EXIT_STATUS}`;
}

function program(finish: (code: number) => void): Command {
  const root = new Command('bedwave')
    .description(
      'Upsets of packed absorbers, scrubbers and strippers: what the outlet does, and how long there is to act',
    )
    .version(VERSION)
    .addHelpText('after', examplesText(Object.values(EXAMPLES).flat()));
  // Commands made from here on inherit these.
  root.exitOverride().configureOutput({
    outputError: (text, write) => write(`bedwave: ${text.replace(/^error: /, '')}`),
  });
  const run = root
    .command('run <case>')
    .description('compute a scenario of a case and say what comes out')
    .addHelpText('after', examplesText(EXAMPLES.run));
  addOptions(run, [
    'scenario',
    'list',
    'until',
    'hold',
    'json',
    'csv',
    'units',
    'profiles',
    'estimate',
    'secondOpinion',
  ]);
  addOptions(run, ['save', 'resume', 'segments', 'tolerance', 'method', 'noise', 'seed']);
  run.action((path: string, options: Options) => finish(runCommand(path, options)));
  const steady = root
    .command('steady <case>')
    .description('the steady state: outlet, flooding, wetting, transfer units, profile')
    .addHelpText('after', examplesText(EXAMPLES.steady));
  addOptions(steady, ['json', 'units', 'segments']);
  steady.action((path: string, options: Options) => finish(steadyCommand(path, options)));
  const open = root
    .command('open [case]')
    .description('show the page in a browser: a case, its upsets, what would help')
    .addHelpText('after', examplesText(EXAMPLES.open));
  addOptions(open, ['port', 'noBrowser']);
  open.action((path: string | undefined, options: Options) => openCommand(path, options));
  root
    .command('check <case>')
    .description('read a case, say everything that is wrong with it, and whether its plant can run')
    .addHelpText('after', examplesText(EXAMPLES.check))
    .action((path: string) => finish(checkCommand(path)));
  return root;
}

/** Turns what was thrown into a message and an exit code. */
function explain(error: unknown): number {
  if (error instanceof CommanderError) return error.exitCode === 0 ? EXIT.done : EXIT.badInput;
  if (error instanceof BadInput) {
    sayIssues(error.issues);
    return EXIT.badInput;
  }
  const message = error instanceof Error ? (error.stack ?? error.message) : String(error);
  say(`a fault of the program, please report it: ${message}`);
  return EXIT.stopped;
}

// A reader that closes early (head, less) has all that it wants.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
  process.exit(process.exitCode ?? EXIT.done);
});

try {
  program((code) => {
    process.exitCode = code;
  }).parse(joinPairs(process.argv));
} catch (error) {
  process.exitCode = explain(error);
}
