import { isQuantity } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { BOHR_ANGSTROM, HARTREE_EV } from '#shared/units/codata.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { Quantity } from '#shared/units/quantity.ts';

/** Parameters that multiply V as a whole, by form. */
const STRENGTHS: Readonly<Record<string, readonly string[]>> = {
  yukawa: ['V0'],
  exponential: ['V0'],
  hulthen: ['V0'],
  squareWell: ['V0', 'W0'],
  gaussian: ['V0', 'W0'],
  woodsSaxon: ['V0', 'W0'],
  deltaShell: ['g'],
  polarization: ['alpha'],
  contact: ['b'],
  coulomb: ['chargeProduct'],
  screenedCoulomb: ['chargeProduct'],
  extendedCharge: ['chargeProduct'],
};

/** Lengths beyond which V is small, by form; forms with a tail of Coulomb or of a power of r are missing. */
const RANGES: Readonly<Record<string, readonly string[]>> = {
  yukawa: ['a'],
  screenedCoulomb: ['a'],
  exponential: ['a'],
  hulthen: ['a'],
  gaussian: ['a'],
  squareWell: ['R'],
  woodsSaxon: ['R', 'a'],
  deltaShell: ['R'],
  contact: [],
};

/** Forms whose strength stands in the term itself, so that the charge of the target does not matter. */
const CHARGELESS = [
  'yukawa',
  'exponential',
  'hulthen',
  'squareWell',
  'gaussian',
  'woodsSaxon',
  'deltaShell',
  'polarization',
];

/** The term with V times a factor; null where no parameter of it does that. */
export function scaled(term: InteractionTerm, factor: number): InteractionTerm | null {
  const names = (STRENGTHS[term.form] ?? []).filter((name) => term[name] !== undefined);
  if (names.length === 0) return null;
  const changed: InteractionTerm = { ...term };
  for (const name of names) {
    const value = term[name];
    if (isQuantity(value)) changed[name] = { ...value, value: value.value * factor };
    else if (typeof value === 'number') changed[name] = value * factor;
  }
  return changed;
}

/** A length of a term, angstrom. */
export function lengthOf(term: InteractionTerm, name: string): number | null {
  const value = term[name];
  return isQuantity(value) ? toInternal(value, 'length') : null;
}

/** Range of a term, angstrom; null where its tail has none. */
export function rangeOf(term: InteractionTerm): number | null {
  const names = RANGES[term.form];
  if (names === undefined) return null;
  return Math.max(0, ...names.map((name) => lengthOf(term, name) ?? 0));
}

export function isChargeless({ form }: InteractionTerm): boolean {
  return CHARGELESS.includes(form);
}

export const angstroms = (value: number): Quantity => ({ value, unit: 'angstrom' });

/** Z1 Z2 of the Coulomb potential with the strength V0 a. */
export function chargeProductOf(V0: Quantity, a: number): number {
  return (toInternal(V0, 'energy') * a) / (HARTREE_EV * BOHR_ANGSTROM);
}
