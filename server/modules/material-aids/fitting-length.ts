import type { Quantity } from '#shared/units/quantity.ts';
import { fromInternal } from '#shared/units/quantity.ts';

const UNITS = ['m', 'cm', 'mm', 'um', 'nm', 'angstrom', 'pm', 'fm'];

/** A length in the largest unit that keeps it at one or above; metres and femtometres take what is beyond. */
export function fittingLength(angstrom: number): Quantity {
  const fitting = UNITS.find((unit) => fromInternal(angstrom, unit, 'length').value >= 1);
  return fromInternal(angstrom, fitting ?? 'fm', 'length');
}
