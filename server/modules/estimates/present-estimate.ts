import type { Estimate, EstimateRequest, Validity } from '#shared/contracts/estimates.ts';
import { ENGINE } from '#server/physics/version.ts';
import type { EstimateResult } from '#server/physics/estimate.ts';
import { insteadOf } from '#server/physics/instead.ts';
import type { Assessment } from '#server/physics/observables/assess.ts';
import { warningsOf } from '#server/physics/warnings.ts';
import { AnswerUnits, finite } from './answer-units.ts';
import { presentGoldenRule } from './present-golden-rule.ts';
import { presentMethods } from './present-methods.ts';
import { askedAngles } from './to-angles.ts';

function kinematicsOf({ problem }: EstimateResult, units: AnswerUnits): Estimate['kinematics'] {
  const { collision } = problem;
  return {
    k: units.inverseLengthQuantity(collision.k),
    wavelength: units.lengthQuantity(collision.wavelength),
    speed: { value: finite(collision.speedLab), unit: 'm/s' },
    reducedMass: units.massQuantity(collision.reducedMass),
    energyCm: units.energyQuantity(collision.energyCm),
    beta: finite(collision.betaLab),
  };
}

function potentialOf({ potential }: EstimateResult, units: AnswerUnits): Estimate['potential'] {
  if ('unavailable' in potential) return { unavailable: true, reason: potential.unavailable };
  const isComplex = potential.v.some(({ im }) => im !== 0);
  return {
    r: potential.r.map((r) => units.lengthOf(r)),
    v: potential.v.map(({ re, im }) =>
      isComplex ? { re: units.energyOf(re), im: units.energyOf(im) } : units.energyOf(re),
    ),
    unit: { r: units.length, v: units.energy },
  };
}

function deviationsOf({ deviations }: Assessment, units: AnswerUnits): Partial<Validity> {
  if (!deviations) return {};
  const { largest, largestAt, weighted, elastic, decides, limits } = deviations;
  return {
    deviation: finite(elastic ?? weighted),
    deviations: {
      largest: finite(largest),
      largestAt: units.angleOf(largestAt),
      weighted: finite(weighted),
      ...(elastic !== null && { elastic: finite(elastic) }),
      decides,
      limits: { ...limits },
    },
  };
}

function validityOf(result: EstimateResult, units: AnswerUnits): Validity {
  const { verdict, basis, criteria, reason } = result.assessment;
  const instead = insteadOf(result);
  return {
    verdict,
    basis,
    ...deviationsOf(result.assessment, units),
    ...(reason !== null && { reason }),
    ...(instead !== null && { instead }),
    criteria: criteria.map(({ name, value, limits, meaning, decides }) => ({
      name,
      value: finite(value),
      limits: { ...limits },
      meaning,
      decides,
    })),
  };
}

/** The angle of the sheet as it was asked for; the middle of the angles otherwise. */
function goldenRuleAngle(
  { problem, goldenRuleTheta }: EstimateResult,
  request: EstimateRequest,
  units: AnswerUnits,
): number {
  const asked = request.goldenRule?.theta;
  if (asked !== undefined) return asked;
  const { values } = askedAngles(request);
  const middle = values[(values.length - 1) >> 1];
  return problem.frame === 'cm' && middle !== undefined ? middle : units.angleOf(goldenRuleTheta);
}

/** The answer in the units asked for: units begin again. Every number is finite, every field named as in the contract. */
export function presentEstimate(result: EstimateResult, request: EstimateRequest): Estimate {
  const units = new AnswerUnits(request);
  const { length, area, energy, angle } = units;
  return {
    engine: { ...ENGINE },
    kinematics: kinematicsOf(result, units),
    identical: result.problem.exchangeSpin !== null,
    potential: potentialOf(result, units),
    methods: presentMethods(result, request, units),
    goldenRule: presentGoldenRule(result, goldenRuleAngle(result, request, units), units),
    validity: validityOf(result, units),
    warnings: warningsOf(result),
    units: { length, area, energy, angle },
    frame: result.problem.frame,
  };
}
