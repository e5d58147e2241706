import { HBAR_C_EV_ANGSTROM, SPEED_OF_LIGHT } from '#server/physics/constants/codata2022.ts';
import { momentumFromEnergy } from '#shared/units/de-broglie.ts';
import type { Regime } from '#shared/units/de-broglie.ts';
import { DomainError } from '#shared/errors.ts';
import type { Frame } from './frames.ts';

export type { Regime };

export interface TwoBodyInput {
  /** mc² of the projectile, eV, > 0. */
  projectileMass: number;
  /** mc² of the target, eV, > 0; Infinity for a fixed one. */
  targetMass: number;
  /** Kinetic energy of the projectile in the lab, in total, eV, > 0. */
  energy: number;
  regime: Regime;
}

export interface TwoBody {
  /** Wave number in the centre of mass, 1/angstrom. */
  k: number;
  /** 2 pi/k, angstrom. */
  wavelength: number;
  /** Momentum times c in the centre of mass and in the lab, eV. */
  momentumCm: number;
  momentumLab: number;
  /** What replaces mu, eV: m1 m2/(m1 + m2), or E1 E2/(E1 + E2) of the centre of mass with relativity. */
  reducedMass: number;
  /** 2 mu/hbar², 1/(eV angstrom²). */
  twoMuOverHbar2: number;
  /** Kinetic energy in the centre of mass, eV; sqrt(s) - m1 - m2 with relativity. */
  energyCm: number;
  /** Speed of the projectile in the lab, as a fraction of c and in m/s. */
  betaLab: number;
  speedLab: number;
  /** hbar k/mu as a fraction of c: enters flux, eta and chi; may exceed 1. */
  relativeVelocity: number;
  frame: Frame;
}

interface Momenta {
  momentumLab: number;
  momentumCm: number;
  reducedMass: number;
  energyCm: number;
  betaLab: number;
  frame: Omit<Frame, 'thetaMax'>;
}

function fixedTarget({ projectileMass: m1, energy, regime }: TwoBodyInput): Momenta {
  const momentum = momentumFromEnergy(energy, m1, regime);
  const reducedMass = regime === 'relativistic' ? m1 + energy : m1;
  return {
    momentumLab: momentum,
    momentumCm: momentum,
    reducedMass,
    energyCm: energy,
    betaLab: momentum / reducedMass,
    frame: { rho: 0, rhoMinusOne: -1, gamma: 1, keptHeadOn: 1, lostHeadOn: 0 },
  };
}

function nonrelativistic({ projectileMass: m1, targetMass: m2, energy }: TwoBodyInput): Momenta {
  const total = m1 + m2;
  const share = m2 / total;
  const momentumLab = momentumFromEnergy(energy, m1, 'nonrelativistic');
  return {
    momentumLab,
    momentumCm: momentumLab * share,
    reducedMass: m1 * share,
    energyCm: energy * share,
    betaLab: momentumLab / m1,
    frame: {
      rho: m1 / m2,
      rhoMinusOne: (m1 - m2) / m2,
      gamma: 1,
      keptHeadOn: ((m1 - m2) / total) ** 2,
      lostHeadOn: 4 * (m1 / total) * share,
    },
  };
}

/** Every quantity as a sum or product of positive terms: nothing cancels at T << m or T >> m. */
function relativistic({ projectileMass: m1, targetMass: m2, energy }: TwoBodyInput): Momenta {
  const total = m1 + m2;
  const rootS = Math.sqrt(total * total + 2 * m2 * energy);
  const momentumLab = momentumFromEnergy(energy, m1, 'relativistic');
  const energyOfAll = total + energy;
  const projectileEnergyCm = (m1 * total + m2 * energy) / rootS;
  const targetEnergyCm = (m2 / rootS) * energyOfAll;
  return {
    momentumLab,
    momentumCm: momentumLab * (m2 / rootS),
    reducedMass: projectileEnergyCm * (targetEnergyCm / rootS),
    energyCm: 2 * energy * (m2 / (rootS + total)),
    betaLab: momentumLab / (m1 + energy),
    frame: {
      rho: (m1 * total + m2 * energy) / (m2 * energyOfAll),
      rhoMinusOne: ((m1 - m2) / m2) * (total / energyOfAll),
      gamma: energyOfAll / rootS,
      keptHeadOn: ((m1 - m2) / rootS) ** 2,
      lostHeadOn: 2 * (m2 / rootS) * ((energy + 2 * m1) / rootS),
    },
  };
}

/** Edge of the cone, tan = 1/(gamma sqrt(rho² - 1)); pi for a lighter projectile, pi/2 at equal masses. */
function largestLabAngle({ rho, rhoMinusOne, gamma }: Omit<Frame, 'thetaMax'>): number {
  if (rhoMinusOne < 0) return Math.PI;
  return Math.atan2(1, gamma * Math.sqrt(rhoMinusOne * (rho + 1)));
}

function check({ projectileMass, targetMass, energy }: TwoBodyInput): void {
  if (!(energy > 0) || energy === Infinity) {
    throw new DomainError('invalidInput', 'The energy must be a finite number above zero.');
  }
  if (!(projectileMass > 0) || projectileMass === Infinity) {
    throw new DomainError(
      'invalidInput',
      'The mass of the projectile must be a finite number above zero.',
    );
  }
  if (!(targetMass > 0)) {
    throw new DomainError('invalidInput', 'The mass of the target must be above zero.');
  }
}

/**
 * Kinematics of elastic scattering on a target at rest.
 * Without relativity mu = m1 m2/(m1 + m2), E_cm = T m2/(m1 + m2), p = sqrt(2 mu E_cm). With it s = (m1 + m2)² + 2 m2 T, p = p_lab m2/sqrt(s),
 * E_cm = 2 m2 T/(sqrt(s) + m1 + m2), mu = E1 E2/(E1 + E2) with E1 = (m1 (m1 + m2) + m2 T)/sqrt(s), E2 = m2 (m1 + m2 + T)/sqrt(s).
 * @param input masses mc² and lab kinetic energy in eV, all > 0; targetMass Infinity for a fixed target
 * @returns see TwoBody; each value within 1e-15 of itself, checked against tests/reference/kinematics
 * @throws DomainError('invalidInput') for energies and masses that are not above zero or leave double precision
 * Validity: elastic, two bodies; the regime is the caller's choice.
 * Source: Review of Particle Physics, chapter Kinematics.
 */
export function twoBody(input: TwoBodyInput): TwoBody {
  check(input);
  const { targetMass, regime } = input;
  const moving = regime === 'relativistic' ? relativistic : nonrelativistic;
  const momenta = targetMass === Infinity ? fixedTarget(input) : moving(input);
  const { momentumCm, momentumLab, reducedMass, energyCm, betaLab, frame } = momenta;
  const k = momentumCm / HBAR_C_EV_ANGSTROM;
  const numbers = {
    k,
    wavelength: (2 * Math.PI) / k,
    momentumCm,
    momentumLab,
    reducedMass,
    twoMuOverHbar2: (2 * reducedMass) / (HBAR_C_EV_ANGSTROM * HBAR_C_EV_ANGSTROM),
    energyCm,
    betaLab,
    speedLab: betaLab * SPEED_OF_LIGHT,
    relativeVelocity: momentumCm / reducedMass,
  };
  if (!Object.values(numbers).every((value) => value > 0 && value < Infinity)) {
    throw new DomainError(
      'invalidInput',
      'Energy and masses are too far apart for double precision: check their units.',
    );
  }
  return { ...numbers, frame: { ...frame, thetaMax: largestLabAngle(frame) } };
}
