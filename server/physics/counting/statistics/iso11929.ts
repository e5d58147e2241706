import { DomainError } from '#shared/errors.ts';

/** Quantile of the standard normal distribution for 5 % on one side, printed as 1.645. */
export const K_95 = 1.6448536269514722;

/** A count of the sample against a blank; times in s. */
export interface Measurement {
  /** Background counts a second, >= 0. */
  background: number;
  grossTime: number;
  blankTime: number;
  /** From a net rate to the measurand, y = w (gross - background); above 0. */
  factor: number;
  /** Relative standard uncertainty of the factor, >= 0. */
  factorUncertainty: number;
}

export interface CharacteristicLimits {
  decisionThreshold: number;
  /** Null where k u_rel(w) >= 1: whatever is there, it cannot be told from nothing. */
  detectionLimit: number | null;
}

function check({ background, grossTime, blankTime, factor, factorUncertainty }: Measurement): void {
  const isGood =
    background >= 0 &&
    grossTime > 0 &&
    (blankTime > 0 || background === 0) &&
    factor > 0 &&
    factorUncertainty >= 0;
  if (isGood) return;
  throw new DomainError(
    'invalidInput',
    'Characteristic limits need counting times and a factor above zero, and a background and an uncertainty that are not negative.',
  );
}

/**
 * Decision threshold and detection limit of a net rate times a factor.
 *
 * Formula: y* = k w sqrt(n0/t_g + n0/t_0); y# = (2y* + k² w/t_g)/(1 - k² u_rel²(w)), the closed solution of y# = y* + k u(y#) with
 * u²(y) = w²[(y/w + n0)/t_g + n0/t_0] + y² u_rel²(w).
 *
 * @param k quantile of both errors, default 1.645 (5 %)
 * @returns in the unit of y; the limit null where it does not exist
 * @throws DomainError('invalidInput') outside the bounds named at the fields
 *
 * Validity: counts that follow Poisson's law and are not few; equal quantiles for both errors.
 *
 * Source: ISO 11929-1:2019.
 */
export function characteristicLimits(
  measurement: Measurement,
  k: number = K_95,
): CharacteristicLimits {
  check(measurement);
  const { background, grossTime, blankTime, factor, factorUncertainty } = measurement;
  const blank = background === 0 ? 0 : background / blankTime;
  const decisionThreshold = k * factor * Math.sqrt(background / grossTime + blank);
  const denominator = 1 - (k * factorUncertainty) ** 2;
  const numerator = 2 * decisionThreshold + (k * k * factor) / grossTime;
  return { decisionThreshold, detectionLimit: denominator > 0 ? numerator / denominator : null };
}
