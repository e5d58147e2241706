import { DomainError } from '#shared/errors.ts';
import type { Generator } from './generator.ts';
import { generator } from './generator.ts';
import type { Correlation, Model } from './gum.ts';
import { correlationMatrix } from './gum.ts';

export const DISTRIBUTIONS = ['normal', 'rectangular', 'triangular', 'arcsine', 'student'] as const;

/** How an input is distributed about its estimate; every shape is given by its standard uncertainty (of `student`: its scale). */
export interface DistributedInput {
  name: string;
  estimate: number;
  uncertainty: number;
  distribution: (typeof DISTRIBUTIONS)[number];
  /** Of Student's distribution, above 0. */
  freedom?: number;
}

export interface MonteCarloOptions {
  /** Model evaluations, 1,000 to 10,000,000. */
  trials: number;
  /** 0 to 2^32 - 1; the same seed gives the same result. */
  seed: number;
  /** Default 0.95. */
  coverage?: number;
  correlations?: readonly Correlation[];
  /** Called after every block with the trials done; answers whether to go on. */
  onBlock?: (done: number) => boolean;
}

export interface MonteCarloResult {
  trials: number;
  seed: number;
  mean: number;
  deviation: number;
  /** Probabilistically symmetric. */
  interval: [number, number];
  /** Shortest. */
  shortest: [number, number];
  /** Standard error of the mean, from the trials alone. */
  meanError: number;
  /** Counts of equal bins over the central 99.9 %, for drawing. */
  histogram: { from: number; to: number; counts: number[] };
}

const BLOCK = 10_000;
const BINS = 60;

function refuse(message: string): never {
  throw new DomainError('invalidInput', message);
}

/** A gamma variate of shape a >= ½ by squeezing (Marsaglia and Tsang), for Student's distribution. */
function gammaVariate(random: Generator, shape: number): number {
  if (shape < 1) {
    return gammaVariate(random, shape + 1) * random.uniform() ** (1 / shape);
  }
  const d = shape - 1 / 3;
  const c = 1 / Math.sqrt(9 * d);
  for (;;) {
    const x = random.normal();
    const v = (1 + c * x) ** 3;
    if (v > 0 && Math.log(random.uniform()) < (x * x) / 2 + d - d * v + d * Math.log(v)) {
      return d * v;
    }
  }
}

/** A draw of mean 0 and, but for Student's, standard deviation 1. */
export function standardDraw(
  random: Generator,
  { distribution, freedom }: Pick<DistributedInput, 'distribution' | 'freedom'>,
): number {
  switch (distribution) {
    case 'normal':
      return random.normal();
    case 'rectangular':
      return Math.sqrt(3) * (2 * random.uniform() - 1);
    case 'triangular':
      return Math.sqrt(6) * (random.uniform() + random.uniform() - 1);
    case 'arcsine':
      return Math.SQRT2 * Math.sin(2 * Math.PI * random.uniform());
    case 'student': {
      const nu = freedom ?? NaN;
      return random.normal() / Math.sqrt(gammaVariate(random, nu / 2) / (nu / 2));
    }
  }
}

/** Lower triangular L with L Lᵀ = R. */
function cholesky(matrix: readonly number[][]): number[][] {
  const lower: number[][] = [];
  matrix.forEach((row, i) => {
    const current: number[] = [];
    for (let j = 0; j <= i; j++) {
      const other = j === i ? current : (lower[j] ?? []);
      let sum = row[j] ?? 0;
      for (let m = 0; m < j; m++) sum -= (current[m] ?? 0) * (other[m] ?? 0);
      if (j < i) current.push((other[j] ?? 0) > 0 ? sum / (other[j] ?? 1) : 0);
      else {
        if (sum < -1e-12) refuse('These correlations contradict one another.');
        current.push(Math.sqrt(Math.max(0, sum)));
      }
    }
    lower.push(current);
  });
  return lower;
}

function sampler(inputs: readonly DistributedInput[], correlations: readonly Correlation[]) {
  const named = inputs.map((one) => ({ ...one, freedom: one.freedom ?? Infinity }));
  const correlated = new Set(correlations.flatMap(({ between }) => [...between]));
  const wrong = inputs.find(
    ({ name, distribution }) => correlated.has(name) && distribution !== 'normal',
  );
  if (wrong)
    refuse(`${wrong.name} is correlated: correlated inputs are normally distributed here.`);
  const lower = correlations.length > 0 ? cholesky(correlationMatrix(named, correlations)) : null;
  const draws = new Float64Array(inputs.length);
  return (random: Generator, into: number[]) => {
    inputs.forEach((one, i) => (draws[i] = standardDraw(random, one)));
    inputs.forEach(({ estimate, uncertainty }, i) => {
      const row = lower?.[i];
      const z = row ? row.reduce((sum, l, m) => sum + l * (draws[m] ?? 0), 0) : (draws[i] ?? 0);
      into[i] = estimate + uncertainty * z;
    });
  };
}

/** The narrowest stretch of sorted values that holds a share of them. */
function shortestOf(sorted: Float64Array, held: number): [number, number] {
  let best = 0;
  let width = Infinity;
  for (let i = 0; i + held < sorted.length; i++) {
    const here = (sorted[i + held] ?? 0) - (sorted[i] ?? 0);
    if (here < width) [best, width] = [i, here];
  }
  return [sorted[best] ?? NaN, sorted[best + held] ?? NaN];
}

function histogramOf(sorted: Float64Array): MonteCarloResult['histogram'] {
  const n = sorted.length;
  const from = sorted[Math.floor(0.0005 * n)] ?? NaN;
  const to = sorted[Math.min(n - 1, Math.ceil(0.9995 * n))] ?? NaN;
  const counts = Array.from({ length: BINS }, () => 0);
  const scale = to > from ? BINS / (to - from) : 0;
  for (const value of sorted) {
    if (value < from || value > to) continue;
    const bin = Math.min(BINS - 1, Math.floor((value - from) * scale));
    counts[bin] = (counts[bin] ?? 0) + 1;
  }
  return { from, to, counts };
}

function check(
  inputs: readonly DistributedInput[],
  { trials, coverage = 0.95 }: MonteCarloOptions,
) {
  if (!(Number.isInteger(trials) && trials >= 1000 && trials <= 1e7)) {
    refuse('Trials are a whole number from 1,000 to 10,000,000.');
  }
  if (!(coverage > 0 && coverage < 1)) refuse('A coverage probability lies between 0 and 1.');
  for (const { name, estimate, uncertainty, distribution, freedom } of inputs) {
    if (!Number.isFinite(estimate) || !(uncertainty >= 0 && uncertainty < Infinity)) {
      refuse(`${name} needs a finite estimate and an uncertainty that is not negative.`);
    }
    if (distribution === 'student' && !(freedom !== undefined && freedom > 0)) {
      refuse(`${name} needs its degrees of freedom.`);
    }
  }
}

/**
 * Propagation of distributions by the Monte Carlo method.
 *
 * Formula: y_r = f(x_r) for draws x_r of the inputs; mean, standard deviation and coverage intervals of the sorted y.
 *
 * @param model y = f(x), finite for every draw
 * @param inputs in the order of the model
 * @returns in the unit of y; null where `onBlock` asked to stop
 * @throws DomainError('invalidInput') for inputs or options out of bounds, and where the model leaves the numbers
 *
 * Validity: the interval's ends scatter like 1/sqrt(trials); a million trials give two significant digits.
 *
 * Source: JCGM 101:2008, 7; generator: see `generator`.
 */
export function monteCarlo(
  model: Model,
  inputs: readonly DistributedInput[],
  options: MonteCarloOptions,
): MonteCarloResult | null {
  check(inputs, options);
  const { trials, seed, coverage = 0.95, correlations = [], onBlock } = options;
  const random = generator(seed);
  const draw = sampler(inputs, correlations);
  const values = new Float64Array(trials);
  const x = inputs.map(({ estimate }) => estimate);
  for (let r = 0; r < trials; r++) {
    draw(random, x);
    values[r] = model(x);
    if ((r + 1) % BLOCK === 0 && onBlock && !onBlock(r + 1)) return null;
  }
  return summary(values, seed, coverage);
}

function summary(values: Float64Array, seed: number, coverage: number): MonteCarloResult {
  const trials = values.length;
  let mean = 0;
  for (const value of values) mean += value / trials;
  let square = 0;
  for (const value of values) square += (value - mean) ** 2;
  if (!Number.isFinite(square)) {
    refuse('The model gives no number for some draws: its inputs are too uncertain for it.');
  }
  values.sort();
  const deviation = Math.sqrt(square / (trials - 1));
  const held = Math.min(trials - 1, Math.round(coverage * trials));
  const below = Math.floor((trials - held) / 2);
  return {
    trials,
    seed,
    mean,
    deviation,
    meanError: deviation / Math.sqrt(trials),
    interval: [values[below] ?? NaN, values[Math.min(trials - 1, below + held)] ?? NaN],
    shortest: shortestOf(values, held),
    histogram: histogramOf(values),
  };
}
