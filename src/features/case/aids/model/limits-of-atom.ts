import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { atomicNumberOf } from './charge-numbers.ts';
import { AT_60, SLOW, atWavenumber, withTerms } from './limit-start.ts';
import type { Start } from './limit-start.ts';
import type { Limit } from './limit-sides.ts';

/** s = q/4π far beyond the electrons, 1/angstrom: at s = 6 at most 6 % of Z scatters with the nucleus still, beyond it (6/s)² of that. */
const FAR = 6000;

/** Mott-Bethe: Z - f_x of the charge scatters, and f_x is gone. */
function bareNucleus(start: Start, Z: number): Limit {
  const body = { ...start.body, ...SLOW, energy: atWavenumber(start, 4 * Math.PI * FAR) };
  const sign = 'species' in body.projectile && body.projectile.species === 'positron' ? 1 : -1;
  const coulomb = { form: 'coulomb', chargeProduct: sign * Z };
  return {
    key: 'bare nucleus',
    limit: `energy so high that s at 60° is ${FAR} per angstrom or more, without relativity`,
    holds: `dσ/dΩ becomes that of the bare nucleus, Z = ${Z}`,
    expected: { body: withTerms(body, [coulomb]), read: AT_60, factor: 1 },
    obtained: { body, read: AT_60, factor: 1 },
    within: 0.2 * (6 / FAR) ** 2,
  };
}

/** To first order the sign of the charge is lost. */
function antiparticle({ body }: Start): Limit[] {
  if (!('species' in body.projectile)) return [];
  const { species } = body.projectile;
  const other = { species: species === 'positron' ? 'electron' : 'positron' } as const;
  const slow = { ...body, ...SLOW };
  return [
    {
      key: 'antiparticle',
      limit: `${other.species === 'positron' ? 'a positron in place of the electron' : 'an electron in place of the positron'}, without relativity`,
      holds: 'dσ/dΩ at 60° is the same',
      expected: { body: { ...slow, projectile: other }, read: AT_60, factor: 1 },
      obtained: { body: slow, read: AT_60, factor: 1 },
      within: 0,
    },
  ];
}

/** Limits of an electron or positron on a neutral atom. */
export function atomLimits(start: Start, { element }: InteractionTerm): Limit[] {
  const Z = typeof element === 'string' ? atomicNumberOf(element) : null;
  return [...(Z === null ? [] : [bareNucleus(start, Z)]), ...antiparticle(start)];
}
