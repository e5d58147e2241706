import type { MaterialChoice } from '#shared/contracts/material-aids.ts';
import type { MaterialItem } from '#shared/contracts/reference.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import type { TypedQuantity } from '../typed-quantity.tsx';
import { asTyped, emptyIn } from '../typed-quantity.tsx';

export const BY_FORMULA = 'formula';
export const GAS_BY_FORMULA = 'gas';

/** What stands in the fields of the material. */
export interface MaterialFields {
  /** Key of the table, or one of the two above. */
  key: string;
  formula: string;
  density: TypedQuantity;
  pressure: TypedQuantity;
  temperature: TypedQuantity;
}

export const FIRST_FIELDS: MaterialFields = {
  key: '',
  formula: '',
  density: emptyIn('g/cm3'),
  pressure: asTyped({ value: 1, unit: 'bar' }),
  temperature: asTyped({ value: 293.15, unit: 'K' }),
};

/** The fields for another material: its own density where the table has one. */
export function withMaterial(
  fields: MaterialFields,
  key: string,
  item: MaterialItem | undefined,
): MaterialFields {
  const density = item?.density ? asTyped(item.density) : emptyIn('g/cm3');
  return { ...fields, key, density };
}

export function isGas({ key }: MaterialFields, item: MaterialItem | undefined): boolean {
  return key === GAS_BY_FORMULA || (item !== undefined && item.density === null);
}

const same = (a: Quantity | null, b: Quantity | null | undefined): boolean =>
  a !== null && b !== null && b !== undefined && a.value === b.value && a.unit === b.unit;

/** The material that the fields say, or null while something is missing. */
export function choiceOf(
  fields: MaterialFields,
  item: MaterialItem | undefined,
): MaterialChoice | null {
  const { key, density, pressure, temperature } = fields;
  const formula = fields.formula.trim();
  const given = density.value;
  const gas =
    pressure.value && temperature.value
      ? { pressure: pressure.value, temperature: temperature.value }
      : null;
  if (key === BY_FORMULA) return formula !== '' && given ? { formula, density: given } : null;
  if (key === GAS_BY_FORMULA) return formula !== '' && gas ? { formula, ...gas } : null;
  if (!item) return null;
  if (item.density === null) return gas && { key, ...gas };
  if (!given) return null;
  return same(given, item.density) ? { key } : { key, density: given };
}
