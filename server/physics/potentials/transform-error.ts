import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';

/**
 * Relative error allowed for q itself: it comes from an energy and an angle through some eight roundings, and what a
 * transform does with them belongs to its error, or zeros at large qR would look better known than they are.
 */
export const Q_ALLOWANCE = 8 * UNIT_ROUNDOFF;

/**
 * Result of a closed form with a bound of its error.
 *
 * Formula: error = u·rounding + 8u·slope + smallest normal number.
 *
 * @param value S(q)
 * @param rounding Σ |term|·(roundings in it), in the unit of S
 * @param slope bound of |q dS/dq|, in the unit of S
 */
export function closedResult(value: number, rounding: number, slope: number): NumericalResult {
  const error = UNIT_ROUNDOFF * rounding + Q_ALLOWANCE * slope + SMALLEST_NORMAL;
  return { value, error, evaluations: 0, status: 'converged' };
}
