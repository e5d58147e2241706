import { gaussRule } from './gauss-rule.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';

/** A function on [middle - half, middle + half] as Σ c_n P_n((x - middle)/half). */
export interface LegendrePanel {
  middle: number;
  half: number;
  c: Float64Array;
  /** Bound of what the sum leaves out of f. */
  truncation: number;
  /** ∫ of the noise of f over the panel, and of x times it. */
  noise: number;
  noiseMoment: number;
}

export interface PanelAim {
  /** Size of error · width · (middle + half) that is good enough, in the unit of ∫ f x dx. */
  moment: number;
  /** Noise of f at a point. */
  noise: (x: number) => number;
  /** Points, ascending, at which the sum must agree with f besides. */
  checks: readonly number[];
  /** Calls of f allowed. */
  maxEvaluations: number;
}

export interface PanelFit {
  panels: LegendrePanel[];
  evaluations: number;
  /** Why there are no panels: f was not finite at `at`, or took more calls than allowed. */
  failure: { at: number; finite: boolean } | null;
}

const ORDER = 64;
/** Points cos((2i + 1) pi/2N), where the values of a function give the coefficients of T_n without loss. */
const NODES = Float64Array.from({ length: ORDER }, (_, i) =>
  Math.cos(((2 * i + 1) * Math.PI) / (2 * ORDER)),
);
/** 2/N cos(n(2i + 1) pi/2N), row by row in n. */
const PROJECTION = Array.from({ length: ORDER }, (_, n) =>
  Float64Array.from({ length: ORDER }, (_unused, i) => {
    const turns = (n * (2 * i + 1)) % (4 * ORDER);
    return ((n === 0 ? 1 : 2) / ORDER) * Math.cos((turns * Math.PI) / (2 * ORDER));
  }),
);

/** Gamma(z + 1/2)/Gamma(z + 1) at whole and half-whole z >= 0, by its recurrence. */
const GAMMA_RATIOS = ratiosOfGamma(2 * ORDER);
function ratiosOfGamma(count: number): number[] {
  const ratios = [Math.sqrt(Math.PI), 2 / Math.sqrt(Math.PI)];
  for (let twice = 2; twice <= count; twice++) {
    ratios.push(((ratios[twice - 2] ?? NaN) * (twice - 1)) / twice);
  }
  return ratios;
}
const ratioAt = (z: number): number => GAMMA_RATIOS[Math.round(2 * z)] ?? NaN;

/** Share of P_n in T_k. Source: B. Alpert and V. Rokhlin, SIAM J. Sci. Stat. Comput. 12 (1991) 158. */
function shareOf(n: number, k: number): number {
  if (k < n || (k - n) % 2 === 1) return 0;
  if (k === n) return n === 0 ? 1 : Math.sqrt(Math.PI) / (2 * ratioAt(n));
  const product = ratioAt((k - n - 2) / 2) * ratioAt((k + n - 1) / 2);
  return (-k * (n + 0.5) * product) / ((k - n) * (k + n + 1));
}
const SHARES = Array.from({ length: ORDER }, (_, n) =>
  Float64Array.from({ length: ORDER }, (_unused, k) => shareOf(n, k)),
);

const PROBES = [-0.9871, -0.4127, 0.1733, 0.7219, 0.9953];
/** Coefficients from which on all lie below so many roundings of the largest are noise. */
const PLATEAU = 2 * UNIT_ROUNDOFF;
const LAST = 4;
/** Rounding of the sums of 64 parts, to the largest value of f. */
const SUM_ROUNDING = 12 * UNIT_ROUNDOFF;
const RULE = gaussRule(16);

/** Σ c_n T_n at t, -1 to 1, by Clenshaw's recurrence downwards. */
function sumAt(c: Float64Array, t: number): number {
  let above = 0;
  let value = 0;
  for (let n = c.length - 1; n > 0; n--) {
    const next = (c[n] ?? 0) + 2 * t * value - above;
    above = value;
    value = next;
  }
  return (c[0] ?? 0) + t * value - above;
}

const dot = (row: Float64Array, values: Float64Array): number =>
  values.reduce((sum, value, i) => sum + (row[i] ?? 0) * value, 0);

/** Coefficients of T_n, without the noise at their end. */
function coefficients(values: Float64Array, largest: number): Float64Array {
  const all = Float64Array.from(PROJECTION, (row) => dot(row, values));
  let length = all.length;
  while (length > 1 && Math.abs(all[length - 1] ?? 0) <= PLATEAU * largest) length -= 1;
  return all.slice(0, length);
}

function toLegendre(c: Float64Array): Float64Array {
  return Float64Array.from({ length: c.length }, (_, n) => dot(SHARES[n] ?? c, c));
}

type Attempt =
  | { panel: Omit<LegendrePanel, 'noise' | 'noiseMoment'>; noise: number; calls: number }
  | { notFinite: number; calls: number };

/** Those of ascending numbers that lie inside (a, b). */
function within(sorted: readonly number[], a: number, b: number): readonly number[] {
  const first = (beyond: (x: number) => boolean) => {
    let [low, high] = [0, sorted.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (beyond(sorted[middle] ?? Infinity)) high = middle;
      else low = middle + 1;
    }
    return low;
  };
  return sorted.slice(
    first((x) => x > a),
    first((x) => x >= b),
  );
}

function attempt(
  f: (x: number) => number,
  a: number,
  b: number,
  { noise, checks }: PanelAim,
): Attempt {
  const half = (b - a) / 2;
  const middle = a + half;
  const values = NODES.map((x) => f(middle + half * x));
  const bad = values.findIndex((value) => !Number.isFinite(value));
  if (bad >= 0) return { notFinite: middle + half * (NODES[bad] ?? 0), calls: ORDER };
  const largest = values.reduce((most, one) => Math.max(most, Math.abs(one)), 0);
  const c = coefficients(values, largest);
  let truncation = 0;
  for (let n = ORDER - LAST; n < c.length; n++) truncation += Math.abs(c[n] ?? 0);
  const probes = [...PROBES.map((x) => middle + half * x), ...within(checks, a, b)];
  for (const x of probes) {
    const value = f(x);
    if (!Number.isFinite(value)) return { notFinite: x, calls: ORDER + probes.length };
    truncation = Math.max(truncation, Math.abs(value - sumAt(c, (x - middle) / half)));
  }
  const spread = [-1, -0.5, 0, 0.5, 1].map((x) => noise(middle + 0.999 * half * x));
  const noisy = 2 * Math.max(...spread) + SUM_ROUNDING * largest;
  const panel = { middle, half, c: toLegendre(c), truncation };
  return { panel, noise: noisy, calls: ORDER + probes.length };
}

/** ∫ noise dx and ∫ x noise dx, with the rounding of the values themselves. */
function noiseOf({ middle, half }: { middle: number; half: number }, noise: (x: number) => number) {
  let sum = 0;
  let moment = 0;
  RULE.nodes.forEach((node, i) => {
    const x = middle + half * node;
    const part = half * (RULE.weights[i] ?? 0) * noise(x);
    sum += part;
    moment += part * x;
  });
  return { noise: sum, noiseMoment: moment };
}

/**
 * Fits sums of Legendre polynomials to a function, panel by panel, bisecting where they do not converge.
 *
 * Formula: coefficients of T_n from 64 Chebyshev points, turned into those of P_n; a panel is good when its last coefficients and its
 * distance from f at other points are below the noise of f or within the moment aimed at.
 *
 * @param f finite inside every pair of edges
 * @param edges ascending, finite; jumps of f lie on them
 * @param aim how good is good enough
 * @returns panels in order, each with a bound of its error; a failure where f is not finite or takes too many calls
 *
 * Source: textbook; L. N. Trefethen, Approximation Theory and Approximation Practice (2013), ch. 17.
 */
export function fitPanels(
  f: (x: number) => number,
  edges: readonly number[],
  aim: PanelAim,
): PanelFit {
  const panels: LegendrePanel[] = [];
  const waiting: [number, number][] = edges
    .slice(1)
    .map((b, i): [number, number] => [edges[i] ?? b, b])
    .reverse();
  let evaluations = 0;
  for (let next = waiting.pop(); next; next = waiting.pop()) {
    const [a, b] = next;
    const tried = attempt(f, a, b, aim);
    evaluations += tried.calls;
    if ('notFinite' in tried) {
      return { panels: [], evaluations, failure: { at: tried.notFinite, finite: false } };
    }
    const { panel, noise } = tried;
    const { truncation } = panel;
    const middle = a + (b - a) / 2;
    const moment = truncation * (b - a) * b;
    const indivisible = !(middle > a && middle < b) || b - a <= 4 * UNIT_ROUNDOFF * b;
    if (truncation <= noise || moment <= aim.moment || indivisible) {
      panels.push({ ...panel, ...noiseOf(panel, aim.noise) });
      evaluations += RULE.nodes.length;
    } else {
      if (evaluations > aim.maxEvaluations) {
        return { panels: [], evaluations, failure: { at: middle, finite: true } };
      }
      waiting.push([middle, b], [a, middle]);
    }
  }
  return { panels, evaluations, failure: null };
}
