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

/** e^{-x}/(x+1-1/(x+3-4/(x+5-…))), evaluated forwards, for x above 1. */
function continuedFraction(x: number): NumericalResult {
  let b = x + 1;
  let c = Infinity;
  let d = 1 / b;
  let fraction = d;
  let n = 0;
  let change: number;
  do {
    n += 1;
    b += 2;
    const a = -n * n;
    d = 1 / (b + a * d);
    c = b + a / c;
    change = c * d;
    fraction *= change;
  } while (Math.abs(change - 1) > UNIT_ROUNDOFF && n < 500);
  const value = fraction * Math.exp(-x);
  const error = (20 + n / 4) * UNIT_ROUNDOFF * value + SMALLEST_NORMAL;
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
