import type { Compiled } from './evaluate.ts';
import { childrenOf, compile, partsOf } from './evaluate.ts';
import { refuse } from '../parameters.ts';
import type { Tree } from './tree.ts';
import type { Unit } from './unit.ts';

/** r is looked at from here to there, angstrom: 1e-25 m to 100 km. */
export const SMALLEST_RADIUS = 1e-15;
export const LARGEST_RADIUS = 1e15;
const PER_DECADE = 8;
/** A power tail is followed to here. */
export const HORIZON = 1e30;

export interface Parameter {
  value: number;
  unit: Unit;
}

function geometric(from: number, to: number, perDecade: number): number[] {
  const count = Math.round(Math.log10(to / from) * perDecade);
  return Array.from({ length: count + 1 }, (_, i) => from * 10 ** (i / perDecade));
}

export const ascending = (radii: readonly number[]): number[] => {
  const sorted = radii.filter((r) => r > 0 && r < Infinity).sort((a, b) => a - b);
  return sorted.filter((r, i) => r !== sorted[i - 1]);
};

/** Points that crowd on a radius from either side. */
const crowd = (centre: number): number[] =>
  Array.from({ length: 44 }, (_, k) => 2 ** -(k + 1)).flatMap((step) => [
    centre * (1 - step),
    centre * (1 + step),
  ]);

/** Lengths that the parameters bring with them. */
function lengthsOf(parameters: ReadonlyMap<string, Parameter>): number[] {
  return [...parameters.values()].flatMap(({ value, unit }) => {
    const { energy, length } = unit;
    if (energy !== 0 || length === 0 || value === 0) return [];
    return [Math.abs(value) ** (1 / length)];
  });
}

/** Where a function changes sign between two radii, to the last digit. */
function crossing(f: (r: number) => number, a: number, b: number): number {
  const sign = Math.sign(f(a));
  let [left, right] = [a, b];
  for (let step = 0; step < 200; step++) {
    const middle = left + (right - left) / 2;
    if (!(middle > left && middle < right)) break;
    if (Math.sign(f(middle)) === sign) left = middle;
    else right = middle;
  }
  return right;
}

function crossings(f: (r: number) => number, mesh: readonly number[]): number[] {
  const values = mesh.map(f);
  return mesh.flatMap((r, i) => {
    const [here, before] = [values[i] ?? NaN, values[i - 1] ?? NaN];
    if (here === 0) return [r];
    return before * here < 0 && Number.isFinite(before * here)
      ? [crossing(f, mesh[i - 1] ?? r, r)]
      : [];
  });
}

/** Differences whose sign decides which branch is taken, and all others. */
interface Differences {
  deciding: Tree[];
  other: Tree[];
}

const minus = (left: Tree, right: Tree): Tree => ({
  kind: 'binary',
  operator: '-',
  left,
  right,
  from: left.from,
  to: right.to,
});

function differencesOf(tree: Tree, found: Differences): Differences {
  if (tree.kind === 'compare') found.deciding.push(minus(tree.left, tree.right));
  if (tree.kind === 'call' && tree.name === 'abs') found.deciding.push(...tree.of);
  if (tree.kind === 'call' && ['min', 'max'].includes(tree.name)) {
    tree.of.forEach((one, i) =>
      tree.of.slice(i + 1).forEach((other) => found.deciding.push(minus(one, other))),
    );
  }
  if (tree.kind === 'binary' && tree.operator === '-') found.other.push(tree);
  childrenOf(tree).forEach((child) => differencesOf(child, found));
  return found;
}

export interface Radii {
  /** Everywhere V is looked at, ascending. */
  mesh: number[];
  /** Radii at which a branch is chosen: V or its slope may jump there. */
  branches: number[];
}

const MOST_CROSSINGS = 40;
const MOST_LENGTHS = 12;
/** Parts of the differences that are followed, and radii times parts at most. */
const LARGEST_DIFFERENCE = 60;
const MOST_DIFFERENCES = 50;
const MOST_WORK = 4e6;

/**
 * Radii that show all a formula does: powers of ten, the lengths of its parameters, and the places where differences in it
 * change sign, with points that crowd on each.
 */
export function radiiOf(tree: Tree, parameters: ReadonlyMap<string, Parameter>): Radii {
  const values = new Map([...parameters].map(([name, { value }]) => [name, value]));
  const lengths = lengthsOf(parameters).slice(0, MOST_LENGTHS);
  const base = ascending([
    ...geometric(SMALLEST_RADIUS, LARGEST_RADIUS, PER_DECADE),
    ...lengths.flatMap((length) => geometric(length * 1e-3, length * 1e3, 16)),
  ]);
  const { deciding, other } = differencesOf(tree, { deciding: [], other: [] });
  const work = deciding.reduce((sum, one) => sum + partsOf(one), 0) * base.length;
  if (!(work <= MOST_WORK)) {
    refuse('formula', 'The formula compares too many things; write it in fewer cases.');
  }
  const small = other.filter((one) => partsOf(one) <= LARGEST_DIFFERENCE);
  const places = (trees: readonly Tree[]) =>
    trees.flatMap((one) => crossings(compile(one, values).at, base)).slice(0, MOST_CROSSINGS);
  const branches = ascending(places(deciding));
  const all = ascending([...branches, ...places(small.slice(0, MOST_DIFFERENCES))]);
  return { mesh: ascending([...base, ...all, ...all.flatMap(crowd)]), branches };
}

/** -d ln|V|/d ln r at r; null where V vanishes or is not finite. */
export function fallOf({ at }: Pick<Compiled, 'at'>, r: number): number | null {
  const [inner, outer] = [at(r / 2), at(2 * r)];
  if (inner === 0 || outer === 0 || !Number.isFinite(inner) || !Number.isFinite(outer)) return null;
  return Math.log(Math.abs(inner / outer)) / Math.log(4);
}
