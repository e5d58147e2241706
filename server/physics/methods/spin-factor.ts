import { COULOMB_EV_ANGSTROM, FINE_STRUCTURE } from '#server/physics/constants/codata2022.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';

/** McKinley and Feshbach's correction is good to a few per cent up to here, in |alpha Z1 Z2|. */
export const MCKINLEY_FESHBACH_LIMIT = 0.2;

const result = (value: number, size: number): NumericalResult => ({
  value,
  error: UNIT_ROUNDOFF * size,
  evaluations: 0,
  status: 'converged',
});

function checkAngle(theta: number): void {
  if (!(theta >= 0 && theta <= Math.PI)) {
    throw new RangeError(`the scattering angle is ${theta} rad; it lies between 0 and pi`);
  }
}

function checkGamma(gamma: number): void {
  if (!(gamma >= 1 && gamma < Infinity)) {
    throw new RangeError(`gamma is ${gamma}; the total energy over mc² is at least 1`);
  }
}

/**
 * What the spin of a lepton does to first-order scattering by an electrostatic potential.
 *
 * Formula: 1 - beta² sin²(theta/2) = cos²(theta/2) + sin²(theta/2)/gamma², which does not cancel backwards.
 *
 * @param gamma total energy of the lepton over its mc², >= 1
 * @param theta scattering angle, rad, 0 to pi
 * @returns factor of dσ/dΩ, 1/gamma² to 1, relative error below 1e-15
 * @throws RangeError outside the domain
 *
 * Validity: spin ½, unpolarised, first order; fixed or heavy spinless target.
 *
 * Source: N. F. Mott, Proc. R. Soc. A 124 (1929) 425.
 */
export function spinFactor(gamma: number, theta: number): NumericalResult {
  checkGamma(gamma);
  checkAngle(theta);
  const cosine = Math.cos(theta / 2);
  const sine = Math.sin(theta / 2);
  const value = cosine * cosine + (sine / gamma) ** 2;
  // cos loses its digits beside pi, where theta/2 moves it by u.
  return result(value, 6 * value + 4 * theta * Math.abs(cosine * sine));
}

/**
 * The same with the next order in the charge, which tells electrons from positrons.
 *
 * Formula: 1 - beta² sin²(theta/2) - pi alpha Z1 Z2 beta sin(theta/2) (1 - sin(theta/2)); Z1 Z2 < 0 for an electron.
 *
 * @param gamma total energy of the lepton over its mc², >= 1
 * @param theta scattering angle, rad, 0 to pi
 * @param chargeProduct Z1 Z2
 * @param excess kinetic energy over mc²: gamma - 1 without the rounding of a slow lepton's gamma
 * @returns factor of dσ/dΩ; may be negative for positrons far outside its validity
 * @throws RangeError outside the domain
 *
 * Validity: |alpha Z1 Z2| below about 0.2 (MCKINLEY_FESHBACH_LIMIT), point charge.
 *
 * Source: W. A. McKinley and H. Feshbach, Phys. Rev. 74 (1948) 1759.
 */
export function mckinleyFeshbachFactor(
  gamma: number,
  theta: number,
  chargeProduct: number,
  excess = gamma - 1,
): NumericalResult {
  const first = spinFactor(gamma, theta);
  const sine = Math.sin(theta / 2);
  const cosine = Math.cos(theta / 2);
  const beta = Math.sqrt(excess * (excess + 2)) / gamma;
  // 1 - sin(theta/2) = cos²(theta/2)/(1 + sin(theta/2))
  const angular = (sine * cosine * cosine) / (1 + sine);
  const second = Math.PI * FINE_STRUCTURE * chargeProduct * beta * angular;
  const value = first.value - second;
  const rounding = first.error / UNIT_ROUNDOFF + 16 * Math.abs(second) + Math.abs(value);
  return result(value, rounding + 4 * theta * Math.abs(second));
}

/**
 * Energy that an elastically scattered lepton keeps in the lab.
 *
 * Formula: E'/E with E' = (A + B)/D forwards and C/(A + B) backwards, where nothing cancels: A = (E + M)(m² + EM),
 * B = p² |cos(theta)| sqrt(M² - m² sin²(theta)), C = (m² + EM)² + p² m² cos²(theta), D = M² + 2EM + m² + p² sin²(theta);
 * 1/(1 + (2E/M) sin²(theta/2)) for m << E.
 *
 * @param mass mc² of the lepton, eV, > 0
 * @param targetMass mc² of the target, eV, >= mass; Infinity for a fixed one
 * @param energy kinetic energy in the lab, eV, > 0
 * @param theta lab angle, rad, 0 to pi
 * @returns total energy after over total energy before, relative error about 3e-15
 * @throws RangeError outside the domain
 *
 * Source: Review of Particle Physics, chapter Kinematics.
 */
export function recoilRatio(
  mass: number,
  targetMass: number,
  energy: number,
  theta: number,
): NumericalResult {
  checkAngle(theta);
  if (!(mass > 0 && energy > 0 && energy < Infinity && targetMass >= mass)) {
    throw new RangeError(
      `masses ${mass} and ${targetMass} eV, energy ${energy} eV: the target must be the heavier`,
    );
  }
  if (targetMass === Infinity) return result(1, 0);
  const [m, M] = [mass / targetMass, 1];
  const E = (energy + mass) / targetMass;
  const square = (energy * (energy + 2 * mass)) / targetMass / targetMass;
  const cosine = Math.cos(theta);
  const sine = Math.sin(theta);
  const root = Math.sqrt((M - m * sine) * (M + m * sine));
  const A = (E + M) * (m * m + E * M);
  const B = square * Math.abs(cosine) * root;
  const D = M * M + 2 * E * M + m * m + square * sine * sine;
  const C = (m * m + E * M) ** 2 + square * (cosine * m) ** 2;
  const value = (cosine > 0 ? (A + B) / D : C / (A + B)) / E;
  return result(value, 24 * value + 4 * theta * Math.abs(sine) * (square / D));
}

export interface MottInput {
  /** Z1 Z2. */
  chargeProduct: number;
  /** mc² of the lepton and of the spinless target, eV; Infinity for a fixed target. */
  mass: number;
  targetMass: number;
  /** Kinetic energy in the lab, eV. */
  energy: number;
  /** Lab angle, rad, above 0 to pi. */
  theta: number;
  mckinleyFeshbach?: boolean;
}

/**
 * Scattering of a relativistic lepton by a spinless point charge, in the lab.
 *
 * Formula: (Z1 Z2 alpha hbar c E/(2 p²c² sin²(theta/2)))² (1 - beta² sin²(theta/2)) E'/E.
 *
 * @param input see MottInput
 * @returns dσ/dΩ in angstrom²/sr with a bound of its error
 * @throws RangeError outside the domain, and at theta = 0, where it diverges
 *
 * Validity: first order (the correction on request adds the next one for a fixed charge); target spinless, without structure.
 *
 * Source: N. F. Mott, Proc. R. Soc. A 124 (1929) 425; recoil: R. Hofstadter, Rev. Mod. Phys. 28 (1956) 214.
 */
export function mottCrossSection(input: MottInput): NumericalResult {
  const { chargeProduct, mass, targetMass, energy, theta } = input;
  if (!(theta > 0)) throw new RangeError('the cross section of a point charge diverges at angle 0');
  const recoil = recoilRatio(mass, targetMass, energy, theta);
  const gamma = 1 + energy / mass;
  const spin =
    input.mckinleyFeshbach === true
      ? mckinleyFeshbachFactor(gamma, theta, chargeProduct, energy / mass)
      : spinFactor(gamma, theta);
  const sine = Math.sin(theta / 2);
  const length =
    (chargeProduct * COULOMB_EV_ANGSTROM * (energy + mass)) /
    (2 * energy * (energy + 2 * mass) * sine * sine);
  const point = length * length;
  const value = point * spin.value * recoil.value;
  const carried = point * (spin.error * recoil.value + Math.abs(spin.value) * recoil.error);
  return { ...result(value, 0), error: carried + 24 * UNIT_ROUNDOFF * Math.abs(value) };
}
