import type {
  ConditionalNode,
  ConstantNode,
  FunctionNode,
  MathNode,
  OperatorNode,
  ParenthesisNode,
  SymbolNode,
} from 'mathjs';
import { refuse } from '../parameters.ts';
import type { Span } from './fault.ts';
import { refuseAt } from './fault.ts';
import { parseText } from './mathjs.ts';
import type { Token } from './tokens.ts';
import { DEEPEST, readTokens } from './tokens.ts';
import { CONSTANTS, FUNCTION_NAMES, RADIUS } from './words.ts';

export type BinaryOperator = '+' | '-' | '*' | '/' | '^';
export type Comparison = '<' | '>' | '<=' | '>=';

/** A formula as this house reads it: nothing but what stands here can be evaluated. */
export type Tree =
  | ({ kind: 'number'; value: number } & Span)
  | ({ kind: 'radius' } & Span)
  | ({ kind: 'parameter'; name: string } & Span)
  | ({ kind: 'minus'; of: Tree } & Span)
  | ({ kind: 'binary'; operator: BinaryOperator; left: Tree; right: Tree } & Span)
  | ({ kind: 'call'; name: string; of: Tree[] } & Span)
  | ({ kind: 'compare'; operator: Comparison; left: Tree; right: Tree } & Span)
  | ({ kind: 'if'; condition: Tree; yes: Tree; no: Tree } & Span);

const OPERATORS: ReadonlyMap<string, BinaryOperator> = new Map([
  ['add', '+'],
  ['subtract', '-'],
  ['multiply', '*'],
  ['divide', '/'],
  ['pow', '^'],
]);
const COMPARISONS: ReadonlyMap<string, Comparison> = new Map([
  ['smaller', '<'],
  ['larger', '>'],
  ['smallerEq', '<='],
  ['largerEq', '>='],
]);

const is = <T extends MathNode>(node: MathNode, type: T['type']): node is T => node.type === type;

/** Gives every leaf of the parsed tree its place: they come in the order of the words. */
class Places {
  private next = 0;
  private readonly words: readonly Token[];
  constructor(tokens: readonly Token[]) {
    this.words = tokens.filter(({ kind }) => kind !== 'operator');
  }
  take(): Token {
    const token = this.words[this.next];
    if (!token) throw new Error('The parsed formula has more leaves than words.');
    this.next += 1;
    return token;
  }
}

function leaf(node: MathNode, places: Places): Tree {
  const { text, from } = places.take();
  const span = { from, to: from + text.length };
  if (is<ConstantNode>(node, 'ConstantNode')) {
    const value = Number(text);
    if (!Number.isFinite(value)) refuseAt(from, 'this number is too large for double precision.');
    return { kind: 'number', value, ...span };
  }
  if (!is<SymbolNode>(node, 'SymbolNode') || node.name !== text) {
    refuseAt(from, `“${text}” cannot be read here.`);
  }
  const constant = CONSTANTS.get(text);
  if (constant !== undefined) return { kind: 'number', value: constant, ...span };
  return text === RADIUS ? { kind: 'radius', ...span } : { kind: 'parameter', name: text, ...span };
}

/** A chain of sums or of products is no nesting, however long. */
const isChain = (node: MathNode): boolean =>
  is<OperatorNode>(node, 'OperatorNode') &&
  node.args.length === 2 &&
  ['+', '-', '*', '/'].includes(node.op);

interface Walk {
  places: Places;
  depth: number;
}

function deeper({ places, depth }: Walk, node: MathNode, child: MathNode): Walk {
  const same = isChain(node) && isChain(child);
  return { places, depth: same || is(node, 'ParenthesisNode') ? depth : depth + 1 };
}

function operation(node: OperatorNode, walk: Walk): Tree {
  const args = node.args;
  const [first, second] = args;
  const fn = String(node.fn);
  if (first && !second && (fn === 'unaryMinus' || fn === 'unaryPlus')) {
    const of = convert(first, deeper(walk, node, first));
    return fn === 'unaryPlus' ? of : { kind: 'minus', of, from: of.from, to: of.to };
  }
  const operator = OPERATORS.get(fn);
  const comparison = COMPARISONS.get(fn);
  if (!first || !second || (!operator && !comparison)) {
    refuse('formula', `The operation ${fn} has no place in a formula.`);
  }
  const left = convert(first, deeper(walk, node, first));
  const right = convert(second, deeper(walk, node, second));
  const span = { from: left.from, to: right.to };
  if (operator) return { kind: 'binary', operator, left, right, ...span };
  return { kind: 'compare', operator: comparison ?? '<', left, right, ...span };
}

function call(node: FunctionNode, walk: Walk): Tree {
  const { text, from } = walk.places.take();
  if (node.fn.name !== text || !FUNCTION_NAMES.includes(text)) {
    refuseAt(from, `${text} is no function of a formula.`);
  }
  const of = node.args.map((child) => convert(child, deeper(walk, node, child)));
  return { kind: 'call', name: text, of, from, to: of.at(-1)?.to ?? from + text.length };
}

function convert(node: MathNode, walk: Walk): Tree {
  if (walk.depth > DEEPEST) {
    const { from } = walk.places.take();
    refuseAt(
      from,
      `the formula is nested more than ${DEEPEST} deep here; write it in fewer steps.`,
    );
  }
  if (is<ParenthesisNode>(node, 'ParenthesisNode')) {
    return convert(node.content, deeper(walk, node, node.content));
  }
  if (is<OperatorNode>(node, 'OperatorNode')) return operation(node, walk);
  if (is<FunctionNode>(node, 'FunctionNode')) return call(node, walk);
  if (is<ConditionalNode>(node, 'ConditionalNode')) {
    const [condition, yes, no] = [node.condition, node.trueExpr, node.falseExpr].map((child) =>
      convert(child, deeper(walk, node, child)),
    );
    if (!condition || !yes || !no) throw new Error('A conditional has three parts.');
    return { kind: 'if', condition, yes, no, from: condition.from, to: no.to };
  }
  if (is(node, 'ConstantNode') || is(node, 'SymbolNode')) return leaf(node, walk.places);
  if (is(node, 'RelationalNode')) {
    refuse('formula', 'Compare two values at a time: a < b < c has no place in a formula.');
  }
  refuse('formula', 'The formula must be one expression for V(r): nothing is assigned or defined.');
}

/** What the parser says of a formula that is none, with its place. */
function parsed(text: string): MathNode {
  try {
    return parseText(text);
  } catch (error) {
    if (error instanceof RangeError) {
      refuse('formula', `The formula is nested too deeply; at most ${DEEPEST} levels.`);
    }
    const at = error instanceof Error && 'char' in error ? Number(error.char) - 1 : text.length;
    const place = Math.min(Math.max(0, at), Math.max(0, text.length - 1));
    const end = at >= text.length;
    refuseAt(
      place,
      end ? 'the formula ends too soon: something is missing here.' : 'this cannot be read here.',
    );
  }
}

/**
 * Reads a formula for V(r) into a tree of arithmetic and elementary functions of r and the named parameters.
 *
 * @param formula at most 2,000 characters, at most 50 deep; chains of sums and products of any length
 * @param names of the declared parameters
 * @throws DomainError invalidInput at /formula, with the character, for whatever is no such formula
 */
export function readFormula(formula: string, names: ReadonlySet<string>): Tree {
  const { text, tokens } = readTokens(formula, names);
  return convert(parsed(text), { places: new Places(tokens), depth: 0 });
}
