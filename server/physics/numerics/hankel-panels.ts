import besselj0 from '@stdlib/math-base-special-besselj0';
import { gaussRule } from './gauss-rule.ts';
import { sphericalBesselArray } from './spherical-bessel.ts';

/** A complex function on [a, b] by its values at the sixteen points of the Gauss rule. */
export interface HankelPanel {
  a: number;
  b: number;
  re: Float64Array;
  im: Float64Array;
}

const RULE = gaussRule(16);
const POINTS = RULE.nodes.length;
/** q · half width up to which sixteen points follow J0 to rounding. */
const SLOW = 4;
/** From here on J0 is a slowly varying amplitude times a wave, to rounding. */
const FAR = 25;
/** Ratio of the ends of a panel up to which that amplitude is a polynomial of degree 15. */
const WIDEST = 1.6;
const TERMS = 10;

/** a_k of J0 + iY0 = sqrt(2/pi z) e^{i(z - pi/4)} Σ a_k (i/z)^k: a_k = -(2k-1)²/(8k) a_{k-1}. */
const HANKEL = Array.from({ length: 2 * TERMS }, () => 1);
for (let n = 1; n < HANKEL.length; n++) {
  HANKEL[n] = ((HANKEL[n - 1] ?? 0) * -((2 * n - 1) ** 2)) / (8 * n);
}

/** P_0 … P_15 at x. */
function legendreAt(x: number): number[] {
  const values = [1, x];
  for (let n = 1; n < POINTS - 1; n++) {
    values.push(((2 * n + 1) * x * (values[n] ?? 0) - n * (values[n - 1] ?? 0)) / (n + 1));
  }
  return values;
}
/** (2n+1)/2 w_j P_n(x_j): coefficient n from value j. */
const COEFFICIENT = Array.from({ length: POINTS }, (_, n) =>
  RULE.nodes.map((x, j) => ((2 * n + 1) / 2) * (RULE.weights[j] ?? 0) * (legendreAt(x)[n] ?? 0)),
);
/** Values at the points of either half from those of the whole. */
const HALVES = [-0.5, 0.5].map((shift) =>
  Array.from(RULE.nodes, (x) => {
    const at = legendreAt(shift + x / 2);
    return RULE.nodes.map((_, j) =>
      COEFFICIENT.reduce((sum, row, n) => sum + (at[n] ?? 0) * (row[j] ?? 0), 0),
    );
  }),
);

interface Node extends HankelPanel {
  halves: [Node, Node] | null;
}

function halvesOf(node: Node): [Node, Node] {
  const { a, b } = node;
  const middle = a + (b - a) / 2;
  const child = (side: number, from: number, to: number): Node => {
    const rows = HALVES[side] ?? [];
    const apply = (values: Float64Array) =>
      Float64Array.from(rows, (row) => row.reduce((sum, w, j) => sum + w * (values[j] ?? 0), 0));
    return { a: from, b: to, re: apply(node.re), im: apply(node.im), halves: null };
  };
  return (node.halves ??= [child(0, a, middle), child(1, middle, b)]);
}

/** Sum over the points, for panels within which J0 hardly turns. */
function direct({ a, b, re, im }: Node, q: number, sum: { re: number; im: number }): void {
  const half = (b - a) / 2;
  for (let j = 0; j < POINTS; j++) {
    const x = a + half + half * (RULE.nodes[j] ?? 0);
    const weight = half * (RULE.weights[j] ?? 0) * x * besselj0(q * x);
    sum.re += weight * (re[j] ?? 0);
    sum.im += weight * (im[j] ?? 0);
  }
}

const weightRe = new Float64Array(POINTS);
const weightIm = new Float64Array(POINTS);

/** ∫_{-1}^{1} of the polynomial that is one at point j, times e^{iwt}: Σ_n c_nj 2 i^n j_n(w). */
function waveWeights(w: number): void {
  const bessel = sphericalBesselArray(POINTS - 1, w);
  weightRe.fill(0);
  weightIm.fill(0);
  for (let n = 0; n < POINTS; n++) {
    const factor = (n % 4 < 2 ? 2 : -2) * (bessel[n] ?? 0);
    const into = n % 2 === 0 ? weightRe : weightIm;
    const row = COEFFICIENT[n];
    for (let j = 0; j < POINTS; j++) into[j] = (into[j] ?? 0) + factor * (row?.[j] ?? 0);
  }
}

/** Filon's way: amplitude of J0 times the function as a polynomial, the wave in closed form. */
function filon({ a, b, re, im }: Node, q: number, sum: { re: number; im: number }): void {
  const half = (b - a) / 2;
  const middle = a + half;
  waveWeights(q * half);
  const phase = q * middle - Math.PI / 4;
  const c = half * Math.cos(phase);
  const s = half * Math.sin(phase);
  for (let j = 0; j < POINTS; j++) {
    const x = middle + half * (RULE.nodes[j] ?? 0);
    const z = q * x;
    const u = 1 / (z * z);
    let P = 0;
    let Q = 0;
    for (let n = 2 * TERMS - 2; n >= 0; n -= 2) {
      P = (HANKEL[n] ?? 0) - u * P;
      Q = (HANKEL[n + 1] ?? 0) - u * Q;
    }
    Q /= z;
    const amplitude = x * Math.sqrt(2 / (Math.PI * z));
    const wRe = weightRe[j] ?? 0;
    const wIm = weightIm[j] ?? 0;
    // Re[(c + is)(P + iQ)(w)]
    const weight = amplitude * (P * (c * wRe - s * wIm) - Q * (c * wIm + s * wRe));
    sum.re += weight * (re[j] ?? 0);
    sum.im += weight * (im[j] ?? 0);
  }
}

function add(node: Node, q: number, sum: { re: number; im: number }): void {
  const { a, b } = node;
  if (q * (b - a) <= 2 * SLOW) direct(node, q, sum);
  else if (q * a >= FAR && b <= WIDEST * a) filon(node, q, sum);
  else for (const half of halvesOf(node)) add(half, q, sum);
}

/**
 * Hankel transform of order zero of a function given on panels.
 *
 * Formula: g(q) = ∫ b J0(qb) F(b) db; where J0 turns fast within a panel, its amplitude times F is taken as a polynomial and the wave
 *   integrated in closed form, ∫_{-1}^{1} P_n(t) e^{iwt} dt = 2 i^n j_n(w), so that the work does not grow with q.
 *
 * @param panels on each of which F is a polynomial of degree 15 to rounding; b >= 0
 * @returns g as a function of q >= 0; rounding some 1e-15 of ∫ b |F| db, and that of the phase qb
 *
 * Source: L. N. G. Filon, Proc. R. Soc. Edinburgh 49 (1928) 38; DLMF 10.17.5, 18.17.19; J0 of the package stdlib.
 */
export function hankelTransform(
  panels: readonly HankelPanel[],
): (q: number) => { re: number; im: number } {
  const nodes = panels.map((panel): Node => ({ ...panel, halves: null }));
  return (q) => {
    const sum = { re: 0, im: 0 };
    for (const node of nodes) add(node, q, sum);
    return sum;
  };
}
