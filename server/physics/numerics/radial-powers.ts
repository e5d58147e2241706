import type { RadialPanels } from './radial-panels.ts';
import { POWER_STRIDE } from './radial-panels.ts';
import { FIELD_STRIDE } from './shifted-chebyshev.ts';

/** Powers of t of width² times a field on one panel, `length` of them. */
export interface PanelPowers {
  powers: Float64Array;
  length: number;
}

/** Where the powers of one wave on one panel are put together. */
export function panelPowers(): PanelPowers {
  return { powers: new Float64Array(POWER_STRIDE), length: 0 };
}

/**
 * Puts factor · component (and once more) of a field together on one panel.
 *
 * @param first, second components with their factors; a component that is not there counts as zero
 */
export function fieldPowers(
  { field, fieldLength }: RadialPanels,
  panel: number,
  first: number,
  factor: number,
  second: number,
  factor2: number,
  into: PanelPowers,
): void {
  const { powers } = into;
  const count = fieldLength[panel] ?? 0;
  const offset = panel * FIELD_STRIDE;
  const [row, other] = [field[first], factor2 === 0 ? undefined : field[second]];
  for (let m = 0; m < count; m++) {
    let sum = 0;
    if (row) sum += factor * (row[offset + m] ?? 0);
    if (other) sum += factor2 * (other[offset + m] ?? 0);
    powers[m] = sum;
  }
  into.length = row || other ? count : 0;
}

/** Adds width² (barrier/x² - wave²) on a panel away from the origin. */
export function addBarrier(
  { edges, inverseSquare, inverseLength }: RadialPanels,
  panel: number,
  barrier: number,
  wave: number,
  into: PanelPowers,
): void {
  const { powers } = into;
  const width = (edges[panel + 1] ?? 0) - (edges[panel] ?? 0);
  const many = barrier === 0 ? 1 : Math.max(1, inverseLength[panel] ?? 0);
  for (let m = into.length; m < many; m++) powers[m] = 0;
  into.length = Math.max(into.length, many);
  powers[0] = (powers[0] ?? 0) - (wave * width) ** 2;
  if (barrier === 0) return;
  const offset = panel * POWER_STRIDE;
  for (let m = 0; m < many; m++) {
    powers[m] = (powers[m] ?? 0) + barrier * (inverseSquare[offset + m] ?? 0);
  }
}
