import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { Term } from '#server/physics/potentials/types.ts';

/** A delta function in r: U(r) = strength · delta(r - R), strength in 1/angstrom. */
export interface Shell {
  R: number;
  re: number;
  im: number;
}

/** U(r) = (2 mu/hbar²) V(r) without its Coulomb tails, as a function that can be sampled. */
export interface LocalPotential {
  /** Re U, 1/angstrom². */
  re: (r: number) => number;
  /** Im U; null where every strength is real. */
  im: ((r: number) => number) | null;
  /** What taking Coulomb tails away leaves in error of r U, 1/angstrom; 0 without tails. */
  noise: number;
  /** Ascending from 0 to where U has died away, angstrom: jumps, and radii about which U may change. */
  edges: number[];
  /** Radii where U or its derivatives jump. */
  jumps: number[];
  shells: Shell[];
  /** Largest range of the terms, angstrom; 0 without one. */
  range: number;
}

interface Part {
  re: number;
  im: number;
  v: (r: number) => number;
}

const FADED = 1e-15;
const TAIL_ROUNDING = 4 * UNIT_ROUNDOFF;
/** Ranges beyond which what a charge distribution leaves of its tail is not looked for. */
const MOST_RANGES = 1e4;

/** Where what a Coulomb tail leaves of the shape has died away. */
function reachOf(term: Term): number {
  if (term.reach !== null) return term.reach;
  const range = term.range ?? 0;
  if (!term.v || !(range > 0)) return 0;
  const left = (r: number) => Math.abs(r * (term.v?.(r) ?? 0) - term.coulombTail);
  let last = range;
  for (let r = range; r < MOST_RANGES * range; r *= 1.1) {
    if (left(r) > FADED * Math.abs(term.coulombTail)) last = 1.1 * r;
  }
  return last;
}

/** Radii that double from well inside the smallest range to the reach. */
function doubling(ranges: readonly number[], reach: number): number[] {
  const edges: number[] = [];
  for (let r = Math.min(...ranges) / 4; r < reach; r *= 2) edges.push(r);
  return edges;
}

function sumOf(parts: readonly Part[], pick: (part: Part) => number): (r: number) => number {
  const active = parts.filter((part) => pick(part) !== 0);
  const [only] = active;
  if (only && active.length === 1) {
    const { v } = only;
    const factor = pick(only);
    return (r) => factor * v(r);
  }
  return (r) => {
    let sum = 0;
    for (const part of active) sum += pick(part) * part.v(r);
    return sum;
  };
}

/**
 * The interaction as methods beyond first order sample it.
 *
 * Formula: U(r) = (2 mu/hbar²) Σ strength · (s(r) - c/r), c the Coulomb tail of the shape; delta shells beside it.
 *
 * @param terms local forms only: none without a radial function but delta shells
 * @param twoMuOverHbar2 1/(eV angstrom²)
 */
export function localPotential(terms: readonly Term[], twoMuOverHbar2: number): LocalPotential {
  const active = terms.filter(({ strength }) => strength.re !== 0 || strength.im !== 0);
  const scaled = ({ strength }: Term) => ({
    re: twoMuOverHbar2 * strength.re,
    im: twoMuOverHbar2 * strength.im,
  });
  const parts = active.flatMap((term): Part[] => {
    const { v, coulombTail: c, norm } = term;
    if (v === null || (c !== 0 && norm === 0)) return [];
    return [{ ...scaled(term), v: c === 0 ? v : (r) => v(r) - c / r }];
  });
  const shells = active
    .filter((term) => term.form === 'deltaShell')
    .map((term) => ({ R: term.range ?? NaN, ...scaled(term) }));
  const reach = Math.max(0, ...active.map(reachOf));
  const ranges = active.flatMap(({ range }) => (range !== null && range > 0 ? [range] : []));
  const jumps = [
    ...active.flatMap(({ breakpoints, knots = [] }) => [...breakpoints, ...knots]),
    ...shells.map(({ R }) => R),
  ];
  const inner = [...jumps, ...active.map(reachOf), ...doubling(ranges, reach)]
    .filter((r) => r > 0 && r < reach)
    .sort((a, b) => a - b);
  return {
    re: sumOf(parts, ({ re }) => re),
    im: parts.some(({ im }) => im !== 0) ? sumOf(parts, ({ im }) => im) : null,
    noise: active.reduce(
      (sum, { strength: { re, im }, coulombTail }) =>
        sum + twoMuOverHbar2 * Math.hypot(re, im) * Math.abs(coulombTail) * TAIL_ROUNDING,
      0,
    ),
    edges: reach > 0 ? [0, ...inner.filter((r, i) => r !== inner[i - 1]), reach] : [],
    jumps: jumps.sort((a, b) => a - b),
    shells,
    range: Math.max(0, ...ranges),
  };
}
