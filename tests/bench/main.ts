// Benchmarks. `npm run bench`: parts of a step and the two-hour run beside odex. `npm run bench -- methods`: integrators.
import { methodsTable } from './methods.ts';
import { partsTable } from './parts.ts';
import { stepperTable } from './steppers.ts';
import { wholeRunTable } from './whole-run.ts';

if (process.argv.includes('methods')) {
  console.log(`${stepperTable()}\n\n${methodsTable()}`);
} else {
  console.log(partsTable());
  console.log(wholeRunTable());
}
