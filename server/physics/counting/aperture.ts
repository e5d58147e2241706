import type { Cone } from './cone.ts';
import { halfAzimuth } from './cone.ts';

/** Stretches of azimuth, counted from the plane of beam and detector, within 0 and pi; the other side is the same. */
export type Azimuths = [number, number][];

/** A rectangle that faces the target: tangents of half of its width (in the plane of beam and detector) and of half of its height. */
export interface Rectangle {
  kind: 'rectangle';
  halfWidth: number;
  halfHeight: number;
}

/** A ring that faces the target: angles between its axis and its inner and outer edge, rad. */
export interface Annulus {
  kind: 'annulus';
  inner: number;
  outer: number;
}
export type Shape = Rectangle | Annulus;

/**
 * Solid angle of an aperture that faces the target.
 *
 * Formula: rectangle 4 atan(UV/sqrt(1 + U² + V²)), U and V the tangents of half of its sides; annulus 4π[sin²(β/2) - sin²(α/2)].
 *
 * Source: definition; spherical excess of a rectangle.
 */
export function solidAngleOfShape(shape: Shape): number {
  if (shape.kind === 'annulus') {
    const { inner, outer } = shape;
    return 4 * Math.PI * Math.sin((outer - inner) / 2) * Math.sin((outer + inner) / 2);
  }
  const { halfWidth: u, halfHeight: v } = shape;
  return 4 * Math.atan((u * v) / Math.sqrt(1 + u * u + v * v));
}

/** The ray that stands for the aperture where one angle is asked: its centre, or the middle of the ring further out. */
export function rayOf({ theta, shape }: Cone): number {
  if (shape?.kind !== 'annulus') return theta;
  return Math.min(Math.PI, theta + (shape.inner + shape.outer) / 2);
}

function both(a: Azimuths, [low, high]: [number, number]): Azimuths {
  return a.flatMap(([from, to]): Azimuths => {
    const start = Math.max(from, low);
    const end = Math.min(to, high);
    return end > start ? [[start, end]] : [];
  });
}

/** Azimuths whose cosine c obeys a c <= b. */
function cosineAtMost(a: number, b: number): [number, number] {
  if (a === 0) return b >= 0 ? [0, Math.PI] : [0, 0];
  const edge = Math.acos(Math.min(1, Math.max(-1, b / a)));
  return a > 0 ? [edge, Math.PI] : [0, edge];
}

/** Where a ring of directions lies between the sides, the top and the bottom of a rectangle. */
function inRectangle(
  theta: number,
  centre: number,
  { halfWidth: u, halfHeight: v }: Rectangle,
): Azimuths {
  const [sin, cos] = [Math.sin(theta), Math.cos(theta)];
  const [s, c] = [Math.sin(centre), Math.cos(centre)];
  const outer = cosineAtMost(sin * (c - u * s), cos * (s + u * c));
  const inner = cosineAtMost(-sin * (c + u * s), -cos * (s - u * c));
  const ahead = cosineAtMost(-sin * s, cos * c);
  const slope = Math.atan(v * s);
  const size = sin * Math.sqrt(1 + (v * s) ** 2);
  const limit = v * cos * c;
  let height: Azimuths = [[0, Math.PI]];
  if (limit < size) {
    const turn = Math.asin(Math.max(-1, limit / size));
    height = [
      [0, Math.max(0, slope + turn)],
      [Math.min(Math.PI, Math.PI + slope - turn), Math.PI],
    ];
  }
  return both(both(both(height, outer), inner), ahead);
}

/** Azimuths of a ring of directions that lie inside an aperture other than a circular one. */
export function azimuthsOf(theta: number, { theta: centre, shape }: Cone): Azimuths {
  if (!shape) throw new Error('a circular cone has one azimuth');
  if (shape.kind === 'rectangle') return inRectangle(theta, centre, shape);
  const edge = (halfAngle: number) => halfAzimuth(theta, { theta: centre, halfAngle });
  const [from, to] = [edge(shape.inner), edge(shape.outer)];
  return to > from ? [[from, to]] : [];
}

const folded = (theta: number) => Math.PI - Math.abs(Math.PI - Math.abs(theta));

function kinksOfRectangle(centre: number, { halfWidth: u, halfHeight: v }: Rectangle): number[] {
  const [s, c] = [Math.sin(centre), Math.cos(centre)];
  const polar = (x: number, y: number) => Math.atan2(Math.hypot(s + x * c, y), c - x * s);
  const middle = -(1 + v * v) * (s / c);
  return [
    ...[-u, u].flatMap((x) => [polar(x, 0), polar(x, v)]),
    ...(Math.abs(middle) <= u ? [polar(middle, v)] : []),
    ...(Math.abs(s) <= u * Math.abs(c) ? [c > 0 ? 0 : Math.PI] : []),
  ];
}

/** Polar angles where the azimuths of an aperture change their form, in ascending order; nothing of it lies outside them. */
export function kinksOf({ theta: centre, shape }: Cone): number[] {
  if (!shape) throw new Error('a circular cone has no kinks');
  const kinks =
    shape.kind === 'rectangle'
      ? kinksOfRectangle(centre, shape)
      : [shape.inner, shape.outer].flatMap((edge) => [
          folded(centre - edge),
          folded(centre + edge),
        ]);
  if (shape.kind === 'annulus') {
    if (centre > shape.inner && centre < shape.outer) kinks.push(0);
    if (Math.PI - centre > shape.inner && Math.PI - centre < shape.outer) kinks.push(Math.PI);
  }
  const sorted = kinks.sort((a, b) => a - b);
  return sorted.filter((kink, i) => i === 0 || kink > (sorted[i - 1] ?? 0));
}
