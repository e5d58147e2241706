import { DomainError } from '#shared/errors.ts';
import { K_95 } from './iso11929.ts';

/** How well the blank is known: counted as long as the sample, or from many counts. */
export type Blank = 'paired' | 'wellKnown';

/** Net counts. */
export interface CurrieLimits {
  critical: number;
  detection: number;
  /** Where the relative standard deviation has fallen to 10 %. */
  determination: number;
}

const TEN_PER_CENT = 100;

/**
 * Critical level, detection limit and determination limit in counts.
 *
 * Formula: with η = 2 (paired) or 1 (well-known blank): L_C = k sqrt(ηB), L_D = k² + 2k sqrt(ηB), L_Q = (100/2)[1 + sqrt(1 + 4ηB/100)].
 *
 * @param blank counts B expected of the blank in the time of the sample, >= 0
 * @param k quantile, default 1.645 for 5 % of either error; Currie rounds k² to 2.71 and 2k sqrt(2) to 4.65
 * @returns net counts
 * @throws DomainError('invalidInput') for a negative blank
 *
 * Validity: Gaussian counts, B above a few tens.
 *
 * Source: L. A. Currie, Anal. Chem. 40 (1968) 586.
 */
export function currieLimits(blank: number, variant: Blank, k: number = K_95): CurrieLimits {
  if (!(blank >= 0)) {
    throw new DomainError('invalidInput', 'The counts expected of a blank are not negative.');
  }
  const variance = (variant === 'paired' ? 2 : 1) * blank;
  const critical = k * Math.sqrt(variance);
  return {
    critical,
    detection: k * k + 2 * critical,
    determination: (TEN_PER_CENT / 2) * (1 + Math.sqrt(1 + (4 * variance) / TEN_PER_CENT)),
  };
}
