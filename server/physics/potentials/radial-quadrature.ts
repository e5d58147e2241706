import {
  sineTransform,
  type SineTransformInput,
} from '#server/physics/numerics/oscillatory-quadrature.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { Q_ALLOWANCE } from './transform-error.ts';

/**
 * The transform of a shape by quadrature, the route that knows no closed form.
 *
 * Formula: S(q) = ∫ r² s(r) j0(qr) dr, see sineTransform.
 *
 * @param input r s(r), edges and tail
 * @param norm ∫ r² |s| dr: with it the error allows for q being rounded, as the closed forms do (|q dS/dq| <= 1.3 norm)
 * @returns S(q) as a function of q in 1/angstrom
 */
export function radialQuadrature(
  input: SineTransformInput,
  norm: number,
): (q: number) => NumericalResult {
  const last = input.edges[input.edges.length - 1] ?? 0;
  return (q) => {
    const result = sineTransform(input, q);
    const slope = norm * Math.min(1.3, (q * last) ** 2 / 3);
    return { ...result, error: result.error + Q_ALLOWANCE * slope };
  };
}
