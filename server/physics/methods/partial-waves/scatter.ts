import { riccatiBessel } from '#server/physics/numerics/riccati-bessel.ts';
import type { Unavailable } from '../amplitude.ts';
import { farWaves } from './far-waves.ts';
import type { RadialInteraction } from './interaction.ts';
import type { Panels } from './panels.ts';
import { panelsOf, tooMany } from './panels.ts';
import type { WaveIntegrals } from './radial-integrals.ts';
import { innerIntegrals, lastOrder, tailIntegrals } from './radial-integrals.ts';
import type { Matched, Outer } from './matched.ts';
import { errorOf, transitionOf } from './matched.ts';
import type { Transition } from './transition.ts';
import { ofPhase, spinFactor, spinsOf, weightOf } from './transition.ts';
import { RadialSolver } from './radial-wave.ts';

export interface Scattered {
  waves: Transition[];
  /** First-order phases by l; null where the sum is not closed with them. */
  born: { re: Float64Array; im: Float64Array } | null;
  /** Highest wave that was followed, and the highest in the sum. */
  lMax: number;
  summed: number;
  /** Bound of what the sum leaves out: Σ (2l+1) |T_l - first order|. */
  left: number;
}

/** Share of Σ (2l+1)|T_l| that a wave may have beyond what closes the sum. */
export const NEGLIGIBLE = 3e-15;
/** Share of Σ (2l+1)|T_l|² that is left to first order, which is not unitary. */
const UNSUMMED = 1e-13;
/** Waves that must in turn be negligible. */
export const IN_TURN = 3;
const WEAK = 0.2;
/** A phase known no better than this is no phase. */
export const UNRESOLVED = 1e-8;

/** Whether a wave that begins at an edge stays close to a free one. */
export function isWeak(
  { spinOrbit, core }: RadialInteraction,
  { strength }: Panels,
  edge: number,
  l: number,
): boolean {
  return core === 0 && (strength[edge] ?? 0) * (spinOrbit ? l + 1 : 1) < WEAK;
}

/** Free functions at x for every l, with their slopes. */
export function freeOuter(x: number, lMax: number): (l: number) => Outer | null {
  const F = new Float64Array(lMax + 2);
  const G = new Float64Array(lMax + 2);
  const top = riccatiBessel(x, F, G) - 1;
  return (l) => {
    if (l > top) return null;
    const [f, g] = [F[l] ?? 0, G[l] ?? 0];
    const slope = (l + 1) / x;
    return { F: f, dF: slope * f - (F[l + 1] ?? 0), G: g, dG: slope * g - (G[l + 1] ?? 0) };
  };
}

/** What a weak tail beyond the match adds, first order in it. */
function withTail(matched: Matched, tail: WaveIntegrals, l: number, factor: number): Matched {
  const at = (list: Float64Array[], first: number) =>
    (list[first]?.[l] ?? 0) + factor * (list[first + 2]?.[l] ?? 0);
  const { alphaRe, alphaIm, betaRe, betaIm } = matched;
  const [ffRe, ffIm] = [at(tail.FF, 0), at(tail.FF, 1)];
  const [fgRe, fgIm] = [at(tail.FG, 0), at(tail.FG, 1)];
  const [ggRe, ggIm] = [at(tail.GG, 0), at(tail.GG, 1)];
  return {
    ...matched,
    alphaRe: alphaRe + (alphaRe * fgRe - alphaIm * fgIm) + (betaRe * ggRe - betaIm * ggIm),
    alphaIm: alphaIm + (alphaRe * fgIm + alphaIm * fgRe) + (betaRe * ggIm + betaIm * ggRe),
    betaRe: betaRe - (alphaRe * ffRe - alphaIm * ffIm) - (betaRe * fgRe - betaIm * fgIm),
    betaIm: betaIm - (alphaRe * ffIm + alphaIm * ffRe) - (betaRe * fgIm + betaIm * fgRe),
  };
}

/** First-order phases: inner and outer integrals, with the sign of a phase. */
function bornOf(inner: Float64Array[], tail: WaveIntegrals, lMax: number) {
  const row = (c: number) =>
    Float64Array.from(
      { length: lMax + 1 },
      (_, l) => -((inner[c]?.[l] ?? 0) + (tail.FF[c]?.[l] ?? 0)),
    );
  return { re: row(0), im: row(1) };
}

export function tooNarrow(l: number, error: number): Unavailable {
  return {
    unavailable: `The wave l = ${l} is within a resonance so narrow that its phase cannot be resolved: the last digit of the energy turns it by ${error.toExponential(1)} rad or more. Move the energy off the resonance.`,
  };
}

/**
 * All waves of an interaction that ends, or falls off exponentially.
 *
 * Formula: inner panels are followed, the rest of the interaction is taken to first order in it; waves that stay outside of the followed
 *   panels are first order altogether.
 *
 * @param interaction without Coulomb tail and power of r
 * @param k 1/angstrom
 */
export function scatter(interaction: RadialInteraction, k: number): Scattered | Unavailable {
  const found = panelsOf(interaction, k, interaction.reach > 0 ? interaction.reach : 1 / k, false);
  if ('unavailable' in found) return found;
  const { all, inner } = found;
  const x = k * (inner.edges[inner.count] ?? 0);
  const bound = lastOrder(interaction, all, k);
  const refused = tooMany(found, bound);
  if (refused) return refused;
  const within = innerIntegrals(interaction, inner, inner.count, found.below, k, bound);
  const tail = tailIntegrals(interaction, all, inner.count, k, bound);
  const born = bornOf(within, tail, bound);
  const outer = freeOuter(x, bound);
  const solver = new RadialSolver(interaction, inner, k);
  const waves: Transition[] = [];
  const pocket = solver.starts.pocketOrder();
  let sum = 0;
  let quiet = 0;
  let lastExcess = 0;
  let lMax = 0;
  for (let l = 0; l <= bound && quiet < IN_TURN; l++) {
    const edge = outer(l);
    if (!edge || solver.starts.at(l, spinFactor(l, 1)) >= inner.count) break;
    const here = wavesOf({ interaction, found, solver, tail, x }, l, edge);
    if ('unavailable' in here) return here;
    waves.push(...here);
    const first = ofPhase(born.re[l] ?? 0, born.im[l] ?? 0);
    let [excess, noise] = [0, 0];
    for (const wave of here) {
      sum += weightOf(wave) * Math.hypot(wave.re, wave.im);
      noise += weightOf(wave) * wave.error;
      excess += weightOf(wave) * Math.hypot(wave.re - first.re, wave.im - first.im);
    }
    quiet = excess <= Math.max(NEGLIGIBLE * sum, noise / 64) && l > pocket ? quiet + 1 : 0;
    lastExcess = excess;
    lMax = l;
  }
  const end = { lMax, bound, excess: quiet === IN_TURN ? lastExcess : null };
  const far = farWaves(interaction, tail, born, end);
  const everyWave = [...waves, ...far.waves];
  return { waves: everyWave, born, lMax, summed: lastSummed(everyWave, lMax), left: far.left };
}

/** Highest l whose square still counts among those of all waves. */
function lastSummed(waves: readonly Transition[], lMax: number): number {
  const square = (wave: Transition) => weightOf(wave) * (wave.re * wave.re + wave.im * wave.im);
  const total = waves.reduce((sum, wave) => sum + square(wave), 0);
  let left = 0;
  for (let i = waves.length - 1; i >= 0; i--) {
    const wave = waves[i];
    if (!wave || wave.l <= lMax) break;
    left += square(wave);
    if (left > UNSUMMED * total) return wave.l;
  }
  return lMax;
}

interface Setting {
  interaction: RadialInteraction;
  found: Panels;
  solver: RadialSolver;
  tail: WaveIntegrals;
  x: number;
}

function wavesOf(
  { interaction, found, solver, tail, x }: Setting,
  l: number,
  edge: Outer,
): Transition[] | Unavailable {
  const waves: Transition[] = [];
  const weak = isWeak(interaction, found, solver.starts.at(l, spinFactor(l, 1)), l);
  for (const spin of spinsOf(interaction, l)) {
    const factor = spinFactor(l, spin);
    const matched = weak ? solver.matchWeak(l, factor, edge) : solver.match(l, factor, edge);
    if (!matched) continue;
    const { re, im, eta, absorbed } = transitionOf(withTail(matched, tail, l, factor));
    const error = errorOf(matched, x, weak, Math.hypot(re, im), found);
    if (!(error < UNRESOLVED)) return tooNarrow(l, error);
    waves.push({ l, spin, re, im, eta: interaction.absorbs ? eta : 1, absorbed, error });
  }
  return waves;
}
