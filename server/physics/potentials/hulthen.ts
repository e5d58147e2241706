import { trigamma } from '#server/physics/numerics/complex-polygamma.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { E_FOLDINGS, exponentialEdges, exponentialRemainder } from './exponential-tail.ts';
import { lengthParameter, readParameters, strengthParameter } from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { closedResult } from './transform-error.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  strengthParameter(
    { value: -10, unit: 'eV' },
    'The potential is V0 a/r near the origin and V0 exp(-r/a) far out. Negative attracts.',
  ),
  lengthParameter(
    {
      key: 'a',
      label: 'Range',
      symbol: 'a',
      description: 'Length over which the potential falls by e far out.',
    },
    { value: 1, unit: 'angstrom' },
  ),
];

const ZETA_3 = 1.2020569031595942;

/**
 * Transform of exp(-r/a)/(1 - exp(-r/a)).
 *
 * Formula: with y = qa, S(q) = a³ Im psi'(1 - iy)/y; 2 zeta(3) a³ at q = 0.
 *   Derivation: the geometric series of the shape gives S = 2a³ Σ_{n>=1} n/(n² + y²)², and psi'(1 - iy) = Σ 1/(n - iy)² has
 *   the imaginary part Σ 2ny/(n² + y²)².
 *
 * @param a range, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom³; relative error below 2e-14
 *
 * Source: L. Hulthén, Ark. Mat. Astron. Fys. 28A (1942) no. 5; transform derived here, as above.
 */
export function hulthenTransform(a: number, q: number) {
  const y = q * a;
  // Below, psi' is linear in y to all digits, and y itself may underflow.
  if (y < 1e-100) return closedResult(2 * ZETA_3 * a ** 3, 10 * ZETA_3 * a ** 3, 0);
  const { im, imError } = trigamma(1, -y);
  const value = (a ** 3 * im) / y;
  const rounding = (a ** 3 * imError) / y / UNIT_ROUNDOFF + 6 * value;
  return closedResult(value, rounding, 4 * value * Math.min(1, y * y));
}

/** -ln(1 - e^{-x}): near 0 the 1 cancels, far out the logarithm. */
function lineFrom(x: number): number {
  return x < Math.LN2 ? -Math.log(-Math.expm1(-x)) : -Math.log1p(-Math.exp(-x));
}

export const hulthen: Form = {
  key: 'hulthen',
  label: 'Hulthén',
  formula: String.raw`V(r) = V_0\,\frac{e^{-r/a}}{1-e^{-r/a}}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = V_0\,\frac{a^2}{q}\,\mathrm{Im}\,\psi'(1-iqa)`,
  source:
    'L. Hulthén, Ark. Mat. Astron. Fys. 28A (1942) no. 5; transform as a sum over the exponentials of its geometric series',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const a = read.need('a');
    const norm = 2 * ZETA_3 * a ** 3;
    return {
      form: 'hulthen',
      strength: { re: read.need('V0'), im: 0 },
      v: (r) => 1 / Math.expm1(r / a),
      closed: (q) => hulthenTransform(a, q),
      quadrature: radialQuadrature(
        {
          integrand: (r) => r / Math.expm1(r / a),
          edges: exponentialEdges(a),
          tail: 1.001 * exponentialRemainder(a),
        },
        norm,
      ),
      coulombTail: 0,
      norm,
      firstMoment: (Math.PI ** 2 / 6) * a ** 2,
      lineIntegral: (from) => a * lineFrom(from / a),
      range: a,
      tail: 'exponential',
      reach: E_FOLDINGS * a,
      breakpoints: [],
    };
  },
};
