import type { Meaning } from './meaning-amplitude.ts';

/** TeX of the page as plain LaTeX with amsmath: the sign for the angstrom is a command there. */
function portable(tex: string): string {
  return tex.replaceAll('Å', '\\AA{}').replaceAll('°', '^{\\circ}');
}

/** A number with its laws, ready for a document: a comment that says what it is, then one line a law. */
export function latexOf(meaning: Meaning): string {
  const comments = meaning.facts
    .filter(({ name }) => name !== 'Limits of it')
    .map(({ name, text }) => `% ${name}: ${text.replaceAll(/\s+/g, ' ')}`);
  const lines = meaning.steps.flatMap(({ law, substituted }) =>
    [law, substituted].filter((tex) => tex !== '').map((tex) => `  & ${portable(tex)}`),
  );
  return [
    `% ${meaning.title}`,
    ...comments,
    '\\begin{align*}',
    lines.join(' \\\\\n'),
    '\\end{align*}',
    '',
  ].join('\n');
}
