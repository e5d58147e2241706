import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DemoCase } from './scenario.ts';

const NUCLEAR_UNITS = { length: 'fm', area: 'barn', energy: 'MeV' };

const alphasOnGold: CaseDocument = {
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide: 'Au-197' },
  energy: { value: 5.486, unit: 'MeV' },
  kinematics: 'nonrelativistic',
  interaction: { terms: [{ form: 'coulomb' }] },
  methods: ['born1'],
  angles: { unit: 'deg', values: [15, 22.5, 30, 37.5, 45, 60, 75, 105, 120, 135, 150] },
  frame: 'cm',
  goldenRule: { theta: 60, boxSide: { value: 10, unit: 'pm' } },
  units: NUCLEAR_UNITS,
};

const gold: DemoCase = {
  title: 'Source alphas on a gold foil',
  tags: ['alphas', 'gold', 'Rutherford'],
  campaign: 'gold',
  versions: [
    {
      author: 'experimentalist',
      note: 'Shows the Rutherford law at the angles of the classical gold-foil counts, and that the total of a bare charge diverges. First order gives the exact curve although its criterion fails: an accident of the Coulomb field.',
      document: alphasOnGold,
    },
    {
      author: 'experimentalist',
      note: 'Angles and cross section in the lab, with the two backscattering detectors at 165 and 170 degrees.',
      document: {
        ...alphasOnGold,
        angles: { unit: 'deg', values: [15, 22.5, 30, 45, 60, 75, 105, 120, 135, 150, 165, 170] },
        frame: 'lab',
      },
    },
  ],
};

const hydrogen: DemoCase = {
  title: 'Hydrogen in the foil: alphas on protons',
  tags: ['alphas', 'hydrogen', 'two branches'],
  campaign: 'gold',
  versions: [
    {
      author: 'experimentalist',
      note: 'Shows both branches of a projectile heavier than its target: nothing beyond 14.6 degrees in the lab, two centre-of-mass angles below. Point charges only; the nuclear force is left out.',
      document: {
        projectile: { species: 'alpha' },
        target: { kind: 'species', species: 'proton' },
        energy: { value: 2, unit: 'MeV' },
        kinematics: 'nonrelativistic',
        interaction: { terms: [{ form: 'coulomb' }] },
        methods: ['born1'],
        angles: { unit: 'deg', from: 1, to: 20, count: 77 },
        frame: 'lab',
        goldenRule: { theta: 60, boxSide: { value: 10, unit: 'pm' } },
        units: NUCLEAR_UNITS,
      },
    },
  ],
};

const helium: DemoCase = {
  title: 'Alphas on helium: identical bosons',
  tags: ['alphas', 'helium', 'identical particles'],
  campaign: null,
  versions: [
    {
      author: 'theorist',
      note: 'Shows the symmetry about 90 degrees of identical particles at 1 MeV in the centre of mass. The interference of two Coulomb amplitudes needs a phase that first order does not have, and the warning says so.',
      document: {
        projectile: { species: 'alpha' },
        target: { kind: 'nuclide', nuclide: 'He-4' },
        energy: { value: 2, unit: 'MeV' },
        kinematics: 'nonrelativistic',
        interaction: { terms: [{ form: 'coulomb' }] },
        methods: ['born1'],
        angles: { unit: 'deg', from: 10, to: 170, count: 161 },
        frame: 'cm',
        goldenRule: { theta: 90, boxSide: { value: 10, unit: 'pm' } },
        units: NUCLEAR_UNITS,
      },
    },
  ],
};

export const ION_CASES: readonly DemoCase[] = [gold, hydrogen, helium];
