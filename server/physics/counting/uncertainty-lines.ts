import { studentInterval } from '#server/physics/numerics/distributions.ts';
import type { DISTRIBUTIONS } from './statistics/monte-carlo.ts';
import { effectiveFreedom } from './statistics/gum.ts';

/** How well one input is known. */
export interface InputUncertainty {
  /** Relative standard uncertainty; of the angle: degrees. */
  value: number;
  type: 'A' | 'B';
  distribution: Exclude<(typeof DISTRIBUTIONS)[number], 'student'>;
  /** Degrees of freedom; Infinity where the uncertainty itself is known. */
  freedom: number;
}

export const UNCERTAIN = [
  'current',
  'thickness',
  'density',
  'efficiency',
  'solidAngle',
  'background',
  'energy',
  'angle',
] as const;
export type UncertainInput = (typeof UNCERTAIN)[number];
export type GivenUncertainties = Partial<Record<UncertainInput, InputUncertainty>>;

/** One beam and one target: what is wrong about them is wrong at every detector alike. */
const SHARED: ReadonlySet<UncertainInput> = new Set(['current', 'thickness', 'density', 'energy']);

export interface UncertaintyLine extends Omit<InputUncertainty, 'value'> {
  input: UncertainInput;
  relativeStandardUncertainty: number;
  /** ∂ ln(rate)/∂ ln(input); of the angle: per degree. */
  sensitivity: number;
  contribution: number;
  /** Whether all detectors share it: fully correlated between them. */
  shared: boolean;
}

/**
 * Lines of an uncertainty budget of a rate and their sum.
 *
 * Formula: contribution |c| u, combined sqrt(Σ (c u)²).
 *
 * @param sensitivities c of each input
 * @returns relative standard uncertainties
 *
 * Validity: first order, inputs independent of one another.
 *
 * Source: JCGM 100:2008, 5.1.2.
 */
export function uncertaintyLines(
  given: GivenUncertainties,
  sensitivities: Readonly<Record<UncertainInput, number>>,
): { lines: UncertaintyLine[]; combined: number } {
  const lines = UNCERTAIN.flatMap((input): UncertaintyLine[] => {
    const known = given[input];
    if (!known) return [];
    const { value, ...rest } = known;
    const sensitivity = sensitivities[input];
    const contribution = Math.abs(sensitivity) * value;
    const shared = SHARED.has(input);
    return [
      { input, relativeStandardUncertainty: value, sensitivity, contribution, shared, ...rest },
    ];
  });
  return { lines, combined: Math.hypot(...lines.map(({ contribution }) => contribution)) };
}

export interface Expanded {
  /** Of Welch and Satterthwaite; Infinity where every uncertainty is known. */
  freedom: number;
  coverageFactor: number;
  /** Relative. */
  expanded: number;
}

/**
 * Expanded uncertainty of a rate with its counting statistics.
 *
 * Formula: U = t_p(ν) sqrt(u² + p²), ν of Welch and Satterthwaite rounded down; the counting part has no degrees of freedom to lack.
 *
 * @param coverage probability, such as 0.95
 *
 * Source: JCGM 100:2008, G.4, G.6.
 */
export function expandedUncertainty(
  lines: readonly UncertaintyLine[],
  counting: number,
  coverage: number,
): Expanded {
  const parts = [...lines, { contribution: counting, freedom: Infinity }];
  const freedom = effectiveFreedom(parts);
  const whole = freedom < Infinity ? Math.max(1, Math.floor(freedom)) : Infinity;
  const coverageFactor = studentInterval(coverage, whole);
  const combined = Math.hypot(...parts.map(({ contribution }) => contribution));
  return { freedom, coverageFactor, expanded: coverageFactor * combined };
}

/**
 * Relative uncertainty of the ratio of two rates of one run: what both share counts by the difference of its sensitivities only.
 *
 * Formula: u² = Σ_shared (c - c')² u² + Σ_own (c² u² + c'² u'²).
 *
 * Source: JCGM 100:2008, 5.2.2 with correlation 1 for what is shared.
 */
export function ratioUncertainty(
  one: readonly UncertaintyLine[],
  other: readonly UncertaintyLine[],
): number {
  const parts = one.flatMap((line) => {
    if (!line.shared) return [line.contribution];
    const same = other.find(({ input }) => input === line.input);
    const difference = line.sensitivity - (same?.sensitivity ?? 0);
    return [difference * line.relativeStandardUncertainty];
  });
  const own = other.flatMap(({ shared, contribution }) => (shared ? [] : [contribution]));
  return Math.hypot(...parts, ...own);
}
