import type { z } from 'zod';
import type { SpeciesItem, speciesQuerySchema } from '#shared/contracts/reference.ts';
import { CONSTANTS } from '#server/physics/constants/codata2022.ts';
import { SPECIES } from '#server/physics/tables/species.ts';
import type { Species } from '#server/physics/tables/species.ts';
import { fitting, rank } from './match.ts';
import { ordered, pageOf } from './paging.ts';
import { HEADS } from './table-heads.ts';

const MASSES: Readonly<Record<string, { uncertainty: number }>> = {
  electron: CONSTANTS.electronMass,
  positron: CONSTANTS.electronMass,
  'muon-': CONSTANTS.muonMass,
  'muon+': CONSTANTS.muonMass,
  proton: CONSTANTS.protonMass,
  neutron: CONSTANTS.neutronMass,
  deuteron: CONSTANTS.deuteronMass,
  triton: CONSTANTS.tritonMass,
  helion: CONSTANTS.helionMass,
  alpha: CONSTANTS.alphaMass,
};

/** Other ways to write a particle. */
const ALIASES: Readonly<Record<string, readonly string[]>> = {
  electron: ['e', 'e-', 'beta-', 'β⁻'],
  positron: ['e+', 'beta+', 'β⁺'],
  'muon-': ['mu', 'mu-', 'µ⁻'],
  'muon+': ['mu+', 'µ⁺'],
  proton: ['p', 'hydrogen nucleus'],
  neutron: ['n'],
  deuteron: ['d', 'deuterium nucleus'],
  triton: ['t', 'tritium nucleus'],
  helion: ['h', '3He'],
  alpha: ['α', '4He'],
};

const EV_PER_MEV = 1e6;
/** The shift of the decimal point must not add digits that nobody measured. */
const inMeV = (eV: number): number => Number((eV / EV_PER_MEV).toPrecision(15));

export function presentSpecies(entry: Species): SpeciesItem {
  const { key, label, kind, charge, spin, nuclide } = entry;
  const uncertainty = MASSES[key]?.uncertainty;
  return {
    key,
    label,
    kind,
    mass: {
      value: inMeV(entry.mass),
      unit: 'MeV',
      ...(uncertainty !== undefined && { uncertainty: inMeV(uncertainty) }),
    },
    charge,
    spin,
    nuclide,
  };
}

export function rankSpecies(q: string, { key, label, kind, nuclide }: Species): number | null {
  const names = [key, label, ...(ALIASES[key] ?? []), ...(nuclide === null ? [] : [nuclide])];
  return rank(q, { names, words: `${kind} particle` });
}

export function listSpecies(query: z.output<typeof speciesQuerySchema>) {
  const found = fitting(SPECIES, (entry) => rankSpecies(query.q ?? '', entry));
  const sorted = ordered(found.map(presentSpecies), query.sort, {
    label: (item) => item.label,
    mass: (item) => item.mass.value,
    charge: (item) => item.charge,
    spin: (item) => item.spin,
  });
  return { ...pageOf(sorted, query), table: HEADS.species };
}
