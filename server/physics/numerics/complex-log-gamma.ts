import type { ComplexValue } from './complex-polygamma.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';
import { NeumaierSum } from './sum.ts';

/** B_2k/(2k (2k-1)), k = 1 … 10. */
const STIRLING = [
  1 / 12,
  -1 / 360,
  1 / 1260,
  -1 / 1680,
  1 / 1188,
  -691 / 360360,
  1 / 156,
  -3617 / 122400,
  43867 / 244188,
  -174611 / 125400,
];
/** From this modulus on ten terms of Stirling's series leave less than 1e-20, also along the imaginary axis. */
const FAR = 18;
const HALF_LOG_TWO_PI = 0.9189385332046728;

/** Σ_k c_k w^(2k-1) for w = 1/z, by Horner's rule. */
function stirlingSeries(x: number, y: number): { re: number; im: number } {
  const size = x * x + y * y;
  const [vRe, vIm] = [x / size, -y / size];
  const [wRe, wIm] = [(vRe - vIm) * (vRe + vIm), 2 * vRe * vIm];
  let re = 0;
  let im = 0;
  for (let k = STIRLING.length - 1; k >= 0; k--) {
    const next = re * wRe - im * wIm + (STIRLING[k] ?? 0);
    im = re * wIm + im * wRe;
    re = next;
  }
  return { re: re * vRe - im * vIm, im: re * vIm + im * vRe };
}

/**
 * Logarithm of the gamma function of complex argument, on the branch that is real for real z and continuous for Re z > 0.
 *
 * Formula: ln Γ(z) = (w - 1/2) ln w - w + ½ ln 2π + Σ B_2k/(2k(2k-1) w^(2k-1)) - Σ_{j<n} ln(z + j), w = z + n with |w| >= 18.
 *
 * @param x Re z, > 0
 * @param y Im z
 * @returns both parts with bounds of their errors: some u of the largest term, |z| ln|z|
 * @throws RangeError for Re z <= 0
 *
 * Validity: |z| to 1e150.
 *
 * Source: DLMF 5.11.1, 5.5.1.
 */
export function logGamma(x: number, y: number): ComplexValue {
  if (!(x > 0 && x < Infinity && Number.isFinite(y))) {
    throw new RangeError(`ln Γ is asked at ${x} + ${y}i; Re z > 0 is needed`);
  }
  const re = new NeumaierSum();
  const im = new NeumaierSum();
  let reSize = 0;
  let imSize = 0;
  const add = (realPart: number, imaginaryPart: number) => {
    re.add(realPart);
    im.add(imaginaryPart);
    reSize += Math.abs(realPart);
    imSize += Math.abs(imaginaryPart);
  };
  let w = x;
  for (; Math.hypot(w, y) < FAR; w += 1) add(-Math.log(Math.hypot(w, y)), -Math.atan2(y, w));
  const log = Math.log(Math.hypot(w, y));
  const angle = Math.atan2(y, w);
  add((w - 0.5) * log, y * log);
  add(-y * angle, (w - 0.5) * angle);
  add(-w, -y);
  add(HALF_LOG_TWO_PI, 0);
  const series = stirlingSeries(w, y);
  add(series.re, series.im);
  // The modulus is good to u, so its logarithm to u in itself; w may be rounded once.
  const absolute = 4 * UNIT_ROUNDOFF * (Math.abs(w - 0.5) + Math.abs(y));
  return {
    re: re.value,
    im: im.value,
    reError: 4 * UNIT_ROUNDOFF * reSize + absolute,
    imError:
      4 * UNIT_ROUNDOFF * imSize + (Math.abs(y) > 0 ? absolute * Math.min(1, Math.abs(y)) : 0),
  };
}
