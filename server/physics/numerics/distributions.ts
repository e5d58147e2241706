import { erfc } from './error-function.ts';
import { logGamma } from './incomplete-gamma.ts';
import { bracketedRoot } from './root.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';

const MOST_STEPS = 10_000;

/** Probability that a standard normal variable lies below z. */
export function normalBelow(z: number): number {
  return erfc(-z / Math.SQRT2).value / 2;
}

/**
 * Value below which a standard normal variable lies with a probability.
 *
 * @param p above 0, below 1
 * @returns z, to a few roundings of max(1, |z|)
 * @throws RangeError for other p
 *
 * Source: inverse of DLMF 7.2.2 by bracketing.
 */
export function normalQuantile(p: number): number {
  if (!(p > 0 && p < 1)) throw new RangeError(`a probability of ${p}`);
  if (p === 0.5) return 0;
  if (p > 0.5) return -normalQuantile(1 - p);
  const miss = (z: number) => Math.log(normalBelow(z) / p);
  return bracketedRoot(miss, -38, 0).value;
}

/** Lentz's continued fraction of the incomplete beta function. */
function betaFraction(a: number, b: number, x: number): number {
  const tiny = 1e-300;
  const guard = (value: number) => (Math.abs(value) < tiny ? tiny : value);
  let c = 1;
  let d = 1 / guard(1 - ((a + b) * x) / (a + 1));
  let h = d;
  for (let m = 1; m < MOST_STEPS; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / guard(1 + even * d);
    c = guard(1 + even / c);
    h *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / guard(1 + odd * d);
    c = guard(1 + odd / c);
    h *= d * c;
    if (Math.abs(d * c - 1) <= 2 * UNIT_ROUNDOFF) break;
  }
  return h;
}

/**
 * Regularised incomplete beta function I_x(a, b).
 *
 * @param a above 0
 * @param b above 0
 * @param x 0 to 1
 * @returns 0 to 1, to about 1e-13 of itself for a and b up to 1e4
 * @throws RangeError outside these bounds
 *
 * Source: DLMF 8.17.22, 8.17.4.
 */
export function incompleteBeta(a: number, b: number, x: number): number {
  if (!(a > 0 && b > 0 && x >= 0 && x <= 1)) throw new RangeError(`I_${x}(${a}, ${b})`);
  if (x === 0 || x === 1) return x;
  const front = Math.exp(
    logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x),
  );
  if (x <= (a + 1) / (a + b + 2)) return (front * betaFraction(a, b, x)) / a;
  return 1 - (front * betaFraction(b, a, 1 - x)) / b;
}

/**
 * Half-width of the interval that holds a share of Student's t distribution.
 *
 * Formula: 1 - I_{ν/(ν+t²)}(ν/2, ½) = p.
 *
 * @param p above 0, below 1: probability between -t and t
 * @param freedom ν, degrees of freedom, above 0; Infinity for the normal distribution
 * @returns t, to about 1e-12 of itself
 * @throws RangeError outside these bounds
 *
 * Source: DLMF 8.17; Abramowitz and Stegun 26.7.
 */
export function studentInterval(p: number, freedom: number): number {
  if (!(p > 0 && p < 1 && freedom > 0)) throw new RangeError(`t of ${p} and ${freedom}`);
  if (freedom > 1e7) return -normalQuantile((1 - p) / 2);
  const outside = 1 - p;
  const miss = (t: number) =>
    Math.log(incompleteBeta(freedom / 2, 0.5, freedom / (freedom + t * t)) / outside);
  let high = 2;
  while (miss(high) > 0) high *= 2;
  return bracketedRoot(miss, 1e-8, high).value;
}
