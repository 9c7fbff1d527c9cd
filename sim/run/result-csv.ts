/** The series of a result as CSV (RFC 4180): one header line, one line for each recorded moment, SI. */
import type { ResultDocument } from './result-schema.ts';

/** Header of a column: id or tag, true or shown, unit, label. */
function header({ id, sort, unit, label }: ResultDocument['series']['signals'][number]): string {
  return `${id} ${sort} [${unit}] ${label}`;
}

/** A field, quoted where the format asks for it. */
function field(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** The text; numbers read back to the same value, a value that is missing is an empty field. */
export function writeCsv({ series }: ResultDocument): string {
  const { time, signals } = series;
  const lines = [['time [s]', ...signals.map(header)].map(field).join(',')];
  time.forEach((t, i) => {
    lines.push([t, ...signals.map((s) => s.values[i] ?? '')].join(','));
  });
  return `${lines.join('\r\n')}\r\n`;
}
