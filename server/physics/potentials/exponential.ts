import { E_FOLDINGS, exponentialEdges, exponentialRemainder } from './exponential-tail.ts';
import { lengthParameter, readParameters, strengthParameter } from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { closedResult } from './transform-error.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  strengthParameter({ value: -10, unit: 'eV' }, 'Potential at the origin. Negative attracts.'),
  lengthParameter(
    {
      key: 'a',
      label: 'Range',
      symbol: 'a',
      description: 'Length over which the potential falls by e.',
    },
    { value: 0.5, unit: 'angstrom' },
  ),
];

/**
 * Transform of exp(-r/a).
 *
 * Formula: S(q) = 2a³/(1 + q²a²)².
 *
 * @param a range, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom³; relative error below 6e-15, 2e-15 at q = 0
 *
 * Source: textbook; -d/d(1/a) of the transform of a Yukawa potential.
 */
export function exponentialTransform(a: number, q: number) {
  const square = (q * a) ** 2;
  const value = (2 * a ** 3) / (1 + square) / (1 + square);
  return closedResult(value, 13 * value, (4 * value * square) / (1 + square));
}

export const exponential: Form = {
  key: 'exponential',
  label: 'Exponential',
  formula: String.raw`V(r) = V_0\,e^{-r/a}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = \frac{2 V_0\,a^3}{(1+q^2a^2)^2}`,
  source: 'Textbook form; transform as the derivative of the one of H. Yukawa (1935) by 1/a',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const a = read.need('a');
    const norm = 2 * a ** 3;
    return {
      form: 'exponential',
      strength: { re: read.need('V0'), im: 0 },
      v: (r) => Math.exp(-r / a),
      closed: (q) => exponentialTransform(a, q),
      quadrature: radialQuadrature(
        {
          integrand: (r) => r * Math.exp(-r / a),
          edges: exponentialEdges(a),
          tail: exponentialRemainder(a),
        },
        norm,
      ),
      coulombTail: 0,
      norm,
      firstMoment: a ** 2,
      lineIntegral: (from) => a * Math.exp(-from / a),
      range: a,
      tail: 'exponential',
      reach: E_FOLDINGS * a,
      breakpoints: [],
    };
  },
};
