import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { resolvePanels } from '#server/physics/numerics/resolved-panels.ts';
import type { Complex } from '#server/physics/potentials/types.ts';
import { momentsOf, type ImpactPanels, type WeightedPoint } from './impact-panels.ts';

/** A shell and what is known of the transmission about its rim; chi = -A/y there, y = √(R² - b²). */
export interface Rim {
  R: number;
  A: number;
  /** F and its noise where the shell adds `own` to the phase. */
  F: (b: number, own: number) => Complex;
  noise: (b: number, own: number) => number;
  /** F = O e^{-iA/y} + S + (iA/y where first order is taken apart). */
  O: (b: number) => Complex;
  S: (b: number) => Complex;
  firstOrderApart: boolean;
}

const RULE = gaussRule(16);
/** Phase from which on the rim is summed by its asymptotic series, rad, and where it cannot be followed. */
const ASYMPTOTIC = 500;
const MOST_PHASE = 2e4;
const TERMS = 8;
const MOST_PANELS = 6000;
const CENTRE = 1e-12;
/** Points that are left for J0. */
const FEW = 24;

/** E_3(iw) for |w| >= 500: e^{-z}/z Σ (-1)^n (3)_n/z^n, the last term below 1e-15. */
function thirdExponentialIntegral(w: number): Complex {
  let sum = { re: 0, im: 0 };
  for (let n = TERMS - 1; n >= 0; n--) {
    // 1 - (3+n)/z (…), 1/z = -i/w
    const factor = (3 + n) / w;
    sum = { re: 1 - factor * sum.im, im: factor * sum.re };
  }
  const [c, s] = [Math.cos(w) / w, Math.sin(w) / w];
  // e^{-iw}/(iw) = (-i/w)(cos w - i sin w)
  return { re: -s * sum.re + c * sum.im, im: -s * sum.im - c * sum.re };
}

const times = (x: Complex, y: Complex): Complex => ({
  re: x.re * y.re - x.im * y.im,
  im: x.re * y.im + x.im * y.re,
});

/** Weighted points of ∫ y g(y) dy over a panel, at their impact parameters. */
function pointsOn(R: number, from: number, to: number, g: (y: number) => Complex): RimPoint[] {
  const half = (to - from) / 2;
  return Array.from(RULE.nodes, (node, i) => {
    const y = from + half + half * node;
    const weight = half * (RULE.weights[i] ?? 0);
    const value = g(y);
    const b = Math.sqrt((R - y) * (R + y));
    return { b, weight: weight * y, re: weight * value.re, im: weight * value.im };
  });
}

/** A weighted point, and the weight alone, b db. */
interface RimPoint extends WeightedPoint {
  weight: number;
}

/**
 * Many weighted points as few: J0(qb), which hardly turns between b1 and R, is a polynomial there, and Σ w_j p(b_j) for every p of degree
 * 23 is a sum over 24 Chebyshev points.
 */
function gathered(points: readonly RimPoint[], b1: number, R: number): WeightedPoint[] {
  const half = (R - b1) / 2;
  const re = new Float64Array(FEW);
  const im = new Float64Array(FEW);
  for (const point of points) {
    const t = (point.b - b1 - half) / half;
    let [before, value] = [t, 1];
    for (let n = 0; n < FEW; n++) {
      re[n] = (re[n] ?? 0) + point.re * value;
      im[n] = (im[n] ?? 0) + point.im * value;
      const next = 2 * t * value - before;
      before = value;
      value = next;
    }
  }
  return Array.from({ length: FEW }, (_, m) => {
    const angle = ((2 * m + 1) * Math.PI) / (2 * FEW);
    const sum = { b: b1 + half + half * Math.cos(angle), re: 0, im: 0 };
    for (let n = 0; n < FEW; n++) {
      const factor = ((n === 0 ? 1 : 2) / FEW) * Math.cos(n * angle);
      sum.re += factor * (re[n] ?? 0);
      sum.im += factor * (im[n] ?? 0);
    }
    return sum;
  });
}

/**
 * The inner side of the rim of a delta shell, where the phase -A/√(R² - b²) turns without end.
 *
 * Formula: ∫ b J0(qb) F db = ∫_0^{y1} y J0(q√(R² - y²)) F dy; below y0 = A/500 the part that turns is J0(qR) O(R) ∫ y e^{-iA/y} dy =
 *   J0(qR) O(R) y0² E_3(iA/y0), by its asymptotic series.
 *
 * @param rim shell, and F, O and S as functions of b
 * @param y1 √(R² - b²) at the end of the rim; J0 must hardly turn from there to R
 * @param jumps radii where F or its derivatives jump, angstrom
 * @param largestQ 1/angstrom
 * @returns weighted points in the place of panels; null where the phase turns too often
 *
 * Source: derived here; E_3: DLMF 8.20.2.
 */
export function shellRim(
  { R, A, F, O, S, firstOrderApart, noise }: Rim,
  y1: number,
  jumps: readonly number[],
  largestQ: number,
): ImpactPanels | null {
  const size = Math.abs(A);
  // What J0 changes up to y0 stands before an integral of y0³/A: kept below 1e-13 of the whole, min(A, R)².
  const steady = (UNIT_ROUNDOFF * 1000 * Math.min(size, R) ** 2 * size * 2 * R) / largestQ;
  const y0 = Math.min(size / ASYMPTOTIC, y1 / 2, steady ** 0.2);
  if (!(size / y0 <= MOST_PHASE)) return null;
  // At the centre itself singular potentials have no phase.
  const at = (y: number) => Math.max(Math.sqrt((R - y) * (R + y)), CENTRE * R);
  const weighted = (y: number): Complex => {
    const { re, im } = F(at(y), -A / y);
    return { re: y * re, im: y * im };
  };
  const inner = jumps.map(at).filter((y) => y > y0 && y < y1);
  for (let y = y0; y < y1; y *= 2) inner.push(y);
  const edges = [...inner.sort((a, b) => a - b), y1];
  const found = resolvePanels([(y) => weighted(y).re, (y) => weighted(y).im], edges, {
    absoluteNoise: (y) => y * noise(at(y), -A / y),
    maxPanels: MOST_PANELS,
  });
  if (!found.resolved) return null;
  const smooth = (y: number): Complex => {
    const { re, im } = S(at(y));
    return { re: y * re, im: y * im + (firstOrderApart ? A : 0) };
  };
  const turning = thirdExponentialIntegral(A / y0);
  const end = times(O(R), { re: y0 * y0 * turning.re, im: y0 * y0 * turning.im });
  const points = [
    ...pointsOn(R, 0, y0, smooth),
    ...found.edges.slice(1).flatMap((to, i) => pointsOn(R, found.edges[i] ?? to, to, weighted)),
    { b: R, weight: 0, ...end },
  ];
  // Points carry one power of b already.
  const sizes = momentsOf((power) =>
    points.reduce((sum, { b, re, im }) => sum + (Math.hypot(re, im) * power(b)) / b, 0),
  );
  const [near, last] = [O(at(y0)), O(R)];
  const change = Math.hypot(near.re - last.re, near.im - last.im) + (largestQ * y0 * y0) / (2 * R);
  const left = (y0 ** 3 / size) * (change + 1e-14);
  const ofNoise = found.edges
    .slice(1)
    .reduce((sum, to, i) => sum + (to - (found.edges[i] ?? to)) * to * noise(at(to), -A / to), 0);
  return {
    panels: [],
    points: gathered(points, at(y1), R),
    measure: points,
    missed: found.missed + left,
    size: sizes,
    noise: momentsOf((power) => (ofNoise * power(R)) / R),
  };
}
