import type { DemoCase } from './scenario.ts';

const nickel: DemoCase = {
  title: 'Thermal neutrons on bound nickel',
  tags: ['neutrons', 'nickel', 'scattering length'],
  campaign: 'neutrons',
  versions: [
    {
      author: 'theorist',
      note: 'Shows a contact interaction: the same in every direction, 4 pi b squared in all, whatever the energy. The length is the bound coherent one, so the target is fixed. The energy was typed as a wavelength of 1.8 angstrom.',
      document: {
        projectile: { species: 'neutron' },
        target: { kind: 'fixed', charge: 0 },
        energy: { value: 25.24821303539516, unit: 'meV' },
        entered: { '/energy': '1.8 angstrom' },
        kinematics: 'nonrelativistic',
        interaction: { terms: [{ form: 'contact', b: { value: 10.3, unit: 'fm' } }] },
        methods: ['born1'],
        angles: { unit: 'deg', from: 0, to: 180, count: 37 },
        frame: 'cm',
        goldenRule: { theta: 90, boxSide: { value: 100, unit: 'nm' } },
        units: { length: 'fm', area: 'barn', energy: 'meV' },
      },
    },
  ],
};

const calcium: DemoCase = {
  title: '14 MeV neutrons on Ca-40: where first order fails',
  tags: ['neutrons', 'calcium', 'optical potential'],
  campaign: null,
  versions: [
    {
      author: 'theorist',
      note: 'Shows honesty: a complex nuclear well is far too deep for first order. The curve is drawn, the verdict is not valid, and the absorption of this order stands beside the elastic part.',
      document: {
        projectile: { species: 'neutron' },
        target: { kind: 'nuclide', nuclide: 'Ca-40' },
        energy: { value: 14, unit: 'MeV' },
        kinematics: 'nonrelativistic',
        interaction: {
          terms: [
            {
              form: 'woodsSaxon',
              V0: { value: -46, unit: 'MeV' },
              W0: { value: -8, unit: 'MeV' },
              R: { value: 4.275, unit: 'fm' },
              a: { value: 0.65, unit: 'fm' },
            },
          ],
        },
        methods: ['born1'],
        angles: { unit: 'deg', from: 0, to: 180, count: 181 },
        frame: 'cm',
        goldenRule: { theta: 30, boxSide: { value: 100, unit: 'fm' } },
        units: { length: 'fm', area: 'barn', energy: 'MeV' },
      },
    },
  ],
};

export const NEUTRON_CASES: readonly DemoCase[] = [nickel, calcium];
