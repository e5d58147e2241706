import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import type { DemoCase } from './scenario.ts';

/** The thermal port at 1.8 angstrom, on a nucleus that is bound unless `changes` say otherwise. */
function atThermalPort(term: InteractionTerm, changes: Partial<CaseDocument> = {}): CaseDocument {
  return {
    projectile: { species: 'neutron' },
    target: { kind: 'fixed', charge: 0 },
    energy: { value: 25.24821303539516, unit: 'meV' },
    entered: { '/energy': '1.8 angstrom' },
    kinematics: 'nonrelativistic',
    interaction: { terms: [term] },
    methods: ['born1'],
    angles: { unit: 'deg', from: 0, to: 180, count: 37 },
    frame: 'cm',
    goldenRule: { theta: 90, boxSide: { value: 100, unit: 'nm' } },
    units: { length: 'fm', area: 'barn', energy: 'meV' },
    ...changes,
  };
}

const vanadium: DemoCase = {
  title: 'Vanadium, the standard of the thermal port',
  tags: ['neutrons', 'vanadium', 'incoherent', 'standard'],
  campaign: 'neutrons',
  versions: [
    {
      author: 'theorist',
      note: 'Shows why vanadium is the standard of a neutron port: the same in every direction, and 5.08 of its 5.10 barn are incoherent, so that a powder shows hardly a peak.',
      document: atThermalPort({ form: 'contact', element: 'V' }),
    },
  ],
};

const nickel: DemoCase = {
  title: 'Nickel by element and by isotope',
  tags: ['neutrons', 'nickel', 'isotopes', 'scattering length'],
  campaign: 'neutrons',
  versions: [
    {
      author: 'theorist',
      note: 'Shows the natural element: 13.33 barn coherent from its mean length, and 5.20 incoherent because its isotopes differ. The case with the length typed in has the coherent part alone.',
      document: atThermalPort({ form: 'contact', element: 'Ni' }),
    },
    {
      author: 'theorist',
      note: 'Ni-58 alone, the most abundant isotope: 14.4 fm and 26.06 barn, all of it coherent.',
      document: atThermalPort({ form: 'contact', nuclide: 'Ni-58' }),
    },
    {
      author: 'theorist',
      note: 'Ni-62 has a negative length, -8.7 fm, and 9.51 barn: the amplitude changes its sign, and a mixture of isotopes can be made that scatters no coherent wave.',
      document: atThermalPort({ form: 'contact', nuclide: 'Ni-62' }),
    },
  ],
};

const hydrogen: DemoCase = {
  title: 'Hydrogen, bound and free',
  tags: ['neutrons', 'hydrogen', 'incoherent', 'recoil'],
  campaign: 'neutrons',
  versions: [
    {
      author: 'theorist',
      note: 'Shows hydrogen bound in a heavy sample: 82.0 barn, 80.3 of them incoherent, which is the background of every sample with hydrogen in it.',
      document: atThermalPort({ form: 'contact', nuclide: 'H-1' }),
    },
    {
      author: 'theorist',
      note: 'The free atom recoils: a quarter of that, 20.5 barn. In the lab nothing comes beyond 87.7 degrees, since the neutron is a little heavier than the atom.',
      document: atThermalPort(
        { form: 'contact', nuclide: 'H-1' },
        {
          target: { kind: 'nuclide', nuclide: 'H-1' },
          frame: 'lab',
          angles: { unit: 'deg', from: 0, to: 87, count: 30 },
        },
      ),
    },
  ],
};

const hardSphere: DemoCase = {
  title: 'A hard sphere under slow neutrons: no first order',
  tags: ['neutrons', 'hard sphere', 'exact only'],
  campaign: null,
  versions: [
    {
      author: 'theorist',
      note: 'Shows a refusal with its reason: an infinite wall has no first order, however small it is. The exact value for slow neutrons is 4 pi R squared, 13.3 barn, that of a contact interaction whose length is R.',
      document: atThermalPort({ form: 'hardSphere', R: { value: 10.3, unit: 'fm' } }),
    },
  ],
};

export const SAMPLE_CASES: readonly DemoCase[] = [vanadium, nickel, hydrogen, hardSphere];
