import type { EstimateResult } from './estimate.ts';
import type { Problem } from './problem.ts';
import type { Term } from './potentials/types.ts';

/** Beyond this k times the range the waves are many and the paths nearly straight. */
const MANY_WAVES = 5;
/** The straight path wants the potential to be small against the energy. */
const SMALL_STRENGTH = 0.3;

const isActive = ({ strength }: Term) => strength.re !== 0 || strength.im !== 0;

/** First order is all there is of a pseudopotential: its strength is an effective one. */
const isContact = ({ form }: Term) => form === 'contact';

function isFastAndWeak({ terms, collision }: Problem): boolean {
  const active = terms.filter(isActive);
  const range = Math.max(0, ...active.map((term) => term.range ?? 0));
  const depth = active.reduce((sum, { strength, v, range: length }) => {
    const at = v && length !== null ? Math.abs(v(length)) : 0;
    return sum + Math.hypot(strength.re, strength.im) * at;
  }, 0);
  return collision.k * range > MANY_WAVES && depth < SMALL_STRENGTH * collision.energyCm;
}

/**
 * What to use where first order will not do, in words; null where it is sound or nothing is known.
 */
export function insteadOf({ problem, beyond, assessment }: EstimateResult): string | null {
  const { verdict, basis } = assessment;
  if (verdict === 'sound') return null;
  if (problem.terms.some((term) => isActive(term) && isContact(term))) {
    return 'A contact interaction is a pseudopotential: it is to be used in first order only, and a better number needs another potential.';
  }
  const exact = beyond.partialWaves;
  if (exact && 'unavailable' in exact) {
    const other = isFastAndWeak(problem)
      ? 'The eikonal amplitude suits this case: many waves, and a potential that is small against the energy.'
      : 'The criteria alone judge this case.';
    return `Partial waves cannot be computed here (${exact.unavailable.replace(/\.$/, '')}). ${other}`;
  }
  if (exact) {
    return verdict === 'usable'
      ? 'The curve of partial waves beside it; or state the deviation with the number.'
      : 'The curve of partial waves beside it, which is exact for this potential.';
  }
  return basis === 'criteria'
    ? 'Partial waves, where they can be had: the exact curve decides then.'
    : null;
}
