import { exponentialIntegralE1 } from '#server/physics/numerics/exponential-integral.ts';
import { chargeProductOf, chargeProductParameter, coulombStrength } from './charges.ts';
import { E_FOLDINGS, exponentialEdges, exponentialRemainder } from './exponential-tail.ts';
import { lengthParameter, readParameters } from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { closedResult } from './transform-error.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  lengthParameter(
    {
      key: 'a',
      label: 'Screening length',
      symbol: 'a',
      description: 'Length over which the electrons of the target screen its charge by e.',
    },
    { value: 0.5, unit: 'angstrom' },
  ),
  chargeProductParameter,
];

/**
 * Transform of exp(-r/a)/r.
 *
 * Formula: S(q) = a²/(1 + q²a²).
 *
 * @param a screening length, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom²; relative error below 3e-15, 9e-16 at q = 0
 *
 * Source: G. Wentzel, Z. Phys. 40 (1926) 590.
 */
export function screenedCoulombTransform(a: number, q: number) {
  const square = (q * a) ** 2;
  const value = a ** 2 / (1 + square);
  return closedResult(value, 8 * value, (2 * value * square) / (1 + square));
}

export const screenedCoulomb: Form = {
  key: 'screenedCoulomb',
  label: 'Screened Coulomb',
  formula: String.raw`V(r) = \frac{Z_1 Z_2\,\alpha\hbar c}{r}\,e^{-r/a}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = \frac{Z_1 Z_2\,\alpha\hbar c\;a^2}{1+q^2a^2}`,
  source: 'G. Wentzel, Z. Phys. 40 (1926) 590',
  parameters,
  build(values, context) {
    const read = readParameters(parameters, values);
    const a = read.need('a');
    const norm = a ** 2;
    const strength = coulombStrength(read, context);
    return {
      form: 'screenedCoulomb',
      strength: { re: strength, im: 0 },
      chargeProduct: chargeProductOf(strength),
      v: (r) => Math.exp(-r / a) / r,
      closed: (q) => screenedCoulombTransform(a, q),
      quadrature: radialQuadrature(
        {
          integrand: (r) => Math.exp(-r / a),
          edges: exponentialEdges(a),
          tail: exponentialRemainder(a) / a,
        },
        norm,
      ),
      coulombTail: 0,
      norm,
      firstMoment: a,
      lineIntegral: (from) => exponentialIntegralE1(from / a).value,
      range: a,
      tail: 'exponential',
      reach: E_FOLDINGS * a,
      breakpoints: [],
    };
  },
};
