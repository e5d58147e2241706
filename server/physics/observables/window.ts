import { HBAR_EV_S } from '#server/physics/constants/codata2022.ts';
import { bracketedRoot } from '#server/physics/numerics/root.ts';

/** Interval of interaction times for which the golden rule holds, s, or why there is none. */
export type Window = { t0Min: number; t0Max: number } | { none: string };

export interface FinalState {
  /** Wave number, 1/angstrom. */
  k: number;
  /** What replaces mu, eV. */
  reducedMass: number;
}

export interface WindowInput {
  /** rad, centre of mass. */
  theta: number;
  /** Wave number before, 1/angstrom. */
  k: number;
  /** Kinetic energy in the centre of mass, eV. */
  energyCm: number;
  /** Wave number and reduced mass of a final state of this kinetic energy, eV. */
  finalState: (energyCm: number) => FinalState;
  /** |∫ V exp(iq·r) d³r|² up to a constant factor; null where it diverges. */
  strength: (q: number) => number | null;
  /** Largest range, angstrom; 0 without one. */
  range: number;
  /** Transitions per second over all angles; null where the total cross section diverges. */
  totalRate: number | null;
}

export const VARIATION = 0.1;
export const MOST_PROBABLE = 0.1;
const STEPS = 60_000;
/** Change of q times the range over which no transform turns round. */
const FINE = 0.1;

/** |V|² rho of final energies above and below, as a ratio to the one on the shell, less one. */
function variation({ theta, k, energyCm, finalState, strength }: WindowInput) {
  const sinHalf = Math.sin(theta / 2);
  const at = (energy: number) => {
    const { k: kf, reducedMass } = finalState(energy);
    const q = Math.sqrt((kf - k) ** 2 + 4 * k * kf * sinHalf * sinHalf);
    return { q, density: (strength(q) ?? Infinity) * kf * reducedMass };
  };
  const { q: shellQ, density: shell } = at(energyCm);
  const largest = (width: number) => {
    const above = at(energyCm + width);
    const below = at(energyCm - width);
    const change = (density: number) => Math.abs(density / shell - 1);
    return {
      change: Math.max(change(above.density), change(below.density)),
      spread: Math.max(Math.abs(above.q - shellQ), Math.abs(below.q - shellQ)),
    };
  };
  return { shell, largest };
}

/**
 * Largest symmetric interval of final energies over which |V_fi|² rho(E) varies by no more than 10 %, at fixed angle.
 *
 * Formula: smallest W > 0 with max |g(E ± W)/g(E) - 1| = 0.1, g = |V(q)|² mu k_f, q² = (k_f - k)² + 4 k k_f sin²(theta/2).
 *
 * The interval is widened in steps over which q times the range changes by less than a tenth and W by less than a tenth,
 * so that no excursion of an oscillating transform is stepped over; the crossing is then bracketed.
 *
 * @returns half-width W, eV; null where |V_fi|² vanishes or varies too fast for any width
 *
 * Validity: W stays below the energy itself, for the density of states vanishes there.
 */
export function quietHalfWidth(input: WindowInput): number | null {
  const { shell, largest } = variation(input);
  if (!(shell > 0) || !Number.isFinite(shell)) return null;
  const excess = (width: number) => largest(width).change - VARIATION;
  let width = 1e-3 * input.energyCm;
  const tooWide = (start: { change: number; spread: number }) =>
    !(start.change < VARIATION && start.spread * input.range < FINE);
  while (tooWide(largest(width))) {
    width /= 10;
    if (width < 1e-12 * input.energyCm) return null;
  }
  let spread = largest(width).spread;
  for (let step = 0; step < STEPS; step++) {
    const slope = spread / width;
    const resolved = slope * input.range > 0 ? FINE / (slope * input.range) : Infinity;
    const next = Math.min(width * 1.1, width + resolved, input.energyCm);
    const there = largest(next);
    if (!(there.change < VARIATION)) {
      const { value } = bracketedRoot(excess, width, next, 1e-13 * next);
      return Number.isFinite(value) ? value : width;
    }
    if (next >= input.energyCm) return input.energyCm;
    width = next;
    spread = there.spread;
  }
  return width;
}

/**
 * The two conditions on the interaction time in numbers.
 *
 * Formula: t0 >= 2 pi hbar/W, so that |V_fi|² rho is constant to 10 % over ±2 pi hbar/t0; t0 <= 0.1/w_tot, so that the
 * transition probability over all angles stays below a tenth.
 *
 * @returns s; or in words why no time satisfies both. w_tot falls as 1/L³, so a larger box allows more time
 */
export function goldenRuleWindow(input: WindowInput): Window {
  const { totalRate } = input;
  if (totalRate === null) {
    return {
      none: 'The total cross section diverges, so the transition probability over all angles has no bound at any time.',
    };
  }
  if (!(totalRate > 0)) {
    return { none: 'The interaction has no strength: nothing happens at any time.' };
  }
  const width = quietHalfWidth(input);
  if (width === null) {
    return {
      none: 'The matrix element vanishes at this angle, or varies too fast around it for any time. Choose another angle.',
    };
  }
  const t0Min = (2 * Math.PI * HBAR_EV_S) / width;
  const t0Max = MOST_PROBABLE / totalRate;
  if (t0Min <= t0Max) return { t0Min, t0Max };
  const growth = Math.cbrt(t0Min / t0Max);
  return {
    none: `For this box t0 would have to be longer than ${t0Min.toExponential(3)} s and shorter than ${t0Max.toExponential(3)} s. The upper bound grows with the volume: make the side at least ${growth.toPrecision(3)} times longer.`,
  };
}
