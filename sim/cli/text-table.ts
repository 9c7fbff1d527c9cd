/** Tables of text for a terminal: columns as wide as their widest cell, two blanks between. */

/** Lines of a table; the first row is the header. Columns named in `right` (by index) end flush. */
export function textTable(rows: readonly (readonly string[])[], right: readonly number[] = []): string[] {
  const columns = Math.max(0, ...rows.map((r) => r.length));
  const widths = Array.from({ length: columns }, (_, c) => Math.max(...rows.map((r) => (r[c] ?? '').length)));
  return rows.map((row) =>
    widths
      .map((width, c) => (right.includes(c) ? (row[c] ?? '').padStart(width) : (row[c] ?? '').padEnd(width)))
      .join('  ')
      .trimEnd(),
  );
}

/** Text broken at blanks, lines after the first set in. */
export function wrapped(text: string, width: number, indent: string): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    if (line !== '' && line.length + 1 + word.length > width) {
      lines.push(line);
      line = indent + word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  if (line !== '') lines.push(line);
  return lines;
}

/** Time as h:mm:ss; with tenths where asked. */
export function clock(seconds: number, tenths = false): string {
  const sign = seconds < 0 ? '-' : '';
  const unit = tenths ? 10 : 1;
  const n = Math.round(Math.abs(seconds) * unit);
  const whole = Math.floor(n / unit);
  const two = (v: number): string => String(v).padStart(2, '0');
  const rest = tenths ? `.${n % 10}` : '';
  return `${sign}${Math.floor(whole / 3600)}:${two(Math.floor((whole % 3600) / 60))}:${two(whole % 60)}${rest}`;
}
