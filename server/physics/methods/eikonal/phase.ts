import type { Term } from '#server/physics/potentials/types.ts';
import type { Complex } from '#server/physics/potentials/types.ts';
import type { MethodInput } from '../method-input.ts';
import { lineOf, type Line } from './line-integrals.ts';

/** Eikonal phase of the interaction without its Coulomb tail. */
export interface EikonalPhase {
  /** chi(b), rad; the imaginary part is positive where particles are removed. */
  at: (b: number) => Complex;
  /** Relative error, seen on finer panels at some places, of the sum of the moduli of the terms. */
  relativeError: (places: readonly number[]) => number;
}

/** Rounding of the closed line integrals, K0 and K1 among them. */
const ROUNDING = 1e-14;
/** Finer panels differ by less than what they leave. */
const SAFETY = 4;

interface Part {
  re: number;
  im: number;
  line: Line;
}

/**
 * Eikonal phase of a sum of terms.
 *
 * Formula: chi(b) = -(1/2k) ∫ U(√(b² + z²)) dz = -(1/hbar v) ∫ V dz.
 *
 * @param terms local, none of them a shell
 * @returns null where one of them cannot be followed
 *
 * Source: R. J. Glauber, in Lectures in Theoretical Physics, vol. 1 (1959), 315.
 */
export function eikonalPhase(
  terms: readonly Term[],
  { k, twoMuOverHbar2 }: Pick<MethodInput, 'k' | 'twoMuOverHbar2'>,
): EikonalPhase | null {
  const factor = -twoMuOverHbar2 / (2 * k);
  const parts: Part[] = [];
  for (const term of terms) {
    // A bare point charge is all tail.
    if (term.coulombTail !== 0 && term.norm === 0) continue;
    const line = lineOf(term);
    if (line === null) return null;
    parts.push({ re: factor * term.strength.re, im: factor * term.strength.im, line });
  }
  return {
    at: (b) => {
      let re = 0;
      let im = 0;
      for (const part of parts) {
        const length = part.line.at(b);
        re += part.re * length;
        im += part.im * length;
      }
      return { re, im };
    },
    relativeError: (places) => ROUNDING + SAFETY * worstOf(parts, places),
  };
}

function worstOf(parts: readonly Part[], places: readonly number[]): number {
  const checked = parts.filter(({ line }) => line.finer !== null);
  let worst = 0;
  for (const b of checked.length > 0 ? places : []) {
    let size = 0;
    let difference = 0;
    for (const { re, im, line } of parts) {
      const strength = Math.hypot(re, im);
      const length = line.at(b);
      size += strength * Math.abs(length);
      if (line.finer) difference += strength * Math.abs(line.finer(b) - length);
    }
    if (size > 0) worst = Math.max(worst, difference / size);
  }
  return worst;
}
