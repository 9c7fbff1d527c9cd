/** Times for axes, tables and fields. Seconds in, text out. */

/** h:mm:ss, with tenths where asked; a minus before the upset. */
export function clock(seconds: number, tenths = false): string {
  if (!Number.isFinite(seconds)) return 'none';
  const unit = tenths ? 10 : 1;
  const n = Math.round(Math.abs(seconds) * unit);
  const whole = Math.floor(n / unit);
  const two = (v: number): string => String(v).padStart(2, '0');
  const rest = tenths ? `.${n % 10}` : '';
  const sign = seconds < 0 && n > 0 ? '\u2212' : '';
  return `${sign}${Math.floor(whole / 3600)}:${two(Math.floor((whole % 3600) / 60))}:${two(whole % 60)}${rest}`;
}

/** Distances between marks of a time axis, s. */
const SPACINGS = [1, 2, 5, 10, 15, 30, 60, 120, 300, 600, 900, 1800, 3600, 7200, 10_800, 21_600, 43_200, 86_400];

/** Marks of a time axis: at round times from the upset, at most `most` of them. Times from the start in and out. */
export function clockMarks(
  from: number,
  to: number,
  upset: number,
  most: number,
): { readonly at: number; readonly text: string }[] {
  const spacing = SPACINGS.find((s) => (to - from) / s <= most) ?? 86_400 * Math.ceil((to - from) / 86_400 / most);
  const first = Math.ceil((from - upset) / spacing - 1e-9);
  const last = Math.floor((to - upset) / spacing + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, k) => {
    const since = (first + k) * spacing;
    return { at: since + upset, text: clock(since) };
  });
}

/** A time as a case file takes it: "90 s", "6.5 s"; whole tenths. */
export function fieldTime(seconds: number): string {
  return `${Math.round(seconds * 10) / 10} s`;
}
