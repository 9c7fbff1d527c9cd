// The public surface of the simulator, and the only file of it that ui/ imports.

export { SimError } from './errors.ts';
export type { SimFault } from './errors.ts';

export { formatNumber, formatQuantity, formatTime, parseQuantity } from './units.ts';
export { KINDS, unitsOf } from './units.ts';
export type { KilogramPerMole, Kind, KindEntry, ParsedQuantity, Quantity, QuantityIssue, UnitEntry } from './units.ts';

export { LONGEST_TEXT, readCase } from './case/read.ts';
export type { ReadOptions, ReadResult } from './case/read.ts';
export { inUnit } from './case/measured.ts';
export type { MeasuredScale, StrengthBasis } from './case/measured.ts';
export { basisOf } from './case/resolve/strengths.ts';
export type { Substances } from './case/resolve/strengths.ts';
export { issueSentence } from './case/issues.ts';
export type { Issue, IssueKind } from './case/issues.ts';
export type * from './case/case.ts';
export type { ResolveFile } from './case/reading.ts';

export { createRun } from './run/simulate.ts';
export type { Intervention, Run, RunFailure, RunOutcome, SavedRun } from './run/simulate.ts';
export type { Recorder } from './run/recorder.ts';
export type { StepFailure, StepperStats } from './numerics/ivp/stepper.ts';
export { METHODS } from './run/integrators.ts';
export type { RunEvent, EventKind } from './run/events.ts';
export type { Observed, Observer, QuantityKind } from './run/observation.ts';
export type { BedProfile, Profile, ProfileRow } from './run/profiles.ts';

export { caseHash, resultOf, writeResult } from './run/result.ts';
export type { ResultExtras } from './run/result.ts';
export { resultSchema } from './run/result-schema.ts';
export type {
  Answers,
  ConvergenceBlock,
  LimitAnswer,
  ResultDocument,
  SecondOpinionBlock,
  SetpointCrossing,
} from './run/result-schema.ts';
export { writeCsv } from './run/result-csv.ts';
export { CAUTION, measuredSentence } from './run/sentence.ts';
export { headlineFigures, headlineLimit } from './run/answers.ts';
export type { HeadlineFigure } from './run/answers.ts';
export { massText, measuredText, normalMassText, quantityText } from './run/quantity-text.ts';
export type { InOwnUnit, UnitSystem } from './run/quantity-text.ts';
export { choicesOf, readSaved, writeSaved } from './run/saved-file.ts';
export type { RunChoices, SavedFile } from './run/saved-file.ts';
export { steadyAnswers, steadyScenario } from './run/steady-answers.ts';
export type { BedAnswer, OutletAnswer, SteadyAnswer, SteadyLimit, TransferAnswer } from './run/steady-answers.ts';
export { checkPlant } from './run/plant-check.ts';
export { secondOpinionOf } from './run/second-opinion.ts';
export { convergenceOf } from './run/convergence.ts';
export { VERSION } from './run/version.ts';
