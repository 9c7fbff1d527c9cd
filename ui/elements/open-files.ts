/** Files that a person chose or dropped: one case, and the tables that it names. */
import type { Session } from '../store/session.ts';

/** Largest file that is read, bytes. */
const LARGEST = 20e6;

/** Opens a case file with the CSV files beside it; CSV files alone are added to the case that is open. */
export async function openFiles(session: Session, files: readonly File[]): Promise<void> {
  const large = files.find((f) => f.size > LARGEST);
  if (large !== undefined) {
    session.notify(
      'problem',
      `${large.name} has ${Math.round(large.size / 1e6)} MB; files up to ${LARGEST / 1e6} MB are read.`,
    );
    return;
  }
  const tables: Record<string, string> = {};
  for (const file of files.filter((f) => f.name.toLowerCase().endsWith('.csv'))) tables[file.name] = await file.text();
  const cases = files.filter((f) => !f.name.toLowerCase().endsWith('.csv'));
  const [first] = cases;
  if (first === undefined) {
    session.addFiles(tables);
    session.notify('plain', `Added for the case to use: ${Object.keys(tables).join(', ')}.`);
    return;
  }
  if (cases.length > 1) session.notify('plain', `Of ${cases.length} case files, ${first.name} was opened.`);
  session.open(first.name, await first.text(), tables);
}
