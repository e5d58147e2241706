import { CONSTANTS } from '#server/physics/constants/codata2022.ts';
import { DomainError } from '#shared/errors.ts';

/**
 * Particles a second of an electric current.
 *
 * Formula: I/(|z| e).
 *
 * @param current A, above 0
 * @param chargeState z of each particle, a whole number, not 0; its sign does not matter
 * @returns 1/s; e is exact
 * @throws DomainError('invalidInput') for a current or charge state outside these bounds
 *
 * Source: definition; e of CODATA 2022.
 */
export function particlesOfCurrent(current: number, chargeState: number): number {
  if (!(current > 0) || !Number.isInteger(chargeState) || chargeState === 0) {
    throw new DomainError(
      'invalidInput',
      'An electric current becomes a number of particles by a charge state that is a whole number other than zero.',
    );
  }
  return current / (Math.abs(chargeState) * CONSTANTS.elementaryCharge.value);
}

/** Power of a beam, W: rate (1/s) times kinetic energy (eV). */
export function beamPower(rate: number, energy: number): number {
  return rate * energy * CONSTANTS.elementaryCharge.value;
}
