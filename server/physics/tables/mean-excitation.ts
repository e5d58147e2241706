import { DomainError } from '#shared/errors.ts';
import { atomicNumber } from './nuclides.ts';
import type { Formula } from './formula.ts';
import table from './mean-excitation/icru37.json' with { type: 'json' };

export const MEAN_EXCITATION_EDITION = table.edition;
export const MEAN_EXCITATION_SOURCE = table.source;
export const MEAN_EXCITATION_LICENCE = table.licence;
export const MEAN_EXCITATION_NOTES: readonly string[] = table.notes;

type Cell = string | number;
const byName = (rows: readonly Cell[][]): ReadonlyMap<string, number> =>
  new Map(rows.map(([name, value]) => [String(name), Number(value)]));
const ELEMENTS = byName(table.elements);
const COMPOUNDS = byName(table.compounds);

/**
 * Mean excitation energy of an element.
 * @returns eV, uncertain by 1 to 5 %
 * @throws DomainError('invalidInput') beyond uranium
 *
 * Source: MEAN_EXCITATION_SOURCE.
 */
export function meanExcitation(symbol: string): number {
  const found = ELEMENTS.get(symbol);
  if (found !== undefined) return found;
  throw new DomainError(
    'invalidInput',
    `No mean excitation energy of ${symbol} is tabulated (${MEAN_EXCITATION_EDITION}, hydrogen to uranium).`,
  );
}

/** Z/A of a material, mol/g. */
export function electronsPerGram({ parts, molarMass }: Formula): number {
  const electrons = parts.reduce((sum, { symbol, count }) => sum + atomicNumber(symbol) * count, 0);
  return electrons / molarMass;
}

/**
 * Mean excitation energy of a material.
 *
 * Formula: ln I = Σ n_i Z_i ln I_i/Σ n_i Z_i, or the tabulated value of the compound.
 *
 * @param formula from `parseFormula`
 * @returns eV
 * @throws DomainError('invalidInput') for an element beyond uranium
 *
 * Source: additivity rule of Bragg and Kleeman, Philos. Mag. 10 (1905) 318; elements as above.
 */
export function meanExcitationOf({ parts }: Formula): number {
  const known = COMPOUNDS.get(
    parts.map(({ symbol, count }) => symbol + (count === 1 ? '' : String(count))).join(''),
  );
  if (known !== undefined) return known;
  let electrons = 0;
  let sum = 0;
  for (const { symbol, count } of parts) {
    const share = atomicNumber(symbol) * count;
    electrons += share;
    sum += share * Math.log(meanExcitation(symbol));
  }
  return Math.exp(sum / electrons);
}
