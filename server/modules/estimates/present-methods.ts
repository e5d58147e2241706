import type {
  ComputedMethod,
  Condition,
  Estimate,
  EstimateRequest,
  Integral,
  PhaseShift,
} from '#shared/contracts/estimates.ts';
import type { BeyondResult } from '#server/physics/beyond-first-order.ts';
import type { EstimateResult, FirstBornResult } from '#server/physics/estimate.ts';
import type { Condition as Checked, LowEnergy, Wave } from '#server/physics/methods/amplitude.ts';
import type { CrossSections, Integral as Computed } from '#server/physics/observables/integrals.ts';
import type { Curve } from '#server/physics/observables/differential.ts';
import type { AnswerUnits } from './answer-units.ts';
import { errorOf, finite } from './answer-units.ts';
import { presentDifferential } from './present-differential.ts';
import { askedAngles } from './to-angles.ts';

function integralOf(integral: Computed, units: AnswerUnits): Integral {
  if ('divergent' in integral) return { divergent: true, reason: integral.divergent };
  const value = units.areaOf(integral.value);
  return { value, unit: units.area, ...errorOf(value, units.areaOf(integral.error)) };
}

function curveAndIntegrals(
  { differential, integrals }: { differential: Curve; integrals: CrossSections },
  request: EstimateRequest,
  units: AnswerUnits,
): ComputedMethod {
  return {
    differential: presentDifferential(differential, askedAngles(request).values, units),
    elastic: integralOf(integrals.elastic, units),
    absorption: integralOf(integrals.absorption, units),
    total: integralOf(integrals.total, units),
    momentumTransfer: integralOf(integrals.momentumTransfer, units),
    viscosity: integralOf(integrals.viscosity, units),
  };
}

/** A bound that is no finite number (a division by nothing) is left out with its condition. */
function conditionsOf(conditions: readonly Checked[]): Condition[] {
  return conditions
    .filter(({ value }) => Number.isFinite(value))
    .map((condition) => ({ ...condition }));
}

/** `error` bounds that of S/2; the phase of a small S is known the less for it. */
function phaseOf({ l, j, delta, eta, error, born }: Wave): PhaseShift {
  return {
    l,
    ...(j !== null && { j }),
    delta: finite(delta),
    eta: finite(eta),
    absoluteError: Math.min(Math.PI / 2, error / Math.max(eta, Number.MIN_VALUE)),
    ...(born !== null && Number.isFinite(born) && { born }),
  };
}

function lowEnergyOf(found: LowEnergy, units: AnswerUnits) {
  const lengthOf = (computed: LowEnergy['effectiveRange']) =>
    computed && {
      ...units.lengthQuantity(computed.value),
      absoluteError: units.lengthOf(computed.error),
    };
  return {
    scatteringLength: lengthOf(found.scatteringLength),
    effectiveRange: lengthOf(found.effectiveRange),
    boundStates: found.boundStates,
    remark: found.remark,
  };
}

function beyondOf(
  result: BeyondResult,
  request: EstimateRequest,
  units: AnswerUnits,
): ComputedMethod {
  const { conditions, opticalResidual, waves } = result;
  return {
    ...curveAndIntegrals(result, request, units),
    conditions: conditionsOf(conditions),
    ...(opticalResidual !== null && { opticalTheorem: { residual: finite(opticalResidual) } }),
    ...(waves && {
      phaseShifts: waves.list.map(phaseOf),
      lMax: waves.lMax,
      lowEnergy: lowEnergyOf(waves.lowEnergy, units),
    }),
  };
}

const isBeyond = (found: FirstBornResult | BeyondResult): found is BeyondResult =>
  'conditions' in found;

/** Every method that was asked for, in the order it was asked, or why there is none. */
export function presentMethods(
  { firstBorn, beyond }: EstimateResult,
  request: EstimateRequest,
  units: AnswerUnits,
): Estimate['methods'] {
  const methods: Estimate['methods'] = {};
  for (const method of request.methods) {
    const found = method === 'born1' ? firstBorn : beyond[method];
    if (!found) continue;
    if ('unavailable' in found) methods[method] = { unavailable: true, reason: found.unavailable };
    else if (isBeyond(found)) methods[method] = beyondOf(found, request, units);
    else methods[method] = curveAndIntegrals(found, request, units);
  }
  return methods;
}
