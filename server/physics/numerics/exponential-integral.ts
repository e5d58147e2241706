import type { NumericalResult } from './result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from './rounding.ts';

const EULER_GAMMA = 0.5772156649015329;

/** -gamma - ln x + Σ (-1)^{n-1} x^n/(n n!), for x up to 1. */
function series(x: number): NumericalResult {
  const logarithm = Math.log(x);
  let sum = 0;
  let term = 1;
  let n = 0;
  do {
    n += 1;
    term *= -x / n;
    sum -= term / n;
  } while (Math.abs(term) > UNIT_ROUNDOFF * x);
  const value = sum - (EULER_GAMMA + logarithm);
  const magnitude = EULER_GAMMA + Math.abs(logarithm) + 2 * sum;
  return { value, error: 4 * UNIT_ROUNDOFF * magnitude, evaluations: 0, status: 'converged' };
}

/**
 * e^{-x}/(x+1-1/(x+3-4/(x+5-…))), for x above 1. The truncation error falls as exp(-4 sqrt(n x)), so the depth can be
 * chosen beforehand and the fraction evaluated from its end, where rounding is damped.
 */
function continuedFraction(x: number): NumericalResult {
  const depth = Math.ceil(100 / x) + 4;
  let fraction = x + 2 * depth + 1;
  for (let n = depth; n > 0; n--) fraction = x + 2 * n - 1 - (n * n) / fraction;
  const value = Math.exp(-x) / fraction;
  const error = 16 * UNIT_ROUNDOFF * value + SMALLEST_NORMAL;
  return { value, error, evaluations: 0, status: 'converged' };
}

/**
 * Exponential integral of first order.
 *
 * Formula: E_1(x) = ∫_x^∞ e^{-t}/t dt.
 *
 * @param x argument, > 0, no unit
 * @returns value with a bound of its error, relative about 1e-15 (5e-15 near 1); 0 within the smallest normal number beyond 740
 * @throws RangeError for x that is not positive
 *
 * Source: DLMF 6.6.2 (series), 6.9.1 and its contraction, Abramowitz and Stegun 5.1.22 (continued fraction).
 */
export function exponentialIntegralE1(x: number): NumericalResult {
  if (!(x > 0)) throw new RangeError(`E1 is asked at ${x}; it is defined above 0`);
  if (x === Infinity) return { value: 0, error: 0, evaluations: 0, status: 'converged' };
  return x <= 1 ? series(x) : continuedFraction(x);
}
