import type { Complex, Term } from '#server/physics/potentials/types.ts';
import type { Amplitude, ScatteringAmplitude } from './amplitude.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { Q_ALLOWANCE } from '#server/physics/potentials/transform-error.ts';
import { transform, transformWithoutTail } from './transform.ts';

/** The first-order amplitude of one interaction at one energy; its floor is 1e-14 (2 mu/hbar²) ∫ r² |V| dr of what the tail leaves. */
export type FirstBorn = ScatteringAmplitude;

/** 2 mu/hbar² is a quotient of rounded numbers, and a strength is converted from the unit it was typed in. */
const FACTOR_ROUNDING = 6 * UNIT_ROUNDOFF;
const PROBE = 2 ** -20;
const FLOOR = 1e-14;

/** A bare point charge at all distances: nothing is left of it when its tail is taken away. */
function isPureCoulomb(term: Term): boolean {
  return term.tail === 'coulomb' && term.norm === 0;
}

/**
 * First Born amplitude of a sum of terms.
 *
 * Formula: f1(q) = -(2 mu/hbar²) Σ strength · S(q), S(q) = ∫_0^∞ r² s(r) j0(qr) dr; attraction gives f1 > 0.
 *
 * @param terms interaction, V(r) = Σ strength · s(r), eV
 * @param twoMuOverHbar2 2 mu/hbar², 1/(eV angstrom²), > 0
 * @returns amplitudes with an absolute error that holds the error of the transforms, roundings of q among them, and those of
 *   strength and factor
 *
 * Validity: first order in V; see `assess` for whether that suffices.
 *
 * Source: M. Born, Z. Phys. 38 (1926) 803.
 */
export function firstBorn(terms: readonly Term[], twoMuOverHbar2: number): FirstBorn {
  const active = terms.filter(({ strength }) => strength.re !== 0 || strength.im !== 0);
  const pure = active.filter(isPureCoulomb);
  const rest = active.filter((term) => !isPureCoulomb(term));
  const purePart = pureTail(pure, twoMuOverHbar2);
  const tail = addTails(purePart, rest, twoMuOverHbar2);
  const hasTail = tail.re !== 0 || tail.im !== 0;
  const floor =
    FLOOR *
    twoMuOverHbar2 *
    rest.reduce((sum, { strength, norm }) => sum + Math.hypot(strength.re, strength.im) * norm, 0);

  const regular = (q: number) => sumTerms(rest, twoMuOverHbar2, (term) => transform(term, q));
  const shortRange = (q: number) =>
    sumTerms(rest, twoMuOverHbar2, (term) => transformWithoutTail(term, q));
  const whole = (q: number): Amplitude => {
    // Tails that cancel, as those of a nucleus and its electrons, would leave nothing but rounding at small q.
    if (!hasTail) return shortRange(q);
    const sum = regular(q);
    if (purePart.re === 0 && purePart.im === 0) return sum;
    const square = q * q;
    const re = sum.re - purePart.re / square;
    const im = sum.im - purePart.im / square;
    const rounding =
      (4 * UNIT_ROUNDOFF + 2 * Q_ALLOWANCE) * (Math.hypot(purePart.re, purePart.im) / square);
    return { re, im, error: sum.error + rounding + purePart.error / square };
  };
  return {
    amplitude: (q, blur = 0) => (q === 0 && hasTail ? null : blurred(whole, q, blur)),
    shortRange: (q, blur = 0) => blurred(shortRange, q, blur),
    tail,
    floor,
  };
}

/** Tails of point charges added before they are divided by q², so that opposite ones cancel for every q. */
function pureTail(terms: readonly Term[], factor: number): Amplitude {
  let re = 0;
  let im = 0;
  let size = 0;
  for (const { strength, coulombTail } of terms) {
    re += strength.re * coulombTail;
    im += strength.im * coulombTail;
    size += Math.hypot(strength.re, strength.im) * Math.abs(coulombTail);
  }
  const error = factor * size * FACTOR_ROUNDING;
  if (Math.hypot(re, im) <= terms.length * FACTOR_ROUNDING * size)
    return { re: 0, im: 0, error: 0 };
  return { re: factor * re, im: factor * im, error };
}

function addTails(pure: Complex, rest: readonly Term[], factor: number): Complex {
  let { re, im } = pure;
  let size = Math.hypot(re, im);
  for (const { strength, coulombTail } of rest) {
    re += factor * strength.re * coulombTail;
    im += factor * strength.im * coulombTail;
    size += factor * Math.hypot(strength.re, strength.im) * Math.abs(coulombTail);
  }
  const lost = (rest.length + 1) * FACTOR_ROUNDING * size;
  return Math.hypot(re, im) <= lost ? { re: 0, im: 0 } : { re, im };
}

function sumTerms(
  terms: readonly Term[],
  factor: number,
  route: (term: Term) => NumericalResult,
): Amplitude {
  let re = 0;
  let im = 0;
  let error = 0;
  for (const term of terms) {
    const { strength } = term;
    const size = factor * Math.hypot(strength.re, strength.im);
    const shape = route(term);
    re -= factor * strength.re * shape.value;
    im -= factor * strength.im * shape.value;
    error += size * (shape.error + FACTOR_ROUNDING * Math.abs(shape.value));
  }
  return { re, im, error };
}

/** Adds what an error of q does to the amplitude: |df/d ln q| times the relative error of q. */
function blurred(f: (q: number) => Amplitude, q: number, blur: number): Amplitude {
  const here = f(q);
  if (q === 0 || blur === 0) return here;
  const beside = f(q * (1 + PROBE));
  const slope = Math.hypot(beside.re - here.re, beside.im - here.im) / PROBE;
  return { ...here, error: here.error + slope * blur };
}
