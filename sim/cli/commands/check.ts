/** `bedwave check`: whether a case reads, and whether the plant in it can run. */
import { issueSentence, type Issue } from '../../index.ts';
import { BadInput, EXIT } from '../exit.ts';
import { loadCase } from '../files.ts';

/** Runs the command; returns the exit code. @throws BadInput */
export function checkCommand(path: string): number {
  const { plant, warnings } = loadCase(path);
  const errors: readonly Issue[] = [];
  if (errors.length > 0) throw new BadInput([...errors, ...warnings]);
  for (const issue of warnings) process.stdout.write(`warning: ${issueSentence(issue)}\n`);
  process.stdout.write(`${plant.title}: no errors, ${warnings.length} warnings\n`);
  return EXIT.done;
}
