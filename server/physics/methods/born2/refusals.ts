import type { Term } from '#server/physics/potentials/types.ts';
import type { MethodInput } from '../method-input.ts';

const isActive = ({ strength }: Term) => strength.re !== 0 || strength.im !== 0;

/** Why one term has no second order at wave number k; null where it has. */
function reasonOf(term: Term, k: number): string | null {
  if (term.noBorn !== undefined) return term.noBorn;
  if (term.tail === 'point') {
    return 'The contact interaction is made for first order alone: its second order is infinite.';
  }
  if (term.form === 'spinOrbit') {
    return 'The second Born amplitude is computed without spin; take partial waves for the spin-orbit term.';
  }
  if (term.tail === 'power') {
    return `The second-order waves of the ${term.form} form, whose tail falls as a power of r, die away too slowly to be summed.`;
  }
  const [fittedTo] = term.kinks ?? [];
  if (fittedTo !== undefined && 2 * k > fittedTo) {
    return `The potential of the ${term.form} form is known up to q = ${fittedTo.toPrecision(3)} per angstrom, and this energy reaches q = ${(2 * k).toPrecision(3)}: second order needs the potential itself. Take moliere or screenedCoulomb.`;
  }
  if (term.v === null && term.form !== 'deltaShell') {
    return term.noFunction ?? `The ${term.form} form has no potential as a function of r.`;
  }
  return null;
}

/**
 * Why the second Born amplitude cannot be given; null where it can.
 *
 * A Coulomb tail that no other cancels has no second order: the integral diverges with the screening length.
 */
export function whyNoSecondBorn({ terms, born, k }: MethodInput): string | null {
  for (const term of terms) {
    const reason = isActive(term) ? reasonOf(term, k) : null;
    if (reason !== null) return reason;
  }
  if (born.tail.re !== 0 || born.tail.im !== 0) {
    return 'The second Born amplitude of a Coulomb tail diverges: its phase grows without end with the distance. Screen the charge, or take partial waves or the eikonal.';
  }
  return null;
}
