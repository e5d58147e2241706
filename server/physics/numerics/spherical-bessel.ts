const SMALL_ARGUMENT = 1e-3;
const RESCALE = 2 ** 830;

/** j_l = x^l/(2l+1)!! (1 - x²/(2(2l+3)) + x⁴/(8(2l+3)(2l+5))), good to 1e-20 below 1e-3. */
function powerSeries(values: Float64Array, x: number): void {
  const square = x * x;
  let leading = 1;
  for (let l = 0; l < values.length; l++) {
    if (l > 0) leading *= x / (2 * l + 1);
    values[l] = leading * (1 - (square / (2 * (2 * l + 3))) * (1 - square / (4 * (2 * l + 5))));
  }
}

function upward(values: Float64Array, x: number): void {
  let lower = Math.sin(x) / x;
  let value = (lower - Math.cos(x)) / x;
  values[0] = lower;
  if (values.length > 1) values[1] = value;
  for (let l = 1; l < values.length - 1; l++) {
    const next = ((2 * l + 1) / x) * value - lower;
    lower = value;
    value = next;
    values[l + 1] = next;
  }
}

/** j_{l+1}/j_l from the continued fraction of the minimal solution. */
function ratioAbove(l: number, x: number): number {
  const tiny = 1e-300;
  let b = (2 * l + 3) / x;
  let fraction = b;
  let c = b;
  let d = 0;
  for (let n = 1; n < 100_000; n++) {
    b = (2 * (l + n) + 3) / x;
    d = b - d;
    d = 1 / (Math.abs(d) < tiny ? tiny : d);
    c = b - 1 / c;
    if (Math.abs(c) < tiny) c = tiny;
    fraction *= c * d;
    if (Math.abs(c * d - 1) < Number.EPSILON / 2) break;
  }
  return 1 / fraction;
}

/** Downward from the ratio at the top, scaled at the end by the larger of j_0 and j_1. */
function downward(values: Float64Array, x: number): void {
  const top = values.length - 1;
  let value = 1;
  let upper = ratioAbove(top, x);
  values[top] = value;
  for (let l = top; l > 0; l--) {
    const lower = ((2 * l + 1) / x) * value - upper;
    upper = value;
    value = lower;
    values[l - 1] = value;
    if (Math.abs(value) > RESCALE) {
      value /= RESCALE;
      upper /= RESCALE;
      for (let above = l - 1; above <= top; above++) {
        values[above] = (values[above] ?? 0) / RESCALE;
        if (values[above] === 0) break;
      }
    }
  }
  const j0 = Math.sin(x) / x;
  const j1 = (j0 - Math.cos(x)) / x;
  const scale = Math.abs(j0) >= Math.abs(j1) ? j0 / value : j1 / upper;
  for (let l = 0; l <= top; l++) values[l] = (values[l] ?? 0) * scale;
}

/**
 * Spherical Bessel functions of the first kind j_0(x) … j_lMax(x).
 *
 * Formula: recurrence j_{l+1} = (2l+1)/x j_l - j_{l-1}, upwards while l <= x; downwards from the continued fraction of
 * j_{l+1}/j_l where orders exceed x; leading series below x = 1e-3.
 *
 * @param lMax highest order, integer >= 0
 * @param x argument, >= 0, no unit
 * @returns lMax + 1 values; error about 1e-13 of the value, of the envelope 1/x near zeros; exact 0 below 1e-308 of j_0
 * @throws RangeError outside the domain
 *
 * Validity: checked to x = 1e4. For larger x the error grows as the square root of x.
 *
 * Source: DLMF 10.51.1, 10.33.1, 10.52.1; W. Gautschi, SIAM Review 9 (1967) 24.
 */
export function sphericalBesselArray(lMax: number, x: number): Float64Array {
  if (!(Number.isInteger(lMax) && lMax >= 0)) throw new RangeError(`order ${lMax} is no count`);
  if (!(x >= 0 && x < Infinity)) throw new RangeError(`j_l is asked at ${x}; it needs x >= 0`);
  const values = new Float64Array(lMax + 1);
  if (x < SMALL_ARGUMENT) powerSeries(values, x);
  else if (lMax <= x) upward(values, x);
  else downward(values, x);
  return values;
}
