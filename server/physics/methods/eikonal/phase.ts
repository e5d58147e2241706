import type { Complex, Term } from '#server/physics/potentials/types.ts';
import type { MethodInput } from '../method-input.ts';
import { lineOf, type Line } from './line-integrals.ts';

/** chi(b), rad, and a bound of its error; the imaginary part is positive where particles are removed. */
export interface Phase extends Complex {
  error: number;
}

interface Part {
  re: number;
  im: number;
  line: Line;
}

/**
 * Eikonal phase of a sum of terms without their Coulomb tails and without delta shells.
 *
 * Formula: chi(b) = -(1/2k) ∫ U(√(b² + z²)) dz = -(1/hbar v) ∫ V dz.
 *
 * @param terms local ones
 * @returns phase, kept for every b at which it was asked; null where a term cannot be followed
 *
 * Source: R. J. Glauber, High-Energy Collision Theory (Interscience, 1959), 315.
 */
export function eikonalPhase(
  terms: readonly Term[],
  { k, twoMuOverHbar2 }: Pick<MethodInput, 'k' | 'twoMuOverHbar2'>,
): ((b: number) => Phase) | null {
  const factor = -twoMuOverHbar2 / (2 * k);
  const parts: Part[] = [];
  for (const term of terms) {
    // A bare point charge is all tail, and a shell is no function of r.
    if ((term.coulombTail !== 0 && term.norm === 0) || term.v === null) continue;
    const line = lineOf(term);
    if (line === null) return null;
    parts.push({ re: factor * term.strength.re, im: factor * term.strength.im, line });
  }
  const known = new Map<number, Phase>();
  return (b) => {
    const found = known.get(b) ?? phaseAt(parts, b);
    known.set(b, found);
    return found;
  };
}

function phaseAt(parts: readonly Part[], b: number): Phase {
  const sum = { re: 0, im: 0, error: 0 };
  for (const { re, im, line } of parts) {
    const { value, error } = line.at(b);
    sum.re += re * value;
    sum.im += im * value;
    sum.error += Math.hypot(re, im) * error;
  }
  return sum;
}
