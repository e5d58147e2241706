const TOKEN = /\\(?:text|mathrm|operatorname)\{[^}]*\}|\\[A-Za-z]+|\\.|_\{[^}]*\}|_.|\s+|./gu;

const tokensOf = (tex: string): string[] => tex.match(TOKEN) ?? [];
const isSpace = (token: string) => token.trim() === '' || token === '\\,' || token === '\\;';

/** How many tokens from `at` on spell the symbol; 0 where they do not. A letter with another subscript is another symbol. */
function spelled(tokens: readonly string[], at: number, symbol: readonly string[]): number {
  let place = at;
  for (const wanted of symbol) {
    while (place > at && isSpace(tokens[place] ?? '')) place += 1;
    if (tokens[place] !== wanted) return 0;
    place += 1;
  }
  return tokens[place]?.startsWith('_') ? 0 : place - at;
}

/**
 * A formula with values in place of its symbols, each in brackets, so that powers and products keep their meaning.
 * Words inside \text and \mathrm, commands and symbols without a value stay.
 */
export function substituted(tex: string, values: ReadonlyMap<string, string>): string {
  const symbols = [...values]
    .map(([symbol, value]) => ({
      symbol: tokensOf(symbol).filter((token) => !isSpace(token)),
      value,
    }))
    .sort((a, b) => b.symbol.length - a.symbol.length);
  const tokens = tokensOf(tex);
  let result = '';
  for (let at = 0; at < tokens.length;) {
    const found = symbols
      .map(({ symbol, value }) => ({ length: spelled(tokens, at, symbol), value }))
      .find(({ length }) => length > 0);
    result += found ? `\\left(${found.value}\\right)` : (tokens[at] ?? '');
    at += found?.length ?? 1;
  }
  return result;
}

/** What stands right of the first sign of equality; the whole where there is none. */
export function rightHandSide(tex: string): string {
  const at = tex.indexOf('=');
  return at < 0 ? tex : tex.slice(at + 1).trim();
}
