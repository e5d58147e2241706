import { formByKey } from '#server/physics/potentials/register.ts';
import type { NamedQuantities, Term } from '#server/physics/potentials/types.ts';
import { DomainError } from '#shared/errors.ts';
import { CONTEXT } from '../build-term.ts';

export const Q = (value: number, unit: string) => ({ value, unit });

/** Parameters that the formulas of these tests share. */
export const PARAMETERS: NamedQuantities = {
  V0: Q(-10, 'eV'),
  a: Q(1, 'angstrom'),
  R: Q(3, 'angstrom'),
  d: Q(0.5, 'angstrom'),
  far: Q(1000, 'angstrom'),
  thin: Q(0.001, 'angstrom'),
  k: Q(14.4, 'eV angstrom'),
  b: Q(2, '1/angstrom'),
  n: 2,
};

export function formula(text: string, parameters: NamedQuantities = PARAMETERS): Term {
  const form = formByKey('expression');
  if (!form) throw new Error('expression is not registered');
  return form.build({ formula: text, parameters }, CONTEXT);
}

/** Why a formula is refused: pointer and words. */
export function refusal(
  text: string,
  parameters: NamedQuantities = PARAMETERS,
): { path: string; message: string } {
  try {
    formula(text, parameters);
  } catch (error) {
    if (!(error instanceof DomainError) || error.code !== 'invalidInput') throw error;
    const [fault] = error.details.errors ?? [];
    if (!fault) throw error;
    return fault;
  }
  throw new Error(`“${text}” was taken`);
}
