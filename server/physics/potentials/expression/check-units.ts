import { quote, refuseAt } from './fault.ts';
import type { Tree } from './tree.ts';
import type { Unit } from './unit.ts';
import { ENERGY, LENGTH, PLAIN, isPlain, power, product, sameUnit, unitName } from './unit.ts';
import { PLAIN_FUNCTIONS, UNIT_FUNCTIONS } from './words.ts';

/** What a part of a formula is: a value with a unit, a zero that fits any unit, or a comparison. */
type Kind = { unit: Unit } | 'zero' | 'truth';

interface Context {
  formula: string;
  units: ReadonlyMap<string, Unit>;
}

const unitOf = (kind: Exclude<Kind, 'truth'>): Unit => (kind === 'zero' ? PLAIN : kind.unit);

/** A number that stands in the formula, for exponents; null for anything that depends on r or a parameter. */
function constantOf(tree: Tree): number | null {
  if (tree.kind === 'number') return tree.value;
  if (tree.kind === 'minus') {
    const value = constantOf(tree.of);
    return value === null ? null : -value;
  }
  if (tree.kind !== 'binary') return null;
  const [left, right] = [constantOf(tree.left), constantOf(tree.right)];
  if (left === null || right === null) return null;
  switch (tree.operator) {
    case '+':
      return left + right;
    case '-':
      return left - right;
    case '*':
      return left * right;
    case '/':
      return left / right;
    case '^':
      return left ** right;
  }
}

/** A value, where a comparison will not do. */
function valueOf(tree: Tree, context: Context): Exclude<Kind, 'truth'> {
  const kind = kindOf(tree, context);
  if (kind === 'truth') {
    refuseAt(
      tree.from,
      `“${quote(context.formula, tree)}” is true or false, no value; use it before a ?, as in r < R ? V0 : 0.`,
    );
  }
  return kind;
}

/** The one unit of several values; a zero fits all. */
function common(parts: readonly Tree[], context: Context, verb: string): Kind {
  let found: { unit: Unit; tree: Tree } | null = null;
  for (const tree of parts) {
    const kind = valueOf(tree, context);
    if (kind === 'zero') continue;
    if (found && !sameUnit(found.unit, kind.unit)) {
      const [one, other] = [found.tree, tree].map((part) => quote(context.formula, part));
      refuseAt(
        tree.from,
        `“${one}” is ${unitName(found.unit)} and “${other}” is ${unitName(kind.unit)}: they cannot be ${verb}.`,
      );
    }
    found ??= { unit: kind.unit, tree };
  }
  return found ? { unit: found.unit } : 'zero';
}

function raised(base: Tree, exponent: Tree, context: Context): Kind {
  const kind = valueOf(base, context);
  const above = unitOf(valueOf(exponent, context));
  if (!isPlain(above)) {
    refuseAt(
      exponent.from,
      `an exponent is a plain number; “${quote(context.formula, exponent)}” is ${unitName(above)}.`,
    );
  }
  const unit = unitOf(kind);
  if (isPlain(unit)) return { unit: PLAIN };
  const constant = constantOf(exponent);
  if (constant === null || !Number.isFinite(constant)) {
    refuseAt(
      exponent.from,
      `“${quote(context.formula, base)}” is ${unitName(unit)}, so its exponent must be a number written in the formula; divide it by ${unitName(unit)} first for any other.`,
    );
  }
  return { unit: power(unit, constant) };
}

function plainArgument(name: string, argument: Tree, context: Context): Kind {
  const unit = unitOf(valueOf(argument, context));
  if (!isPlain(unit)) {
    const divide = sameUnit(unit, LENGTH) ? ` Divide by a length, as in ${name}(r/a).` : '';
    refuseAt(
      argument.from,
      `${name} takes a plain number; “${quote(context.formula, argument)}” is ${unitName(unit)}.${divide}`,
    );
  }
  return { unit: PLAIN };
}

function call(tree: Extract<Tree, { kind: 'call' }>, context: Context): Kind {
  const { name, of, from } = tree;
  const [first, second] = of;
  const { least, most } = UNIT_FUNCTIONS.get(name) ?? { least: 1, most: 1 };
  if (!first || of.length < least || of.length > most) {
    const wanted = least === most ? String(least) : `${least} to ${most}`;
    refuseAt(
      from,
      `${name} takes ${wanted} argument${most === 1 ? '' : 's'}; it has ${of.length}.`,
    );
  }
  if (PLAIN_FUNCTIONS.has(name)) return plainArgument(name, first, context);
  if (name === 'pow' && second) return raised(first, second, context);
  if (name !== 'sqrt') return common(of, context, 'compared');
  const kind = valueOf(first, context);
  return kind === 'zero' ? kind : { unit: power(kind.unit, 0.5) };
}

function binary(tree: Extract<Tree, { kind: 'binary' }>, context: Context): Kind {
  const { operator, left, right } = tree;
  if (operator === '+') return common([left, right], context, 'added');
  if (operator === '-') return common([left, right], context, 'subtracted');
  if (operator === '^') return raised(left, right, context);
  const [a, b] = [unitOf(valueOf(left, context)), unitOf(valueOf(right, context))];
  return { unit: product(a, b, operator === '*' ? 1 : -1) };
}

function kindOf(tree: Tree, context: Context): Kind {
  switch (tree.kind) {
    case 'number':
      return tree.value === 0 ? 'zero' : { unit: PLAIN };
    case 'radius':
      return { unit: LENGTH };
    case 'parameter':
      return { unit: context.units.get(tree.name) ?? PLAIN };
    case 'minus':
      return valueOf(tree.of, context);
    case 'binary':
      return binary(tree, context);
    case 'call':
      return call(tree, context);
    case 'compare':
      common([tree.left, tree.right], context, 'compared');
      return 'truth';
    case 'if': {
      if (kindOf(tree.condition, context) !== 'truth') {
        refuseAt(
          tree.condition.from,
          `“${quote(context.formula, tree.condition)}” stands before a ? and must compare, as in r < R ? V0 : 0.`,
        );
      }
      return common([tree.yes, tree.no], context, 'alternatives of one value');
    }
  }
}

/**
 * Checks that a formula gives an energy: what is added or compared has one unit, functions are given plain numbers.
 *
 * @param tree as read by readFormula
 * @param units of the parameters, in powers of energy and length; r is a length
 * @throws DomainError invalidInput at /formula, with the character and what stands there
 */
export function checkUnits(formula: string, tree: Tree, units: ReadonlyMap<string, Unit>): void {
  const kind = valueOf(tree, { formula, units });
  if (kind === 'zero' || sameUnit(kind.unit, ENERGY)) return;
  refuseAt(
    0,
    `the formula gives ${unitName(kind.unit)}; V(r) is an energy.${isPlain(kind.unit) ? ' Multiply it by one, as in V0*exp(-r/a).' : ''}`,
  );
}
