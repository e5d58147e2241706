import { formByKey } from '#server/physics/potentials/register.ts';
import { applies, isNamed } from '#server/physics/potentials/parameters.ts';
import type {
  AnyParameter,
  Form,
  FormContext,
  FormParameter,
  FormValue,
  FormValues,
  Term,
} from '#server/physics/potentials/types.ts';
import { UNITS } from '#shared/units/vocabulary.ts';

/** An electron-like projectile on a target of charge two. */
export const CONTEXT: FormContext = {
  twoMuOverHbar2: 0.26246842,
  projectileCharge: -1,
  targetCharge: 2,
  projectile: 'electron',
  recoilFactor: 1,
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

export function defaultOf(parameter: AnyParameter): FormValue {
  const { default: start } = parameter;
  if (isNamed(parameter) || typeof start !== 'object') return start as FormValue;
  const { value, unit } = start as Exclude<FormParameter['default'], number>;
  const units: Readonly<Record<string, number>> =
    parameter.dimension === 'number' ? {} : UNITS[parameter.dimension];
  return value * (units[unit] ?? NaN);
}

/** The parameters a new term starts with, in internal units: what may be left out is, of alternatives the first is taken. */
export function neededOf({ parameters }: Form): AnyParameter[] {
  const starts = Object.fromEntries(parameters.map((one) => [one.key, one.default]));
  return parameters.filter(
    (one) =>
      !one.optional &&
      applies(one, starts) &&
      (one.oneOf === undefined || parameters.find(({ oneOf }) => oneOf === one.oneOf) === one),
  );
}

export function defaultValues(form: Form): Record<string, FormValue> {
  return Object.fromEntries(neededOf(form).map((one) => [one.key, defaultOf(one)]));
}
