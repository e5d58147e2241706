import { DomainError } from '#shared/errors.ts';
import { beyondFirstOrder } from './beyond-first-order.ts';
import type { Curve, Dcs, LabDcs } from './counting/curve.ts';
import { beyondAmplitude, scalesOf } from './problem-scales.ts';
import type { ScatteringAmplitude } from './methods/amplitude.ts';
import { firstBorn } from './methods/born1.ts';
import { cmRanges, elasticBetween } from './observables/between-angles.ts';
import { sampleCone } from './observables/cone-samples.ts';
import { crossSections } from './observables/cross-sections.ts';
import { cmPoint, labPoint, reasonAt } from './observables/differential.ts';
import type { DifferentialInput } from './observables/differential.ts';
import type { CrossSections } from './observables/integrals.ts';
import type { MethodName, Problem } from './problem.ts';

/** The cross section of a problem, as counting takes it. */
export interface CollisionCurve extends Curve {
  problem: Problem;
  input: DifferentialInput;
  integrals: () => CrossSections;
}

const hasTail = ({ tail }: ScatteringAmplitude) => tail.re !== 0 || tail.im !== 0;

function refuse(reason: string): never {
  throw new DomainError('invalidInput', reason, { errors: [{ path: '/method', message: reason }] });
}

/** What the method makes of the problem: the input of its observables, and its integrals when they are asked for. */
function methodOf(
  problem: Problem,
  method: MethodName,
): Pick<CollisionCurve, 'input' | 'integrals'> {
  const { terms, collision, exchangeSpin } = problem;
  const { k } = collision;
  const scales = scalesOf(problem);
  const noBorn = terms.find((term) => term.noBorn !== undefined)?.noBorn;
  const withBorn = terms.filter((term) => term.noBorn === undefined);
  const born = firstBorn(withBorn, collision.twoMuOverHbar2);
  if (method === 'born1') {
    if (noBorn !== undefined) refuse(noBorn);
    const input = { born, k, exchangeSpin, ...beyondAmplitude(problem) };
    const samples = () => (hasTail(born) ? null : sampleCone((q) => born.shortRange(q), k, scales));
    return { input, integrals: () => crossSections({ ...input, scales, samples: samples() }) };
  }
  const alone = { ...problem, methods: [method], angles: [] };
  const found = beyondFirstOrder(alone, born, scales)[method];
  if (!found || 'unavailable' in found) refuse(found?.unavailable ?? 'This method is not known.');
  const { amplitude, integrals } = found;
  const input = { born: amplitude, k, exchangeSpin, flip: amplitude.flip };
  return { input, integrals: () => integrals };
}

function labOf(problem: Problem, input: DifferentialInput, thetaLab: number): LabDcs {
  const { branches, reason } = labPoint(input, problem.collision.frame, thetaLab);
  if (reason !== null) return { dcs: null, reason, isOutOfReach: true };
  let sum: Dcs = { value: 0, error: 0 };
  for (const branch of branches) {
    const { dcs } = branch;
    if (dcs === null) return { dcs: null, reason: reasonAt(branch), isOutOfReach: false };
    sum = { value: sum.value + dcs.value, error: sum.error + dcs.error };
  }
  return { dcs: sum, reason: null, isOutOfReach: false };
}

/**
 * The cross section of an estimate as a function of angle, in both frames: the amplitude, observables and factors of its own curve.
 *
 * @param problem in internal units
 * @returns angstrom²/sr with bounds
 * @throws DomainError('invalidInput'), at /method, where the method does not allow the interaction
 */
export function collisionCurve(problem: Problem, method: MethodName): CollisionCurve {
  const { collision, exchangeSpin } = problem;
  const { input, integrals } = methodOf(problem, method);
  const diverges = hasTail(input.born);
  return {
    problem,
    input,
    integrals,
    frame: collision.frame,
    forwardDiverges: diverges,
    backwardDiverges: diverges && exchangeSpin !== null,
    cm: (thetaCm) => cmPoint(input, thetaCm).dcs,
    lab: (thetaLab) => labOf(problem, input, thetaLab),
  };
}

/** What takes a particle out of the beam, angstrom²: all collisions, or where their number diverges those beyond an angle of the lab. */
export interface Removal {
  value: number;
  /** rad in the lab; null where everything counts. */
  beyond: number | null;
}

/**
 * Elastic scattering and absorption together.
 *
 * @param beyond angle of the lab, rad, above 0, that counts where the total diverges
 */
export function removalOf(curve: CollisionCurve, beyond: number): Removal {
  const { problem, input } = curve;
  const { collision, exchangeSpin } = problem;
  const { total, absorption } = curve.integrals();
  if ('value' in total) return { value: total.value, beyond: null };
  const removed = 'value' in absorption ? absorption.value : 0;
  const ranges = cmRanges(beyond, Math.PI, collision.frame).map((range) =>
    exchangeSpin === null ? range : { ...range, to: Math.min(range.to, Math.PI - range.from) },
  );
  const between = elasticBetween((theta) => cmPoint(input, theta), ranges, {
    k: collision.k,
    scales: scalesOf(problem),
    floor: input.born.floor,
  });
  return { value: between.value + removed, beyond };
}
