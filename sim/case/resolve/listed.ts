// Look-ups by a word of the user: "constructor" is a word, and no entry of a library.

/** The entry of a library, or undefined. */
export function listed<T>(library: Readonly<Record<string, T>>, id: string | undefined): T | undefined {
  return id !== undefined && Object.hasOwn(library, id) ? library[id] : undefined;
}
