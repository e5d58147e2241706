import { erf, erfc } from '#server/physics/numerics/error-function.ts';
import type { SineTransformInput } from '#server/physics/numerics/oscillatory-quadrature.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { exponentialEdges, exponentialRemainder } from './exponential-tail.ts';
import { ballKernel } from './sphere-kernels.ts';
import { closedResult } from './transform-error.ts';

/** A spherical distribution of one unit of charge. */
export interface ChargeShape {
  /** Form factor, 1 at q = 0; q in 1/angstrom. */
  formFactor: (q: number) => NumericalResult;
  /** r s(r), s the potential of the charge: 1 outside. */
  within: (r: number) => number;
  /** What is missing of 1, 1 - r s(r), as an integrand with its edges and its tail. */
  missing: SineTransformInput;
  /** <r²>, angstrom². */
  meanSquare: number;
  /** Length that sets the scale, angstrom. */
  range: number;
  /** Where the density jumps, angstrom. */
  breakpoints: number[];
}

/** Charge spread evenly over a sphere of radius R: F = 3 j1(qR)/(qR). */
export function uniformSphere(R: number): ChargeShape {
  return {
    formFactor: (q) => {
      const { value, rounding, slope } = ballKernel(q * R);
      return closedResult(3 * value, 3 * rounding + 3 * Math.abs(value), 3 * slope);
    },
    within: (r) => (r < R ? ((r / R) * (3 - (r / R) ** 2)) / 2 : 1),
    missing: {
      integrand: (r) => ((1 - r / R) ** 2 * (2 + r / R)) / 2,
      edges: [0, R],
      tail: 0,
    },
    meanSquare: 0.6 * R ** 2,
    range: R,
    breakpoints: [R],
  };
}

/** Normal distribution of rms radius `rms`: F = exp(-q² rms²/6). */
export function gaussianCharge(rms: number): ChargeShape {
  const width = rms * Math.sqrt(2 / 3);
  return {
    formFactor: (q) => {
      const exponent = (q * rms) ** 2 / 6;
      const value = Math.exp(-exponent);
      const slope = value === 0 ? 0 : 2 * exponent * value;
      return closedResult(value, (4 + 4 * exponent) * value, slope);
    },
    within: (r) => erf(r / width).value,
    missing: {
      integrand: (r) => erfc(r / width).value,
      edges: [0, 2 * width, 4 * width, 7.2 * width],
      tail: 1e-22 * width ** 2,
    },
    meanSquare: rms ** 2,
    range: rms,
    breakpoints: [],
  };
}

/** Exponential density of rms radius `rms`, the dipole form factor: F = (1 + q² rms²/12)^-2. */
export function dipoleCharge(rms: number): ChargeShape {
  const b = rms / Math.sqrt(12);
  return {
    formFactor: (q) => {
      const square = (q * b) ** 2;
      const value = 1 / (1 + square) / (1 + square);
      return closedResult(value, 14 * value, (4 * value * square) / (1 + square));
    },
    within: (r) => -Math.expm1(-r / b) - (r / (2 * b)) * Math.exp(-r / b),
    missing: {
      integrand: (r) => Math.exp(-r / b) * (1 + r / (2 * b)),
      edges: exponentialEdges(b),
      tail: (0.6 * exponentialRemainder(b)) / b,
    },
    meanSquare: rms ** 2,
    range: rms,
    breakpoints: [],
  };
}

/**
 * r s(r) near the origin, where 1 - (what is missing) cancels.
 *
 * Formula: s(r) = A - B r² below a thousandth of the range, A and B from twice that radius and beyond.
 *
 * @param missing 1 - r s(r)
 * @param range angstrom
 * @returns r s(r), relative error about 1e-12
 */
export function withinFrom(missing: (r: number) => number, range: number): (r: number) => number {
  const inner = range / 1000;
  const s = (r: number) => (1 - missing(r)) / r;
  const [near, far] = [s(inner), s(2 * inner)];
  const B = (near - far) / (3 * inner ** 2);
  return (r) => (r < inner ? r * (near + B * (inner - r) * (inner + r)) : 1 - missing(r));
}
