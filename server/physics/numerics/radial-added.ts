import { FIELD_STRIDE } from './shifted-chebyshev.ts';
import type { PanelPowers } from './radial-powers.ts';
import {
  addUp,
  INVERSE,
  NEGLIGIBLE,
  QUIET,
  type RadialWave,
  sums,
  TERMS,
} from './radial-series.ts';

const base = new Float64Array(TERMS);
const re = new Float64Array(TERMS);
const im = new Float64Array(TERMS);

/**
 * Carries a free wave and what a field adds to it over one panel, so that a weak field keeps all its digits.
 *
 * Formula: F'' = A F, y'' = A y + (B + iC)(y + F), A, B, C powers of t on t = 0 to 1.
 *
 * @param A, lengthA what the free wave feels
 * @param B, lengthB and C, lengthC real and imaginary part of the field
 * @param free F, real; its imaginary parts are not touched
 * @param added y
 */
export function stepAdded(
  A: PanelPowers,
  B: PanelPowers,
  C: PanelPowers,
  free: RadialWave,
  added: RadialWave,
): void {
  base[0] = free.re;
  base[1] = free.slopeRe;
  re[0] = added.re;
  re[1] = added.slopeRe;
  im[0] = added.im;
  im[1] = added.slopeIm;
  let size = Math.abs(free.re) + Math.abs(free.slopeRe);
  let addedSize =
    Math.abs(added.re) + Math.abs(added.slopeRe) + Math.abs(added.im) + Math.abs(added.slopeIm);
  let count = 2;
  let quiet = 0;
  while (count < TERMS && quiet < QUIET) {
    const n = count - 2;
    let [sum, sumRe, sumIm] = [0, 0, 0];
    for (let m = Math.min(n, A.length - 1); m >= 0; m--) {
      const a = A.powers[m] ?? 0;
      sum += a * (base[n - m] ?? 0);
      sumRe += a * (re[n - m] ?? 0);
      sumIm += a * (im[n - m] ?? 0);
    }
    for (let m = Math.min(n, B.length - 1); m >= 0; m--) {
      const b = B.powers[m] ?? 0;
      sumRe += b * ((re[n - m] ?? 0) + (base[n - m] ?? 0));
      sumIm += b * (im[n - m] ?? 0);
    }
    for (let m = Math.min(n, C.length - 1); m >= 0; m--) {
      const c = C.powers[m] ?? 0;
      sumRe -= c * (im[n - m] ?? 0);
      sumIm += c * ((re[n - m] ?? 0) + (base[n - m] ?? 0));
    }
    const factor = INVERSE[n] ?? 0;
    base[count] = sum * factor;
    re[count] = sumRe * factor;
    im[count] = sumIm * factor;
    count += 1;
    const weight = Math.abs(sum) * factor * count;
    const more = (Math.abs(sumRe) + Math.abs(sumIm)) * factor * count;
    if (weight > size) size = weight;
    if (more > addedSize) addedSize = more;
    const small = weight < NEGLIGIBLE * size && more <= NEGLIGIBLE * addedSize;
    quiet = small ? quiet + 1 : 0;
  }
  finishAdded(count, 0, free, added);
}

/** `stepAdded` with a real field. */
export function stepAddedReal(
  A: PanelPowers,
  B: PanelPowers,
  free: RadialWave,
  added: RadialWave,
): void {
  const [a, b] = [A.powers, B.powers];
  base[0] = free.re;
  base[1] = free.slopeRe;
  re[0] = added.re;
  re[1] = added.slopeRe;
  let size = Math.abs(free.re) + Math.abs(free.slopeRe);
  let addedSize = Math.abs(added.re) + Math.abs(added.slopeRe);
  let count = 2;
  let quiet = 0;
  while (count < TERMS && quiet < QUIET) {
    const n = count - 2;
    let sum = 0;
    let more = 0;
    const lastA = n < A.length ? n : A.length - 1;
    for (let m = 0; m <= lastA; m++) {
      const w = a[m] ?? 0;
      sum += w * (base[n - m] ?? 0);
      more += w * (re[n - m] ?? 0);
    }
    const lastB = n < B.length ? n : B.length - 1;
    for (let m = 0; m <= lastB; m++) {
      more += (b[m] ?? 0) * ((re[n - m] ?? 0) + (base[n - m] ?? 0));
    }
    const factor = INVERSE[n] ?? 0;
    base[count] = sum * factor;
    re[count] = more * factor;
    count += 1;
    const weight = Math.abs(sum) * factor * count;
    const extra = Math.abs(more) * factor * count;
    if (weight > size) size = weight;
    if (extra > addedSize) addedSize = extra;
    const small = weight < NEGLIGIBLE * size && extra <= NEGLIGIBLE * addedSize;
    quiet = small ? quiet + 1 : 0;
  }
  addUp(base, count, 0);
  free.re = sums.value;
  free.slopeRe = sums.slope;
  addUp(re, count, 0);
  added.re = sums.value;
  added.slopeRe = sums.slope;
}

function finishAdded(count: number, first: number, free: RadialWave, added: RadialWave): void {
  addUp(base, count, first);
  free.re = sums.value;
  free.slopeRe = sums.slope;
  addUp(re, count, first);
  added.re = sums.value;
  added.slopeRe = sums.slope;
  addUp(im, count, first);
  added.im = sums.value;
  added.slopeIm = sums.slope;
}

/**
 * The same on a panel that begins at the origin.
 *
 * Formula: as `stepFromOrigin`, with A, B and C the powers of t of t² width² times what they stand for, from t^1 on.
 */
export function addedFromOrigin(
  l: number,
  A: Float64Array,
  B: Float64Array,
  C: Float64Array | null,
  free: RadialWave,
  added: RadialWave,
): void {
  base.fill(0);
  re.fill(0);
  im.fill(0);
  base[0] = 1;
  let count = 1;
  let quiet = 0;
  let size = 0;
  while (count < TERMS && quiet < 6) {
    let [sum, sumRe, sumIm] = [0, 0, 0];
    for (let m = Math.min(count, FIELD_STRIDE + 1); m >= 1; m--) {
      const [a, b, c] = [A[m] ?? 0, B[m] ?? 0, C?.[m] ?? 0];
      const [f, x, y] = [base[count - m] ?? 0, re[count - m] ?? 0, im[count - m] ?? 0];
      sum += a * f;
      sumRe += a * x + b * (x + f) - c * y;
      sumIm += a * y + b * y + c * (x + f);
    }
    const factor = 1 / (count * (count + 2 * l + 1));
    base[count] = sum * factor;
    re[count] = sumRe * factor;
    im[count] = sumIm * factor;
    const more = (Math.abs(sumRe) + Math.abs(sumIm)) * factor;
    size = Math.max(size, more);
    const small = Math.abs(sum) * factor < NEGLIGIBLE && more < NEGLIGIBLE * size;
    count += 1;
    quiet = small ? quiet + 1 : 0;
  }
  finishAdded(count, l + 1, free, added);
}
