import { integrate } from '#server/physics/numerics/quadrature.ts';
import {
  absorptionParameter,
  complexStrength,
  lengthParameter,
  readParameters,
  strengthParameter,
} from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { closedResult } from './transform-error.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  strengthParameter({ value: -10, unit: 'eV' }, 'Potential at the origin. Negative attracts.'),
  absorptionParameter('eV'),
  lengthParameter(
    {
      key: 'a',
      label: 'Width',
      symbol: 'a',
      description:
        'Radius at which the potential has fallen by e (the square root of two times the standard deviation).',
    },
    { value: 1, unit: 'angstrom' },
  ),
];

const QUARTER_ROOT_PI = Math.sqrt(Math.PI) / 4;
/** exp(-x²) is below 1e-17 beyond 6.26; integrals are cut where ∫ x² exp(-x²) is below 1e-22. */
const REACH = 6.26;
const CUT = 7.2;

/**
 * Transform of exp(-(r/a)²).
 *
 * Formula: S(q) = (√π/4) a³ exp(-q²a²/4).
 *
 * @param a width, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom³; relative error 1e-15 (1 + 3 (qa)²/4), what the exponent makes of its rounding
 *
 * Source: textbook; Fourier transform of a normal distribution, e.g. I. N. Sneddon, Fourier Transforms (1951).
 */
export function gaussianTransform(a: number, q: number) {
  const exponent = (q * a) ** 2 / 4;
  const value = QUARTER_ROOT_PI * a ** 3 * Math.exp(-exponent);
  return closedResult(value, (9 + 3 * exponent) * value, value === 0 ? 0 : 2 * exponent * value);
}

export const gaussian: Form = {
  key: 'gaussian',
  label: 'Gaussian',
  formula: String.raw`V(r) = (V_0 + iW_0)\,e^{-(r/a)^2}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = (V_0+iW_0)\,\frac{\sqrt{\pi}}{4}\,a^3 e^{-q^2a^2/4}`,
  source: 'Textbook form; I. N. Sneddon, Fourier Transforms (1951), table of cosine transforms',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const a = read.need('a');
    const norm = QUARTER_ROOT_PI * a ** 3;
    const shape = (r: number) => Math.exp(-((r / a) ** 2));
    const reach = REACH * a;
    return {
      form: 'gaussian',
      strength: complexStrength(read),
      v: shape,
      closed: (q) => gaussianTransform(a, q),
      quadrature: radialQuadrature(
        {
          integrand: (r) => r * shape(r),
          edges: [0, 2 * a, 4 * a, CUT * a],
          tail: 1e-21 * a ** 3,
        },
        norm,
      ),
      coulombTail: 0,
      norm,
      firstMoment: a ** 2 / 2,
      lineIntegral: (from) => (from < reach ? integrate(shape, from, reach).value : 0),
      range: a,
      tail: 'exponential',
      reach,
      breakpoints: [],
    };
  },
};
