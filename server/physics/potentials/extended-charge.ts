import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { chargeRemainder } from './charge-remainder.ts';
import type { ChargeShape } from './charge-shapes.ts';
import { dipoleCharge, gaussianCharge, uniformSphere } from './charge-shapes.ts';
import { chargeProductOf, chargeProductParameter, coulombStrength } from './charges.ts';
import { fermiCharge } from './fermi-charge.ts';
import { helmCharge } from './helm-charge.ts';
import { lengthParameter, readParameters, refuse } from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { Q_ALLOWANCE } from './transform-error.ts';
import type { AnyParameter, Form } from './types.ts';

export const CHARGE_KINDS = ['uniformSphere', 'gaussian', 'fermi', 'helm', 'dipole'] as const;
type ChargeKind = (typeof CHARGE_KINDS)[number];

const parameters: AnyParameter[] = [
  {
    key: 'kind',
    label: 'Distribution',
    symbol: '\\rho',
    dimension: 'choice',
    choices: CHARGE_KINDS,
    default: 'fermi',
    description:
      'How the charge is spread: uniform sphere, Gaussian, two-parameter Fermi, Helm (sphere smeared with a Gaussian) or dipole form factor (exponential).',
  },
  lengthParameter(
    {
      key: 'radius',
      label: 'Radius',
      symbol: 'R',
      description:
        'Sharp radius (uniformSphere), rms radius (gaussian, dipole), half-density radius (fermi) or diffraction radius (helm).',
    },
    { value: 6.38, unit: 'fm' },
  ),
  {
    ...lengthParameter(
      {
        key: 'diffuseness',
        label: 'Diffuseness',
        symbol: 'a',
        description:
          'For fermi the length a of the surface; for helm the standard deviation of the Gaussian. The other kinds have none.',
      },
      { value: 0.535, unit: 'fm' },
    ),
    when: { key: 'kind', is: ['fermi', 'helm'] },
  },
  chargeProductParameter,
];

function shapeOf(kind: ChargeKind, radius: number, surface: () => number): ChargeShape {
  switch (kind) {
    case 'uniformSphere':
      return uniformSphere(radius);
    case 'gaussian':
      return gaussianCharge(radius);
    case 'dipole':
      return dipoleCharge(radius);
    case 'fermi':
      return fermiCharge(radius, surface());
    case 'helm':
      return helmCharge(radius, surface());
  }
}

const nothing: NumericalResult = { value: 0, error: 0, evaluations: 0, status: 'converged' };
const divergent: NumericalResult = { ...nothing, value: Infinity };

/**
 * Transform of the potential of an extended charge.
 *
 * Formula: S(q) = F(q)/q².
 *
 * @param shape distribution of one unit of charge
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in angstrom² with a bound of its error; Infinity at q = 0, where the Coulomb tail diverges
 *
 * Source: textbook; R. Hofstadter, Rev. Mod. Phys. 28 (1956) 214.
 */
export function extendedChargeTransform(shape: ChargeShape, q: number): NumericalResult {
  const point = 1 / (q * q);
  if (point === Infinity) return divergent;
  const F = shape.formFactor(q);
  const rounding = (3 * UNIT_ROUNDOFF + 2 * Q_ALLOWANCE) * Math.abs(F.value);
  return { ...F, value: F.value * point, error: (F.error + rounding) * point };
}

/** The Coulomb tail is closed; what the charge leaves open of it, 1 - r s(r), is integrated. */
function quadratureOf({ missing, meanSquare }: ChargeShape): (q: number) => NumericalResult {
  const rest = radialQuadrature(missing, meanSquare / 6);
  return (q) => {
    const point = 1 / (q * q);
    if (point === Infinity) return divergent;
    const part = rest(q);
    const rounding = (3 * UNIT_ROUNDOFF + 2 * Q_ALLOWANCE) * point;
    return { ...part, value: point - part.value, error: part.error + rounding };
  };
}

function isKind(name: string | undefined): name is ChargeKind {
  return CHARGE_KINDS.some((kind) => kind === name);
}

export const extendedCharge: Form<AnyParameter> = {
  key: 'extendedCharge',
  label: 'Extended charge',
  formula: String.raw`V(r) = Z_1 Z_2\,\alpha\hbar c \int \frac{\rho(\mathbf r')}{|\mathbf r-\mathbf r'|}\,d^3r',\quad \int\rho\,d^3r = 1`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = Z_1 Z_2\,\alpha\hbar c\,\frac{F(q)}{q^2}`,
  source:
    'R. Hofstadter, Rev. Mod. Phys. 28 (1956) 214; R. H. Helm, Phys. Rev. 104 (1956) 1466; H. de Vries, C. W. de Jager and C. de Vries, At. Data Nucl. Data Tables 36 (1987) 495',
  parameters,
  build(values, context) {
    const read = readParameters(parameters, values);
    const kind = read.name('kind');
    if (!isKind(kind)) refuse('kind', `kind must be one of ${CHARGE_KINDS.join(', ')}`);
    const shape = shapeOf(kind, read.need('radius'), () => read.need('diffuseness'));
    const strength = coulombStrength(read, context);
    const charged = strength !== 0;
    return {
      form: 'extendedCharge',
      strength: { re: strength, im: 0 },
      v: (r) => shape.within(r) / r,
      closed: charged ? (q) => extendedChargeTransform(shape, q) : () => nothing,
      quadrature: charged ? quadratureOf(shape) : () => nothing,
      chargeProduct: chargeProductOf(strength),
      coulombTail: charged ? 1 : 0,
      ...(charged && { withoutTail: chargeRemainder(shape) }),
      norm: shape.meanSquare / 6,
      firstMoment: null,
      lineIntegral: () => null,
      range: shape.range,
      tail: 'coulomb',
      reach: null,
      breakpoints: shape.breakpoints,
    };
  },
};
