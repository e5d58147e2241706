import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { Amplitude } from '../amplitude.ts';
import type { Scattered } from './scatter.ts';
import type { Transition } from './transition.ts';
import { weightOf } from './transition.ts';
import type { ScatteredCharge } from './scatter-charged.ts';
import { flipSum, waveSum } from './wave-sum.ts';

/** Relative error allowed for q itself, as every amplitude allows it. */
const Q_ALLOWANCE = 8 * UNIT_ROUNDOFF;

/** Coefficients of Legendre polynomials by l, angstrom. */
export interface Coefficients {
  re: Float64Array;
  im: Float64Array;
  /** Bound of what is not known of any sum of them. */
  error: number;
  /** Σ (2l+1) |T_l|/k */
  size: number;
}

export const isCharged = (scattered: Scattered | ScatteredCharge): scattered is ScatteredCharge =>
  'sigma' in scattered;

/** e^{2i sigma_l}, 1 without charge. */
function turnOf(scattered: Scattered | ScatteredCharge, l: number) {
  if (!isCharged(scattered)) return { c: 1, s: 0, error: 0 };
  const angle = 2 * (scattered.sigma[l] ?? 0);
  return { c: Math.cos(angle), s: Math.sin(angle), error: 2 * (scattered.sigmaError[l] ?? 0) };
}

function addUp(
  scattered: Scattered | ScatteredCharge,
  k: number,
  weigh: (wave: Transition) => number,
  closed: boolean,
): Coefficients {
  const { waves, born, summed, left } = scattered;
  const re = new Float64Array(summed + 1);
  const im = new Float64Array(summed + 1);
  let square = 0;
  let size = 0;
  for (const wave of waves) {
    const { l } = wave;
    if (l > summed) continue;
    const weight = weigh(wave) / k;
    const { c, s, error } = turnOf(scattered, l);
    const first = closed ? (born?.re[l] ?? 0) : 0;
    const x = wave.re - first;
    const y = wave.im - (closed ? (born?.im[l] ?? 0) : 0);
    re[l] = (re[l] ?? 0) + weight * (c * x - s * y);
    im[l] = (im[l] ?? 0) + weight * (c * y + s * x);
    const known = wave.error + error * Math.hypot(x, y) + 16 * UNIT_ROUNDOFF * Math.abs(first);
    square += (weight * known) ** 2;
    size += Math.abs(weight) * Math.hypot(wave.re, wave.im);
  }
  // Roundings of different waves do not know of each other.
  return { re, im, error: left / k + 4 * Math.sqrt(square), size };
}

/** (2l+1) (T_l - first order)/k; with a spin-orbit term (l+1) of the one and l of the other wave. */
export const directCoefficients = (scattered: Scattered | ScatteredCharge, k: number) =>
  addUp(scattered, k, weightOf, true);

/** (T_l+ - T_l-)/k */
export const flipCoefficients = (scattered: Scattered | ScatteredCharge, k: number) =>
  addUp(scattered, k, ({ spin }) => spin, false);

/** Σ c_l P_l(cos theta) with a bound of its error. */
export function directSum(
  { re, im, error }: Coefficients,
  k: number,
  q: number,
  blur: number,
): Amplitude {
  const sum = waveSum(re, im, k, q);
  const rounding = UNIT_ROUNDOFF * (4 + Math.sqrt(re.length)) * sum.size;
  const slope = (Q_ALLOWANCE + blur) * Math.hypot(sum.slopeRe, sum.slopeIm);
  return { re: sum.re, im: sum.im, error: error + rounding + slope };
}

/**
 * Spin-flip amplitude.
 *
 * Formula: g = (1/k) Σ (T_l+ - T_l-) sin(theta) P_l'(cos theta), M = f + i g sigma·n with n along k_in × k_out; the analysing power
 *   with the Madison sign is A_y = 2 Im(f g*)/(|f|² + |g|²).
 */
export function flipAmplitude({ re, im, error }: Coefficients, k: number, q: number): Amplitude {
  const { size, ...sum } = flipSum(re, im, k, q);
  // |sin(theta) P_l'| grows as l.
  const rounding = UNIT_ROUNDOFF * (8 + 2 * re.length) * size;
  return { re: sum.re, im: sum.im, error: error * re.length + rounding };
}
