import { firstBorn } from '#server/physics/methods/born1.ts';
import type { PartialWaves, Unavailable } from '#server/physics/methods/amplitude.ts';
import { partialWaves } from '#server/physics/methods/partial-waves/partial-waves.ts';
import type { Term } from '#server/physics/potentials/types.ts';

/** 1/(eV angstrom²): an electron-like mass, exact in binary. */
export const TWO_MU = 0.25;

export function answerOf(
  terms: readonly Term[],
  k: number,
  twoMuOverHbar2 = TWO_MU,
  projectileSpin: number | null = 0.5,
): PartialWaves | Unavailable {
  const born = firstBorn(terms, twoMuOverHbar2);
  return partialWaves({ terms, born, k, twoMuOverHbar2, projectileSpin });
}

export function wavesOf(terms: readonly Term[], k: number, twoMuOverHbar2 = TWO_MU): PartialWaves {
  const found = answerOf(terms, k, twoMuOverHbar2);
  if ('unavailable' in found) throw new Error(found.unavailable);
  return found;
}

/** Σ 4 pi/k² (2l+1) |T|², elastic without spin. */
export function elasticOf({ waves }: PartialWaves, k: number): number {
  return waves.reduce((sum, { l, delta, eta }) => {
    const square = (1 - eta) ** 2 / 4 + eta * Math.sin(delta) ** 2;
    return sum + ((4 * Math.PI) / (k * k)) * (2 * l + 1) * square;
  }, 0);
}

/** Smallest difference of two phases, which are known up to multiples of pi. */
export function phaseGap(a: number, b: number): number {
  const gap = a - b;
  return Math.abs(gap - Math.PI * Math.round(gap / Math.PI));
}
