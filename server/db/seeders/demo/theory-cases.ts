import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DemoCase } from './scenario.ts';

const NUCLEAR_UNITS = { length: 'fm', area: 'barn', energy: 'MeV' };

const onAluminium: CaseDocument = {
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 13 },
  energy: { value: 1, unit: 'MeV' },
  kinematics: 'relativistic',
  interaction: { terms: [{ form: 'coulomb' }] },
  methods: ['born1'],
  angles: { unit: 'deg', from: 5, to: 180, count: 176 },
  frame: 'lab',
  goldenRule: { theta: 90, boxSide: { value: 100, unit: 'pm' } },
  units: NUCLEAR_UNITS,
};
const recoiling: CaseDocument = {
  ...onAluminium,
  target: { kind: 'nuclide', nuclide: 'Al-27' },
};

const mott: DemoCase = {
  title: '1 MeV electrons on aluminium: the spin of the electron',
  tags: ['electrons', 'aluminium', 'relativistic', 'Mott'],
  campaign: 'theory',
  versions: [
    {
      author: 'theorist',
      note: 'Shows the spin of a fast electron on a fixed charge, the factor 1 - beta² sin²(theta/2): 1.0903 barn/sr at 90 degrees where a particle without spin would give 1.957, and a ninth of it straight back. Far above our gun.',
      document: onAluminium,
    },
    {
      author: 'theorist',
      note: 'Al-27 free to recoil: no value of the curve moves by more than 1.2 parts in 10,000.',
      document: recoiling,
    },
    {
      author: 'theorist',
      note: 'With the correction of McKinley and Feshbach, asked for by name: 10 per cent more at 90 degrees, nothing at 180. Alpha times Z is 0.095, within its range.',
      document: { ...recoiling, corrections: ['mckinleyFeshbach'] },
    },
  ],
};

function onCalcium(kind: string, radius: number, diffuseness?: number): CaseDocument {
  const fm = (value: number) => ({ value, unit: 'fm' });
  return {
    projectile: { species: 'electron' },
    target: { kind: 'nuclide', nuclide: 'Ca-40' },
    energy: { value: 250, unit: 'MeV' },
    kinematics: 'relativistic',
    interaction: {
      terms: [
        {
          form: 'extendedCharge',
          kind,
          radius: fm(radius),
          ...(diffuseness !== undefined && { diffuseness: fm(diffuseness) }),
        },
      ],
    },
    methods: ['born1'],
    angles: { unit: 'deg', from: 10, to: 120, count: 221 },
    frame: 'lab',
    goldenRule: { theta: 45, boxSide: { value: 1, unit: 'pm' } },
    units: { length: 'fm', area: 'millibarn', energy: 'MeV' },
  };
}

const calcium: DemoCase = {
  title: '250 MeV electrons on Ca-40: the shape of its charge',
  tags: ['electrons', 'calcium', 'relativistic', 'form factor', 'diffraction'],
  campaign: 'theory',
  versions: [
    {
      author: 'theorist',
      note: 'Shows diffraction by a sharp sphere of charge with the tabulated rms radius, 3.478 fm: two minima in reach, at 46.5 and 85.5 degrees, where qR solves tan x = x. First order leaves them empty; the distortion of the wave would fill them.',
      document: onCalcium('uniformSphere', 4.4896),
    },
    {
      author: 'theorist',
      note: 'The same rms radius with a surface of 0.55 fm: the minima move out to 55 and 107.5 degrees, and the maximum between them is eleven times lower. The diffuseness is assumed, not measured.',
      document: onCalcium('fermi', 3.6318, 0.55),
    },
  ],
};

const positrons: DemoCase = {
  title: 'Positrons on carbon: a sign that first order cannot see',
  tags: ['positrons', 'carbon', 'tabulated atom'],
  campaign: 'carbon',
  versions: [
    {
      author: 'theorist',
      note: 'Shows what first order cannot see: the amplitude changes its sign, and the cross section is that of electrons to the last digit. Only a second order tells attraction from repulsion.',
      document: {
        projectile: { species: 'positron' },
        target: { kind: 'fixed', charge: 0 },
        energy: { value: 10, unit: 'keV' },
        kinematics: 'relativistic',
        interaction: { terms: [{ form: 'atomicElectron', element: 'C' }] },
        methods: ['born1'],
        angles: { unit: 'deg', from: 0, to: 180, count: 91 },
        frame: 'cm',
        goldenRule: { theta: 20, boxSide: { value: 20, unit: 'nm' } },
        units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
      },
    },
  ],
};

const nucleons: DemoCase = {
  title: 'Neutrons on protons in a Hulthén well',
  tags: ['neutrons', 'hydrogen', 'nuclear force', 'Hulthén', 'not valid'],
  campaign: 'theory',
  versions: [
    {
      author: 'theorist',
      note: 'Shows a well that binds, as first order cannot know: solved exactly it holds the deuteron by 2.22 MeV and scatters 2.9 barn of these neutrons with spins parallel; first order says 0.98.',
      document: {
        projectile: { species: 'neutron' },
        target: { kind: 'species', species: 'proton' },
        energy: { value: 1, unit: 'MeV' },
        kinematics: 'nonrelativistic',
        interaction: {
          terms: [
            {
              form: 'hulthen',
              V0: { value: -79.05, unit: 'MeV' },
              a: { value: 0.8559, unit: 'fm' },
            },
          ],
        },
        methods: ['born1'],
        angles: { unit: 'deg', from: 0, to: 180, count: 91 },
        frame: 'cm',
        goldenRule: { theta: 90, boxSide: { value: 100, unit: 'fm' } },
        units: NUCLEAR_UNITS,
      },
    },
  ],
};

export const THEORY_CASES: readonly DemoCase[] = [mott, calcium, positrons, nucleons];
