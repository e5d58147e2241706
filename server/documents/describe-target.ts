import type { Projectile, Target } from '#shared/contracts/estimates.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { plainNumber, plainQuantity } from './plain-quantity.ts';

const SPECIES_NAMES: Partial<Record<string, string>> = { 'muon-': 'µ⁻', 'muon+': 'µ⁺' };

const speciesName = (species: string): string => SPECIES_NAMES[species] ?? species;
const signed = (charge: number): string =>
  charge > 0 ? `+${plainNumber(charge)}` : plainNumber(charge);
const spinText = (spin: number): string =>
  Number.isInteger(spin) ? plainNumber(spin) : `${plainNumber(2 * spin)}/2`;

function customParticle(particle: { mass: Quantity; charge: number; spin: number }): string {
  const { mass, charge, spin } = particle;
  return `custom (${plainQuantity(mass)}, charge ${signed(charge)}, spin ${spinText(spin)})`;
}

/** The particle of the beam by the name the trade uses. */
export function describeProjectile(projectile: Projectile): string {
  if ('nuclide' in projectile) return projectile.nuclide;
  return projectile.species === 'custom'
    ? customParticle(projectile)
    : speciesName(projectile.species);
}

export function describeTarget(target: Target): string {
  switch (target.kind) {
    case 'fixed':
      return target.charge === 0 ? 'fixed centre' : `fixed centre, charge ${signed(target.charge)}`;
    case 'nuclide':
      return target.nuclide;
    case 'species':
      return speciesName(target.species);
    case 'custom':
      return customParticle(target);
  }
}
