import type { Amplitude, ScatteringAmplitude } from '#server/physics/methods/amplitude.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { ConeSamples, Scales } from './cone-samples.ts';
import { coneEdges, coneWeights } from './cone-samples.ts';

/** An integral with its error, or why there is none. */
export type Integral = Computed | { divergent: string };

export interface CrossSections {
  elastic: Integral;
  absorption: Integral;
  total: Integral;
  momentumTransfer: Integral;
  viscosity: Integral;
}

/** A value with a bound of its error, angstrom². */
export interface Computed {
  value: number;
  error: number;
}

const EIGHT_PI = 8 * Math.PI;
/** t = sin(theta/2) at 90 degrees. */
const HALF_SPHERE = Math.SQRT1_2;
const COULOMB =
  'The potential falls off as 1/r, so the cross section grows without limit towards forward angles';
export const DIVERGENCES = {
  elastic: `${COULOMB}; only the part beyond a smallest angle is finite. Add the screening of the electrons for a finite total.`,
  momentumTransfer: `${COULOMB}, and the weight 1 − cos θ leaves a logarithm of the smallest angle.`,
  viscosity: `${COULOMB}, and the weight sin² θ leaves a logarithm of the smallest angle.`,
  total: `${COULOMB}; the elastic part has no finite value.`,
  absorption:
    'The imaginary part of the potential falls off as 1/r, so the forward amplitude has no finite imaginary part.',
} as const;

/**
 * Integrals of |f|² over all angles of the centre of mass.
 *
 * Formula: 8 pi ∫_0^1 |f|² w t dt with t = sin(theta/2); w = 1 (elastic), 1 - cos(theta) = 2t² (momentum transfer),
 * sin²(theta) = 4t²(1 - t²) (viscosity).
 *
 * @param samples amplitude at the nodes of a composite rule, angstrom
 * @returns three cross sections, angstrom², each with a bound: difference of two orders, errors of the amplitude (which
 *   allow for the roundings of q, so of k and of the nodes), roundings of the weights
 */
export function directIntegrals(samples: ConeSamples): [Computed, Computed, Computed] {
  const computed = (i: 0 | 1 | 2): Computed => {
    const moment = samples.moments[i];
    const error = samples.orderError[i] + samples.noise[i] + 8 * UNIT_ROUNDOFF * moment;
    return { value: EIGHT_PI * moment, error: EIGHT_PI * error };
  };
  return [computed(0), computed(1), computed(2)];
}

/**
 * Absorption at first order.
 *
 * Formula: (4 pi/k) Im f1(0).
 *
 * @returns angstrom², with its error; divergent where the imaginary part has a Coulomb tail
 */
export function absorption(born: ScatteringAmplitude, k: number): Integral {
  if (born.tail.im !== 0) return { divergent: DIVERGENCES.absorption };
  const forward = born.shortRange(0);
  if (forward.im === 0) return { value: 0, error: 0 };
  const value = ((4 * Math.PI) / k) * forward.im;
  const error = ((4 * Math.PI) / k) * forward.error + Math.abs(value) * 12 * UNIT_ROUNDOFF;
  return { value, error };
}

export function sumOf(elastic: Integral, removed: Integral): Integral {
  if ('divergent' in elastic) return { divergent: DIVERGENCES.total };
  if ('divergent' in removed) return removed;
  const value = elastic.value + removed.value;
  return { value, error: elastic.error + removed.error + UNIT_ROUNDOFF * Math.abs(value) };
}

/**
 * What exchange adds to the integrals of identical particles, half of the sphere counted.
 *
 * Formula: weight · 8 pi ∫_0^{1/√2} Re f(t) f*(√(1-t²)) w t dt; the other half of the sphere is the same by symmetry.
 *
 * @param f amplitude, angstrom, finite for every q
 * @param weight 2 (-1)^{2s}/(2s + 1)
 * @returns contributions to the elastic and to the viscosity cross section, angstrom², with their errors
 */
export function exchangeIntegrals(
  f: (q: number) => Amplitude,
  k: number,
  scales: Scales,
  weight: number,
): [Computed, Computed] {
  const breakpoints = coneEdges(k, scales).filter((t) => t < HALF_SPHERE);
  const pair = (t: number) => [f(2 * k * t), f(2 * k * Math.sqrt((1 - t) * (1 + t)))] as const;
  const value = (t: number) => {
    const [direct, exchanged] = pair(t);
    return direct.re * exchanged.re + direct.im * exchanged.im;
  };
  const blur = (t: number) => {
    const [a, b] = pair(t);
    return Math.hypot(a.re, a.im) * b.error + (Math.hypot(b.re, b.im) + b.error) * a.error;
  };
  const factor = Math.abs(weight) * EIGHT_PI;
  const moment = (i: 0 | 2): Computed => {
    const w = (t: number) => coneWeights(t)[i];
    const sum = integrate((t) => w(t) * value(t), 0, HALF_SPHERE, {
      breakpoints,
      relative: 1e-13,
      noise: 1e-14,
    });
    const carried = integrate((t) => w(t) * blur(t), 0, HALF_SPHERE, {
      breakpoints,
      relative: 0.05,
    });
    const error =
      sum.error + carried.value + carried.error + 8 * UNIT_ROUNDOFF * Math.abs(sum.value);
    return { value: Math.sign(weight) * factor * sum.value, error: factor * error };
  };
  return [moment(0), moment(2)];
}
