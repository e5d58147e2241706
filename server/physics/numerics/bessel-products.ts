/** Values of x² j_l² and x² j_l y_l at one x; filled to `length`, 0 beyond. */
export interface BesselProducts {
  square: Float64Array;
  mixed: Float64Array;
  length: number;
}

export function besselProductsFor(lMax: number): BesselProducts {
  return {
    square: new Float64Array(lMax + 1),
    mixed: new Float64Array(lMax + 1),
    length: 0,
  };
}

/** Beyond an order where x j_l is so small nothing is left of the waves. */
const NOTHING_LEFT = 1e-50;
const LARGEST_FALL = 125;

/** Orders above `top` at which j_{l+1}/j_l may be set to anything: what is wrong about it has died out at `top`. */
const headStart = (x: number): number => 14 + Math.ceil(8 * Math.cbrt(x));

/** j_{l+1}/j_l downwards; ratio[l - first] belongs to l, from the last of them to `first`. */
function ratiosDownward(first: number, last: number, x: number): Float64Array {
  const ratio = new Float64Array(last - first + 1);
  let value = x / (2 * (last + headStart(x)) + 3);
  for (let l = last + headStart(x); l > last; l--) value = 1 / ((2 * l + 1) / x - value);
  for (let l = last; l >= first; l--) {
    ratio[l - first] = value;
    value = 1 / ((2 * l + 1) / x - value);
  }
  return ratio;
}

/** ln of what x j_l has fallen by since the turning point: ν acosh(ν/x) - sqrt(ν² - x²), ν = l + ½. */
export function fallAt(l: number, x: number): number {
  const nu = l + 0.5;
  if (nu <= x) return 0;
  const root = Math.sqrt((nu - x) * (nu + x));
  return nu * Math.log((nu + root) / x) - root;
}

/** Last order worth following beyond the turning point. */
function lastOrder(first: number, lMax: number, x: number): number {
  if (fallAt(lMax, x) <= LARGEST_FALL) return lMax;
  let [low, high] = [first, lMax];
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (fallAt(middle, x) > LARGEST_FALL) high = middle;
    else low = middle;
  }
  return high;
}

/**
 * Products of spherical Bessel functions of the first and second kind.
 *
 * Formula: x² j_l² and x² j_l y_l; recurrence upwards to l = x. Beyond, j_{l+1}/j_l = ρ downwards and y_l/y_{l+1} = σ upwards, whose
 *   Wronskian gives x² j_l y_l = -ρ/(1 - ρσ), so that neither function overflows.
 *
 * @param x argument, > 0, no unit
 * @param lMax highest order wanted, at most that of `into`
 * @param into arrays to be filled
 *
 * Error: some 20 u of the envelope, and what a rounding of x does to the phase, x u.
 *
 * Source: DLMF 10.51.1, 10.50.1; W. Gautschi, SIAM Review 9 (1967) 24.
 */
export function besselProducts(x: number, lMax: number, into: BesselProducts): void {
  const { square, mixed } = into;
  const turning = Math.min(lMax, Math.floor(x));
  // Riccati-Bessel functions F = x j_l and G = -x y_l, from l = -1 and 0.
  let f = Math.sin(x);
  let g = Math.cos(x);
  let fBefore = g;
  let gBefore = -f;
  for (let l = 0; ; l++) {
    square[l] = f * f;
    mixed[l] = -f * g;
    if (l === turning) break;
    const factor = (2 * l + 1) / x;
    const fNext = factor * f - fBefore;
    const gNext = factor * g - gBefore;
    fBefore = f;
    f = fNext;
    gBefore = g;
    g = gNext;
  }
  into.length = turning + 1;
  if (turning === lMax) return;
  const last = lastOrder(turning, lMax, x);
  if (last === turning) return;
  const ratio = ratiosDownward(turning, last - 1, x);
  const gNext = ((2 * turning + 1) / x) * g - gBefore;
  let sigma = g / gNext;
  for (let l = turning + 1; l <= last; l++) {
    const rho = ratio[l - 1 - turning] ?? 0;
    f *= rho;
    if (Math.abs(f) < NOTHING_LEFT) return;
    square[l] = f * f;
    mixed[l] = -rho / (1 - rho * sigma);
    into.length = l + 1;
    sigma = 1 / ((2 * l + 1) / x - sigma);
  }
}
