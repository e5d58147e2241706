import { integrate } from '#server/physics/numerics/quadrature.ts';
import type { Amplitude, Condition, MethodAmplitude, Unavailable } from '../amplitude.ts';
import type { MethodInput } from '../method-input.ts';
import { whyNoSecondBorn } from './refusals.ts';
import type { SecondAmplitude } from './second-amplitude.ts';
import { closedSecondAmplitude, numericalSecondAmplitude } from './second-amplitude.ts';

/** Above it the series in the potential is not seen to converge. */
const LARGEST_RATIO = 0.1;
const LARGEST_RESIDUAL = 1e-8;
/** Calls of the first-order amplitude for the check of conservation; each costs more where a table or a formula is transformed. */
const MOST_CALLS = { closed: 20_000, slow: 2_000 };
const SLOW = ['tabulated', 'expression'];
/** An amplitude that is not known to this of its forward value is none. */
const WORST = 1e-9;

const modulus = ({ re, im }: { re: number; im: number }) => Math.hypot(re, im);

function secondOrderSize(first: Amplitude, second: Amplitude): Condition | null {
  const size = modulus(first);
  if (!(size > first.error)) return null;
  const value = modulus(second) / size;
  return {
    name: 'secondOrderSize',
    value,
    most: LARGEST_RATIO,
    holds: value <= LARGEST_RATIO,
    meaning:
      'Second-order part of the forward amplitude as a fraction of the first-order one; what third order adds is of the size of its square.',
  };
}

/** k sigma_B1/(4 pi) = (1/2k) ∫ |f1|² q dq over 0 … 2k. */
function firstOrderElastic({ terms, born, k }: MethodInput) {
  const ranges = terms.flatMap(({ range }) => (range !== null && range > 0 ? [range] : []));
  const breakpoints: number[] = terms.flatMap(({ kinks = [] }) => [...kinks]);
  if (ranges.length > 0) {
    for (let q = 0.5 / Math.max(...ranges); q < 2 * k; q *= 2) breakpoints.push(q);
  }
  const weighted = (q: number) => {
    const { re, im } = born.shortRange(q);
    return (q * (re * re + im * im)) / (2 * k);
  };
  return integrate(weighted, 0, 2 * k, {
    breakpoints,
    relative: LARGEST_RESIDUAL / 10,
    maxEvaluations: terms.some(({ form }) => SLOW.includes(form))
      ? MOST_CALLS.slow
      : MOST_CALLS.closed,
  });
}

/** The optical theorem of second order; for real potentials alone, as complex ones remove particles. */
function opticalResidual(input: MethodInput, second: Amplitude): Condition | null {
  if (input.terms.some(({ strength }) => strength.im !== 0)) return null;
  const elastic = firstOrderElastic(input);
  if (!(elastic.error <= (LARGEST_RESIDUAL / 4) * elastic.value)) return null;
  const value = Math.abs(second.im / elastic.value - 1);
  return {
    name: 'opticalTheorem',
    value,
    most: LARGEST_RESIDUAL,
    holds: value <= LARGEST_RESIDUAL,
    meaning:
      'Departure of Im f2(0) from k/(4 pi) times the elastic cross section of first order, integrated over angle, as a fraction of it: conservation of particles in second order.',
  };
}

/**
 * Second Born amplitude of a sum of terms.
 *
 * Formula: f = f1 + f2, f2 = -(1/4π) <k_f|U G0 U|k_i>: closed for sums of Yukawa potentials, else (1/k) Σ (2l+1) T2_l P_l with f1 in
 *   closed form beside it. `absorption` is what complex depths remove to second order, by the optical theorem at that order:
 *   (4π/k) Im[f1(0) + f2(0)] less the elastic cross section of f1 alone, as |f1|² is of second order already.
 *
 * @param input interaction, its first order, and k (1/angstrom)
 * @returns amplitude with a bound of its error, absorption in angstrom², and conditions; or why there is none
 *
 * Validity: potentials that fall faster than any power. The sum of two orders says nothing where the second is not small.
 *
 * Source: R. H. Dalitz, Proc. R. Soc. A 206 (1951) 509; R. R. Lewis, Phys. Rev. 102 (1956) 537; e.g. C. J. Joachain, Quantum Collision
 * Theory (1975), ch. 8.
 */
export function secondBorn(input: MethodInput): MethodAmplitude | Unavailable {
  const reason = whyNoSecondBorn(input);
  if (reason !== null) return { unavailable: reason };
  const second = closedSecondAmplitude(input) ?? numericalSecondAmplitude(input);
  if ('unavailable' in second) return second;
  const { born } = input;
  const forward = { first: born.shortRange(0), second: second.at(0) };
  const size = modulus(forward.first) + modulus(forward.second);
  if (second.largestError > WORST * size) {
    return {
      unavailable:
        'The second-order amplitude is lost in rounding: its parts cancel, or the potential is known too coarsely.',
    };
  }
  const conditions = [
    secondOrderSize(forward.first, forward.second),
    opticalResidual(input, forward.second),
  ].filter((one): one is Condition => one !== null);
  return {
    ...amplitudes(input, second),
    tail: { re: 0, im: 0 },
    floor: born.floor + second.largestError,
    flip: null,
    absorption: absorption(input, second),
    conditions,
  };
}

function amplitudes({ born }: MethodInput, second: SecondAmplitude) {
  const f = (q: number, blur = 0): Amplitude => {
    const first = born.shortRange(q, blur);
    const { re, im, error } = second.at(q, blur);
    return { re: first.re + re, im: first.im + im, error: first.error + error };
  };
  return { amplitude: f, shortRange: f };
}

function absorption({ born, k }: MethodInput, second: SecondAmplitude) {
  const first = born.shortRange(0);
  const factor = (4 * Math.PI) / k;
  if (first.im === 0) return second.absorption;
  return {
    value: factor * first.im + second.absorption.value,
    error: factor * first.error + second.absorption.error,
  };
}
