import { erf, erfc } from '#server/physics/numerics/error-function.ts';

/** Functions of one dimensionless argument; the value has no unit either. */
export const PLAIN_FUNCTIONS: ReadonlyMap<string, (x: number) => number> = new Map([
  ['exp', Math.exp],
  ['log', Math.log],
  ['sin', Math.sin],
  ['cos', Math.cos],
  ['tan', Math.tan],
  ['sinh', Math.sinh],
  ['cosh', Math.cosh],
  ['tanh', Math.tanh],
  ['erf', (x: number) => (x === x ? erf(x).value : NaN)],
  ['erfc', (x: number) => (x === x ? erfc(x).value : NaN)],
]);

/** Functions that keep or change the unit of what they are given, with the number of their arguments. */
export const UNIT_FUNCTIONS: ReadonlyMap<string, { least: number; most: number }> = new Map([
  ['sqrt', { least: 1, most: 1 }],
  ['abs', { least: 1, most: 1 }],
  ['pow', { least: 2, most: 2 }],
  ['min', { least: 2, most: 20 }],
  ['max', { least: 2, most: 20 }],
]);

export const CONSTANTS: ReadonlyMap<string, number> = new Map([
  ['pi', Math.PI],
  ['e', Math.E],
]);

export const RADIUS = 'r';
export const FUNCTION_NAMES = [...PLAIN_FUNCTIONS.keys(), ...UNIT_FUNCTIONS.keys()];
/** Words that the parser gives a meaning of their own. */
const OPERATOR_WORDS = ['mod', 'to', 'in', 'and', 'or', 'xor', 'not', 'per', 'end'];
const VALUE_WORDS = ['true', 'false', 'null', 'undefined', 'NaN', 'Infinity', 'i'];
const RESERVED = new Set([...OPERATOR_WORDS, ...VALUE_WORDS]);

/** Everything a formula knows by itself. */
export const KNOWN_WORDS: readonly string[] = [RADIUS, ...CONSTANTS.keys(), ...FUNCTION_NAMES];

/** Letters of the alphabet and Greek ones, digits and underscores after the first. */
export const NAME = /^[A-Za-z_\u0391-\u03c9][A-Za-z0-9_\u0391-\u03c9]*/;

/** Why this may not name a parameter, in words; null if it may. */
export function nameFault(name: string): string | null {
  const match = NAME.exec(name);
  if (match?.[0] !== name) {
    return `“${name}” is no name: letters, digits and underscores, a letter first.`;
  }
  if (KNOWN_WORDS.includes(name)) return `${name} has a meaning of its own; choose another name.`;
  if (RESERVED.has(name)) return `${name} is reserved; choose another name.`;
  return null;
}
