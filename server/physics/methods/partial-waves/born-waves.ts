import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import type { RadialPanels } from '#server/physics/numerics/radial-panels.ts';
import { riccatiBessel } from '#server/physics/numerics/riccati-bessel.ts';
import type { RadialInteraction } from './interaction.ts';

export interface BornWaves {
  re: Float64Array;
  im: Float64Array;
}

const RULE = gaussRule(16);
/** Powers that one rule of 16 points may meet on panels taken together: the square of the wave needs the rest. */
const POWERS = 12;

/** Edges of the panels, taken together where the field is smooth. */
function cutsOf({ edges, count, fieldLength }: RadialPanels): number[] {
  const cuts = [edges[0] ?? 0];
  let powers = 0;
  let joined = 0;
  for (let p = 0; p < count; p++) {
    const more = fieldLength[p] ?? 0;
    if (joined > 0 && (joined === 2 || powers + more > POWERS || p === 1)) {
      cuts.push(edges[p] ?? 0);
      powers = joined = 0;
    }
    powers += more;
    joined += 1;
  }
  return [...cuts, edges[count] ?? 0];
}

/**
 * First-order phases of all waves.
 *
 * Formula: -(1/k) ∫ F_l(kr)² U dr, complex with complex depths; 16 points on every two panels or one.
 *
 * @param lMax highest order
 * @param k wave number, 1/angstrom
 * @returns lMax + 1 phases, rad; relative error about 1e-14 where U has one sign
 *
 * Source: L. I. Schiff, Quantum Mechanics, 3rd ed. (1968), sec. 38.
 */
export function bornWaves(
  { field, shells, absorbs }: RadialInteraction,
  panels: RadialPanels,
  k: number,
  lMax: number,
): BornWaves {
  const re = new Float64Array(lMax + 1);
  const im = new Float64Array(lMax + 1);
  const F = new Float64Array(lMax + 2);
  const G = new Float64Array(lMax + 2);
  const out = new Float64Array(field.components);
  const add = (r: number, weightRe: number, weightIm: number) => {
    const top = Math.min(lMax, riccatiBessel(k * r, F, G));
    for (let l = 0; l <= top; l++) {
      const f = F[l] ?? 0;
      re[l] = (re[l] ?? 0) + weightRe * f * f;
      if (weightIm !== 0) im[l] = (im[l] ?? 0) + weightIm * f * f;
    }
  };
  const cuts = cutsOf(panels);
  for (let i = 1; i < cuts.length; i++) {
    const [from, to] = [cuts[i - 1] ?? 0, cuts[i] ?? 0];
    const half = (to - from) / 2;
    for (let n = 0; n < RULE.nodes.length; n++) {
      const r = from + half * (1 + (RULE.nodes[n] ?? 0));
      const weight = (-half * (RULE.weights[n] ?? 0)) / k;
      field.at(r, out);
      add(r, weight * (out[0] ?? 0), absorbs ? weight * (out[1] ?? 0) : 0);
    }
  }
  for (const { radius, jump } of shells) add(radius, -jump / k, 0);
  return { re, im };
}
