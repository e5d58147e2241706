import { formatNumber } from '#shared/units/format.ts';
import type { Quantity } from '#shared/units/quantity.ts';

const MINUTE = 60;
const HOUR = 3600;
const DAY = 86_400;

/** A time in the unit people plan it in. */
export function timeOf(seconds: number): Quantity {
  if (seconds < 2 * MINUTE) return { value: seconds, unit: 's' };
  if (seconds < 2 * HOUR) return { value: seconds / MINUTE, unit: 'min' };
  if (seconds < 3 * DAY) return { value: seconds / HOUR, unit: 'h' };
  return { value: seconds / DAY, unit: 'd' };
}

export function timeText(seconds: number): string {
  const { value, unit } = timeOf(seconds);
  return `${formatNumber(value, 3)}\u00a0${unit}`;
}

export const percentText = (fraction: number, digits = 3): string =>
  `${formatNumber(100 * fraction, digits)}\u00a0%`;

/** A fraction that is nearly nothing is not worth a power of ten. */
export const roughPercent = (fraction: number): string =>
  fraction > 0 && fraction < 1e-4 ? '< 0.01\u00a0%' : percentText(fraction, 2);
