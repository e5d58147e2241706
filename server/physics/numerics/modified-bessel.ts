import type { NumericalResult } from './result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from './rounding.ts';

/** exp(-37) is a rounding of one. */
const E_FOLDINGS = 38;

/** e^x K by trapezoids: e^{-x(cosh t - 1)} weight(t), which is analytic within |Im t| < pi/2 and dies doubly exponentially. */
function trapezoids(x: number, weight: (t: number) => number): { value: number; count: number } {
  // The error is exp(-pi²/step) of the strip, or exp(-2 pi²/(x step²)) of the Gaussian that a large x makes of it.
  const step = Math.min(0.25, 0.7 / Math.sqrt(x));
  const last = Math.acosh(1 + (E_FOLDINGS + Math.max(0, -Math.log(x))) / x);
  let sum = 0.5;
  let count = 1;
  for (let t = step; t < last; t += step) {
    const half = Math.sinh(t / 2);
    sum += Math.exp(-2 * x * half * half) * weight(t);
    count += 1;
  }
  return { value: step * sum, count };
}

function result(x: number, weight: (t: number) => number): NumericalResult {
  if (!(x > 0)) throw new RangeError(`K is asked at ${x}; it is defined above 0`);
  const { value, count } = trapezoids(x, weight);
  const scaled = value * Math.exp(-x);
  const relative = (24 + count / 8 + 2 * Math.min(x, 750)) * UNIT_ROUNDOFF;
  return {
    value: scaled,
    error: relative * scaled + SMALLEST_NORMAL,
    evaluations: 0,
    status: 'converged',
  };
}

/**
 * Modified Bessel function of the second kind and order zero.
 *
 * Formula: K0(x) = ∫_0^∞ exp(-x cosh t) dt, by trapezoids.
 *
 * @param x argument, > 0, no unit
 * @returns value with a bound of its error, relative some 30 u and what exp(-x) makes of the rounding of x; 0 beyond 740
 * @throws RangeError for x that is not positive
 *
 * Source: DLMF 10.32.9; trapezoids: L. N. Trefethen and J. A. C. Weideman, SIAM Review 56 (2014) 385.
 */
export function besselK0(x: number): NumericalResult {
  return result(x, () => 1);
}

/**
 * The same of order one.
 *
 * Formula: K1(x) = ∫_0^∞ exp(-x cosh t) cosh t dt, by trapezoids.
 *
 * @param x argument, > 0, no unit
 * @returns as `besselK0`
 * @throws RangeError for x that is not positive
 *
 * Source: as `besselK0`.
 */
export function besselK1(x: number): NumericalResult {
  return result(x, Math.cosh);
}
