import type { RadialPanels } from './radial-panels.ts';
import { FIELD_STRIDE, POWER_STRIDE } from './radial-panels.ts';

/** A wave and width times its slope at one edge; imaginary parts stay zero where the field is real. */
export interface RadialWave {
  re: number;
  im: number;
  slopeRe: number;
  slopeIm: number;
}

const TERMS = POWER_STRIDE;
/** Terms below this share of the sum end a series. */
const NEGLIGIBLE = 2 ** -56;
/** So many of them in turn: one or two may vanish by symmetry. */
const QUIET = 3;
const INVERSE = Float64Array.from({ length: TERMS }, (_, n) => 1 / ((n + 1) * (n + 2)));
const re = new Float64Array(TERMS);
const im = new Float64Array(TERMS);
const base = new Float64Array(TERMS);

/** Σ a_n and Σ n a_n. */
const sums = { value: 0, slope: 0 };
function addUp(a: Float64Array, count: number, first: number): void {
  let value = 0;
  let slope = 0;
  for (let n = count - 1; n >= 0; n--) {
    const term = a[n] ?? 0;
    value += term;
    slope += (n + first) * term;
  }
  sums.value = value;
  sums.slope = slope;
}

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
    let sum = 0;
    for (let m = 0; m <= last; m++) sum += (W[m] ?? 0) * (re[n - m] ?? 0);
    const term = sum * (INVERSE[n] ?? 0);
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

/** Powers of t of width² times a field on one panel, `length` of them. */
export interface PanelPowers {
  powers: Float64Array;
  length: number;
}

/** Where the powers of one wave on one panel are put together. */
export function panelPowers(): PanelPowers {
  return { powers: new Float64Array(POWER_STRIDE), length: 0 };
}

/**
 * Puts factor · component (and once more) of a field together on one panel.
 *
 * @param first, second components with their factors; a component that is not there counts as zero
 */
export function fieldPowers(
  { field, fieldLength }: RadialPanels,
  panel: number,
  first: number,
  factor: number,
  second: number,
  factor2: number,
  into: PanelPowers,
): void {
  const { powers } = into;
  const count = fieldLength[panel] ?? 0;
  const offset = panel * FIELD_STRIDE;
  const [row, other] = [field[first], factor2 === 0 ? undefined : field[second]];
  for (let m = 0; m < count; m++) {
    let sum = 0;
    if (row) sum += factor * (row[offset + m] ?? 0);
    if (other) sum += factor2 * (other[offset + m] ?? 0);
    powers[m] = sum;
  }
  into.length = row || other ? count : 0;
}

/** Adds width² (barrier/x² - wave²) on a panel away from the origin. */
export function addBarrier(
  { edges, inverseSquare, inverseLength }: RadialPanels,
  panel: number,
  barrier: number,
  wave: number,
  into: PanelPowers,
): void {
  const { powers } = into;
  const width = (edges[panel + 1] ?? 0) - (edges[panel] ?? 0);
  const many = barrier === 0 ? 1 : Math.max(1, inverseLength[panel] ?? 0);
  for (let m = into.length; m < many; m++) powers[m] = 0;
  into.length = Math.max(into.length, many);
  powers[0] = (powers[0] ?? 0) - (wave * width) ** 2;
  if (barrier === 0) return;
  const offset = panel * POWER_STRIDE;
  for (let m = 0; m < many; m++) {
    powers[m] = (powers[m] ?? 0) + barrier * (inverseSquare[offset + m] ?? 0);
  }
}
