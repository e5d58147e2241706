import besselj0 from '@stdlib/math-base-special-besselj0';
import { chebyshevInterpolant } from '#server/physics/numerics/chebyshev-panels.ts';
import { hankelTransform } from '#server/physics/numerics/hankel-panels.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { Q_ALLOWANCE } from '#server/physics/potentials/transform-error.ts';
import type { Amplitude } from '../amplitude.ts';
import type { ImpactPanels } from './impact-panels.ts';

/** Roundings of the sums over panels, and the share of ∫ b |F| db to which they are interpolated in q. */
const SUM_ROUNDING = 16 * UNIT_ROUNDOFF;
const INTERPOLATION = 3e-15;

/** Intervals of q that double from the inverse of the mean impact parameter on. */
function edgesOf(k: number, { moments }: ImpactPanels): number[] {
  const edges = [0];
  const mean = moments[0] > 0 ? moments[1] / moments[0] : 0;
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
  const { missed, moments } = source;
  const [plain, first, third] = moments;
  // |x J1(x)| is at most x²/2 and 0.6 x.
  const slope = (q: number) => Math.min(0.6 * q * first, (q * q * third) / 2);
  const tolerance = (q: number) => INTERPOLATION * plain + (Q_ALLOWANCE / 2) * slope(q);
  const interpolant = chebyshevInterpolant(transformOf(source), edgesOf(k, source), tolerance);
  const fixed = SUM_ROUNDING * plain + missed;
  return {
    at: (q, blur = 0) => {
      const { re, im, error } = interpolant.at(Math.min(q, 2 * k));
      const ofQ = (Q_ALLOWANCE + blur) * slope(q);
      // -i (re + i im)
      return { re: k * im, im: -k * re, error: k * (fixed + error + ofQ) };
    },
    largestError: k * (fixed + 2 * tolerance(2 * k) + Q_ALLOWANCE * slope(2 * k)),
  };
}
