import { gaussPanel } from './gauss-rule.ts';
import type { NumericalResult } from './result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from './rounding.ts';
import { NeumaierSum } from './sum.ts';

export interface IntegrateOptions {
  /** Relative accuracy asked of the integral; default 1e-12. */
  relative?: number;
  /** Absolute accuracy asked, in the unit of the integral; default 0. The looser of the two decides. */
  absolute?: number;
  /** Points where f or a derivative jumps or is singular; those outside (a, b) are ignored. */
  breakpoints?: readonly number[];
  /** Integrand calls allowed; default 200,000. */
  maxEvaluations?: number;
  /** Relative error of the values of f; default 4 u. The bound includes it times ∫|f|. */
  noise?: number;
  /** Length over which f falls off, used only where an end is infinite; default 1. */
  scale?: number;
}

interface Panel {
  a: number;
  b: number;
  value: number;
  absolute: number;
  error: number;
}

/** Bisection at an end with an inverse square root leaves 2.4 times the difference of two rules: the factor covers it. */
const SAFETY = 2.5;
const MAX_ROUNDS = 100;
const CALLS_PER_PANEL = 48;

/** Sixteen points on the whole against sixteen on either half; the finer one is kept. */
function bisectedPanel(f: (x: number) => number, a: number, b: number): Panel {
  const middle = a + (b - a) / 2;
  const whole = gaussPanel(f, a, b, 16);
  const left = gaussPanel(f, a, middle, 16);
  const right = gaussPanel(f, middle, b, 16);
  const value = left.value + right.value;
  const absolute = left.absolute + right.absolute;
  return { a, b, value, absolute, error: SAFETY * Math.abs(value - whole.value) };
}

function totals(panels: readonly Panel[]) {
  const value = new NeumaierSum();
  let absolute = 0;
  let error = 0;
  for (const panel of panels) {
    value.add(panel.value);
    absolute += panel.absolute;
    error += panel.error;
  }
  return { value: value.value, absolute, error };
}

/** Ascending edges of [a, b] with those of `cuts` that lie inside. */
export function edgesWithin(a: number, b: number, cuts: readonly number[]): number[] {
  const inside = cuts.filter((cut) => cut > a && cut < b).sort((x, y) => x - y);
  return [a, ...inside.filter((cut, i) => cut !== inside[i - 1]), b];
}

function intervals(edges: readonly number[]): [number, number][] {
  return edges.slice(1).map((edge, i) => [edges[i] ?? edge, edge]);
}

/** A routine that met a non-finite integrand has no value to give; NaN cannot be mistaken for one. */
function failure(evaluations: number): NumericalResult {
  return { value: NaN, error: Infinity, evaluations, status: 'failed' };
}

/** The half line from `a` mapped on 0 <= t < 1 by x = a + scale·t/(1-t). */
function onUnitInterval(f: (x: number) => number, a: number, scale: number) {
  return {
    integrand: (t: number) => (f(a + (scale * t) / (1 - t)) * scale) / (1 - t) ** 2,
    toUnit: (x: number) => (x - a) / (x - a + scale),
  };
}

/**
 * Adaptive integral of a real function of one variable.
 *
 * Formula: ∫_a^b f(x) dx by Gauss-Legendre sums of 16 points on panels that are bisected until the sum on the whole
 * and on the halves agree.
 *
 * @param f integrand, finite inside (a, b); never called at an end or a breakpoint
 * @param a lower end, finite
 * @param b upper end, a <= b; Infinity is mapped with `scale`
 * @returns integral and a bound of its error: the difference of the two sums (times 2.5), rounding and the noise of f.
 *   `limited` when the accuracy asked was not reached but the bound holds; `failed` (value NaN) for a non-finite integrand
 * @throws RangeError for ends that are not ordered numbers
 *
 * Validity: integrable singularities no worse than an inverse square root, at ends and breakpoints only. A feature much
 * narrower than the distance of breakpoints can be missed: name it.
 *
 * Source: textbook; P. J. Davis and P. Rabinowitz, Methods of Numerical Integration, 2nd ed. (1984), ch. 6.
 */
export function integrate(
  f: (x: number) => number,
  a: number,
  b: number,
  options: IntegrateOptions = {},
): NumericalResult {
  if (!(Number.isFinite(a) && b >= a)) {
    throw new RangeError(`integration from ${a} to ${b}: finite, ordered ends are needed`);
  }
  const { relative = 1e-12, absolute = 0, maxEvaluations = 200_000 } = options;
  const { breakpoints = [], noise = 4 * UNIT_ROUNDOFF, scale = 1 } = options;
  if (a === b) return { value: 0, error: 0, evaluations: 0, status: 'converged' };
  if (b === Infinity) {
    const { integrand, toUnit } = onUnitInterval(f, a, scale);
    const cuts = breakpoints.filter((x) => x > a).map(toUnit);
    return integrate(integrand, 0, 1, { ...options, breakpoints: cuts });
  }
  let panels = intervals(edgesWithin(a, b, breakpoints)).map(([x, y]) => bisectedPanel(f, x, y));
  let evaluations = panels.length * CALLS_PER_PANEL;
  for (let round = 0; ; round++) {
    const sum = totals(panels);
    if (!Number.isFinite(sum.value + sum.error)) return failure(evaluations);
    const rounding = (noise + 4 * UNIT_ROUNDOFF) * sum.absolute + SMALLEST_NORMAL;
    const target = Math.max(absolute, relative * Math.abs(sum.value));
    const result = { value: sum.value, error: sum.error + rounding, evaluations };
    if (result.error <= target) return { ...result, status: 'converged' };
    // Below rounding a panel cannot gain by being cut.
    const floor = (panel: Panel) =>
      Math.max((target - rounding) / (2 * panels.length), 2 * SAFETY * noise * panel.absolute);
    const worst = panels.filter((panel) => panel.error > floor(panel));
    const cost = 2 * CALLS_PER_PANEL * worst.length;
    if (worst.length === 0 || round === MAX_ROUNDS || evaluations + cost > maxEvaluations) {
      return { ...result, status: 'limited' };
    }
    const kept = panels.filter((panel) => !(panel.error > floor(panel)));
    const halves = worst.flatMap(({ a: x, b: y }) => {
      const middle = x + (y - x) / 2;
      return [bisectedPanel(f, x, middle), bisectedPanel(f, middle, y)];
    });
    panels = [...kept, ...halves];
    evaluations += cost;
  }
}
