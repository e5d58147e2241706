import { bracketedRoot } from '#server/physics/numerics/root.ts';
import type { CountedRates } from './times.ts';
import { signalFor, timesForPrecision } from './times.ts';

const WIDEST = 1e12;

/**
 * What the signal is to be multiplied by (through current, areal density, solid angle or efficiency) to reach a precision within a time.
 *
 * Formula: without dead time s = 1/(p² T) + 2 sqrt(b)/(p sqrt(T)), s the signal; with it the root of t_s + t_b = T.
 *
 * @param rates before dead time; the background is left as it is, but for the part that grows with the factor
 * @param precision relative, above 0
 * @param time T, s, sample and blank together, above 0
 * @param growing part of the background that is multiplied too (what the beam itself brings, where the factor is one of current), 1/s
 * @returns factor, above 0; null where no factor suffices, because the counter records no more
 *
 * Validity: as `timesForPrecision`; the smallest factor where two would do (a paralysable counter).
 */
export function neededFor(
  rates: CountedRates,
  precision: number,
  time: number,
  growing = 0,
): number | null {
  const { signal, background, deadTime } = rates;
  if (!(signal > 0)) return null;
  const first = signalFor(background - growing, precision, time) / signal;
  if (deadTime.tau === 0 && growing === 0) return first;
  const excess = (logFactor: number) => {
    const factor = Math.exp(logFactor);
    const changed = {
      ...rates,
      signal: signal * factor,
      background: background + growing * (factor - 1),
    };
    const times = timesForPrecision(changed, precision);
    return times === null ? 1e300 : (times.signal + times.blank) / time - 1;
  };
  // Dead time and more background only add to what is needed: the factor lies above the one without them.
  const low = Math.log(first) - 1e-9;
  if (excess(low) <= 0) return first;
  for (let high = low + 0.05; high < Math.log(first * WIDEST); high += 0.05) {
    if (excess(high) <= 0) return Math.exp(bracketedRoot(excess, low, high, 1e-12).value);
    if (excess(high + 0.05) > excess(high)) return null;
  }
  return null;
}
