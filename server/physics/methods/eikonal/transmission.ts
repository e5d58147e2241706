import type { Complex } from '#server/physics/potentials/types.ts';
import { beyondFirst, removedBeyondFirst } from './beyond-first.ts';
import { sumOver, type ImpactPanels } from './impact-panels.ts';
import type { Phase } from './phase.ts';
import { pastCharges } from './point-charges.ts';

/** What is integrated over impact parameters as a function of the phase at b, and the bound of its error. */
export interface Transmission {
  F: (phase: Phase, b: number) => Complex;
  noise: (phase: Phase, b: number) => number;
}

/** |e^{i chi}|·|error of chi|, less what first order takes of it. */
const change = ({ re, im }: Phase, first: number): number => {
  const size = Math.exp(-im);
  return Math.hypot(size * Math.cos(re) - first, size * Math.sin(re));
};

/** e^{i chi} - 1 - i chi: first order stands beside it in closed form. */
export const beyondFirstOrder: Transmission = {
  F: beyondFirst,
  noise: (phase) => {
    const size = Math.hypot(phase.re, phase.im);
    return change(phase, 1) * phase.error + 8e-16 * size * Math.min(1, size);
  },
};

/** (kb)^{2i eta} (e^{i chi} - 1): what is short of range in the field of two point charges. */
export function besideCharges(eta: number, k: number): Transmission {
  return {
    F: (phase, b) => {
      const { re, im } = beyondFirst(phase);
      const [x, y] = [re - phase.im, im + phase.re];
      const past = pastCharges(eta, k, b);
      return { re: x * past.re - y * past.im, im: x * past.im + y * past.re };
    },
    noise: (phase, b) => {
      const size = Math.min(2, Math.hypot(phase.re, phase.im));
      const ofCharges = 1e-15 * (1 + Math.abs(eta * Math.log(k * b))) * size;
      return change(phase, 0) * phase.error + ofCharges;
    },
  };
}

export interface Removed {
  value: number;
  error: number;
}

/**
 * Particles removed beyond first order.
 *
 * Formula: 2π ∫ b (1 - |e^{i chi}|² - 2 Im chi) db.
 *
 * @returns angstrom² with a bound of its error
 */
export function removedBeyond(
  chi: (b: number) => Phase,
  { panels, measure, missed, noise }: ImpactPanels,
): Removed {
  let value = 0;
  let error = 4 * (missed + noise[1]);
  for (const panel of panels) {
    const part = sumOver(panel, (b) => b * removedBeyondFirst(chi(b).im));
    value += part;
    error += 1e-14 * Math.abs(part) + sumOver(panel, (b) => 2 * b * chi(b).error);
  }
  for (const { b, weight } of measure) {
    const { im, error: ofPhase } = chi(b);
    value += weight * removedBeyondFirst(im);
    error += weight * 2 * ofPhase;
  }
  return { value: 2 * Math.PI * value, error: 2 * Math.PI * error };
}
