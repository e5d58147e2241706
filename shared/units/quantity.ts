import { z } from 'zod';
import { DomainError } from '#shared/errors.ts';
import {
  AREAL_MASS_UNITS,
  DIMENSION_NAMES,
  UNITS,
  caseSlips,
  dimensionsOf,
  isArealMassUnit,
  unitsOf,
} from './vocabulary.ts';
import type { Dimension } from './vocabulary.ts';

/** A number with its unit, as it crosses the wire. */
export interface Quantity {
  value: number;
  unit: string;
}

function alternatives(words: readonly string[]): string {
  return words.length < 2
    ? words.join('')
    : `${words.slice(0, -1).join(', ')} or ${words.at(-1) ?? ''}`;
}

/** Why this unit will not do for this dimension, and the likely mend. */
export function unitMessage(unit: unknown, dimension: Dimension): string {
  const allowed = `Units of ${DIMENSION_NAMES[dimension]}: ${unitsOf(dimension).join(', ')}.`;
  if (typeof unit !== 'string' || unit.trim() === '') return `Give a unit. ${allowed}`;
  const name = DIMENSION_NAMES[dimension];
  const article = /^[aeiou]/.test(name) ? 'an' : 'a';
  const problem = `\`${unit}\` is not ${article} ${name} unit`;
  const slips = caseSlips(unit, dimension);
  if (slips.length > 0) return `${problem}; did you mean ${alternatives(slips)}? ${allowed}`;
  const others = dimensionsOf(unit).map((other) => DIMENSION_NAMES[other]);
  if (others.length > 0) return `${problem}; it is a unit of ${alternatives(others)}. ${allowed}`;
  return `${problem}. ${allowed}`;
}

/** Why this is no usable number, and the mend. */
export function numberMessage(value: unknown): string {
  if (typeof value === 'string' && value.trim() !== '' && Number.isFinite(Number(value))) {
    return `Give a number, not text: ${Number(value)} without quotation marks.`;
  }
  if (value === undefined || value === null) return 'Give a number as the value.';
  if (typeof value !== 'number') return 'The value must be a number.';
  return 'The value is too large for a double-precision number, or not a number: give a finite number.';
}

/** Schema of a quantity of one dimension; every refusal says what is allowed. */
export function quantitySchema(dimension: Dimension) {
  const example = unitsOf(dimension)[0] ?? '';
  return z.strictObject(
    {
      value: z.number({ error: ({ input }) => numberMessage(input) }),
      unit: z.enum(unitsOf(dimension), { error: ({ input }) => unitMessage(input, dimension) }),
    },
    {
      error: (issue) =>
        issue.code === 'unrecognized_keys'
          ? `A quantity holds value and unit only; remove ${issue.keys.join(', ')}.`
          : `Give a quantity of ${DIMENSION_NAMES[dimension]} such as {"value": 1, "unit": "${example}"}.`,
    },
  );
}

/** Factor from `unit` to the internal unit of `dimension`. Throws DomainError('invalidInput') for a unit of another kind. */
export function unitFactor(unit: string, dimension: Dimension): number {
  const table = UNITS[dimension];
  const factor = Object.hasOwn(table, unit) ? table[unit] : undefined;
  if (factor !== undefined) return factor;
  if (dimension === 'arealDensity' && isArealMassUnit(unit)) {
    throw new DomainError(
      'invalidInput',
      `An areal density by mass (${unit}) needs the formula of the target to become a number of nuclei.`,
    );
  }
  throw new DomainError('invalidInput', unitMessage(unit, dimension));
}

/** The quantity in the internal unit of its dimension (see vocabulary.ts). */
export function toInternal(quantity: Quantity, dimension: Dimension): number {
  return quantity.value * unitFactor(quantity.unit, dimension);
}

/** A value in the internal unit, expressed in `unit`. */
export function fromInternal(value: number, unit: string, dimension: Dimension): Quantity {
  return { value: value / unitFactor(unit, dimension), unit };
}

/** An areal density by mass in g/cm2. Throws DomainError('invalidInput') for any other unit. */
export function arealMassToInternal(quantity: Quantity): number {
  const factor = isArealMassUnit(quantity.unit) ? AREAL_MASS_UNITS[quantity.unit] : undefined;
  if (factor === undefined) {
    throw new DomainError(
      'invalidInput',
      `\`${quantity.unit}\` is not an areal density by mass. Units: ${Object.keys(AREAL_MASS_UNITS).join(', ')}.`,
    );
  }
  return quantity.value * factor;
}
