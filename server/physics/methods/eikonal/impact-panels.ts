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
  /** Bound of ∫ b |error of F| db: noise, and what panels and cut leave out. */
  missed: number;
  /** ∫ b |F| db, ∫ b² |F| db and ∫ b³ |F| db. */
  moments: [number, number, number];
}

const RULE = gaussRule(16);
/** What may be left beyond the last panel, of ∫ b |F| db. */
const CUT = 1e-17;
const MOST_PANELS = 1200;

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

function momentsOf(panel: HankelPanel): [number, number, number] {
  const size = (i: number) => Math.hypot(panel.re[i] ?? 0, panel.im[i] ?? 0);
  return [
    sumOver(panel, (x, i) => x * size(i)),
    sumOver(panel, (x, i) => x * x * size(i)),
    sumOver(panel, (x, i) => x ** 3 * size(i)),
  ];
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
  const all = found.edges
    .slice(1)
    .map((b, i): HankelPanel & { parts: [number, number, number] } => {
      const a = found.edges[i] ?? b;
      const half = (b - a) / 2;
      const values = Array.from(RULE.nodes, (x) => at(a + half + half * x));
      const panel = {
        a,
        b,
        re: Float64Array.from(values, ({ re }) => re),
        im: Float64Array.from(values, ({ im }) => im),
      };
      return { ...panel, parts: momentsOf(panel) };
    });
  const total = all.reduce((sum, { parts }) => sum + parts[0], 0);
  let beyond = 0;
  let count = all.length;
  for (; count > 1; count--) {
    const part = all[count - 1]?.parts[0] ?? 0;
    if (beyond + part > CUT * total) break;
    beyond += part;
  }
  const panels = all.slice(0, count);
  const ofNoise = panels.reduce((sum, panel) => sum + sumOver(panel, (b) => b * noise(b)), 0);
  const moment = (n: 0 | 1 | 2) => panels.reduce((sum, { parts }) => sum + parts[n], 0);
  return {
    panels,
    points: [],
    measure: [],
    missed: found.missed + beyond + ofNoise,
    moments: [moment(0), moment(1), moment(2)],
  };
}

/** One after the other. */
export function joined(parts: readonly ImpactPanels[]): ImpactPanels {
  const moment = (n: 0 | 1 | 2) => parts.reduce((sum, { moments }) => sum + moments[n], 0);
  return {
    panels: parts.flatMap(({ panels }) => panels),
    points: parts.flatMap(({ points }) => points),
    measure: parts.flatMap(({ measure }) => measure),
    missed: parts.reduce((sum, { missed }) => sum + missed, 0),
    moments: [moment(0), moment(1), moment(2)],
  };
}
