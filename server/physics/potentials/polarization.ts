import { COULOMB_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import { sineTransform } from '#server/physics/numerics/oscillatory-quadrature.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { sineTail } from '#server/physics/numerics/sine-tail.ts';
import { lengthParameter, readParameters } from './parameters.ts';
import { closedResult, Q_ALLOWANCE } from './transform-error.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  {
    key: 'alpha',
    label: 'Polarizability volume',
    symbol: '\\alpha',
    dimension: 'volume',
    min: 0,
    max: 1e12,
    default: { value: 1.383, unit: 'bohr3' },
    description:
      'Static dipole polarizability of the target as a volume. The potential is that of one elementary charge: for a projectile of charge number Z multiply by Z squared.',
  },
  lengthParameter(
    {
      key: 'd',
      label: 'Cut-off length',
      symbol: 'd',
      description: 'Distance below which the potential levels off, about the size of the atom.',
    },
    { value: 1, unit: 'bohr' },
  ),
];

/** 1/(r² + d²)² is below 1e-17 of its value at the origin from here, in d. */
const REACH = 17_783;

/**
 * Transform of 1/(r² + d²)².
 *
 * Formula: S(q) = (π/4d) exp(-qd).
 *
 * @param d cut-off length, angstrom, > 0
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S in 1/angstrom; relative error 1e-15 (1 + qd), what the exponent makes of its rounding
 *
 * Source: textbook; table of sine transforms, e.g. I. S. Gradshteyn and I. M. Ryzhik, 3.729.
 */
export function polarizationTransform(d: number, q: number) {
  const x = q * d;
  const value = (Math.PI / (4 * d)) * Math.exp(-x);
  return closedResult(value, (6 + x) * value, value === 0 ? 0 : x * value);
}

/** r/(r² + d²)² for complex r. */
function weighted(d: number, re: number, im: number): readonly [number, number] {
  const [a, b] = [(re - im) * (re + im) + d * d, 2 * re * im];
  const size = a * a + b * b;
  // 1/(a + ib)²
  const [c, s] = [((a - b) * (a + b)) / size / size, (-2 * a * b) / size / size];
  return [re * c - im * s, re * s + im * c];
}

/** Edges that double from the cut-off length on. */
function doubling(d: number, last: number): number[] {
  const edges = [0];
  for (let r = d; r < last; r *= 2) edges.push(r);
  return [...edges, last];
}

/** The potential falls as r^-4 only: what lies beyond half a period is integrated along a turned path. */
function polarizationQuadrature(d: number, norm: number): (q: number) => NumericalResult {
  const integrand = (r: number) => r / (r * r + d * d) ** 2;
  return (q) => {
    if (q * d < 1e-100) {
      return integrate((r) => r * integrand(r), 0, Infinity, { scale: d, breakpoints: [d, 8 * d] });
    }
    const R = Math.max(d, Math.PI / q);
    const inner = sineTransform({ integrand, edges: doubling(d, R), tail: 0 }, q);
    const outer = sineTail((re, im) => weighted(d, re, im), R, q);
    return {
      value: inner.value + outer.value,
      error: inner.error + outer.error + Q_ALLOWANCE * norm * Math.min(1, q * d),
      evaluations: inner.evaluations + outer.evaluations,
      status: outer.status === 'converged' ? inner.status : outer.status,
    };
  };
}

/** ∫_from^∞ dr/(r² + d²)² = (atan x - x/(1 + x²))/(2d³), x = d/from; by series where the two cancel. */
function outerLine(d: number, from: number): number {
  const x = d / from;
  if (x > 0.5) return (Math.atan(x) - x / (1 + x * x)) / (2 * d ** 3);
  let sum = 0;
  let power = -x;
  for (let k = 1; k < 40; k++) {
    power *= -x * x;
    sum += (power * 2 * k) / (2 * k + 1);
  }
  return sum / (2 * d ** 3);
}

export const polarization: Form = {
  key: 'polarization',
  label: 'Polarization',
  formula: String.raw`V(r) = -\frac{\alpha\,e^2}{2}\,\frac{1}{(r^2+d^2)^2}`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = -\frac{\alpha\,e^2}{2}\,\frac{\pi}{4d}\,e^{-qd}`,
  source: 'R. A. Buckingham, Proc. R. Soc. A 160 (1937) 94; transform: table of sine transforms',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const d = read.need('d');
    const norm = Math.PI / (4 * d);
    return {
      form: 'polarization',
      strength: { re: -(read.need('alpha') * COULOMB_EV_ANGSTROM) / 2, im: 0 },
      v: (r) => 1 / (r * r + d * d) ** 2,
      closed: (q) => polarizationTransform(d, q),
      quadrature: polarizationQuadrature(d, norm),
      coulombTail: 0,
      norm,
      firstMoment: 1 / (2 * d * d),
      lineIntegral: (from) => outerLine(d, from),
      range: d,
      tail: 'power',
      reach: REACH * d,
      breakpoints: [],
    };
  },
};
