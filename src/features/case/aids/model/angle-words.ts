import { formatNumber } from '#shared/units/format.ts';

/** An angle for reading: `12.5°`, `0.2 rad`. */
export function angleWithUnit(value: number, unit: string): string {
  const text = formatNumber(Number(value.toPrecision(6)), 6).replace(/(\.\d*?)0+($| )/, '$1$2');
  const short = text.replace(/\.($| )/, '$1');
  return unit === 'deg' ? `${short}°` : `${short} ${unit}`;
}
