/** A function of x = qR with what its error rests on, both without unit. */
export interface Kernel {
  value: number;
  /** Σ |term|·(roundings in it). */
  rounding: number;
  /** |x d/dx|. */
  slope: number;
}

const SERIES_BELOW = 1.5;

/**
 * Zeroth spherical Bessel function with its sensitivity.
 *
 * Formula: j0(x) = sin(x)/x; x j0' = cos x - j0.
 *
 * @param x qR, >= 0
 * @returns value, rounding and slope; the rounding of x itself counts in the slope
 *
 * Source: DLMF 10.49.3.
 */
export function shellKernel(x: number): Kernel {
  if (x === 0) return { value: 1, rounding: 0, slope: 0 };
  const value = Math.sin(x) / x;
  // cos x - j0 cancels to -x²/3 near 0.
  const slope = x < 1 ? (x * x) / 3 : Math.abs(Math.cos(x) - value);
  return { value, rounding: 2 * Math.abs(value) + slope, slope };
}

/**
 * Transform of the unit sphere, F(x) = j1(x)/x; three times it is the form factor of a uniform sphere.
 *
 * Formula: (sin x - x cos x)/x³; below x = 1.5 Σ (-1)^n (2n+2)/(2n+3)! x^{2n}. x F' = j0 - 3F.
 *
 * @param x qR, >= 0
 * @returns value, rounding and slope; the rounding of x itself counts in the slope
 *
 * Source: DLMF 10.49.3, 10.53.1.
 */
export function ballKernel(x: number): Kernel {
  if (x < SERIES_BELOW) return ballSeries(x);
  const sine = Math.sin(x);
  const cosine = Math.cos(x);
  const cube = x * x * x;
  const value = (sine - x * cosine) / cube;
  const slope = Math.abs(sine / x - 3 * value);
  const rounding =
    Math.abs(sine) / cube + (2 * Math.abs(cosine)) / (x * x) + 5 * Math.abs(value) + slope;
  return { value, rounding, slope };
}

function ballSeries(x: number): Kernel {
  const square = x * x;
  let term = 1 / 3;
  let value = 0;
  let magnitude = 0;
  let slope = 0;
  for (let n = 0; Math.abs(term) > 1e-19; n++) {
    value += term;
    magnitude += Math.abs(term);
    slope += 2 * n * term;
    term *= -square / ((2 * n + 2) * (2 * n + 5));
  }
  return { value, rounding: 4 * magnitude, slope: Math.abs(slope) };
}
