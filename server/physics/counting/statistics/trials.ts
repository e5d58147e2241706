import type { Generator } from './generator.ts';
import { generator } from './generator.ts';

/** Trials of one part of a Monte Carlo run, small enough to be kept and added up: moments and a fine histogram. */
export interface Trials {
  count: number;
  mean: number;
  /** Σ (y - mean)² */
  square: number;
  /** Ends of the histogram; what lies outside is counted in its first and last bin. */
  from: number;
  to: number;
  counts: number[];
}

const BINS = 2000;

/** The seed of one part of a run: parts of one run share no stretch of numbers that anyone could meet. */
export function seedOfPart(seed: number, part: number): number {
  let z = (Math.imul(part + 1, 0x9e3779b1) ^ seed) >>> 0;
  z = Math.imul(z ^ (z >>> 16), 0x45d9f3b);
  z = Math.imul(z ^ (z >>> 13), 0x45d9f3b);
  return (z ^ (z >>> 16)) >>> 0;
}

/**
 * Trials of a model, summed up as they come.
 *
 * @param draw one value of the model from random numbers
 * @param range where the histogram lies; ten standard deviations lose nothing that two digits show
 */
export function runTrials(
  draw: (random: Generator) => number,
  count: number,
  seed: number,
  range: { from: number; to: number },
): Trials {
  const random = generator(seed);
  const counts = Array.from({ length: BINS }, () => 0);
  const scale = BINS / (range.to - range.from);
  let mean = 0;
  let square = 0;
  for (let i = 1; i <= count; i++) {
    const value = draw(random);
    const off = value - mean;
    mean += off / i;
    square += off * (value - mean);
    const bin = Math.min(BINS - 1, Math.max(0, Math.floor((value - range.from) * scale)));
    counts[bin] = (counts[bin] ?? 0) + 1;
  }
  return { count, mean, square, ...range, counts };
}

/** Parts of one run together; they have one range. */
export function mergeTrials(parts: readonly Trials[]): Trials {
  const [first, ...others] = parts;
  if (!first) throw new RangeError('there is nothing to merge');
  return others.reduce((sum, part) => {
    if (part.from !== sum.from || part.to !== sum.to) {
      throw new RangeError('parts of one run have one range');
    }
    const count = sum.count + part.count;
    const off = part.mean - sum.mean;
    return {
      ...sum,
      count,
      mean: sum.mean + (off * part.count) / count,
      square: sum.square + part.square + (off * off * sum.count * part.count) / count,
      counts: sum.counts.map((n, i) => n + (part.counts[i] ?? 0)),
    };
  }, first);
}

export interface TrialsSummary {
  trials: number;
  mean: number;
  deviation: number;
  /** Standard error of the mean, from the trials alone. */
  meanError: number;
  /** Probabilistically symmetric; to a bin of the histogram. */
  interval: [number, number];
  /** Shortest. */
  shortest: [number, number];
  /** Width of a bin: what the ends of the intervals are known to. */
  resolution: number;
}

/** Value below which a number of trials lie, evenly spread inside its bin. */
function quantile({ counts, from, to }: Trials, below: number): number {
  const width = (to - from) / counts.length;
  let sum = 0;
  for (const [i, n] of counts.entries()) {
    if (sum + n >= below && n > 0) return from + width * (i + (below - sum) / n);
    sum += n;
  }
  return to;
}

/**
 * Mean, deviation and coverage intervals of a run.
 *
 * @param coverage probability, such as 0.95
 * @returns in the unit of the model; ends to the width of a bin
 *
 * Source: JCGM 101:2008, 7.6, 7.7.
 */
export function summaryOf(trials: Trials, coverage: number): TrialsSummary {
  const { count, mean, square } = trials;
  const deviation = Math.sqrt(square / Math.max(1, count - 1));
  const at = (share: number) => quantile(trials, share * count);
  const tail = 1 - coverage;
  let shortest: [number, number] = [at(tail / 2), at(1 - tail / 2)];
  const STEPS = 200;
  for (let i = 0; i <= STEPS; i++) {
    const low = at((tail * i) / STEPS);
    const high = at((tail * i) / STEPS + coverage);
    if (high - low < shortest[1] - shortest[0]) shortest = [low, high];
  }
  return {
    trials: count,
    mean,
    deviation,
    meanError: deviation / Math.sqrt(count),
    interval: [at(tail / 2), at(1 - tail / 2)],
    shortest,
    resolution: (trials.to - trials.from) / trials.counts.length,
  };
}
