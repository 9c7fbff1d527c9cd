/** `bedwave check`: whether a case reads, and whether the plant in it can run. */
import { checkPlant, issueSentence } from '../../index.ts';
import { BadInput, EXIT } from '../exit.ts';
import { loadCase } from '../files.ts';

/** Runs the command; returns the exit code. @throws BadInput */
export function checkCommand(path: string): number {
  const { plant, warnings: ofText } = loadCase(path);
  const ofPlant = checkPlant(plant);
  const warnings = [...ofText, ...ofPlant.filter((i) => i.severity === 'warning')];
  if (ofPlant.some((i) => i.severity === 'error')) throw new BadInput([...ofPlant, ...ofText]);
  for (const issue of warnings) process.stdout.write(`warning: ${issueSentence(issue)}\n`);
  process.stdout.write(
    `${plant.title}: no errors, ${warnings.length} ${warnings.length === 1 ? 'warning' : 'warnings'}\n`,
  );
  return EXIT.done;
}
