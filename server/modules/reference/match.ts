/** Text for comparing: small letters, no accents, raised and lowered digits as plain ones. */
export function fold(text: string): string {
  return text.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase().trim();
}

const partsOf = (text: string): string[] =>
  text.split(/[^\p{L}\p{N}]+/u).filter((part) => part !== '');

/** What something can be found by. */
export interface Named {
  /** What it is called. */
  names: readonly string[];
  /** Whatever else is said of it. */
  words?: string;
}

function rankOfWord(word: string, names: readonly string[], words: string): number | null {
  if (names.some((name) => partsOf(name).some((part) => part.startsWith(word)))) return 2;
  // Elsewhere, and inside a word, only a piece that says enough.
  if (word.length < 3) return null;
  if (partsOf(words).some((part) => part.startsWith(word))) return 3;
  return names.some((name) => name.includes(word)) ? 4 : null;
}

/**
 * How well a search fits: 0 a name itself, 1 the beginning of one, 2 to 4 every word somewhere; null where one word is nowhere.
 * An empty search fits everything alike.
 */
export function rank(q: string, entry: Named): number | null {
  const asked = fold(q);
  const names = entry.names.map(fold);
  if (asked === '' || names.includes(asked)) return 0;
  if (names.some((name) => name.startsWith(asked))) return 1;
  const words = partsOf(asked);
  if (words.length === 0) return null;
  const ranks = words.map((word) => rankOfWord(word, names, fold(entry.words ?? '')));
  return ranks.some((found) => found === null) ? null : Math.max(...ranks.map(Number));
}

/** What fits, the best first; equals stay in the order of the table. */
export function fitting<T>(items: readonly T[], rankOf: (item: T) => number | null): T[] {
  return items
    .flatMap((item) => {
      const found = rankOf(item);
      return found === null ? [] : [{ item, found }];
    })
    .sort((one, other) => one.found - other.found)
    .map(({ item }) => item);
}
