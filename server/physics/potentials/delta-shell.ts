import { integratePanels } from '#server/physics/numerics/panel-quadrature.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { lengthParameter, readParameters } from './parameters.ts';
import { shellKernel } from './sphere-kernels.ts';
import { closedResult, Q_ALLOWANCE } from './transform-error.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  {
    key: 'g',
    label: 'Strength',
    symbol: 'g',
    dimension: 'energyLength',
    min: -1e15,
    max: 1e15,
    default: { value: -10, unit: 'eV angstrom' },
    description: 'Integral of the potential across the shell. Negative attracts.',
  },
  lengthParameter(
    { key: 'R', label: 'Radius', symbol: 'R', description: 'Radius of the shell.' },
    { value: 1, unit: 'angstrom' },
  ),
];

/**
 * Transform of delta(r-R).
 *
 * Formula: S(q) = R² sin(qR)/(qR).
 *
 * @param R radius, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom²; error about 10 u R², where the phase qR decides
 *
 * Source: textbook; e.g. K. Gottfried, Quantum Mechanics (1966), sec. 15.
 */
export function deltaShellTransform(R: number, q: number): NumericalResult {
  const { value, rounding, slope } = shellKernel(q * R);
  const area = R ** 2;
  return closedResult(area * value, area * (rounding + 2 * Math.abs(value)), area * slope);
}

/**
 * The same by quadrature. The radial integral of a delta function is its value, so the route that knows no closed form
 * averages the plane wave over the shell.
 *
 * Formula: S(q) = R² ∫_0^1 cos(qRu) du.
 *
 * @returns S in angstrom² with a bound of its error
 */
function shellAverage(R: number, q: number): NumericalResult {
  const x = q * R;
  const width = x > 0 ? (16 * Math.PI) / x : Infinity;
  const mean = integratePanels((u) => Math.cos(x * u), 0, 1, width);
  const area = R ** 2;
  const slope = Math.min(1.3, x ** 2 / 3);
  return {
    ...mean,
    value: area * mean.value,
    error: area * (mean.error + Q_ALLOWANCE * 1.25 * slope),
  };
}

export const deltaShell: Form = {
  key: 'deltaShell',
  label: 'Delta shell',
  formula: String.raw`V(r) = g\,\delta(r-R)`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = g\,R^2\,\frac{\sin qR}{qR}`,
  source: 'Textbook form; K. Gottfried, Quantum Mechanics (1966)',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const R = read.need('R');
    return {
      form: 'deltaShell',
      strength: { re: read.need('g'), im: 0 },
      v: null,
      noFunction:
        'The potential is zero everywhere but on the shell r = R, where it is no function.',
      closed: (q) => deltaShellTransform(R, q),
      quadrature: (q) => shellAverage(R, q),
      coulombTail: 0,
      norm: R ** 2,
      firstMoment: R,
      lineIntegral: (from) => (from < R ? 1 : 0),
      range: R,
      tail: 'compact',
      reach: R,
      breakpoints: [R],
    };
  },
};
