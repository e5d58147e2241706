import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { angstroms } from './limit-terms.ts';
import { screenedCharges } from './limit-screening.ts';
import type { ScreenedCharges } from './limit-screening.ts';
import { AT_60, SLOW, atWavenumber, withTerms } from './limit-start.ts';
import type { Start } from './limit-start.ts';
import type { Limit } from './limit-sides.ts';

/** q times the shortest screening length in the limit of bare charges. */
const FAR = 1e4;
const FORWARD = { place: 0 } as const;

/** f is Σ w/(q² + 1/a²): the charges bare but for 2 Σ w/(qa)² of dσ/dΩ. */
function bareCharges(start: Start, { product, screens }: ScreenedCharges): Limit {
  const shortest = Math.min(...screens.map(({ length }) => length));
  const body = { ...start.body, ...SLOW, energy: atWavenumber(start, FAR / shortest) };
  const atOrigin = screens.reduce((sum, { weight }) => sum + weight, 0);
  const coulomb = { form: 'coulomb', chargeProduct: product };
  return {
    key: 'bare charges',
    limit: 'energy so high that q at 60° is 10⁴ over the shortest screening length',
    holds: 'dσ/dΩ becomes that of two bare charges',
    expected: { body: withTerms(body, [coulomb]), read: AT_60, factor: atOrigin ** 2 },
    obtained: { body, read: AT_60, factor: 1 },
    within: 10 / FAR ** 2,
  };
}

/** Straight forward the amplitude is the integral of r² V, the sum of w a² over the exponentials. */
function exponentials({ body }: Start, { product, screens }: ScreenedCharges): Limit {
  const forward = { ...body, ...SLOW, angles: { unit: 'deg', values: [0] } };
  const parts = screens.map(({ weight, length }) => ({
    form: 'screenedCoulomb',
    chargeProduct: weight * product,
    a: angstroms(length),
  }));
  return {
    key: 'exponentials',
    limit: 'straight forward, without relativity',
    holds: `dσ/dΩ is that of the published ${screens.length} exponentials, added one by one: the integral of r²V`,
    expected: { body: withTerms(forward, parts), read: FORWARD, factor: 1 },
    obtained: { body: forward, read: FORWARD, factor: 1 },
    within: 1e-12,
  };
}

/** Limits of two atoms behind a published screening function. */
export function screenedLimits(start: Start, term: InteractionTerm): Limit[] {
  const charges = screenedCharges(term, start.body);
  if (!charges || charges.product === 0) return [];
  return [bareCharges(start, charges), exponentials(start, charges)];
}
