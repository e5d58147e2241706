import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { Q_ALLOWANCE } from '#server/physics/potentials/transform-error.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import type { Amplitude } from '../amplitude.ts';
import { exponentialsOf } from '../exponentials.ts';

/** One part c exp(-mu r)/r of U: c in 1/angstrom, mu in 1/angstrom. */
export interface YukawaPart {
  re: number;
  im: number;
  mu: number;
}

/** Roundings in one pair. */
const ROUNDINGS = 60;
/** Bound of |d ln|I|/d ln q|. */
const STEEPEST = 4;

/** The interaction as a sum of Yukawa potentials; null where it is none. */
export function yukawaParts(terms: readonly Term[], twoMuOverHbar2: number): YukawaPart[] | null {
  const parts: YukawaPart[] = [];
  for (const term of terms) {
    const exponentials = exponentialsOf(term);
    if (exponentials === null) return null;
    for (const { weight, mu } of exponentials) {
      const factor = twoMuOverHbar2 * weight;
      parts.push({ re: factor * term.strength.re, im: factor * term.strength.im, mu });
    }
  }
  return parts;
}

const overArgument = (f: (x: number) => number, x: number): number => (x === 0 ? 1 : f(x) / x);

/**
 * Second-order integral of two Yukawa potentials.
 *
 * Formula: I = ∫ d³p / [(p² - k² - i0)((p-k_i)² + mu1²)((p-k_f)² + mu2²)] = (π²/Δ) {arctan(2ΔR/Q) + (i/2) ln[1 + 4SΔ/(R² + (S-Δ)²)]} with
 *   q = |k_f - k_i|, M = mu1 + mu2, R = mu1 mu2 M, S = k(q² + M²), Δ² = k²(q² + M²)(q² + (mu1-mu2)²) + (mu1 mu2 q)²,
 *   Q = R² + S² - Δ²; S² - Δ² = mu1 mu2 [4k²(q² + M²) - mu1 mu2 q²] > 0, so that nothing cancels.
 *
 * @param q momentum transfer, 0 to 2k, 1/angstrom
 * @returns real and imaginary part, angstrom³; relative error some 30 u
 *
 * Validity: the closed form of R. R. Lewis, Phys. Rev. 102 (1956) 537 for |k_i| = |k_f| = k; for mu1 = mu2 that of R. H. Dalitz,
 * Proc. R. Soc. A 206 (1951) 509.
 *
 * Source: as named; real form derived here.
 */
export function yukawaPair(mu1: number, mu2: number, k: number, q: number) {
  const M = mu1 + mu2;
  const product = mu1 * mu2;
  const wide = q * q + M * M;
  const R = product * M;
  const S = k * wide;
  const delta = Math.sqrt(k * k * wide * (q * q + (mu1 - mu2) ** 2) + (product * q) ** 2);
  const rest = product * (4 * k * k * wide - product * q * q);
  const Q = R * R + rest;
  // S - Δ from the difference of the squares.
  const lower = R * R + (rest / (S + delta)) ** 2;
  return {
    re: ((Math.PI ** 2 * 2 * R) / Q) * overArgument(Math.atan, (2 * delta * R) / Q),
    im: ((Math.PI ** 2 * 2 * S) / lower) * overArgument(Math.log1p, (4 * S * delta) / lower),
  };
}

/**
 * Second Born amplitude of a sum of Yukawa potentials.
 *
 * Formula: f2(q) = (1/2π²) Σ_ij c_i c_j I(mu_i, mu_j; q) for U = Σ c_i exp(-mu_i r)/r.
 *
 * @returns amplitude, angstrom, with a bound of its error, that of q (and `blur`, relative) included
 */
export function yukawaSecondBorn(
  parts: readonly YukawaPart[],
  k: number,
): (q: number, blur?: number) => Amplitude {
  const pairs = parts.flatMap((one, i) =>
    parts.slice(0, i + 1).map((other, j) => {
      const factor = (i === j ? 1 : 2) / (2 * Math.PI ** 2);
      return {
        re: factor * (one.re * other.re - one.im * other.im),
        im: factor * (one.re * other.im + one.im * other.re),
        size: factor * Math.hypot(one.re, one.im) * Math.hypot(other.re, other.im),
        mu1: one.mu,
        mu2: other.mu,
      };
    }),
  );
  return (q, blur = 0) => {
    const sum = { re: 0, im: 0, error: 0 };
    for (const { re, im, size, mu1, mu2 } of pairs) {
      const I = yukawaPair(mu1, mu2, k, Math.min(q, 2 * k));
      sum.re += re * I.re - im * I.im;
      sum.im += re * I.im + im * I.re;
      const relative = ROUNDINGS * UNIT_ROUNDOFF + STEEPEST * (Q_ALLOWANCE + blur);
      sum.error += relative * size * Math.hypot(I.re, I.im);
    }
    return sum;
  };
}
