import {
  PanelError,
  type RadialPanels,
  radialPanels,
} from '#server/physics/numerics/radial-panels.ts';
import type { Unavailable } from '../amplitude.ts';
import type { RadialInteraction } from './interaction.ts';
import { CENTRAL_RE } from './interaction.ts';

/** The panels of one interaction at one energy. */
export interface Panels {
  all: RadialPanels;
  /** Those that waves are carried over; first order serves beyond. */
  inner: RadialPanels;
  /** What lies inside a hard core and only first order feels; null without one. */
  below: RadialPanels | null;
  /** min(∫ r|U| dr, ∫ |U| dr/k) from each edge outwards: below one, waves there are close to free ones. */
  strength: Float64Array;
}

/** What is left of the interaction beyond the followed panels may be this strong: its square is lost in rounding. */
const LEFT = 2e-8;
/** Radians of the wave over which it is followed at most, and panels times waves. */
const MOST_PHASE = 8000;
const MOST_STEPS = 5e6;

/** What the fit of U may miss, in phase, of a strong and of a weak interaction. */
const MISSED = 1e-18;
const SAMPLES = 240;
const DECADES = 8;

/** min(1, ∫ r|U| dr, ∫ |U| dr/k) to a factor of two or so. */
function roughStrength(
  { field, shells, charge }: RadialInteraction,
  end: number,
  k: number,
): number {
  const out = new Float64Array(field.components);
  const step = (DECADES * Math.LN10) / SAMPLES;
  let [slow, fast] = [0, 0];
  for (let i = 0; i < SAMPLES; i++) {
    const r = end * Math.exp(-step * (i + 0.5));
    field.at(r, out);
    // A Coulomb tail is no part of what is weak.
    const size = out.reduce(
      (sum, one, c) => sum + (charge !== 0 && c === 0 ? 0 : Math.abs(one)),
      0,
    );
    if (!Number.isFinite(size)) continue;
    slow += step * r * r * size;
    fast += (step * r * size) / k;
  }
  for (const { radius, jump } of shells) {
    slow += radius * Math.abs(jump);
    fast += Math.abs(jump) / k;
  }
  return Math.min(1, slow, fast);
}

function fieldPanels(
  interaction: RadialInteraction,
  start: number,
  end: number,
  wave: number,
): RadialPanels {
  const { field, shells, breaks } = interaction;
  const edges = [...breaks, ...shells.map(({ radius }) => radius)];
  const tolerance = MISSED * roughStrength(interaction, end, wave);
  return radialPanels({ field, start, end, breaks: edges, wave, tolerance });
}

/** Bounds of what is felt from each edge outwards beside a Coulomb tail. */
function strengthFrom(
  { edges, count, size: sizes }: RadialPanels,
  { shells, charge }: RadialInteraction,
  k: number,
): Float64Array {
  const size = charge === 0 ? sizes : sizes.filter((_, c) => c !== CENTRAL_RE);
  const from = new Float64Array(count + 1);
  let [slow, fast] = [0, 0];
  for (let p = count - 1; p >= 0; p--) {
    const [a, b] = [edges[p] ?? 0, edges[p + 1] ?? 0];
    const jump = shells.reduce((sum, one) => sum + (one.radius === b ? Math.abs(one.jump) : 0), 0);
    const most = size.reduce((sum, row) => sum + (row[p] ?? 0), 0);
    // r² |U| is known; a panel from the origin rises at most as 1/r there.
    const near = a > 0 ? a : b / 2;
    slow += (most / near) * (b - a) + b * jump;
    fast += ((most / near / near) * (b - a) + jump) / k;
    // Waves near their turning point are larger than far out by the sixth root of l.
    from[p] = Math.min(slow, fast * 2 * Math.cbrt(1 + k * b));
  }
  return from;
}

/** Panels whose slopes jump at their outer edge must be followed. */
function lastShell({ edges, count }: RadialPanels, { shells }: RadialInteraction): number {
  let last = 0;
  for (let p = 0; p < count; p++) {
    if (shells.some(({ radius }) => radius === edges[p + 1])) last = p + 1;
  }
  return last;
}

function followed(panels: RadialPanels, strength: Float64Array, least: number): RadialPanels {
  const allowed = LEFT * Math.sqrt(Math.min(1, strength[0] ?? 0));
  let count = Math.max(1, least);
  while (count < panels.count && (strength[count] ?? 0) > allowed) count += 1;
  return { ...panels, count };
}

/**
 * Cuts an interaction into panels, to where all but its Coulomb tail or power of r has gone.
 *
 * @param end where to stop, angstrom
 * @param whole whether waves are carried to the end, or first order serves where little is left
 * @returns panels, or why the interaction cannot be followed
 */
export function panelsOf(
  interaction: RadialInteraction,
  k: number,
  end: number,
  whole: boolean,
): Panels | Unavailable {
  const { core } = interaction;
  if (!(k * end <= MOST_PHASE)) return tooFar(k * end);
  try {
    const all = fieldPanels(interaction, core, core >= end ? core * (1 + 1e-3) : end, k);
    const strength = strengthFrom(all, interaction, k);
    const inner = whole ? all : followed(all, strength, lastShell(all, interaction));
    const below = core > 0 ? fieldPanels(interaction, 0, core, k) : null;
    return { all, inner, below, strength };
  } catch (error) {
    if (!(error instanceof PanelError)) throw error;
    return notFollowed(error);
  }
}

function tooFar(phase: number): Unavailable {
  return {
    unavailable: `The interaction reaches over ${phase.toPrecision(3)} radians of the wave; partial waves are computed up to ${MOST_PHASE}. Lower the energy or the range; born1 and eikonal are made for this case.`,
  };
}

/** Why so many waves over so many panels are too much work; null where they are not. */
export function tooMany({ inner }: Panels, waves: number): Unavailable | null {
  if (inner.count * waves <= MOST_STEPS) return null;
  return {
    unavailable: `Some ${waves} waves over ${inner.count} panels are too much work for partial waves. Lower the energy or the range; born1 and eikonal are made for this case.`,
  };
}

function notFollowed({ reason, at }: PanelError): Unavailable {
  const where = `${Number(at.toPrecision(3))} angstrom`;
  return {
    unavailable:
      reason === 'notFinite'
        ? `The potential is not finite at r = ${where}.`
        : `The radial wave cannot be followed at r = ${where}: the potential is too strong, too steep or too far-reaching for this energy.`,
  };
}
