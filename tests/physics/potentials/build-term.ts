import { formByKey } from '#server/physics/potentials/register.ts';
import type { FormContext, FormValues, Term } from '#server/physics/potentials/types.ts';

/** An electron-like projectile on a target of charge two. */
export const CONTEXT: FormContext = {
  twoMuOverHbar2: 0.26246842,
  projectileCharge: -1,
  targetCharge: 2,
};

export function build(form: string, values: FormValues, context = CONTEXT): Term {
  const found = formByKey(form);
  if (!found) throw new Error(`no form ${form}`);
  return found.build(values, context);
}

/** The forms that have lengths, with a strength of one; `lengths` are in angstrom. */
export function unitTerm(form: string, lengths: Record<string, number>): Term {
  const strength: Record<string, Record<string, number>> = {
    deltaShell: { g: 1 },
    screenedCoulomb: { chargeProduct: 1 },
    polarization: { alpha: 1 },
    moliere: {},
    krc: {},
    universalIon: {},
  };
  return build(form, { ...(strength[form] ?? { V0: 1 }), ...lengths });
}

/** S(q) by the closed form or by quadrature; both exist for every form with a length. */
export function transform(term: Term, route: 'closed' | 'quadrature', q: number) {
  const routine = term[route];
  if (!routine) throw new Error(`${term.form} has no ${route}`);
  return routine(q);
}
