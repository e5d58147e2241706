import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { Panels } from './panels.ts';

/** Reference functions at the end of the panels: dimensionless, slopes by k r. */
export interface Outer {
  F: number;
  dF: number;
  G: number;
  dG: number;
}

/** u = alpha F + beta G at the end of the panels, up to a common factor. */
export interface Matched {
  alphaRe: number;
  alphaIm: number;
  betaRe: number;
  betaIm: number;
  /** k ∫ |u|² dr over |alpha - i beta|²: what a relative error of the energy does to the phase. */
  delay: number;
  /** What a relative error of u or u' at the end does to T. */
  spread: number;
  /** Panels the wave was carried over. */
  panels: number;
  /** Whether it was begun behind its barrier. */
  begun: boolean;
}

/** T = beta/(alpha - i beta) of a matched wave, T = (S - 1)/2i, and 1 - |S|². */
export function transitionOf({ alphaRe, alphaIm, betaRe, betaIm }: Matched) {
  const [c, s] = [alphaRe + betaIm, alphaIm - betaRe];
  const size = c * c + s * s;
  return {
    re: (betaRe * c + betaIm * s) / size,
    im: (betaIm * c - betaRe * s) / size,
    absorbed: (4 * (alphaRe * betaIm - alphaIm * betaRe)) / size,
    eta: Math.hypot(alphaRe - betaIm, alphaIm + betaRe) / Math.sqrt(size),
  };
}

/** What is lost of a wave that begins behind its barrier. */
const LOST = 1e-17;

/**
 * Bound of the error of T.
 *
 * @param x k times the radius of the match
 * @param weak whether the wave was carried beside a free one: its rounding is then relative to T
 * @param size |T|
 * @param panels with what their fit of U misses, and the strength of the interaction
 */
export function errorOf(
  { delay, spread, panels, begun }: Matched,
  x: number,
  weak: boolean,
  size: number,
  { all, strength }: Pick<Panels, 'all' | 'strength'>,
): number {
  const rounding = weak
    ? (64 + 8 * panels + 2 * x) * size
    : (16 + 2 * panels + x) * spread + 8 * delay;
  const forgotten = begun ? LOST * Math.min(1, strength[0] ?? 0) : 0;
  return UNIT_ROUNDOFF * rounding + forgotten + all.missed * Math.min(1, x);
}
