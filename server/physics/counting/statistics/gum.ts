import { studentInterval } from '#server/physics/numerics/distributions.ts';
import { DomainError } from '#shared/errors.ts';

/** One input of a measurement model. */
export interface GumInput {
  name: string;
  estimate: number;
  /** Standard uncertainty, >= 0. */
  uncertainty: number;
  /** Degrees of freedom, above 0; Infinity where the uncertainty is known. */
  freedom: number;
}

/** Correlation of two inputs by their names, -1 to 1: the same foil, the same monitor. */
export interface Correlation {
  between: readonly [string, string];
  coefficient: number;
}

export interface GumLine {
  name: string;
  /** ∂f/∂x at the estimates. */
  sensitivity: number;
  /** |c| u, in the unit of the result. */
  contribution: number;
  /** Share of the variance; with correlation the shares do not add up to 1. */
  share: number;
}

export interface GumResult {
  estimate: number;
  combined: number;
  lines: GumLine[];
  /** ν of Welch and Satterthwaite; null where inputs are correlated. */
  freedom: number | null;
  /** k for the coverage asked. */
  coverageFactor: number;
  expanded: number;
}

export type Model = (x: readonly number[]) => number;

const STEP = 0.1;
const STEP_OF_VALUE = 1e-4;

/** Central difference of order four over a part of the uncertainty. */
function slope(model: Model, x: readonly number[], i: number, uncertainty: number): number {
  const at = x[i] ?? 0;
  const h = STEP * uncertainty || STEP_OF_VALUE * Math.abs(at) || STEP_OF_VALUE;
  const f = (shift: number) => model(x.map((value, j) => (j === i ? at + shift : value)));
  return (8 * (f(h) - f(-h)) - (f(2 * h) - f(-2 * h))) / (12 * h);
}

function refuse(message: string): never {
  throw new DomainError('invalidInput', message);
}

/** Correlation matrix of the inputs in their order. */
export function correlationMatrix(
  inputs: readonly GumInput[],
  correlations: readonly Correlation[],
): number[][] {
  const matrix = inputs.map((_, i) => inputs.map((__, j): number => (i === j ? 1 : 0)));
  for (const { between, coefficient } of correlations) {
    const [i = -1, j = -1] = between.map((name) => inputs.findIndex((one) => one.name === name));
    if (i < 0 || j < 0 || i === j) {
      refuse(`A correlation is between two inputs of the budget, not ${between.join(' and ')}.`);
    }
    if (!(Math.abs(coefficient) <= 1)) refuse('A correlation coefficient lies between -1 and 1.');
    const [row, other] = [matrix[i], matrix[j]];
    if (row && other) row[j] = other[i] = coefficient;
  }
  return matrix;
}

/** Σ_ij a_i b_j r_ij. */
function quadratic(a: readonly number[], b: readonly number[], r: readonly number[][]): number {
  return a.reduce(
    (sum, x, i) => sum + x * b.reduce((inner, y, j) => inner + y * (r[i]?.[j] ?? 0), 0),
    0,
  );
}

function check(inputs: readonly GumInput[]): void {
  for (const { name, estimate, uncertainty, freedom } of inputs) {
    if (!Number.isFinite(estimate)) refuse(`${name} needs an estimate that is a finite number.`);
    if (!(uncertainty >= 0 && uncertainty < Infinity)) {
      refuse(`The standard uncertainty of ${name} is not negative.`);
    }
    if (!(freedom > 0)) refuse(`The degrees of freedom of ${name} are above zero.`);
  }
}

/**
 * Degrees of freedom of a combined uncertainty.
 *
 * Formula: ν = u⁴/Σ u_i⁴/ν_i.
 *
 * Source: JCGM 100:2008, G.4.1 (Welch and Satterthwaite). Validity: independent inputs.
 */
export function effectiveFreedom(
  parts: readonly { contribution: number; freedom: number }[],
): number {
  const variance = parts.reduce((sum, { contribution }) => sum + contribution ** 2, 0);
  const inverse = parts.reduce(
    (sum, { contribution, freedom }) => sum + contribution ** 4 / freedom,
    0,
  );
  return inverse > 0 ? variance ** 2 / inverse : Infinity;
}

/**
 * Uncertainty of a measurement by the law of propagation.
 *
 * Formula: u²(y) = Σ_ij c_i c_j u_i u_j r_ij, c_i = ∂f/∂x_i; U = k u with k of Student's distribution for ν rounded down.
 *
 * @param model y = f(x)
 * @param inputs in the order of the model
 * @param coverage probability of the expanded uncertainty, default 0.95
 * @returns in the unit of y; ν is null with correlated inputs, for which k is that of the normal distribution
 * @throws DomainError('invalidInput') for estimates, uncertainties, degrees of freedom or correlations out of bounds
 *
 * Validity: first order; where the model bends within the uncertainties, use the Monte Carlo method beside it.
 *
 * Source: JCGM 100:2008, 5.1.2, 5.2.2, G.
 */
export function gumBudget(
  model: Model,
  inputs: readonly GumInput[],
  correlations: readonly Correlation[] = [],
  coverage = 0.95,
): GumResult {
  check(inputs);
  if (!(coverage > 0 && coverage < 1)) refuse('A coverage probability lies between 0 and 1.');
  const x = inputs.map(({ estimate }) => estimate);
  const matrix = correlationMatrix(inputs, correlations);
  const slopes = inputs.map(({ uncertainty }, i) => slope(model, x, i, uncertainty));
  const sizes = inputs.map(({ uncertainty }, i) => (slopes[i] ?? 0) * uncertainty);
  const variance = Math.max(0, quadratic(sizes, sizes, matrix));
  const lines = inputs.map(({ name }, i) => {
    const contribution = Math.abs(sizes[i] ?? 0);
    return {
      name,
      sensitivity: slopes[i] ?? 0,
      contribution,
      share: variance > 0 ? contribution ** 2 / variance : 0,
    };
  });
  const isCorrelated = correlations.some(({ coefficient }) => coefficient !== 0);
  const freedom = isCorrelated
    ? null
    : effectiveFreedom(
        lines.map(({ contribution }, i) => ({
          contribution,
          freedom: inputs[i]?.freedom ?? Infinity,
        })),
      );
  const whole = freedom === null ? Infinity : freedom < Infinity ? Math.floor(freedom) : freedom;
  const coverageFactor = studentInterval(coverage, Math.max(1, whole));
  const combined = Math.sqrt(variance);
  return {
    estimate: model(x),
    combined,
    lines,
    freedom,
    coverageFactor,
    expanded: coverageFactor * combined,
  };
}

/**
 * Several results of the same inputs with their correlation.
 *
 * Formula: cov(y_k, y_l) = Σ_ij c_ki c_lj u_i u_j r_ij.
 *
 * @returns estimates, standard uncertainties and correlation matrix
 *
 * Source: JCGM 100:2008, H.2.3.
 */
export function gumOutputs(
  models: readonly Model[],
  inputs: readonly GumInput[],
  correlations: readonly Correlation[],
): { estimates: number[]; uncertainties: number[]; correlation: number[][] } {
  check(inputs);
  const x = inputs.map(({ estimate }) => estimate);
  const matrix = correlationMatrix(inputs, correlations);
  const sizes = models.map((model) =>
    inputs.map(({ uncertainty }, i) => slope(model, x, i, uncertainty) * uncertainty),
  );
  const uncertainties = sizes.map((one) => Math.sqrt(Math.max(0, quadratic(one, one, matrix))));
  const correlation = sizes.map((one, k) =>
    sizes.map((other, l) => {
      const scale = (uncertainties[k] ?? 0) * (uncertainties[l] ?? 0);
      return scale > 0 ? quadratic(one, other, matrix) / scale : 0;
    }),
  );
  return { estimates: models.map((model) => model(x)), uncertainties, correlation };
}

/**
 * Means of simultaneous observations with their standard uncertainties and correlations (type A).
 *
 * Formula: u² = Σ (x - mean)²/(n (n - 1)), r = u(x, y)/(u(x) u(y)).
 *
 * @param columns one list of n >= 2 observations for each quantity
 *
 * Source: JCGM 100:2008, 4.2.3, 5.2.3.
 */
export function meansOf(columns: Readonly<Record<string, readonly number[]>>): {
  inputs: GumInput[];
  correlations: Correlation[];
} {
  const all = Object.entries(columns).map(([name, values]) => {
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    return { name, mean, off: values.map((value) => value - mean) };
  });
  const n = all[0]?.off.length ?? 0;
  if (n < 2 || all.some(({ off }) => off.length !== n)) {
    refuse('Simultaneous observations are lists of one length, two at least.');
  }
  const product = (a: readonly number[], b: readonly number[]) =>
    a.reduce((sum, x, i) => sum + x * (b[i] ?? 0), 0) / (n * (n - 1));
  const inputs = all.map(({ name, mean, off }) => ({
    name,
    estimate: mean,
    uncertainty: Math.sqrt(product(off, off)),
    freedom: n - 1,
  }));
  const correlations = all.flatMap((one, i) =>
    all.slice(i + 1).map((other, j): Correlation => {
      const scale = (inputs[i]?.uncertainty ?? 0) * (inputs[i + 1 + j]?.uncertainty ?? 0);
      const coefficient = scale > 0 ? product(one.off, other.off) / scale : 0;
      return { between: [one.name, other.name], coefficient };
    }),
  );
  return { inputs, correlations };
}
