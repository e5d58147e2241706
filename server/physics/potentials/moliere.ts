import { COULOMB_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import { readParameters, refuse } from './parameters.ts';
import { screensOf, screenedTerm } from './screening-sum.ts';
import { thomasFermiLength } from '#server/physics/tables/screening.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  {
    key: 'Z',
    label: 'Atomic number',
    symbol: 'Z',
    dimension: 'number',
    min: 1,
    max: 200,
    integer: true,
    optional: true,
    default: 6,
    description:
      'Charge number of the atom: sets the screening length and wins over the charge of the target, which is taken where it is left out.',
  },
];

function differingCharge(Z: number, targetCharge: number) {
  return {
    code: 'chargesDiffer',
    message: `The Molière term is made for Z = ${Z}, the target has charge ${targetCharge}: Z wins, for strength and screening. Leave Z out to take the charge of the target.`,
  };
}

export const moliere: Form = {
  key: 'moliere',
  label: 'Molière screening',
  formula: String.raw`V(r) = \frac{Z_1 Z\,\alpha\hbar c}{r}\left(0.10\,e^{-6r/a} + 0.55\,e^{-1.2r/a} + 0.35\,e^{-0.3r/a}\right),\quad a = 0.88534\,a_0 Z^{-1/3}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = Z_1 Z\,\alpha\hbar c\,\sum_i \frac{c_i\,a^2}{b_i^2+q^2a^2}`,
  source:
    'G. Molière, Z. Naturforsch. 2a (1947) 133; poor for light atoms and near the forward direction',
  parameters,
  build(values, context) {
    const Z = readParameters(parameters, values).optional('Z') ?? context.targetCharge;
    if (!(Z >= 1)) {
      refuse(
        'Z',
        'Z is needed: the target has no charge number of at least 1 to take in its place',
      );
    }
    const strength = context.projectileCharge * Z * COULOMB_EV_ANGSTROM;
    const term = screenedTerm('moliere', strength, screensOf('moliere'), thomasFermiLength(Z));
    const { targetCharge } = context;
    if (targetCharge === 0 || targetCharge === Z) return term;
    return { ...term, cautions: [differingCharge(Z, targetCharge)] };
  },
};
