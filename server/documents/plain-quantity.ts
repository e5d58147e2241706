import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { Quantity } from '#shared/units/quantity.ts';

const DIGITS = 6;

/** A number as it is typed: to six digits at most, without zeros that nobody wrote (100, 0.5, −10, 1.2 × 10⁻⁵). */
export function plainNumber(value: number): string {
  const [mantissa = '', exponent = '0'] = value.toExponential(DIGITS - 1).split('e');
  const significant = mantissa.replace(/[-.]/g, '').replace(/0+$/, '').length;
  const power = Number(exponent);
  const whole = power >= 0 && power < DIGITS ? power + 1 : 1;
  return formatNumber(value, Math.max(1, significant, whole));
}

/** `10 keV`, `60°`: number and unit as people read them. */
export function plainQuantity({ value, unit }: Quantity): string {
  const symbol = unitSymbol(unit);
  return symbol === '°' ? `${plainNumber(value)}°` : `${plainNumber(value)} ${symbol}`;
}

/** What a person typed where it says more than the number does (`25 MeV/u`, a wavelength), with the number behind it. */
export function enteredQuantity(quantity: Quantity, entered: string | undefined): string {
  const shown = plainQuantity(quantity);
  const typed = entered?.trim() ?? '';
  if (typed === '') return shown;
  const match = /^([-+−]?[\d.]+(?:e[-+]?\d+)?)\s*(.*)$/i.exec(typed);
  const same =
    match !== null &&
    Number(match[1]?.replace('−', '-')) === quantity.value &&
    [quantity.unit, unitSymbol(quantity.unit)].includes(match[2] ?? '');
  return same || typed === shown ? shown : `${typed} (${shown})`;
}
