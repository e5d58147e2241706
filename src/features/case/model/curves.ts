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
  /** Place in the list of colours and dashes: a method looks the same wherever it is drawn. */
  style: number;
  points: CurvePoint[];
}

/** The exact curve comes second, as it is the one most often drawn beside first order. */
export const METHOD_STYLES: Record<Method, number> = {
  born1: 0,
  partialWaves: 1,
  born2: 2,
  eikonal: 3,
};
const BRANCH_STYLES = { low: 4, high: 5 } as const;

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
  apart: boolean,
): Curve[] {
  const name = METHOD_NAMES[method];
  const sum = {
    key: method,
    name,
    style: METHOD_STYLES[method],
    points: points.map((point) => pointOf(point, scale)),
  };
  if (!points.some((point) => (point.branches?.length ?? 0) > 0)) return [sum];
  const both = { ...sum, name: `${name}, both branches` };
  if (!apart) return [both];
  return [
    both,
    {
      key: `${method}-low`,
      name: `${name}, smaller θ cm`,
      style: BRANCH_STYLES.low,
      points: branchPoints(points, 0, scale),
    },
    {
      key: `${method}-high`,
      name: `${name}, larger θ cm`,
      style: BRANCH_STYLES.high,
      points: branchPoints(points, 1, scale),
    },
  ];
}

/**
 * The curves of an estimate, dσ/dΩ in `areaUnit` per steradian; two branches of the lab are told apart in the first method alone, and
 * with `sums` in none.
 */
export function curvesOf(estimate: Estimate, areaUnit: string, { sums = false } = {}): Curve[] {
  const scale = {
    toRadians: UNITS.angle[estimate.units.angle] ?? Math.PI / 180,
    area: composedFactor(estimate.units.area, areaUnit),
  };
  const computed = METHODS.flatMap((method) => {
    const result = estimate.methods[method];
    return !result || 'unavailable' in result ? [] : [{ method, points: result.differential }];
  });
  return computed.flatMap(({ method, points }, place) =>
    curvesOfMethod(method, points, scale, place === 0 && !sums),
  );
}

export function abscissaOf(point: CurvePoint, abscissa: Abscissa): number | null {
  if (abscissa === 'theta') return point.theta;
  return abscissa === 'q' ? point.q : point.cos;
}
