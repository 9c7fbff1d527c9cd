/** `bedwave run`: computes a scenario and says what came out. */
import {
  choicesOf,
  convergenceOf,
  createRun,
  measuredSentence,
  readSaved,
  resultOf,
  secondOpinionOf,
  writeCsv,
  writeResult,
  writeSaved,
  type Case,
  type ResultDocument,
  type ResultExtras,
  type Run,
  type SavedFile,
  type Scenario,
} from '../../index.ts';
import { BadInput, badOption, EXIT } from '../exit.ts';
import { loadCase, readText, writeText, type LoadedCase } from '../files.ts';
import { inkOf } from '../ink.ts';
import type { Options } from '../options.ts';
import { runReport } from '../report.ts';
import { progressLine, say, sayIssues } from '../talk.ts';
import { textTable } from '../text-table.ts';

/** Runs the command; returns the exit code. @throws BadInput */
export function runCommand(path: string, options: Options): number {
  const loaded = loadCase(path);
  sayIssues(loaded.warnings);
  if (options.list === true) return listScenarios(loaded.plant);
  if (options.json === true && options.csv === true) {
    throw badOption('--csv', 'a file, since --json has standard output', 'both without a file');
  }
  const saved = options.resume === undefined ? undefined : loadSaved(options.resume, loaded.text, options);
  const scenario = chosenScenario(loaded.plant, options, saved);
  const plant = chosenPlant(loaded.plant, options, saved);
  checkHolds(plant, options.hold ?? []);
  checkSaving(scenario, options, saved);
  const run = createRun(plant, scenario, saved?.run);
  go(run, loaded, options, [path, ...(options.resume === undefined ? [] : [options.resume])]);
  const result = resultOf(run, { caseText: loaded.text, ...studies(run, options) });
  output(result, run, options, [path]);
  return exitCode(result, options.hold ?? []);
}

function listScenarios(plant: Case): number {
  const rows = plant.scenarios.map(({ id, title }) => [id, title]);
  process.stdout.write(`${textTable(rows).join('\n')}\n`);
  return EXIT.done;
}

function loadSaved(file: string, caseText: string, options: Options): SavedFile {
  const result = readSaved(readText(file, 'saved run'), caseText);
  if (!result.ok) throw new BadInput([{ ...result.issue, path: file }]);
  const given = (['scenario', 'until', 'segments', 'tolerance', 'method', 'seed', 'noise'] as const).find(
    (name) => options[name] !== undefined,
  );
  if (given !== undefined) {
    throw badOption(`--${given}`, 'no such option beside --resume', `--${given}`, 'a saved run goes on as it began');
  }
  return result.value;
}

/** The scenario asked for, ending where asked. */
function chosenScenario(plant: Case, options: Options, saved: SavedFile | undefined): Scenario {
  const id = saved?.run.scenario ?? options.scenario;
  const found = id === undefined ? plant.scenarios[0] : plant.scenarios.find((s) => s.id === id);
  if (found === undefined) {
    const known = plant.scenarios.map((s) => s.id).join(', ');
    throw badOption(
      '--scenario',
      known === '' ? 'a case with scenarios' : `one of ${known}`,
      id === undefined ? 'a case without' : `"${id}"`,
    );
  }
  const duration = saved?.choices.duration ?? options.until ?? found.duration;
  if (!(duration > 0)) throw badOption('--until', 'a time after the start', '0 s');
  return { ...found, duration };
}

/** The case with the settings that the command line overrides. */
function chosenPlant(plant: Case, options: Options, saved: SavedFile | undefined): Case {
  const choices = saved?.choices;
  const { beds } = plant.column;
  return {
    ...plant,
    column: {
      ...plant.column,
      beds: beds.map((bed, b) => ({ ...bed, segments: choices?.segments[b] ?? options.segments ?? bed.segments })),
    },
    run: {
      ...plant.run,
      rtol: choices?.rtol ?? options.tolerance ?? plant.run.rtol,
      method: choices?.method ?? options.method ?? plant.run.method,
      noise: choices?.noise ?? options.noise ?? plant.run.noise,
      seed: choices?.seed ?? options.seed ?? plant.run.seed,
    },
  };
}

function checkHolds(plant: Case, hold: readonly string[]): void {
  const known = plant.limits.map((l) => l.id);
  const unknown = hold.find((id) => id !== 'all' && !known.includes(id));
  if (unknown !== undefined) throw badOption('--hold', `all, or one of ${known.join(', ')}`, `"${unknown}"`);
}

function checkSaving({ duration }: Scenario, { save }: Options, saved: SavedFile | undefined): void {
  if (save === undefined) return;
  const from = saved?.run.stepper.t ?? 0;
  if (save.time > duration || save.time < from) {
    throw badOption('--save', `a time from ${from} s to the end of the run, ${duration} s`, `${save.time} s`);
  }
}

/** Computes to the end, saving on the way where asked. */
function go(run: Run, { text }: LoadedCase, { save, profiles }: Options, inputs: readonly string[]): void {
  const { duration } = run.scenario;
  const progress = progressLine(run.scenario.id, duration);
  const onStep = (t: number): void => progress.update(t);
  if (profiles !== undefined) run.takeProfiles(profiles);
  if (save !== undefined) {
    run.advance(save.time, onStep);
    writeText(save.file, writeSaved(text, choicesOf(run.plant, duration), run.save()), inputs);
  }
  run.advance(duration, onStep);
  progress.finish();
  if (save !== undefined) say(`saved the run at ${save.time} s to ${save.file}`);
}

/** What is asked for beside the run: the same by another integrator, and on twice the segments. */
function studies(run: Run, options: Options): Pick<ResultExtras, 'secondOpinion' | 'convergence'> {
  const watched = <T>(what: string, study: (run: Run, onStep: (t: number) => void) => T): T => {
    const progress = progressLine(`${run.scenario.id}, ${what},`, run.time);
    const found = study(run, (t) => progress.update(t));
    progress.finish();
    return found;
  };
  return {
    ...(options.secondOpinion === true ? { secondOpinion: watched('second opinion', secondOpinionOf) } : {}),
    ...(options.estimate === true && run.outcome.kind !== 'failed'
      ? { convergence: watched('twice the segments', convergenceOf) }
      : {}),
  };
}

/** Document and table to their files, or one of them, or else the report, to standard output. */
function output(result: ResultDocument, run: Run, options: Options, inputs: readonly string[]): void {
  const { json, csv, units } = options;
  if (typeof json === 'string') writeNamed(json, writeResult(result), inputs);
  if (typeof csv === 'string') writeNamed(csv, writeCsv(result), inputs);
  if (json === true) process.stdout.write(writeResult(result));
  else if (csv === true) process.stdout.write(writeCsv(result));
  else {
    const ink = inkOf(process.stdout);
    process.stdout.write(
      runReport({ plant: run.plant, result, sentence: measuredSentence(run, result, units), units, ink }),
    );
  }
  if (result.outcome.failure !== null) say(`the calculation could not go on: ${result.outcome.failure.text}`);
}

function writeNamed(file: string, text: string, inputs: readonly string[]): void {
  writeText(file, text, inputs);
  say(`wrote ${file}`);
}

function exitCode(result: ResultDocument, hold: readonly string[]): number {
  if (result.outcome.kind === 'failed') return EXIT.stopped;
  const broken = result.answers.limits.filter((l) => !l.kept && (hold.includes('all') || hold.includes(l.id)));
  for (const limit of broken) say(`${limit.id} is not kept`);
  if (!result.closure.ok) say('the balance does not close');
  return broken.length > 0 || !result.closure.ok ? EXIT.notKept : EXIT.done;
}
