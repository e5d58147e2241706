import type { NumericalResult } from './result.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';

const LAST_EXPONENT = 42;
const STEP = Math.PI / LAST_EXPONENT;
const POINTS = Math.ceil(LAST_EXPONENT / Math.PI / STEP);
const CONTOUR = 1.5;
const DIRECT_FROM = 1;

/**
 * Family of alternating sums A(y) = Σ_{n>=1} (-1)^{n-1} n e^{-n rho}/(n² + y²)².
 *
 * Formula: for rho >= 1 term by term. For rho < 1 the first term is kept and the others become an integral along
 * Re n = 3/2, Σ_{n>=2} (-1)^n g(n) = ½ ∫ g(3/2 + it)/cosh(πt) dt, by the trapezoidal rule, which converges as
 * e^{-π/h} and, unlike the terms themselves, hardly cancels for large y.
 *
 * @param rho decay per term, >= 0, no unit
 * @returns function of y (>= 0, no unit) giving A with a bound of its error: some 10 u, up to 100 u where terms cancel
 * @throws RangeError for a negative rho
 *
 * Validity: y to 1e70, beyond which (n² + y²)² leaves the range of doubles and the value is 0.
 *
 * Source: E. Lindelöf, Le calcul des résidus (1905); trapezoidal rule: L. N. Trefethen and J. A. C. Weideman,
 * SIAM Review 56 (2014) 385.
 */
export function alternatingLorentzSum(rho: number): (y: number) => NumericalResult {
  if (!(rho >= 0)) throw new RangeError(`decay per term is ${rho}; the sum needs rho >= 0`);
  return rho >= DIRECT_FROM ? (y) => termByTerm(rho, y) : alongContour(rho);
}

function term(n: number, rho: number, y: number): number {
  const denominator = n * n + y * y;
  return (n * Math.exp(-n * rho)) / denominator / denominator;
}

/** Terms fall by more than 2/e each, so the first one left out bounds the rest. */
function termByTerm(rho: number, y: number): NumericalResult {
  let value = 0;
  let rounding = 0;
  let size = Infinity;
  for (let n = 1; size > UNIT_ROUNDOFF * Math.abs(value) || n === 1; n++) {
    size = term(n, rho, y);
    value += n % 2 === 1 ? size : -size;
    rounding += (12 + 2 * n * rho) * size;
    if (size === 0) break;
  }
  const error = UNIT_ROUNDOFF * rounding + size;
  return { value, error, evaluations: 0, status: 'converged' };
}

/** Weights with e^{-n rho} in them are the same for all y. */
function alongContour(rho: number): (y: number) => NumericalResult {
  const points = Array.from({ length: POINTS + 1 }, (_, k) => {
    const t = k * STEP;
    const weight = ((k === 0 ? 0.5 : 1) * STEP * Math.exp(-CONTOUR * rho)) / Math.cosh(Math.PI * t);
    return { t, re: weight * Math.cos(rho * t), im: -weight * Math.sin(rho * t) };
  });
  return (y) => {
    const first = term(1, rho, y);
    let sum = 0;
    let absolute = 0;
    for (const { t, re, im } of points) {
      // d = n² + y², n = 3/2 + it; then w n/d² = w n conj(d)²/|d|⁴.
      const dRe = CONTOUR * CONTOUR - t * t + y * y;
      const dIm = 2 * CONTOUR * t;
      const size = dRe * dRe + dIm * dIm;
      const cRe = (dRe * dRe - dIm * dIm) / size;
      const cIm = (-2 * dRe * dIm) / size;
      const nRe = re * CONTOUR - im * t;
      const nIm = re * t + im * CONTOUR;
      sum += (nRe * cRe - nIm * cIm) / size;
      absolute += (Math.abs(nRe) + Math.abs(nIm)) / size;
    }
    const value = first - sum;
    const error = UNIT_ROUNDOFF * (8 * first + 16 * absolute);
    return { value, error, evaluations: 0, status: 'converged' };
  };
}
