import type { PlannedDetector, RunPlan, RunPlanRequest } from '#shared/contracts/run-plans.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { fromInternal, toInternal } from '#shared/units/quantity.ts';
import { AnswerUnits, finite } from '#server/modules/estimates/answer-units.ts';
import { beamPower } from '#server/physics/counting/beam.ts';
import { planWarnings } from '#server/physics/plan-warnings.ts';
import type { RunPlanResult } from '#server/physics/run-plan.ts';
import { ENGINE } from '#server/physics/version.ts';
import { defaultWarnings } from './default-warnings.ts';
import { presentDetector } from './present-detector.ts';

/** 1/angstrom² in 1/cm². */
const PER_CM2 = 1e16;
/** Eight hours, s. */
const SHIFT = 28_800;
const MOST_SHIFTS = 1e9;
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

/** Positions in turn, by angle, each with its overhead; shifts are counted through. */
function runSheetOf({ detectors }: RunPlanResult, request: RunPlanRequest): RunPlan['runSheet'] {
  const { setupTime, shift } = request.aim ?? {};
  const setup = setupTime ? toInternal(setupTime, 'time') : 0;
  const length = shift ? toInternal(shift, 'time') : SHIFT;
  const known = detectors.flatMap(({ detector, times }) => (times ? [{ detector, times }] : []));
  if (known.length < detectors.length) return because(NO_TIME);
  known.sort((a, b) => a.detector.angle - b.detector.angle);
  let clock = 0;
  const positions = known.map(({ detector, times }) => {
    const start = clock;
    clock += setup + times.signal + times.blank;
    return {
      name: detector.name,
      angle: detector.angle,
      start: seconds(start),
      setup: seconds(setup),
      signal: seconds(times.signal),
      blank: seconds(times.blank),
      shift: Math.floor(start / length) + 1,
    };
  });
  if (!(clock / length < MOST_SHIFTS)) {
    return because('The run takes longer than shifts can be counted.');
  }
  return {
    positions,
    total: seconds(clock),
    shifts: Math.ceil(clock / length),
    shift: seconds(length),
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
    runSheet: runSheetOf(result, request),
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
