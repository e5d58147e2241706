import { COULOMB_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';

const ANGSTROM_PER_FM = 1e-5;
const RADIUS = 1.2;
/** Nuclear forces are felt about this far beyond two touching surfaces, fm. */
export const BEYOND_TOUCHING = 3;

/**
 * Distance of closest approach on a Coulomb orbit.
 *
 * Formula: d = (Z1 Z2 e²/2E)(1 + 1/sin(θ/2)), E and θ of the centre of mass; head-on Z1 Z2 e²/E.
 *
 * @param chargeProduct Z1 Z2, above 0 (repulsion)
 * @param energyCm eV, above 0
 * @param thetaCm rad, above 0
 * @returns angstrom
 *
 * Validity: point charges without screening, no relativity.
 *
 * Source: E. Rutherford, Philos. Mag. 21 (1911) 669.
 */
export function closestApproach(chargeProduct: number, energyCm: number, thetaCm: number): number {
  return ((chargeProduct * COULOMB_EV_ANGSTROM) / (2 * energyCm)) * (1 + 1 / Math.sin(thetaCm / 2));
}

/** Distance at which two nuclei feel each other's nuclear force, angstrom: 1.2 (A1^(1/3) + A2^(1/3)) + 3 fm. */
export function nuclearReach(massNumber1: number, massNumber2: number): number {
  const touching = RADIUS * (Math.cbrt(massNumber1) + Math.cbrt(massNumber2));
  return (touching + BEYOND_TOUCHING) * ANGSTROM_PER_FM;
}
