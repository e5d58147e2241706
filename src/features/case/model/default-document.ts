import type { CaseDocument } from '#shared/contracts/cases.ts';

/** A new case: 100 eV electrons on a fixed centre, the classic screened well. Every field a person may change is written out. */
export const DEFAULT_DOCUMENT: CaseDocument = {
  format: 1,
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 0 },
  energy: { value: 100, unit: 'eV' },
  kinematics: 'nonrelativistic',
  interaction: {
    terms: [
      {
        form: 'yukawa',
        V0: { value: -10, unit: 'eV' },
        a: { value: 1, unit: 'angstrom' },
      },
    ],
  },
  methods: ['born1'],
  angles: { unit: 'deg', from: 0, to: 180, count: 181 },
  frame: 'cm',
  goldenRule: { theta: 60, boxSide: { value: 10, unit: 'nm' } },
  units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
};

export const DEFAULT_TITLE = 'Untitled case';
