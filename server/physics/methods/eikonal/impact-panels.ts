import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import type { HankelPanel } from '#server/physics/numerics/hankel-panels.ts';
import { resolvePanels } from '#server/physics/numerics/resolved-panels.ts';
import type { Complex } from '#server/physics/potentials/types.ts';

/** Share of one impact parameter in ∫ b J0(qb) F db. */
export interface WeightedPoint extends Complex {
  b: number;
}

/** A function of the impact parameter on panels, and what its errors add up to. */
export interface ImpactPanels {
  panels: HankelPanel[];
  /** Points instead of panels, and those of ∫ b g db for any g there. */
  points: WeightedPoint[];
  measure: { b: number; weight: number }[];
  /** Bound of ∫ b |error of F| db from what panels and cut leave out. */
  missed: number;
  /** Moments of |F|. */
  size: Moments;
  /** Moments of the error of F that is noise. */
  noise: Moments;
}

/** ∫ b^p g db for p = 1/2, 1, 3/2, 2 and 3. */
export type Moments = [number, number, number, number, number];

const POWERS = [0.5, 1, 1.5, 2, 3] as const;

export function momentsOf(each: (g: (b: number) => number) => number): Moments {
  return POWERS.map((power) => each((b) => b ** power)) as Moments;
}

const RULE = gaussRule(16);
/** What may be left beyond the last panel, of ∫ b |F| db. */
const CUT = 1e-17;
const MOST_PANELS = 2500;

/** ∫ g over a panel by its sixteen points. */
export function sumOver(
  { a, b }: { a: number; b: number },
  g: (x: number, i: number) => number,
): number {
  const half = (b - a) / 2;
  let sum = 0;
  for (let i = 0; i < RULE.nodes.length; i++) {
    sum += half * (RULE.weights[i] ?? 0) * g(a + half + half * (RULE.nodes[i] ?? 0), i);
  }
  return sum;
}

/**
 * A complex function of the impact parameter on panels that follow it to rounding where it counts, with weight b.
 *
 * @param F finite for b > 0
 * @param edges ascending from 0 to where F has died away, angstrom
 * @param noise error of F at b
 * @returns null where F turns too often to be followed
 */
export function impactPanels(
  F: (b: number) => Complex,
  edges: readonly number[],
  noise: (b: number) => number,
): ImpactPanels | null {
  // Both parts are asked at the same places.
  const known = new Map<number, Complex>();
  const at = (b: number): Complex => {
    const found = known.get(b) ?? F(b);
    known.set(b, found);
    return found;
  };
  const found = resolvePanels([(b) => at(b).re, (b) => at(b).im], edges, {
    weight: (_a, b) => b,
    absoluteNoise: noise,
    maxPanels: MOST_PANELS,
  });
  if (!found.resolved) return null;
  const all = found.edges.slice(1).map((b, i): HankelPanel & { part: number } => {
    const a = found.edges[i] ?? b;
    const half = (b - a) / 2;
    const values = Array.from(RULE.nodes, (x) => at(a + half + half * x));
    const panel = {
      a,
      b,
      re: Float64Array.from(values, ({ re }) => re),
      im: Float64Array.from(values, ({ im }) => im),
    };
    return { ...panel, part: sumOver(panel, (x, j) => x * sizeAt(panel, j)) };
  });
  const total = all.reduce((sum, { part }) => sum + part, 0);
  let beyond = 0;
  let count = all.length;
  for (; count > 1; count--) {
    const part = all[count - 1]?.part ?? 0;
    if (beyond + part > CUT * total) break;
    beyond += part;
  }
  const panels = all.slice(0, count);
  const over = (g: (panel: HankelPanel, b: number, i: number) => number) =>
    panels.reduce((sum, panel) => sum + sumOver(panel, (b, i) => g(panel, b, i)), 0);
  return {
    panels,
    points: [],
    measure: [],
    missed: found.missed + beyond,
    size: momentsOf((power) => over((panel, b, i) => power(b) * sizeAt(panel, i))),
    noise: momentsOf((power) => over((_panel, b) => power(b) * noise(b))),
  };
}

const sizeAt = ({ re, im }: HankelPanel, i: number): number => Math.hypot(re[i] ?? 0, im[i] ?? 0);

const added = (parts: readonly Moments[]): Moments =>
  POWERS.map((_, n) => parts.reduce((sum, part) => sum + (part[n] ?? 0), 0)) as Moments;

/** One after the other. */
export function joined(parts: readonly ImpactPanels[]): ImpactPanels {
  return {
    panels: parts.flatMap(({ panels }) => panels),
    points: parts.flatMap(({ points }) => points),
    measure: parts.flatMap(({ measure }) => measure),
    missed: parts.reduce((sum, { missed }) => sum + missed, 0),
    size: added(parts.map(({ size }) => size)),
    noise: added(parts.map(({ noise }) => noise)),
  };
}
