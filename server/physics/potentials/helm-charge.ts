import { erfc } from '#server/physics/numerics/error-function.ts';
import { gaussPanel } from '#server/physics/numerics/gauss-rule.ts';
import { type ChargeShape, withinFrom } from './charge-shapes.ts';
import { ballKernel } from './sphere-kernels.ts';
import { closedResult } from './transform-error.ts';

const ROOT_PI = Math.sqrt(Math.PI);
/** erfc is 0 or 2 to all digits beyond. */
const SATURATED = 7.2;

/** Antiderivatives of x^n erfc(x), n = 0, 1, 2, that vanish at +infinity. */
function moments(x: number): [number, number, number] {
  const tail = erfc(x).value;
  const bell = Math.exp(-x * x) / ROOT_PI;
  return [
    x * tail - bell,
    ((x * x - 0.5) * tail - x * bell) / 2,
    (x ** 3 * tail - (x * x + 1) * bell) / 3,
  ];
}

/** (3/4R³) ∫_{-R}^{R} (R² - v²) erfc((r+v)/w) dv in closed form; digits are lost as (w/R)³. */
function byMoments(R: number, w: number, r: number): number {
  const upper = moments((r + R) / w);
  const lower = moments((r - R) / w);
  const [m0, m1, m2] = [upper[0] - lower[0], upper[1] - lower[1], upper[2] - lower[2]];
  return ((3 * w) / (4 * R ** 3)) * ((R - r) * (R + r) * m0 + 2 * r * w * m1 - w * w * m2);
}

/** The same by a Gauss-Legendre sum, to rounding while w exceeds R/2. */
function bySum(R: number, w: number, r: number): number {
  const density = (t: number) => 0.75 * (1 - t) * (1 + t) * erfc((r + R * t) / w).value;
  return gaussPanel(density, -1, 1, 64).value;
}

/** 1 - r s(r): the share of the sphere's charge, seen edge on, that lies farther out than r after smearing. */
function missingOf(R: number, s: number): (r: number) => number {
  const w = Math.SQRT2 * s;
  if (w > R / 2) return (r) => bySum(R, w, r);
  return (r) => {
    if (r - R > SATURATED * w) return 0;
    // Well inside, smearing shifts nothing but by the mean square of the Gaussian.
    if (R - r > SATURATED * w) {
      const x = r / R;
      return ((1 - x) ** 2 * (2 + x)) / 2 + (1.5 * x * s * s) / R ** 2;
    }
    return byMoments(R, w, r);
  };
}

function edgesOf(R: number, s: number): number[] {
  const steps = [-10.5, -6, -3, 0, 3, 6, 10.5];
  return [0, ...steps.map((x) => R + x * s).filter((r) => r > 0)];
}

/**
 * Uniform sphere smeared with a Gaussian (Helm).
 *
 * Formula: F(q) = 3 j1(qR)/(qR) exp(-q²s²/2); 1 - r s(r) = (3/4R³) ∫_{-R}^{R} (R² - v²) erfc((r+v)/(√2 s)) dv;
 *   <r²> = 3R²/5 + 3s².
 *
 * @param R diffraction radius, angstrom, > 0
 * @param s standard deviation of the Gaussian in each direction, angstrom, > 0
 *
 * Source: R. H. Helm, Phys. Rev. 104 (1956) 1466; potential derived here.
 */
export function helmCharge(R: number, s: number): ChargeShape {
  const missing = missingOf(R, s);
  const range = Math.max(R, s);
  return {
    formFactor: (q) => {
      const { value, rounding, slope } = ballKernel(q * R);
      const exponent = (q * s) ** 2 / 2;
      const damp = 3 * Math.exp(-exponent);
      const size = Math.abs(value);
      const steep = damp === 0 ? 0 : 2 * exponent * size;
      return closedResult(
        damp * value,
        damp * (rounding + (4 + 4 * Math.min(exponent, 750)) * size),
        damp * (slope + steep),
      );
    },
    within: withinFrom(missing, range),
    missing: { integrand: missing, edges: edgesOf(R, s), tail: 1e-20 * (R + s) ** 2 },
    meanSquare: 0.6 * R ** 2 + 3 * s ** 2,
    range,
    breakpoints: [],
  };
}
