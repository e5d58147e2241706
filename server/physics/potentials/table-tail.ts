import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { E_FOLDINGS, exponentialEdges } from './exponential-tail.ts';
import { refuse } from './parameters.ts';

export const TABLE_TAILS = ['zero', 'exponential', 'coulomb'] as const;
export type TableTail = (typeof TABLE_TAILS)[number];

/** An exponential that falls by e over more than so many lengths of the table is no tail. */
const SLOWEST = 10;

/** What lies beyond the last point, R: V(R) exp(-(r-R)/length), or nothing. */
export interface ExponentialTail {
  V: number;
  R: number;
  length: number;
}

/**
 * Exponential through the last two points.
 *
 * Formula: length = (R - R')/ln(V(R')/V(R)).
 *
 * @param r, V columns of the table
 * @returns null where V ends at zero
 * @throws DomainError invalidInput where V does not fall towards zero at its end
 */
export function exponentialTailOf(
  r: readonly number[],
  V: readonly number[],
): ExponentialTail | null {
  const [R, before] = [r.at(-1) ?? NaN, r.at(-2) ?? NaN];
  const [end, beside] = [V.at(-1) ?? NaN, V.at(-2) ?? NaN];
  if (end === 0) return null;
  const length = (R - before) / Math.log1p((beside - end) / end);
  if (!(length > 0 && length <= SLOWEST * R)) {
    refuse(
      'tail',
      'the last two rows do not fall towards zero, so no exponential continues them: choose zero or coulomb, or add rows',
    );
  }
  return { V: end, R, length };
}

/**
 * Its part of the transform.
 *
 * Formula: ∫_R^∞ r V exp(-(r-R)/w) sin(qr)/q dr = V Im[e^{iqR}(R z + z²)]/q, z = w(1 + iqw)/(1 + q²w²); V w(R² + 2Rw + 2w²) at 0.
 *
 * @returns value and a bound of its rounding, that of the length included
 */
export function exponentialTailTransform(
  { V, R, length: w }: ExponentialTail,
  q: number,
): { value: number; rounding: number } {
  const norm = Math.abs(V) * w * (R * R + 2 * R * w + 2 * w * w);
  const lengthError = 12 * UNIT_ROUNDOFF * norm;
  if (q === 0) return { value: Math.sign(V) * norm, rounding: lengthError };
  const y = q * w;
  const scale = w / (1 + y * y);
  const [zRe, zIm] = [scale, scale * y];
  const [x, i] = [R * zRe + (zRe - zIm) * (zRe + zIm), R * zIm + 2 * zRe * zIm];
  const value = (V / q) * (Math.sin(q * R) * x + Math.cos(q * R) * i);
  return { value, rounding: 16 * UNIT_ROUNDOFF * Math.abs(value) + lengthError };
}

/** Edges of its panels and the bound of what lies beyond them, for the quadrature. */
export function exponentialTailPanels({ V, R, length: w }: ExponentialTail) {
  const edges = exponentialEdges(w)
    .slice(1)
    .map((x) => R + x);
  const last = edges.at(-1) ?? R;
  const remainder =
    Math.abs(V) * w * (last ** 2 + 2 * last * w + 2 * w ** 2) * Math.exp((R - last) / w);
  return { edges, remainder, reach: R + E_FOLDINGS * w };
}
