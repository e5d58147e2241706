import type { Complex } from '#server/physics/potentials/types.ts';

/** Below this modulus the power series keeps the digits that the difference would lose. */
const SMALL = 0.7;

/**
 * What the exponential is beyond its first order.
 *
 * Formula: e^{i chi} - 1 - i chi.
 *
 * @param chi complex phase, Im chi >= -700
 * @returns relative rounding some 10 u of the larger of the result and, beyond |chi| = 0.7, of chi
 */
export function beyondFirst({ re, im }: Complex): Complex {
  if (Math.hypot(re, im) < SMALL) {
    // Σ z^n/n! from n = 2, z = i chi = -im + i re, by Horner's rule.
    const [x, y] = [-im, re];
    let sum = { re: 0, im: 0 };
    for (let n = 19; n >= 2; n--) {
      const [a, b] = [(1 + sum.re) / n, sum.im / n];
      sum = { re: x * a - y * b, im: x * b + y * a };
    }
    return { re: x * sum.re - y * sum.im, im: x * sum.im + y * sum.re };
  }
  const size = Math.exp(-im);
  return { re: size * Math.cos(re) - 1 + im, im: size * Math.sin(re) - re };
}

/** 1 - e^{-2y} - 2y, y = Im chi: what is removed beyond first order. */
export function removedBeyondFirst(y: number): number {
  const x = 2 * y;
  if (Math.abs(x) >= SMALL) return -Math.expm1(-x) - x;
  let sum = 0;
  for (let n = 19; n >= 2; n--) sum = (-x * (1 + sum)) / n;
  return x * sum;
}
