import { UNIT_ROUNDOFF } from './rounding.ts';

/** A complex value whose parts are known each for itself: `reError` and `imError` bound |part - true part|. */
export interface ComplexValue {
  re: number;
  im: number;
  reError: number;
  imError: number;
}

/** B_2, B_4, … B_24. */
const BERNOULLI = [
  1 / 6,
  -1 / 30,
  1 / 42,
  -1 / 30,
  5 / 66,
  -691 / 2730,
  7 / 6,
  -3617 / 510,
  43867 / 798,
  -174611 / 330,
  854513 / 138,
  -236364091 / 2730,
];
/** From this modulus on twelve terms of the asymptotic series leave less than 1e-20, also along the imaginary axis. */
const FAR = 15;
const TERM_ROUNDING = 8 * UNIT_ROUNDOFF;

/** A sum of complex numbers and of the sizes of their parts, on which the rounding bound rests. */
class ComplexSum {
  re = 0;
  im = 0;
  reSize = 0;
  imSize = 0;
  count = 0;

  /** `imSize` may be given where Im is small by cancellation of a larger one. */
  add(re: number, im: number, imSize = Math.abs(im)): void {
    this.re += re;
    this.im += im;
    this.reSize += Math.abs(re);
    this.imSize += imSize;
    this.count += 1;
  }

  get value(): ComplexValue {
    const rounding = TERM_ROUNDING + this.count * UNIT_ROUNDOFF;
    const { re, im, reSize, imSize } = this;
    return { re, im, reError: rounding * reSize, imError: rounding * imSize };
  }
}

/** Σ_k c_k B_2k w^(k-1) by Horner's rule, for w = 1/z². */
function bernoulliSeries(wRe: number, wIm: number, factor: (k: number) => number) {
  let re = 0;
  let im = 0;
  for (let k = BERNOULLI.length; k >= 1; k--) {
    const next = re * wRe - im * wIm + factor(k) * (BERNOULLI[k - 1] ?? 0);
    im = re * wIm + im * wRe;
    re = next;
  }
  return { re, im };
}

function checkDomain(x: number, y: number): void {
  if (!(x > 0 && x < Infinity && Number.isFinite(y))) {
    throw new RangeError(`polygamma functions are asked at ${x} + ${y}i; Re z > 0 is needed`);
  }
}

/**
 * Trigamma function of complex argument.
 *
 * Formula: psi'(z) = Σ_{k<n} 1/(z+k)² + 1/w + 1/(2w²) + Σ B_2k/w^(2k+1), w = z + n with |w| >= 15.
 *
 * @param x Re z, > 0
 * @param y Im z
 * @returns both parts with bounds of their errors, relative about 3e-15 each; the imaginary part keeps its digits as y -> 0
 * @throws RangeError for Re z <= 0
 *
 * Validity: |z| to 1e150.
 *
 * Source: DLMF 5.15.1, 5.15.5, 5.15.8.
 */
export function trigamma(x: number, y: number): ComplexValue {
  checkDomain(x, y);
  const sum = new ComplexSum();
  let re = x;
  for (; Math.hypot(re, y) < FAR; re += 1) {
    const size = re * re + y * y;
    sum.add(((re - y) * (re + y)) / size / size, (-2 * re * y) / size / size);
  }
  const size = re * re + y * y;
  const [vRe, vIm] = [re / size, -y / size];
  const [wRe, wIm] = [((re - y) * (re + y)) / size / size, (-2 * re * y) / size / size];
  sum.add(vRe, vIm);
  sum.add(wRe / 2, wIm / 2);
  const series = bernoulliSeries(wRe, wIm, () => 1);
  const [uRe, uIm] = [vRe * wRe - vIm * wIm, vRe * wIm + vIm * wRe];
  const modulus = Math.hypot(uRe, uIm) / 6;
  sum.add(
    uRe * series.re - uIm * series.im,
    uRe * series.im + uIm * series.re,
    modulus * Math.min(1, 3 * Math.abs(vIm / Math.hypot(vRe, vIm))),
  );
  return sum.value;
}

/**
 * Digamma function of complex argument.
 *
 * Formula: psi(z) = -Σ_{k<n} 1/(z+k) + ln w - 1/(2w) - Σ B_2k/(2k w^2k), w = z + n with |w| >= 15.
 *
 * @param x Re z, > 0
 * @param y Im z
 * @returns both parts with bounds of their errors, some 20 u of ln|w| in the real one
 * @throws RangeError for Re z <= 0
 *
 * Validity: |z| to 1e150.
 *
 * Source: DLMF 5.5.2, 5.11.2.
 */
export function digamma(x: number, y: number): ComplexValue {
  checkDomain(x, y);
  const sum = new ComplexSum();
  let re = x;
  for (; Math.hypot(re, y) < FAR; re += 1) {
    const size = re * re + y * y;
    sum.add(-re / size, y / size);
  }
  const size = re * re + y * y;
  const [wRe, wIm] = [((re - y) * (re + y)) / size / size, (-2 * re * y) / size / size];
  sum.add(Math.log(Math.hypot(re, y)), Math.atan2(y, re));
  sum.add(-re / (2 * size), y / (2 * size));
  const series = bernoulliSeries(wRe, wIm, (k) => 1 / (2 * k));
  sum.add(
    -(wRe * series.re - wIm * series.im),
    -(wRe * series.im + wIm * series.re),
    (Math.hypot(wRe, wIm) / 12) * Math.min(1, (2 * Math.abs(y)) / Math.hypot(re, y)),
  );
  return sum.value;
}
