import { E_FOLDINGS } from './exponential-tail.ts';
import { lengthParameter, readParameters } from './parameters.ts';
import type { Form, FormParameter } from './types.ts';

const STRONGEST = 1e15;
/** (hbar/m_pi c)² as optical potentials are printed with it, 2 fm² in angstrom². */
const PION_SQUARED = 2e-10;

const parameters: FormParameter[] = [
  {
    key: 'Vso',
    label: 'Spin-orbit strength',
    symbol: 'V_{so}',
    dimension: 'energy',
    min: -STRONGEST,
    max: STRONGEST,
    default: { value: 6, unit: 'MeV' },
    description:
      'Strength in front of l·sigma. The slope of the surface is negative, so a positive strength attracts where spin and orbit are parallel.',
  },
  {
    key: 'Wso',
    label: 'Imaginary spin-orbit strength',
    symbol: 'W_{so}',
    dimension: 'energy',
    min: -STRONGEST,
    max: STRONGEST,
    optional: true,
    default: { value: 0, unit: 'MeV' },
    description:
      'Imaginary part of the strength. It absorbs in one of the two waves of each l and creates in the other, so a central W0 must outweigh it.',
  },
  lengthParameter(
    { key: 'R', label: 'Radius', symbol: 'R', description: 'Radius of the surface.' },
    { value: 3.8, unit: 'fm' },
  ),
  lengthParameter(
    { key: 'a', label: 'Diffuseness', symbol: 'a', description: 'Thickness of the surface.' },
    { value: 0.6, unit: 'fm' },
  ),
];

/** d/dr of 1/(1 + exp((r-R)/a)), without overflow. */
function slopeOf(R: number, a: number, r: number): number {
  const fall = Math.exp(-Math.abs((r - R) / a));
  return -fall / (a * (1 + fall) ** 2);
}

export const spinOrbit: Form = {
  key: 'spinOrbit',
  label: 'Spin-orbit',
  formula: String.raw`V(r) = (V_{so}+iW_{so})\left(\frac{\hbar}{m_\pi c}\right)^{\!2}\frac1r\frac{d}{dr}\frac{1}{1+e^{(r-R)/a}}\;\mathbf l\cdot\boldsymbol\sigma,\quad \left(\frac{\hbar}{m_\pi c}\right)^{\!2} = 2\ \text{fm}^2`,
  transformFormula: String.raw`\text{none: partial waves only}`,
  source:
    'L. H. Thomas, Nature 117 (1926) 514; E. Fermi, Nuovo Cimento 11 (1954) 407; as optical potentials write it: F. D. Becchetti and G. W. Greenlees, Phys. Rev. 182 (1969) 1190',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const R = read.need('R');
    const a = read.need('a');
    return {
      form: 'spinOrbit',
      strength: { re: read.need('Vso'), im: read.optional('Wso') ?? 0 },
      v: (r) => (PION_SQUARED * slopeOf(R, a, r)) / r,
      closed: null,
      quadrature: null,
      noBorn:
        'A spin-orbit term turns the spin: it is computed by partial waves only, which give the analysing power besides. Ask for partial waves.',
      spinOrbit: true,
      coulombTail: 0,
      norm: 0,
      firstMoment: null,
      lineIntegral: () => null,
      range: Math.max(R, a),
      tail: 'exponential',
      reach: R + E_FOLDINGS * a,
      breakpoints: [],
    };
  },
};
