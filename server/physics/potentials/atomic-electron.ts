import { ELECTRON_MASS, HBAR_C_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import { erfc } from '#server/physics/numerics/error-function.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { electronScatteringFactor } from '#server/physics/tables/electron-scattering.ts';
import { ELECTRON_SCATTERING_EDITION } from '#server/physics/tables/electron-scattering.ts';
import { xrayEdition } from '#server/physics/tables/xray-form-factors.ts';
import { mottBetheTail } from './mott-bethe-tail.ts';
import { lookUp, readParameters, refuse } from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { closedResult } from './transform-error.ts';
import type { AnyParameter, Form, FormContext } from './types.ts';

const parameters: AnyParameter[] = [
  {
    key: 'element',
    label: 'Element',
    symbol: '\\mathrm X',
    dimension: 'element',
    default: 'C',
    description: 'Neutral atom, by its symbol from H to Cf.',
  },
];

/** hbar²/2m_e, eV·angstrom². */
const UNIT = HBAR_C_EV_ANGSTROM ** 2 / (2 * ELECTRON_MASS);
const CUT = 7.2;
const REACH = 6.26;

/** One Gaussian: height · exp(-(r/width)²) in r, a · exp(-(q width)²/4) in q. */
interface Bell {
  a: number;
  width: number;
  height: number;
}

/** a exp(-b s²), s = q/4π, is the transform of a Gaussian of width √b/2π. */
function bellOf(a: number, b: number): Bell {
  const width = Math.sqrt(b) / (2 * Math.PI);
  return { a, width, height: (4 * a) / (Math.sqrt(Math.PI) * width ** 3) };
}

/**
 * Electron scattering factor as a sum of Gaussians.
 *
 * Formula: f_e = Σ a_i exp(-b_i s²), s = q/4π.
 *
 * @param bells Gaussians of the fit
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns angstrom, with a bound of its rounding; what the fit misses is no part of it
 *
 * Source: International Tables for Crystallography C, table 4.3.2.2.
 */
function sumOfBells(bells: readonly Bell[], q: number): NumericalResult {
  let value = 0;
  let rounding = 0;
  let slope = 0;
  for (const { a, width } of bells) {
    const exponent = (q * width) ** 2 / 4;
    const part = a * Math.exp(-exponent);
    value += part;
    rounding += (12 + 8 * exponent) * Math.abs(part);
    slope += 2 * exponent * Math.abs(part);
  }
  return closedResult(value, rounding, slope);
}

function radialShape(bells: readonly Bell[]): (r: number) => number {
  return (r) =>
    bells.reduce((sum, { height, width }) => sum + height * Math.exp(-((r / width) ** 2)), 0);
}

function quadratureOf(bells: readonly Bell[], norm: number): (q: number) => NumericalResult {
  const shape = radialShape(bells);
  const edges = [...new Set(bells.flatMap(({ width }) => [2 * width, 4 * width, CUT * width]))];
  return radialQuadrature(
    {
      integrand: (r) => r * shape(r),
      edges: [0, ...edges.sort((x, y) => x - y)],
      tail: 1e-20 * norm,
    },
    norm,
  );
}

/** +1 for an electron, which the atom attracts, -1 for a positron. */
function signOf({ projectile }: FormContext): number {
  if (projectile === 'electron') return 1;
  if (projectile === 'positron') return -1;
  refuse(
    'element',
    'atomicElectron is made for electrons and positrons; for another projectile use moliere or screenedCoulomb',
  );
}

/** Below `joint` the fit, above it the tail, on either route. */
function joined(
  fit: (q: number) => NumericalResult,
  tail: (q: number) => NumericalResult,
  joint: number,
): (q: number) => NumericalResult {
  return (q) => (q <= joint ? fit(q) : tail(q));
}

/**
 * Electron on a neutral atom. The shape is the one whose transform is the scattering factor: S = f_e(q/4π) in angstrom, with
 * strength -ħ²/2m_e for an electron; the amplitude is then f_e mu/m_e, relativistic mass included.
 */
export const atomicElectron: Form<AnyParameter> = {
  key: 'atomicElectron',
  label: 'Electron on a neutral atom',
  formula: String.raw`V(r) = \mp\frac{\hbar^2}{2m_e}\sum_{i=1}^{5} a_i\,\frac{4}{\sqrt\pi\,w_i^3}\,e^{-(r/w_i)^2},\quad w_i = \frac{\sqrt{b_i}}{2\pi}`,
  transformFormula: String.raw`f_1 = \pm\frac{\mu}{m_e}f_e,\quad f_e = \begin{cases}\sum_i a_i e^{-b_i s^2}, & s = q/4\pi \le 2\ \text{Å}^{-1}\\[2pt] \dfrac{Z-f_x(s)}{8\pi^2 a_0 s^2}, & s > 2\ \text{Å}^{-1}\end{cases}`,
  source: `${ELECTRON_SCATTERING_EDITION}; beyond s = 2 per angstrom N. F. Mott and H. Bethe (1930) with the form factors of ${xrayEdition('waasmaierKirfel1995').edition}, joined from s = 2 to 3`,
  parameters,
  build(values, context) {
    const name = readParameters(parameters, values).name('element') ?? '';
    const sign = signOf(context);
    const factor = lookUp('element', () => electronScatteringFactor(name));
    const bells = factor.a.map((a, i) => bellOf(a, factor.b[i] ?? NaN));
    const norm = bells.reduce((sum, { a }) => sum + Math.abs(a), 0);
    const widest = Math.max(...bells.map(({ width }) => width));
    const joint = 4 * Math.PI * factor.fittedTo;
    const fit = (q: number) => sumOfBells(bells, q);
    const tails = mottBetheTail(name, joint, fit(joint).value);
    return {
      form: 'atomicElectron',
      strength: { re: -sign * UNIT, im: 0 },
      chargeProduct: -sign * factor.atomicNumber,
      v: radialShape(bells),
      closed: joined(fit, tails.closed, joint),
      quadrature: joined(quadratureOf(bells, norm), tails.quadrature, joint),
      coulombTail: 0,
      norm,
      firstMoment: bells.reduce((sum, { height, width }) => sum + (height * width ** 2) / 2, 0),
      lineIntegral: (from) =>
        bells.reduce(
          (sum, { height, width }) =>
            sum + height * width * (Math.sqrt(Math.PI) / 2) * erfc(from / width).value,
          0,
        ),
      range: widest,
      tail: 'exponential',
      reach: REACH * widest,
      breakpoints: [],
      kinks: tails.kinks,
    };
  },
};
