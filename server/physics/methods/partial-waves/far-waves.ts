import type { RadialInteraction } from './interaction.ts';
import type { WaveIntegrals } from './radial-integrals.ts';
import type { Transition } from './transition.ts';
import { spinFactor, spinsOf } from './transition.ts';

interface BornPhases {
  re: Float64Array;
  im: Float64Array;
}

/** Where the followed waves end. */
interface End {
  lMax: number;
  /** Last order that first order knows. */
  bound: number;
  /** (2l+1) |T_l - first order| of the last wave; null where higher waves stay outside of all that was followed. */
  excess: number | null;
}

/** Relative error of a first-order phase. */
const QUADRATURE = 1e-13;
/** Second order falls with l as the square of first order does, to a factor. */
const ALLOWANCE = 4;

/**
 * Waves beyond the last that was followed, by first order.
 *
 * Formula: what they have beyond it is their phase squared, in the proportion of the last wave that was followed; where they stay outside
 *   of all that was followed, no more than first order itself.
 *
 * @param tail integrals beyond the followed panels
 * @param born first-order phases of the central terms
 * @returns the waves, and a bound of Σ (2l+1) of what is missing of them
 */
export function farWaves(
  interaction: RadialInteraction,
  tail: WaveIntegrals,
  born: BornPhases,
  { lMax, bound, excess }: End,
): { waves: Transition[]; left: number } {
  const size = (l: number) => Math.hypot(born.re[l] ?? 0, born.im[l] ?? 0);
  const last = (2 * lMax + 1) * size(lMax) ** 2;
  const proportion = excess !== null && last > 0 ? excess / last : 1;
  const split = interaction.spinOrbit && excess !== null ? excess / (2 * lMax + 1) : 0;
  const waves: Transition[] = [];
  let [sum, squares] = [0, 0];
  for (let l = lMax + 1; l <= bound; l++) {
    sum += (2 * l + 1) * size(l);
    squares += (2 * l + 1) * size(l) ** 2;
    for (const spin of spinsOf(interaction, l)) {
      const factor = spinFactor(l, spin);
      const re = (born.re[l] ?? 0) - factor * (tail.FF[2]?.[l] ?? 0);
      const im = (born.im[l] ?? 0) - factor * (tail.FF[3]?.[l] ?? 0);
      const phase = Math.hypot(re, im);
      const second = ALLOWANCE * Math.max(1, proportion) * phase * phase;
      const error = second + QUADRATURE * phase + split;
      waves.push({ l, spin, re, im, eta: 1 - 2 * im, absorbed: 4 * im, error });
    }
  }
  if (excess === null) return { waves, left: sum };
  return { waves, left: last > 0 ? Math.min(sum + excess, proportion * squares) : excess };
}
