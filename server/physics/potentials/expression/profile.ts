import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { refuse } from '../parameters.ts';
import type { Compiled } from './evaluate.ts';
import { HORIZON, LARGEST_RADIUS, fallOf } from './radii.ts';

/** What a formula does at the origin and far away. */
export interface Profile {
  /** c of a tail c/r, eV·angstrom; 0 without one. */
  coulomb: number;
  /** Radius around which most of ∫ r² |V| dr lies, angstrom. */
  scale: number;
  /** Beyond it what is left of V does not count, angstrom. */
  end: number;
  /** Power of 1/r with which the end is reached; Infinity for anything faster. */
  fall: number;
  /** Power of 1/r at the origin. */
  rise: number;
  /** ∫ r² |V - c/r| dr to some ten per cent; 0 where V vanishes everywhere. */
  norm: number;
}

/** A radius counts while r³|V| is above this share of its largest value. */
const FADED = 1e-19;
/** Potentials that fall as r^-p must fall faster for their integral to be computed. */
const SLOWEST_FALL = 3.5;
const STEEPEST_RISE = 2.001;
const INNERMOST = 80;
/** From so many times its end on V need not be finite. */
const LOST = 4;
const DROWNED = 1e-8;

const shown = (r: number): string => `${Number(r.toPrecision(3))} angstrom`;

function refuseNotFinite(r: number): never {
  refuse(
    'formula',
    `V(r) has no finite value at r = ${shown(r)}: it must be a number for every r above zero.`,
  );
}

/** Where a constant c with V → c/r exists, that constant, to all digits; 0 elsewhere. */
function coulombOf({ at }: Compiled): number {
  const radii = [1e-3, 1e-2, 0.1, 1].map((part) => part * LARGEST_RADIUS);
  const products = radii.map((r) => r * at(r));
  const last = products.at(-1) ?? NaN;
  const settled = products.every((one) => Math.abs(one - last) <= 1e-14 * Math.abs(last));
  return settled && Number.isFinite(last) ? last : 0;
}

/** r² |r V - c|, what of V counts at r; noise is nothing. */
function weightOf({ knownAt }: Compiled, coulomb: number): (r: number) => number {
  return (r) => {
    const { value, error } = knownAt(r);
    const rest = r * value - coulomb;
    const noise = coulomb === 0 ? 0 : r * error + 4 * UNIT_ROUNDOFF * Math.abs(coulomb);
    return Math.abs(rest) <= noise ? 0 : r * r * Math.abs(rest);
  };
}

/**
 * First radius from which on nothing counts any more, and the share that counted last; null where V goes on to the end of
 * the mesh. Far beyond its end a formula may lose itself in infinities, as 0 times cosh does.
 */
function endOf(
  mesh: readonly number[],
  weights: readonly number[],
  peak: number,
): { end: number; last: number } | null {
  const largest = weights[peak] ?? 0;
  let end = peak;
  for (let i = peak; i < mesh.length; i++) {
    const weight = weights[i] ?? NaN;
    if (Number.isFinite(weight)) {
      if (weight > FADED * largest) end = i;
    } else if ((mesh[i] ?? 0) < LOST * (mesh[end] ?? 0)) refuseNotFinite(mesh[i] ?? NaN);
    else break;
  }
  const beyond = mesh[end + 1];
  return beyond === undefined ? null : { end: beyond, last: (weights[end] ?? 0) / largest };
}

function refuseSlowRest(): never {
  refuse(
    'formula',
    'V(r) falls off as 1/r at large distances, and what 1/r leaves of it does not die away fast enough to be computed. Give the tail as c/r itself, or screen it with exp(-r/a).',
  );
}

function refuseSlow(fall: number | null): never {
  if (fall !== null && fall < 0.01) {
    refuse(
      'formula',
      'V(r) does not vanish at large distances; it must, as by a factor exp(-r/a).',
    );
  }
  const how = fall === null ? 'too slowly' : `as r^-${Number(fall.toPrecision(3))}`;
  refuse(
    'formula',
    `V(r) falls off ${how} only: ∫ r² V dr does not exist or cannot be computed. It must fall faster than r^-${SLOWEST_FALL}, or be c/r plus something that does; multiply by exp(-r/a) or cut it off.`,
  );
}

/** A power of r is followed beyond the mesh, by factors of two. */
function powerEnd(compiled: Compiled, largest: number): { end: number; fall: number } {
  const fall = fallOf(compiled, LARGEST_RADIUS);
  if (fall !== null && Math.abs(fall - 1) < 1e-3) refuseSlowRest();
  if (fall === null || !(fall > SLOWEST_FALL)) refuseSlow(fall);
  for (let r = LARGEST_RADIUS; r < HORIZON; r *= 2) {
    if (r ** 3 * Math.abs(compiled.at(r)) < 1e-17 * largest) return { end: r, fall };
  }
  return refuseSlow(fall);
}

/** Steepness at the origin, at the smallest radii where V is more than its rounding. */
function riseOf(compiled: Compiled, mesh: readonly number[]): number {
  const isKnown = (r: number) => {
    const { value, error } = compiled.knownAt(r);
    return Math.abs(value) > 1e3 * error;
  };
  const known = mesh.filter((r) => isKnown(r / 2) && isKnown(2 * r)).slice(0, 4);
  const found = known.map((r) => fallOf(compiled, r)).filter((rise) => rise !== null);
  return Math.max(0, ...found);
}

/** ∫ w d ln r by trapezoids. */
function normOf(mesh: readonly number[], weights: readonly number[], end: number): number {
  let sum = 0;
  for (let i = 1; i < mesh.length; i++) {
    const [a, b] = [mesh[i - 1] ?? 0, mesh[i] ?? 0];
    if (b > end) break;
    sum += (Math.log(b / a) * ((weights[i - 1] ?? 0) + (weights[i] ?? 0))) / 2;
  }
  return sum;
}

/**
 * Looks at V(r) from 1e-15 to 1e15 angstrom: where it counts, how it rises and how it falls.
 *
 * @param mesh radii at which it is looked at, ascending
 * @throws DomainError invalidInput at /formula for values that are not finite, for what is steeper than 1/r² at the origin, and
 *   for what falls off neither faster than r^-3.5 nor as c/r
 */
export function profileOf(compiled: Compiled, mesh: readonly number[]): Profile {
  const coulomb = coulombOf(compiled);
  const weight = weightOf(compiled, coulomb);
  const weights = mesh.map(weight);
  const finite = weights.map((one) => (Number.isFinite(one) ? one : -1));
  const largest = Math.max(...finite);
  const peak = finite.indexOf(largest);
  if (largest < 0) refuseNotFinite(mesh[0] ?? NaN);
  const early = weights.findIndex((one, i) => i < peak && !Number.isFinite(one));
  if (early >= 0) refuseNotFinite(mesh[early] ?? NaN);
  if (largest === 0) return { coulomb, scale: 0, end: 0, fall: Infinity, rise: 0, norm: 0 };
  const scale = mesh[peak] ?? 1;
  const rise = riseOf(compiled, mesh.slice(0, INNERMOST));
  if (rise > STEEPEST_RISE) {
    refuse(
      'formula',
      `V(r) rises as r^-${Number(rise.toPrecision(3))} at the origin, steeper than 1/r²: first order does not exist. Level it off, as 1/(r^2 + d^2) does.`,
    );
  }
  const near = endOf(mesh, weights, peak);
  // What c/r leaves must have died away before it drowns in the rounding of c.
  if (coulomb !== 0 && !(near && near.last < DROWNED)) refuseSlowRest();
  const { end, fall } = near ? { end: near.end, fall: Infinity } : powerEnd(compiled, largest);
  return { coulomb, scale, end, fall, rise, norm: normOf(mesh, weights, end) };
}
