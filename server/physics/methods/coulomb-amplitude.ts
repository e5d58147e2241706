import { coulombPhases } from '#server/physics/numerics/coulomb-phase.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { Q_ALLOWANCE } from '#server/physics/potentials/transform-error.ts';
import type { Amplitude } from './amplitude.ts';

/**
 * Exact amplitude of two point charges.
 *
 * Formula: f_C(q) = -(eta/(2 k s²)) exp(2i sigma_0 - 2i eta ln s), s = q/(2k) = sin(theta/2); its modulus is that of first order,
 * its phase is not.
 *
 * @param eta Sommerfeld parameter, mu Z1 Z2 e²/(hbar² k), > 0 repels; no unit, to 1e9
 * @param k wave number, 1/angstrom, > 0
 * @returns f_C(q) in angstrom with a bound of its error, q from 0 to 2k in 1/angstrom; null at q = 0, where it
 *   diverges. The phase carries the roundings of q, some u times eta, and `blur`, a relative error of q beyond them
 * @throws RangeError outside the domain
 *
 * Validity: unscreened point charges at all distances, non-relativistic; sigma_l as the phase of every other wave.
 *
 * Source: W. Gordon, Z. Phys. 48 (1928) 180; N. F. Mott, Proc. R. Soc. A 126 (1930) 259.
 */
export function coulombAmplitude(
  eta: number,
  k: number,
): (q: number, blur?: number) => Amplitude | null {
  if (!(k > 0 && k < Infinity)) throw new RangeError(`the wave number is ${k}; it must be above 0`);
  const { sigma, error } = coulombPhases(0, eta);
  const twiceSigma = 2 * (sigma[0] ?? 0);
  const sigmaError = 2 * (error[0] ?? 0);
  return (q, blur = 0) => {
    if (!(q >= 0 && q <= 2.000001 * k)) {
      throw new RangeError(`the momentum transfer is ${q}; it lies between 0 and 2k`);
    }
    if (eta === 0) return { re: 0, im: 0, error: 0 };
    const s = q / (2 * k);
    const turn = 2 * eta * Math.log(s);
    const phase = twiceSigma - turn;
    // Divided one by one, so that nothing leaves the range of doubles before the answer does.
    const size = -eta / s / s / (2 * k);
    if (!Number.isFinite(size)) return null;
    const phaseError =
      sigmaError +
      UNIT_ROUNDOFF * (2 * Math.abs(turn) + Math.abs(phase)) +
      Math.abs(2 * eta) * UNIT_ROUNDOFF;
    const ofQ = 2 * Math.hypot(1, eta) * (Q_ALLOWANCE + blur);
    const relative = 8 * UNIT_ROUNDOFF + phaseError + ofQ;
    return {
      re: size * Math.cos(phase),
      im: size * Math.sin(phase),
      error: Math.abs(size) * relative,
    };
  };
}
