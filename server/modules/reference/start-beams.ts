import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { FormParameterInfo } from '#shared/contracts/forms.ts';

/** Beam and target of a document. */
export type Beam = Pick<CaseDocument, 'projectile' | 'target' | 'energy'> &
  Partial<Pick<CaseDocument, 'kinematics'>>;

export interface FormBeam {
  beam: Beam;
  /** Which units its numbers are read in. */
  scale: 'atom' | 'nucleus' | 'neutron';
  /** Whether the forward angle has a cross section. */
  forward: boolean;
}

const CENTRE = { kind: 'fixed', charge: 0 } as const;
const alphaOnGold: Beam = {
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide: 'Au-197' },
  energy: { value: 2, unit: 'MeV' },
};
const electronOn = (charge: number, value: number, unit: string): Beam => ({
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge },
  energy: { value, unit },
});

/** Forms that are made for one kind of collision. */
const MADE_FOR: Readonly<Record<string, FormBeam>> = {
  coulomb: { beam: alphaOnGold, scale: 'nucleus', forward: false },
  screenedCoulomb: { beam: electronOn(6, 10, 'keV'), scale: 'atom', forward: true },
  moliere: { beam: electronOn(6, 10, 'keV'), scale: 'atom', forward: true },
  atomicElectron: { beam: electronOn(0, 10, 'keV'), scale: 'atom', forward: true },
  krc: { beam: alphaOnGold, scale: 'atom', forward: true },
  universalIon: { beam: alphaOnGold, scale: 'atom', forward: true },
  polarization: { beam: electronOn(0, 50, 'eV'), scale: 'atom', forward: true },
  extendedCharge: {
    beam: { ...electronOn(20, 250, 'MeV'), kinematics: 'relativistic' },
    scale: 'nucleus',
    forward: false,
  },
  contact: {
    beam: {
      projectile: { species: 'neutron' },
      target: CENTRE,
      energy: { value: 25.3, unit: 'meV' },
    },
    scale: 'neutron',
    forward: true,
  },
};

const isNuclear = ({ default: start }: FormParameterInfo): boolean =>
  typeof start === 'object' &&
  'unit' in start &&
  typeof start.unit === 'string' &&
  /MeV|fm/.test(String(start.unit));

/** The collision a form is shown with: its own, or by the scale of its defaults electrons of 100 eV or neutrons of 50 MeV. */
export function beamFor(key: string, parameters: readonly FormParameterInfo[]): FormBeam {
  const own = MADE_FOR[key];
  if (own) return own;
  if (!parameters.some(isNuclear)) {
    return { beam: electronOn(0, 100, 'eV'), scale: 'atom', forward: true };
  }
  const beam: Beam = {
    projectile: { species: 'neutron' },
    target: CENTRE,
    energy: { value: 50, unit: 'MeV' },
  };
  return { beam, scale: 'nucleus', forward: true };
}
