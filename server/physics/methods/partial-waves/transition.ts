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

/** T after a phase (re + i im) more: T + S e^{i phase} sin(phase). */
export function turned(T: { re: number; im: number }, re: number, im: number) {
  const fall = Math.exp(-2 * im);
  // e^{2i phase} - 1, without cancellation for small phases
  const [x, y] = [
    Math.expm1(-2 * im) * Math.cos(2 * re) - 2 * Math.sin(re) ** 2,
    fall * Math.sin(2 * re),
  ];
  const [tRe, tIm] = [y / 2, -x / 2];
  const [sRe, sIm] = [1 - 2 * T.im, 2 * T.re];
  return { re: T.re + sRe * tRe - sIm * tIm, im: T.im + sRe * tIm + sIm * tRe };
}

/** T of a phase (re + i im) alone: of a real one, unitary. */
export const ofPhase = (re: number, im: number) => turned({ re: 0, im: 0 }, re, im);
