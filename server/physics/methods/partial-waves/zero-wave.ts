import { addedFromOrigin, stepAdded } from '#server/physics/numerics/radial-added.ts';
import type { RadialPanels } from '#server/physics/numerics/radial-panels.ts';
import type { PanelPowers } from '#server/physics/numerics/radial-powers.ts';
import { addBarrier, fieldPowers, panelPowers } from '#server/physics/numerics/radial-powers.ts';
import type { RadialWave } from '#server/physics/numerics/radial-series.ts';
import {
  squareOfLast,
  stepComplex,
  stepFromOrigin,
  stepReal,
} from '#server/physics/numerics/radial-steps.ts';
import type { RadialInteraction } from './interaction.ts';
import { CENTRAL_IM, CENTRAL_RE } from './interaction.ts';

const TINY = 1e-140;

/** The wave of l = 0 at zero energy at the end of its panels. */
export interface ZeroWave {
  R: number;
  u: number;
  uIm: number;
  slope: number;
  slopeIm: number;
  /** ∫ u² */
  square: number;
  nodes: number;
  panels: number;
}

function originPowers(powers: PanelPowers): Float64Array {
  const shifted = new Float64Array(powers.length + 2);
  for (let m = 0; m < powers.length; m++) shifted[m + 1] = powers.powers[m] ?? 0;
  return shifted;
}

function rescale(wave: RadialWave): number {
  const size = Math.max(Math.hypot(wave.re, wave.im), Math.hypot(wave.slopeRe, wave.slopeIm));
  if (size > TINY && size < 1 / TINY) return 1;
  wave.re /= size;
  wave.im /= size;
  wave.slopeRe /= size;
  wave.slopeIm /= size;
  return 1 / size;
}

/** Carries the regular wave of l = 0 at zero energy to the end of the panels. */
export function zeroWave(interaction: RadialInteraction, panels: RadialPanels): ZeroWave {
  const { absorbs, core, shells } = interaction;
  const { edges, count } = panels;
  const [total, second] = [panelPowers(), panelPowers()];
  const wave: RadialWave = { re: 0, im: 0, slopeRe: 1, slopeIm: 0 };
  let square = 0;
  let nodes = 0;
  for (let p = 0; p < count; p++) {
    const width = (edges[p + 1] ?? 0) - (edges[p] ?? 0);
    const before = wave.re;
    const fromOrigin = p === 0 && core === 0;
    fieldPowers(panels, p, CENTRAL_RE, 1, 0, 0, total);
    if (absorbs) fieldPowers(panels, p, CENTRAL_IM, 1, 0, 0, second);
    if (p > 0) {
      const last = (edges[p] ?? 0) - (edges[p - 1] ?? 0);
      square *= rescale(wave) ** 2;
      wave.slopeRe *= width / last;
      wave.slopeIm *= width / last;
    }
    if (fromOrigin) {
      const imaginary = absorbs ? originPowers(second) : null;
      const terms = stepFromOrigin(0, originPowers(total), imaginary, wave);
      square += width * squareOfLast(terms, 1);
    } else {
      addBarrier(panels, p, 0, 0, total);
      const terms = absorbs
        ? stepComplex(total.powers, total.length, second.powers, second.length, wave)
        : stepReal(total.powers, total.length, wave);
      square += width * squareOfLast(terms, 0);
    }
    if (before * wave.re < 0) nodes += 1;
    const jump = shells.find(({ radius }) => radius === edges[p + 1])?.jump ?? 0;
    wave.slopeRe += width * jump * wave.re;
    wave.slopeIm += width * jump * wave.im;
  }
  const last = (edges[count] ?? 0) - (edges[count - 1] ?? 0);
  return {
    R: edges[count] ?? 0,
    u: wave.re,
    uIm: wave.im,
    slope: wave.slopeRe / last,
    slopeIm: wave.slopeIm / last,
    square,
    nodes,
    panels: count,
  };
}

/** ∫ r |U| dr below which the wave stays close to r. */
const WEAK = 0.2;

function isWeak(
  { core, absorbs, shells }: RadialInteraction,
  { edges, count, size }: RadialPanels,
): boolean {
  let slow = shells.reduce((sum, { radius, jump }) => sum + radius * Math.abs(jump), 0);
  for (let p = 0; p < count; p++) {
    const [a, b] = [edges[p] ?? 0, edges[p + 1] ?? 0];
    slow += ((size[CENTRAL_RE]?.[p] ?? 0) * (b - a)) / (a > 0 ? a : b / 2);
  }
  return core === 0 && !absorbs && slow < WEAK;
}

/**
 * Scattering length of a weak interaction, to all its digits.
 *
 * Formula: u = r + y, y'' = U (r + y); a = (R y' - y)/(1 + y') at R.
 *
 * @returns null where the interaction is not weak
 */
export function weakLength(interaction: RadialInteraction, panels: RadialPanels): number | null {
  if (!isWeak(interaction, panels)) return null;
  const { edges, count } = panels;
  const [none, field] = [panelPowers(), panelPowers()];
  const free: RadialWave = { re: 0, im: 0, slopeRe: 0, slopeIm: 0 };
  const added: RadialWave = { ...free };
  let last = edges[1] ?? 0;
  for (let p = 0; p < count; p++) {
    const width = (edges[p + 1] ?? 0) - (edges[p] ?? 0);
    fieldPowers(panels, p, CENTRAL_RE, 1, 0, 0, field);
    if (p === 0) {
      const powers = originPowers(field);
      addedFromOrigin(0, new Float64Array(powers.length), powers, null, free, added);
    } else {
      free.slopeRe *= width / last;
      added.slopeRe *= width / last;
      stepAdded(none, field, none, free, added);
    }
    const jump = interaction.shells.find(({ radius }) => radius === edges[p + 1])?.jump ?? 0;
    added.slopeRe += width * jump * (free.re + added.re);
    last = width;
  }
  const R = edges[count] ?? 0;
  return ((R / last) * added.slopeRe - added.re) / ((free.slopeRe + added.slopeRe) / last);
}
