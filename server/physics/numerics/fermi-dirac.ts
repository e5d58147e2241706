import type { NumericalResult } from './result.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';

export type FermiOrder = 2 | 3 | 5;

const DIRECT_BELOW = -1;
const TERMS = 24;

/** Weights of algorithm 1 of Cohen, Rodriguez Villegas and Zagier: the sum of alternating terms is Σ c_k a_k to 5.8^-24. */
const ACCELERATION = (() => {
  const start = (3 + Math.sqrt(8)) ** TERMS;
  const d = (start + 1 / start) / 2;
  const weights: number[] = [];
  let b = -1;
  let c = -d;
  for (let k = 0; k < TERMS; k++) {
    c = b - c;
    weights.push(c / d);
    b = (b * (k + TERMS) * (k - TERMS)) / ((k + 0.5) * (k + 1));
  }
  return weights;
})();

/** Σ_{n>=1} (-1)^{n-1} e^{n eta}/n^s for eta <= 0. */
function alternating(order: number, eta: number): number {
  let sum = 0;
  if (eta < DIRECT_BELOW) {
    for (let n = 1; n < 60; n++) {
      const term = Math.exp(n * eta) / n ** order;
      sum += n % 2 === 1 ? term : -term;
      if (term <= (UNIT_ROUNDOFF * sum) / 8) break;
    }
    return sum;
  }
  ACCELERATION.forEach((weight, k) => {
    sum += (weight * Math.exp((k + 1) * eta)) / (k + 1) ** order;
  });
  return sum;
}

/** What F(eta) and F(-eta) differ by (odd order) or add up to (even order), eta >= 0. */
function reflection(order: FermiOrder, eta: number): number {
  const square = eta * eta;
  const pi = Math.PI ** 2;
  if (order === 2) return square / 2 + pi / 6;
  if (order === 3) return eta * (square / 6 + pi / 6);
  return eta * ((square * square) / 120 + (pi * square) / 36 + (7 * pi * pi) / 360);
}

/**
 * Fermi-Dirac integral of whole order.
 *
 * Formula: F(eta) = (1/(s-1)!) ∫_0^∞ t^{s-1}/(1 + e^{t-eta}) dt = -Li_s(-e^eta).
 *
 * @param order s: 2, 3 or 5
 * @param eta any finite number
 * @returns value with a bound of its error, relative about 3e-15, (4 + |eta|) u for negative eta
 * @throws RangeError for eta that is no finite number
 *
 * Source: DLMF 25.12.16, 25.12.10 and the inversion formula of polylogarithms; acceleration: H. Cohen, F. Rodriguez Villegas
 * and D. Zagier, Exp. Math. 9 (2000) 3.
 */
export function fermiDirac(order: FermiOrder, eta: number): NumericalResult {
  if (!Number.isFinite(eta)) throw new RangeError(`a Fermi-Dirac integral is asked at ${eta}`);
  const small = alternating(order, -Math.abs(eta));
  const value =
    eta <= 0 ? small : order === 2 ? reflection(2, eta) - small : reflection(order, eta) + small;
  const rounding = eta <= 0 ? 16 + 2 * Math.abs(eta) : 20;
  return { value, error: rounding * UNIT_ROUNDOFF * value, evaluations: 0, status: 'converged' };
}
