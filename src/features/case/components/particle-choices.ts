import { SPECIES } from '#shared/contracts/estimates.ts';
import type { Species } from '#shared/contracts/estimates.ts';

const LEPTONS: readonly Species[] = ['electron', 'positron', 'muon-', 'muon+'];

const choice = (value: Species) => ({ value, label: value });

/** The species in two groups, as menus show them. */
export const SPECIES_CHOICES: ReadonlyArray<{
  group: string;
  choices: ReadonlyArray<{ value: Species; label: string }>;
}> = [
  { group: 'Leptons', choices: LEPTONS.map(choice) },
  {
    group: 'Nuclei and nucleons',
    choices: SPECIES.filter((species) => !LEPTONS.includes(species)).map(choice),
  },
];

/** What a custom particle begins with, until the person says otherwise. */
export const CUSTOM = { mass: { value: 1, unit: 'u' }, charge: 1, spin: 0 } as const;
