import { UNITS } from '#shared/units/vocabulary.ts';
import { readPlainNumber } from '../../model/typing.ts';
import type { Curve, Abscissa } from '../../model/curves.ts';
import { abscissaOf } from '../../model/curves.ts';
import type { Angles } from '../../model/table.ts';
import { angleValues } from '../../model/table.ts';
import type { AngleRange } from '../aids-context.ts';

/** A straight angle in a unit. */
export const straight = (unit: string): number =>
  Number((Math.PI / (UNITS.angle[unit] ?? 1)).toPrecision(15));

/** The range to begin with: the second and third sixth of the angles of the case. */
function firstRange(angles: Angles): AngleRange {
  const { unit } = angles;
  const values = angleValues(angles);
  const from = values.reduce((least, angle) => Math.min(least, angle), Infinity);
  const span = values.reduce((most, angle) => Math.max(most, angle), 0) - from;
  const tidy = (angle: number) => Number(angle.toPrecision(3));
  if (!(span > 0)) return { unit, from: 0, to: from > 0 ? from : straight(unit) };
  return { unit, from: tidy(from + span / 6), to: tidy(from + span / 2) };
}

/** The range that was chosen, as long as the angles of the case keep the unit it was chosen in. */
export function rangeOver(angles: Angles, chosen: AngleRange | null): AngleRange {
  return chosen?.unit === angles.unit ? chosen : firstRange(angles);
}

/** An end as it is typed: an angle between nothing and a straight one, or why not. */
export function readEnd(
  text: string,
  what: string,
  unit: string,
): { value: number } | { problem: string } {
  const rules = { what, minimum: 0, maximum: straight(unit) };
  const reading = readPlainNumber(text.replace(/\s*°$/, ''), rules);
  return 'waiting' in reading ? { problem: `${what}: type a number.` } : reading;
}

/** The plotted angle next to an abscissa. */
function angleNext(curve: Curve, abscissa: Abscissa, x: number): number | null {
  let best: { distance: number; theta: number } | null = null;
  for (const point of curve.points) {
    const at = abscissaOf(point, abscissa);
    if (at === null) continue;
    const distance = Math.abs(at - x);
    if (best === null || distance < best.distance) best = { distance, theta: point.theta };
  }
  return best?.theta ?? null;
}

/** What was dragged over, snapped to plotted angles; null where it covers none of them. */
export function draggedRange(
  curve: Curve | undefined,
  abscissa: Abscissa,
  ends: readonly [number, number],
  unit: string,
): AngleRange | null {
  if (!curve) return null;
  const [a, b] = ends.map((x) => angleNext(curve, abscissa, x));
  if (a === null || a === undefined || b === null || b === undefined || a === b) return null;
  return { unit, from: Math.min(a, b), to: Math.max(a, b) };
}

/** Where the range lies on the abscissa shown. Between plotted angles q and cosine are those of the nearest one. */
export function bandOf(
  curve: Curve | undefined,
  abscissa: Abscissa,
  { from, to }: Pick<AngleRange, 'from' | 'to'>,
): [number, number] | null {
  if (abscissa === 'theta') return [from, to];
  const at = (theta: number): number | null => {
    const near = curve?.points.reduce<Curve['points'][number] | undefined>(
      (best, point) =>
        !best || Math.abs(point.theta - theta) < Math.abs(best.theta - theta) ? point : best,
      undefined,
    );
    return near ? abscissaOf(near, abscissa) : null;
  };
  const [a, b] = [at(from), at(to)];
  return a === null || b === null ? null : [Math.min(a, b), Math.max(a, b)];
}
