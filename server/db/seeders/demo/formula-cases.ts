import { ZETA, onHelium } from './helium-cases.ts';
import type { DemoCase } from './scenario.ts';

const helium: DemoCase = {
  title: 'Electrons on helium: the static field as a formula',
  tags: ['electrons', 'helium', 'gas', 'static potential', 'formula'],
  campaign: null,
  versions: [
    {
      author: 'theorist',
      note: 'Shows a formula typed in: the static field of two 1s orbitals of effective charge 27/16. It is computed by quadrature and agrees with the sum of a Yukawa and an exponential term in closed form, 0.2709 bohr² elastic.',
      document: onHelium({
        form: 'expression',
        formula: '-2*e2*(1/r + zeta/a0)*exp(-2*zeta*r/a0)',
        parameters: {
          e2: { value: 14.399645, unit: 'eV angstrom' },
          a0: { value: 1, unit: 'bohr' },
          zeta: ZETA,
        },
      }),
    },
  ],
};

const alphasWithForce: DemoCase = {
  title: 'Alphas on helium with a nuclear force in two Gaussians',
  tags: ['alphas', 'helium', 'identical particles', 'formula', 'not valid'],
  campaign: null,
  versions: [
    {
      author: 'theorist',
      note: 'Shows a formula beside the Coulomb term: a core of 500 MeV inside an attraction of 130 MeV, of the size Ali and Bodmer fitted in 1966. First order overdraws one partial wave eightfold and makes 14.9 barn/sr at 90 degrees of the 0.053 of the charges alone, so it is not valid.',
      document: {
        projectile: { species: 'alpha' },
        target: { kind: 'nuclide', nuclide: 'He-4' },
        energy: { value: 5, unit: 'MeV' },
        kinematics: 'nonrelativistic',
        interaction: {
          terms: [
            { form: 'coulomb' },
            {
              form: 'expression',
              formula: 'Vr*exp(-(r/ar)^2) - Va*exp(-(r/aa)^2)',
              parameters: {
                Vr: { value: 500, unit: 'MeV' },
                ar: { value: 1.4286, unit: 'fm' },
                Va: { value: 130, unit: 'MeV' },
                aa: { value: 2.1053, unit: 'fm' },
              },
            },
          ],
        },
        methods: ['born1'],
        angles: { unit: 'deg', from: 10, to: 170, count: 81 },
        frame: 'cm',
        goldenRule: { theta: 90, boxSide: { value: 10, unit: 'pm' } },
        units: { length: 'fm', area: 'barn', energy: 'MeV' },
      },
    },
  ],
};

export const FORMULA_CASES: readonly DemoCase[] = [helium, alphasWithForce];
