import type { Unavailable } from './methods/amplitude.ts';
import type { FirstBorn } from './methods/born1.ts';
import { firstBorn } from './methods/born1.ts';
import { labToCm } from './kinematics/frames.ts';
import type { Assessment } from './observables/assess.ts';
import { assess, unassessed } from './observables/assess.ts';
import type { Beyond } from './beyond-first-order.ts';
import { beyondFirstOrder } from './beyond-first-order.ts';
import type { Deviations } from './observables/deviation.ts';
import { deviations } from './observables/deviation.ts';
import type { ConeSamples, Scales } from './observables/cone-samples.ts';
import { sampleCone } from './observables/cone-samples.ts';
import type { CrossSections } from './observables/integrals.ts';
import { crossSections } from './observables/cross-sections.ts';
import type { Curve } from './observables/differential.ts';
import { curveOf } from './observables/differential.ts';
import type { PotentialCurve } from './observables/potential-curve.ts';
import { potentialCurve } from './observables/potential-curve.ts';
import type { GoldenRuleSheet } from './golden-rule-sheet.ts';
import { goldenRuleSheet } from './golden-rule-sheet.ts';
import { beyondAmplitude, scalesOf } from './problem-scales.ts';
import type { Problem } from './problem.ts';

export interface FirstBornResult {
  differential: Curve;
  integrals: CrossSections;
}

/** What the engine answers, in internal units throughout. */
export interface EstimateResult {
  problem: Problem;
  potential: PotentialCurve;
  /** Null where it was not asked for. */
  firstBorn: FirstBornResult | Unavailable | null;
  /** The other methods that were asked for. */
  beyond: Beyond;
  goldenRule: GoldenRuleSheet | Unavailable;
  goldenRuleTheta: number;
  assessment: Assessment;
}

/** The middle angle in the centre of mass; a lab angle by its forward branch. */
function middleAngle({ angles, frame, collision }: Problem): number {
  const middle = angles[(angles.length - 1) >> 1] ?? Math.PI / 2;
  if (frame === 'cm') return middle;
  return labToCm(middle, collision.frame)[0]?.thetaCm ?? middle;
}

/** The first-order curve of a problem, in the frame it is asked in. */
export function differential(problem: Problem, born: FirstBorn): Curve {
  const { angles, frame, exchangeSpin, collision } = problem;
  const input = { born, k: collision.k, exchangeSpin, ...beyondAmplitude(problem) };
  return curveOf(input, angles, frame, collision.frame);
}

/** An interaction without first order (a hard sphere): what the exact curve, the potential and the kinematics still say. */
function withoutFirstOrder(problem: Problem, reason: string): EstimateResult {
  const { terms, collision } = problem;
  const rest = firstBorn(
    terms.filter(({ noBorn }) => noBorn === undefined),
    collision.twoMuOverHbar2,
  );
  return {
    problem,
    potential: potentialCurve(terms, collision.wavelength),
    firstBorn: problem.methods.includes('born1') ? { unavailable: reason } : null,
    beyond: beyondFirstOrder(problem, rest, scalesOf(problem)),
    goldenRule: { unavailable: reason },
    goldenRuleTheta: problem.goldenRule.theta ?? middleAngle(problem),
    assessment: unassessed(reason),
  };
}

/**
 * One estimate: amplitudes, observables, golden-rule sheet and verdict of a problem, by pure composition.
 *
 * @param problem in internal units
 * @returns everything in internal units, each number with its error
 * @throws DomainError('tooMuchWork') where the input cannot be computed to a millionth of itself or within reason,
 *   DomainError('invalidInput') for a box that leaves double precision
 */
export function estimate(problem: Problem): EstimateResult {
  const { terms, collision, thresholds } = problem;
  const { k, twoMuOverHbar2 } = collision;
  const reason = terms.find((term) => term.noBorn !== undefined)?.noBorn;
  if (reason !== undefined) return withoutFirstOrder(problem, reason);
  const born = firstBorn(terms, twoMuOverHbar2);
  const scales = scalesOf(problem);
  const hasTail = born.tail.re !== 0 || born.tail.im !== 0;
  const samples = hasTail ? null : sampleCone((q) => born.shortRange(q), k, scales);
  const theta = problem.goldenRule.theta ?? middleAngle(problem);
  const beyond = beyondFirstOrder(problem, born, scales);
  const off = deviationsOf(problem, born, scales, samples, beyond);
  return {
    problem,
    potential: potentialCurve(terms, collision.wavelength),
    firstBorn: problem.methods.includes('born1')
      ? curveAndIntegrals(problem, born, scales, samples)
      : null,
    beyond,
    goldenRule: goldenRuleSheet(problem, born, theta, scales, samples),
    goldenRuleTheta: theta,
    assessment: assess({
      terms,
      born,
      k,
      twoMuOverHbar2,
      scales,
      samples,
      deviations: off,
      thresholds,
    }),
  };
}

/** First order against the exact curve, amplitude against amplitude; null where there is no exact one. */
function deviationsOf(
  { collision, exchangeSpin }: Problem,
  born: FirstBorn,
  scales: Scales,
  samples: ConeSamples | null,
  { partialWaves: exact }: Beyond,
): Deviations | null {
  if (!exact || 'unavailable' in exact) return null;
  const { k } = collision;
  const plain = crossSections({ born, k, scales, samples, exchangeSpin });
  return deviations({
    born,
    exact: exact.amplitude,
    k,
    scales,
    exchangeSpin,
    elastic: { born: plain.elastic, exact: exact.integrals.elastic },
  });
}

function curveAndIntegrals(
  problem: Problem,
  born: FirstBorn,
  scales: Scales,
  samples: ConeSamples | null,
): FirstBornResult {
  const { collision, exchangeSpin } = problem;
  return {
    differential: differential(problem, born),
    integrals: crossSections({
      born,
      k: collision.k,
      scales,
      samples,
      exchangeSpin,
      ...beyondAmplitude(problem),
    }),
  };
}
