import {
  absorptionParameter,
  complexStrength,
  lengthParameter,
  readParameters,
  strengthParameter,
} from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { ballKernel } from './sphere-kernels.ts';
import { closedResult } from './transform-error.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  strengthParameter(
    { value: -35, unit: 'MeV' },
    'Potential inside the radius. Negative is a well, positive a barrier.',
  ),
  absorptionParameter('MeV'),
  lengthParameter(
    { key: 'R', label: 'Radius', symbol: 'R', description: 'Radius of the sharp edge.' },
    { value: 2, unit: 'fm' },
  ),
];

/**
 * Transform of a sphere of height one.
 *
 * Formula: S(q) = R³ (sin x - x cos x)/x³, x = qR.
 *
 * @param R radius, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom³; error of some u near q = 0 and about 10 u R³/x at large x, where the phase x decides
 *
 * Source: textbook; Lord Rayleigh, Proc. R. Soc. A 84 (1911) 25.
 */
export function squareWellTransform(R: number, q: number) {
  const { value, rounding, slope } = ballKernel(q * R);
  const volume = R ** 3;
  return closedResult(volume * value, volume * (rounding + 3 * Math.abs(value)), volume * slope);
}

export const squareWell: Form = {
  key: 'squareWell',
  label: 'Square well or barrier',
  formula: String.raw`V(r) = \begin{cases} V_0 + iW_0, & r < R\\ 0, & r > R \end{cases}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = (V_0+iW_0)\,\frac{\sin qR - qR\cos qR}{q^3}`,
  source:
    'Textbook form; transform of a uniform sphere: Lord Rayleigh, Proc. R. Soc. A 84 (1911) 25',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const R = read.need('R');
    const norm = R ** 3 / 3;
    return {
      form: 'squareWell',
      strength: complexStrength(read),
      v: (r) => (r < R ? 1 : 0),
      closed: (q) => squareWellTransform(R, q),
      quadrature: radialQuadrature({ integrand: (r) => r, edges: [0, R], tail: 0 }, norm),
      coulombTail: 0,
      norm,
      firstMoment: R ** 2 / 2,
      lineIntegral: (from) => Math.max(0, R - from),
      range: R,
      tail: 'compact',
      reach: R,
      breakpoints: [R],
    };
  },
};
