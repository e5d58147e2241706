import type { Unavailable } from './methods/amplitude.ts';
import type { FirstBorn } from './methods/born1.ts';
import { firstBorn } from './methods/born1.ts';
import { transform, transformWithoutTail } from './methods/transform.ts';
import { exchangeDcs } from './methods/exchange.ts';
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
import type { GoldenRule } from './observables/golden-rule.ts';
import { goldenRule } from './observables/golden-rule.ts';
import type { PotentialCurve } from './observables/potential-curve.ts';
import { potentialCurve } from './observables/potential-curve.ts';
import type { Window } from './observables/window.ts';
import { goldenRuleWindow } from './observables/window.ts';
import { finalStates } from './kinematics/final-states.ts';
import { leptonFactor } from './lepton-factor.ts';
import type { Problem } from './problem.ts';

/** A factor that stands after the golden rule, and the cross section with it and all before. */
export interface FactorAfter {
  name: 'exchange' | 'spin' | 'mckinleyFeshbach' | 'incoherent';
  dcs: number;
}

export interface GoldenRuleSheet extends GoldenRule {
  window: Window;
  /** The cross section after each further factor, angstrom²/sr, one upon the other. */
  factorsAfter: FactorAfter[];
}

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

export const RANGES_IN_A_BOX = 1000;
const FORWARD: Unavailable = {
  unavailable:
    'The matrix element of a 1/r potential diverges in the forward direction; choose an angle above zero.',
};

const isActive = ({ strength }: { strength: { re: number; im: number } }) =>
  strength.re !== 0 || strength.im !== 0;

/** Lengths that decide how finely amplitudes are sampled. */
export function scalesOf({ terms }: Pick<Problem, 'terms'>): Scales {
  const active = terms.filter(isActive);
  return {
    range: Math.max(0, ...active.map((term) => term.range ?? 0)),
    edge: Math.max(0, ...active.flatMap((term) => term.breakpoints)),
    terms: Math.max(1, active.length),
    kinks: active.flatMap((term) => term.kinks ?? []),
  };
}

/** The middle angle in the centre of mass; a lab angle by its forward branch. */
function middleAngle({ angles, frame, collision }: Problem): number {
  const middle = angles[(angles.length - 1) >> 1] ?? Math.PI / 2;
  if (frame === 'cm') return middle;
  return labToCm(middle, collision.frame)[0]?.thetaCm ?? middle;
}

/** What stands after the square of the amplitude. */
export function beyondAmplitude(problem: Problem) {
  const lepton = leptonFactor(problem);
  return {
    factor: lepton && (lepton.corrected ?? lepton.plain),
    incoherent: incoherentOf(problem),
  };
}

const incoherentOf = ({ terms }: Problem): number =>
  terms.reduce((sum, { incoherent = 0 }) => sum + incoherent, 0);

/** The first-order curve of a problem, in the frame it is asked in. */
export function differential(problem: Problem, born: FirstBorn): Curve {
  const { angles, frame, exchangeSpin, collision } = problem;
  const input = { born, k: collision.k, exchangeSpin, ...beyondAmplitude(problem) };
  return curveOf(input, angles, frame, collision.frame);
}

function exchangedDcs(problem: Problem, born: FirstBorn, theta: number): number | null {
  if (problem.exchangeSpin === null) return null;
  const { k } = problem.collision;
  const direct = born.amplitude(2 * k * Math.sin(theta / 2));
  const exchanged = born.amplitude(theta === Math.PI ? 0 : 2 * k * Math.cos(theta / 2));
  if (direct === null || exchanged === null) return null;
  return exchangeDcs(direct, exchanged, problem.exchangeSpin).value;
}

/** What the curve holds beyond the chain, factor by factor. */
function factorsAfter(
  problem: Problem,
  born: FirstBorn,
  theta: number,
  plain: number,
): FactorAfter[] {
  const exchanged = exchangedDcs(problem, born, theta);
  if (problem.exchangeSpin !== null) {
    return exchanged === null ? [] : [{ name: 'exchange', dcs: exchanged }];
  }
  const lepton = leptonFactor(problem);
  const found: FactorAfter[] = [];
  if (lepton) found.push({ name: 'spin', dcs: plain * lepton.plain(theta).value });
  if (lepton?.corrected) {
    found.push({ name: 'mckinleyFeshbach', dcs: plain * lepton.corrected(theta).value });
  }
  const incoherent = incoherentOf(problem);
  if (incoherent > 0) {
    found.push({ name: 'incoherent', dcs: (found.at(-1)?.dcs ?? plain) + incoherent });
  }
  return found;
}

function goldenRuleSheet(
  problem: Problem,
  born: FirstBorn,
  theta: number,
  { range }: Scales,
  samples: ConeSamples | null,
): GoldenRuleSheet | Unavailable {
  const { terms, collision, goldenRule: asked } = problem;
  const hasTail = born.tail.re !== 0 || born.tail.im !== 0;
  if (hasTail && theta === 0) return FORWARD;
  const box = asked.boxSide ?? (range > 0 ? RANGES_IN_A_BOX * range : asked.boxWithoutRange);
  const route = hasTail ? transform : transformWithoutTail;
  const sheet = goldenRule(terms, collision, theta, box, route);
  if (sheet === null) return FORWARD;
  const window = goldenRuleWindow({
    theta,
    k: collision.k,
    energyCm: collision.energyCm,
    finalState: finalStates(problem.projectile.mass, problem.target.mass, problem),
    strength: (q) => {
      const f = born.amplitude(q);
      return f === null ? null : f.re * f.re + f.im * f.im;
    },
    range,
    totalRate: samples === null ? null : 8 * Math.PI * samples.moments[0] * sheet.flux,
  });
  return { ...sheet, window, factorsAfter: factorsAfter(problem, born, theta, sheet.dcs) };
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
