export type DeadTimeModel = 'nonParalysable' | 'paralysable';

export interface DeadTime {
  /** s, at least 0. */
  tau: number;
  model: DeadTimeModel;
}

/**
 * Rate that a counter with dead time records.
 *
 * Formula: m = n/(1 + nτ) (non-paralysable), m = n exp(-nτ) (paralysable).
 *
 * @param rate true rate n of events, 1/s, >= 0, evenly spread over the time
 * @returns 1/s, exact within the model
 *
 * Validity: events independent of one another, a continuous beam; where the beam is pulsed faster than τ at most one event a pulse is seen.
 *
 * Source: J. W. Müller, Nucl. Instrum. Methods A 301 (1991) 543.
 */
export function recordedRate(rate: number, { tau, model }: DeadTime): number {
  if (!(rate >= 0)) throw new RangeError(`a rate of ${rate} per second`);
  return model === 'nonParalysable' ? rate / (1 + rate * tau) : rate * Math.exp(-rate * tau);
}

/**
 * Recorded rate of a beam that is on for a share of the time: the dead time acts at the rate while it is on.
 *
 * Formula: D m(n/D) with D the duty factor.
 */
export function recordedMeanRate(meanRate: number, dutyFactor: number, deadTime: DeadTime): number {
  return dutyFactor * recordedRate(meanRate / dutyFactor, deadTime);
}

/** Largest rate that can be recorded, 1/s: 1/τ (approached) or 1/(eτ) (at n = 1/τ). */
export function largestRecordedRate({ tau, model }: DeadTime): number {
  return model === 'nonParalysable' ? 1 / tau : 1 / (Math.E * tau);
}

/** True rates behind a recorded one: one without paralysis, two with it. `high` is null where there is only one. */
export interface TrueRates {
  low: number;
  high: number | null;
}

/** W e^W = x on the branch asked, by Halley's steps from the branch point or the logarithm. */
function lambert(x: number, branch: 0 | -1): number {
  // Near -1/e both branches leave -1 as ± sqrt(2(1 + e x)).
  const p = Math.sqrt(Math.max(0, 2 * (1 + Math.E * x)));
  let w = branch === 0 ? -1 + p - (p * p) / 3 : -1 - p - (p * p) / 3;
  if (branch === -1 && x > -0.2) w = Math.log(-x) - Math.log(-Math.log(-x));
  if (branch === 0 && x > -0.2) w = x * (1 - x);
  for (let i = 0; i < 60; i++) {
    const e = Math.exp(w);
    const f = w * e - x;
    if (f === 0 || w === -1) return w;
    const step = f / (e * (w + 1) - ((w + 2) * f) / (2 * w + 2));
    w -= step;
    if (Math.abs(step) <= 1e-16 * Math.abs(w)) return w;
  }
  return w;
}

/**
 * True rates that a recorded rate may come from.
 *
 * Formula: n = m/(1 - mτ) (non-paralysable); n = -W(-mτ)/τ, both real branches (paralysable).
 *
 * @param recorded m, 1/s, >= 0
 * @returns low and high; null where no true rate gives it: m >= 1/τ, or m > 1/(eτ)
 *
 * Source: inversion of the models; Lambert's W, DLMF 4.13.
 */
export function trueRates(recorded: number, deadTime: DeadTime): TrueRates | null {
  const { tau, model } = deadTime;
  if (!(recorded >= 0)) throw new RangeError(`a rate of ${recorded} per second`);
  if (tau === 0 || recorded === 0) return { low: recorded, high: null };
  const product = recorded * tau;
  if (model === 'nonParalysable') {
    return product < 1 ? { low: recorded / (1 - product), high: null } : null;
  }
  if (product * Math.E > 1) return null;
  return { low: -lambert(-product, 0) / tau, high: -lambert(-product, -1) / tau };
}
