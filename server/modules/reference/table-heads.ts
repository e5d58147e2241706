import type { TableHead } from '#shared/contracts/reference.ts';
import { CONSTANTS, CONSTANTS_EDITION } from '#server/physics/constants/codata2022.ts';
import * as elements from '#server/physics/tables/elements.ts';
import * as materials from '#server/physics/tables/materials.ts';
import * as neutrons from '#server/physics/tables/neutron-lengths.ts';
import * as charges from '#server/physics/tables/nuclear-charge.ts';
import * as nuclides from '#server/physics/tables/nuclides.ts';
import { ENGINE } from '#server/physics/version.ts';

/** Every table the Reference shows, with what must be cited beside its numbers. */
export const HEADS = {
  forms: {
    key: 'forms',
    title: 'Interaction forms',
    edition: `Register of engine ${ENGINE.version}`,
    source: 'Each form names its own',
    licence: 'MIT, as the engine',
    notes: [
      'A closed transform is used where there is one, and an oscillatory quadrature checks it; where digits would be lost, the quadrature takes over.',
      'An interaction is a sum of terms: amplitudes add before they are squared.',
    ],
  },
  species: {
    key: 'species',
    title: 'Particles',
    edition: CONSTANTS_EDITION,
    source: CONSTANTS.protonMass.source,
    licence: 'Numbers with their published source',
    notes: [
      'Masses are mc². Brackets hold the standard uncertainty of the last digits.',
      'Any other nucleus is a nuclide; anything else is entered as a custom particle.',
    ],
  },
  nuclides: {
    key: 'nuclides',
    title: 'Nuclides',
    edition: nuclides.NUCLIDES_EDITION,
    source: nuclides.NUCLIDES_SOURCE,
    licence: nuclides.NUCLIDES_LICENCE,
    notes: [
      'Masses are of the neutral atom. A charged projectile meets the nucleus: the electrons are taken off, their binding energy is not.',
      `Left out: ${nuclides.NUCLIDES_LEFT_OUT.charAt(0).toLowerCase()}${nuclides.NUCLIDES_LEFT_OUT.slice(1)}.`,
    ],
  },
  elements: {
    key: 'elements',
    title: 'Elements',
    edition: elements.ELEMENTS_EDITION,
    source: elements.ELEMENTS_SOURCE,
    licence: elements.ELEMENTS_LICENCE,
    notes: [...elements.ELEMENTS_NOTES],
  },
  neutronLengths: {
    key: 'neutronLengths',
    title: 'Neutron lengths',
    edition: neutrons.NEUTRON_EDITION,
    source: neutrons.NEUTRON_SOURCE,
    licence: neutrons.NEUTRON_LICENCE,
    notes: [
      'Bound lengths b = b′ − i b″ and bound cross sections. f = −b for a nucleus held in place; a free one scatters with b M/(m + M).',
      'Absorption is that at 1.798 Å (2200 m/s) and proportional to the wavelength, except where a resonance is named.',
      'This edition has isotopes, uncertainties and lengths revised since Sears (1992). Lengths were renewed and cross sections were not: where the two disagree by more than 3 %, the entry says so.',
    ],
  },
  materials: {
    key: 'materials',
    title: 'Materials',
    edition: materials.MATERIALS_EDITION,
    source: materials.MATERIALS_SOURCE,
    licence: materials.MATERIALS_LICENCE,
    notes: [...materials.MATERIALS_NOTES],
  },
  nuclearCharge: {
    key: 'nuclearCharge',
    title: 'Nuclear charge radii',
    edition: charges.NUCLEAR_CHARGE_EDITION,
    source: charges.NUCLEAR_CHARGE_SOURCE,
    licence: charges.NUCLEAR_CHARGE_LICENCE,
    notes: [],
  },
} satisfies Record<string, TableHead>;
