/** Beyond it the irregular function is cut off: nothing that small in the regular one is ever felt. */
const LARGEST = 1e140;

/**
 * Ratio of successive regular functions.
 *
 * Formula: F_{l+1}/F_l of the solution of the recurrence that is minimal in l, by its continued fraction from far above.
 *
 * @param l order, integer >= 0, not below x by much: near a zero of F_l the ratio is lost
 * @param x argument, > 0
 *
 * Source: W. Gautschi, SIAM Review 9 (1967) 24.
 */
export function riccatiRatio(l: number, x: number): number {
  const start = Math.max(l, Math.ceil(x)) + 30 + Math.ceil(8 * Math.cbrt(Math.max(l, x)));
  let ratio = 0;
  for (let n = start; n >= l; n--) ratio = 1 / ((2 * n + 3) / x - ratio);
  return ratio;
}

/**
 * Riccati-Bessel functions of all orders, the regular and the irregular one.
 *
 * Formula: F_l = x j_l(x), G_l = -x y_l(x), F_l G_{l+1} - F_{l+1} G_l = 1; both by f_{l+1} = (2l+1)/x f_l - f_{l-1}, G upwards, F upwards
 * for l <= x and downwards above, from the continued fraction of F_{l+1}/F_l and the Wronskian.
 *
 * @param x argument, > 0, no unit
 * @param F, G arrays of one length, filled from order 0 on
 * @param largest where the irregular function is cut off
 * @returns the highest order filled: the last of the arrays, or the last with |G| below `largest`
 * @throws RangeError outside the domain
 *
 * Validity: relative error of the envelope below about 1e-14 for x to 1e3; the rounding of x itself is not in it.
 *
 * Source: DLMF 10.51.1, 10.50.1; W. Gautschi, SIAM Review 9 (1967) 24.
 */
export function riccatiBessel(
  x: number,
  F: Float64Array,
  G: Float64Array,
  largest = LARGEST,
): number {
  if (!(x > 0 && x < Infinity)) throw new RangeError(`F_l is asked at ${x}; it needs x > 0`);
  const inverse = 1 / x;
  const [sine, cosine] = [Math.sin(x), Math.cos(x)];
  const last = Math.min(F.length, G.length) - 1;
  G[0] = cosine;
  F[0] = sine;
  let lower = cosine;
  let value = cosine / x + sine;
  let top = 0;
  while (top < last && Math.abs(value) < largest) {
    top += 1;
    G[top] = value;
    const next = (2 * top + 1) * inverse * value - lower;
    lower = value;
    value = next;
  }
  // G_{top+1} is in `value` whether or not there was room for it.
  const turn = Math.min(top, Math.floor(x));
  if (turn >= 1) F[1] = sine / x - cosine;
  for (let l = 1; l < turn; l++) F[l + 1] = ((2 * l + 1) / x) * (F[l] ?? 0) - (F[l - 1] ?? 0);
  if (top > turn) {
    const ratio = riccatiRatio(top, x);
    let above = ratio;
    let here = 1 / (value - ratio * (G[top] ?? 0));
    F[top] = here;
    above *= here;
    for (let l = top; l > turn + 1; l--) {
      const next = ((2 * l + 1) / x) * here - above;
      above = here;
      here = next;
      F[l - 1] = here;
    }
  }
  return top;
}
