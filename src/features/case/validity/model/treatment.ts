import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate, Projectile } from '#shared/contracts/estimates.ts';
import { massNumberOf } from '../../model/beam-context.ts';
import { computedOf } from './methods.ts';

const CHARGE_FORMS = ['coulomb', 'extendedCharge'];

/** Whether the potential falls as 1/r, so that phases are those beyond a point charge. */
export function hasCoulombTail({ interaction }: CaseDocument): boolean {
  return interaction.terms.some(
    (term) => CHARGE_FORMS.includes(term.form) || term['tail'] === 'coulomb',
  );
}

/** Whole spins make bosons: a nuclide has one where its mass number is even. */
function statistics(projectile: Projectile): 'bosons' | 'fermions' {
  if ('species' in projectile && projectile.species === 'custom') {
    return Number.isInteger(projectile.spin) ? 'bosons' : 'fermions';
  }
  const number = massNumberOf(projectile);
  return number === undefined || number % 2 === 1 ? 'fermions' : 'bosons';
}

function ofIdentical(document: CaseDocument, estimate: Estimate): string[] {
  if (!estimate.identical) return [];
  const kind = statistics(document.projectile);
  const coulomb = hasCoulombTail(document);
  const exact = computedOf(estimate, 'partialWaves') !== null;
  return [
    `Identical ${kind}: |f(θ)|² + |f(π−θ)|² and their interference with the spin weights, both particles counted; σ elastic is half the integral over the sphere.`,
    ...(coulomb && exact
      ? [
          'The exact curve interferes the two Coulomb amplitudes with their phases, as measured ones do; first order has no Coulomb phase.',
        ]
      : []),
    ...(coulomb && !exact
      ? [
          'The interference of two Coulomb amplitudes needs their phases, which first order does not have: take the exact method for it.',
        ]
      : []),
  ];
}

function ofSpin(document: CaseDocument, estimate: Estimate): string[] {
  const spinOrbit = document.interaction.terms.some(({ form }) => form === 'spinOrbit');
  if (!computedOf(estimate, 'partialWaves')) return [];
  return [
    spinOrbit
      ? 'Exact: the radial Schrödinger equation with this k and μ for j = l ± ½; spin beyond the spin-orbit term and the term in V² are left out.'
      : 'Exact: the radial Schrödinger equation with this k and μ; spin and the term in V² of a relativistic equation are left out.',
  ];
}

/** What stands behind the numbers of this case beside the potential: identity and spin, a sentence each. */
export function treatmentOf(document: CaseDocument, estimate: Estimate): string[] {
  return [...ofIdentical(document, estimate), ...ofSpin(document, estimate)];
}
