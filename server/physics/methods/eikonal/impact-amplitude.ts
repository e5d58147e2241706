import besselj0 from '@stdlib/math-base-special-besselj0';
import { chebyshevInterpolant } from '#server/physics/numerics/chebyshev-panels.ts';
import { hankelTransform } from '#server/physics/numerics/hankel-panels.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { Q_ALLOWANCE } from '#server/physics/potentials/transform-error.ts';
import type { Amplitude } from '../amplitude.ts';
import type { ImpactPanels, Moments } from './impact-panels.ts';

/** Roundings of the sums over panels, and the share of ∫ b |F| db to which they are interpolated in q. */
const SUM_ROUNDING = 16 * UNIT_ROUNDOFF;
const INTERPOLATION = 3e-15;
/** Tolerances that the error of the interpolant may reach. */
const MOST_TAILS = 4;
/** Step in q by which its slope is seen. */
const PROBE = 2 ** -20;

/** Intervals of q that double from the inverse of the mean impact parameter on. */
function edgesOf(k: number, { size }: ImpactPanels): number[] {
  const edges = [0];
  const mean = size[1] > 0 ? size[3] / size[1] : 0;
  if (mean > 0) for (let q = 2 / mean; q < 2 * k; q *= 2) edges.push(q);
  return [...edges, 2 * k];
}

/** ∫ b J0(qb) F db over panels and points. */
function transformOf({ panels, points }: ImpactPanels) {
  const ofPanels = hankelTransform(panels);
  return (q: number) => {
    const sum = ofPanels(q);
    for (const { b, re, im } of points) {
      const wave = besselj0(q * b);
      sum.re += wave * re;
      sum.im += wave * im;
    }
    return sum;
  };
}

/** Bound of ∫ b |J0(qb)| g db: |J0(x)| is at most 1 and sqrt(2/(πx)). */
const seenBy = (q: number, [half, one]: Moments): number =>
  Math.min(one, Math.sqrt(2 / (Math.PI * q)) * half);

/** Bound of |q d/dq| of the same: |x J1(x)| is at most x²/2, 0.6 x and sqrt(x). */
const slopeOf = (q: number, [, , threeHalves, two, three]: Moments): number =>
  Math.min((q * q * three) / 2, 0.6 * q * two, Math.sqrt(q) * threeHalves);

export interface ImpactAmplitude {
  at: (q: number, blur?: number) => Amplitude;
  /** Largest error at any angle, angstrom. */
  largestError: number;
}

/**
 * Amplitude of a function of the impact parameter.
 *
 * Formula: -ik ∫ b J0(qb) F(b) db, interpolated in q.
 *
 * @param source F on panels
 * @param k wave number, 1/angstrom
 * @returns amplitude, angstrom, with a bound of its error, that of q (and `blur`, relative) included
 */
export function impactAmplitude(source: ImpactPanels, k: number): ImpactAmplitude {
  const { missed, size, noise } = source;
  const interpolant = chebyshevInterpolant(
    transformOf(source),
    edgesOf(k, source),
    (q) => INTERPOLATION * seenBy(q, size),
  );
  const errorAt = (q: number) => missed + SUM_ROUNDING * seenBy(q, size) + seenBy(q, noise);
  const last = 2 * k;
  return {
    at: (q, blur = 0) => {
      const { re, im, error } = interpolant.at(Math.min(q, last));
      const beside = interpolant.at(Math.min(q, last) * (1 - PROBE));
      const slope = Math.hypot(beside.re - re, beside.im - im) / PROBE;
      const ofQ = (Q_ALLOWANCE + blur) * slope;
      // -i (re + i im)
      return { re: k * im, im: -k * re, error: k * (errorAt(q) + error + ofQ) };
    },
    largestError:
      k * (errorAt(0) + MOST_TAILS * INTERPOLATION * size[1] + Q_ALLOWANCE * slopeOf(last, size)),
  };
}
