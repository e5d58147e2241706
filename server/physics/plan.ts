import type { Cone } from './counting/cone.ts';
import type { DeadTime } from './counting/dead-time.ts';
import type { GivenUncertainties } from './counting/uncertainty-lines.ts';
import type { MethodName, Problem } from './problem.ts';

/** Atoms of one kind in a target. */
export interface TargetAtom {
  /** Element (C) or nuclide (H-2). */
  name: string;
  symbol: string;
  /** g/mol */
  molarMass: number;
  /** Along the normal, 1/angstrom². */
  arealDensity: number;
}

export interface PlanTarget {
  kind: 'foil' | 'gas';
  /** Of the normal towards positive angles, rad. */
  tilt: number;
  /** Nuclei of the plan's scatterer, along the normal, 1/angstrom². */
  scatterers: number;
  scatterer: string;
  atoms: readonly TargetAtom[];
  /** Null where only a number of scatterers is known. */
  matter: {
    /** Along the normal, g/cm². */
    mass: number;
    /** g/cm² */
    radiationLength: number;
    /** Z/A, mol/g, and mean excitation energy, eV; null where the latter is not tabulated. */
    stopping: { electronsPerGram: number; excitation: number } | null;
  } | null;
}

export interface PlanDetector {
  name: string;
  /** As it was given, degrees. */
  angle: number;
  /** Which side of the beam it stands on. */
  side: 1 | -1;
  cone: Cone;
  solidAngle: number;
  efficiency: number;
  deadTime: DeadTime;
  /** Counts a second without the target, after efficiency. */
  background: number;
  /** The part of it that the beam brings, which grows with the current. */
  beamBackground: number;
}

/** The collision of an estimate at any energy (eV), by one of its methods. */
export interface PlannedCollision {
  problemAt: (energy: number) => Problem;
  method: MethodName;
}

export interface PlanContribution extends PlannedCollision {
  scatterer: string;
  /** Along the normal, 1/angstrom². */
  scatterers: number;
}

/** A run with all units ended: angstrom, eV, s, rad, sr, 1/s. */
export interface Plan extends PlannedCollision {
  problem: Problem;
  beam: { rate: number; dutyFactor: number; spread: number };
  target: PlanTarget;
  detectors: readonly PlanDetector[];
  contributions: readonly PlanContribution[];
  aim: { precision: number; beamTime: number | null };
  uncertainties: GivenUncertainties;
  /** Index of the detector the others are divided by; null without one. */
  monitor: number | null;
}
