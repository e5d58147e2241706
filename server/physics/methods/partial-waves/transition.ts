import type { RadialInteraction } from './interaction.ts';

/** T_l = (S_l - 1)/2i of one wave. */
export interface Transition {
  l: number;
  /** 2 (j - l): 1 or -1 with a spin-orbit term, 0 without one. */
  spin: -1 | 0 | 1;
  re: number;
  im: number;
  eta: number;
  /** 1 - |S|² */
  absorbed: number;
  /** Bound of the error of T. */
  error: number;
}

export const weightOf = ({ l, spin }: Pick<Transition, 'l' | 'spin'>): number =>
  spin === 0 ? 2 * l + 1 : spin === 1 ? l + 1 : l;

export function spinsOf({ spinOrbit }: RadialInteraction, l: number): (-1 | 0 | 1)[] {
  if (!spinOrbit) return [0];
  return l === 0 ? [1] : [1, -1];
}

/** l·sigma */
export const spinFactor = (l: number, spin: -1 | 0 | 1): number =>
  spin === 0 ? 0 : spin === 1 ? l : -(l + 1);
