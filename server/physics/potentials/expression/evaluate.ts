import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { BinaryOperator, Comparison, Tree } from './tree.ts';
import { PLAIN_FUNCTIONS } from './words.ts';

/** A value with a bound of what rounding did to it. */
export interface Known {
  value: number;
  error: number;
}

export interface Compiled {
  at: (r: number) => number;
  /** The same with a running bound of its rounding, that of the parameters included. */
  knownAt: (r: number) => Known;
}

/** A parameter is converted from the unit it was typed in. */
const PARAMETER_ROUNDING = UNIT_ROUNDOFF;
const FUNCTION_ROUNDING = 2 * UNIT_ROUNDOFF;
/** erf and erfc are good to some twelve roundings, and to those of exp(-x²). */
const ERROR_FUNCTION_ROUNDING = 64 * UNIT_ROUNDOFF;

const ARITHMETIC: Record<BinaryOperator, (a: number, b: number) => number> = {
  '+': (a, b) => a + b,
  '-': (a, b) => a - b,
  '*': (a, b) => a * b,
  '/': (a, b) => a / b,
  '^': (a, b) => a ** b,
};
const COMPARE: Record<Comparison, (a: number, b: number) => boolean> = {
  '<': (a, b) => a < b,
  '>': (a, b) => a > b,
  '<=': (a, b) => a <= b,
  '>=': (a, b) => a >= b,
};
const MANY: Readonly<Record<string, (...values: number[]) => number>> = {
  sqrt: Math.sqrt,
  abs: Math.abs,
  pow: (a, b) => (a ?? NaN) ** (b ?? NaN),
  min: Math.min,
  max: Math.max,
};

function functionOf(name: string): (...values: number[]) => number {
  const plain = PLAIN_FUNCTIONS.get(name);
  const found = plain ? (...[x]: number[]) => plain(x ?? NaN) : MANY[name];
  if (!found) throw new Error(`${name} is no function of a formula`);
  return found;
}

/** How far a function moves when its arguments do, one after the other. */
function moved(f: (...values: number[]) => number, of: readonly Known[], value: number): number {
  const values = of.map((one) => one.value);
  let sum = 0;
  of.forEach(({ error }, i) => {
    if (!(error > 0)) return;
    const shifted = (by: number) => {
      const there = f(...values.map((one, j) => (j === i ? one + by : one)));
      return Number.isFinite(there) ? Math.abs(there - value) : 0;
    };
    sum += Math.max(shifted(error), shifted(-error));
  });
  return sum;
}

function known(f: (...values: number[]) => number, of: readonly Known[], rounding: number): Known {
  const value = f(...of.map((one) => one.value));
  return { value, error: moved(f, of, value) + rounding * Math.abs(value) };
}

function truthOf(tree: Tree, parameters: ReadonlyMap<string, number>): (r: number) => boolean {
  if (tree.kind !== 'compare') throw new Error('only a comparison is true or false');
  const compare = COMPARE[tree.operator];
  const [left, right] = [compile(tree.left, parameters), compile(tree.right, parameters)];
  return (r) => compare(left.at(r), right.at(r));
}

function binary(
  { operator, left, right }: Extract<Tree, { kind: 'binary' }>,
  parameters: ReadonlyMap<string, number>,
): Compiled {
  const f = ARITHMETIC[operator];
  const [a, b] = [compile(left, parameters), compile(right, parameters)];
  const rounding = operator === '^' ? FUNCTION_ROUNDING : UNIT_ROUNDOFF;
  const knownAt = (r: number) => known(f, [a.knownAt(r), b.knownAt(r)], rounding);
  switch (operator) {
    case '+':
      return { at: (r) => a.at(r) + b.at(r), knownAt };
    case '-':
      return { at: (r) => a.at(r) - b.at(r), knownAt };
    case '*':
      return { at: (r) => a.at(r) * b.at(r), knownAt };
    case '/':
      return { at: (r) => a.at(r) / b.at(r), knownAt };
    case '^':
      return { at: (r) => a.at(r) ** b.at(r), knownAt };
  }
}

function call(
  { name, of }: Extract<Tree, { kind: 'call' }>,
  parameters: ReadonlyMap<string, number>,
): Compiled {
  const f = functionOf(name);
  const parts = of.map((part) => compile(part, parameters));
  const [only] = parts;
  const at =
    parts.length === 1 && only
      ? (r: number) => f(only.at(r))
      : (r: number) => f(...parts.map((part) => part.at(r)));
  const rounding = ['abs', 'min', 'max'].includes(name)
    ? 0
    : name.startsWith('erf')
      ? ERROR_FUNCTION_ROUNDING
      : FUNCTION_ROUNDING;
  return {
    at,
    knownAt: (r) =>
      known(
        f,
        parts.map((part) => part.knownAt(r)),
        rounding,
      ),
  };
}

/**
 * Turns a tree into functions of r made of closures: nothing is handed to an evaluator, no text becomes code.
 *
 * @param parameters by name, in eV and angstrom
 */
export function compile(tree: Tree, parameters: ReadonlyMap<string, number>): Compiled {
  switch (tree.kind) {
    case 'number': {
      const { value } = tree;
      return {
        at: () => value,
        knownAt: () => ({ value, error: UNIT_ROUNDOFF * Math.abs(value) }),
      };
    }
    case 'radius':
      return { at: (r) => r, knownAt: (r) => ({ value: r, error: 0 }) };
    case 'parameter': {
      const value = parameters.get(tree.name) ?? NaN;
      const error = PARAMETER_ROUNDING * Math.abs(value);
      return { at: () => value, knownAt: () => ({ value, error }) };
    }
    case 'minus': {
      const of = compile(tree.of, parameters);
      return {
        at: (r) => -of.at(r),
        knownAt: (r) => {
          const { value, error } = of.knownAt(r);
          return { value: -value, error };
        },
      };
    }
    case 'binary':
      return binary(tree, parameters);
    case 'call':
      return call(tree, parameters);
    case 'if': {
      const condition = truthOf(tree.condition, parameters);
      const [yes, no] = [compile(tree.yes, parameters), compile(tree.no, parameters)];
      return {
        at: (r) => (condition(r) ? yes.at(r) : no.at(r)),
        knownAt: (r) => (condition(r) ? yes.knownAt(r) : no.knownAt(r)),
      };
    }
    case 'compare':
      throw new Error('a comparison has no value');
  }
}

/** Number of parts, for the work an evaluation is. */
export function partsOf(tree: Tree): number {
  return 1 + childrenOf(tree).reduce((sum, child) => sum + partsOf(child), 0);
}

export function childrenOf(tree: Tree): Tree[] {
  switch (tree.kind) {
    case 'minus':
      return [tree.of];
    case 'binary':
    case 'compare':
      return [tree.left, tree.right];
    case 'call':
      return tree.of;
    case 'if':
      return [tree.condition, tree.yes, tree.no];
    default:
      return [];
  }
}
