import type { Aids, ElasticBetween, KinematicsRow, Reference } from '#shared/contracts/aids.ts';
import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import type { Curve } from '#server/physics/observables/differential.ts';
import type { CmPoint, LabPoint } from '#server/physics/observables/differential.ts';
import type { Way } from '#server/physics/observables/kinematics-table.ts';
import type { Problem } from '#server/physics/problem.ts';
import type { BetweenAngles, PointCharges, ReadingAids } from '#server/physics/reading-aids.ts';
import { AnswerUnits, errorOf, finite } from './answer-units.ts';
import { askedAngles } from './to-angles.ts';

const IDENTICAL =
  'The particles are identical and both are counted, as in the curve: over all angles this is twice the elastic cross section.';
const TWO_BRANCHES =
  'Two centre-of-mass angles lead to one lab angle here; both are in the number.';
const OUTSIDE_CONE = 'The projectile never leaves its cone in the lab: nothing scatters there.';
const REACHES_EDGE =
  'The range reaches the edge of the cone, where dσ/dΩ of the lab grows without limit; its integral is finite and whole.';

function remarksOf({ ranges }: BetweenAngles, problem: Problem): string[] {
  const { exchangeSpin, frame, collision } = problem;
  const heavy = frame === 'lab' && collision.frame.rhoMinusOne > 0;
  return [
    ...(exchangeSpin === null ? [] : [IDENTICAL]),
    ...(ranges.length === 0 ? [OUTSIDE_CONE] : []),
    ...(heavy && ranges.length === 2 ? [TWO_BRANCHES] : []),
    ...(heavy && ranges.length === 1 ? [REACHES_EDGE] : []),
  ];
}

function betweenOf(
  between: BetweenAngles,
  problem: Problem,
  asked: { from: number; to: number },
  units: AnswerUnits,
): ElasticBetween {
  const { integral, ranges, fromHalf } = between;
  const common = {
    ...asked,
    centreOfMass: ranges.map(({ from, to }) => ({
      from: units.angleOf(from),
      to: units.angleOf(to),
    })),
    remarks: remarksOf(between, problem),
  };
  if ('divergent' in integral) return { ...common, divergent: true, reason: integral.divergent };
  const value = units.areaOf(integral.value);
  const half = fromHalf && {
    from: units.angleOf(fromHalf.from),
    value: units.areaOf(fromHalf.value),
    ratio: finite(fromHalf.value / integral.value),
  };
  return {
    ...common,
    value,
    unit: units.area,
    ...errorOf(value, units.areaOf(integral.error)),
    ...(half && { fromHalf: half }),
  };
}

interface Sum {
  value: number;
  error: number;
}

/** dσ/dΩ at every angle, branches added; null where there is none. */
function sums(curve: Curve): (Sum | null)[] {
  const one = ({ dcs }: CmPoint): Sum | null => dcs;
  const both = ({ branches }: LabPoint): Sum | null => {
    const parts = branches.map(one);
    if (parts.length === 0 || parts.includes(null)) return null;
    return parts.reduce<Sum>(
      (sum, part) => ({
        value: sum.value + (part?.value ?? 0),
        error: sum.error + (part?.error ?? 0),
      }),
      { value: 0, error: 0 },
    );
  };
  return curve.frame === 'cm' ? curve.points.map(one) : curve.points.map(both);
}

function referenceOf(
  { kind, chargeProduct, charges, reference, own }: PointCharges,
  typed: readonly number[],
  units: AnswerUnits,
): Reference {
  const curve = sums(own);
  const points = sums(reference).map((bare, i) => {
    const theta = typed[i] ?? 0;
    const here = curve[i] ?? null;
    if (bare === null) {
      const reason =
        'The point-charge cross section has no value here: it diverges, or the angle cannot be reached.';
      return { theta, dcs: null, ratio: null, reason };
    }
    const dcs = units.areaOf(bare.value);
    if (here === null) {
      return { theta, dcs, ratio: null, reason: 'The case has no cross section at this angle.' };
    }
    const relative = here.error / here.value + bare.error / bare.value;
    return {
      theta,
      dcs,
      ratio: finite(here.value / bare.value),
      ...(relative < 1 && { relativeError: relative }),
    };
  });
  return { kind, chargeProduct, charges, points, unit: `${units.area}/sr` };
}

function wayOf(way: Way, units: AnswerUnits): KinematicsRow {
  const orNull = (value: number | null, of: (value: number) => number) =>
    value === null ? null : of(value);
  return {
    thetaCm: units.angleOf(way.thetaCm),
    thetaLab: units.angleOf(way.thetaLab),
    recoilAngle: orNull(way.recoilAngle, (angle) => units.angleOf(angle)),
    projectileEnergy: units.energyOf(way.projectileEnergy),
    recoilEnergy: orNull(way.recoilEnergy, (energy) => units.energyOf(energy)),
    kept: finite(way.kept),
    jacobian: Number.isFinite(way.jacobian) ? way.jacobian : null,
  };
}

/** What was asked beside the estimate, in the units of the answer. */
export function presentAids(aids: ReadingAids, problem: Problem, request: EstimateRequest): Aids {
  const units = new AnswerUnits(request);
  const { elasticBetween, reference, kinematics } = aids;
  const typed = askedAngles(request).values;
  const range = request.aids?.angleRange;
  const { thetaMax, rhoMinusOne } = problem.collision.frame;
  const presented: Aids = {};
  if (elasticBetween && range) {
    presented.elasticBetween =
      'unavailable' in elasticBetween
        ? { unavailable: true, reason: elasticBetween.unavailable }
        : betweenOf(elasticBetween, problem, range, units);
  }
  if (reference) {
    presented.reference =
      'unavailable' in reference
        ? { unavailable: true, reason: reference.unavailable }
        : referenceOf(reference, typed, units);
  }
  if (kinematics) {
    presented.kinematics = {
      unit: { angle: units.angle, energy: units.energy },
      largestLabAngle: rhoMinusOne >= 0 ? units.angleOf(thetaMax) : null,
      rows: kinematics.map((ways, i) => ({
        theta: typed[i] ?? 0,
        ways: ways.map((way) => wayOf(way, units)),
      })),
    };
  }
  return presented;
}
