import { COULOMB_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import { ionPairParameters } from './ion-pair.ts';
import { readParameters } from './parameters.ts';
import { screensOf, screenedTerm } from './screening-sum.ts';
import { ionAtomLength } from '#server/physics/tables/screening.ts';
import type { Form } from './types.ts';

export const universalIon: Form = {
  key: 'universalIon',
  label: 'Universal, two atoms',
  formula: String.raw`V(r) = \frac{Z_1 Z_2\,\alpha\hbar c}{r}\left(0.1818\,e^{-3.2\,r/a} + 0.5099\,e^{-0.9423\,r/a} + 0.2802\,e^{-0.4029\,r/a} + 0.02817\,e^{-0.2016\,r/a}\right),\quad a = \frac{0.8854\,a_0}{Z_1^{0.23}+Z_2^{0.23}}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = Z_1 Z_2\,\alpha\hbar c\,\sum_i \frac{c_i\,a^2}{b_i^2+q^2a^2}`,
  source:
    'J. F. Ziegler, J. P. Biersack and U. Littmark, The Stopping and Range of Ions in Solids (1985); the weights as printed add up to 1.00007, so near the origin the charges are those of the nuclei times 1.00007',
  parameters: ionPairParameters,
  build(values) {
    const read = readParameters(ionPairParameters, values);
    const [Z1, Z2] = [read.need('Z1'), read.need('Z2')];
    const strength = Z1 * Z2 * COULOMB_EV_ANGSTROM;
    return screenedTerm(
      'universalIon',
      strength,
      screensOf('universalIon'),
      ionAtomLength('universalIon', Z1, Z2),
    );
  },
};
