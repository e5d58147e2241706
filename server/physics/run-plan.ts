import type { Averages } from './counting/averages.ts';
import { angleSlope, attenuationSlope, averagesOf, energySlope } from './counting/averages.ts';
import type { Cone } from './counting/cone.ts';
import type { CurveAt } from './counting/curve.ts';
import type { DeadTime } from './counting/dead-time.ts';
import type { EnergyNode } from './counting/energies.ts';
import { energyNodes } from './counting/energies.ts';
import type { Slab } from './counting/slab.ts';
import type { CountedRates, Times } from './counting/times.ts';
import { equalPrecision, recordedOf, timesForPrecision } from './counting/times.ts';
import type { GivenUncertainties, UncertaintyLine } from './counting/uncertainty-lines.ts';
import { uncertaintyLines } from './counting/uncertainty-lines.ts';
import type { Decision } from './counting/verdict.ts';
import { judgePlan } from './counting/verdict.ts';
import type { CollisionCurve } from './collision-curve.ts';
import { collisionCurve, removalOf } from './collision-curve.ts';
import type { MethodName, Problem } from './problem.ts';
import type { SameAngle, TargetChecks } from './target-checks.ts';
import { sameAngle, targetChecks } from './target-checks.ts';

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
}

export interface PlannedDetector {
  detector: PlanDetector;
  averages: Averages;
  /** beam · n/cos tilt · dσ/dΩ · Ω · efficiency at the central ray, 1/s; null where there is no cross section. */
  product: number | null;
  rates: CountedRates;
  observed: number;
  deadTimeFraction: number;
  contributions: { scatterer: string; rate: number }[];
  times: Times | null;
  lines: UncertaintyLine[];
  combined: number;
  /** Relative change of the signal per radian; null where there is none. */
  angleSlope: number | null;
  sameAngle: SameAngle[];
}

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

const once = (curveAt: (energy: number) => CollisionCurve) => {
  const known = new Map<number, CollisionCurve>();
  return (energy: number) => {
    const curve = known.get(energy) ?? curveAt(energy);
    known.set(energy, curve);
    return curve;
  };
};
const curvesOf = ({ problemAt, method }: PlannedCollision) =>
  once((energy) => collisionCurve(problemAt(energy), method));

/** The angle beyond which a collision counts where their number diverges, rad. */
function smallestThatMatters(detectors: readonly PlanDetector[]): number {
  const each = detectors.map(({ cone }) => Math.max(cone.halfAngle, cone.theta / SHARE_OF_ANGLE));
  return Math.min(Math.PI / 2, ...each);
}

/** What every detector of a plan shares. */
interface Shared {
  plan: Plan;
  curveAt: CurveAt;
  others: { scatterer: string; scatterers: number; curveAt: CurveAt }[];
  nodes: EnergyNode[];
  collisions: number;
}

function slabFor({ plan, collisions }: Shared, { side }: PlanDetector): Slab {
  const { kind, tilt } = plan.target;
  return { kind, collisions: collisions * Math.cos(tilt), tilt: side * tilt };
}

/** Beam particles a second times nuclei along the beam times solid angle and efficiency, sr/(angstrom² s). */
const exposure = ({ beam, target }: Plan, scatterers: number, detector: PlanDetector): number =>
  ((beam.rate * scatterers) / Math.cos(target.tilt)) * detector.solidAngle * detector.efficiency;

function otherRates(shared: Shared, detector: PlanDetector, slab: Slab) {
  const { plan, nodes } = shared;
  return shared.others.map(({ scatterer, scatterers, curveAt }) => {
    const { averaged, attenuation } = averagesOf(
      curveAt,
      plan.problem.energy,
      nodes,
      slab,
      detector.cone,
    );
    const rate = exposure(plan, scatterers, detector) * (averaged?.value ?? 0) * attenuation;
    return { scatterer, rate };
  });
}

function budgetOf(
  shared: Shared,
  planned: { rates: CountedRates; slope: number },
  d: PlanDetector,
) {
  const { plan, curveAt, nodes } = shared;
  const { energy } = plan.problem;
  const slab = slabFor(shared, d);
  const loses = nodes.some(({ depth }) => depth !== null);
  const byEnergy =
    plan.uncertainties.energy !== undefined || loses
      ? (energySlope(curveAt, energy, d.cone) ?? 0)
      : 0;
  const mean = nodes.reduce((sum, node) => sum + node.weight * node.energy, 0);
  const byThickness =
    1 + attenuationSlope(slab, d.cone.theta) + (byEnergy * (mean - energy)) / energy;
  const { signal, background } = planned.rates;
  return uncertaintyLines(plan.uncertainties, {
    current: 1,
    thickness: byThickness,
    density: byThickness,
    efficiency: 1,
    solidAngle: 1,
    background: signal > 0 ? -background / signal : 0,
    energy: byEnergy,
    angle: (planned.slope * Math.PI) / 180,
  });
}

function planDetector(shared: Shared, detector: PlanDetector): PlannedDetector {
  const { plan, curveAt, nodes } = shared;
  const { energy } = plan.problem;
  const slab = slabFor(shared, detector);
  const averages = averagesOf(curveAt, energy, nodes, slab, detector.cone);
  const size = exposure(plan, plan.target.scatterers, detector);
  const { averaged, point, attenuation } = averages;
  const contributions = otherRates(shared, detector, slab);
  const rates: CountedRates = {
    signal: size * (averaged?.value ?? 0) * attenuation,
    background: contributions.reduce((sum, { rate }) => sum + rate, detector.background),
    deadTime: detector.deadTime,
    dutyFactor: plan.beam.dutyFactor,
  };
  const observed = recordedOf(rates).gross;
  const all = rates.signal + rates.background;
  const slope = angleSlope(curveAt(energy), detector.cone);
  const { lines, combined } = budgetOf(shared, { rates, slope: slope ?? 0 }, detector);
  return {
    detector,
    averages,
    product: point.dcs && size * point.dcs.value,
    rates,
    observed,
    deadTimeFraction: all > 0 ? Math.max(0, 1 - observed / all) : 0,
    contributions,
    times: timesForPrecision(rates, plan.aim.precision),
    lines,
    combined,
    angleSlope: slope,
    sameAngle: sameAngle(plan, detector.cone.theta),
  };
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

/** Why a detector has no time to plan with, in words. */
export function silence({ averages, rates }: PlannedDetector): string {
  if (averages.averaged === null) {
    return 'the cross section diverges inside its acceptance; move it away from the beam or add the screening of the electrons.';
  }
  if (rates.signal > 0) {
    return 'next to nothing of what is scattered leaves the target and is recorded.';
  }
  return averages.point.reason ?? 'no particle is scattered there.';
}

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
  const others = plan.contributions.map((one) => ({ ...one, curveAt: curvesOf(one) }));
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
