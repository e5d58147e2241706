import {
  besselProducts,
  besselProductsFor,
  type BesselProducts,
} from '#server/physics/numerics/bessel-products.ts';
import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { Complex } from '#server/physics/potentials/types.ts';
import type { MeshPanel } from './radial-mesh.ts';

/** Partial waves of first and second order for l = 0 … lMax; S_l = 1 + 2i (T1_l + T2_l + …). */
export interface SecondOrderWaves {
  firstRe: Float64Array;
  firstIm: Float64Array;
  secondRe: Float64Array;
  secondIm: Float64Array;
  /** Im T2_l - |T1_l|², what complex depths remove in second order: zero for a real potential. */
  absorbed: Float64Array;
  /** Bound of the rounding of T2_l. */
  rounding: Float64Array;
}

const RULE = gaussRule(16);
const POINTS = RULE.nodes.length;

/** P_0 … P_16 at the points of the rule. */
const LEGENDRE = Array.from(RULE.nodes, (x) => {
  const values = [1, x];
  for (let n = 1; n < POINTS; n++) {
    values.push(((2 * n + 1) * x * (values[n] ?? 0) - n * (values[n - 1] ?? 0)) / (n + 1));
  }
  return values;
});

/** Integral from the lower end to point i of the polynomial that is one at point j, over the weight of j. */
const UP_TO = Float64Array.from({ length: POINTS * POINTS }, (_, index) => {
  const at = LEGENDRE[Math.floor(index / POINTS)] ?? [];
  const of = LEGENDRE[index % POINTS] ?? [];
  let sum = (at[1] ?? 0) + 1;
  for (let n = 1; n < POINTS; n++) {
    sum += (of[n] ?? 0) * ((at[n + 1] ?? 0) - (at[n - 1] ?? 0));
  }
  return sum / 2;
});
/** On a shell the Green function is met half before and half behind. */
const ON_A_SHELL = Float64Array.of(0.5);

/** Running sums of one l over the panels. */
interface Sums {
  /** A = ∫ U x² j² dr up to here. */
  innerRe: Float64Array;
  innerIm: Float64Array;
  innerSize: Float64Array;
  /** D = ∫ U x² j y A dr. */
  doubleRe: Float64Array;
  doubleIm: Float64Array;
  /** Rounding of D and of A. */
  noise: Float64Array;
  innerNoise: Float64Array;
}

/** What every wave of one panel needs, read once. */
interface Loaded {
  count: number;
  re: Float64Array;
  im: Float64Array | null;
  upTo: Float64Array;
  squares: Float64Array[];
  mixed: Float64Array[];
  /** w U x² j_l² at the points. */
  vRe: Float64Array;
  vIm: Float64Array;
}

/** Σ_ij a_i (A + Σ_j C_ij v_j) over the points of a panel, for real U; and Σ |a_i|. */
function realDouble({ count, re, upTo, mixed, vRe }: Loaded, l: number, inner: number) {
  let double = 0;
  let size = 0;
  for (let i = 0; i < count; i++) {
    let sum = inner;
    const row = i * count;
    for (let j = 0; j < count; j++) sum += (upTo[row + j] ?? 0) * (vRe[j] ?? 0);
    const a = (re[i] ?? 0) * (mixed[i]?.[l] ?? 0);
    double += a * sum;
    size += Math.abs(a);
  }
  return { re: double, im: 0, size };
}

/** The same for complex U. */
function complexDouble(
  { count, re, im, upTo, mixed, vRe, vIm }: Loaded,
  l: number,
  innerRe: number,
  innerIm: number,
) {
  const double = { re: 0, im: 0, size: 0 };
  for (let i = 0; i < count; i++) {
    let x = innerRe;
    let y = innerIm;
    const row = i * count;
    for (let j = 0; j < count; j++) {
      const share = upTo[row + j] ?? 0;
      x += share * (vRe[j] ?? 0);
      y += share * (vIm[j] ?? 0);
    }
    const wave = mixed[i]?.[l] ?? 0;
    const a = (re[i] ?? 0) * wave;
    const b = (im?.[i] ?? 0) * wave;
    double.re += a * x - b * y;
    double.im += a * y + b * x;
    double.size += Math.abs(a) + Math.abs(b);
  }
  return double;
}

/** Adds one panel to the sums of all waves that reach it. */
function addPanel(panel: MeshPanel, products: readonly BesselProducts[], k: number, sums: Sums) {
  const { r, re, im } = panel;
  const count = r.length;
  const used = products.slice(0, count);
  const vRe = new Float64Array(count);
  const vIm = new Float64Array(count);
  const loaded: Loaded = {
    count,
    re,
    im,
    upTo: count === 1 ? ON_A_SHELL : UP_TO,
    squares: used.map(({ square }) => square),
    mixed: used.map(({ mixed }) => mixed),
    vRe,
    vIm,
  };
  const reach = used.reduce((most, { length }) => Math.max(most, length), 0);
  const noise = (40 + 4 * k * (r[count - 1] ?? 0)) * UNIT_ROUNDOFF;
  for (let l = 0; l < reach; l++) {
    let pRe = 0;
    let pIm = 0;
    let pSize = 0;
    for (let j = 0; j < count; j++) {
      const wave = loaded.squares[j]?.[l] ?? 0;
      const a = (re[j] ?? 0) * wave;
      vRe[j] = a;
      pRe += a;
      pSize += Math.abs(a);
      if (im === null) continue;
      const b = (im[j] ?? 0) * wave;
      vIm[j] = b;
      pIm += b;
      pSize += Math.abs(b);
    }
    const aRe = sums.innerRe[l] ?? 0;
    const aIm = sums.innerIm[l] ?? 0;
    const double = im === null ? realDouble(loaded, l, aRe) : complexDouble(loaded, l, aRe, aIm);
    const size = (sums.innerSize[l] ?? 0) + pSize;
    sums.noise[l] = (sums.noise[l] ?? 0) + double.size * (noise * size + (sums.innerNoise[l] ?? 0));
    sums.innerNoise[l] = (sums.innerNoise[l] ?? 0) + noise * pSize;
    sums.innerSize[l] = size;
    sums.doubleRe[l] = (sums.doubleRe[l] ?? 0) + double.re;
    sums.doubleIm[l] = (sums.doubleIm[l] ?? 0) + double.im;
    sums.innerRe[l] = aRe + pRe;
    sums.innerIm[l] = aIm + pIm;
  }
}

/** Products up to the last that is not nothing; what an earlier point left beyond it is wiped. */
function fill(into: BesselProducts, x: number, lMax: number): void {
  const before = into.length;
  besselProducts(x, lMax, into);
  if (before > into.length) {
    into.square.fill(0, into.length, before);
    into.mixed.fill(0, into.length, before);
  }
}

/**
 * Partial waves of second order in the potential.
 *
 * Formula: with A_l(r) = (1/k) ∫_0^r U x² j_l² dr' (x = kr'), T1_l = -A_l(∞) and
 *   T2_l = i T1_l² - (2/k) ∫_0^∞ U x² j_l y_l A_l dr, from the Green function -ik j_l(kr<) h_l(kr>).
 *
 * @param panels of U, in order of r
 * @param k wave number, 1/angstrom, > 0
 * @param lMax highest l
 * @param phase number of modulus one by which U is to be multiplied, where all strengths share it
 * @returns waves with a bound of their rounding; what the panels leave out is seen by cutting them finer
 *
 * Validity: U smooth on each panel, panels not wider than some 5/k.
 *
 * Source: textbook; e.g. C. J. Joachain, Quantum Collision Theory (1975), ch. 8.
 */
export function secondOrderWaves(
  panels: readonly MeshPanel[],
  k: number,
  lMax: number,
  phase: Complex | null = null,
): SecondOrderWaves {
  const zeros = () => new Float64Array(lMax + 1);
  const sums: Sums = {
    innerRe: zeros(),
    innerIm: zeros(),
    innerSize: zeros(),
    doubleRe: zeros(),
    doubleIm: zeros(),
    noise: zeros(),
    innerNoise: zeros(),
  };
  const products = Array.from({ length: POINTS }, () => besselProductsFor(lMax));
  for (const panel of panels) {
    panel.r.forEach((r, i) => {
      const into = products[i];
      if (into) fill(into, k * r, lMax);
    });
    addPanel(panel, products, k, sums);
  }
  return fromSums(sums, k, phase);
}

/** The sums of real U, turned into those of U times a number of modulus one. */
function turned({ innerRe, doubleRe }: Sums, { re, im }: Complex) {
  const square = { re: (re - im) * (re + im), im: 2 * re * im };
  return {
    innerRe: innerRe.map((value) => re * value),
    innerIm: innerRe.map((value) => im * value),
    doubleRe: doubleRe.map((value) => square.re * value),
    doubleIm: doubleRe.map((value) => square.im * value),
  };
}

function fromSums(sums: Sums, k: number, phase: Complex | null): SecondOrderWaves {
  const { noise, innerNoise } = sums;
  const { innerRe, innerIm, doubleRe, doubleIm } = phase === null ? sums : turned(sums, phase);
  const twice = 2 / k / k;
  const firstRe = innerRe.map((value) => -value / k);
  const firstIm = innerIm.map((value) => -value / k);
  const at = (list: Float64Array, l: number) => list[l] ?? 0;
  return {
    firstRe,
    firstIm,
    secondRe: doubleRe.map((value, l) => -2 * at(firstRe, l) * at(firstIm, l) - twice * value),
    secondIm: doubleIm.map(
      (value, l) =>
        (at(firstRe, l) - at(firstIm, l)) * (at(firstRe, l) + at(firstIm, l)) - twice * value,
    ),
    absorbed: doubleIm.map((value, l) => -2 * at(firstIm, l) ** 2 - twice * value),
    rounding: noise.map((value, l) => {
      const first = Math.hypot(at(firstRe, l), at(firstIm, l));
      return (
        twice * value + (2 * first * at(innerNoise, l)) / k + 8 * UNIT_ROUNDOFF * first * first
      );
    }),
  };
}
