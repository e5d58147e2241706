import type { Projectile, Target } from '#shared/contracts/estimates.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import type { Particle } from '#server/physics/problem.ts';
import { massMetBy, nuclide } from '#server/physics/tables/nuclides.ts';
import { species } from '#server/physics/tables/species.ts';
import type { Faults } from './faults.ts';

interface Custom {
  mass: Quantity;
  charge: number;
  spin: number;
}

function fromSpecies(key: string): Particle {
  const entry = species(key);
  return {
    label: entry.label,
    mass: entry.mass,
    charge: entry.charge,
    spin: entry.spin,
    identity: entry.identity,
    kind: entry.kind === 'lepton' ? 'lepton' : 'hadron',
    massNumber: entry.massNumber,
  };
}

function fromNuclide(name: string, otherCharge: number): Particle {
  const entry = nuclide(name);
  return {
    label: entry.name,
    mass: massMetBy(entry, otherCharge),
    charge: entry.atomicNumber,
    spin: entry.spin,
    identity: entry.name,
    kind: 'hadron',
    massNumber: entry.massNumber,
  };
}

function fromCustom({ mass, charge, spin }: Custom, path: string, faults: Faults): Particle {
  const value = toInternal(mass, 'mass');
  if (!(value > 0)) faults.add(`${path}/mass`, 'A mass must be above zero.');
  return {
    label: 'Custom particle',
    mass: value,
    charge,
    spin,
    identity: null,
    kind: 'custom',
    massNumber: null,
  };
}

/** A projectile given as a nuclide is a bare nucleus: what it meets is charged matter. */
export function toProjectile(sent: Projectile, faults: Faults): Particle | undefined {
  if ('nuclide' in sent) {
    return faults.within('/projectile/nuclide', () => fromNuclide(sent.nuclide, 1));
  }
  if (sent.species !== 'custom') return fromSpecies(sent.species);
  return fromCustom(sent, '/projectile', faults);
}

/** A target nuclide is a whole atom to a neutral projectile and a nucleus to a charged one. */
export function toTarget(
  sent: Target,
  projectileCharge: number,
  faults: Faults,
): Particle | undefined {
  switch (sent.kind) {
    case 'fixed':
      return {
        label: 'Fixed centre',
        mass: Infinity,
        charge: sent.charge,
        spin: null,
        identity: null,
        kind: 'fixed',
        massNumber: null,
      };
    case 'nuclide':
      return faults.within('/target/nuclide', () => fromNuclide(sent.nuclide, projectileCharge));
    case 'species':
      return fromSpecies(sent.species);
    case 'custom':
      return fromCustom(sent, '/target', faults);
  }
}
