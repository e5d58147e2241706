import type { NumericalResult } from './result.ts';
import { bracketedRoot } from './root.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from './rounding.ts';

/** Stirling's series beyond this argument: its eighth term is below 1e-17 there. */
const STIRLING_FROM = 12;
const STIRLING = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360_360, 1 / 156];
const MOST_TERMS = 100_000;

/**
 * Natural logarithm of the gamma function for positive arguments.
 *
 * Formula: ln Γ(x) = (x - ½) ln x - x + ½ ln 2π + Σ B_2k/(2k (2k-1) x^(2k-1)), after x is raised to 12 by Γ(x + 1) = x Γ(x).
 *
 * @param x above 0
 * @returns value, absolute error about 1e-14 max(1, |ln Γ|)
 * @throws RangeError for other arguments
 *
 * Source: DLMF 5.11.1, 5.5.1.
 */
export function logGamma(x: number): number {
  if (!(x > 0 && x < Infinity)) throw new RangeError(`ln Γ is asked at ${x}`);
  let product = 1;
  let at = x;
  for (; at < STIRLING_FROM; at += 1) product *= at;
  const inverse = 1 / at;
  const square = inverse * inverse;
  const series = STIRLING.reduceRight((sum, c) => sum * square + c, 0) * inverse;
  const half = 0.5 * Math.log(2 * Math.PI);
  return (at - 0.5) * Math.log(at) - at + half + series - Math.log(product);
}

/** e^-x x^a/Γ(a + 1). */
function front(a: number, x: number): number {
  return Math.exp(a * Math.log(x) - x - logGamma(a + 1));
}

/** P(a, x) by its series, all terms positive. */
function series(a: number, x: number): number {
  let term = 1;
  let sum = 1;
  for (let n = 1; n < MOST_TERMS && term > (UNIT_ROUNDOFF * sum) / 4; n++) {
    term *= x / (a + n);
    sum += term;
  }
  return front(a, x) * sum;
}

/** Q(a, x) by Lentz's continued fraction. */
function fraction(a: number, x: number): number {
  const tiny = 1e-300;
  let b = x + 1 - a;
  let c = 1 / tiny;
  let d = 1 / (Math.abs(b) < tiny ? tiny : b);
  let h = d;
  for (let n = 1; n < MOST_TERMS; n++) {
    const an = -n * (n - a);
    b += 2;
    d = an * d + b;
    if (Math.abs(d) < tiny) d = tiny;
    c = b + an / c;
    if (Math.abs(c) < tiny) c = tiny;
    d = 1 / d;
    const delta = d * c;
    h *= delta;
    if (Math.abs(delta - 1) <= UNIT_ROUNDOFF) break;
  }
  return front(a, x) * a * h;
}

/** Both regularised incomplete gamma functions; each keeps its digits where it is small. */
export interface IncompleteGamma {
  /** P(a, x) */
  lower: number;
  /** Q(a, x) */
  upper: number;
  /** Bound of the absolute error of the smaller of the two, relative to it. */
  relativeError: number;
}

/**
 * Regularised incomplete gamma functions.
 *
 * Formula: P(a, x) = (1/Γ(a)) ∫_0^x t^(a-1) e^-t dt, Q = 1 - P.
 *
 * @param a above 0, at most 1e8
 * @param x at least 0
 * @returns both, the smaller to a few roundings times a
 * @throws RangeError outside these bounds
 *
 * Source: DLMF 8.11.4 (series), 8.9.2 (continued fraction).
 */
export function incompleteGamma(a: number, x: number): IncompleteGamma {
  if (!(a > 0 && a <= 1e8 && x >= 0)) throw new RangeError(`P(${a}, ${x}) is out of range`);
  const relativeError = UNIT_ROUNDOFF * (16 + 4 * a * Math.max(1, Math.abs(Math.log(a))));
  if (x === 0) return { lower: 0, upper: 1, relativeError };
  if (x < a + 1) {
    const lower = Math.min(1, series(a, x));
    return { lower, upper: 1 - lower, relativeError };
  }
  const upper = Math.min(1, fraction(a, x));
  return { lower: 1 - upper, upper, relativeError };
}

/**
 * Argument where P(a, x) has a value.
 *
 * @param a above 0
 * @param p above 0, below 1
 * @returns x with the error of the last bracket; half of the χ² quantile of 2a degrees of freedom
 * @throws RangeError outside these bounds
 */
export function inverseGamma(a: number, p: number): NumericalResult {
  if (!(p > 0 && p < 1)) throw new RangeError(`a probability of ${p}`);
  const miss = (x: number) => {
    const { lower, upper } = incompleteGamma(a, x);
    return p < 0.5 ? Math.log(lower / p) : Math.log((1 - p) / upper);
  };
  let low = a;
  let high = a + 1;
  while (miss(low) > 0 && low > SMALLEST_NORMAL) low /= 2;
  while (miss(high) < 0) high *= 2;
  return bracketedRoot(miss, low, high, 0);
}
