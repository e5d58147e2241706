import { HBAR_C_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import { momentumFromEnergy } from '#shared/units/de-broglie.ts';
import type { Regime } from '#shared/units/de-broglie.ts';

export interface FinalState {
  /** Wave number in the centre of mass, 1/angstrom. */
  k: number;
  /** What replaces mu, eV. */
  reducedMass: number;
}

/**
 * Wave number and reduced mass of a pair at another centre-of-mass kinetic energy, as the golden rule asks of states off the shell.
 *
 * Formula: p = sqrt(2 mu E); with relativity, W = E + m1 + m2, p² = E (E + 2(m1 + m2)) (W² - (m1 - m2)²)/(4W²),
 * mu = E1 E2/W. A fixed target: p² = E (E + 2 m1), mu = E + m1.
 *
 * @param m1 mc² of the projectile, eV, > 0
 * @param m2 mc² of the target, eV, > 0; Infinity for a fixed one
 * @returns function of the kinetic energy in the centre of mass, eV, >= 0
 *
 * Source: Review of Particle Physics, chapter Kinematics.
 */
export function finalStates(
  m1: number,
  m2: number,
  { regime }: { regime: Regime },
): (energyCm: number) => FinalState {
  if (m2 === Infinity) {
    return (energy) => ({
      k: momentumFromEnergy(energy, m1, regime) / HBAR_C_EV_ANGSTROM,
      reducedMass: regime === 'relativistic' ? m1 + energy : m1,
    });
  }
  if (regime === 'nonrelativistic') {
    const reducedMass = m1 * (m2 / (m1 + m2));
    return (energy) => ({
      k: momentumFromEnergy(energy, reducedMass, regime) / HBAR_C_EV_ANGSTROM,
      reducedMass,
    });
  }
  return (energy) => {
    const total = m1 + m2;
    const w = energy + total;
    const momentum =
      Math.sqrt(energy * (energy + 2 * total)) *
      (Math.sqrt((w - m1 + m2) * (w + m1 - m2)) / (2 * w));
    return {
      k: momentum / HBAR_C_EV_ANGSTROM,
      reducedMass: Math.hypot(momentum, m1) * (Math.hypot(momentum, m2) / w),
    };
  };
}
