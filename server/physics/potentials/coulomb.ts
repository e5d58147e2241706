import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { chargeProductOf, chargeProductParameter, coulombStrength } from './charges.ts';
import { readParameters } from './parameters.ts';
import { closedResult } from './transform-error.ts';
import type { Form } from './types.ts';

const parameters = [chargeProductParameter];

/**
 * Transform of 1/r, as the limit of a screening length that grows without end.
 *
 * Formula: S(q) = 1/q².
 *
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom², relative error 2e-15; Infinity at q = 0, where it diverges
 *
 * Source: G. Wentzel, Z. Phys. 40 (1926) 590.
 */
export function coulombTransform(q: number): NumericalResult {
  const value = 1 / (q * q);
  if (value === Infinity) return { value, error: 0, evaluations: 0, status: 'converged' };
  return closedResult(value, 3 * value, 2 * value);
}

/** Without charge there is no tail and nothing that diverges. */
const nothing: NumericalResult = { value: 0, error: 0, evaluations: 0, status: 'converged' };

export const coulomb: Form = {
  key: 'coulomb',
  label: 'Coulomb, point charge',
  formula: String.raw`V(r) = \frac{Z_1 Z_2\,\alpha\hbar c}{r}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = \frac{Z_1 Z_2\,\alpha\hbar c}{q^2}`,
  source:
    'E. Rutherford, Phil. Mag. 21 (1911) 669; Born amplitude: G. Wentzel, Z. Phys. 40 (1926) 590',
  parameters,
  build(values, context) {
    const strength = coulombStrength(readParameters(parameters, values), context);
    const closed = strength === 0 ? () => nothing : coulombTransform;
    return {
      form: 'coulomb',
      strength: { re: strength, im: 0 },
      v: (r) => 1 / r,
      closed,
      /** The tail is subtracted and closed; what is left to integrate is zero everywhere, so this is the tail alone. */
      quadrature: closed,
      chargeProduct: chargeProductOf(strength),
      coulombTail: strength === 0 ? 0 : 1,
      norm: 0,
      firstMoment: null,
      lineIntegral: () => null,
      range: null,
      tail: 'coulomb',
      reach: null,
      breakpoints: [],
    };
  },
};
