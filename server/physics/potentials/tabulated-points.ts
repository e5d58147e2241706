import { refuse } from './parameters.ts';
import type { Points } from './types.ts';

export const FEWEST_POINTS = 4;
export const MOST_POINTS = 2000;
const LONGEST = 1e12;
const STRONGEST = 1e15;
/** An interval this many times wider than both its neighbours is a hole in the table. */
const GAP = 50;

function refuseRow(i: number, message: string): never {
  refuse(`points/${i}`, `row ${i + 1}: ${message}`);
}

function checkRow(points: Points, i: number): void {
  const [r, V] = points[i] ?? [NaN, NaN];
  if (!Number.isFinite(r) || !Number.isFinite(V)) refuseRow(i, 'r and V must both be numbers');
  if (!(r >= 0 && r <= LONGEST)) refuseRow(i, `r must lie between 0 and ${LONGEST} angstrom`);
  if (!(Math.abs(V) <= STRONGEST)) refuseRow(i, `V must lie within ${STRONGEST} eV`);
  const before = points[i - 1]?.[0];
  if (before !== undefined && !(r > before)) {
    refuseRow(i, `r must rise from row to row; ${r} angstrom comes after ${before}`);
  }
}

function checkGaps(r: readonly number[]): void {
  const widths = r.slice(1).map((right, i) => right - (r[i] ?? NaN));
  widths.forEach((width, i) => {
    const [before, after] = [widths[i - 1], widths[i + 1]];
    if (before === undefined || after === undefined) return;
    if (width > GAP * Math.max(before, after)) {
      refuseRow(
        i + 1,
        `there is a gap before it, from r = ${r[i]} to ${r[i + 1]} angstrom, ${GAP} times wider than the steps beside it; give points between`,
      );
    }
  });
}

/**
 * Columns of a table of V(r).
 *
 * @param points (r, V) in angstrom and eV
 * @throws DomainError invalidInput, with the row as pointer, for a table that is too short or too long, out of order, with a
 *   value that is no number or with a gap
 */
export function readPoints(points: Points): { r: number[]; V: number[] } {
  const count = points.length;
  if (!(count >= FEWEST_POINTS)) {
    refuse('points', `a table of ${count} rows is too short: give at least ${FEWEST_POINTS}`);
  }
  if (!(count <= MOST_POINTS)) {
    refuse(
      'points',
      `a table of ${count} rows is too long: at most ${MOST_POINTS}; a spline through every tenth row is as good where V is smooth`,
    );
  }
  for (let i = 0; i < count; i++) checkRow(points, i);
  const r = points.map(([x]) => x);
  checkGaps(r);
  return { r, V: points.map(([, y]) => y) };
}
