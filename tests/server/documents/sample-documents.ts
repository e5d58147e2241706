import type { CaseDocument } from '#shared/contracts/cases.ts';

/** The example of the contract: 100 eV electrons on a Yukawa well. */
export const yukawaDocument = {
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 0 },
  energy: { value: 100, unit: 'eV' },
  kinematics: 'nonrelativistic',
  interaction: {
    terms: [{ form: 'yukawa', V0: { value: -10, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } }],
  },
  methods: ['born1'],
  angles: { unit: 'deg', values: [0, 30, 60, 90, 180] },
  frame: 'cm',
  goldenRule: { theta: 60, boxSide: { value: 10, unit: 'nm' } },
  units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
} satisfies CaseDocument;
