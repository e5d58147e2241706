import { DEFAULT_ANGLES } from '#shared/contracts/estimates.ts';
import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import type { Faults } from './faults.ts';

/** Angles as they were asked for, in their unit. */
export interface AskedAngles {
  unit: string;
  values: number[];
}

const ROUNDING = 1e-12;

export function askedAngles({ angles = DEFAULT_ANGLES }: EstimateRequest): AskedAngles {
  const { unit } = angles;
  if ('values' in angles) return { unit, values: angles.values };
  const { from, to, count } = angles;
  const values = Array.from({ length: count }, (_, i) =>
    i === count - 1 ? to : from + ((to - from) * i) / (count - 1),
  );
  return { unit, values };
}

/** Radians, 0 to pi; a straight angle written in mrad may miss pi by its last digit. */
export function toRadians(value: number, unit: string): number | null {
  const radians = value * (UNITS.angle[unit] ?? NaN);
  if (!(radians >= 0 && radians <= Math.PI * (1 + ROUNDING))) return null;
  return Math.min(Math.abs(radians), Math.PI);
}

export function toAngles(request: EstimateRequest, faults: Faults): number[] {
  const { unit, values } = askedAngles(request);
  const inRange = values.map((value) => toRadians(value, unit));
  const wrong = inRange.findIndex((angle) => angle === null);
  if (wrong >= 0) {
    const list = request.angles !== undefined && 'values' in request.angles;
    const path = list ? `/angles/values/${wrong}` : wrong === 0 ? '/angles/from' : '/angles/to';
    faults.add(
      path,
      `Scattering angles lie between 0 and 180 degrees; this is ${values[wrong]} ${unit}.`,
    );
  }
  return inRange.filter((angle) => angle !== null);
}
