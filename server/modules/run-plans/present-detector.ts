import type { PlannedDetector, RunPlanRequest } from '#shared/contracts/run-plans.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { fromInternal } from '#shared/units/quantity.ts';
import type { AnswerUnits } from '#server/modules/estimates/answer-units.ts';
import { finite } from '#server/modules/estimates/answer-units.ts';
import type { Dcs } from '#server/physics/counting/curve.ts';
import { neededFor } from '#server/physics/counting/needed.ts';
import { characteristicLimits } from '#server/physics/counting/statistics/iso11929.ts';
import { currieLimits } from '#server/physics/counting/statistics/currie.ts';
import type { Blank } from '#server/physics/counting/statistics/currie.ts';
import { recordedOf } from '#server/physics/counting/times.ts';
import {
  expandedUncertainty,
  ratioUncertainty,
} from '#server/physics/counting/uncertainty-lines.ts';
import type { PlannedDetector as Planned } from '#server/physics/planned-detector.ts';
import { silence } from '#server/physics/planned-detector.ts';
import type { RunPlanResult } from '#server/physics/run-plan.ts';

const PER_CM2 = 1e16;
const COVERAGE = 0.95;
const DEGREE = Math.PI / 180;
const because = (reason: string) => ({ unavailable: true as const, reason });
const perSecond = (value: number): Quantity => ({ value: finite(value), unit: '1/s' });
const seconds = (value: number): Quantity => ({ value: finite(value), unit: 's' });
const perArea = (value: number): Quantity => ({ value: finite(value * PER_CM2), unit: '1/cm2' });
const AT_ITS_LIMIT =
  'no current, thickness or solid angle reaches this precision in this time: the counter is at its largest rate, or the background grows alike.';
/** A ratio of two numbers of which the second may be nothing. */
const ratio = (a: number, b: number) => (b > 0 ? finite(a / b) : 1);

function dcsOf(dcs: Dcs | null, units: AnswerUnits) {
  if (dcs === null) return null;
  const relativeError = dcs.value > 0 ? dcs.error / dcs.value : 0;
  return { ...units.dcsQuantity(dcs.value), relativeError: finite(relativeError) };
}

function factorsOf(
  { detector, averages }: Planned,
  { plan }: RunPlanResult,
  units: AnswerUnits,
): PlannedDetector['factors'] {
  const { beam, target } = plan;
  const { dcs } = averages.point;
  return [
    { name: 'beamRate', ...perSecond(beam.rate) },
    { name: 'arealDensity', ...perArea(target.scatterers) },
    ...(target.tilt === 0
      ? []
      : [{ name: 'slant' as const, value: 1 / Math.cos(target.tilt), unit: '1' }]),
    ...(dcs === null ? [] : [{ name: 'dcs' as const, ...units.dcsQuantity(dcs.value) }]),
    { name: 'solidAngle', value: detector.solidAngle, unit: 'sr' },
    { name: 'efficiency', value: detector.efficiency, unit: '1' },
  ];
}

type Limits = Pick<
  PlannedDetector,
  'decisionThreshold' | 'detectionLimit' | 'currie' | 'timeForPrecision' | 'expectedCounts'
>;

/** Characteristic limits of the net rate for the planned times. */
function limitsOf(planned: Planned): Limits {
  const { times, rates } = planned;
  if (times === null) {
    const none = because(silence(planned));
    return { timeForPrecision: none, decisionThreshold: none, detectionLimit: none };
  }
  const { gross, blank } = recordedOf(rates);
  const { decisionThreshold, detectionLimit } = characteristicLimits({
    background: blank,
    grossTime: times.signal,
    blankTime: times.blank,
    factor: 1,
    factorUncertainty: 0,
  });
  const currie = (variant: Blank) => {
    const { critical, detection } = currieLimits(blank * times.signal, variant);
    return {
      decisionThreshold: perSecond(critical / times.signal),
      detectionLimit: perSecond(detection / times.signal),
    };
  };
  return {
    timeForPrecision: {
      signal: seconds(times.signal),
      blank: seconds(times.blank),
      total: seconds(times.signal + times.blank),
    },
    expectedCounts: {
      gross: finite(gross * times.signal),
      blank: finite(blank * times.blank),
    },
    decisionThreshold: perSecond(decisionThreshold),
    detectionLimit:
      detectionLimit === null ? because('no limit exists') : perSecond(detectionLimit),
    currie: { paired: currie('paired'), wellKnown: currie('wellKnown') },
  };
}

/** Time after which the inputs outweigh counting: the time for a precision equal to them. */
function usefulTimeOf(
  { times, combined }: Planned,
  precision: number,
): PlannedDetector['usefulTime'] {
  if (!(combined > 0)) return because('No uncertainties of the inputs are given.');
  if (times === null) return because('There is no rate to plan with.');
  return seconds((times.signal + times.blank) * (precision / combined) ** 2);
}

function neededOf(
  planned: Planned,
  { plan }: RunPlanResult,
  request: RunPlanRequest,
): Pick<PlannedDetector, 'needed'> {
  const { beamTime, precision } = plan.aim;
  if (beamTime === null) return {};
  const { rates, detector, times } = planned;
  if (times === null) return { needed: because(silence(planned)) };
  const factor = neededFor(rates, precision, beamTime);
  if (factor === null) return { needed: because(AT_ITS_LIMIT) };
  // Other elements of the target scatter with the beam, as its own background does.
  const growing = rates.background - (detector.background - detector.beamBackground);
  const byCurrent = neededFor(rates, precision, beamTime, growing);
  const { current } = request.beam;
  const solidAngle = detector.solidAngle * factor;
  return {
    needed: {
      trueRate: perSecond(rates.signal * factor),
      factor: finite(factor),
      factorOfCurrent: byCurrent === null ? because(AT_ITS_LIMIT) : finite(byCurrent),
      ...(current &&
        byCurrent !== null && {
          current: { value: finite(current.value * byCurrent), unit: current.unit },
        }),
      particlesPerSecond: perSecond(plan.beam.rate * (byCurrent ?? factor)),
      arealDensity: perArea(plan.target.scatterers * factor),
      solidAngle:
        solidAngle <= 4 * Math.PI ? solidAngle : because('more than the whole sphere is needed'),
      time: seconds(times.signal + times.blank),
    },
  };
}

/** Quarters of a decade from a hundredth of the planned current to ten times it. */
const FACTORS = Array.from({ length: 13 }, (_, i) => 10 ** ((i - 8) / 4));

/** Recorded rates against the current: the signal and what the beam brings grow with it, the rest of the background does not. */
function rateTableOf(
  { rates, detector }: Planned,
  { plan }: RunPlanResult,
): NonNullable<PlannedDetector['rateAgainstCurrent']> {
  // Other elements of the target scatter with the beam.
  const growing = rates.background - (detector.background - detector.beamBackground);
  return FACTORS.map((factor) => {
    const changed = {
      ...rates,
      signal: rates.signal * factor,
      background: rates.background + growing * (factor - 1),
    };
    const all = changed.signal + changed.background;
    const { gross } = recordedOf(changed);
    return {
      factor,
      particlesPerSecond: finite(plan.beam.rate * factor),
      observedRate: finite(gross),
      deadTimeFraction: all > 0 ? Math.max(0, 1 - gross / all) : 0,
    };
  });
}

function sameAngleOf(
  { sameAngle }: Planned,
  { plan }: RunPlanResult,
  units: AnswerUnits,
): PlannedDetector['sameAngle'] {
  const { scatterer } = plan.target;
  const own = sameAngle.find(
    (one) => one.scatterer === scatterer || one.scatterer.split('-')[0] === scatterer,
  );
  return sameAngle.map(({ scatterer: name, energy }) => ({
    scatterer: name,
    energy: energy === null ? null : units.energyQuantity(energy),
    separation:
      energy === null || own?.energy === undefined || own.energy === null || own.energy === 0
        ? null
        : energy / own.energy - 1,
  }));
}

function expandedOf({ lines }: Planned, precision: number): PlannedDetector['expanded'] {
  const { freedom, coverageFactor, expanded } = expandedUncertainty(lines, precision, COVERAGE);
  return {
    coverage: COVERAGE,
    freedom: freedom < Infinity ? freedom : null,
    coverageFactor,
    relative: finite(expanded),
  };
}

function ofRatio(
  planned: Planned,
  { plan, detectors }: RunPlanResult,
): Pick<PlannedDetector, 'combinedOfRatio'> {
  const monitor = plan.monitor === null ? undefined : detectors[plan.monitor];
  if (!monitor || monitor === planned) return {};
  return { combinedOfRatio: ratioUncertainty(planned.lines, monitor.lines) };
}

/** One detector of a plan in its units. */
export function presentDetector(
  planned: Planned,
  result: RunPlanResult,
  request: RunPlanRequest,
  units: AnswerUnits,
): PlannedDetector {
  const { detector, averages, product, rates, observed, combined } = planned;
  const { point, acceptance, averaged, attenuation } = averages;
  const { precision } = result.plan.aim;
  const reason = averaged === null ? silence(planned) : point.reason;
  const { background, signal } = rates;
  return {
    name: detector.name,
    angle: detector.angle,
    solidAngle: detector.solidAngle,
    halfAngle: fromInternal(detector.cone.halfAngle, 'deg', 'angle').value,
    averagedDcs: dcsOf(averaged, units),
    pointDcs: dcsOf(point.dcs, units),
    ...(reason !== null && { reason }),
    averaging: {
      acceptance: ratio(acceptance?.value ?? 1, point.dcs?.value ?? 0),
      energies: ratio(averaged?.value ?? 1, acceptance?.value ?? 0),
      attenuation: finite(attenuation),
    },
    factors: factorsOf(planned, result, units),
    product: product === null ? null : perSecond(product),
    trueRate: perSecond(signal),
    observedRate: perSecond(observed),
    deadTimeFraction: finite(planned.deadTimeFraction),
    instantaneousRate: perSecond((signal + background) / rates.dutyFactor),
    backgroundRate: perSecond(background),
    contributions: planned.contributions.map(({ scatterer, rate }) => ({
      scatterer,
      rate: perSecond(rate),
    })),
    ...limitsOf(planned),
    uncertaintyBudget: planned.lines.map((line) => ({
      ...line,
      sensitivity: finite(line.sensitivity),
      freedom: line.freedom < Infinity ? line.freedom : null,
    })),
    combined: finite(combined),
    combinedWithCounting: finite(Math.hypot(combined, precision)),
    expanded: expandedOf(planned, precision),
    ...ofRatio(planned, result),
    usefulTime: usefulTimeOf(planned, precision),
    angleSensitivity: planned.angleSlope === null ? null : finite(planned.angleSlope * DEGREE),
    sameAngle: sameAngleOf(planned, result, units),
    ...neededOf(planned, result, request),
    ...(request.rateTable === true && { rateAgainstCurrent: rateTableOf(planned, result) }),
  };
}
