import { UNIT_ROUNDOFF } from './rounding.ts';
import { NeumaierSum } from './sum.ts';

/** A polynomial of degree four on [start, start + width]: Σ p_k (t/width)^k · width, t = x - start. */
export interface QuarticPiece {
  start: number;
  width: number;
  /** p_k width^{k+1}: the coefficients once the integral is taken over the unit interval. */
  scaled: readonly [number, number, number, number, number];
}

/** Below it the moments come from a power series and downward recurrence, above it from upward recurrence. */
const SMALL_PHASE = 3;
const ROUNDING = 16 * UNIT_ROUNDOFF;

/** m_k = ∫_0^1 u^k e^{i phase u} du, k = 0 … 4, written into re and im. */
function moments(phase: number, re: Float64Array, im: Float64Array): void {
  const cosine = Math.cos(phase);
  const sine = Math.sin(phase);
  if (phase < SMALL_PHASE) {
    let term = 1;
    let sumRe = 0;
    let sumIm = 0;
    for (let j = 0; j < 2 || term > 1e-18 * phase; j++) {
      const part = term / (j + 5);
      if (j % 2 === 0) sumRe += j % 4 === 0 ? part : -part;
      else sumIm += j % 4 === 1 ? part : -part;
      term *= phase / (j + 1);
    }
    re[4] = sumRe;
    im[4] = sumIm;
    // m_{k-1} = (e^{i phase} - i phase m_k)/k
    for (let k = 4; k > 0; k--) {
      re[k - 1] = (cosine + phase * (im[k] ?? 0)) / k;
      im[k - 1] = (sine - phase * (re[k] ?? 0)) / k;
    }
    return;
  }
  // m_k = (e^{i phase} - k m_{k-1})/(i phase)
  re[0] = sine / phase;
  im[0] = (1 - cosine) / phase;
  for (let k = 1; k <= 4; k++) {
    re[k] = (sine - k * (im[k - 1] ?? 0)) / phase;
    im[k] = (k * (re[k - 1] ?? 0) - cosine) / phase;
  }
}

/**
 * Sine transform of a function that is a polynomial piece by piece, without quadrature.
 *
 * Formula: Σ ∫ P(t) sin(q(a + t)) dt/q = Σ Im[e^{iqa} Σ_k p_k h^{k+1} m_k(qh)]/q, m_k = ∫_0^1 u^k e^{iuqh} du.
 *
 * @param pieces polynomials of degree four
 * @param q wave number, > 0
 * @returns the integral and a bound of the rounding in it; what an error of q does is not in it
 *
 * Source: integration by parts; L. N. G. Filon, Proc. R. Soc. Edinburgh 49 (1928) 38.
 */
export function polynomialSine(
  pieces: readonly QuarticPiece[],
  q: number,
): { value: number; rounding: number } {
  const re = new Float64Array(5);
  const im = new Float64Array(5);
  const sum = new NeumaierSum();
  let size = 0;
  for (const { start, width, scaled } of pieces) {
    const phase = q * width;
    const mixed = phase > 1;
    moments(phase, re, im);
    let x = 0;
    let y = 0;
    let sizeX = 0;
    let sizeY = 0;
    for (let k = 0; k < 5; k++) {
      const p = scaled[k] ?? 0;
      const [a, b] = [p * (re[k] ?? 0), p * (im[k] ?? 0)];
      x += a;
      y += b;
      // Where the phase is small each part keeps its own digits; elsewhere one may cross zero.
      sizeX += mixed ? Math.abs(a) + Math.abs(b) : Math.abs(a);
      sizeY += mixed ? Math.abs(a) + Math.abs(b) : Math.abs(b);
    }
    const sine = Math.sin(q * start);
    const cosine = Math.cos(q * start);
    sum.add(sine * x + cosine * y);
    size += Math.abs(sine) * sizeX + Math.abs(cosine) * sizeY;
  }
  return { value: sum.value / q, rounding: (ROUNDING * size) / q };
}
