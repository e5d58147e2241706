import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DemoCase } from './scenario.ts';

const NUCLEAR_UNITS = { length: 'fm', area: 'barn', energy: 'MeV' };

const onCopper: CaseDocument = {
  projectile: { species: 'alpha' },
  target: { kind: 'custom', mass: { value: 63.546, unit: 'u' }, charge: 29, spin: 0 },
  energy: { value: 1, unit: 'MeV' },
  kinematics: 'nonrelativistic',
  interaction: { terms: [{ form: 'coulomb' }] },
  methods: ['born1'],
  angles: { unit: 'deg', values: [90, 110, 130, 150, 165, 170] },
  frame: 'lab',
  goldenRule: { theta: 170, boxSide: { value: 10, unit: 'pm' } },
  units: NUCLEAR_UNITS,
};

const copper: DemoCase = {
  title: 'Backscattering of 1 MeV alphas from copper',
  tags: ['alphas', 'copper', 'Rutherford', 'backscattering'],
  campaign: 'gold',
  versions: [
    {
      author: 'experimentalist',
      note: 'Shows the working number of backscattering, 4.392 barn/sr at 170 degrees in the lab with the recoil of the mean copper atom. The criterion fails, eta being 18, and yet first order is exact for two bare charges.',
      document: onCopper,
    },
  ],
};

const screenedGold: DemoCase = {
  title: '500 keV alphas on gold: the electrons of the atoms',
  tags: ['alphas', 'gold', 'screening', 'not valid'],
  campaign: 'gold',
  versions: [
    {
      author: 'experimentalist',
      note: 'Shows the electrons of both atoms by the universal screening: the total is finite, 16 per cent of the bare value is left at 0.01 degrees, and beyond 1 degree nothing is taken off. At this energy the true loss at wide angles is about 7 per cent (L’Ecuyer 1979): first order cannot see it and is not valid.',
      document: {
        projectile: { species: 'alpha' },
        target: { kind: 'nuclide', nuclide: 'Au-197' },
        energy: { value: 500, unit: 'keV' },
        kinematics: 'nonrelativistic',
        interaction: { terms: [{ form: 'universalIon', Z1: 2, Z2: 79 }] },
        methods: ['born1'],
        angles: {
          unit: 'deg',
          values: [0, 0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 30, 90, 165, 170],
        },
        frame: 'lab',
        goldenRule: { theta: 1, boxSide: { value: 1, unit: 'nm' } },
        units: { length: 'pm', area: 'barn', energy: 'keV' },
      },
    },
  ],
};

const protonsOnCarbon: DemoCase = {
  title: 'Protons on the carbon backing: where Rutherford ends',
  tags: ['protons', 'carbon', 'Rutherford', 'nuclear forces'],
  campaign: 'gold',
  versions: [
    {
      author: 'experimentalist',
      note: 'Shows the warning that decides: head-on the nuclei come to 4.7 fm, within reach of nuclear forces, so this Coulomb curve holds below about 61 degrees in the centre of mass only.',
      document: {
        projectile: { species: 'proton' },
        target: { kind: 'nuclide', nuclide: 'C-12' },
        energy: { value: 2, unit: 'MeV' },
        kinematics: 'nonrelativistic',
        interaction: { terms: [{ form: 'coulomb' }] },
        methods: ['born1'],
        angles: { unit: 'deg', from: 10, to: 170, count: 81 },
        frame: 'lab',
        goldenRule: { theta: 90, boxSide: { value: 10, unit: 'pm' } },
        units: NUCLEAR_UNITS,
      },
    },
  ],
};

const protonsOnHydrogen: DemoCase = {
  title: 'Protons on hydrogen: identical fermions',
  tags: ['protons', 'hydrogen', 'identical particles'],
  campaign: null,
  versions: [
    {
      author: 'theorist',
      note: 'Shows identical particles of spin 1/2: at 90 degrees the interference takes half of the sum of both directions and leaves 0.0207 barn/sr, exact for charges alone. The nuclear force, left out, rules wide angles at this energy.',
      document: {
        projectile: { species: 'proton' },
        target: { kind: 'species', species: 'proton' },
        energy: { value: 1, unit: 'MeV' },
        kinematics: 'nonrelativistic',
        interaction: { terms: [{ form: 'coulomb' }] },
        methods: ['born1'],
        angles: { unit: 'deg', from: 10, to: 170, count: 81 },
        frame: 'cm',
        goldenRule: { theta: 90, boxSide: { value: 10, unit: 'pm' } },
        units: NUCLEAR_UNITS,
      },
    },
  ],
};

export const LIGHT_ION_CASES: readonly DemoCase[] = [
  copper,
  screenedGold,
  protonsOnCarbon,
  protonsOnHydrogen,
];
