import {
  ALPHA_MASS,
  DEUTERON_MASS,
  ELECTRON_MASS,
  HELION_MASS,
  MUON_MASS,
  NEUTRON_MASS,
  PROTON_MASS,
  TRITON_MASS,
} from '#server/physics/constants/codata2022.ts';
import { DomainError } from '#shared/errors.ts';

export interface Species {
  key: string;
  label: string;
  /** mc², eV. */
  mass: number;
  charge: number;
  spin: number;
  /** A lepton feels electrostatic forms as a Dirac particle. */
  kind: 'lepton' | 'nucleon' | 'nucleus';
  /** Mass number; null for leptons. */
  massNumber: number | null;
  /** The nuclide this is the bare nucleus of. */
  nuclide: string | null;
  /** Equal for identical particles: the nuclide where there is one (alpha is He-4), else the key. A nuclide's identity is its name. */
  identity: string;
}

const lepton = (key: string, label: string, mass: number, charge: number): Species => ({
  key,
  label,
  mass,
  charge,
  spin: 0.5,
  kind: 'lepton',
  massNumber: null,
  nuclide: null,
  identity: key,
});

const nucleus = (
  key: string,
  label: string,
  mass: number,
  [charge, massNumber, spin]: [number, number, number],
  nuclide: string | null,
): Species => ({
  key,
  label,
  mass,
  charge,
  spin,
  kind: massNumber === 1 ? 'nucleon' : 'nucleus',
  massNumber,
  nuclide,
  identity: nuclide ?? key,
});

/** Particles a beam or target may be made of by name; masses are those of CODATA 2022. */
export const SPECIES: readonly Species[] = [
  lepton('electron', 'Electron', ELECTRON_MASS, -1),
  lepton('positron', 'Positron', ELECTRON_MASS, 1),
  lepton('muon-', 'Muon (−)', MUON_MASS, -1),
  lepton('muon+', 'Muon (+)', MUON_MASS, 1),
  nucleus('proton', 'Proton', PROTON_MASS, [1, 1, 0.5], 'H-1'),
  nucleus('neutron', 'Neutron', NEUTRON_MASS, [0, 1, 0.5], null),
  nucleus('deuteron', 'Deuteron', DEUTERON_MASS, [1, 2, 1], 'H-2'),
  nucleus('triton', 'Triton', TRITON_MASS, [1, 3, 0.5], 'H-3'),
  nucleus('helion', 'Helion (³He nucleus)', HELION_MASS, [2, 3, 0.5], 'He-3'),
  nucleus('alpha', 'Alpha particle', ALPHA_MASS, [2, 4, 0], 'He-4'),
];

const BY_KEY: ReadonlyMap<string, Species> = new Map(SPECIES.map((entry) => [entry.key, entry]));
const BY_NUCLIDE: ReadonlyMap<string, Species> = new Map(
  SPECIES.flatMap((entry) => (entry.nuclide === null ? [] : [[entry.nuclide, entry] as const])),
);

/** The species of this name. Throws DomainError('invalidInput') with the names there are. */
export function species(key: string): Species {
  const found = BY_KEY.get(key);
  if (found) return found;
  throw new DomainError(
    'invalidInput',
    `\`${key}\` is not a known particle. Known: ${[...BY_KEY.keys()].join(', ')}; any nucleus as {"nuclide": "C-12"}, anything else as a custom particle.`,
  );
}

/** The species that is the bare nucleus of this nuclide (alpha of He-4), or null. */
export function speciesOfNuclide(nuclide: string): Species | null {
  return BY_NUCLIDE.get(nuclide) ?? null;
}
