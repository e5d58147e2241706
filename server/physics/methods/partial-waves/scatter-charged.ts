import { coulombWaves } from '#server/physics/numerics/coulomb-functions.ts';
import { coulombPhases } from '#server/physics/numerics/coulomb-phase.ts';
import type { Unavailable } from '../amplitude.ts';
import type { RadialInteraction } from './interaction.ts';
import { panelsOf, tooMany } from './panels.ts';
import type { Outer } from './matched.ts';
import { errorOf, transitionOf } from './matched.ts';
import { RadialSolver } from './radial-wave.ts';
import type { Scattered } from './scatter.ts';
import { IN_TURN, isWeak, tooNarrow, UNRESOLVED } from './scatter.ts';
import type { Transition } from './transition.ts';
import { spinFactor, spinsOf, weightOf } from './transition.ts';

/** Sommerfeld's parameter up to which Coulomb functions are asked for. */
const LARGEST_ETA = 1e4;

export interface ScatteredCharge extends Scattered {
  eta: number;
  /** Coulomb phases by l, rad. */
  sigma: Float64Array;
  sigmaError: Float64Array;
}

function refusal({ power, charge }: RadialInteraction, k: number): string | null {
  if (power) {
    return 'A 1/r tail together with one that falls as another power of r: the sum over waves is closed neither by Coulomb functions nor by first order. Leave one of the two out, or cut the weaker tail off with exp(-r/a).';
  }
  const eta = Math.abs(charge / (2 * k));
  if (eta > LARGEST_ETA) {
    return `Sommerfeld's parameter is ${eta.toPrecision(3)}, beyond the ${LARGEST_ETA} up to which Coulomb waves are computed: the motion is classical, and Rutherford's formula holds.`;
  }
  return null;
}

/** Coulomb functions at rho of every order; null from where they leave the range of numbers. */
function coulombOuter(eta: number, rho: number, lMax: number) {
  const { f, df, g, dg, scale, error } = coulombWaves(lMax, eta, rho);
  const outer = (l: number): Outer | null => {
    if ((scale[l] ?? 1) > 0) return null;
    return { F: f[l] ?? 0, dF: df[l] ?? 0, G: g[l] ?? 0, dG: dg[l] ?? 0 };
  };
  return { outer, error };
}

/** Share of Σ (2l+1)|T_l| at which the sum ends: nothing closes it. */
const UNCLOSED = 1e-16;
const MOST_LIKE_IT = 100;

/** What waves beyond the last add up to, falling as the last two do. */
function restOf(last: number, before: number): number {
  const fall = last / before;
  return last * (fall < 1 ? Math.min(MOST_LIKE_IT, 1 / (1 - fall)) : MOST_LIKE_IT);
}

/**
 * All waves of an interaction with a Coulomb tail, relative to Coulomb waves.
 *
 * Formula: u = alpha F_l(eta, kr) + beta G_l(eta, kr) beyond the short-range part, T_l = beta/(alpha - i beta).
 *
 * @param interaction with charge = 2 eta k
 * @param k 1/angstrom
 *
 * Source: N. F. Mott and H. S. W. Massey, The Theory of Atomic Collisions, 3rd ed. (1965), ch. III; DLMF 33.
 */
export function scatterCharged(
  interaction: RadialInteraction,
  k: number,
): ScatteredCharge | Unavailable {
  const reason = refusal(interaction, k);
  if (reason !== null) return { unavailable: reason };
  const eta = interaction.charge / (2 * k);
  const none = { waves: [], born: null, lMax: 0, summed: 0, left: 0, eta };
  if (!(interaction.reach > 0)) {
    const { sigma, error } = coulombPhases(0, eta);
    return { ...none, sigma, sigmaError: error };
  }
  const found = panelsOf(interaction, k, interaction.reach, true);
  if ('unavailable' in found) return found;
  const { inner } = found;
  const rho = k * (inner.edges[inner.count] ?? 0);
  const bound = Math.ceil(rho + 2 * Math.abs(eta) + 40 + 12 * Math.cbrt(rho));
  const refused = tooMany(found, bound);
  if (refused) return refused;
  const solver = new RadialSolver(interaction, inner, k);
  const { outer, error: outerError } = coulombOuter(eta, rho, bound);
  const { sigma, error: sigmaError } = coulombPhases(bound, eta);
  const waves: Transition[] = [];
  const pocket = solver.starts.pocketOrder();
  let [sum, quiet, left, lMax, before] = [0, 0, 0, 0, 0];
  for (let l = 0; l <= bound && quiet < IN_TURN; l++) {
    const edge = outer(l);
    if (!edge || solver.starts.at(l, spinFactor(l, 1)) >= inner.count) break;
    before = left;
    left = 0;
    let noise = 0;
    const weak = isWeak(interaction, found, solver.starts.at(l, spinFactor(l, 1)), l);
    for (const spin of spinsOf(interaction, l)) {
      const factor = spinFactor(l, spin);
      const matched = weak ? solver.matchWeak(l, factor, edge) : solver.match(l, factor, edge);
      if (!matched) continue;
      const { re, im, eta: kept, absorbed } = transitionOf(matched);
      const size = Math.hypot(re, im);
      const functions = 4 * (outerError[l] ?? 0) * (weak ? size : matched.spread);
      const error = errorOf(matched, rho, weak, size, found) + functions;
      if (!(error < UNRESOLVED)) return tooNarrow(l, error);
      const wave = { l, spin, re, im, eta: interaction.absorbs ? kept : 1, absorbed, error };
      waves.push(wave);
      left += weightOf(wave) * Math.hypot(re, im);
      noise += weightOf(wave) * error;
    }
    sum += left;
    lMax = l;
    quiet = left <= Math.max(UNCLOSED * sum, noise / 64) && l > pocket ? quiet + 1 : 0;
  }
  return { ...none, waves, lMax, summed: lMax, left: restOf(left, before), sigma, sigmaError };
}
