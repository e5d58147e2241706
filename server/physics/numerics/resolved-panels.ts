import { gaussRule } from './gauss-rule.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';

type RealFunction = (x: number) => number;

export interface ResolveOptions {
  /** What an error of f on (a, b), times the width, counts in the end; 1 by default. */
  weight?: (a: number, b: number) => number;
  /** Share of Σ |f| · width · weight that one panel may miss. */
  share?: number;
  /** Relative error of the values of f. */
  noise?: number;
  /** Absolute error of the values of f at x, besides. */
  absoluteNoise?: (x: number) => number;
  maxPanels?: number;
}

export interface ResolvedPanels {
  /** Ascending ends of the panels. */
  edges: number[];
  /** Sum of what the panels miss, in the unit of f · width · weight. */
  missed: number;
  /** False where the limit of panels was met, or f is not finite. */
  resolved: boolean;
}

const RULE = gaussRule(16);
const COUNT = RULE.nodes.length;
/** (2n+1)/2 w_i P_n(x_i) for the highest degrees that sixteen points give. */
const LAST = [12, 13, 14, 15].map((n) => projectionRow(n));

function projectionRow(n: number): Float64Array {
  return RULE.nodes.map((x, i) => {
    let before = 0;
    let value = 1;
    for (let l = 0; l < n; l++) {
      const next = ((2 * l + 1) * x * value - l * before) / (l + 1);
      before = value;
      value = next;
    }
    return ((2 * n + 1) / 2) * (RULE.weights[i] ?? 0) * value;
  });
}

interface Panel {
  a: number;
  b: number;
  size: number;
  missed: number;
  noisy: boolean;
}

function look(fs: readonly RealFunction[], a: number, b: number, options: ResolveOptions): Panel {
  const { weight = () => 1, noise = 4 * UNIT_ROUNDOFF, absoluteNoise = () => 0 } = options;
  const half = (b - a) / 2;
  const middle = a + half;
  const besides = Math.max(absoluteNoise(a + 0.1 * half), absoluteNoise(b));
  let size = 0;
  let missed = 0;
  let noisy = true;
  let blur = 0;
  for (const f of fs) {
    const values = RULE.nodes.map((x) => f(middle + half * x));
    let [largest, lowest, highest] = [0, Infinity, -Infinity];
    let tail = 0;
    for (const value of values) {
      largest = Math.max(largest, Math.abs(value));
      lowest = Math.min(lowest, value);
      highest = Math.max(highest, value);
    }
    for (const row of LAST) {
      let c = 0;
      for (let i = 0; i < COUNT; i++) c += (row[i] ?? 0) * (values[i] ?? 0);
      tail += Math.abs(c);
    }
    // Sums of sixteen values carry their noise into every coefficient.
    // On a narrow panel far out the rounding of x itself is a part of the width.
    const ofArgument =
      ((4 * UNIT_ROUNDOFF * Math.max(Math.abs(a), Math.abs(b))) / (b - a)) * (highest - lowest);
    noisy &&= tail <= 24 * (noise * largest + besides + ofArgument);
    blur = Math.max(blur, ofArgument);
    size = Math.max(size, largest);
    missed = Math.max(missed, tail);
  }
  const factor = (b - a) * weight(a, b);
  return { a, b, size: size * factor, missed: (noisy ? blur : missed) * factor, noisy };
}

/**
 * Cuts an interval into panels on each of which functions are polynomials of degree 15 to rounding.
 *
 * Formula: a panel is good when its Legendre coefficients of degree 12 to 15, from sixteen Gauss points, are below the noise, or
 * below the share allowed of Σ |f| · width · weight; others are bisected, all of them in each round.
 *
 * @param fs finite inside every pair of edges
 * @param edges ascending, finite; jumps and kinks of f lie on them, for others are approached by bisection
 * @returns ends of the panels and a bound, by the coefficients left, of what they miss
 *
 * Source: textbook; L. N. Trefethen, Approximation Theory and Approximation Practice (2013), ch. 17.
 */
export function resolvePanels(
  fs: readonly RealFunction[],
  edges: readonly number[],
  options: ResolveOptions = {},
): ResolvedPanels {
  const { share = 1e-16, maxPanels = 4000 } = options;
  let panels = edges.slice(1).map((b, i) => look(fs, edges[i] ?? b, b, options));
  const done: Panel[] = [];
  while (panels.length > 0) {
    const all = [...done, ...panels];
    const total = all.reduce((sum, { size }) => sum + size, 0);
    if (!Number.isFinite(total) || all.length > maxPanels) return finish(all, false);
    const next: Panel[] = [];
    for (const panel of panels) {
      const { a, b } = panel;
      const middle = a + (b - a) / 2;
      const indivisible = b - a <= 8 * UNIT_ROUNDOFF * b || !(middle > a && middle < b);
      if (panel.noisy || panel.missed <= share * total || indivisible) done.push(panel);
      else next.push(look(fs, a, middle, options), look(fs, middle, b, options));
    }
    panels = next;
  }
  return finish(done, true);
}

function finish(panels: Panel[], resolved: boolean): ResolvedPanels {
  panels.sort((x, y) => x.a - y.a);
  const missed = panels.reduce((sum, panel) => sum + panel.missed, 0);
  return {
    edges: [...panels.slice(0, 1).map(({ a }) => a), ...panels.map(({ b }) => b)],
    missed,
    resolved,
  };
}
