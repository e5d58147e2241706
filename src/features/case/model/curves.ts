import type { DifferentialPoint, Estimate, Method } from '#shared/contracts/estimates.ts';
import { METHODS } from '#shared/contracts/estimates.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import { METHOD_NAMES } from './words.ts';

export const ABSCISSAS = ['theta', 'q', 'cos'] as const;
export type Abscissa = (typeof ABSCISSAS)[number];

export interface CurvePoint {
  /** As answered, in the unit of the angles and in the frame of the table. */
  theta: number;
  q: number | null;
  cos: number;
  dcs: number | null;
  reason?: string;
  relativeError?: number;
  absoluteError?: number;
  /** Centre-of-mass angle of a branch. */
  thetaCm?: number;
}

export interface Curve {
  key: string;
  name: string;
  points: CurvePoint[];
}

interface Scale {
  toRadians: number;
  /** From the unit of the answer to the one shown. */
  area: number;
}

function cosine(theta: number, { toRadians }: Scale): number {
  const value = Math.cos(theta * toRadians);
  // cos 90° is 6e-17 in floating point; on a table of cosines it is zero.
  return Math.abs(value) < 1e-15 ? 0 : value;
}

function errorsOf(
  source: { relativeError?: number | undefined; absoluteError?: number | undefined },
  scale: Scale,
) {
  const { relativeError, absoluteError } = source;
  return {
    ...(relativeError === undefined ? {} : { relativeError }),
    ...(absoluteError === undefined ? {} : { absoluteError: absoluteError * scale.area }),
  };
}

function pointOf(source: DifferentialPoint, scale: Scale): CurvePoint {
  return {
    theta: source.theta,
    q: source.q ?? null,
    cos: cosine(source.theta, scale),
    dcs: source.dcs === null ? null : source.dcs * scale.area,
    ...(source.reason === undefined ? {} : { reason: source.reason }),
    ...errorsOf(source, scale),
  };
}

function branchPoints(points: readonly DifferentialPoint[], rank: number, scale: Scale) {
  return points.map((source): CurvePoint => {
    const ordered = [...(source.branches ?? [])].sort((a, b) => a.thetaCm - b.thetaCm);
    const branch = ordered[rank];
    return {
      theta: source.theta,
      q: branch?.q ?? null,
      cos: cosine(source.theta, scale),
      dcs: branch && branch.dcs !== null ? branch.dcs * scale.area : null,
      ...(source.reason === undefined ? {} : { reason: source.reason }),
      ...(branch ? { thetaCm: branch.thetaCm, ...errorsOf(branch, scale) } : {}),
    };
  });
}

function curvesOfMethod(
  method: Method,
  points: readonly DifferentialPoint[],
  scale: Scale,
): Curve[] {
  const name = METHOD_NAMES[method];
  const sum = { key: method, name, points: points.map((point) => pointOf(point, scale)) };
  if (!points.some((point) => (point.branches?.length ?? 0) > 0)) return [sum];
  return [
    { ...sum, name: `${name}, both branches` },
    {
      key: `${method}-low`,
      name: `${name}, smaller θ cm`,
      points: branchPoints(points, 0, scale),
    },
    {
      key: `${method}-high`,
      name: `${name}, larger θ cm`,
      points: branchPoints(points, 1, scale),
    },
  ];
}

/** The curves of an estimate, dσ/dΩ in `areaUnit` per steradian. */
export function curvesOf(estimate: Estimate, areaUnit: string): Curve[] {
  const scale = {
    toRadians: UNITS.angle[estimate.units.angle] ?? Math.PI / 180,
    area: composedFactor(estimate.units.area, areaUnit),
  };
  return METHODS.flatMap((method) => {
    const result = estimate.methods[method];
    if (!result || 'unavailable' in result) return [];
    return curvesOfMethod(method, result.differential, scale);
  });
}

export function abscissaOf(point: CurvePoint, abscissa: Abscissa): number | null {
  if (abscissa === 'theta') return point.theta;
  return abscissa === 'q' ? point.q : point.cos;
}
