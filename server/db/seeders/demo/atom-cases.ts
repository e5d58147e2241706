import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import type { DemoCase } from './scenario.ts';

/** Electrons on an atom that is heavy enough to stand still, in nonrelativistic kinematics. */
function onAtom(
  energy: CaseDocument['energy'],
  terms: InteractionTerm[],
  changes: Partial<CaseDocument> = {},
): CaseDocument {
  return {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy,
    kinematics: 'nonrelativistic',
    interaction: { terms },
    methods: ['born1'],
    angles: { unit: 'deg', from: 0, to: 180, count: 91 },
    frame: 'cm',
    goldenRule: { theta: 20, boxSide: { value: 20, unit: 'nm' } },
    units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
    ...changes,
  };
}

const TOP_OF_GUN = { value: 10, unit: 'keV' };
const relativistic: Partial<CaseDocument> = { kinematics: 'relativistic' };
const tabulatedAtom = (element: string): InteractionTerm[] => [{ form: 'atomicElectron', element }];

const carbon: DemoCase = {
  title: 'Carbon film at the top of the gun: Molière against the tabulated atom',
  tags: ['electrons', 'carbon', 'screening', 'model comparison'],
  campaign: 'carbon',
  versions: [
    {
      author: 'theorist',
      note: 'Shows Molière’s screening on a light atom: a forward amplitude of 6.57 angstrom, two and a half times that of the tabulated atom in the next version. The form is made for heavy atoms and is poor near the forward direction.',
      document: onAtom(TOP_OF_GUN, [{ form: 'moliere', Z: 6 }], {
        ...relativistic,
        target: { kind: 'fixed', charge: 6 },
      }),
    },
    {
      author: 'theorist',
      note: 'The atom of the International Tables instead: 0.0642 against 0.1003 square angstrom elastic, while the momentum-transfer cross section moves by half a per cent. The models part in the forward cone; beyond 22 degrees they agree within 4 per cent.',
      document: onAtom(TOP_OF_GUN, tabulatedAtom('C'), relativistic),
    },
  ],
};

const substrates: DemoCase = {
  title: 'Backings for the carbon film: aluminium and gold',
  tags: ['electrons', 'aluminium', 'gold', 'foil', 'tabulated atom'],
  campaign: 'carbon',
  versions: [
    {
      author: 'experimentalist',
      note: 'Shows what an aluminium backing adds, 0.204 square angstrom per atom, three times carbon. At Z = 13 first order already scatters more in one partial wave than comes in, so it is not valid.',
      document: onAtom(TOP_OF_GUN, tabulatedAtom('Al'), relativistic),
    },
    {
      author: 'experimentalist',
      note: 'Gold instead: 2.32 square angstrom per atom, 36 times carbon, with one partial wave overdrawn sevenfold. Enough to choose a foil by, not to be quoted.',
      document: onAtom(TOP_OF_GUN, tabulatedAtom('Au'), relativistic),
    },
  ],
};

/** V(r) = -e²(1/r + 1/a0) exp(-2r/a0): the proton and its 1s electron. */
const HYDROGEN: InteractionTerm[] = [
  { form: 'yukawa', V0: { value: -2, unit: 'hartree' }, a: { value: 0.5, unit: 'bohr' } },
  { form: 'exponential', V0: { value: -1, unit: 'hartree' }, a: { value: 0.5, unit: 'bohr' } },
];

const hydrogen: DemoCase = {
  title: 'Electrons of 200 eV on atomic hydrogen: the static field',
  tags: ['electrons', 'hydrogen', 'static potential', 'textbook'],
  campaign: 'carbon',
  versions: [
    {
      author: 'theorist',
      note: 'Shows a textbook potential as a sum of two terms, -e²(1/r + 1/a0) exp(-2r/a0): a forward amplitude of one Bohr radius and 0.484 bohr² elastic, as the closed form has it. Exchange and polarisation of the atom are left out.',
      document: onAtom({ value: 200, unit: 'eV' }, HYDROGEN, {
        units: { length: 'bohr', area: 'bohr2', energy: 'eV' },
      }),
    },
  ],
};

/** Polarizability of argon; the cut-off is about the size of the atom. */
const POLARIZATION: InteractionTerm = {
  form: 'polarization',
  alpha: { value: 11.08, unit: 'bohr3' },
  d: { value: 2, unit: 'bohr' },
};
const onArgon = (terms: InteractionTerm[]): CaseDocument =>
  onAtom({ value: 50, unit: 'eV' }, terms, {
    goldenRule: { theta: 20, boxSide: { value: 100, unit: 'nm' } },
  });

const argon: DemoCase = {
  title: 'The polarisation of argon felt by slow electrons',
  tags: ['electrons', 'argon', 'polarization', 'gas', 'not valid'],
  campaign: null,
  versions: [
    {
      author: 'theorist',
      note: 'Shows a criterion passed and a case missed: polarisation alone is weak enough at 50 eV, the slowest beam of the gun, but it is not the argon atom. The cut-off of 2 bohr is a guess.',
      document: onArgon([POLARIZATION]),
    },
    {
      author: 'theorist',
      note: 'With the static field of the atom added the elastic cross section rises from 0.57 to 55 square angstrom and the verdict falls to not valid: slow electrons on argon are beyond first order, and the figures only say so.',
      document: onArgon([POLARIZATION, ...tabulatedAtom('Ar')]),
    },
  ],
};

export const ATOM_CASES: readonly DemoCase[] = [carbon, substrates, hydrogen, argon];
