/** What the command line says beside its results: on standard error, each line with the program's name. */
import { issueSentence, type Issue } from '../index.ts';

/** A message. */
export function say(message: string): void {
  process.stderr.write(`bedwave: ${message}\n`);
}

/** One line for each issue. */
export function sayIssues(issues: readonly Issue[]): void {
  for (const issue of issues) say(`${issue.severity === 'warning' ? 'warning: ' : ''}${issueSentence(issue)}`);
}

/** Least share of the way between two looks of the progress line. */
const LEAST_CHANGE = 0.01;
/** Work that is worth a line, ms. */
const LONG = 1000;

/** A line that shows how far a long run is, on a terminal only; erased at the end. */
export function progressLine(what: string, end: number): { update(t: number): void; finish(): void } {
  const shows = process.stderr.isTTY;
  const started = Date.now();
  let share = 0;
  let written = false;
  return {
    update(t) {
      if (!shows || t / end < share + LEAST_CHANGE || Date.now() - started < LONG) return;
      share = t / end;
      written = true;
      process.stderr.write(`\rbedwave: ${what} ${Math.floor(100 * share)} %`);
    },
    finish() {
      if (written) process.stderr.write('\r\u001b[K');
    },
  };
}
