import { unitSymbol } from './units/format.ts';
import { UNITS } from './units/vocabulary.ts';

/** What is compared: a cross section per steradian at an angle, or one over all angles. */
export type ComparedKind = 'dcs' | 'total';

/** A usual slip: a value that is wrong by it is `factor` times the right one. */
export interface Slip {
  key: string;
  /** What the other source did, as the end of "The other value …". */
  words: string;
  factor: number;
}

/** How well a slip explains the ratio; `deviation` is |ratio/factor - 1|. */
export interface Explanation extends Slip {
  deviation: number;
}

export type Judgement =
  | { verdict: 'agree'; ratio: number; deviation: number }
  /** Best first: each of them alone explains the ratio. */
  | { verdict: 'explained'; ratio: number; by: Explanation[] }
  /** None does; the nearest, if any is within a tenth, is named as a doubt. */
  | { verdict: 'unexplained'; ratio: number; nearest: Explanation | null };

/** Printed values are rounded: what differs by less than this is the same. */
export const AGREEMENT = 0.01;
const NEAR = 0.1;
const MOST = 3;

/** Units of cross sections that are taken for one another. */
const CONFUSED = [
  'angstrom2',
  'bohr2',
  'nm2',
  'fm2',
  'barn',
  'millibarn',
  'microbarn',
  'cm2',
  'm2',
];

/** A number in one unit that was labelled with another. */
function unitSlips(labelled: string): Slip[] {
  const label = UNITS.area[labelled];
  if (label === undefined) return [];
  return CONFUSED.flatMap((meant) => {
    const size = UNITS.area[meant];
    if (meant === labelled || size === undefined) return [];
    return [
      {
        key: `unit ${meant}`,
        words: `is a number in ${unitSymbol(meant)} with the label ${unitSymbol(labelled)}`,
        factor: label / size,
      },
    ];
  });
}

const bothWays = (key: string, factor: number, over: string, under: string): Slip[] => [
  { key, words: over, factor },
  { key: `${key} inverse`, words: under, factor: 1 / factor },
];

/** Slips of counting and of solid angle; `theta` in rad where a single angle is compared. */
function countingSlips(kind: ComparedKind, theta: number | null): Slip[] {
  const common = [
    ...bothWays(
      'counted twice',
      2,
      'counts both of two identical particles, or both directions',
      'counts one of two identical particles, or one direction',
    ),
    ...bothWays(
      'exchange',
      4,
      'adds the amplitudes of identical particles where one was meant (at 90°)',
      'leaves the exchange of identical particles out (at 90°)',
    ),
    ...bothWays(
      'planck',
      (2 * Math.PI) ** 2,
      'was made with λ where 1/k belongs, or h where ħ does',
      'was made with 1/k where λ belongs, or ħ where h does',
    ),
  ];
  if (kind === 'total') {
    return [
      ...common,
      ...bothWays(
        'per steradian',
        4 * Math.PI,
        'was multiplied by 4π twice',
        'is a mean per steradian, the total over 4π',
      ),
      ...bothWays('azimuth', 2 * Math.PI, 'holds 2π once too often', 'lacks the 2π of the azimuth'),
    ];
  }
  const sine = theta === null ? 0 : Math.sin(theta);
  const ring = 2 * Math.PI * sine;
  return [
    ...common,
    ...bothWays(
      'per steradian',
      4 * Math.PI,
      'is a total, 4π times the value per steradian',
      'was divided by 4π, as if it had been a total',
    ),
    ...bothWays(
      'azimuth',
      2 * Math.PI,
      'is per unit of cos θ, not per steradian',
      'was divided by 2π: per steradian taken for per unit of cos θ',
    ),
    ...(ring > 0
      ? [
          { key: 'per radian', words: 'is per radian of θ, dσ/dθ = 2π sin θ dσ/dΩ', factor: ring },
          {
            key: 'per degree',
            words: 'is per degree of θ, dσ/dθ = 2π sin θ (π/180) dσ/dΩ',
            factor: (ring * Math.PI) / 180,
          },
        ]
      : []),
  ];
}

/**
 * The slips of units, counting and solid angle that need nothing but the value itself.
 *
 * @param labelled unit of area the other value carries
 * @param theta angle compared, rad; null for totals
 */
export function usualSlips(kind: ComparedKind, labelled: string, theta: number | null): Slip[] {
  return [...countingSlips(kind, theta), ...unitSlips(labelled)];
}

/** A slip whose consequence was computed: the value that comes out if it is made, in the unit of ours. */
export function computedSlip(key: string, words: string, value: number, ours: number): Slip | null {
  const factor = value / ours;
  return Number.isFinite(factor) && factor > 0 ? { key, words, factor } : null;
}

/**
 * Which usual slip makes the other value of ours.
 *
 * Formula: a slip explains the ratio r where |r/factor - 1| <= 1 %.
 *
 * @param theirs the other value, > 0
 * @param ours in the same unit, > 0
 * @param slips of both kinds; those that change the value by less than 2 % say nothing and are passed over
 * @throws RangeError for values that are not above zero
 */
export function judgeMixUp(theirs: number, ours: number, slips: readonly Slip[]): Judgement {
  if (!(theirs > 0 && ours > 0) || !Number.isFinite(theirs / ours)) {
    throw new RangeError(`${theirs} and ${ours}: two values above zero are compared`);
  }
  const ratio = theirs / ours;
  const deviation = Math.abs(ratio - 1);
  if (deviation <= AGREEMENT) return { verdict: 'agree', ratio, deviation };
  const ranked = slips
    .filter(({ factor }) => factor > 0 && Math.abs(factor - 1) >= 2 * AGREEMENT)
    .map((slip): Explanation => ({ ...slip, deviation: Math.abs(ratio / slip.factor - 1) }))
    .sort((a, b) => a.deviation - b.deviation);
  const by = ranked.filter((slip) => slip.deviation <= AGREEMENT).slice(0, MOST);
  if (by.length > 0) return { verdict: 'explained', ratio, by };
  const [nearest] = ranked;
  return {
    verdict: 'unexplained',
    ratio,
    nearest: nearest && nearest.deviation <= NEAR ? nearest : null,
  };
}
