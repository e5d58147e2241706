import { integratePanels } from './panel-quadrature.ts';
import type { NumericalResult } from './result.ts';

/** What a sine transform integrates: g(r) = r s(r), finite at 0, smooth between the edges. */
export interface SineTransformInput {
  /** g(r), r > 0. */
  integrand: (r: number) => number;
  /** Ascending edges from 0 to where the rest is negligible; jumps of g and changes of its scale lie on them. */
  edges: readonly number[];
  /** Bound of ∫ r |g| dr beyond the last edge. */
  tail: number;
}

const PERIODS_PER_PANEL = 8;
/** Below it sin(qr)/q is r to all digits for any length in use. */
const NEGLIGIBLE_Q = 1e-100;

/**
 * Spherical Fourier transform by quadrature.
 *
 * Formula: S(q) = ∫_0^∞ g(r) sin(qr)/q dr, g(r) = r s(r); panels of eight periods that end on zeros of sin(qr), or the
 * given edges where these are narrower; 64 Gauss-Legendre points against 4 × 16.
 *
 * @param input g in units of length·[s], edges and tail in the unit of length and its powers
 * @param q wave number in the inverse unit, >= 0
 * @returns S with a bound of its error: difference of the two rules, rounding (of the phase too), the tail cut off.
 *   `failed` (value NaN) when qr at the last edge passes some 1.5 million
 * @throws RangeError for q that is negative or no number
 *
 * Source: textbook; P. J. Davis and P. Rabinowitz, Methods of Numerical Integration, 2nd ed. (1984), sec. 2.10.
 */
export function sineTransform(input: SineTransformInput, q: number): NumericalResult {
  if (!(q >= 0 && q < Infinity)) throw new RangeError(`the transform is asked at q = ${q}`);
  const { integrand, edges, tail } = input;
  const last = edges[edges.length - 1] ?? 0;
  const still = q < NEGLIGIBLE_Q;
  const f = still
    ? (r: number) => r * integrand(r)
    : (r: number) => (integrand(r) * Math.sin(q * r)) / q;
  const width = still ? Infinity : (PERIODS_PER_PANEL * 2 * Math.PI) / q;
  const result = integratePanels(f, 0, last, width, { breakpoints: edges });
  return { ...result, error: result.error + tail };
}
