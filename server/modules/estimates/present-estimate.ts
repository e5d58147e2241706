import type { Estimate, EstimateRequest, Integral, Method } from '#shared/contracts/estimates.ts';
import { ENGINE } from '#server/physics/version.ts';
import type { EstimateResult } from '#server/physics/estimate.ts';
import type { Integral as Computed } from '#server/physics/observables/integrals.ts';
import { warningsOf } from '#server/physics/warnings.ts';
import { AnswerUnits, errorOf, finite } from './answer-units.ts';
import { presentDifferential } from './present-differential.ts';
import { presentGoldenRule } from './present-golden-rule.ts';
import { askedAngles } from './to-angles.ts';

const NOT_YET: Record<Exclude<Method, 'born1'>, string> = {
  born2: 'The second Born amplitude is not part of this version; first order (born1) is.',
  eikonal: 'The eikonal amplitude is not part of this version; first order (born1) is.',
  partialWaves: 'Partial waves are not part of this version; first order (born1) is.',
};

function integralOf(integral: Computed, units: AnswerUnits): Integral {
  if ('divergent' in integral) return { divergent: true, reason: integral.divergent };
  const value = units.areaOf(integral.value);
  return { value, unit: units.area, ...errorOf(value, units.areaOf(integral.error)) };
}

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

function methodsOf(
  { firstBorn }: EstimateResult,
  request: EstimateRequest,
  units: AnswerUnits,
): Estimate['methods'] {
  const methods: Estimate['methods'] = {};
  for (const method of request.methods) {
    if (method !== 'born1') methods[method] = { unavailable: true, reason: NOT_YET[method] };
    else if (firstBorn && 'unavailable' in firstBorn) {
      methods.born1 = { unavailable: true, reason: firstBorn.unavailable };
    } else if (firstBorn) {
      const { differential, integrals } = firstBorn;
      methods.born1 = {
        differential: presentDifferential(differential, askedAngles(request).values, units),
        elastic: integralOf(integrals.elastic, units),
        absorption: integralOf(integrals.absorption, units),
        total: integralOf(integrals.total, units),
        momentumTransfer: integralOf(integrals.momentumTransfer, units),
        viscosity: integralOf(integrals.viscosity, units),
      };
    }
  }
  return methods;
}

function validityOf({ assessment }: EstimateResult): Estimate['validity'] {
  const { verdict, criteria, reason } = assessment;
  return {
    verdict,
    basis: 'criteria',
    ...(reason !== null && { reason }),
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
    methods: methodsOf(result, request, units),
    goldenRule: presentGoldenRule(result, goldenRuleAngle(result, request, units), units),
    validity: validityOf(result),
    warnings: warningsOf(result),
    units: { length, area, energy, angle },
    frame: result.problem.frame,
  };
}
