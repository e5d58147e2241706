/** Points of a fit on 0 to 1, and the coefficients and powers it has. */
export const FIELD_STRIDE = 18;

/** Points (1 + cos((2i + 1) pi/2N))/2, where the values of a function give the coefficients of T_n(2t - 1) without loss. */
export const FIT_POINTS = Float64Array.from(
  { length: FIELD_STRIDE },
  (_, i) => (1 + Math.cos(((2 * i + 1) * Math.PI) / (2 * FIELD_STRIDE))) / 2,
);
/** 2/N cos(n(2i + 1) pi/2N), row by row in n. */
const PROJECTION = Float64Array.from({ length: FIELD_STRIDE * FIELD_STRIDE }, (_, place) => {
  const [n, i] = [Math.floor(place / FIELD_STRIDE), place % FIELD_STRIDE];
  const turns = (n * (2 * i + 1)) % (4 * FIELD_STRIDE);
  return ((n === 0 ? 1 : 2) / FIELD_STRIDE) * Math.cos((turns * Math.PI) / (2 * FIELD_STRIDE));
});
/** Powers of t in T_n(2t - 1): whole numbers, all of which a double holds. */
const SHIFTED = powersOfShifted();
function powersOfShifted(): Float64Array[] {
  const rows = [Float64Array.of(1), Float64Array.of(-1, 2)];
  for (let n = 2; n < FIELD_STRIDE; n++) {
    const [before, last] = [rows[n - 2] ?? rows[0], rows[n - 1] ?? rows[0]];
    const at = (row: Float64Array | undefined, i: number) => row?.[i] ?? 0;
    rows.push(
      Float64Array.from(
        { length: n + 1 },
        (_, i) => 4 * at(last, i - 1) - 2 * at(last, i) - at(before, i),
      ),
    );
  }
  return rows;
}

/**
 * Chebyshev coefficients of a function on 0 to 1.
 *
 * Formula: 2/N Σ f(t_i) cos(n(2i + 1) pi/2N), half of it for n = 0.
 *
 * @param f its values at FIT_POINTS
 *
 * Source: L. N. Trefethen, Approximation Theory and Approximation Practice (2013), ch. 4.
 */
export function shiftedChebyshev(f: Float64Array): Float64Array {
  const row = new Float64Array(FIELD_STRIDE);
  for (let n = 0; n < FIELD_STRIDE; n++) {
    let sum = 0;
    for (let i = 0; i < FIELD_STRIDE; i++) {
      sum += (PROJECTION[n * FIELD_STRIDE + i] ?? 0) * (f[i] ?? 0);
    }
    row[n] = sum;
  }
  return row;
}

/**
 * Powers of t from Chebyshev coefficients, times a factor, put behind those that are there.
 *
 * Formula: T_n(2t - 1) in powers of t, whole numbers.
 *
 * @param c coefficients of T_n(2t - 1), `length` of them used
 */
export function addPowers(c: Float64Array, length: number, factor: number, out: number[]): void {
  const first = out.length;
  for (let m = 0; m < FIELD_STRIDE; m++) out.push(0);
  for (let n = 0; n < length; n++) {
    const row = SHIFTED[n] ?? c;
    const share = factor * (c[n] ?? 0);
    for (let m = 0; m <= n; m++) out[first + m] = (out[first + m] ?? 0) + share * (row[m] ?? 0);
  }
}
