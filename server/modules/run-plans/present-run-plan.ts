import type { PlannedDetector, RunPlan, RunPlanRequest } from '#shared/contracts/run-plans.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { fromInternal } from '#shared/units/quantity.ts';
import { AnswerUnits, finite } from '#server/modules/estimates/answer-units.ts';
import { beamPower } from '#server/physics/counting/beam.ts';
import { planWarnings } from '#server/physics/plan-warnings.ts';
import type { RunPlanResult } from '#server/physics/run-plan.ts';
import { ENGINE } from '#server/physics/version.ts';
import { defaultWarnings } from './default-warnings.ts';
import { presentDetector } from './present-detector.ts';

/** 1/angstrom² in 1/cm². */
const PER_CM2 = 1e16;
const because = (reason: string) => ({ unavailable: true as const, reason });

const perSecond = (value: number): Quantity => ({ value: finite(value), unit: '1/s' });
const seconds = (value: number): Quantity => ({ value: finite(value), unit: 's' });
const perArea = (value: number): Quantity => ({
  value: finite(value * PER_CM2),
  unit: '1/cm2',
});
const watts = (value: number): Quantity => ({ value: finite(value), unit: 'J/s' });

const NO_TIME = 'At least one detector has no rate to plan with; see its reason.';

function targetOf({
  plan,
  collisions,
  collisionsBeyond,
  checks,
}: RunPlanResult): RunPlan['target'] {
  const { beam, problem } = plan;
  const { multipleScattering, loss, radiationLengths } = checks;
  const lost = 'lossTo' in loss ? loss.lossTo(1) : null;
  return {
    collisions: finite(collisions),
    ...(collisionsBeyond !== null && {
      collisionsBeyond: fromInternal(collisionsBeyond, 'deg', 'angle').value,
    }),
    ...(radiationLengths !== null && { radiationLengths: finite(radiationLengths) }),
    multipleScattering:
      'angle' in multipleScattering
        ? fromInternal(multipleScattering.angle, 'mrad', 'angle')
        : because(multipleScattering.none),
    energyLoss: 'none' in loss ? because(loss.none) : { value: finite(lost ?? 0), unit: 'eV' },
    beamPower: watts(beamPower(beam.rate, problem.energy)),
    depositedPower: 'none' in loss ? because(loss.none) : watts(beamPower(beam.rate, lost ?? 0)),
  };
}

function equalPrecisionOf({ equalPrecision, plan }: RunPlanResult): RunPlan['equalPrecision'] {
  if (!equalPrecision) return because(NO_TIME);
  return {
    relativePrecision: finite(equalPrecision.precision),
    shares: equalPrecision.times.map(({ signal, blank }, i) => ({
      name: plan.detectors[i]?.name ?? '',
      signal: seconds(signal),
      blank: seconds(blank),
    })),
  };
}

/** The answer in units of counting; cross sections in the unit of area of the estimate. Every number is finite. */
export function presentRunPlan(result: RunPlanResult, request: RunPlanRequest): RunPlan {
  const { plan, totalTime, totalTimeInTurn, decision } = result;
  const { target, beam, aim } = plan;
  const units = new AnswerUnits(request.estimate);
  const time = (value: number | null) => (value === null ? because(NO_TIME) : seconds(value));
  const detectors: PlannedDetector[] = result.detectors.map((one) =>
    presentDetector(one, result, request, units),
  );
  return {
    engine: { ...ENGINE },
    method: plan.method,
    arealDensity: perArea(target.scatterers),
    scatterer: target.scatterer,
    beamRate: perSecond(beam.rate),
    atoms: target.atoms.map(({ name, arealDensity }) => ({
      name,
      arealDensity: perArea(arealDensity),
    })),
    target: targetOf(result),
    detectors,
    totalTime: time(totalTime),
    totalTimeInTurn: time(totalTimeInTurn),
    ...(aim.beamTime !== null && { equalPrecision: equalPrecisionOf(result) }),
    aim: {
      relativePrecision: aim.precision,
      ...(aim.beamTime !== null && { beamTime: seconds(aim.beamTime) }),
    },
    verdict: decision.verdict,
    decidedBy: {
      factor: decision.factor,
      ...(decision.detector !== null && { detector: decision.detector }),
      message: decision.message,
    },
    warnings: [...defaultWarnings(request), ...planWarnings(result)],
  };
}
