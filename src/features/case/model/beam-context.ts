import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Projectile } from '#shared/contracts/estimates.ts';
import { energyFromWavelength } from '#shared/units/de-broglie.ts';
import { parseQuantity } from '#shared/units/parse.ts';
import type { ParseContext } from '#shared/units/parse.ts';
import { toInternal } from '#shared/units/quantity.ts';

const MASS_NUMBERS: Readonly<Record<string, number>> = {
  proton: 1,
  neutron: 1,
  deuteron: 2,
  triton: 3,
  helion: 3,
  alpha: 4,
};
const CHARGES: Readonly<Record<string, number>> = {
  electron: -1,
  positron: 1,
  'muon-': -1,
  'muon+': 1,
  proton: 1,
  neutron: 0,
  deuteron: 1,
  triton: 1,
  helion: 2,
  alpha: 2,
};

export function massNumberOf(projectile: Projectile): number | undefined {
  if (!('nuclide' in projectile)) return MASS_NUMBERS[projectile.species];
  const match = /-(\d+)$/.exec(projectile.nuclide);
  return match ? Number(match[1]) : undefined;
}

/** What a field for the energy of this beam understands; `mass` (mc² in eV) is what a wavelength needs. */
export function beamContext(document: CaseDocument, mass: number | undefined): ParseContext {
  const { projectile } = document;
  const regime = document.kinematics ?? 'nonrelativistic';
  const massNumber = massNumberOf(projectile);
  const charge =
    'nuclide' in projectile
      ? undefined
      : projectile.species === 'custom'
        ? projectile.charge
        : CHARGES[projectile.species];
  return {
    unit: document.energy.unit,
    ...(massNumber === undefined ? {} : { massNumber }),
    ...(charge === undefined ? {} : { charge }),
    ...(mass === undefined
      ? {}
      : {
          wavelengthToEnergy: (wavelength: number) =>
            energyFromWavelength(wavelength, mass, regime),
        }),
  };
}

/** Rest energy in eV of a custom particle; the engine is asked for all others. */
export function ownMass(projectile: Projectile): number | undefined {
  return 'species' in projectile && projectile.species === 'custom'
    ? toInternal(projectile.mass, 'mass')
    : undefined;
}

/** A text that means an energy only once the particle is known: a wavelength, an energy per nucleon, a voltage. */
export function dependsOnParticle(text: string): boolean {
  return !parseQuantity(text, 'energy', { unit: 'eV' }).ok;
}

export function isWavelength(text: string): boolean {
  return parseQuantity(text, 'length').ok;
}

/**
 * Rest energy mc² in eV from speed v/c and kinetic energy in eV: 2T/β² without relativity, T(γ + 1)/(γβ)² with it.
 * The engine holds the one table of masses; its answer gives every digit back.
 */
export function massFromSpeed(energy: number, beta: number): number {
  return (2 * energy) / beta ** 2;
}
