import type { DeadTime } from './dead-time.ts';
import { recordedMeanRate } from './dead-time.ts';

/** Rates before dead time, 1/s, and the counter they meet. */
export interface CountedRates {
  /** Signal, >= 0. */
  signal: number;
  /** What is counted without the scatterer, >= 0. */
  background: number;
  deadTime: DeadTime;
  dutyFactor: number;
}

/** Sample and blank, s. */
export interface Times {
  signal: number;
  blank: number;
}

/** Mean rates as they are recorded, 1/s. */
export function recordedOf({ signal, background, deadTime, dutyFactor }: CountedRates) {
  return {
    gross: recordedMeanRate(signal + background, dutyFactor, deadTime),
    blank: recordedMeanRate(background, dutyFactor, deadTime),
  };
}

/**
 * Time-independent part of the variance of a true rate that is counted with dead time: var = n²/(m t), for N recorded counts give the true
 * rate to 1/sqrt(N).
 */
const spreadOf = (rate: number, recorded: number): number =>
  rate === 0 ? 0 : (rate / recorded) * rate;

/**
 * Sample and blank time that reach a relative precision of the net signal.
 *
 * Formula: t_s : t_b = sqrt(gross) : sqrt(background) of the recorded rates, the least total for small dead times;
 * p² = [n_g²/(m_g t_s) + n_b²/(m_b t_b)]/(n_g - n_b)² with true rates n and recorded rates m. Without dead time
 * t_s + t_b = (sqrt(g) + sqrt(b))²/((g - b)² p²).
 *
 * @param rates before dead time
 * @param precision relative standard uncertainty p of the net signal, above 0
 * @returns s; null where there is no signal, none of it is recorded, or no double holds the time
 *
 * Validity: counting statistics only, N large enough for its square root.
 *
 * Source: textbook; J. W. Müller (1991) for the variance with dead time (a recorded count carries 1/sqrt(N) of the true rate in the
 * non-paralysable model; taken for both).
 */
export function timesForPrecision(rates: CountedRates, precision: number): Times | null {
  const { signal, background } = rates;
  const { gross, blank } = recordedOf(rates);
  if (!(signal > 0 && gross > 0)) return null;
  const share = Math.sqrt(blank / gross);
  const sample = spreadOf(signal + background, gross);
  const empty = share === 0 ? 0 : spreadOf(background, blank) / share;
  const time = (sample + empty) / (signal * precision) ** 2;
  return time < Infinity ? { signal: time, blank: share * time } : null;
}

/** Relative standard uncertainty of the net signal after these times. */
export function precisionAfter(rates: CountedRates, { signal: t, blank: tb }: Times): number {
  const { signal, background } = rates;
  const { gross, blank } = recordedOf(rates);
  const empty = background === 0 ? 0 : spreadOf(background, blank) / tb;
  return Math.sqrt(spreadOf(signal + background, gross) / t + empty) / signal;
}

/**
 * Signal rate that reaches a precision within a time, sample and blank together at the best split, without dead time.
 *
 * Formula: sqrt(s + b) - sqrt(b) = 1/(p sqrt(T)), so s = 1/(p² T) + 2 sqrt(b)/(p sqrt(T)).
 *
 * @param background 1/s, >= 0
 * @returns 1/s
 */
export function signalFor(background: number, precision: number, time: number): number {
  const root = 1 / (precision * Math.sqrt(time));
  return root * root + 2 * Math.sqrt(background) * root;
}

/** Cost of one position: seconds times squared precision, sample and blank together. */
export function costOf(rates: CountedRates): number | null {
  const times = timesForPrecision(rates, 1);
  return times && times.signal + times.blank;
}

/**
 * A given beam time shared among positions measured in turn, so that all reach one precision.
 *
 * Formula: T_i = T c_i/Σ c_j, p = sqrt(Σ c_j/T), with c the time for a precision of 1 at the best split of sample and blank.
 *
 * @returns times of each position and the common precision; null where one of them has no signal
 */
export function equalPrecision(
  positions: readonly CountedRates[],
  time: number,
): { precision: number; times: Times[] } | null {
  const unit = positions.map((rates) => timesForPrecision(rates, 1));
  const known = unit.filter((times) => times !== null);
  if (known.length < unit.length) return null;
  const whole = known.reduce((sum, { signal, blank }) => sum + signal + blank, 0);
  const precision = Math.sqrt(whole / time);
  const times = known.map(({ signal, blank }) => ({
    signal: (signal * time) / whole,
    blank: (blank * time) / whole,
  }));
  return { precision, times };
}

/**
 * A given beam time shared among positions whose weighted sum is wanted as well as it can be: shares as |w_i| sqrt(c_i) of the absolute variance.
 *
 * Formula: minimise Σ w_i² v_i/t_i with Σ t_i = T: t_i = T |w_i| sqrt(v_i)/Σ |w_j| sqrt(v_j).
 *
 * @param weights of each position in the sum
 * @param variances of each position times its time, in the square of its unit times s
 * @returns s for each position, and the variance reached
 *
 * Source: Lagrange's multiplier; known as Neyman's allocation.
 */
export function bestShares(
  weights: readonly number[],
  variances: readonly number[],
  time: number,
): { times: number[]; variance: number } {
  const sizes = weights.map((weight, i) => Math.abs(weight) * Math.sqrt(variances[i] ?? 0));
  const sum = sizes.reduce((total, size) => total + size, 0);
  return { times: sizes.map((size) => (time * size) / sum), variance: (sum * sum) / time };
}
