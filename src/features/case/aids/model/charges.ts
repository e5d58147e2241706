import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Projectile, Target } from '#shared/contracts/estimates.ts';

const NEUTRAL = 'neutron';
const BY_CHARGE = [
  'coulomb',
  'screenedCoulomb',
  'moliere',
  'krc',
  'universalIon',
  'extendedCharge',
];

function projectileCharged(projectile: Projectile): boolean {
  if ('nuclide' in projectile) return true;
  return projectile.species === 'custom' ? projectile.charge !== 0 : projectile.species !== NEUTRAL;
}

function targetCharged(target: Target): boolean {
  if (target.kind === 'nuclide') return true;
  if (target.kind === 'species') return target.species !== NEUTRAL;
  return target.charge !== 0;
}

/** Whether two charges may meet, so that a point-charge cross section is worth asking for; the engine knows. */
export function mayHaveCharges({ projectile, target, interaction }: CaseDocument): boolean {
  if (projectileCharged(projectile) && targetCharged(target)) return true;
  return interaction.terms.some(
    ({ form, ...term }) => BY_CHARGE.includes(form) && ('chargeProduct' in term || 'Z1' in term),
  );
}
