import type { FirstBorn } from '#server/physics/methods/born1.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { largestBornPhase } from './born-phases.ts';
import type { ConeSamples, Scales } from './cone-samples.ts';
import { sampleCone } from './cone-samples.ts';
import type { Deviations } from './deviation.ts';

export type CriterionName = 'unitarity' | 'secondOrder' | 'slow' | 'fast' | 'eta';

export interface Criterion {
  name: CriterionName;
  value: number;
  /** In words: what the number is. */
  meaning: string;
}

export type Verdict = 'sound' | 'usable' | 'notValid' | 'unassessed';

/** Below `sound` the approximation is sound, below `usable` usable. */
export interface Limits {
  sound: number;
  usable: number;
}

/** What decides where an exact curve stands beside the first order, and where none does. */
export interface Thresholds {
  exact: Limits;
  criteria: Limits;
}

export interface Assessment {
  verdict: Verdict;
  basis: 'exact' | 'criteria';
  /** Of the exact curve; null where none was computed. */
  deviations: (Deviations & { decides: 'elastic' | 'weighted'; limits: Limits }) | null;
  criteria: (Criterion & { decides: boolean; limits: Limits })[];
  /** Why nothing could be judged. */
  reason: string | null;
}

export interface AssessInput {
  terms: readonly Term[];
  born: FirstBorn;
  k: number;
  twoMuOverHbar2: number;
  scales: Scales;
  /** Samples of the short-range amplitude where they are at hand already. */
  samples: ConeSamples | null;
  /** First order against the exact curve; null where that was not asked for or there is none. */
  deviations: Deviations | null;
  thresholds: Thresholds;
}

export const DEFAULT_THRESHOLDS: Thresholds = {
  exact: { sound: 0.02, usable: 0.2 },
  criteria: { sound: 0.1, usable: 1 },
};

export function verdictOf(value: number, { sound, usable }: Limits): Verdict {
  return value < sound ? 'sound' : value < usable ? 'usable' : 'notValid';
}

const isShortRange = (term: Term) => !(term.tail === 'coulomb' && term.norm === 0);
const isActive = ({ strength }: Term) => strength.re !== 0 || strength.im !== 0;

function eta({ born, k }: AssessInput): Criterion | null {
  const value = Math.hypot(born.tail.re, born.tail.im) / (2 * k);
  if (value === 0) return null;
  return {
    name: 'eta',
    value,
    meaning:
      "Sommerfeld's parameter |Z1 Z2| alpha c/v of the Coulomb tail. Above one the waves are far from plane; the first-order cross section of two bare, distinct point charges nevertheless equals the exact one without relativity.",
  };
}

function unitarity(samples: ConeSamples, range: number): Criterion {
  const { value, l, lMax } = largestBornPhase(samples, range);
  return {
    name: 'unitarity',
    value,
    meaning: `Largest first-order partial-wave amplitude |T_l|, at l = ${l} of those up to ${lMax}; the conservation of particles allows at most 1.`,
  };
}

function secondOrder({ born, k }: AssessInput, samples: ConeSamples): Criterion | null {
  const forward = born.shortRange(0);
  const size = Math.hypot(forward.re, forward.im);
  if (!(size > forward.error) || !(size > born.floor)) return null;
  const elastic = 8 * Math.PI * samples.moments[0];
  return {
    name: 'secondOrder',
    value: (k * elastic) / (4 * Math.PI * size),
    meaning:
      'Imaginary part of the second-order forward amplitude, which the first-order cross section fixes, as a fraction of the first-order one.',
  };
}

/** Modulus of Σ strength · part over the terms that have such a part; null if none has. */
function weighted(terms: readonly Term[], part: (term: Term) => number | null): number | null {
  let re = 0;
  let im = 0;
  let found = false;
  for (const term of terms) {
    const value = part(term);
    if (value === null) continue;
    found = true;
    re += term.strength.re * value;
    im += term.strength.im * value;
  }
  return found ? Math.hypot(re, im) : null;
}

function strengthAtSpeed(input: AssessInput, terms: readonly Term[]): Criterion | null {
  const { k, twoMuOverHbar2, scales } = input;
  if (!(scales.range > 0)) return null;
  if (k * scales.range < 1) {
    const moment = weighted(terms, (term) => term.firstMoment);
    if (moment === null) return null;
    return {
      name: 'slow',
      value: twoMuOverHbar2 * moment,
      meaning:
        'Slow particles (k times the range below 1): (2 mu/hbar²) |∫ r V dr|, the wave at the centre changed by the potential.',
    };
  }
  const line = weighted(terms, (term) => term.lineIntegral(1 / k));
  if (line === null) return null;
  return {
    name: 'fast',
    value: (twoMuOverHbar2 * line) / (2 * k),
    meaning:
      'Fast particles (k times the range above 1): |∫ V dr|/(hbar v) from r = 1/k outwards, the phase gathered on the way through.',
  };
}

function shortRangeCriteria(input: AssessInput): (Criterion | null)[] {
  const { terms, born, k, scales } = input;
  const rest = terms.filter((term) => isActive(term) && isShortRange(term));
  if (rest.length === 0) return [];
  const samples = input.samples ?? sampleCone((q) => born.shortRange(q), k, scales);
  return [
    unitarity(samples, Math.max(scales.range, scales.edge)),
    secondOrder(input, samples),
    strengthAtSpeed(input, rest),
  ];
}

function nothingThere(): Criterion {
  return {
    name: 'unitarity',
    value: 0,
    meaning: 'The interaction has no strength: nothing is left out.',
  };
}

/**
 * Is the first Born approximation to be trusted? Where the exact curve was computed it decides; otherwise criteria do, each with
 * its number, and the worst of them.
 *
 * Formula: the deviation of the elastic total, or the weighted one where the total diverges; else max |T_l|;
 * k sigma/(4 pi |f1(0)|); (2 mu/hbar²) |∫ r V dr| where k times the range is below one, else |∫_{1/k}^∞ V dr|/(hbar v);
 * Sommerfeld's eta for a Coulomb tail, the others then judge what the tail leaves.
 *
 * @returns sound or usable below the thresholds, notValid above; unassessed with the reason where no criterion applies
 *
 * Validity: criteria are orders of magnitude, not error bars; an exact calculation overrules them.
 *
 * Source: textbook; e.g. L. I. Schiff, Quantum Mechanics, 3rd ed. (1968), sec. 38.
 */
export function assess(input: AssessInput): Assessment {
  const { deviations, thresholds } = input;
  const criteria = criteriaOf(input);
  const worst = Math.max(...criteria.map(({ value }) => value));
  const deciding = deviations ? -1 : criteria.findIndex(({ value }) => value === worst);
  const listed = criteria.map((entry, i) => ({
    ...entry,
    limits: thresholds.criteria,
    decides: i === deciding,
  }));
  if (deviations) {
    const decides = deviations.elastic === null ? 'weighted' : 'elastic';
    return {
      verdict: verdictOf(deviations.elastic ?? deviations.weighted, thresholds.exact),
      basis: 'exact',
      deviations: { ...deviations, decides, limits: thresholds.exact },
      criteria: listed,
      reason: null,
    };
  }
  const none = criteria.length === 0;
  return {
    verdict: none ? 'unassessed' : verdictOf(worst, thresholds.criteria),
    basis: 'criteria',
    deviations: null,
    criteria: listed,
    reason: none ? 'None of the criteria applies to this interaction.' : null,
  };
}

function criteriaOf(input: AssessInput): Criterion[] {
  const hasTail = input.born.tail.re !== 0 || input.born.tail.im !== 0;
  const acts = hasTail || input.terms.some((term) => isActive(term) && isShortRange(term));
  const found = acts ? [eta(input), ...shortRangeCriteria(input)] : [nothingThere()];
  return found.filter(
    (entry): entry is Criterion => entry !== null && Number.isFinite(entry.value),
  );
}

/** Where there is no first order, nothing can be judged. */
export function unassessed(reason: string): Assessment {
  return { verdict: 'unassessed', basis: 'criteria', deviations: null, criteria: [], reason };
}
