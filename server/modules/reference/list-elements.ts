import type { z } from 'zod';
import type { ElementItem, elementsQuerySchema } from '#shared/contracts/reference.ts';
import { ELEMENTS } from '#server/physics/tables/elements.ts';
import type { ChemicalElement } from '#server/physics/tables/elements.ts';
import { naturalIsotopes } from '#server/physics/tables/nuclides.ts';
import type { Nuclide } from '#server/physics/tables/nuclides.ts';
import { OTHER_NAMES } from './find-nuclides.ts';
import { fitting, rank } from './match.ts';
import { ordered, pageOf } from './paging.ts';
import { HEADS } from './table-heads.ts';

/** The isotope there is most of; undefined for an element that does not occur in nature. */
export function mainIsotope(symbol: string): Nuclide | undefined {
  return naturalIsotopes(symbol).reduce<Nuclide | undefined>(
    (most, entry) => ((entry.abundance ?? 0) > (most?.abundance ?? 0) ? entry : most),
    undefined,
  );
}

export function presentElement(entry: ChemicalElement): ElementItem {
  const { atomicNumber, symbol, name, weight, weightUncertainty, interval, phase } = entry;
  return {
    atomicNumber,
    symbol,
    name,
    weight:
      weight === null
        ? null
        : {
            value: weight,
            unit: 'g/mol',
            ...(weightUncertainty !== null && { uncertainty: weightUncertainty }),
          },
    interval: interval && [...interval],
    phase,
    density: entry.density === null ? null : { value: entry.density, unit: 'g/cm3' },
    densityNote: entry.densityNote,
    mainIsotope: mainIsotope(symbol)?.name ?? null,
    naturalIsotopes: naturalIsotopes(symbol).length,
  };
}

export function rankElement(q: string, entry: ChemicalElement): number | null {
  const { symbol, name, atomicNumber, phase } = entry;
  const names = [symbol, name, ...(OTHER_NAMES[symbol] ?? []), `${atomicNumber}`];
  return rank(q, { names, words: phase });
}

export function listElements(query: z.output<typeof elementsQuerySchema>) {
  const found = fitting(ELEMENTS, (entry) => rankElement(query.q ?? '', entry));
  const sorted = ordered(found, query.sort, {
    atomicNumber: (item) => item.atomicNumber,
    symbol: (item) => item.symbol,
    name: (item) => item.name,
    weight: (item) => item.weight,
    density: (item) => item.density,
  });
  const { items, ...page } = pageOf(sorted, query);
  return { ...page, items: items.map(presentElement), table: HEADS.elements };
}
