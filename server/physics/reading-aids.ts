import { differential } from './estimate.ts';
import { scalesOf } from './problem-scales.ts';
import { chargeProductOf, leptonFactor } from './lepton-factor.ts';
import type { Unavailable } from './methods/amplitude.ts';
import { firstBorn } from './methods/born1.ts';
import type { CmRange } from './observables/between-angles.ts';
import { cmRanges, elasticBetween } from './observables/between-angles.ts';
import type { CmPoint, Curve } from './observables/differential.ts';
import { DIVERGENCES } from './observables/integrals.ts';
import type { Integral } from './observables/integrals.ts';
import type { Way } from './observables/kinematics-table.ts';
import { waysTo } from './observables/kinematics-table.ts';
import { coulomb } from './potentials/coulomb.ts';
import type { Problem } from './problem.ts';

/** What is asked beside an estimate; angles in rad, in the frame of the problem. */
export interface AidsAsked {
  angleRange?: { from: number; to: number };
  reference?: boolean;
  kinematics?: boolean;
}

export interface BetweenAngles {
  ranges: CmRange[];
  integral: Integral;
  /** From half of the lower angle, where the cross section grows without limit; null elsewhere. */
  fromHalf: { from: number; value: number } | null;
}

export interface PointCharges {
  kind: 'rutherford' | 'mott';
  chargeProduct: number;
  charges: 'interaction' | 'particles';
  reference: Curve;
  own: Curve;
}

export interface ReadingAids {
  elasticBetween?: BetweenAngles | Unavailable;
  reference?: PointCharges | Unavailable;
  kinematics?: Way[][];
}

const NO_CHARGES: Unavailable = {
  unavailable:
    'There is no point-charge cross section to compare with: projectile or target has no charge. Give the target its charge, or the term a chargeProduct.',
};

function noFirstOrder({ terms }: Problem): Unavailable | null {
  const reason = terms.find((term) => term.noBorn !== undefined)?.noBorn;
  return reason === undefined ? null : { unavailable: reason };
}

/** Z1 Z2 of the electrostatic terms, else that of the particles. */
function chargesOf(problem: Problem): Pick<PointCharges, 'chargeProduct' | 'charges'> {
  const ofTerms = chargeProductOf(problem);
  if (ofTerms !== 0) return { chargeProduct: ofTerms, charges: 'interaction' };
  const { projectile, target } = problem;
  return { chargeProduct: projectile.charge * target.charge, charges: 'particles' };
}

function pointCharges(problem: Problem): PointCharges | Unavailable {
  const refused = noFirstOrder(problem);
  if (refused) return refused;
  const { chargeProduct, charges } = chargesOf(problem);
  if (chargeProduct === 0) return NO_CHARGES;
  const { collision, projectile, target, terms } = problem;
  const term = coulomb.build(
    { chargeProduct },
    {
      twoMuOverHbar2: collision.twoMuOverHbar2,
      projectileCharge: projectile.charge,
      targetCharge: target.charge,
    },
  );
  const bare: Problem = { ...problem, terms: [term], corrections: [] };
  return {
    kind: leptonFactor(bare) === null ? 'rutherford' : 'mott',
    chargeProduct,
    charges,
    reference: differential(bare, firstBorn(bare.terms, collision.twoMuOverHbar2)),
    own: differential(problem, firstBorn(terms, collision.twoMuOverHbar2)),
  };
}

/** dσ/dΩ of the centre of mass, whatever frame the curve is shown in. */
function cmCurve(problem: Problem): {
  point: (theta: number) => CmPoint;
  born: ReturnType<typeof firstBorn>;
} {
  const born = firstBorn(problem.terms, problem.collision.twoMuOverHbar2);
  const point = (theta: number): CmPoint => {
    const found = differential({ ...problem, frame: 'cm', angles: [theta] }, born).points[0];
    if (!found || !('thetaCm' in found)) throw new Error('one angle has one point');
    return found;
  };
  return { point, born };
}

function betweenAngles(
  problem: Problem,
  { from, to }: { from: number; to: number },
): BetweenAngles | Unavailable {
  const refused = noFirstOrder(problem);
  if (refused) return refused;
  const { collision, exchangeSpin, frame } = problem;
  const { point, born } = cmCurve(problem);
  const rangesFrom = (lowest: number) =>
    cmRanges(lowest, to, frame === 'lab' ? collision.frame : null);
  const context = { k: collision.k, scales: scalesOf(problem), floor: born.floor };
  const ranges = rangesFrom(from);
  const hasTail = born.tail.re !== 0 || born.tail.im !== 0;
  const diverges = ranges.some(
    (range) => range.from === 0 || (exchangeSpin !== null && range.to >= Math.PI),
  );
  if (hasTail && diverges) {
    return { ranges, integral: { divergent: DIVERGENCES.elastic }, fromHalf: null };
  }
  const integral = elasticBetween(point, ranges, context);
  const grows = hasTail && from > 0 && ranges.length > 0;
  const half = grows ? elasticBetween(point, rangesFrom(from / 2), context).value : 0;
  return { ranges, integral, fromHalf: grows ? { from: from / 2, value: half } : null };
}

/**
 * What is asked beside an estimate, from the same amplitudes and the same kinematics.
 *
 * @param problem in internal units
 * @returns exactly what was asked for, each number with its error; reasons in words where there is none
 * @throws DomainError('tooMuchWork') where an integral is not known to a millionth of itself
 */
export function readingAids(problem: Problem, asked: AidsAsked): ReadingAids {
  const { angleRange, reference, kinematics } = asked;
  const { angles, frame, collision, energy } = problem;
  return {
    ...(angleRange && { elasticBetween: betweenAngles(problem, angleRange) }),
    ...(reference === true && { reference: pointCharges(problem) }),
    ...(kinematics === true && {
      kinematics: angles.map((theta) => waysTo(theta, frame, { frame: collision.frame, energy })),
    }),
  };
}
