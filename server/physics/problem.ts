import type { Regime, TwoBody } from './kinematics/two-body.ts';
import type { Thresholds } from './observables/assess.ts';
import type { Term } from './potentials/types.ts';

/** A particle as the engine sees it; masses as mc² in eV. */
export interface Particle {
  /** As a person names it. */
  label: string;
  /** Infinity for a fixed target. */
  mass: number;
  charge: number;
  /** Null where the table does not know it. */
  spin: number | null;
  /** What identical particles share; null for custom ones. */
  identity: string | null;
  kind: 'lepton' | 'hadron' | 'custom' | 'fixed';
  /** Mass number of a nucleus; null otherwise. */
  massNumber: number | null;
}

export type MethodName = 'born1' | 'born2' | 'eikonal' | 'partialWaves';

/** An estimate with all units ended: eV, angstrom, radian. */
export interface Problem {
  projectile: Particle;
  target: Particle;
  /** Kinetic energy of the projectile in the lab, eV. */
  energy: number;
  regime: Regime;
  collision: TwoBody;
  terms: Term[];
  /** Methods whose curve and integrals are asked for. */
  methods: readonly MethodName[];
  /** What decides the verdict. */
  thresholds: Thresholds;
  frame: 'cm' | 'lab';
  /** rad, 0 to pi. */
  angles: number[];
  /** Spin of identical particles; null for distinct ones. */
  exchangeSpin: number | null;
  /** Corrections beyond first order that were asked for. */
  corrections: readonly 'mckinleyFeshbach'[];
  goldenRule: {
    /** rad, centre of mass; null for the middle of the angles. */
    theta: number | null;
    /** angstrom; null for a thousand ranges. */
    boxSide: number | null;
    /** Side where the interaction has no range, angstrom. */
    boxWithoutRange: number;
  };
}
