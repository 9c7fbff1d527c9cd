/** A record without some of its keys. */
export function omit<T extends Readonly<Record<string, unknown>>>(
  record: T,
  ...keys: readonly string[]
): Record<string, T[string]> {
  return Object.fromEntries(Object.entries(record).filter(([key]) => !keys.includes(key))) as Record<string, T[string]>;
}
