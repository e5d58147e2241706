import { COULOMB_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import { ionPairParameters } from './ion-pair.ts';
import { readParameters } from './parameters.ts';
import { screensOf, screenedTerm } from './screening-sum.ts';
import { ionAtomLength } from '#server/physics/tables/screening.ts';
import type { Form } from './types.ts';

export const krc: Form = {
  key: 'krc',
  label: 'Kr-C, two atoms',
  formula: String.raw`V(r) = \frac{Z_1 Z_2\,\alpha\hbar c}{r}\left(0.335381\,e^{-1.919249\,r/a} + 0.473674\,e^{-0.637174\,r/a} + 0.190945\,e^{-0.278544\,r/a}\right),\quad a = \frac{0.8853\,a_0}{(\sqrt{Z_1}+\sqrt{Z_2})^{2/3}}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = Z_1 Z_2\,\alpha\hbar c\,\sum_i \frac{c_i\,a^2}{b_i^2+q^2a^2}`,
  source:
    'W. D. Wilson, L. G. Haggmark and J. P. Biersack, Phys. Rev. B 15 (1977) 2458; length: O. B. Firsov, Sov. Phys. JETP 5 (1957) 1192',
  parameters: ionPairParameters,
  build(values) {
    const read = readParameters(ionPairParameters, values);
    const [Z1, Z2] = [read.need('Z1'), read.need('Z2')];
    return screenedTerm(
      'krc',
      Z1 * Z2 * COULOMB_EV_ANGSTROM,
      screensOf('krc'),
      ionAtomLength('krc', Z1, Z2),
    );
  },
};
