import { estimateRequestSchema } from '#shared/contracts/estimates.ts';
import type { DifferentialPoint, Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';

export const Q = (value: number, unit: string) => ({ value, unit });

/** The body of contract.md, word for word. */
export const CONTRACT_BODY = {
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 0 },
  energy: Q(100, 'eV'),
  kinematics: 'nonrelativistic',
  interaction: { terms: [{ form: 'yukawa', V0: Q(-10, 'eV'), a: Q(1, 'angstrom') }] },
  methods: ['born1'],
  angles: { unit: 'deg', values: [0, 30, 60, 90, 180] },
  frame: 'cm',
  goldenRule: { theta: 60, boxSide: Q(10, 'nm') },
  units: { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
};

export const NUCLEAR_UNITS = { length: 'fm', area: 'barn', energy: 'MeV' };

/** The whole way of a body, as a thread walks it. */
export function answer(body: object): Estimate {
  return computeEstimate(estimateRequestSchema.parse(body) satisfies EstimateRequest);
}

type Answered = Extract<NonNullable<Estimate['methods']['born1']>, { elastic: unknown }>;

export function born1(estimate: Estimate): Answered {
  const result = estimate.methods.born1;
  if (!result || 'unavailable' in result) throw new Error('born1 did not answer');
  return result;
}

/** Value and error bound of an integral. */
export function integral(entry: Answered['elastic']): { value: number; error: number } {
  if ('divergent' in entry) throw new Error(entry.reason);
  return { value: entry.value, error: errorOf(entry.value, entry) };
}

interface Errors {
  relativeError?: number | undefined;
  absoluteError?: number | undefined;
}

/** The absolute bound; exactly one of the two ways of saying it must be there. */
export function errorOf(value: number, { relativeError, absoluteError }: Errors): number {
  if ((relativeError === undefined) === (absoluteError === undefined)) {
    throw new Error('exactly one of relativeError and absoluteError is due');
  }
  return absoluteError ?? Math.abs(value) * (relativeError ?? NaN);
}

export function dcsAt(estimate: Estimate, theta: number): number {
  const point = born1(estimate).differential.find((entry) => entry.theta === theta);
  if (typeof point?.dcs !== 'number') throw new Error(`no cross section at ${theta}`);
  return point.dcs;
}

export function pointAt(estimate: Estimate, theta: number): DifferentialPoint {
  const point = born1(estimate).differential.find((entry) => entry.theta === theta);
  if (!point) throw new Error(`no point at ${theta}`);
  return point;
}
