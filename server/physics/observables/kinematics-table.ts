import type { Frame } from '#server/physics/kinematics/frames.ts';
import {
  cmToLab,
  kinematicFactor,
  labToCm,
  recoilAngle,
  recoilFraction,
} from '#server/physics/kinematics/frames.ts';

/** One way of an elastic collision: angles in rad, energies kinetic and in the lab, eV. */
export interface Way {
  thetaCm: number;
  thetaLab: number;
  /** Null for a fixed centre, which does not move. */
  recoilAngle: number | null;
  recoilEnergy: number | null;
  projectileEnergy: number;
  /** Share of its energy that the projectile keeps. */
  kept: number;
  /** dΩ_cm/dΩ_lab; Infinity on the very edge of a cone. */
  jacobian: number;
}

function wayOf(
  { thetaCm, thetaLab, jacobian }: Pick<Way, 'thetaCm' | 'thetaLab' | 'jacobian'>,
  frame: Frame,
  energy: number,
): Way {
  const fixed = frame.rho === 0;
  const kept = kinematicFactor(thetaCm, frame);
  return {
    thetaCm,
    thetaLab,
    jacobian,
    kept,
    projectileEnergy: kept * energy,
    recoilAngle: fixed ? null : recoilAngle(thetaCm, frame),
    recoilEnergy: fixed ? null : recoilFraction(thetaCm, frame) * energy,
  };
}

/**
 * Angles and energies of both partners of an elastic collision seen at one angle.
 *
 * Formula: see frames.ts; K = kept(pi) + lost(pi) cos²(theta/2), recoil lost(pi) sin²(theta/2).
 *
 * @param theta rad, 0 to pi, in the frame named
 * @param energy kinetic energy of the projectile in the lab before, eV
 * @returns the ways to that angle: one in the centre of mass; in the lab none outside the cone, two inside that of a heavy projectile
 *
 * Source: Review of Particle Physics, chapter Kinematics.
 */
export function waysTo(
  theta: number,
  seenIn: 'cm' | 'lab',
  { frame, energy }: { frame: Frame; energy: number },
): Way[] {
  if (seenIn === 'cm') return [wayOf({ thetaCm: theta, ...cmToLab(theta, frame) }, frame, energy)];
  return labToCm(theta, frame).map((found) => wayOf({ ...found, thetaLab: theta }, frame, energy));
}
