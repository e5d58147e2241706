import type { Unavailable } from '../amplitude.ts';
import type { FirstBorn } from '../born1.ts';
import { projectedBorn } from './born-projection.ts';
import type { RadialInteraction } from './interaction.ts';
import { panelsOf, tooMany } from './panels.ts';
import { tailOfSquare } from './power-tail.ts';
import { innerIntegrals } from './radial-integrals.ts';
import { errorOf, transitionOf } from './matched.ts';
import { RadialSolver } from './radial-wave.ts';
import type { Scattered } from './scatter.ts';
import { freeOuter, isWeak, tooNarrow, UNRESOLVED } from './scatter.ts';
import type { Transition } from './transition.ts';
import { spinFactor, spinsOf, turned } from './transition.ts';

/** Radians of the wave where the asymptotic treatment of the tail begins at the earliest. */
const NEAREST = 80;
/** What the square of the tail may do to a phase. */
const SQUARE = 1e-15;
/** Share of Σ (2l+1)|T_l| that waves beyond the last may have beyond first order. */
const LEFT = 3e-12;
const MOST_WAVES = 6000;

const sizeAt = ({ field }: RadialInteraction, out: Float64Array, r: number): number => {
  field.at(r, out);
  return Math.abs(out[0] ?? 0);
};

/** Radius from which the tail may be taken to first order: U² R/(56 k³) is the phase of its square. */
function matchAt(interaction: RadialInteraction, k: number): number {
  const out = new Float64Array(interaction.field.components);
  let R = Math.max(NEAREST / k, 3 * interaction.size, interaction.reach);
  while ((sizeAt(interaction, out, R) ** 2 * R) / (56 * k ** 3) > SQUARE && R < 1e18) R *= 1.15;
  return R;
}

/**
 * Last order whose phase squared counts, and Σ (2l+1) delta² beyond it; a phase of order l is about U(b) b/k at b = l/k, and falls at
 * least as the cube of l.
 */
function lastWave(interaction: RadialInteraction, k: number, from: number, sum: number) {
  const out = new Float64Array(interaction.field.components);
  const left = (l: number) => (l * sizeAt(interaction, out, l / k) * (l / k)) ** 2 / k ** 2;
  let l = Math.max(16, from);
  while (left(l) > LEFT * sum && l < MOST_WAVES) l = Math.ceil(1.1 * l);
  const lMax = Math.min(l, MOST_WAVES);
  return { lMax, left: left(lMax) };
}

/**
 * Second-order phases beyond the last wave that is followed.
 *
 * Formula: of U ~ r^-p the second order falls as (l + 1/2)^-(2p - 1); its size is that of the last wave.
 */
function secondOrder(
  { field }: RadialInteraction,
  k: number,
  last: number,
  wave: Transition | undefined,
  born: number,
): (l: number) => number {
  const out = new Float64Array(field.components);
  const b = (last + 0.5) / k;
  field.at(b, out);
  const near = out[0] ?? 0;
  field.at(2 * b, out);
  const fall = Math.log2(near / (out[0] ?? NaN));
  if (wave?.l !== last || !(fall > 1)) return () => 0;
  const size = Math.atan2(2 * wave.re, 1 - 2 * wave.im) / 2 - born;
  return (l) => size * ((last + 0.5) / (l + 0.5)) ** (2 * fall - 1);
}

/** Last digits, and the order of the phase that the tail's square leaves out. */
const OWN_ERROR = 2e-15;

function waveOf(
  { absorbs }: RadialInteraction,
  l: number,
  spin: -1 | 0 | 1,
  T: { re: number; im: number },
  error: number,
): Transition {
  const absorbed = absorbs ? 4 * (T.im - T.re * T.re - T.im * T.im) : 0;
  const eta = absorbs ? Math.hypot(1 - 2 * T.im, 2 * T.re) : 1;
  return {
    l,
    spin,
    ...T,
    eta,
    absorbed,
    error: error + OWN_ERROR * Math.hypot(T.re, T.im) + 1e-18,
  };
}

/**
 * All waves of an interaction whose tail falls off as a power of r.
 *
 * Formula: waves with l <= kR/2 are followed to R; of the tail beyond, u = F + T h gives dT = S e^{iB} sin B - (1/k) [T Im I + T² I] with
 *   B = -(1/k) ∫_R^∞ U F² dr from the whole first-order phase less that within R, I = ∫_R^∞ U h² dr. Higher waves have their
 *   first-order phase, e^{iB} sin B, until its square is negligible.
 *
 * @param born first order, which holds the whole tail
 *
 * Source: derived here from the stationary form of T; textbook for its parts.
 */
export function scatterPowerTail(
  interaction: RadialInteraction,
  k: number,
  born: FirstBorn,
): Scattered | Unavailable {
  const R = matchAt(interaction, k);
  const found = panelsOf(interaction, k, R, true);
  if ('unavailable' in found) return found;
  const { inner, below } = found;
  const x = k * R;
  const last = Math.floor(x / 2 - 1);
  const refused = tooMany(found, last);
  if (refused) return refused;
  const forward = Math.abs(k * born.shortRange(0).re);
  const { lMax, left } = lastWave(interaction, k, last, forward);
  const phases = projectedBorn(born, k, lMax);
  const within = innerIntegrals(interaction, inner, inner.count, below, k, last);
  const square = tailOfSquare(interaction.field, k, R, last);
  const outer = freeOuter(x, last);
  const solver = new RadialSolver(interaction, inner, k);
  const waves: Transition[] = [];
  for (let l = 0; l <= last; l++) {
    const edge = outer(l);
    const weak = isWeak(interaction, found, solver.starts.at(l, spinFactor(l, 1)), l);
    const B = {
      re: (phases.re[l] ?? 0) + (within[0]?.[l] ?? 0),
      im: (phases.im[l] ?? 0) + (within[1]?.[l] ?? 0),
    };
    const [iRe, iIm] = [(square.re[l] ?? 0) / k, (square.im[l] ?? 0) / k];
    for (const spin of spinsOf(interaction, l)) {
      const factor = spinFactor(l, spin);
      const matched =
        edge && (weak ? solver.matchWeak(l, factor, edge) : solver.match(l, factor, edge));
      if (!matched) continue;
      const T = transitionOf(matched);
      const error = errorOf(matched, x, weak, Math.hypot(T.re, T.im), found);
      if (!(error < UNRESOLVED)) return tooNarrow(l, error);
      const [tRe, tIm] = [(T.re - T.im) * (T.re + T.im), 2 * T.re * T.im];
      const moved = turned(T, B.re, B.im);
      moved.re -= T.re * iIm + tRe * iRe - tIm * iIm;
      moved.im -= T.im * iIm + tRe * iIm + tIm * iRe;
      waves.push(waveOf(interaction, l, spin, moved, error + 1e-17 * forward));
    }
  }
  const second = secondOrder(interaction, k, last, waves.at(-1), phases.re[last] ?? 0);
  let beyond = 0;
  for (let l = last + 1; l <= lMax; l++) {
    const more = second(l);
    beyond += (2 * l + 1) * Math.abs(more);
    for (const spin of spinsOf(interaction, l)) {
      const T = turned({ re: 0, im: 0 }, (phases.re[l] ?? 0) + more, phases.im[l] ?? 0);
      waves.push(waveOf(interaction, l, spin, T, 1e-18 * forward));
    }
  }
  return { waves, born: phases, lMax, summed: lMax, left: left + beyond / 30 };
}
