import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DemoCase } from './scenario.ts';

const yukawa: DemoCase = {
  title: 'Yukawa well under 100 eV electrons',
  tags: ['electrons', 'worked example'],
  campaign: 'carbon',
  versions: [
    {
      author: 'experimentalist',
      note: 'Shows the whole chain on a case that can be checked by hand: wave number, matrix element, density of states, rate and flux at 60 degrees in a box of 10 nm, and the elastic cross section of a Yukawa well in closed form.',
      document: {
        projectile: { species: 'electron' },
        target: { kind: 'fixed', charge: 0 },
        energy: { value: 100, unit: 'eV' },
        kinematics: 'nonrelativistic',
        interaction: {
          terms: [
            { form: 'yukawa', V0: { value: -10, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } },
          ],
        },
        methods: ['born1'],
        angles: { unit: 'deg', from: 0, to: 180, count: 181 },
        frame: 'cm',
        goldenRule: { theta: 60, boxSide: { value: 10, unit: 'nm' } },
        units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
      },
    },
  ],
};

/** Bohr radius and Thomas–Fermi length over the cube root of Z = 6, in angstrom. */
const BOHR_LENGTH = 0.2912;
const THOMAS_FERMI_LENGTH = 0.2578;

function screenedCarbon(a: number): CaseDocument {
  return {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 6 },
    energy: { value: 1, unit: 'keV' },
    kinematics: 'nonrelativistic',
    interaction: { terms: [{ form: 'screenedCoulomb', a: { value: a, unit: 'angstrom' } }] },
    methods: ['born1'],
    angles: { unit: 'deg', from: 0, to: 180, count: 181 },
    frame: 'cm',
    goldenRule: { theta: 15, boxSide: { value: 10, unit: 'nm' } },
    units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
  };
}

const carbon: DemoCase = {
  title: 'Forward cone of 1 keV electrons on carbon',
  tags: ['electrons', 'carbon', 'screening'],
  campaign: 'carbon',
  versions: [
    {
      author: 'experimentalist',
      note: 'Shows how the screening length rules the forward part, and that 1 keV is too slow for first order to be valid here. Length: the Bohr radius over the cube root of 6.',
      document: screenedCarbon(BOHR_LENGTH),
    },
    {
      author: 'theorist',
      note: 'Thomas-Fermi length, 0.885 Bohr radii over the cube root of 6: the forward value falls, the tail stays.',
      document: screenedCarbon(THOMAS_FERMI_LENGTH),
    },
    {
      author: 'experimentalist',
      note: 'Angles as the turntable allows: 0 to 60 degrees in steps of half a degree.',
      document: {
        ...screenedCarbon(THOMAS_FERMI_LENGTH),
        angles: { unit: 'deg', from: 0, to: 60, count: 121 },
      },
    },
  ],
};

const fastOnCarbon: DemoCase = {
  title: '100 keV electrons on carbon, relativistic',
  tags: ['electrons', 'carbon', 'relativistic'],
  campaign: 'carbon',
  versions: [
    {
      author: 'theorist',
      note: 'Shows relativistic kinematics at an energy far above our gun, where first order serves for a light element. The spin of the electron is in the cross section at wide angles and not in the amplitude.',
      document: {
        ...screenedCarbon(THOMAS_FERMI_LENGTH),
        energy: { value: 100, unit: 'keV' },
        kinematics: 'relativistic',
        goldenRule: { theta: 5, boxSide: { value: 10, unit: 'nm' } },
      },
    },
  ],
};

export const ELECTRON_CASES: readonly DemoCase[] = [yukawa, carbon, fastOnCarbon];
