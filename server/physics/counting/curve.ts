import type { Frame } from '#server/physics/kinematics/frames.ts';

/** dσ/dΩ with a bound of its error, angstrom²/sr. */
export interface Dcs {
  value: number;
  error: number;
}

/** Null where it diverges or cannot be reached, with the reason. */
export interface LabDcs {
  dcs: Dcs | null;
  reason: string | null;
  /** True where no projectile is scattered to. */
  isOutOfReach: boolean;
}

/** The cross section of one collision at one energy, as counting takes it: from an estimate, never computed a second way. */
export interface Curve {
  frame: Frame;
  /** In the centre of mass; null where it diverges. */
  cm: (thetaCm: number) => Dcs | null;
  /** In the lab, both branches of a heavy projectile together. */
  lab: (thetaLab: number) => LabDcs;
  /** Whether the forward direction diverges (a Coulomb tail). */
  forwardDiverges: boolean;
  /** Whether identical particles make the backward direction diverge too. */
  backwardDiverges: boolean;
}

/** The same collision at another kinetic energy of the projectile in the lab, eV. */
export type CurveAt = (energy: number) => Curve;
