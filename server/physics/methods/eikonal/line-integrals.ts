import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { besselK0, besselK1 } from '#server/physics/numerics/modified-bessel.ts';
import { resolvePanels } from '#server/physics/numerics/resolved-panels.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { exponentialsOf } from '../exponentials.ts';
import { localPotential } from '../local-potential.ts';

/** ∫ s(√(b² + z²)) dz over the whole line, angstrom, without the Coulomb tail of s. */
export type LineIntegral = (b: number) => number;

const RULE = gaussRule(16);

/** Closed forms; null where there is none. */
function closedLine(term: Term): LineIntegral | null {
  const { form, range } = term;
  const sum = exponentialsOf(term);
  if (sum) {
    return (b) =>
      sum.reduce((total, { weight, mu }) => total + 2 * weight * besselK0(mu * b).value, 0);
  }
  if (range === null) return null;
  switch (form) {
    case 'gaussian':
      return (b) => Math.sqrt(Math.PI) * range * Math.exp(-((b / range) ** 2));
    case 'squareWell':
      return (b) => (b < range ? 2 * Math.sqrt((range - b) * (range + b)) : 0);
    case 'exponential':
      return (b) => 2 * b * besselK1(b / range).value;
    case 'polarization':
      return (b) => Math.PI / (2 * (b * b + range * range) ** 1.5);
    default:
      return null;
  }
}

/** Points where the straight line at b meets radii, and doubling from b on, where r leaves b. */
function crossings(b: number, radii: readonly number[]): number[] {
  const last = radii.at(-1) ?? 0;
  if (!(last > b)) return [];
  const end = Math.sqrt((last - b) * (last + b));
  const points = radii.filter((r) => r > b).map((r) => Math.sqrt((r - b) * (r + b)));
  for (let z = b; z < end; z *= 2) points.push(z);
  points.sort((x, y) => x - y);
  return [0, ...points];
}

function sumOn(f: (z: number) => number, from: number, to: number): number {
  const half = (to - from) / 2;
  const middle = from + half;
  let sum = 0;
  for (let i = 0; i < RULE.nodes.length; i++) {
    sum += (RULE.weights[i] ?? 0) * f(middle + half * (RULE.nodes[i] ?? 0));
  }
  return half * sum;
}

/** By Gauss sums between crossings, each cut into `parts`. */
function numericalLine(
  shape: (r: number) => number,
  radii: readonly number[],
  parts: number,
): LineIntegral {
  return (b) => {
    const f = (z: number) => shape(Math.sqrt(b * b + z * z));
    const ends = crossings(b, radii);
    let sum = 0;
    for (let i = ends.length - 1; i > 0; i--) {
      const [from, to] = [ends[i - 1] ?? 0, ends[i] ?? 0];
      for (let j = 0; j < parts; j++) {
        const step = (to - from) / parts;
        sum += sumOn(f, from + j * step, j === parts - 1 ? to : from + (j + 1) * step);
      }
    }
    return 2 * sum;
  };
}

/** A line integral, and the same on finer panels where it is no closed form. */
export interface Line {
  at: LineIntegral;
  finer: LineIntegral | null;
}

/**
 * Line integral of the shape of one term.
 *
 * Formula: L(b) = ∫_{-∞}^{∞} s(√(b² + z²)) dz; closed for Gaussian, square well, exponential, polarization and sums of Yukawa shapes; else
 *   by sixteen-point sums between the radii within which r s(r) is a polynomial, and doubling steps from z = b on.
 *
 * @param term local, with a radial function; a Coulomb tail is taken away from it
 * @returns null where the shape cannot be followed
 *
 * Source: textbook; R. J. Glauber, in Lectures in Theoretical Physics, vol. 1 (1959), 315; integrals: I. S. Gradshteyn and I. M. Ryzhik,
 * 3.387, 3.389.
 */
export function lineOf(term: Term): Line | null {
  const closed = closedLine(term);
  if (closed) return { at: closed, finer: null };
  const unit = localPotential([{ ...term, strength: { re: 1, im: 0 } }], 1);
  if (unit.edges.length === 0) return { at: () => 0, finer: null };
  const found = resolvePanels([(r) => r * unit.re(r)], unit.edges);
  if (!found.resolved) return null;
  return {
    at: numericalLine(unit.re, found.edges, 1),
    finer: numericalLine(unit.re, found.edges, 2),
  };
}
