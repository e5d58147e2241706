/** Insertions, deletions, replacements and swaps of neighbours that turn one word into the other. */
function distance(a: string, b: string): number {
  let before: number[] = [];
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1] ? 0 : 1;
      let least = Math.min((row[j] ?? 0) + 1, (next[j - 1] ?? 0) + 1, (row[j - 1] ?? 0) + same);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        least = Math.min(least, (before[j - 2] ?? 0) + 1);
      }
      next.push(least);
    }
    before = row;
    row = next;
  }
  return row[b.length] ?? 0;
}

/** The word that was probably meant: case does not count, and at most a third of the letters may be wrong. */
export function nearest(word: string, candidates: readonly string[]): string | undefined {
  const lower = word.slice(0, 40).toLowerCase();
  const allowed = Math.max(1, Math.floor(lower.length / 3));
  const [best] = candidates
    .map((candidate) => ({ candidate, far: distance(lower, candidate.toLowerCase()) }))
    .filter(({ candidate, far }) => far <= allowed && far < candidate.length)
    .sort((a, b) => a.far - b.far);
  return best?.candidate;
}

/** ` Did you mean yukawa?`, or nothing. */
export function didYouMean(word: string, candidates: readonly string[]): string {
  const found = nearest(word, candidates);
  return found === undefined ? '' : ` Did you mean ${found}?`;
}
