import type { Estimate, Integral, Method, Validity } from '#shared/contracts/estimates.ts';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { formatComposed, formatNumber } from '#shared/units/format.ts';

export const METHOD_NAMES: Record<Method, string> = {
  born1: 'first Born',
  born2: 'second Born',
  eikonal: 'eikonal',
  partialWaves: 'exact (phase shifts)',
};
export const VERDICT_WORDS: Record<Validity['verdict'], string> = {
  sound: 'sound',
  usable: 'usable',
  notValid: 'not valid',
  unassessed: 'not assessed',
};
export const PLAN_VERDICTS: Record<RunPlan['verdict'], string> = {
  feasible: 'feasible',
  tight: 'tight',
  notFeasible: 'not feasible',
  singleScatteringNotValid: 'single scattering not valid',
};
export const CRITERION_NAMES: Record<Validity['criteria'][number]['name'], string> = {
  unitarity: 'unitarity',
  secondOrder: 'second-order size',
  slow: 'slow criterion',
  fast: 'fast criterion',
  eta: 'Sommerfeld parameter',
};

type Unavailable = { unavailable: true; reason: string };

export const number = (value: number): string => formatNumber(value, 6);
export const short = (value: number): string => formatNumber(value, 3);
export const percent = (share: number): string => `${formatNumber(100 * share, 3)} %`;
/** A ratio has no unit to show. */
export const amount = ({ value, unit }: Quantity, digits = 6): string =>
  unit === '1' ? formatNumber(value, digits) : formatComposed(value, unit, digits);
/** One digit, as in 2e−14: an error needs no more. */
export const brief = (value: number): string =>
  value === 0 ? '0' : value.toExponential(0).replace('e-', 'e−').replace('e+', 'e');

/** A quantity, or why there is none. */
export function amountOr(value: Quantity | Unavailable): string {
  return 'unavailable' in value ? `none: ${value.reason}` : amount(value);
}

/** Seconds as a shift would say them. */
export function duration({ value }: Quantity): string {
  if (value < 120) return `${short(value)} s`;
  return value < 7200 ? `${short(value / 60)} min` : `${short(value / 3600)} h`;
}

export function durationOr(value: Quantity | Unavailable): string {
  return 'unavailable' in value ? `none: ${value.reason}` : duration(value);
}

/** What limits a number, beside it. */
export function numericsOf(error: {
  relativeError?: number | undefined;
  absoluteError?: number | undefined;
}): string {
  if (error.relativeError !== undefined) return `${brief(error.relativeError)} relative`;
  return error.absoluteError === undefined ? '—' : `±${brief(error.absoluteError)} absolute`;
}

export function integralText(integral: Integral): string {
  return 'divergent' in integral ? 'divergent' : amount(integral);
}

/** On a fixed centre lab and centre of mass are one frame. */
export function frameOf(estimate: Estimate, isFixed: boolean): string {
  if (isFixed) return 'fixed centre (lab and centre of mass are one)';
  return estimate.frame === 'cm' ? 'centre of mass' : 'lab';
}

/** `2026-12-01 19:30 UTC` */
export const utcText = (iso: string): string => `${iso.slice(0, 10)} ${iso.slice(11, 16)} UTC`;
