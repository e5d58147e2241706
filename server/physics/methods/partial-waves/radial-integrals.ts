import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import type { RadialPanels } from '#server/physics/numerics/radial-panels.ts';
import { riccatiBessel } from '#server/physics/numerics/riccati-bessel.ts';
import type { RadialInteraction } from './interaction.ts';
import { barrierExponent } from './wave-start.ts';

/** (1/k) ∫ U F², U F G and U G² of every order, for each component of U. */
export interface WaveIntegrals {
  FF: Float64Array[];
  FG: Float64Array[];
  GG: Float64Array[];
}

const RULE = gaussRule(16);
/** Powers of U that one rule of 16 points may meet on panels taken together: the square of the wave needs the rest. */
const FINE = { powers: 30, panels: 3 };
/** Where U is so small that eight digits of it are enough. */
const COARSE = { powers: 60, panels: 6 };
/** Where the irregular function is so large, the square of the regular one is below 1e-26. */
const UNFELT = 1e13;
/** Integrals below this do not count. */
const NEGLIGIBLE = 1e-19;

/** Edges of panels, taken together where the field is smooth. */
function cutsOf(
  { edges, fieldLength }: RadialPanels,
  { breaks }: RadialInteraction,
  from: number,
  to: number,
  most: typeof FINE,
): number[] {
  const jumps = new Set(breaks);
  const cuts = [edges[from] ?? 0];
  let powers = 0;
  let joined = 0;
  for (let p = from; p < to; p++) {
    const more = fieldLength[p] ?? 0;
    const full = joined === most.panels || powers + more > most.powers || p === 1;
    if (joined > 0 && (full || jumps.has(edges[p] ?? 0))) {
      cuts.push(edges[p] ?? 0);
      powers = joined = 0;
    }
    powers += more;
    joined += 1;
  }
  return to > from ? [...cuts, edges[to] ?? 0] : [];
}

/** Points and weights over cut panels. */
function* nodesOf(cuts: readonly number[]): Generator<readonly [r: number, weight: number]> {
  for (let i = 1; i < cuts.length; i++) {
    const from = cuts[i - 1] ?? 0;
    const half = ((cuts[i] ?? 0) - from) / 2;
    for (let n = 0; n < RULE.nodes.length; n++) {
      yield [from + half * (1 + (RULE.nodes[n] ?? 0)), half * (RULE.weights[n] ?? 0)];
    }
  }
}

/**
 * Order beyond which no first-order phase counts.
 *
 * Formula: smallest l with max over panels of |U| width/k exp(-2 ∫ sqrt(l²/r² - k²) dr) below 1e-19.
 */
export function lastOrder(
  { shells, core }: RadialInteraction,
  panels: RadialPanels,
  k: number,
): number {
  const { edges, count, size } = panels;
  const sharp = shells.map(({ radius, jump }) => ({ radius, strength: Math.abs(jump) / k }));
  if (core > 0) sharp.push({ radius: core, strength: 1 });
  const counts = (l: number): boolean => {
    for (const { radius, strength } of sharp) {
      if ((l + 1) * strength * Math.exp(-2 * barrierExponent(l, k * radius)) > NEGLIGIBLE)
        return true;
    }
    for (let p = 0; p < count; p++) {
      const [from, to] = [edges[p] ?? 0, edges[p + 1] ?? 0];
      const most = size.reduce((sum, row) => sum + (row[p] ?? 0), 0);
      // r² |U| over the radius at the outer end, where the wave is largest.
      const strength = ((most / to) * ((to - from) / to) * (l + 1)) / k;
      if (strength * Math.exp(-2 * barrierExponent(l, k * to)) > NEGLIGIBLE) return true;
    }
    return false;
  };
  let high = 16;
  while (counts(high) && high < 1e5) high *= 2;
  let low = high / 2;
  if (high === 16) low = 0;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (counts(middle)) low = middle;
    else high = middle;
  }
  return high;
}

/** Adds integrals of panels from..to; G is left out unless `irregular` is given. */
function accumulate(
  { field }: RadialInteraction,
  nodes: Iterable<readonly [number, number]>,
  k: number,
  lMax: number,
  { FF, FG, GG }: WaveIntegrals,
  irregular: boolean,
): void {
  const F = new Float64Array(lMax + 1);
  const G = new Float64Array(lMax + 1);
  const out = new Float64Array(field.components);
  for (const [r, weight] of nodes) {
    field.at(r, out);
    const top = riccatiBessel(k * r, F, G, UNFELT);
    for (let c = 0; c < FF.length; c++) {
      const w = (weight * (out[c] ?? 0)) / k;
      if (w === 0) continue;
      const [ff, fg, gg] = [FF[c] ?? F, FG[c] ?? F, GG[c] ?? F];
      for (let l = 0; l <= top; l++) {
        const f = F[l] ?? 0;
        ff[l] = (ff[l] ?? 0) + w * f * f;
        if (!irregular) continue;
        const g = G[l] ?? 0;
        fg[l] = (fg[l] ?? 0) + w * f * g;
        gg[l] = (gg[l] ?? 0) + w * g * g;
      }
    }
  }
}

const rows = (count: number, length: number): Float64Array[] =>
  Array.from({ length: count }, () => new Float64Array(length));

/**
 * First-order integrals within the panels that are followed, F² only.
 *
 * Formula: (1/k) ∫ U F_l(kr)² dr, 16 points on up to three panels, and shells; minus it is the first-order phase.
 *
 * @param inner panels followed, from the front
 * @param below panels of what lies inside a hard core, which first order does not know
 * @returns central components alone
 *
 * Source: L. I. Schiff, Quantum Mechanics, 3rd ed. (1968), sec. 38.
 */
export function innerIntegrals(
  interaction: RadialInteraction,
  panels: RadialPanels,
  inner: number,
  below: RadialPanels | null,
  k: number,
  lMax: number,
): Float64Array[] {
  const central = Math.min(2, interaction.field.components);
  const sums: WaveIntegrals = { FF: rows(central, lMax + 1), FG: [], GG: [] };
  const parts = [nodesOf(cutsOf(panels, interaction, 0, inner, FINE))];
  if (below) parts.push(nodesOf(cutsOf(below, interaction, 0, below.count, FINE)));
  for (const nodes of parts) accumulate(interaction, nodes, k, lMax, sums, false);
  const [F, G] = rows(2, lMax + 1);
  for (const { radius, jump } of interaction.shells) {
    const top = riccatiBessel(k * radius, F ?? new Float64Array(1), G ?? new Float64Array(1));
    const row = sums.FF[0];
    for (let l = 0; row && l <= top; l++) {
      row[l] = (row[l] ?? 0) + (jump / k) * (F?.[l] ?? 0) ** 2;
    }
  }
  return sums.FF;
}

/** Integrals of all components beyond the panels that are followed, good to eight digits. */
export function tailIntegrals(
  interaction: RadialInteraction,
  panels: RadialPanels,
  inner: number,
  k: number,
  lMax: number,
): WaveIntegrals {
  const { components } = interaction.field;
  const sums: WaveIntegrals = {
    FF: rows(components, lMax + 1),
    FG: rows(components, lMax + 1),
    GG: rows(components, lMax + 1),
  };
  const nodes = nodesOf(cutsOf(panels, interaction, inner, panels.count, COARSE));
  accumulate(interaction, nodes, k, lMax, sums, true);
  return sums;
}
