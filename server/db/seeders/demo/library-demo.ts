import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { PublishInteraction } from '#shared/contracts/library.ts';
import type { Saving } from '#server/modules/cases/add-version.ts';
import type { ComputeContext } from '#server/modules/cases/compute-content.ts';
import { etagOf } from '#server/modules/cases/etag.ts';
import { addInteractionVersion } from '#server/modules/library/add-interaction-version.ts';
import { publishInteraction } from '#server/modules/library/publish-interaction.ts';
import type { DemoCase } from './scenario.ts';

/** A published interaction with its versions; the identifier is fixed, so that a worked case can cite it. */
export interface DemoInteraction {
  id: string;
  versions: readonly [PublishInteraction, ...PublishInteraction[]];
}

const angstrom = (value: number) => ({ value, unit: 'angstrom' });
const MeV = (value: number) => ({ value, unit: 'MeV' });
const fm = (value: number) => ({ value, unit: 'fm' });
const NUCLEAR = { length: 'fm', area: 'barn', energy: 'MeV' };

const onCarbon = {
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 6 },
  energy: { value: 10, unit: 'keV' },
  kinematics: 'relativistic',
  units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
} as const;

/** The charge of carbon behind one screening length. */
const screened = (a: number) => [{ form: 'screenedCoulomb', chargeProduct: -6, a: angstrom(a) }];
/** Thomas–Fermi length over the cube root of 6, and the length that gives the forward amplitude of the tabulated atom. */
const THOMAS_FERMI = 0.2578;
const FORWARD = 0.3326;

const carbon: DemoInteraction = {
  id: '7a11ba40-0001-4000-8000-000000000001',
  versions: [
    {
      name: 'Carbon atom, one screening length',
      description:
        'The nucleus of carbon behind a cloud of one exponential. Two numbers, a closed form, and good to a few per cent where the nucleus is all that counts.',
      validity: {
        words:
          'Electrons of the gun from 5 keV on, beyond about 25 degrees. In the forward cone it says too little: an atom has more than one length.',
        energy: { from: { value: 5, unit: 'keV' }, to: { value: 100, unit: 'keV' } },
        species: ['electron'],
      },
      source:
        'Form: G. Wentzel, Z. Phys. 40 (1926) 590. Length: Thomas–Fermi, 0.8853 Bohr radii over the cube root of 6.',
      terms: screened(THOMAS_FERMI),
      tags: ['electrons', 'carbon', 'screening'],
      example: onCarbon,
      note: 'As the carbon film survey began.',
    },
    {
      name: 'Carbon atom, one screening length',
      description:
        'The nucleus of carbon behind a cloud of one exponential, whose length is chosen by the forward amplitude. Two numbers and a closed form; what is lost is the middle of the cone, where it lies above the tabulated atom.',
      validity: {
        words:
          'Electrons of the gun from 5 keV on: straight ahead, and beyond about 25 degrees. At 10 degrees and 10 keV it is 40 per cent above the tabulated atom.',
        energy: { from: { value: 5, unit: 'keV' }, to: { value: 100, unit: 'keV' } },
        species: ['electron'],
      },
      source:
        'Form: G. Wentzel, Z. Phys. 40 (1926) 590. Length: ours, from the forward amplitude of the carbon atom in International Tables for Crystallography C, table 4.3.2.2.',
      terms: screened(FORWARD),
      tags: ['electrons', 'carbon', 'screening'],
      example: onCarbon,
      note: 'The length now gives the forward amplitude of the tabulated atom; the Thomas–Fermi length gave three fifths of it.',
    },
  ],
};

const calcium: DemoInteraction = {
  id: '7a11ba40-0002-4000-8000-000000000002',
  versions: [
    {
      name: 'Calcium-40 for fast neutrons, Lowmoor well',
      description:
        'A complex well for the elastic scattering of neutrons by calcium, deep and absorbing. Far beyond first order: to be used with the exact calculation.',
      validity: {
        words:
          'Neutrons of 10 to 20 MeV on calcium-40. The depths are invented for the demo: no data stand behind them.',
        energy: { from: MeV(10), to: MeV(20) },
        species: ['neutron'],
      },
      source:
        'Form: R. D. Woods and D. S. Saxon, Phys. Rev. 95 (1954) 577. Depths, radius and surface: Lowmoor Beam Hall, invented.',
      terms: [{ form: 'woodsSaxon', V0: MeV(-46), W0: MeV(-8), R: fm(4.275), a: fm(0.65) }],
      tags: ['neutrons', 'calcium', 'optical potential'],
      example: {
        projectile: { species: 'neutron' },
        target: { kind: 'nuclide', nuclide: 'Ca-40' },
        energy: MeV(14),
        kinematics: 'nonrelativistic',
        units: NUCLEAR,
      },
      note: 'The well of the 14 MeV case.',
    },
  ],
};

const deuteron: DemoInteraction = {
  id: '7a11ba40-0003-4000-8000-000000000003',
  versions: [
    {
      name: 'Neutron and proton, spins parallel, Hulthén',
      description:
        'The nuclear force between a neutron and a proton in the triplet state as one closed form. It holds the deuteron by 2.22 MeV, which first order cannot know.',
      validity: {
        words:
          'Below about 10 MeV, S wave only, spins parallel. The singlet state needs a well of its own, and a measured cross section is a quarter singlet.',
        energy: { to: MeV(10) },
        species: ['neutron', 'proton'],
      },
      source:
        'Form: L. Hulthén, Ark. Mat. Astron. Fys. 28A (1942) no. 5. Depth and range: Lowmoor Beam Hall, from the binding energy of the deuteron.',
      terms: [{ form: 'hulthen', V0: MeV(-79.05), a: fm(0.8559) }],
      tags: ['nuclear force', 'deuteron'],
      example: {
        projectile: { species: 'neutron' },
        target: { kind: 'species', species: 'proton' },
        energy: MeV(1),
        kinematics: 'nonrelativistic',
        units: NUCLEAR,
      },
      note: 'Agreed for teaching and for tests of the exact method.',
    },
  ],
};

export const DEMO_INTERACTIONS: readonly DemoInteraction[] = [carbon, calcium, deuteron];

const fromTheLibrary: CaseDocument = {
  ...onCarbon,
  interaction: { terms: screened(THOMAS_FERMI), citation: { id: carbon.id, version: 1 } },
  methods: ['born1'],
  angles: { unit: 'deg', from: 0, to: 180, count: 181 },
  frame: 'cm',
  goldenRule: { theta: 30, boxSide: { value: 10, unit: 'nm' } },
};

export const LIBRARY_CASES: readonly DemoCase[] = [
  {
    title: 'Electrons on carbon, as the library had it',
    tags: ['electrons', 'carbon', 'library'],
    campaign: 'carbon',
    versions: [
      {
        author: 'experimentalist',
        note: 'Shows a citation: the terms are version 1 of “Carbon atom, one screening length”, and the elastic total is 0.0420 square angstrom. Version 2, published since, gives 0.0700 and the tabulated atom 0.0642; the case keeps what it cites until somebody takes the newer one.',
        document: fromTheLibrary,
      },
    ],
  },
];

/** Publishes the interactions of the demo, each version on top of the one before. */
export async function seedLibrary(context: Saving & ComputeContext): Promise<void> {
  for (const { id, versions } of DEMO_INTERACTIONS) {
    const [first, ...later] = versions;
    let { lock } = await publishInteraction(context, first, { id });
    for (const version of later) {
      const request = { interactionId: id, ifMatch: etagOf(lock) };
      ({ lock } = await addInteractionVersion(context, request, version));
    }
  }
}
