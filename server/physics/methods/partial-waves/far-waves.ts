import type { RadialInteraction } from './interaction.ts';
import type { WaveIntegrals } from './radial-integrals.ts';
import type { Transition } from './transition.ts';
import { ofPhase, spinFactor, spinsOf } from './transition.ts';

interface BornPhases {
  re: Float64Array;
  im: Float64Array;
}

/** Where the followed waves end. */
interface End {
  lMax: number;
  /** Last order that first order knows. */
  bound: number;
  /** (2l+1) |T_l - e^{i delta} sin(delta)| of the last wave; null where higher waves stay outside of all that was followed. */
  excess: number | null;
}

/** Relative error of a first-order phase. */
const QUADRATURE = 1e-13;
/** Second order falls with l as the square of first order does, to a factor. */
const ALLOWANCE = 4;
/** Least proportion of the two that is believed. */
const LEAST = 0.25;

/**
 * Waves beyond the last that was followed, with the phase of first order.
 *
 * Formula: T = e^{i delta} sin(delta), delta the first-order phase. What is missing falls as its square, in the proportion of the last wave
 *   that was followed; where they stay outside of all that was followed it is no more than first order itself.
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
      const second = ALLOWANCE * Math.max(LEAST, proportion) * phase * phase;
      const error = second + QUADRATURE * phase + split;
      const T = ofPhase(re, im);
      const absorbed = interaction.absorbs ? 4 * (T.im - T.re * T.re - T.im * T.im) : 0;
      const eta = interaction.absorbs ? Math.hypot(1 - 2 * T.im, 2 * T.re) : 1;
      waves.push({ l, spin, ...T, eta, absorbed, error });
    }
  }
  if (excess === null) return { waves, left: sum };
  // A share of the squares stays out of the sum of waves besides, but that is some 1e-13 of all.
  return { waves, left: last > 0 ? Math.min(sum + excess, proportion * squares) : excess };
}
