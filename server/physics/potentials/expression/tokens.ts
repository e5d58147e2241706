import { refuse } from '../parameters.ts';
import { refuseAt } from './fault.ts';
import { FUNCTION_NAMES, KNOWN_WORDS, NAME, RADIUS } from './words.ts';

export const MOST_CHARACTERS = 2000;
export const DEEPEST = 50;

export interface Token {
  kind: 'number' | 'name' | 'operator';
  text: string;
  from: number;
}

const NUMBER = /^(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/;
const OPERATOR = /^(?:<=|>=|[-+*/^(),<>?:])/;
const FUNCTIONS = FUNCTION_NAMES.join(', ');

/** What a character that has no place in a formula would have been for, and the mend. */
function strangerFault(text: string): string {
  const character = [...text][0] ?? '';
  if (text.startsWith('**')) return 'write ^ for powers, as in r^2.';
  if (/^[=!]/.test(text)) {
    return 'nothing is assigned, defined or tested for equality here: a formula is one expression for V(r). Compare with < or >.';
  }
  if (/^["'`]/.test(text)) return 'a formula holds no texts.';
  if (/^[[\]{};]/.test(text)) {
    return `“${character}” makes lists, objects or several statements; a formula is one expression for V(r).`;
  }
  if (/^[.]/.test(text))
    return 'a full stop stands in numbers only; a formula reaches into nothing.';
  return `“${character}” has no place in a formula: numbers, names, + − * / ^, parentheses, < and > with ? and :.`;
}

/** The minus and the times signs that are printed, as those that are typed; the length stays. */
function plainSigns(formula: string): string {
  return formula.replace(/[\u2212\u2013]/g, '-').replace(/[\u00b7\u00d7\u22c5]/g, '*');
}

function tokensOf(formula: string): Token[] {
  const tokens: Token[] = [];
  let from = 0;
  while (from < formula.length) {
    const rest = formula.slice(from, from + MOST_CHARACTERS);
    const space = /^\s+/.exec(rest);
    if (space) {
      from += space[0].length;
      continue;
    }
    const number = NUMBER.exec(rest);
    const name = NAME.exec(rest);
    const operator = rest.startsWith('**') ? null : OPERATOR.exec(rest);
    const text = (number ?? name ?? operator)?.[0];
    if (text === undefined) refuseAt(from, strangerFault(rest));
    tokens.push({ kind: number ? 'number' : name ? 'name' : 'operator', text, from });
    from += text.length;
  }
  return tokens;
}

function checkName(
  { text, from }: Token,
  next: Token | undefined,
  names: ReadonlySet<string>,
): void {
  const called = next?.text === '(';
  const isFunction = FUNCTION_NAMES.includes(text);
  if (isFunction && !called) {
    refuseAt(from, `${text} is a function: give its argument in parentheses, as in ${text}(r/a).`);
  }
  if (called && !isFunction) {
    if (names.has(text) || KNOWN_WORDS.includes(text)) {
      refuseAt(from, `${text} is no function; write * before the parenthesis to multiply.`);
    }
    refuseAt(from, `${text} is no function of a formula. Functions: ${FUNCTIONS}.`);
  }
  if (!isFunction && !names.has(text) && !KNOWN_WORDS.includes(text)) {
    refuseAt(
      from,
      `${text} is neither ${RADIUS} nor a parameter. Give it a value under parameters, or check its spelling.`,
    );
  }
}

/** What stands side by side without an operator; mathematicians multiply, programs guess. */
function checkNeighbours(before: Token | undefined, token: Token): void {
  if (!before || token.kind === 'operator' ? token.text !== '(' : false) return;
  const ended = before && (before.kind !== 'operator' || before.text === ')');
  const isCall = before?.kind === 'name' && token.text === '(';
  if (ended && !isCall) refuseAt(token.from, `write * between ${before.text} and ${token.text}.`);
}

/**
 * Cuts a formula into its words and refuses everything that has no place in one, before any parser sees it.
 *
 * @param formula as it was typed
 * @param names of the declared parameters
 * @returns the words, and the formula in plain signs, its places unchanged
 * @throws DomainError invalidInput at /formula, with the character
 */
export function readTokens(
  formula: string,
  names: ReadonlySet<string>,
): { text: string; tokens: Token[] } {
  if (!(formula.length <= MOST_CHARACTERS)) {
    refuse('formula', `A formula may have at most ${MOST_CHARACTERS} characters.`);
  }
  const text = plainSigns(formula);
  const tokens = tokensOf(text);
  if (tokens.length === 0)
    refuse('formula', 'The formula is empty; write V(r), as in V0*exp(-r/a).');
  let depth = 0;
  tokens.forEach((token, i) => {
    if (token.text === '(') depth += 1;
    if (token.text === ')') depth -= 1;
    if (depth > DEEPEST) {
      refuseAt(token.from, `parentheses may lie at most ${DEEPEST} deep in each other.`);
    }
    if (depth < 0) refuseAt(token.from, 'this parenthesis was never opened.');
    if (token.kind === 'name') checkName(token, tokens[i + 1], names);
    checkNeighbours(tokens[i - 1], token);
  });
  const open = depth > 0 ? tokens.findLast(({ text: word }) => word === '(') : undefined;
  if (open) refuseAt(open.from, 'this parenthesis is not closed.');
  return { text, tokens };
}
