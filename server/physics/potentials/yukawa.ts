import { exponentialIntegralE1 } from '#server/physics/numerics/exponential-integral.ts';
import { E_FOLDINGS, exponentialEdges, exponentialRemainder } from './exponential-tail.ts';
import { lengthParameter, readParameters, strengthParameter } from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { closedResult } from './transform-error.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  strengthParameter(
    { value: -10, unit: 'eV' },
    'Potential at r = a, times e. Negative attracts, positive repels.',
  ),
  lengthParameter(
    {
      key: 'a',
      label: 'Range',
      symbol: 'a',
      description:
        'Length over which the potential falls by e beside its 1/r; hbar/(m c) of the exchanged particle.',
    },
    { value: 1, unit: 'angstrom' },
  ),
];

/**
 * Transform of exp(-r/a)/(r/a).
 *
 * Formula: S(q) = a³/(1 + q²a²).
 *
 * @param a range, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom³; relative error below 3e-15, 9e-16 at q = 0
 *
 * Source: textbook; e.g. L. I. Schiff, Quantum Mechanics, 3rd ed. (1968), sec. 38.
 */
export function yukawaTransform(a: number, q: number) {
  const square = (q * a) ** 2;
  const value = a ** 3 / (1 + square);
  return closedResult(value, 8 * value, (2 * value * square) / (1 + square));
}

export const yukawa: Form = {
  key: 'yukawa',
  label: 'Yukawa',
  formula: String.raw`V(r) = V_0\,\frac{e^{-r/a}}{r/a}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = \frac{V_0\,a^3}{1+q^2a^2}`,
  source: 'H. Yukawa, Proc. Phys.-Math. Soc. Japan 17 (1935) 48',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const a = read.need('a');
    const norm = a ** 3;
    return {
      form: 'yukawa',
      strength: { re: read.need('V0'), im: 0 },
      v: (r) => (Math.exp(-r / a) / r) * a,
      closed: (q) => yukawaTransform(a, q),
      quadrature: radialQuadrature(
        {
          integrand: (r) => a * Math.exp(-r / a),
          edges: exponentialEdges(a),
          tail: exponentialRemainder(a),
        },
        norm,
      ),
      coulombTail: 0,
      norm,
      firstMoment: a ** 2,
      lineIntegral: (from) => a * exponentialIntegralE1(from / a).value,
      range: a,
      tail: 'exponential',
      reach: E_FOLDINGS * a,
      breakpoints: [],
    };
  },
};
