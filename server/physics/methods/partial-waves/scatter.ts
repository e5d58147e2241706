import {
  PanelError,
  type RadialPanels,
  radialPanels,
} from '#server/physics/numerics/radial-panels.ts';
import { riccatiBessel } from '#server/physics/numerics/riccati-bessel.ts';
import type { Unavailable } from '../amplitude.ts';
import type { BornWaves } from './born-waves.ts';
import { bornWaves } from './born-waves.ts';
import type { RadialInteraction } from './interaction.ts';
import type { Matched, Outer } from './radial-wave.ts';
import { RadialSolver, roundingOf, transitionOf } from './radial-wave.ts';

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

export interface Scattered {
  waves: Transition[];
  born: BornWaves | null;
  lMax: number;
  /** Bound of Σ (2l+1) |T_l - first order| beyond lMax. */
  left: number;
  panels: number;
}

const MOST_PHASE = 2e4;
const MOST_WAVES = 6000;
const NEGLIGIBLE = 1e-16;
/** Waves that must in turn be negligible. */
const IN_TURN = 3;
const WEAK = 0.3;
/** A phase known no better than this is no phase. */
const UNRESOLVED = 1e-8;

/** min(∫ r|U| dr, ∫|U| dr/k): below one the wave is close to a free one. */
function strengthOf({ field, shells }: RadialInteraction, panels: RadialPanels, k: number): number {
  const out = new Float64Array(field.components);
  let [slow, fast] = [0, 0];
  for (let p = 0; p < panels.count; p++) {
    const [from, to] = [panels.edges[p] ?? 0, panels.edges[p + 1] ?? 0];
    for (let i = 0; i < 8; i++) {
      const r = from + ((i + 0.5) / 8) * (to - from);
      field.at(r, out);
      const size = (((to - from) / 8) * Math.hypot(out[0] ?? 0, out[1] ?? 0));
      slow += r * size;
      fast += size / k;
    }
  }
  for (const { radius, jump } of shells) {
    slow += radius * Math.abs(jump);
    fast += Math.abs(jump) / k;
  }
  return Math.min(slow, fast);
}

function panelsOf(interaction: RadialInteraction, k: number): RadialPanels | Unavailable {
  const { field, core, shells, breaks, reach } = interaction;
  const end = reach > 0 ? reach : 1 / k;
  try {
    return radialPanels({
      field,
      start: core,
      end: core === end ? end * (1 + 1e-3) : end,
      breaks: [...breaks, ...shells.map(({ radius }) => radius)],
      wave: k,
      tolerance: 1e-17,
    });
  } catch (error) {
    if (!(error instanceof PanelError)) throw error;
    const where = `${Number(error.at.toPrecision(3))} angstrom`;
    return {
      unavailable:
        error.reason === 'notFinite'
          ? `The potential is not finite at r = ${where}.`
          : `The radial wave cannot be followed at r = ${where}: the potential is too strong, too steep or too far-reaching for this energy.`,
    };
  }
}

/**
 * All waves of an interaction without a Coulomb tail.
 *
 * @param withBorn whether first order exists, so that waves beyond the last may be left to it
 */
export function scatter(
  interaction: RadialInteraction,
  k: number,
  withBorn: boolean,
): Scattered | Unavailable {
  const panels = panelsOf(interaction, k);
  if ('unavailable' in panels) return panels;
  const end = panels.edges[panels.count] ?? 0;
  const x = k * end;
  if (!(x <= MOST_PHASE)) return tooFar(x);
  const solver = new RadialSolver(interaction, panels, k);
  const bound = Math.min(MOST_WAVES, Math.ceil(x + 40 + 12 * Math.cbrt(x)));
  const F = new Float64Array(bound + 2);
  const G = new Float64Array(bound + 2);
  const top = riccatiBessel(x, F, G) - 1;
  const outer = (l: number): Outer => {
    const [f, g] = [F[l] ?? 0, G[l] ?? 0];
    const slope = (l + 1) / x;
    return { F: f, dF: slope * f - (F[l + 1] ?? 0), G: g, dG: slope * g - (G[l + 1] ?? 0) };
  };
  const born = withBorn ? bornWaves(interaction, panels, k, bound) : null;
  const weak = withBorn && !interaction.spinOrbit && strengthOf(interaction, panels, k) < WEAK;
  const spins: (-1 | 0 | 1)[] = interaction.spinOrbit ? [1, -1] : [0];
  const waves: Transition[] = [];
  const pocket = solver.pocketOrder(end);
  let sum = 0;
  let quiet = 0;
  let left = 0;
  let lMax = 0;
  for (let l = 0; l <= Math.min(bound, top); l++) {
    let excess = 0;
    let felt = false;
    let noise = 0;
    for (const spin of spins) {
      if (spin === -1 && l === 0) continue;
      const factor = spin === 0 ? 0 : spin === 1 ? l : -(l + 1);
      const matched: Matched | null = weak
        ? solver.matchWeak(l, outer(l))
        : solver.match(l, factor, outer(l));
      if (!matched) {
        waves.push({ l, spin, re: 0, im: 0, eta: 1, absorbed: 0, error: 1e-18 });
        continue;
      }
      felt = true;
      const { re, im, eta, absorbed } = transitionOf(matched);
      const size = Math.hypot(re, im);
      const error = roundingOf(matched, x) * (weak ? size : 1) + panels.missed;
      if (!(error < UNRESOLVED)) return tooNarrow(l, error);
      waves.push({ l, spin, re, im, eta: interaction.absorbs ? eta : 1, absorbed, error });
      const weight = spin === 0 ? 2 * l + 1 : spin === 1 ? l + 1 : l;
      sum += weight * size;
      noise += weight * error;
      excess += weight * Math.hypot(re - (born?.re[l] ?? 0), im - (born?.im[l] ?? 0));
    }
    lMax = l;
    if (!felt) break;
    quiet = excess <= Math.max(NEGLIGIBLE * sum, noise / 8) && l > pocket / 2 ? quiet + 1 : 0;
    left = excess;
    if (quiet === IN_TURN) break;
  }
  return { waves, born, lMax, left, panels: panels.count };
}

function tooFar(x: number): Unavailable {
  return {
    unavailable: `The interaction reaches over ${x.toPrecision(3)} radians of the wave, more than partial waves are computed for (${MOST_PHASE}). Lower the energy or the range; born1 and eikonal are made for this case.`,
  };
}

function tooNarrow(l: number, error: number): Unavailable {
  return {
    unavailable: `The wave l = ${l} is within a resonance so narrow that its phase cannot be resolved: the last digit of the energy turns it by ${error.toExponential(1)} rad or more. Move the energy off the resonance.`,
  };
}
