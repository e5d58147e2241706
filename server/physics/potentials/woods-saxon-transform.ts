import { alternatingLorentzSum } from '#server/physics/numerics/alternating-series.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { ballKernel, shellKernel } from './sphere-kernels.ts';
import { closedResult } from './transform-error.ts';

/** p/sinh p without overflow. */
function damping(p: number): number {
  if (p === 0) return 1;
  if (p < 20) return p / Math.sinh(p);
  return 2 * p * Math.exp(-p);
}

/** (p coth p - 1)/p²: 1/3 at 0, 1/p far out; below 2 by series, for the 1 cancels there. */
function surfaceFactor(p: number): number {
  if (p >= 2) return (p / Math.tanh(p) - 1) / (p * p);
  const square = p * p;
  let term = 1 / 3;
  let sum = 0;
  for (let n = 0; term > 1e-18; n++) {
    sum += term;
    term *= square / ((2 * n + 2) * (2 * n + 5));
  }
  return sum * damping(p);
}

/** Bound of |p L'/L| for the factor above: 2p²/15 near 0, towards 1. */
function surfaceSlope(p: number): number {
  return Math.min(1, p * p);
}

/** |y A'(y)| in A: 4 y²/(n² + y²) term by term, twice that for the terms that cancel. */
function tailSlope(y: number): number {
  return 8 / (1 + 1 / (y * y));
}

/**
 * Transform of 1/(1 + exp((r-R)/a)).
 *
 * Formula: with x = qR, y = qa, p = πqa,
 *   S(q) = (p/sinh p) [R³ (sin x - x cos x)/x³ + π²a²R (p coth p - 1)/p² · sin(x)/x]
 *        + 2a³ Σ_{n>=1} (-1)^{n-1} n e^{-nR/a}/(n² + y²)².
 *   The bracket is the usual (πa/(q sinh p)) [πa coth p sin x - R cos x] in a form that does not cancel as q -> 0.
 *   Derivation: S = -(1/q) d/dq ∫ cos(qr) f dr; one integration by parts leaves -f' = sech²((r-R)/2a)/4a, whose integral
 *   over all r is the residue sum sin(x) p/sinh p; the part from -∞ to 0, where f = Σ (-1)^n e^{n(r-R)/a}, is the series.
 *
 * @param R radius, angstrom, >= 0
 * @param a diffuseness, angstrom, > 0
 * @returns S in angstrom³ as a function of q in 1/angstrom; error some 10 u (R³ j1(x)/x + …) p/sinh p and 20 to 100 u of
 *   the series, which alone is left for large qa
 *
 * Validity: all R/a >= 0 and all q.
 *
 * Source: derived here by residues, as above; checked against quadrature of 40 digits.
 */
export function woodsSaxonTransform(R: number, a: number): (q: number) => NumericalResult {
  const series = alternatingLorentzSum(R / a);
  const surface = Math.PI ** 2 * a ** 2 * R;
  return (q) => {
    const p = Math.PI * q * a;
    const ball = ballKernel(q * R);
    const shell = shellKernel(q * R);
    const factor = surfaceFactor(p);
    const damp = damping(p);
    const volumePart = damp * R ** 3;
    const surfacePart = damp * surface * factor;
    // q d/dq of p/sinh p is -(p coth p - 1) times it.
    const steep = factor * p * p;
    const parts = Math.abs(volumePart * ball.value) + Math.abs(surfacePart * shell.value);
    const tail = series(q * a);
    const tailValue = 2 * a ** 3 * tail.value;
    const value = volumePart * ball.value + surfacePart * shell.value + tailValue;
    const rounding =
      (16 + 4 * steep) * parts +
      volumePart * ball.rounding +
      surfacePart * shell.rounding +
      (2 * a ** 3 * tail.error) / UNIT_ROUNDOFF +
      6 * Math.abs(tailValue);
    const slope =
      steep * parts +
      volumePart * ball.slope +
      surfacePart * (shell.slope + surfaceSlope(p) * Math.abs(shell.value)) +
      tailSlope(q * a) * Math.abs(tailValue);
    return closedResult(value, rounding, slope);
  };
}
