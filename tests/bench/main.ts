// Benchmarks: `npm run bench`.
import { stepperTable } from './steppers.ts';

console.log(stepperTable());
