import { gaussPanel } from './gauss-rule.ts';
import { edgesWithin, integrate } from './quadrature.ts';
import type { NumericalResult } from './result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from './rounding.ts';
import { NeumaierSum } from './sum.ts';

export interface PanelOptions {
  /** Accuracy of the sum asked, relative to ∫|f|; default 1e-15. */
  relativeToAbsolute?: number;
  breakpoints?: readonly number[];
  /** Integrand calls allowed; default 4,000,000. */
  maxEvaluations?: number;
  /** Relative error of the values of f; default 4 u. */
  noise?: number;
}

const CALLS_PER_PANEL = 128;
const CALLS_OF_A_BAD_PANEL = 20_000;
/** Eight periods a panel: x is known to about 3 u x, and f moves by 2 pi times that over a period. */
const ARGUMENT_ROUNDING = 3 * UNIT_ROUNDOFF * 16 * Math.PI;

/** Edges of [a, b]: breakpoints, and between them the multiples of `width` counted from 0. */
function alignedEdges(a: number, b: number, width: number, breakpoints: readonly number[]) {
  const pieces = edgesWithin(a, b, breakpoints);
  const edges = [a];
  for (const [i, end] of pieces.slice(1).entries()) {
    const start = pieces[i] ?? a;
    const last = Math.ceil(end / width) - 1;
    for (let n = Math.floor(start / width) + 1; n <= last; n++) edges.push(n * width);
    edges.push(end);
  }
  return edges;
}

/** Sixty-four points on a panel against sixteen on each of its quarters: two orders of one family, on different nodes. */
function twoOrders(f: (x: number) => number, a: number, b: number) {
  const fine = gaussPanel(f, a, b, 64);
  let coarse = 0;
  for (let i = 0; i < 4; i++) {
    coarse += gaussPanel(f, a + ((b - a) * i) / 4, a + ((b - a) * (i + 1)) / 4, 16).value;
  }
  return { a, b, value: fine.value, absolute: fine.absolute, error: Math.abs(fine.value - coarse) };
}

/**
 * Integral of a function that oscillates with a known scale, over a finite interval.
 *
 * Formula: Σ over panels of the 64-point Gauss-Legendre sum; the error of a panel is its difference from four 16-point
 * sums on the quarters; panels that disagree are integrated adaptively.
 *
 * @param f integrand, finite inside (a, b)
 * @param a lower end, finite
 * @param b upper end, finite, a <= b
 * @param panelWidth width of the panels (> 0), up to eight periods of f; Infinity for none but the breakpoints. Panels
 *   start at its multiples, so with half-periods in it they end on zeros
 * @returns integral with a bound of its error: differences, noise of f, rounding also of x (which blurs the phase far out). `limited` when the bound exceeds
 *   `relativeToAbsolute`·∫|f| and rounding; `failed` (value NaN) when the panels would need more calls than allowed or
 *   the integrand is not finite
 * @throws RangeError for ends or widths that are not such numbers
 *
 * Source: textbook; P. J. Davis and P. Rabinowitz, Methods of Numerical Integration, 2nd ed. (1984), secs. 2.10, 6.
 */
export function integratePanels(
  f: (x: number) => number,
  a: number,
  b: number,
  panelWidth: number,
  options: PanelOptions = {},
): NumericalResult {
  if (!(Number.isFinite(a) && Number.isFinite(b) && b >= a && panelWidth > 0)) {
    throw new RangeError(`panels of width ${panelWidth} from ${a} to ${b} make no interval`);
  }
  const { relativeToAbsolute = 1e-15, noise = 4 * UNIT_ROUNDOFF } = options;
  const { breakpoints = [], maxEvaluations = 4_000_000 } = options;
  if (a === b) return { value: 0, error: 0, evaluations: 0, status: 'converged' };
  const count = (b - a) / panelWidth + breakpoints.length + 1;
  if (!(count * CALLS_PER_PANEL <= maxEvaluations)) {
    return { value: NaN, error: Infinity, evaluations: 0, status: 'failed' };
  }
  const edges = alignedEdges(a, b, panelWidth, breakpoints);
  const panels = edges.slice(1).map((edge, i) => twoOrders(f, edges[i] ?? edge, edge));
  let evaluations = panels.length * CALLS_PER_PANEL;
  const absolute = panels.reduce((sum, panel) => sum + panel.absolute, 0);
  const share = (relativeToAbsolute * absolute) / panels.length;
  const value = new NeumaierSum();
  let error = 0;
  let rounding = SMALLEST_NORMAL;
  for (const panel of panels) {
    const blur =
      noise + ARGUMENT_ROUNDING * (Math.max(Math.abs(panel.a), Math.abs(panel.b)) / panelWidth);
    let part: { value: number; error: number } = panel;
    if (panel.error > Math.max(share, 4 * blur * panel.absolute)) {
      const budget = {
        absolute: share,
        relative: 0,
        noise: blur,
        maxEvaluations: CALLS_OF_A_BAD_PANEL,
      };
      const refined = integrate(f, panel.a, panel.b, budget);
      evaluations += refined.evaluations;
      if (refined.error < panel.error || refined.status === 'failed') part = refined;
    }
    value.add(part.value);
    error += part.error;
    rounding += (blur + 4 * UNIT_ROUNDOFF) * panel.absolute;
  }
  const result = { value: value.value, error: error + rounding, evaluations };
  if (!Number.isFinite(result.value + result.error)) {
    return { value: NaN, error: Infinity, evaluations, status: 'failed' };
  }
  return {
    ...result,
    status: error <= 2 * (share * panels.length + rounding) ? 'converged' : 'limited',
  };
}
