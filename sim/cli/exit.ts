/** Exit codes, and the one error that commands throw for input that cannot be used. */
import type { Issue } from '../case/issues.ts';

/** What the shell is told. */
export const EXIT = {
  /** Done. */ done: 0,
  /** It ran, but the balance does not close, or a limit that was asked to hold failed. */ notKept: 1,
  /** Bad input. */ badInput: 2,
  /** The calculation could not go on. */ stopped: 3,
} as const;

/** Input that cannot be used: every issue that was found. */
export class BadInput extends Error {
  readonly issues: readonly Issue[];

  constructor(issues: readonly Issue[]) {
    super(`${issues.length} issues`);
    this.name = 'BadInput';
    this.issues = issues;
  }
}

/** An issue of the command line itself. */
export function badOption(path: string, expected: string, received: string, hint?: string): BadInput {
  const issue = { path, expected, received, severity: 'error', kind: 'choice' } as const;
  return new BadInput([hint === undefined ? issue : { ...issue, hint }]);
}
