import { DomainError } from '#shared/errors.ts';
import type { Shape } from './aperture.ts';

/** The directions a detector sees from the target: a circular cone around its central ray, or another shape with the same solid angle. */
export interface Cone {
  /** Between beam and central ray, rad, 0 to pi. */
  theta: number;
  /** rad, above 0, at most pi (the whole sphere); of another shape that of a circle with its solid angle. */
  halfAngle: number;
  /** Absent for a circular cone. */
  shape?: Shape;
}

/**
 * Solid angle of a circular cone.
 *
 * Formula: Ω = 2π(1 - cos α) = 4π sin²(α/2).
 *
 * @param halfAngle α, rad, 0 to pi
 * @returns sr, to a few roundings at any α
 *
 * Source: definition.
 */
export function solidAngleOfCone(halfAngle: number): number {
  return 4 * Math.PI * Math.sin(halfAngle / 2) ** 2;
}

/**
 * Half of the opening of the circular cone of a solid angle, α = 2 asin sqrt(Ω/4π).
 *
 * @param solidAngle sr, above 0, at most 4π
 * @returns rad, 0 to pi
 * @throws DomainError('invalidInput') for a solid angle outside these bounds
 */
export function halfAngleOfCone(solidAngle: number): number {
  if (!(solidAngle > 0 && solidAngle <= 4 * Math.PI)) {
    throw new DomainError(
      'invalidInput',
      `A solid angle lies above 0 and at most at 4π sr (12.566), the whole sphere; this is ${solidAngle} sr.`,
    );
  }
  return 2 * Math.asin(Math.sqrt(solidAngle / (4 * Math.PI)));
}

/**
 * Half of the opening of a disc that faces the target, α = atan(r/d). Its solid angle is 2π(1 - d/sqrt(d² + r²)).
 *
 * @param radius of the disc, above 0
 * @param distance from the target, above 0, in the same length
 * @returns rad, 0 to pi/2
 */
export function halfAngleOfDisc(radius: number, distance: number): number {
  return Math.atan2(radius, distance);
}

/**
 * Half of the azimuth, counted from the detector, over which a ring of directions lies inside the cone.
 *
 * Formula: sin²(ψ/2) = sin((α + Θ - θ)/2) sin((α - Θ + θ)/2)/(sin Θ sin θ), which loses no digits on narrow cones.
 *
 * @param theta of the ring, rad, 0 to pi
 * @returns rad: 0 outside the cone, pi where the whole ring is inside
 *
 * Source: spherical trigonometry, half-angle form of the law of cosines.
 */
export function halfAzimuth(theta: number, cone: Cone): number {
  const { theta: centre, halfAngle } = cone;
  const product =
    Math.sin((halfAngle + centre - theta) / 2) * Math.sin((halfAngle - centre + theta) / 2);
  if (!(product > 0)) return 0;
  const square = product / (Math.sin(centre) * Math.sin(theta));
  return square >= 1 ? Math.PI : 2 * Math.asin(Math.sqrt(square));
}

/** Polar angles of a cone: rings that lie in it whole, and those it cuts. */
export interface Rings {
  whole: [number, number][];
  cut: [number, number] | null;
}

/** Where the rings of a cone are whole (around the beam, or straight back) and where the cone cuts them; rad. */
export function ringsOf({ theta, halfAngle }: Cone): Rings {
  const whole: [number, number][] = [];
  const ahead = halfAngle > theta;
  const behind = theta + halfAngle > Math.PI;
  const low = ahead ? halfAngle - theta : theta - halfAngle;
  const high = behind ? 2 * Math.PI - theta - halfAngle : theta + halfAngle;
  if (ahead) whole.push([0, Math.min(low, Math.PI)]);
  if (behind) whole.push([Math.max(high, 0), Math.PI]);
  if (theta === 0) return { whole: [[0, halfAngle]], cut: null };
  if (theta === Math.PI) return { whole: [[Math.PI - halfAngle, Math.PI]], cut: null };
  if (halfAngle >= Math.PI) return { whole: [[0, Math.PI]], cut: null };
  return { whole, cut: high > low ? [low, high] : null };
}
