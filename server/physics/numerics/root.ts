import type { NumericalResult } from './result.ts';

/**
 * Root of a continuous function in a bracket, by inverse quadratic interpolation guarded by bisection.
 *
 * @param f function with f(a) and f(b) of opposite sign (or zero at an end)
 * @param a one end, finite
 * @param b other end, finite
 * @param tolerance absolute accuracy asked of the root, in the unit of x (>= 0); rounding of x is always allowed
 * @param maxEvaluations calls allowed; default 200
 * @returns root; `error` is the width of the last bracket, which holds a sign change; `limited` when it stayed wider
 *   than asked, `failed` (value NaN) when f was not finite
 * @throws RangeError when the ends hold no change of sign
 *
 * Validity: the bracket is certain for the sign of the computed f; where f is lost in its rounding so is the root.
 *
 * Source: R. P. Brent, Algorithms for Minimization without Derivatives (1973), ch. 4.
 */
export function bracketedRoot(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance = 0,
  maxEvaluations = 200,
): NumericalResult {
  let fa = f(a);
  let fb = f(b);
  if (!(fa * fb <= 0) && !(Math.sign(fa) * Math.sign(fb) <= 0)) {
    throw new RangeError(`no change of sign between ${a} and ${b}`);
  }
  let c = a;
  let fc = fa;
  let step = b - a;
  let previous = step;
  for (let evaluations = 2; ; evaluations++) {
    if (Math.sign(fb) === Math.sign(fc) && fb !== 0) {
      [c, fc] = [a, fa];
      step = previous = b - a;
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const least = Number.EPSILON * Math.abs(b) + tolerance / 2;
    const half = (c - b) / 2;
    if (!Number.isFinite(fb)) return { value: NaN, error: Infinity, evaluations, status: 'failed' };
    if (fb === 0) return { value: b, error: least, evaluations, status: 'converged' };
    if (Math.abs(half) <= least) {
      return { value: b, error: 2 * Math.abs(half) + least, evaluations, status: 'converged' };
    }
    if (evaluations >= maxEvaluations) {
      return { value: b, error: Math.abs(c - b), evaluations, status: 'limited' };
    }
    const guess = interpolate({ a, b, c, fa, fb, fc }, half);
    const trusted =
      Math.abs(previous) >= least &&
      Math.abs(fa) > Math.abs(fb) &&
      2 * Math.abs(guess) < Math.min(3 * Math.abs(half) - least, Math.abs(previous)) &&
      guess * half > 0;
    previous = trusted ? step : half;
    step = trusted ? guess : half;
    [a, fa] = [b, fb];
    b += Math.abs(step) > least ? step : Math.sign(half) * least;
    fb = f(b);
  }
}

interface Bracket {
  a: number;
  b: number;
  c: number;
  fa: number;
  fb: number;
  fc: number;
}

/** Step from b: secant when only two points differ, inverse quadratic otherwise. */
function interpolate({ a, b, c, fa, fb, fc }: Bracket, half: number): number {
  const s = fb / fa;
  if (a === c) return (2 * half * s) / (s - 1);
  const q = fa / fc;
  const r = fb / fc;
  const numerator = s * (2 * half * q * (q - r) - (b - a) * (r - 1));
  return -numerator / ((q - 1) * (r - 1) * (s - 1));
}
