import type { ComputedMethod, Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';

/** A limiting form of a case: two numbers the engine computes for changed inputs, which then have to agree. */
export interface Limit {
  key: string;
  /** What is taken to its limit, and how far. */
  limit: string;
  /** What must hold there. */
  holds: string;
  expected: Side;
  obtained: Side;
  /** Largest relative deviation the finite distance from the limit allows, by the next term of its expansion. */
  within: number;
}

/** One number of one answer, times a factor. */
export interface Side {
  body: EstimateRequest;
  /** `lossTo`: what dσ/dΩ at one place lacks of that at place 0, as a fraction of it. */
  read: 'elastic' | { place: number } | { lossTo: number };
  factor: number;
  /** The factor is a solid angle: what comes of dσ/dΩ is an area. */
  overSphere?: true;
}

/** A number with the numerical error the engine states for it, both in the unit of the answer. */
export interface Reading {
  value: number;
  error: number;
  unit: string;
}

export interface Shown {
  deviation: number;
  /** What the deviation may be: the distance from the limit and the numerical errors together. */
  allowed: number;
  verdict: 'holds' | 'departs';
}

const ROUNDING = 1e-13;

function errorOf(
  value: number,
  stated: { relativeError?: number | undefined; absoluteError?: number | undefined },
): number {
  return stated.absoluteError ?? Math.abs(value) * (stated.relativeError ?? 0);
}

/** The number a side asks for, or why the answer has none. */
export function readSide(answer: Estimate, { read, factor, overSphere }: Side): Reading | string {
  const born = answer.methods.born1;
  if (!born) return 'The answer holds no first Born result.';
  if ('unavailable' in born) return born.reason;
  if (read === 'elastic') {
    const { elastic } = born;
    if ('divergent' in elastic) return elastic.reason;
    const { value, unit } = elastic;
    return { value: factor * value, error: factor * errorOf(value, elastic), unit };
  }
  if ('place' in read) {
    const point = readPoint(born, read.place);
    if (typeof point === 'string') return point;
    const { value, error } = point;
    const unit = overSphere ? answer.units.area : `${answer.units.area}/sr`;
    return { value: factor * value, error: factor * error, unit };
  }
  const [whole, part] = [readPoint(born, 0), readPoint(born, read.lossTo)];
  if (typeof whole === 'string') return whole;
  if (typeof part === 'string') return part;
  const ratio = part.value / whole.value;
  const error = (part.error + ratio * whole.error) / whole.value + Number.EPSILON;
  return { value: factor * (1 - ratio), error: factor * error, unit: '1' };
}

function readPoint(born: ComputedMethod, place: number): { value: number; error: number } | string {
  const point = born.differential[place];
  if (!point || point.dcs === null) return point?.reason ?? 'There is no value at this angle.';
  return { value: point.dcs, error: errorOf(point.dcs, point) };
}

/**
 * Whether a limiting form comes out.
 *
 * Formula: |obtained/expected - 1| <= within + stated numerical errors + rounding.
 *
 * @returns null where the expected value is zero: there is then nothing to divide by
 */
export function judgeSides(expected: Reading, obtained: Reading, within: number): Shown | null {
  const size = Math.abs(expected.value);
  if (!(size > 0)) return null;
  const deviation = Math.abs(obtained.value - expected.value) / size;
  const allowed = within + (expected.error + obtained.error) / size + ROUNDING;
  return { deviation, allowed, verdict: deviation <= allowed ? 'holds' : 'departs' };
}
