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
    const angle = Math.min(thetaLab, Math.PI);
    const spin =
      correctedFor === null
        ? spinFactor(gamma, angle)
        : mckinleyFeshbachFactor(gamma, angle, correctedFor);
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
