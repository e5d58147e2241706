import { POWER_STRIDE } from './radial-panels.ts';

/** A wave and width times its slope at one edge; imaginary parts stay zero where the field is real. */
export interface RadialWave {
  re: number;
  im: number;
  slopeRe: number;
  slopeIm: number;
}

/** Most terms of a series. */
export const TERMS = POWER_STRIDE;
/** Terms below this share of the sum end a series. */
export const NEGLIGIBLE = 2 ** -56;
/** So many of them in turn: one or two may vanish by symmetry. */
export const QUIET = 3;
/** 1/((n+1)(n+2)) */
export const INVERSE = Float64Array.from({ length: TERMS }, (_, n) => 1 / ((n + 1) * (n + 2)));

/** Σ a_n and Σ n a_n of the series added up last. */
export const sums = { value: 0, slope: 0 };

/** Adds up `count` terms of a series that begins with the power `first`: value and slope at t = 1. */
export function addUp(a: Float64Array, count: number, first: number): void {
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
