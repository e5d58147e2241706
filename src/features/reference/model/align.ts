/** A space as wide as a figure of the face for numbers, which no browser folds away. */
const GAP = '\u00a0';

function split(text: string): [string, string] {
  const at = text.search(/[.(]/);
  return at < 0 ? [text, ''] : [text.slice(0, at), text.slice(at)];
}

/** Texts of numbers padded on both sides, so that set in a face of equal widths their decimal points stand in one line; what is empty stays so. */
export function aligned(texts: readonly string[]): string[] {
  const parts = texts.map(split);
  const before = Math.max(0, ...parts.map(([whole]) => whole.length));
  const after = Math.max(0, ...parts.map(([, rest]) => rest.length));
  return parts.map(([whole, rest], i) =>
    texts[i] === '' ? '' : whole.padStart(before, GAP) + rest.padEnd(after, GAP),
  );
}
