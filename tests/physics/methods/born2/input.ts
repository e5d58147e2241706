import { firstBorn } from '#server/physics/methods/born1.ts';
import type { Amplitude, MethodAmplitude } from '#server/physics/methods/amplitude.ts';
import type { MethodInput } from '#server/physics/methods/method-input.ts';
import type { Unavailable } from '#server/physics/methods/amplitude.ts';
import type { FormValues, Term } from '#server/physics/potentials/types.ts';
import { build } from '#tests/physics/potentials/build-term.ts';

/** U = 0.5 V, so that the numbers in the tests stay simple. */
export const FACTOR = 0.5;

export const form = (name: string, values: FormValues): Term =>
  build(name, values, {
    twoMuOverHbar2: FACTOR,
    projectileCharge: 2,
    targetCharge: 3,
    projectile: 'electron',
  });

export function inputOf(terms: readonly Term[], k: number): MethodInput {
  return { terms, born: firstBorn(terms, FACTOR), k, twoMuOverHbar2: FACTOR };
}

export const scaled = (term: Term, factor: number): Term => ({
  ...term,
  strength: { re: factor * term.strength.re, im: factor * term.strength.im },
});

export function available(found: MethodAmplitude | Unavailable): MethodAmplitude {
  if ('unavailable' in found) throw new Error(found.unavailable);
  return found;
}

export const modulus = ({ re, im }: { re: number; im: number }): number => Math.hypot(re, im);

export function difference(one: Amplitude | null, other: Amplitude | null) {
  if (one === null || other === null) throw new Error('the amplitude diverges here');
  return { re: one.re - other.re, im: one.im - other.im, error: one.error + other.error };
}
