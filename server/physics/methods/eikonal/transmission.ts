import type { Complex } from '#server/physics/potentials/types.ts';
import { beyondFirst, removedBeyondFirst } from './beyond-first.ts';
import { sumOver, type ImpactPanels } from './impact-panels.ts';
import type { Phase } from './phase.ts';
import { pastCharges } from './point-charges.ts';

/** What is integrated over impact parameters, and the bound of its error at b. */
export interface Transmission {
  F: (b: number) => Complex;
  noise: (b: number) => number;
}

/** |e^{i chi}|·|error of chi|, less what first order takes of it. */
const change = ({ re, im }: Phase, first: number): number => {
  const size = Math.exp(-im);
  return Math.hypot(size * Math.cos(re) - first, size * Math.sin(re));
};

/** e^{i chi} - 1 - i chi: first order stands beside it in closed form. */
export function beyondFirstOrder(chi: (b: number) => Phase): Transmission {
  return {
    F: (b) => beyondFirst(chi(b)),
    noise: (b) => {
      const phase = chi(b);
      return change(phase, 1) * phase.error + 4e-16 * Math.hypot(phase.re, phase.im) ** 2;
    },
  };
}

/** (kb)^{2i eta} (e^{i chi} - 1): what is short of range in the field of two point charges. */
export function besideCharges(chi: (b: number) => Phase, eta: number, k: number): Transmission {
  return {
    F: (b) => {
      const phase = chi(b);
      const { re, im } = beyondFirst(phase);
      const [x, y] = [re - phase.im, im + phase.re];
      const past = pastCharges(eta, k, b);
      return { re: x * past.re - y * past.im, im: x * past.im + y * past.re };
    },
    noise: (b) => {
      const phase = chi(b);
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
  { panels, missed }: ImpactPanels,
): Removed {
  let value = 0;
  let error = 4 * missed;
  for (const panel of panels) {
    const part = sumOver(panel, (b) => b * removedBeyondFirst(chi(b).im));
    value += part;
    error += 1e-14 * Math.abs(part) + sumOver(panel, (b) => 2 * b * chi(b).error);
  }
  return { value: 2 * Math.PI * value, error: 2 * Math.PI * error };
}
