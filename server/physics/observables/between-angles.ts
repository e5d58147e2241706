import type { Frame } from '#server/physics/kinematics/frames.ts';
import { labToCm } from '#server/physics/kinematics/frames.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { DomainError } from '#shared/errors.ts';
import type { Scales } from './cone-samples.ts';
import { coneEdges } from './cone-samples.ts';
import type { CmPoint } from './differential.ts';
import type { Computed } from './integrals.ts';

/** Angles of the centre of mass between which is integrated, rad, with the error each end carries. */
export interface CmRange {
  from: number;
  to: number;
  fromError: number;
  toError: number;
}

const PROBE = 2 ** -24;
const ANGLE_ROUNDING = 2 * UNIT_ROUNDOFF;
const MAX_EVALUATIONS = 60_000;
const SAMPLES = 9;

const end = (theta: number) => ({ theta, error: ANGLE_ROUNDING * theta });
type End = ReturnType<typeof end>;

/** A lab angle in the centre of mass by its forward or backward branch, with what its last digit does. */
function turned(thetaLab: number, frame: Frame, branch: 0 | 1): End | null {
  const here = labToCm(thetaLab, frame)[branch];
  if (!here) return null;
  const beside = labToCm(thetaLab * (1 - PROBE), frame)[branch] ?? here;
  const slope = Math.abs(here.thetaCm - beside.thetaCm) / PROBE;
  return { theta: here.thetaCm, error: slope * ANGLE_ROUNDING + 4 * UNIT_ROUNDOFF * here.thetaCm };
}

const between = (a: End, b: End): CmRange => ({
  from: a.theta,
  to: b.theta,
  fromError: a.error,
  toError: b.error,
});

/**
 * Centre-of-mass angles that lead between two angles of a frame.
 *
 * Formula: in the lab both ends are turned branch by branch; beyond the edge of a cone, cos(theta) = -1/rho, the two branches meet.
 *
 * @param from rad, 0 to pi
 * @param to rad, from to pi
 * @param frame null for angles of the centre of mass
 * @returns one range, two for a projectile heavier than its target, none outside its cone; the error of each end, rad
 */
export function cmRanges(from: number, to: number, frame: Frame | null): CmRange[] {
  if (frame === null || frame.rho === 0) return [between(end(from), end(to))];
  const first = turned(from, frame, 0);
  if (!first) return [];
  const straight: End = { theta: Math.PI, error: 0 };
  if (frame.rhoMinusOne <= 0) return [between(first, turned(to, frame, 0) ?? straight)];
  const last = turned(from, frame, 1) ?? straight;
  const [near, far] = [turned(to, frame, 0), turned(to, frame, 1)];
  if (!near || !far) return [between(first, last)];
  return [between(first, near), between(far, last)];
}

/** Edges that double in angle from the lower end, beside those the form asks for: a tail falls by sixteen from one to the next. */
function edgesOf({ from, to }: CmRange, k: number, scales: Scales): number[] {
  const edges = coneEdges(k, scales).map((t) => 2 * Math.asin(Math.min(1, t)));
  for (let theta = 2 * from; theta > 0 && theta < to; theta *= 2) edges.push(theta);
  for (let rest = 2 * (Math.PI - to); rest > 0 && rest < Math.PI - from; rest *= 2) {
    edges.push(Math.PI - rest);
  }
  return edges;
}

function refuseCoarse({ value, error }: Computed, floor: number): void {
  if (error <= Math.max(1e-6 * Math.abs(value), 4 * Math.PI * floor ** 2)) return;
  throw new DomainError(
    'tooMuchWork',
    'The cross section cannot be integrated to a millionth of itself between these angles: the product of wave number and range is too large. Lower the energy or the range, or choose narrower angles.',
  );
}

/**
 * Cross section of the rings between angles of the centre of mass, all azimuths.
 *
 * Formula: 2 pi ∫ dσ/dΩ sin(theta) dtheta.
 *
 * @param point dσ/dΩ at an angle, angstrom²/sr with a bound of its error
 * @param ranges rad; a range of no width adds nothing
 * @param k wave number, 1/angstrom
 * @param floor amplitudes below it are lost in rounding, angstrom
 * @returns angstrom², with a bound: two orders of the rule, errors of dσ/dΩ, roundings of the ends
 * @throws DomainError('tooMuchWork') where it is neither good to 1e-6 nor below the floor; RangeError where dσ/dΩ diverges inside
 *
 * Source: definition of the solid angle.
 */
export function elasticBetween(
  point: (thetaCm: number) => CmPoint,
  ranges: readonly CmRange[],
  { k, scales, floor }: { k: number; scales: Scales; floor: number },
): Computed {
  const dcs = (theta: number) => {
    const { dcs: found } = point(theta);
    if (found === null) throw new RangeError(`the cross section diverges at ${theta} rad`);
    return found;
  };
  const ring = (theta: number) => 2 * Math.PI * Math.sin(theta);
  let value = 0;
  let error = 0;
  for (const range of ranges) {
    const { from, to, fromError, toError } = range;
    if (!(to > from)) continue;
    const breakpoints = edgesOf(range, k, scales);
    const common = { breakpoints, maxEvaluations: MAX_EVALUATIONS };
    const sum = integrate((theta) => ring(theta) * dcs(theta).value, from, to, {
      ...common,
      relative: 1e-13,
      noise: noiseOf(dcs, range),
    });
    const carried = integrate((theta) => ring(theta) * dcs(theta).error, from, to, {
      ...common,
      relative: 0.05,
    });
    value += sum.value;
    error += sum.error + carried.value + carried.error;
    for (const [theta, blur] of [
      [from, fromError],
      [to, toError],
    ] as const) {
      if (theta > 0 && blur > 0) error += ring(theta) * dcs(theta).value * blur;
    }
  }
  const computed = { value, error: error + 2 * UNIT_ROUNDOFF * value };
  refuseCoarse(computed, floor);
  return computed;
}

/** Relative error of the curve, by a few of its points: below it panels gain nothing by being cut. */
function noiseOf(dcs: (theta: number) => { value: number; error: number }, { from, to }: CmRange) {
  let size = 0;
  let error = 0;
  for (let i = 1; i <= SAMPLES; i++) {
    const found = dcs(from + ((to - from) * i) / (SAMPLES + 1));
    size += found.value;
    error += found.error;
  }
  return Math.min(1e-8, Math.max(1e-14, size > 0 ? error / size : 1e-14));
}
