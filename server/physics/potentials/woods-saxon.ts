import { integrate } from '#server/physics/numerics/quadrature.ts';
import { E_FOLDINGS } from './exponential-tail.ts';
import {
  absorptionParameter,
  complexStrength,
  lengthParameter,
  radiusFromZero,
  readParameters,
  strengthParameter,
} from './parameters.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import type { Form, FormParameter } from './types.ts';
import { woodsSaxonTransform } from './woods-saxon-transform.ts';

const parameters: FormParameter[] = [
  strengthParameter(
    { value: -50, unit: 'MeV' },
    'Depth deep inside the nucleus, half of it at r = R. Negative attracts.',
  ),
  absorptionParameter('MeV'),
  radiusFromZero(
    {
      key: 'R',
      label: 'Radius',
      symbol: 'R',
      description: 'Radius of half depth, about 1.25 fm times the cube root of the mass number.',
    },
    { value: 4, unit: 'fm' },
  ),
  lengthParameter(
    {
      key: 'a',
      label: 'Diffuseness',
      symbol: 'a',
      description: 'Thickness of the surface: from 90 % to 10 % of the depth in 4.4 a.',
    },
    { value: 0.65, unit: 'fm' },
  ),
];

const CUT = 48;

/** Edges about the surface in steps of its own thickness; inside and outside nothing is narrower. */
export function surfaceEdges(R: number, a: number): number[] {
  const steps = [-40, -20, -10, -5, 0, 5, 10, 20, CUT];
  return [0, ...steps.map((x) => R + x * a).filter((r) => r > 0)];
}

/** Bound of ∫ r² exp(-(r-R)/a) dr beyond R + 48 a. */
function remainder(R: number, a: number): number {
  const last = R + CUT * a;
  return a * (last ** 2 + 2 * last * a + 2 * a ** 2) * Math.exp(-CUT);
}

/** ∫_from^∞ dr/(1 + exp((r-R)/a)) = a ln(1 + exp((R-from)/a)), without overflow. */
function softStep(R: number, a: number, from: number): number {
  const depth = (R - from) / a;
  return a * (Math.max(depth, 0) + Math.log1p(Math.exp(-Math.abs(depth))));
}

export const woodsSaxon: Form = {
  key: 'woodsSaxon',
  label: 'Woods-Saxon',
  formula: String.raw`V(r) = \frac{V_0 + iW_0}{1 + e^{(r-R)/a}}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = (V_0+iW_0)\left\{\frac{\pi a}{q\,\sinh \pi qa}\left[\pi a \coth(\pi qa)\sin qR - R\cos qR\right] + 2a^3\sum_{n\ge 1}\frac{(-1)^{n-1}\,n\,e^{-nR/a}}{(n^2+q^2a^2)^2}\right\}`,
  source: 'R. D. Woods and D. S. Saxon, Phys. Rev. 95 (1954) 577',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const R = read.need('R');
    const a = read.need('a');
    const closed = woodsSaxonTransform(R, a);
    const norm = closed(0).value;
    const shape = (r: number) => 1 / (1 + Math.exp((r - R) / a));
    const edges = surfaceEdges(R, a);
    const weighted = (r: number) => r * shape(r);
    return {
      form: 'woodsSaxon',
      strength: complexStrength(read),
      v: shape,
      closed,
      quadrature: radialQuadrature({ integrand: weighted, edges, tail: remainder(R, a) }, norm),
      coulombTail: 0,
      norm,
      firstMoment: integrate(weighted, 0, R + CUT * a, { breakpoints: edges }).value,
      lineIntegral: (from) => softStep(R, a, from),
      range: Math.max(R, a),
      tail: 'exponential',
      reach: R + E_FOLDINGS * a,
      breakpoints: [],
    };
  },
};
