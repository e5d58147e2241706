import { screening, type ScreeningKey } from '#server/physics/tables/screening.ts';
import { exponentialIntegralE1 } from '#server/physics/numerics/exponential-integral.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { chargeProductOf } from './charges.ts';
import { E_FOLDINGS, exponentialEdges, exponentialRemainder } from './exponential-tail.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { closedResult } from './transform-error.ts';
import type { Term } from './types.ts';

/** One exponential of a screening function: weight · exp(-rate · r/a). */
export interface Screen {
  weight: number;
  rate: number;
}

/** The exponentials of a published screening function, as printed. */
export function screensOf(key: ScreeningKey): Screen[] {
  const { weights, decays } = screening(key);
  return weights.map((weight, i) => ({ weight, rate: decays[i] ?? NaN }));
}

/**
 * Transform of Σ c exp(-b r/a)/r.
 *
 * Formula: S(q) = Σ c a²/(b² + q²a²).
 *
 * @param screens weights c > 0 and rates b > 0, no unit
 * @param a screening length, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom²; relative error below 3e-15
 *
 * Source: G. Wentzel, Z. Phys. 40 (1926) 590, term by term.
 */
export function screeningTransform(screens: readonly Screen[], a: number, q: number) {
  let value = 0;
  let slope = 0;
  const square = (q * a) ** 2;
  for (const { weight, rate } of screens) {
    const denominator = rate ** 2 + square;
    const part = (weight * a ** 2) / denominator;
    value += part;
    slope += (2 * part * square) / denominator;
  }
  return closedResult(value, (10 + screens.length) * value, slope);
}

/** Edges of the panels: those of every exponential, as each has a scale of its own. */
function edgesOf(lengths: readonly number[]): number[] {
  const last = Math.max(...lengths.flatMap(exponentialEdges));
  const all = lengths.flatMap(exponentialEdges).filter((r) => r <= last);
  return [...new Set(all)].sort((x, y) => x - y);
}

function quadratureOf(
  screens: readonly Screen[],
  a: number,
  norm: number,
): (q: number) => NumericalResult {
  const lengths = screens.map(({ rate }) => a / rate);
  const longest = Math.max(...lengths);
  const weights = screens.reduce((sum, { weight }) => sum + weight, 0);
  return radialQuadrature(
    {
      integrand: (r) =>
        screens.reduce((sum, { weight, rate }) => sum + weight * Math.exp((-rate * r) / a), 0),
      edges: edgesOf(lengths),
      tail: (weights * exponentialRemainder(longest)) / longest,
    },
    norm,
  );
}

/**
 * Potential of two point charges with a screening function that is a sum of exponentials.
 *
 * Formula: s(r) = Σ c exp(-b r/a)/r.
 *
 * @param form key of the form
 * @param strength Z1 Z2 alpha hbar c, eV·angstrom
 * @param screens weights c > 0 and rates b > 0
 * @param a screening length, angstrom
 */
export function screenedTerm(
  form: string,
  strength: number,
  screens: readonly Screen[],
  a: number,
): Term {
  const sum = (f: (screen: Screen) => number) =>
    screens.reduce((total, screen) => total + screen.weight * f(screen), 0);
  const norm = sum(({ rate }) => (a / rate) ** 2);
  const longest = Math.max(...screens.map(({ rate }) => a / rate));
  return {
    form,
    strength: { re: strength, im: 0 },
    chargeProduct: chargeProductOf(strength),
    v: (r) => sum(({ rate }) => Math.exp((-rate * r) / a)) / r,
    closed: (q) => screeningTransform(screens, a, q),
    quadrature: quadratureOf(screens, a, norm),
    coulombTail: 0,
    norm,
    firstMoment: sum(({ rate }) => a / rate),
    lineIntegral: (from) => sum(({ rate }) => exponentialIntegralE1((rate * from) / a).value),
    range: longest,
    tail: 'exponential',
    reach: E_FOLDINGS * longest,
    breakpoints: [],
  };
}
