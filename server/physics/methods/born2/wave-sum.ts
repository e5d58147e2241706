import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { Q_ALLOWANCE } from '#server/physics/potentials/transform-error.ts';
import type { Amplitude } from '../amplitude.ts';

/** T_l for l = 0 … and bounds of their errors. */
export interface Waves {
  re: Float64Array;
  im: Float64Array;
  error: Float64Array;
}

/** An amplitude as a sum over waves. */
export interface WaveSum {
  /** f(q) = (1/k) Σ (2l+1) T_l P_l(1 - q²/2k²), angstrom; `blur` is a relative error of q. */
  at: (q: number, blur?: number) => Amplitude;
  /** Largest error at any angle, angstrom. */
  largestError: number;
}

/** What the waves beyond the last may add, from how the last ones fall; Infinity where they do not. */
function beyond(sizes: readonly number[]): number {
  const window = Math.min(8, sizes.length >> 1);
  const most = (from: number, to: number) => Math.max(0, ...sizes.slice(from, to));
  const last = most(sizes.length - window, sizes.length);
  if (window === 0) return Infinity;
  const before = most(sizes.length - 2 * window, sizes.length - window);
  if (last === 0) return 0;
  const ratio = last / before;
  return ratio < 1 ? (window * last * ratio) / (1 - ratio) : Infinity;
}

/**
 * Sum over partial waves as a function of the momentum transfer.
 *
 * Formula: f(q) = (1/k) Σ (2l+1) T_l P_l(cos theta), 1 - cos(theta) = q²/(2k²), by the recurrence of differences
 *   (l+1) d_{l+1} = l d_l - (2l+1)(1-x) P_l, which keeps the forward cone; backwards P_l(-x) = (-1)^l P_l(x).
 *
 * @param waves up to where they have died away
 * @param k wave number, 1/angstrom
 * @returns amplitude whose error holds those of the waves, what lies beyond the last of them, rounding, and that of q
 *
 * Source: textbook; recurrence after C. Reinsch (as in J. Stoer, Numerische Mathematik 1).
 */
export function waveSum({ re, im, error }: Waves, k: number): WaveSum {
  const count = re.length;
  const factor = (l: number) => (2 * l + 1) / k;
  const cRe = re.map((value, l) => factor(l) * value);
  const cIm = im.map((value, l) => factor(l) * value);
  const sizes = Array.from(cRe, (value, l) => Math.hypot(value, cIm[l] ?? 0));
  const keep = re.map((_, l) => l / (l + 1));
  const turn = re.map((_, l) => (2 * l + 1) / (l + 1));
  const fixed =
    error.reduce((sum, value, l) => sum + factor(l) * value, 0) +
    beyond(sizes) +
    sizes.reduce((sum, size, l) => sum + (4 + 2 * l) * UNIT_ROUNDOFF * size, 0);
  // |q dP_l/dq| is at most (q/k)² l(l+1)/2 everywhere.
  const slope = sizes.reduce((sum, size, l) => sum + (size * l * (l + 1)) / 2, 0);
  const at = (q: number, blur = 0): Amplitude => {
    const t = q / (2 * k);
    const backward = t > Math.SQRT1_2;
    const gap = 2 * (backward ? Math.max(0, 1 - t) * (1 + t) : t * t);
    let sumRe = 0;
    let sumIm = 0;
    let value = 1;
    let difference = 0;
    for (let l = 0; l < count; l++) {
      const p = backward && l % 2 === 1 ? -value : value;
      sumRe += (cRe[l] ?? 0) * p;
      sumIm += (cIm[l] ?? 0) * p;
      difference = (keep[l] ?? 0) * difference - (turn[l] ?? 0) * gap * value;
      value += difference;
    }
    const ofQ = (Q_ALLOWANCE + blur) * 4 * t * t * slope;
    return { re: sumRe, im: sumIm, error: fixed + ofQ };
  };
  return { at, largestError: fixed + 4 * Q_ALLOWANCE * slope };
}
