import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';

/** One energy at which the beam meets the target, and its share; `depth` is null where the energy does not depend on it. */
export interface EnergyNode {
  energy: number;
  weight: number;
  depth: number | null;
}

interface Node {
  x: number;
  weight: number;
}

/** Gauss-Hermite rules for a standard normal distribution: three and five points, exact to degree 5 and 9 (DLMF 3.5(v)). */
const NORMAL_3: readonly Node[] = [
  { x: -Math.sqrt(3), weight: 1 / 6 },
  { x: 0, weight: 2 / 3 },
  { x: Math.sqrt(3), weight: 1 / 6 },
];
const ROOT_10 = Math.sqrt(10);
const normal5 = (sign: 1 | -1): Node[] => {
  const x = Math.sqrt(5 + sign * ROOT_10);
  const weight = 3 / (20 * (7 + 2 * sign * ROOT_10));
  return [
    { x, weight },
    { x: -x, weight },
  ];
};
const NORMAL_5: readonly Node[] = [...normal5(1), ...normal5(-1), { x: 0, weight: 8 / 15 }];
const LEGENDRE_3: readonly Node[] = [
  { x: 0.5 - Math.sqrt(0.15), weight: 5 / 18 },
  { x: 0.5, weight: 4 / 9 },
  { x: 0.5 + Math.sqrt(0.15), weight: 5 / 18 },
];
const LEGENDRE_8: readonly Node[] = Array.from(gaussRule(8).nodes, (node, i) => ({
  x: (1 + node) / 2,
  weight: (gaussRule(8).weights[i] ?? 0) / 2,
}));

const WIDE_SPREAD = 0.02;
const DEEP_LOSS = 0.05;

/**
 * Energies of the collisions in a target.
 *
 * Formula: E = E0 + σ z - loss(u) with z standard normal and u evenly spread over the depth, by Gauss rules: three points each, five of z where
 * σ > 2 % of E0, eight of u where more than 5 % is lost.
 *
 * @param energy E0 at the entrance, eV
 * @param spread σ, standard deviation, eV, at most 20 % of E0
 * @param lossTo mean loss on the way to a depth (share of the thickness), eV; null for none
 * @returns energies in eV, weights that sum to 1
 *
 * Validity: the loss is that of the central energy; its fluctuation (straggling) is left out.
 */
export function energyNodes(
  energy: number,
  spread: number,
  lossTo: ((depth: number) => number) | null,
): EnergyNode[] {
  const wide = spread > WIDE_SPREAD * energy;
  const spreads = spread > 0 ? (wide ? NORMAL_5 : NORMAL_3) : [{ x: 0, weight: 1 }];
  if (lossTo === null) {
    return spreads.map(({ x, weight }) => ({ energy: energy + spread * x, weight, depth: null }));
  }
  const deep = lossTo(1) > DEEP_LOSS * energy;
  return (deep ? LEGENDRE_8 : LEGENDRE_3).flatMap(({ x: depth, weight: share }) =>
    spreads.map(({ x, weight }) => ({
      energy: energy + spread * x - lossTo(depth),
      weight: weight * share,
      depth,
    })),
  );
}
