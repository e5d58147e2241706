import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { logGamma } from '#server/physics/numerics/complex-log-gamma.ts';
import { Q_ALLOWANCE } from '#server/physics/potentials/transform-error.ts';
import type { Complex } from '#server/physics/potentials/types.ts';
import type { Amplitude } from '../amplitude.ts';

/**
 * Eikonal amplitude of two point charges.
 *
 * Formula: -ik ∫ b J0(qb) (kb)^{2i eta} db = -(2 eta k/q²) exp{i[2 arg Γ(1 + i eta) - 2 eta ln(q/2k)]}, chi = 2 eta ln(kb): the phase of a
 *   screening length is left out, and what remains is the exact amplitude of the Schrödinger equation.
 *
 * @param eta Sommerfeld's parameter, negative for attraction
 * @param k wave number, 1/angstrom
 * @returns amplitude, angstrom, for q > 0 (1/angstrom), with a bound of its error, that of q (and `blur`, relative) included
 *
 * Source: R. J. Glauber, High-Energy Collision Theory (Interscience, 1959), 315; DLMF 10.22.43, 33.2.10.
 */
export function pointCharges(eta: number, k: number): (q: number, blur?: number) => Amplitude {
  const gamma = logGamma(1, eta);
  return (q, blur = 0) => {
    const size = (-2 * eta * k) / (q * q);
    const turn = -2 * eta * Math.log(q / (2 * k));
    const phase = 2 * gamma.im + turn;
    const lost = 2 * gamma.imError + 4 * UNIT_ROUNDOFF * (Math.abs(turn) + Math.abs(phase));
    const ofQ = (2 + 2 * Math.abs(eta)) * (Q_ALLOWANCE + blur);
    return {
      re: size * Math.cos(phase),
      im: size * Math.sin(phase),
      error: Math.abs(size) * (lost + ofQ + 8 * UNIT_ROUNDOFF),
    };
  };
}

/** (kb)^{2i eta}, the transmission past two point charges. */
export function pastCharges(eta: number, k: number, b: number): Complex {
  const phase = 2 * eta * Math.log(k * b);
  return { re: Math.cos(phase), im: Math.sin(phase) };
}
