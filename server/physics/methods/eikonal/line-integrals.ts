import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { besselK0, besselK1 } from '#server/physics/numerics/modified-bessel.ts';
import { resolvePanels } from '#server/physics/numerics/resolved-panels.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { exponentialsOf } from '../exponentials.ts';
import { localPotential } from '../local-potential.ts';

/** ∫ s(√(b² + z²)) dz over the whole line, angstrom, without the Coulomb tail of s. */
type LineIntegral = (b: number) => number;

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

/**
 * Points between which the straight line at b is summed: where it crosses radii, no two farther apart than b or the first of them, as
 * r(z) = √(b² + z²) has its branch points at z = ±ib.
 */
function crossings(b: number, radii: readonly number[]): number[] {
  if (!(b > 0)) throw new RangeError(`a line integral is asked at b = ${b}; it needs b > 0`);
  const points = [0];
  let at = 0;
  for (const r of radii) {
    if (!(r > b)) continue;
    const next = Math.sqrt((r - b) * (r + b));
    while (next > at + Math.max(b, at)) {
      at += Math.max(b, at);
      points.push(at);
    }
    at = next;
    points.push(at);
  }
  return points;
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

/** A line integral with a bound of its error, angstrom. */
export interface Line {
  at: (b: number) => { value: number; error: number };
}

/** Rounding of the closed forms, K0 and K1 among them, and of the sums. */
const ROUNDING = 1e-14;
/** Shares of ∫ |r s| dr that the panels may miss as polynomials; their sums are exact to twice the degree. */
const SHARES = [1e-11, 1e-16];
/** Places at which the sums are compared with those on halved panels, and what differs less than this is good. */
const PLACES = 10;
const SAFETY = 4;

/** How far the sums of a panel and of its halves differ beyond noise, as a share, at some places within the reach. */
function disagreement(
  coarse: LineIntegral,
  fine: LineIntegral,
  noise: LineIntegral,
  reach: number,
): number {
  let worst = 0;
  for (let i = 0; i < PLACES; i++) {
    const b = (reach * (0.97 * (i + 0.3)) ** 3) / PLACES ** 3;
    const size = fine(b);
    const difference = Math.abs(coarse(b) - size) - noise(b);
    if (difference > 0) worst = Math.max(worst, difference / Math.abs(size));
  }
  return worst;
}

function withError(line: LineIntegral, noise: LineIntegral, relative: number): Line {
  return {
    at: (b) => {
      const value = line(b);
      return { value, error: (ROUNDING + relative) * Math.abs(value) + noise(b) };
    },
  };
}

/**
 * Line integral of the shape of one term.
 *
 * Formula: L(b) = ∫_{-∞}^{∞} s(√(b² + z²)) dz; closed for Gaussian, square well, exponential, polarization and sums of Yukawa shapes; else
 *   by sixteen-point sums between the radii within which r s(r) is a polynomial, the error from sums on halved panels at some places.
 *
 * @param term local, with a radial function; a Coulomb tail is taken away from it
 * @returns null where the shape cannot be followed
 *
 * Source: textbook; R. J. Glauber, High-Energy Collision Theory (Interscience, 1959), 315; integrals: I. S. Gradshteyn and I. M. Ryzhik,
 * 3.387, 3.389.
 */
export function lineOf(term: Term): Line | null {
  const closed = closedLine(term);
  if (closed) return withError(closed, () => 0, 0);
  const unit = localPotential([{ ...term, strength: { re: 1, im: 0 } }], 1);
  const reach = unit.edges.at(-1) ?? 0;
  if (!(reach > 0))
    return withError(
      () => 0,
      () => 0,
      0,
    );
  let best: Line | null = null;
  for (const share of SHARES) {
    const found = resolvePanels([(r) => r * unit.re(r)], unit.edges, {
      share,
      absoluteNoise: () => unit.noise,
    });
    if (!found.resolved) break;
    // ∫ dz/r over the line, for the noise of r s.
    const noise = (b: number) => 2 * unit.noise * (1 + Math.log1p(reach / b));
    const at = numericalLine(unit.re, found.edges, 1);
    const finer = numericalLine(unit.re, found.edges, 2);
    const relative = SAFETY * disagreement(at, finer, noise, reach);
    best = withError(at, noise, relative);
    if (relative <= ROUNDING) break;
  }
  return best;
}
