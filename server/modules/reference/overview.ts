import type { Overview } from '#shared/contracts/reference.ts';
import { FORMS } from '#server/physics/potentials/register.ts';
import { ELEMENTS } from '#server/physics/tables/elements.ts';
import { MATERIALS } from '#server/physics/tables/materials.ts';
import { NEUTRON_ENTRIES } from '#server/physics/tables/neutron-lengths.ts';
import { NUCLIDES } from '#server/physics/tables/nuclides.ts';
import { SPECIES } from '#server/physics/tables/species.ts';
import { HEADS } from './table-heads.ts';

export const OVERVIEW: Overview = {
  tables: [
    { ...HEADS.forms, entries: FORMS.length },
    { ...HEADS.species, entries: SPECIES.length },
    { ...HEADS.nuclides, entries: NUCLIDES.length },
    { ...HEADS.elements, entries: ELEMENTS.length },
    { ...HEADS.neutronLengths, entries: NEUTRON_ENTRIES.length },
    { ...HEADS.materials, entries: MATERIALS.length },
  ],
};
