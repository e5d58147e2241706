import { HBAR_C_EV_ANGSTROM } from './codata.ts';

export type Regime = 'nonrelativistic' | 'relativistic';

const TWO_PI_HBAR_C = 2 * Math.PI * HBAR_C_EV_ANGSTROM;

/**
 * Momentum times c of a free particle, eV.
 * p c = sqrt(T (T + 2m)), or sqrt(2 m T) without relativity: no subtraction, so every digit survives at T << m and at T >> m.
 * @param kineticEnergy T, eV, >= 0
 * @param mass mc², eV, > 0
 */
export function momentumFromEnergy(kineticEnergy: number, mass: number, regime: Regime): number {
  if (regime === 'nonrelativistic') return Math.sqrt(2 * mass * kineticEnergy);
  return Math.sqrt(kineticEnergy * (kineticEnergy + 2 * mass));
}

/** Kinetic energy, eV, of a momentum p c in eV: p²/2m, or p²/(m + sqrt(p² + m²)) with relativity. */
export function energyFromMomentum(momentum: number, mass: number, regime: Regime): number {
  if (regime === 'nonrelativistic') return (momentum / (2 * mass)) * momentum;
  return (momentum / (mass + Math.hypot(momentum, mass))) * momentum;
}

/** De Broglie wavelength 2 pi hbar / p in the lab, angstrom, of kinetic energy in eV and mass mc² in eV. */
export function wavelengthFromEnergy(kineticEnergy: number, mass: number, regime: Regime): number {
  return TWO_PI_HBAR_C / momentumFromEnergy(kineticEnergy, mass, regime);
}

/** Kinetic energy, eV, of a de Broglie wavelength in angstrom and mass mc² in eV. */
export function energyFromWavelength(wavelength: number, mass: number, regime: Regime): number {
  return energyFromMomentum(TWO_PI_HBAR_C / wavelength, mass, regime);
}
