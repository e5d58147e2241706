import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { TwoBody } from '#server/physics/kinematics/two-body.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import { exchangeSpin, identicalByRule } from '#server/physics/methods/exchange.ts';
import { smallestCorrectedFactor } from '#server/physics/methods/lepton-spin.ts';
import { leptonFactor, spinObstacle } from '#server/physics/lepton-factor.ts';
import type { Thresholds } from '#server/physics/observables/assess.ts';
import { DEFAULT_THRESHOLDS } from '#server/physics/observables/assess.ts';
import type { Particle, Problem } from '#server/physics/problem.ts';
import { Faults } from './faults.ts';
import { askedAngles, toAngles, toRadians } from './to-angles.ts';
import { toProjectile, toTarget } from './to-particles.ts';
import { buildTerms, readTerms } from './to-terms.ts';

/** Side of a box where the interaction has no range, angstrom: 1 nm, or 1 pm where lengths are in fm. */
const BOX_IN_ATOMS = 10;
const BOX_IN_NUCLEI = 0.01;
const SAME_MASS = 1e-6;

function refusalOfIdentity(projectile: Particle, target: Particle): string | null {
  if (target.kind === 'fixed') return 'A fixed centre cannot be identical to the projectile.';
  const { identity } = projectile;
  const named = identity !== null && target.identity !== null && identity !== target.identity;
  const apart = Math.abs(projectile.mass - target.mass) > SAME_MASS * target.mass;
  if (named || apart || projectile.charge !== target.charge) {
    return `${projectile.label} and ${target.label} are different particles; leave "identical" out.`;
  }
  return null;
}

/** Spin of identical particles, or null for distinct ones. */
function exchanged(
  override: boolean | undefined,
  projectile: Particle,
  target: Particle,
  faults: Faults,
): number | null {
  const identical = override ?? identicalByRule(projectile, target);
  if (!identical) return null;
  const refusal = override === true ? refusalOfIdentity(projectile, target) : null;
  if (refusal !== null) {
    faults.add('/identical', refusal);
    return null;
  }
  return faults.within('/identical', () => exchangeSpin(projectile, target)) ?? null;
}

function toGoldenRule(request: EstimateRequest, faults: Faults): Problem['goldenRule'] {
  const { theta, boxSide } = request.goldenRule ?? {};
  const { unit } = askedAngles(request);
  const angle = theta === undefined ? null : toRadians(theta, unit);
  if (theta !== undefined && angle === null) {
    faults.add(
      '/goldenRule/theta',
      `Scattering angles lie between 0 and 180 degrees; this is ${theta} ${unit}.`,
    );
  }
  return {
    theta: angle,
    boxSide: boxSide === undefined ? null : toInternal(boxSide, 'length'),
    boxWithoutRange: request.units?.length === 'fm' ? BOX_IN_NUCLEI : BOX_IN_ATOMS,
  };
}

function toCollision(
  request: EstimateRequest,
  projectile: Particle,
  target: Particle,
  faults: Faults,
): TwoBody | undefined {
  const energy = toInternal(request.energy, 'energy');
  if (!(energy > 0) || !(projectile.mass > 0) || !(target.mass > 0)) {
    if (!(energy > 0)) faults.add('/energy', 'The energy must be a finite number above zero.');
    return undefined;
  }
  return faults.within('/energy', () =>
    twoBody({
      projectileMass: projectile.mass,
      targetMass: target.mass,
      energy,
      regime: request.kinematics ?? 'nonrelativistic',
    }),
  );
}

/** Why McKinley and Feshbach's correction cannot be applied, in words; null where it can. */
function correctionObstacle(problem: Problem): string | null {
  const { projectile, energy } = problem;
  const lepton = leptonFactor(problem);
  if (!lepton) {
    const why = spinObstacle(problem);
    return `it belongs to relativistic electrons, positrons or muons scattered by charges${why === null ? '' : `, and ${why}`}`;
  }
  if (smallestCorrectedFactor(1 + energy / projectile.mass, lepton.chargeProduct) >= 0) return null;
  return 'at this charge it would make the cross section negative; it holds for |alpha Z1 Z2| below about 0.2';
}

function refuseBeyondFirstOrder(problem: Problem, faults: Faults): void {
  const { corrections, exchangeSpin, terms } = problem;
  if (corrections.includes('mckinleyFeshbach')) {
    const why = correctionObstacle(problem);
    if (why !== null) {
      faults.add(
        `/corrections/${corrections.indexOf('mckinleyFeshbach')}`,
        `The correction of McKinley and Feshbach cannot be applied: ${why}.`,
      );
    }
  }
  if (exchangeSpin !== null && terms.some(({ incoherent = 0 }) => incoherent > 0)) {
    faults.add(
      '/identical',
      'Incoherent scattering belongs to targets that differ from the projectile; leave "identical" out, or give the scattering length b itself.',
    );
  }
}

/** What a person asks, and by which thresholds of the lab its verdict is found; the defaults where none are given. */
export interface EstimateTask extends EstimateRequest {
  thresholds?: Thresholds;
}

/**
 * The problem an estimate asks: units end here, and every term is checked strictly against the register.
 * Throws DomainError('invalidInput') with all faults found, each with its JSON Pointer.
 */
export function toProblem(request: EstimateTask): Problem {
  const faults = new Faults();
  const projectile = toProjectile(request.projectile, faults);
  const target = toTarget(request.target, projectile?.charge ?? 1, faults);
  const read = readTerms(request.interaction.terms, faults);
  const angles = toAngles(request, faults);
  const goldenRule = toGoldenRule(request, faults);
  const collision =
    projectile && target ? toCollision(request, projectile, target, faults) : undefined;
  faults.throwIfAny();
  if (!projectile || !target || !collision) throw new Error('A fault was not recorded.');
  const spin = exchanged(request.identical, projectile, target, faults);
  const terms = buildTerms(
    read,
    {
      twoMuOverHbar2: collision.twoMuOverHbar2,
      projectileCharge: projectile.charge,
      targetCharge: target.charge,
      projectile: projectile.identity,
      recoilFactor: 1 / (1 + projectile.mass / target.mass),
    },
    faults,
  );
  faults.throwIfAny();
  const problem: Problem = {
    projectile,
    target,
    energy: toInternal(request.energy, 'energy'),
    regime: request.kinematics ?? 'nonrelativistic',
    collision,
    terms,
    methods: request.methods,
    thresholds: request.thresholds ?? DEFAULT_THRESHOLDS,
    frame: request.frame ?? 'cm',
    angles,
    exchangeSpin: spin,
    corrections: request.corrections ?? [],
    goldenRule,
  };
  refuseBeyondFirstOrder(problem, faults);
  faults.throwIfAny();
  return problem;
}
