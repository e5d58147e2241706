import { FIELD_STRIDE } from './shifted-chebyshev.ts';
import {
  addUp,
  INVERSE,
  NEGLIGIBLE,
  QUIET,
  type RadialWave,
  sums,
  TERMS,
} from './radial-series.ts';

const re = new Float64Array(TERMS);
const im = new Float64Array(TERMS);

/**
 * Carries a wave over one panel by its power series.
 *
 * Formula: y'' = W y on t = 0 to 1, (n+1)(n+2) a_{n+2} = Σ_m W_m a_{n-m}.
 *
 * @param W powers of t of width² times the field, `length` of them
 * @param wave value and slope (by t) at t = 0; at t = 1 on return
 * @returns terms summed
 *
 * Validity: |W| up to about 30 on the panel; the series is cut after 64 terms.
 */
export function stepReal(W: Float64Array, length: number, wave: RadialWave): number {
  re[0] = wave.re;
  re[1] = wave.slopeRe;
  let size = Math.abs(wave.re) + Math.abs(wave.slopeRe);
  let count = 2;
  let quiet = 0;
  while (count < TERMS && quiet < QUIET) {
    const n = count - 2;
    const last = n < length ? n : length - 1;
    // Two sums at once: one would wait for each addition.
    let sum = 0;
    let other = 0;
    let m = 0;
    for (; m < last; m += 2) {
      sum += (W[m] ?? 0) * (re[n - m] ?? 0);
      other += (W[m + 1] ?? 0) * (re[n - m - 1] ?? 0);
    }
    if (m === last) sum += (W[m] ?? 0) * (re[n - m] ?? 0);
    const term = (sum + other) * (INVERSE[n] ?? 0);
    re[count] = term;
    count += 1;
    const weight = Math.abs(term) * count;
    if (weight > size) size = weight;
    quiet = weight < NEGLIGIBLE * size ? quiet + 1 : 0;
  }
  addUp(re, count, 0);
  wave.re = sums.value;
  wave.slopeRe = sums.slope;
  return count;
}

/**
 * ∫_0^1 of the square of the series that was last summed, its real part: Σ a_n a_m/(n + m + 2·first + 1).
 *
 * @param count terms, as the step returned them
 * @param first power of t before the series: l + 1 from the origin, 0 elsewhere
 */
export function squareOfLast(count: number, first: number): number {
  let sum = 0;
  for (let n = count - 1; n >= 0; n--) {
    let row = 0;
    for (let m = count - 1; m >= 0; m--) row += (re[m] ?? 0) / (n + m + 2 * first + 1);
    sum += row * (re[n] ?? 0);
  }
  return sum;
}

/** `stepReal` with a complex field, whose imaginary part has `lengthIm` powers. */
export function stepComplex(
  W: Float64Array,
  length: number,
  V: Float64Array,
  lengthIm: number,
  wave: RadialWave,
): number {
  re[0] = wave.re;
  re[1] = wave.slopeRe;
  im[0] = wave.im;
  im[1] = wave.slopeIm;
  let size =
    Math.abs(wave.re) + Math.abs(wave.slopeRe) + Math.abs(wave.im) + Math.abs(wave.slopeIm);
  let count = 2;
  let quiet = 0;
  while (count < TERMS && quiet < QUIET) {
    const n = count - 2;
    let sumRe = 0;
    let sumIm = 0;
    const last = n < length ? n : length - 1;
    for (let m = 0; m <= last; m++) {
      const w = W[m] ?? 0;
      sumRe += w * (re[n - m] ?? 0);
      sumIm += w * (im[n - m] ?? 0);
    }
    const lastIm = n < lengthIm ? n : lengthIm - 1;
    for (let m = 0; m <= lastIm; m++) {
      const v = V[m] ?? 0;
      sumRe -= v * (im[n - m] ?? 0);
      sumIm += v * (re[n - m] ?? 0);
    }
    const factor = INVERSE[n] ?? 0;
    re[count] = sumRe * factor;
    im[count] = sumIm * factor;
    count += 1;
    const weight = (Math.abs(sumRe) + Math.abs(sumIm)) * factor * count;
    if (weight > size) size = weight;
    quiet = weight < NEGLIGIBLE * size ? quiet + 1 : 0;
  }
  addUp(re, count, 0);
  wave.re = sums.value;
  wave.slopeRe = sums.slope;
  addUp(im, count, 0);
  wave.im = sums.value;
  wave.slopeIm = sums.slope;
  return count;
}

/**
 * Regular wave at the end of a panel that begins at the origin.
 *
 * Formula: y = t^{l+1} Σ a_n t^n, a_0 = 1, n(n + 2l + 1) a_n = Σ_{m>=1} P_m a_{n-m}, P = t² width² (field - wave²).
 *
 * @param P, Q powers of t of real and imaginary part of that product, from t^0 (which must be 0) on
 * @param wave value and slope at t = 1 on return
 * @returns terms summed
 */
export function stepFromOrigin(
  l: number,
  P: Float64Array,
  Q: Float64Array | null,
  wave: RadialWave,
): number {
  re.fill(0);
  im.fill(0);
  re[0] = 1;
  let size = 1;
  let count = 1;
  let quiet = 0;
  while (count < TERMS && quiet < QUIET) {
    let sumRe = 0;
    let sumIm = 0;
    const last = Math.min(count, FIELD_STRIDE + 1);
    for (let m = 1; m <= last; m++) {
      const p = P[m] ?? 0;
      const q = Q?.[m] ?? 0;
      sumRe += p * (re[count - m] ?? 0) - q * (im[count - m] ?? 0);
      sumIm += p * (im[count - m] ?? 0) + q * (re[count - m] ?? 0);
    }
    const factor = 1 / (count * (count + 2 * l + 1));
    re[count] = sumRe * factor;
    im[count] = sumIm * factor;
    const weight = (Math.abs(sumRe) + Math.abs(sumIm)) * factor * (1 + count / (l + 1));
    if (weight > size) size = weight;
    count += 1;
    quiet = weight < NEGLIGIBLE * size ? quiet + 1 : 0;
  }
  addUp(re, count, l + 1);
  wave.re = sums.value;
  wave.slopeRe = sums.slope;
  addUp(im, count, l + 1);
  wave.im = sums.value;
  wave.slopeIm = sums.slope;
  return count;
}
