import type { CaseDocument } from '#shared/contracts/cases.ts';

/** Documents a new case can begin from, reached as `/cases/new?start=KEY`. */
export interface Start {
  key: string;
  title: string;
  /** The stations, as the row of a list would show them. */
  summary: { beam: string; target: string; interaction: string };
  document: CaseDocument;
}

const common = { format: 1, frame: 'cm' } as const;

function fromTo(count: number, from = 0, to = 180): NonNullable<CaseDocument['angles']> {
  return { unit: 'deg', from, to, count };
}

export const STARTS: readonly Start[] = [
  {
    key: 'electron',
    title: 'Electrons on a screened centre',
    summary: {
      beam: 'electron, 100 eV',
      target: 'fixed centre',
      interaction: 'Yukawa, 10 eV, 1 Å',
    },
    document: {
      ...common,
      methods: ['born1'],
      projectile: { species: 'electron' },
      target: { kind: 'fixed', charge: 0 },
      energy: { value: 100, unit: 'eV' },
      kinematics: 'nonrelativistic',
      interaction: {
        terms: [
          { form: 'yukawa', V0: { value: -10, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } },
        ],
      },
      angles: fromTo(181),
      goldenRule: { theta: 60, boxSide: { value: 10, unit: 'nm' } },
      units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
    },
  },
  {
    key: 'ion',
    title: 'Alpha particles on gold',
    summary: { beam: 'alpha, 2 MeV', target: 'Au-197', interaction: 'screened Coulomb' },
    document: {
      ...common,
      methods: ['born1'],
      projectile: { species: 'alpha' },
      target: { kind: 'nuclide', nuclide: 'Au-197' },
      energy: { value: 2, unit: 'MeV' },
      kinematics: 'nonrelativistic',
      interaction: { terms: [{ form: 'screenedCoulomb', a: { value: 0.1, unit: 'angstrom' } }] },
      angles: fromTo(171, 10),
      goldenRule: { theta: 90, boxSide: { value: 1, unit: 'nm' } },
      units: { length: 'fm', area: 'barn', energy: 'MeV' },
    },
  },
  {
    key: 'neutron',
    title: 'Thermal neutrons on a nucleus',
    summary: { beam: 'neutron, 25 meV', target: 'fixed centre', interaction: 'contact, b = 6 fm' },
    document: {
      ...common,
      methods: ['born1'],
      projectile: { species: 'neutron' },
      target: { kind: 'fixed', charge: 0 },
      energy: { value: 25, unit: 'meV' },
      kinematics: 'nonrelativistic',
      interaction: { terms: [{ form: 'contact', b: { value: 6, unit: 'fm' } }] },
      angles: fromTo(181),
      units: { length: 'fm', area: 'barn', energy: 'meV' },
    },
  },
];
