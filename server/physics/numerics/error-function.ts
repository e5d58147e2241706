import type { NumericalResult } from './result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from './rounding.ts';

const STEP = 0.5;
const SERIES_BELOW = 0.5;
/** e^{-k²h²}; the last is 3e-19. */
const WEIGHTS = Array.from({ length: 13 }, (_, i) => Math.exp(-(((i + 1) * STEP) ** 2)));

/** erf x = (2/√π) e^{-x²} Σ 2^n x^{2n+1}/(2n+1)!!, all terms of one sign. */
function series(x: number): number {
  const square = x * x;
  let term = x;
  let sum = 0;
  for (let n = 0; Math.abs(term) > (UNIT_ROUNDOFF * Math.abs(sum)) / 4; n++) {
    sum += term;
    term *= (2 * square) / (2 * n + 3);
  }
  return (2 / Math.sqrt(Math.PI)) * Math.exp(-square) * sum;
}

/** The trapezoidal rule for (2x/π) e^{-x²} ∫_0^∞ e^{-t²}/(x² + t²) dt, with the pole at t = ix put right. */
function trapezoidal(x: number): number {
  const square = x * x;
  let sum = 1 / (2 * square);
  WEIGHTS.forEach((weight, i) => (sum += weight / (square + ((i + 1) * STEP) ** 2)));
  const pole = x < 7 ? 2 / Math.expm1((2 * Math.PI * x) / STEP) : 0;
  return ((2 * STEP * x) / Math.PI) * Math.exp(-square) * sum - pole;
}

/**
 * Complementary error function.
 *
 * Formula: erfc(x) = (2/√π) ∫_x^∞ e^{-t²} dt.
 *
 * @param x argument, no unit
 * @returns value with a bound of its error, relative about (10 + 3x²) u
 * @throws RangeError for NaN
 *
 * Source: DLMF 7.6.2 (series below ½), 7.7.1 by the trapezoidal rule: C. Chiarella and A. Reichel, Math. Comp. 22 (1968) 137.
 */
export function erfc(x: number): NumericalResult {
  if (!(x === x)) throw new RangeError('erfc is asked at NaN');
  if (x < 0) {
    const mirror = erfc(-x);
    const value = 2 - mirror.value;
    return { ...mirror, value, error: mirror.error + UNIT_ROUNDOFF * value };
  }
  const value = x < SERIES_BELOW ? 1 - series(x) : x < 27.3 ? trapezoidal(x) : 0;
  const error = (12 + 3 * Math.min(x, 28) ** 2) * UNIT_ROUNDOFF * value + SMALLEST_NORMAL;
  return { value, error, evaluations: 0, status: 'converged' };
}

/**
 * Error function, with its digits near zero.
 *
 * Formula: erf(x) = (2/√π) ∫_0^x e^{-t²} dt.
 *
 * @returns value with a bound of its error, relative about 1e-15
 * @throws RangeError for NaN
 *
 * Source: DLMF 7.6.2, 7.7.1.
 */
export function erf(x: number): NumericalResult {
  if (!(x === x)) throw new RangeError('erf is asked at NaN');
  const value =
    Math.abs(x) < SERIES_BELOW ? series(x) : Math.sign(x) * (1 - erfc(Math.abs(x)).value);
  return {
    value,
    error: 12 * UNIT_ROUNDOFF * Math.abs(value) + SMALLEST_NORMAL,
    evaluations: 0,
    status: 'converged',
  };
}
