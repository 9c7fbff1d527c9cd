/** `bedwave steady`: the design point. */
import { createRun, steadyAnswers, steadyScenario } from '../../index.ts';
import { EXIT } from '../exit.ts';
import { loadCase, writeText } from '../files.ts';
import { inkOf } from '../ink.ts';
import type { Options } from '../options.ts';
import { steadyReport } from '../steady-report.ts';
import { say, sayIssues } from '../talk.ts';

/** Runs the command; returns the exit code. @throws BadInput */
export function steadyCommand(path: string, { json, units, segments }: Options): number {
  const { plant: read, warnings } = loadCase(path);
  sayIssues(warnings);
  const beds = read.column.beds.map((bed) => ({ ...bed, segments: segments ?? bed.segments }));
  const plant = { ...read, column: { ...read.column, beds } };
  const run = createRun(plant, steadyScenario(plant));
  const answer = steadyAnswers(run);
  const trouble =
    run.outcome.kind === 'failed'
      ? `no steady state was found; what moves most: ${run.outcome.failure.where}`
      : undefined;
  const document = `${JSON.stringify({ format: 'bedwave-steady', formatVersion: 1, title: plant.title, steady: trouble === undefined, ...answer }, null, 1)}\n`;
  if (json === true) process.stdout.write(document);
  else {
    if (json !== undefined) {
      writeText(json, document, [path]);
      say(`wrote ${json}`);
    }
    process.stdout.write(steadyReport({ plant, answer, units, ink: inkOf(process.stdout), trouble }));
  }
  if (trouble === undefined) return EXIT.done;
  say(trouble);
  return EXIT.stopped;
}
