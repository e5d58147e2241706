import { rayOf } from './counting/aperture.ts';
import type { Dcs } from './counting/curve.ts';
import { energyNodes } from './counting/energies.ts';
import type { Times } from './counting/times.ts';
import { equalPrecision } from './counting/times.ts';
import type { Decision } from './counting/verdict.ts';
import { judgePlan } from './counting/verdict.ts';
import type { CollisionCurve } from './collision-curve.ts';
import { collisionCurve, removalOf } from './collision-curve.ts';
import type { Plan, PlanDetector, PlannedCollision } from './plan.ts';
import type { PlannedDetector } from './planned-detector.ts';
import { planDetector, silence, slabFor } from './planned-detector.ts';
import { DomainError } from '#shared/errors.ts';
import type { TargetChecks } from './target-checks.ts';
import { targetChecks } from './target-checks.ts';

export interface RunPlanResult {
  plan: Plan;
  /** n t sigma along the beam, and the angle beyond which it counts; rad. */
  collisions: number;
  collisionsBeyond: number | null;
  checks: TargetChecks;
  detectors: PlannedDetector[];
  totalTime: number | null;
  totalTimeInTurn: number | null;
  equalPrecision: ReturnType<typeof equalPrecision>;
  decision: Decision;
}

/** Small deflections matter once they are a fifth of the scattering angle or leave the acceptance. */
const SHARE_OF_ANGLE = 5;

/** Angles whose cross section is kept: those of every detector, its averages and their slopes. */
const MOST_KEPT = 20_000;

/** A curve that computes no angle twice. */
function remembering(curve: CollisionCurve): CollisionCurve {
  const known = new Map<number, Dcs | null>();
  return {
    ...curve,
    cm(thetaCm) {
      const kept = known.get(thetaCm);
      if (kept !== undefined) return kept;
      const found = curve.cm(thetaCm);
      if (known.size < MOST_KEPT) known.set(thetaCm, found);
      return found;
    },
  };
}

const once = (curveAt: (energy: number) => CollisionCurve) => {
  const known = new Map<number, CollisionCurve>();
  return (energy: number) => {
    const curve = known.get(energy) ?? remembering(curveAt(energy));
    known.set(energy, curve);
    return curve;
  };
};
/** Cross sections of a collision by energy, each made once. */
export const curvesOf = ({ problemAt, method }: PlannedCollision) =>
  once((energy) => collisionCurve(problemAt(energy), method));

/** Refusals of a contribution are told at its place. */
function placedAt<T>(path: string, curveAt: (energy: number) => T): (energy: number) => T {
  return (energy) => {
    try {
      return curveAt(energy);
    } catch (fault) {
      if (!(fault instanceof DomainError) || fault.code !== 'invalidInput') throw fault;
      const inner = fault.details.errors ?? [{ path: '', message: fault.message }];
      const errors = inner.map((one) => ({ ...one, path: `${path}${one.path}` }));
      throw new DomainError(fault.code, fault.message, { errors });
    }
  };
}

/** The angle beyond which a collision counts where their number diverges, rad. */
function smallestThatMatters(detectors: readonly PlanDetector[]): number {
  const each = detectors.map(({ cone }) => Math.max(cone.halfAngle, rayOf(cone) / SHARE_OF_ANGLE));
  return Math.min(Math.PI / 2, ...each);
}

/** Every detector at once: the longest sample time and the longest blank; in turn: their sum. */
function totalsOf(detectors: readonly PlannedDetector[]) {
  const times = detectors.map((one) => one.times);
  const known = times.filter((one) => one !== null);
  if (known.length < times.length) return { totalTime: null, totalTimeInTurn: null };
  const longest = (key: keyof Times) => Math.max(...known.map((one) => one[key]));
  return {
    totalTime: longest('signal') + longest('blank'),
    totalTimeInTurn: known.reduce((sum, { signal, blank }) => sum + signal + blank, 0),
  };
}

/** Mean energy lost before the collision, eV. */
export function meanLossOf({ checks }: Pick<RunPlanResult, 'checks'>): number {
  return 'lossTo' in checks.loss ? checks.loss.lossTo(1) / 2 : 0;
}

/** What the particles of one detector cross. */
export const slabOf = ({ plan, collisions }: RunPlanResult, detector: PlanDetector) =>
  slabFor({ plan, collisions }, detector);

/**
 * A run: rates of every detector from the cross section of an estimate, times for the aim, and whether it can be done.
 *
 * Formula: rate = beam particles/s · n/cos(tilt) · <T dσ/dΩ> Ω · efficiency, dead time on signal plus background at the rate while the beam is on.
 *
 * @param plan in internal units
 * @returns rates in 1/s, times in s, each cross section with its error
 * @throws DomainError('tooMuchWork') where a cross section cannot be computed within reason
 *
 * Validity: single scattering in a thin target, a point-like beam spot; what is left out is said by `planWarnings`.
 *
 * Source: definition of the cross section.
 */
export function runPlan(plan: Plan): RunPlanResult {
  const { problem, target, beam, detectors } = plan;
  const slant = 1 / Math.cos(target.tilt);
  const curveAt = curvesOf(plan);
  const others = plan.contributions.map((one, i) => ({
    ...one,
    curveAt: placedAt(`/contributions/${i}`, curvesOf(one)),
  }));
  const beyond = smallestThatMatters(detectors);
  const removals = [{ ...target, curveAt }, ...others].map((one) => ({
    scatterers: one.scatterers,
    ...removalOf(one.curveAt(problem.energy), beyond),
  }));
  const collisions = removals.reduce((sum, one) => sum + one.scatterers * one.value * slant, 0);
  const checks = targetChecks(plan, slant);
  const lossTo = 'lossTo' in checks.loss ? checks.loss.lossTo : null;
  const nodes = energyNodes(problem.energy, beam.spread, lossTo);
  const shared = { plan, curveAt, others, nodes, collisions };
  const planned = detectors.map((detector) => planDetector(shared, detector));
  const totals = totalsOf(planned);
  const { precision, beamTime } = plan.aim;
  const isCut = removals.some((one) => one.beyond !== null);
  return {
    plan,
    collisions,
    collisionsBeyond: isCut ? beyond : null,
    checks,
    detectors: planned,
    ...totals,
    equalPrecision:
      beamTime === null
        ? null
        : equalPrecision(
            planned.map(({ rates }) => rates),
            beamTime,
          ),
    decision: judgePlan({
      collisions,
      totalTime: totals.totalTime,
      precision,
      beamTime,
      detectors: planned.map((one) => ({
        name: one.detector.name,
        total: one.times && one.times.signal + one.times.blank,
        reason: one.times ? null : silence(one),
        deadTimeFraction: one.deadTimeFraction,
        combined: one.combined,
      })),
    }),
  };
}
