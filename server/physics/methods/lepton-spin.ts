import { cmToLab } from '#server/physics/kinematics/frames.ts';
import type { TwoBody } from '#server/physics/kinematics/two-body.ts';
import { HBAR_C_EV_ANGSTROM, FINE_STRUCTURE } from '#server/physics/constants/codata2022.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { mckinleyFeshbachFactor, recoilRatio, spinFactor } from './spin-factor.ts';

/** A factor of dσ/dΩ at a centre-of-mass angle; `blur` is a relative error of q beyond rounding. */
export type AngularFactor = (thetaCm: number, blur?: number) => NumericalResult;

export interface LeptonSpinInput {
  /** mc² of the lepton and of the target, eV; Infinity for a fixed target. */
  mass: number;
  targetMass: number;
  /** Kinetic energy in the lab, eV. */
  energy: number;
  collision: Pick<TwoBody, 'k' | 'momentumLab' | 'reducedMass' | 'frame'>;
  /** Z1 Z2 for the correction of McKinley and Feshbach; null without it. */
  correctedFor: number | null;
}

/** sin(theta/2) of the centre of mass over that of the lab, to the fourth power and over the ratio of solid angles. */
function geometry(thetaCm: number, thetaLab: number, jacobian: number): number {
  if (!(thetaCm > 0)) return jacobian;
  return (Math.sin(thetaCm / 2) / Math.sin(thetaLab / 2)) ** 4 / jacobian;
}

/**
 * What the spin of a lepton and the recoil of a spinless target make of a first-order cross section in the centre of mass.
 *
 * Formula: R = σ_Mott/(J |f_C|²) with σ_Mott = (Z1 Z2 e² E/(2 p²c² sin²(L/2)))² (1 - beta² sin²(L/2)) E'/E in the lab, J = dΩ_cm/dΩ_lab
 * and f_C the first-order amplitude of the point charge, so R = (E/mu)² (k/k_lab)⁴ (sin(theta/2)/sin(L/2))⁴ S(L) (E'/E)/J.
 * A point charge then gives σ_Mott itself, an extended or screened one σ_Mott times the square of its form factor at the same q.
 *
 * @param input lepton not heavier than its target; energy in the lab, eV, > 0
 * @returns factor of |f1(q)|² at theta in the centre of mass, rad, 0 to pi; 1 - beta² sin²(theta/2) for a fixed target
 *
 * Validity: first order, unpolarised, target without spin; the correction for |alpha Z1 Z2| below about 0.2, point charge.
 *
 * Source: N. F. Mott, Proc. R. Soc. A 124 (1929) 425; R. Hofstadter, Rev. Mod. Phys. 28 (1956) 214; W. A. McKinley and H. Feshbach,
 * Phys. Rev. 74 (1948) 1759.
 */
export function leptonSpin(input: LeptonSpinInput): AngularFactor {
  const { mass, targetMass, energy, collision, correctedFor } = input;
  const { k, momentumLab, reducedMass, frame } = collision;
  const gamma = 1 + energy / mass;
  const kLab = momentumLab / HBAR_C_EV_ANGSTROM;
  const prefix = (((energy + mass) / reducedMass) * (k / kLab) ** 2) ** 2;
  return (thetaCm, blur = 0) => {
    const { thetaLab, jacobian } = cmToLab(thetaCm, frame);
    // Straight back is straight back: the last digit of pi would turn a fast centre of mass by more than 1/gamma.
    const angle = thetaCm === Math.PI ? Math.PI : Math.min(thetaLab, Math.PI);
    const spin =
      correctedFor === null
        ? spinFactor(gamma, angle)
        : mckinleyFeshbachFactor(gamma, angle, correctedFor, energy / mass);
    const recoil = recoilRatio(mass, targetMass, energy, angle);
    const point = prefix * geometry(thetaCm, thetaLab, jacobian) * recoil.value;
    const value = point * spin.value;
    const carried = point * (4 * spin.error + Math.abs(spin.value) * (recoil.error / recoil.value));
    const slope = 4 * Math.sin(thetaCm / 2) ** 2 * point * blur;
    const error = carried + slope + 64 * UNIT_ROUNDOFF * Math.abs(value);
    return { value, error, evaluations: 0, status: 'converged' };
  };
}

/**
 * The factor above with the mass of the lepton kept in the recoil, which Mott's formula with E'/E leaves out.
 *
 * Formula: M² (4 E E' - Q²)/(4 E1² E2²), E and E' energies of the lepton in the lab before and after, E1 and E2 those of lepton and
 * target in the centre of mass, Q² = 4p² sin²(theta/2) = 2M(E - E'). From the first-order matrix element of one photon between a
 * Dirac particle and a charge without spin, |f_C|² = (2 mu Z1 Z2 e²/Q²)², mu = E1 E2/(E1 + E2). Without relativity it is 1, as it
 * must be for Rutherford's law.
 *
 * @param mass mc² of the lepton, eV, > 0
 * @param targetMass mc² of the target, eV, finite
 * @param collision of the two, relativistic
 * @returns factor of |f1(q)|² at theta in the centre of mass, rad, 0 to pi; relative error some 1e-15 γ² backwards
 *
 * Source: textbook; F. Halzen and A. D. Martin, Quarks and Leptons (1984), ch. 6, with the mass of the lepton kept.
 */
export function leptonSpinWithMass(
  mass: number,
  targetMass: number,
  { momentumCm: p }: Pick<TwoBody, 'momentumCm'>,
): (thetaCm: number) => number {
  const [own, other] = [Math.hypot(p, mass), Math.hypot(p, targetMass)];
  const before = (own * other + p * p) / targetMass;
  const scale = targetMass / (own * other);
  return (thetaCm) => {
    const square = (p * Math.sin(thetaCm / 2)) ** 2;
    const after = before - (2 * square) / targetMass;
    return scale * scale * (before * after - square);
  };
}

/**
 * Smallest value of the corrected factor over all angles, to refuse what would become negative.
 *
 * Formula: min over s = sin(theta/2) of 1 - c s - (beta² - c) s², c = pi alpha Z1 Z2 beta.
 *
 * @param gamma total energy of the lepton over its mc², >= 1
 */
export function smallestCorrectedFactor(gamma: number, chargeProduct: number): number {
  const beta = Math.sqrt((gamma - 1) * (gamma + 1)) / gamma;
  const c = Math.PI * FINE_STRUCTURE * chargeProduct * beta;
  const bend = c - beta * beta;
  const at = (s: number) => 1 - c * s + bend * s * s;
  const turn = bend > 0 ? c / (2 * bend) : 1;
  return Math.min(at(0), at(1), at(Math.min(1, Math.max(0, turn))));
}
