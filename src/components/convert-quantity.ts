import { fromInternal, toInternal } from '#shared/units/quantity.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';

/** Digits up to which a converted number counts as one a person would write. */
const WRITTEN = 12;

/**
 * A converted number without the dust of the last digit: 0.1 nm is 1 Å, not 1.0000000000000002. Only numbers that become short this
 * way are touched, so that 60° comes back from radians as 60°.
 */
export function tidy(value: number): number {
  const rounded = Number(value.toPrecision(15));
  return Number(rounded.toPrecision(WRITTEN)) === rounded ? rounded : value;
}

/** The same quantity in another unit. */
export function convertQuantity(quantity: Quantity, unit: string, dimension: Dimension): Quantity {
  const { value } = fromInternal(toInternal(quantity, dimension), unit, dimension);
  return { value: tidy(value), unit };
}
