import type { z } from 'zod';
import type { NuclideItem, nuclidesQuerySchema } from '#shared/contracts/reference.ts';
import { NUCLIDES } from '#server/physics/tables/nuclides.ts';
import type { Nuclide } from '#server/physics/tables/nuclides.ts';
import { elementName, findNuclides } from './find-nuclides.ts';
import { fold } from './match.ts';
import { ordered, pageOf } from './paging.ts';
import { HEADS } from './table-heads.ts';

export function presentNuclide(entry: Nuclide): NuclideItem {
  const { name, symbol, atomicNumber, massNumber, atomicMass, abundance, spin } = entry;
  return {
    nuclide: name,
    symbol,
    element: elementName(symbol),
    atomicNumber,
    massNumber,
    atomicMass: { value: atomicMass, unit: 'u' },
    abundance,
    spin,
  };
}

export function listNuclides(query: z.output<typeof nuclidesQuerySchema>) {
  const { q = '', element, occurrence } = query;
  const found = fold(q) === '' ? NUCLIDES : findNuclides(q).map(({ nuclide }) => nuclide);
  const kept = found.filter(
    ({ symbol, abundance }) =>
      (element === undefined || element === symbol) &&
      (occurrence !== 'natural' || abundance !== null),
  );
  const sorted = ordered(kept, query.sort, {
    nuclide: (item) => item.name,
    atomicNumber: (item) => item.atomicNumber,
    massNumber: (item) => item.massNumber,
    atomicMass: (item) => item.atomicMass,
    abundance: (item) => item.abundance,
    spin: (item) => item.spin,
  });
  const { items, ...page } = pageOf(sorted, query);
  return { ...page, items: items.map(presentNuclide), table: HEADS.nuclides };
}
