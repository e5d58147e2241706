import { ALLOWED_TO_ALL } from '#tests/support/walk-routes.ts';
import type { Rule } from '#tests/support/walk-routes.ts';
import { atEnergy } from '../cases/case-requests.ts';

/** Computing and the forms of interaction are open to everyone signed in. */
export const RULES: Record<string, Rule> = {
  computeEstimate: {
    access: 'estimate.compute',
    expect: ALLOWED_TO_ALL,
    prepare: () => ({ body: atEnergy(130) }),
  },
  listForms: { access: 'reference.read', expect: ALLOWED_TO_ALL },
};
