import { readParameters, refuse } from '../parameters.ts';
import type { AnyParameter, Form } from '../types.ts';
import { checkUnits } from './check-units.ts';
import { compile, partsOf } from './evaluate.ts';
import { expressionTerm } from './expression-term.ts';
import { readNamedParameters } from './parameters.ts';
import { profileOf } from './profile.ts';
import { radiiOf } from './radii.ts';
import { readFormula } from './tree.ts';
import { KNOWN_WORDS } from './words.ts';

const parameters: AnyParameter[] = [
  {
    key: 'formula',
    label: 'V(r)',
    symbol: 'V(r)',
    dimension: 'formula',
    words: KNOWN_WORDS,
    default: 'V0*exp(-r/a)',
    description:
      'Written in r and named parameters with + − * / ^, parentheses, r < R ? … : …, and the functions exp, log, sqrt, sin, cos, tan, sinh, cosh, tanh, erf, erfc, abs, min, max, pow.',
  },
  {
    key: 'parameters',
    label: 'Parameters',
    symbol: 'V_0, a, \\dots',
    dimension: 'quantities',
    default: { V0: { value: -10, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } },
    description:
      'Every name in the formula other than r and the functions: a quantity made of energies and lengths, or a plain number.',
  },
];

/**
 * A formula typed by a person. It is parsed and turned into closures; no text is ever run as code. Units are checked, and V(r) is
 * looked at from the origin to far away before anything is computed.
 */
export const expression: Form = {
  key: 'expression',
  label: 'Formula',
  formula: String.raw`V(r) = f(r;\, p_1, p_2, \dots)`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = \frac{c}{q^2} + \frac{1}{q}\int_0^\infty \left(r V(r) - c\right)\sin qr\,dr,\quad c = \lim_{r\to\infty} r V(r)`,
  source:
    'Your own formula; transform by Legendre panels after N. S. Bakhvalov and L. G. Vasil’eva, USSR Comput. Math. Math. Phys. 8 (1968) 241',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const formula = read.name('formula') ?? refuse('formula', 'formula is missing');
    const named = readNamedParameters(read.quantities('parameters') ?? {});
    const tree = readFormula(formula, new Set(named.keys()));
    checkUnits(formula, tree, new Map([...named].map(([name, { unit }]) => [name, unit])));
    const compiled = compile(tree, new Map([...named].map(([name, { value }]) => [name, value])));
    const radii = radiiOf(tree, named);
    return expressionTerm(compiled, profileOf(compiled, radii.mesh), radii, partsOf(tree));
  },
};
