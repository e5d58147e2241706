import { logGamma } from '#server/physics/numerics/incomplete-gamma.ts';
import { bracketedRoot } from '#server/physics/numerics/root.ts';
import { DomainError } from '#shared/errors.ts';
import type { Interval } from './poisson-interval.ts';

const MOST_COUNTS = 100;
const MOST_BACKGROUND = 100;
/** Upper ends saw up and down with the background by less than this before they fall for good. */
const REACH = 3;
const BACKGROUND_STEP = 0.02;
const JUMP = 0.005;
const HALVINGS = 30;

const LOG_FACTORIAL = Array.from({ length: 600 }, (_, n) => logGamma(n + 1));

/** P(n|mean); a mean of 0 has 0 counts. */
function probability(n: number, mean: number): number {
  if (mean === 0) return n === 0 ? 1 : 0;
  return Math.exp(n * Math.log(mean) - mean - (LOG_FACTORIAL[n] ?? logGamma(n + 1)));
}

/** What ranks n: ln P(n|m) over ln of its largest value at a physical mean is n ln m - m - rank(n). */
function rank(n: number, background: number): number {
  const best = Math.max(n, background);
  return best === 0 ? 0 : n * Math.log(best) - best;
}

/** Means between which the same counts rank above n; `above` is the probability of those counts at a mean. */
interface Segment {
  from: number;
  to: number;
  above: (mean: number) => number;
}

/** The means from the background on, cut where other counts draw level with n. */
function segmentsOf(n: number, background: number, highest: number): Segment[] {
  const most = Math.ceil(highest + 12 * Math.sqrt(highest + 1) + 12);
  const own = rank(n, background);
  const level = Array.from({ length: most + 1 }, (_, other) =>
    other === n ? NaN : Math.exp((rank(other, background) - own) / (other - n)),
  );
  const cuts = level.filter((mean) => mean > background && mean < highest).sort((x, y) => x - y);
  const edges = [background, ...cuts, highest];
  return edges.slice(1).map((to, i) => {
    const from = edges[i] ?? background;
    const middle = (from + to) / 2;
    // More counts rank above n once the mean is beyond where they draw level, fewer counts before it.
    const others = level.flatMap((mean, other) =>
      (other > n && middle > mean) || (other < n && middle < mean) ? [other] : [],
    );
    return {
      from,
      to,
      above: (mean) => others.reduce((sum, other) => sum + probability(other, mean), 0),
    };
  });
}

/** The signal is below this whatever is seen. */
function highestMean(n: number, background: number, confidence: number): number {
  const tail = Math.sqrt(-2 * Math.log(1 - confidence));
  return Math.max(n, background) + (tail + 1.5) * Math.sqrt(Math.max(n, background) + 1) + 3 * tail;
}

/** Largest mean that accepts n: counts that rank above it hold less than the confidence there. Such a sum is least at an end of its segment. */
function rawUpper(n: number, background: number, confidence: number): number {
  const segments = segmentsOf(n, background, highestMean(n, background, confidence));
  for (const { from, to, above } of segments.reverse()) {
    if (above(to) < confidence) return to - background;
    if (above(from) < confidence) {
      return bracketedRoot((mean) => above(mean) - confidence, from, to).value - background;
    }
  }
  return 0;
}

function rawLower(n: number, background: number, confidence: number): number {
  const segments = segmentsOf(n, background, highestMean(n, background, confidence));
  for (const { from, to, above } of segments) {
    if (above(from) < confidence) return from - background;
    if (above(to) < confidence) {
      return bracketedRoot((mean) => above(mean) - confidence, from, to).value - background;
    }
  }
  return 0;
}

/** The largest upper end between two backgrounds with a jump upwards between them: just beyond the jump. */
function atJump(at: (b: number) => number, from: number, to: number, before: number): number {
  let [low, high] = [from, to];
  let best = 0;
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2;
    const here = at(middle);
    best = Math.max(best, here);
    if (here > before) high = middle;
    else low = middle;
  }
  return best;
}

/** Upper end, made not to rise with the background: the largest of all backgrounds from the given one on. */
function upperEnd(n: number, background: number, confidence: number): number {
  const at = (b: number) => rawUpper(n, b, confidence);
  let before = at(background);
  let best = before;
  for (let i = 1; i * BACKGROUND_STEP <= REACH; i++) {
    const b = background + i * BACKGROUND_STEP;
    const value = at(b);
    if (value > before + JUMP) best = Math.max(best, atJump(at, b - BACKGROUND_STEP, b, before));
    best = Math.max(best, value);
    before = value;
  }
  return best;
}

function check(counts: number, background: number, confidence: number): void {
  if (!(Number.isInteger(counts) && counts >= 0 && counts <= MOST_COUNTS)) {
    throw new DomainError(
      'invalidInput',
      `The construction is made for 0 to ${MOST_COUNTS} counts; above, the square root of the counts serves.`,
    );
  }
  if (!(background >= 0 && background <= MOST_BACKGROUND)) {
    throw new DomainError(
      'invalidInput',
      `The background expected lies between 0 and ${MOST_BACKGROUND} counts, and is known without error.`,
    );
  }
  if (!(confidence >= 0.5 && confidence <= 0.999)) {
    throw new DomainError('invalidInput', 'A confidence level lies between 0.5 and 0.999.');
  }
}

/**
 * Confidence interval of a Poisson signal over a known background, by ordering of likelihood ratios.
 *
 * Formula: n is accepted at µ where Σ P(n'|µ + b) over all n' with a larger P(n'|µ + b)/P(n'|max(n', b)) is below the confidence; the interval
 * spans the µ that accept n. Its upper end is the largest over backgrounds from b on, so that it never rises with the background.
 *
 * @param counts n observed, a whole number from 0 to 100
 * @param background b expected, 0 to 100, known
 * @param confidence as in 0.9
 * @returns signal counts, to about 1e-9; low is 0 where the interval is one-sided
 * @throws DomainError('invalidInput') outside these bounds
 *
 * Source: G. J. Feldman and R. D. Cousins, Phys. Rev. D 57 (1998) 3873.
 */
export function feldmanCousins(counts: number, background: number, confidence: number): Interval {
  check(counts, background, confidence);
  return {
    low: rawLower(counts, background, confidence),
    high: upperEnd(counts, background, confidence),
  };
}
