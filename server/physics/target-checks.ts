import { ATOMIC_MASS_UNIT } from './constants/codata2022.ts';
import type { Slowed } from './counting/bethe.ts';
import { meanLoss } from './counting/bethe.ts';
import { HIGHLAND_RANGE, highlandAngle } from './counting/highland.ts';
import { kinematicFactor, labToCm } from './kinematics/frames.ts';
import { twoBody } from './kinematics/two-body.ts';
import type { Particle, Problem } from './problem.ts';
import type { Plan } from './plan.ts';

/** What one passage through the target does to the beam. */
export interface TargetChecks {
  /** Along the beam; null where the matter is not known. */
  radiationLengths: number | null;
  /** Plane angle of multiple scattering, rad. */
  multipleScattering: { angle: number } | { none: string };
  loss: { lossTo: (depth: number) => number } | { none: string };
}

/** An atom of the target and the energy with which it sends the projectile to the same place; eV, null out of reach. */
export interface SameAngle {
  scatterer: string;
  energy: number | null;
}

const UNKNOWN =
  'only a number of scatterers is given: name the formula of the target to know its matter';

/** A charged beam with what Bethe's formula asks of it; null for a neutral one. */
function slowed({ label, mass, charge, kind }: Particle): Slowed | null {
  if (charge === 0) return null;
  const isElectron = kind === 'lepton' && /^(Electron|Positron)$/.test(label);
  return { mass, charge, kind: isElectron ? (charge < 0 ? 'electron' : 'positron') : 'heavy' };
}

function lossOf({ problem, target }: Plan, slant: number): TargetChecks['loss'] {
  const particle = slowed(problem.projectile);
  if (particle === null) return { none: 'a neutral beam loses none to electrons' };
  const { matter } = target;
  if (matter === null) return { none: UNKNOWN };
  if (matter.stopping === null) {
    return { none: 'no mean excitation energy is tabulated for an element of this target' };
  }
  return meanLoss(problem.energy, matter.mass * slant, particle, matter.stopping);
}

function highlandOf(
  { problem, target }: Plan,
  radiationLengths: number | null,
): TargetChecks['multipleScattering'] {
  const { projectile } = problem;
  if (projectile.charge === 0) return { none: 'a neutral beam is not turned by charges' };
  if (radiationLengths === null || target.matter === null) return { none: UNKNOWN };
  const { beta, momentum } = relativisticMotion(problem);
  const angle = highlandAngle({ radiationLengths, momentum, beta, charge: projectile.charge });
  if (angle !== null) return { angle };
  return {
    none: `the formula of Highland holds from ${HIGHLAND_RANGE.least} to ${HIGHLAND_RANGE.most} radiation lengths, and this target has ${radiationLengths.toPrecision(3)}`,
  };
}

/** Momentum and speed as they are, whatever kinematics the estimate was computed with. */
function relativisticMotion({ projectile, energy }: Problem) {
  const momentum = Math.sqrt(energy * (energy + 2 * projectile.mass));
  return { momentum, beta: momentum / (energy + projectile.mass) };
}

export function targetChecks(plan: Plan, slant: number): TargetChecks {
  const { matter } = plan.target;
  const radiationLengths = matter && (matter.mass * slant) / matter.radiationLength;
  return {
    radiationLengths,
    multipleScattering: highlandOf(plan, radiationLengths),
    loss: lossOf(plan, slant),
  };
}

/** Energies at which the atoms of a target send the projectile elastically to one angle of the lab (the forward way of a heavy one). */
export function sameAngle({ problem, target }: Plan, theta: number): SameAngle[] {
  return target.atoms.map(({ name, molarMass }) => {
    const { frame } = twoBody({
      projectileMass: problem.projectile.mass,
      targetMass: molarMass * ATOMIC_MASS_UNIT,
      energy: problem.energy,
      regime: problem.regime,
    });
    const [way] = labToCm(theta, frame);
    return {
      scatterer: name,
      energy: way ? problem.energy * kinematicFactor(way.thetaCm, frame) : null,
    };
  });
}
