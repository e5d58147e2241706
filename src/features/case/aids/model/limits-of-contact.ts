import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { AT_60, SLOW } from './limit-start.ts';
import type { Start } from './limit-start.ts';
import type { Limit } from './limit-sides.ts';

/** m c² of the neutron, eV: CODATA 2022. */
const NEUTRON_EV = 939565421.94;

/** A table gives bound lengths; a nucleus that recoils scatters with M/(m + M) of it, the reduced mass over m. */
export function contactLimits({ body, reducedMass }: Start, term: InteractionTerm): Limit[] {
  const named = term['nuclide'] !== undefined || term['element'] !== undefined;
  if (!named || body.target.kind === 'fixed') return [];
  const slow = { ...body, ...SLOW };
  return [
    {
      key: 'bound',
      limit: 'a nucleus that is held, in place of one that recoils',
      holds: 'dσ/dΩ is that of the free nucleus over (M/(m + M))²',
      expected: {
        body: { ...slow, target: { kind: 'fixed', charge: 0 } },
        read: AT_60,
        factor: (reducedMass / NEUTRON_EV) ** 2,
      },
      obtained: { body: slow, read: AT_60, factor: 1 },
      // With relativity the reduced mass of the case holds the kinetic energy too.
      within: body.kinematics === 'relativistic' ? 1e-6 : 1e-12,
    },
  ];
}
