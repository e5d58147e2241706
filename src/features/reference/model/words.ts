import { plainDecimal } from '#shared/units/brackets.ts';

/** 1/2 for 0.5, as spins are written. */
export function spinText(spin: number): string {
  return Number.isInteger(spin) ? String(spin) : `${2 * spin}/2`;
}

export function signed(charge: number): string {
  if (charge === 0) return '0';
  return charge > 0 ? `+${charge}` : `−${-charge}`;
}

/** A mole fraction in per cent, without the digits that the multiplication invents. */
export function percent(fraction: number): number {
  return Number((100 * fraction).toPrecision(12));
}

export function percentText(fraction: number): string {
  return `${plainDecimal(percent(fraction))} %`;
}
