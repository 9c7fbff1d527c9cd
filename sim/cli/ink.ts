/** Emphasis on a terminal; plain text elsewhere. Never the only carrier of a meaning. */
import pc from 'picocolors';

/** Ways to set text off. */
export interface Ink {
  strong(text: string): string;
  quiet(text: string): string;
  bad(text: string): string;
}

/** Ink of standard output: colours where it is a terminal that wants them. */
export function inkOf(stream: { readonly isTTY?: boolean }): Ink {
  const colours = pc.createColors(pc.isColorSupported && stream.isTTY === true);
  return { strong: colours.bold, quiet: colours.dim, bad: colours.red };
}
