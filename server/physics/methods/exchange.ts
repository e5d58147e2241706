import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { DomainError } from '#shared/errors.ts';

/** What exchange needs to know of a particle. */
export interface Exchangeable {
  /** Species key or nuclide name that two identical particles share (see tables/species.ts); null for a custom particle, which is never identical by rule. */
  identity: string | null;
  spin: number | null;
}

/** A complex amplitude, angstrom, with a bound of its error. */
export interface AmplitudeWithError {
  re: number;
  im: number;
  error: number;
}

const EPSILON = Number.EPSILON;

/** Whether projectile and target are identical when the input does not say: the same species or nuclide. */
export function identicalByRule(projectile: Exchangeable, target: Exchangeable | null): boolean {
  return projectile.identity !== null && projectile.identity === target?.identity;
}

/**
 * The spin that both identical particles have.
 * @throws DomainError('invalidInput') where it is unknown, not a multiple of ½, or differs between the two
 */
export function exchangeSpin(projectile: Exchangeable, target: Exchangeable): number {
  const spin = projectile.spin ?? target.spin;
  if (spin === null) {
    const name = projectile.identity ?? 'these particles';
    throw new DomainError(
      'invalidInput',
      `The spin of ${name} is not in the table, and identical particles interfere by it. Give the projectile as a custom particle with its spin, or set "identical" to false.`,
    );
  }
  if (target.spin !== null && target.spin !== spin) {
    throw new DomainError(
      'invalidInput',
      `Identical particles have one spin; the projectile has ${spin} and the target ${target.spin}.`,
    );
  }
  checkSpin(spin);
  return spin;
}

function checkSpin(spin: number): void {
  if (!(spin >= 0) || !Number.isInteger(2 * spin)) {
    throw new DomainError('invalidInput', 'A spin is 0, 0.5, 1, 1.5 …');
  }
}

/**
 * Weight of the interference term for unpolarised particles, 2 (-1)^{2s}/(2s + 1).
 * @param spin s, 0, 0.5, 1 …
 */
export function exchangeWeight(spin: number): number {
  checkSpin(spin);
  return (Number.isInteger(spin) ? 2 : -2) / (2 * spin + 1);
}

/**
 * Differential cross section of identical unpolarised particles, both counted:
 * |f(theta)|² + |f(pi - theta)|² + 2 (-1)^{2s}/(2s + 1) Re f(theta) f*(pi - theta).
 * Because both particles are counted at each angle, the number of collisions is half its integral over the sphere (INTEGRAL_FACTOR).
 * @param direct f(theta), angstrom
 * @param exchanged f(pi - theta), angstrom
 * @param spin s of either particle
 * @returns angstrom²/sr; the error carries both amplitude errors, also where the interference nearly cancels the sum, and rounding
 * @throws DomainError('invalidInput') for a spin that is no multiple of ½
 * Validity: both amplitudes with their phases; the first Born amplitudes of two bare charges lack the Coulomb phase.
 * Source: Mott, Proc. R. Soc. A 126 (1930) 259.
 */
export function exchangeDcs(
  direct: AmplitudeWithError,
  exchanged: AmplitudeWithError,
  spin: number,
): NumericalResult {
  const weight = exchangeWeight(spin);
  const f = Math.hypot(direct.re, direct.im);
  const g = Math.hypot(exchanged.re, exchanged.im);
  const interference = weight * (direct.re * exchanged.re + direct.im * exchanged.im);
  const value = Math.max(0, f * f + g * g + interference);
  const ef = direct.error;
  const eg = exchanged.error;
  const carried =
    (2 * f + ef) * ef + (2 * g + eg) * eg + Math.abs(weight) * (f * eg + g * ef + ef * eg);
  const rounding = 4 * EPSILON * (f * f + g * g + Math.abs(weight) * f * g);
  return { value, error: carried + rounding, evaluations: 0, status: 'converged' };
}

/** Collisions per integral of dσ/dΩ over the whole sphere: each identical pair sends a particle to theta and one to pi - theta. */
export const INTEGRAL_FACTOR = 0.5;
