import type { NumericalResult } from './result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from './rounding.ts';

const EULER_GAMMA = 0.5772156649015329;
/** Up to here the power series loses nothing. */
const SMALL = 1;
const SERIES_TERMS = 12;

/** Σ (x²/4)^k/(k!)² [H_k - γ - ln(x/2)]. */
function seriesK0(x: number): number {
  const square = (x * x) / 4;
  const logarithm = -EULER_GAMMA - Math.log(x / 2);
  let term = 1;
  let harmonic = 0;
  let sum = logarithm;
  for (let k = 1; k < SERIES_TERMS; k++) {
    term *= square / (k * k);
    harmonic += 1 / k;
    sum += term * (harmonic + logarithm);
  }
  return sum;
}

/** 1/x - (x/4) Σ (x²/4)^k/(k!(k+1)!) [H_k + H_{k+1} - 2γ - 2 ln(x/2)]. */
function seriesK1(x: number): number {
  const square = (x * x) / 4;
  const logarithm = -2 * (EULER_GAMMA + Math.log(x / 2));
  let term = 1;
  let harmonic = 0;
  let sum = 0;
  for (let k = 0; k < SERIES_TERMS; k++) {
    if (k > 0) {
      term *= square / (k * (k + 1));
      harmonic += 1 / k;
    }
    sum += term * (2 * harmonic + 1 / (k + 1) + logarithm);
  }
  return 1 / x - (x / 4) * sum;
}

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

function result(
  x: number,
  series: (x: number) => number,
  weight: (t: number) => number,
): NumericalResult {
  if (!(x > 0)) throw new RangeError(`K is asked at ${x}; it is defined above 0`);
  if (x <= SMALL) {
    const value = series(x);
    return { value, error: 24 * UNIT_ROUNDOFF * value, evaluations: 0, status: 'converged' };
  }
  const { value, count } = trapezoids(x, weight);
  const scaled = value * Math.exp(-x);
  const relative = (24 + count / 8 + 2 * Math.min(x, 750)) * UNIT_ROUNDOFF;
  const error = relative * scaled + SMALLEST_NORMAL;
  return { value: scaled, error, evaluations: 0, status: 'converged' };
}

/**
 * Modified Bessel function of the second kind and order zero.
 *
 * Formula: K0(x) = ∫_0^∞ exp(-x cosh t) dt, by trapezoids; by its power series up to x = 1.
 *
 * @param x argument, > 0, no unit
 * @returns value with a bound of its error, relative some 30 u and what exp(-x) makes of the rounding of x; 0 beyond 740
 * @throws RangeError for x that is not positive
 *
 * Source: DLMF 10.32.9, 10.31.1, 10.31.2; trapezoids: L. N. Trefethen and J. A. C. Weideman, SIAM Review 56 (2014) 385.
 */
export function besselK0(x: number): NumericalResult {
  return result(x, seriesK0, () => 1);
}

/**
 * The same of order one.
 *
 * Formula: K1(x) = ∫_0^∞ exp(-x cosh t) cosh t dt, by trapezoids; by its power series up to x = 1.
 *
 * @param x argument, > 0, no unit
 * @returns as `besselK0`
 * @throws RangeError for x that is not positive
 *
 * Source: as `besselK0`.
 */
export function besselK1(x: number): NumericalResult {
  return result(x, seriesK1, Math.cosh);
}
