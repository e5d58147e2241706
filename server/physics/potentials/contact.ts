import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { readParameters } from './parameters.ts';
import type { Complex, Form, FormContext, FormParameter, Term } from './types.ts';

/** b, given by hand. */
export const lengthB: FormParameter = {
  key: 'b',
  label: 'Scattering length',
  symbol: 'b',
  dimension: 'length',
  min: -1e12,
  max: 1e12,
  default: { value: 6.646, unit: 'fm' },
  description:
    'Free scattering length for a target that recoils, bound one for a fixed target. Positive repels, as most nuclei do slow neutrons.',
};

const parameters = [lengthB];

const TRANSFORM = 1 / (4 * Math.PI);

/**
 * Fermi's pseudopotential, first order only.
 *
 * Formula: V = (2πħ²/mu) b delta³(r), so that f = -b at all angles. With delta³ as the shape, S(q) = 1/4π and
 * strength = 4π b/(2mu/ħ²) in eV·angstrom³.
 *
 * @param b scattering length for the target as given, angstrom; a negative imaginary part absorbs
 * @param context for 2mu/ħ²
 * @param incoherent angstrom²/sr
 *
 * Source: E. Fermi, Ricerca Scientifica 7 (1936) 13.
 */
export function contactTerm(b: Complex, context: FormContext, incoherent?: number): Term {
  const factor = (4 * Math.PI) / context.twoMuOverHbar2;
  return {
    form: 'contact',
    strength: { re: factor * b.re, im: factor * b.im },
    v: null,
    noFunction: 'The potential acts at the origin alone, where it is no function.',
    closed: () => ({
      value: TRANSFORM,
      error: 2 * UNIT_ROUNDOFF * TRANSFORM,
      evaluations: 0,
      status: 'converged',
    }),
    quadrature: null,
    coulombTail: 0,
    norm: TRANSFORM,
    firstMoment: null,
    lineIntegral: () => null,
    range: null,
    tail: 'point',
    reach: null,
    breakpoints: [],
    ...(incoherent !== undefined && { incoherent }),
  };
}

export const contact: Form = {
  key: 'contact',
  label: 'Contact, scattering length',
  formula: String.raw`V(\mathbf r) = \frac{2\pi\hbar^2}{\mu}\,b\,\delta^3(\mathbf r)`,
  transformFormula: String.raw`f(\theta) = -b`,
  source: 'E. Fermi, Ricerca Scientifica 7 (1936) 13',
  parameters,
  build(values, context) {
    return contactTerm({ re: readParameters(parameters, values).need('b'), im: 0 }, context);
  },
};
