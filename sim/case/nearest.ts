// The nearest known word to one that is not known, for hints.

/** Edits beyond this share of the word's length make a suggestion a guess. */
const LARGEST_SHARE = 0.45;

/**
 * The known word that needs the fewest edits (insert, delete, replace, swap of neighbours), case aside.
 *
 * @returns undefined when none is near.
 */
export function nearest(word: string, known: readonly string[]): string | undefined {
  let best: string | undefined;
  let fewest = Math.max(1, Math.floor(Math.min(word.length, 40) * LARGEST_SHARE)) + 1;
  for (const candidate of known) {
    const count = edits(word.toLowerCase().slice(0, 40), candidate.toLowerCase().slice(0, 40));
    if (count < fewest) {
      fewest = count;
      best = candidate;
    }
  }
  return best;
}

/** `did you mean ...?`, or the known words when they are few. */
export function suggestion(word: string, known: readonly string[]): string | undefined {
  const near = nearest(word, known);
  if (near !== undefined) return `did you mean "${near}"?`;
  if (known.length === 0) return undefined;
  return known.length <= 12 ? `known: ${known.join(', ')}` : undefined;
}

/** Optimal string alignment distance [Damerau1964], [Levenshtein1966]. */
function edits(a: string, b: string): number {
  const width = b.length + 1;
  const d = new Uint16Array((a.length + 1) * width);
  for (let j = 0; j < width; j += 1) d[j] = j;
  for (let i = 1; i <= a.length; i += 1) {
    d[i * width] = i;
    for (let j = 1; j < width; j += 1) {
      const same = a[i - 1] === b[j - 1] ? 0 : 1;
      let least = Math.min(
        (d[(i - 1) * width + j] ?? 0) + 1,
        (d[i * width + j - 1] ?? 0) + 1,
        (d[(i - 1) * width + j - 1] ?? 0) + same,
      );
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        least = Math.min(least, (d[(i - 2) * width + j - 2] ?? 0) + 1);
      }
      d[i * width + j] = least;
    }
  }
  return d[a.length * width + b.length] ?? 0;
}
