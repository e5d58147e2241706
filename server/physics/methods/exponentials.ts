import { screensOf } from '#server/physics/potentials/screening-sum.ts';
import type { Term } from '#server/physics/potentials/types.ts';

/** One part of a shape: weight · exp(-mu r)/r, mu in 1/angstrom. */
export interface Exponential {
  weight: number;
  mu: number;
}

const SCREENED = ['moliere', 'krc', 'universalIon'] as const;

/**
 * A shape as a sum of Yukawa shapes, s(r) = Σ weight exp(-mu r)/r.
 *
 * @returns null for forms that are none
 */
export function exponentialsOf(term: Term): Exponential[] | null {
  const { form, range } = term;
  if (form === 'yukawa' && range !== null) return [{ weight: range, mu: 1 / range }];
  if (form === 'screenedCoulomb' && range !== null) return [{ weight: 1, mu: 1 / range }];
  const key = SCREENED.find((name) => name === form);
  if (key === undefined || term.firstMoment === null) return null;
  const screens = screensOf(key);
  // ∫ r s dr = a Σ weight/rate gives the screening length back.
  const a = term.firstMoment / screens.reduce((sum, { weight, rate }) => sum + weight / rate, 0);
  return screens.map(({ weight, rate }) => ({ weight, mu: rate / a }));
}
