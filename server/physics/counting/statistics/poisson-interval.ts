import { inverseGamma } from '#server/physics/numerics/incomplete-gamma.ts';
import { DomainError } from '#shared/errors.ts';

export interface Interval {
  low: number;
  high: number;
}

function check(counts: number, confidence: number): void {
  if (!(Number.isInteger(counts) && counts >= 0 && counts <= 1e7)) {
    throw new DomainError('invalidInput', 'Counts are a whole number from 0 to ten million.');
  }
  if (!(confidence > 0 && confidence < 1)) {
    throw new DomainError('invalidInput', 'A confidence level lies between 0 and 1, as in 0.9.');
  }
}

/**
 * Central confidence interval of the mean of a Poisson distribution.
 *
 * Formula: low = ½ χ²(α/2; 2n), high = ½ χ²(1 - α/2; 2n + 2), α = 1 - confidence.
 *
 * @param counts n, a whole number from 0
 * @param confidence as in 0.6827
 * @returns counts, to 1e-12 of themselves; low is 0 for n = 0
 * @throws DomainError('invalidInput') outside these bounds
 *
 * Validity: no background; covers at least as often as it says, because counts are whole.
 *
 * Source: F. Garwood, Biometrika 28 (1936) 437.
 */
export function garwoodInterval(counts: number, confidence: number): Interval {
  check(counts, confidence);
  const tail = (1 - confidence) / 2;
  return {
    low: counts === 0 ? 0 : inverseGamma(counts, tail).value,
    high: inverseGamma(counts + 1, 1 - tail).value,
  };
}

/** Upper limit of the mean of a Poisson distribution, one-sided: ½ χ²(confidence; 2n + 2). Bounds and source as above. */
export function poissonUpperLimit(counts: number, confidence: number): number {
  check(counts, confidence);
  return inverseGamma(counts + 1, confidence).value;
}
