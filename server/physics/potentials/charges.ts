import { FINE_STRUCTURE, HBAR_C_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import type { ParameterReader } from './parameters.ts';
import type { FormContext, FormParameter } from './types.ts';

export const chargeProductParameter: FormParameter = {
  key: 'chargeProduct',
  label: 'Charge product',
  symbol: 'Z_1 Z_2',
  dimension: 'number',
  min: -1e6,
  max: 1e6,
  optional: true,
  default: -1,
  description:
    'Product of the two charge numbers. Left out, the charges of projectile and target are taken.',
};

/**
 * Strength of a Coulomb potential, Z1 Z2 alpha hbar c.
 *
 * @returns eV·angstrom; `chargeProduct` wins over the charges of the context
 */
export function coulombStrength(read: ParameterReader, context: FormContext): number {
  const product = read.optional('chargeProduct') ?? context.projectileCharge * context.targetCharge;
  return product * FINE_STRUCTURE * HBAR_C_EV_ANGSTROM;
}

/** The charge product behind a Coulomb strength, eV·angstrom. */
export function chargeProductOf(strength: number): number {
  return strength / (FINE_STRUCTURE * HBAR_C_EV_ANGSTROM);
}
