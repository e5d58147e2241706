/** Σ c_l P_l(cos theta), and q times its slope; `size` is Σ |c_l P_l|. */
export interface WaveSum {
  re: number;
  im: number;
  slopeRe: number;
  slopeIm: number;
  size: number;
}

/**
 * Legendre series as a function of the momentum transfer.
 *
 * Formula: x = cos(theta) = 1 - q²/2k²; P_l by the recurrence of differences from 1 - |x|, which loses neither cone; P_l' by
 *   P'_{l+1} = P'_{l-1} + (2l+1) P_l; q d/dq = -(q²/k²) d/dx.
 *
 * @param re, im coefficients c_l, any unit
 * @param k wave number, 1/angstrom
 * @param q momentum transfer, 1/angstrom, 0 to 2k
 *
 * Source: DLMF 14.10.3, 18.9; difference form after C. Reinsch (as in J. Stoer, Numerische Mathematik 1).
 */
export function waveSum(re: Float64Array, im: Float64Array, k: number, q: number): WaveSum {
  const t = Math.min(1, q / (2 * k));
  const back = t > Math.SQRT1_2;
  const gap = 2 * (back ? (1 - t) * (1 + t) : t * t);
  let [sumRe, sumIm, slopeRe, slopeIm, size] = [0, 0, 0, 0, 0];
  let value = 1;
  let difference = 0;
  let slope = 0;
  let before = 0;
  let sign = 1;
  for (let l = 0; l < re.length; l++) {
    const p = sign * value;
    const d = back ? -sign * slope : slope;
    const [a, b] = [re[l] ?? 0, im[l] ?? 0];
    sumRe += a * p;
    sumIm += b * p;
    slopeRe += a * d;
    slopeIm += b * d;
    size += (Math.abs(a) + Math.abs(b)) * Math.abs(p);
    const next = before + (2 * l + 1) * value;
    before = slope;
    slope = next;
    difference = (l * difference - (2 * l + 1) * gap * value) / (l + 1);
    value += difference;
    if (back) sign = -sign;
  }
  const factor = -4 * t * t;
  return { re: sumRe, im: sumIm, slopeRe: factor * slopeRe, slopeIm: factor * slopeIm, size };
}

/**
 * Σ c_l sin(theta) P_l'(cos theta).
 *
 * @returns real and imaginary part; `size` is Σ |c_l sin(theta) P_l'|
 */
export function flipSum(re: Float64Array, im: Float64Array, k: number, q: number) {
  const t = Math.min(1, q / (2 * k));
  const back = t > Math.SQRT1_2;
  const gap = 2 * (back ? (1 - t) * (1 + t) : t * t);
  const sine = 2 * t * Math.sqrt((1 - t) * (1 + t));
  let [sumRe, sumIm, size] = [0, 0, 0];
  let value = 1;
  let difference = 0;
  let slope = 0;
  let before = 0;
  let sign = 1;
  for (let l = 0; l < re.length; l++) {
    const d = sine * (back ? -sign * slope : slope);
    const [a, b] = [re[l] ?? 0, im[l] ?? 0];
    sumRe += a * d;
    sumIm += b * d;
    size += (Math.abs(a) + Math.abs(b)) * Math.abs(d);
    const next = before + (2 * l + 1) * value;
    before = slope;
    slope = next;
    difference = (l * difference - (2 * l + 1) * gap * value) / (l + 1);
    value += difference;
    if (back) sign = -sign;
  }
  return { re: sumRe, im: sumIm, size };
}
