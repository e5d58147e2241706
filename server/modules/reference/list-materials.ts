import type { z } from 'zod';
import type { MaterialItem, materialsQuerySchema } from '#shared/contracts/reference.ts';
import { parseFormula } from '#server/physics/tables/formula.ts';
import { MATERIALS, unitsPerVolume } from '#server/physics/tables/materials.ts';
import type { Material } from '#server/physics/tables/materials.ts';
import { fitting, rank } from './match.ts';
import { ordered, pageOf } from './paging.ts';
import { HEADS } from './table-heads.ts';

export function presentMaterial(entry: Material): MaterialItem {
  const { key, label, formula, phase, density, range, source, notes } = entry;
  const parsed = parseFormula(formula);
  const densityOf = (value: number) => ({ value, unit: 'g/cm3' });
  return {
    key,
    label,
    formula,
    phase,
    molarMass: { value: Number(parsed.molarMass.toPrecision(12)), unit: 'g/mol' },
    density: density === null ? null : densityOf(density),
    range: range && [densityOf(range[0]), densityOf(range[1])],
    unitsPerVolume:
      density === null ? null : { value: unitsPerVolume(parsed, density), unit: '1/angstrom3' },
    source,
    notes,
  };
}

const PRESENTED = MATERIALS.map(presentMaterial);

export function rankMaterial(q: string, entry: Material): number | null {
  const { key, label, formula, phase, notes } = entry;
  return rank(q, { names: [label, key, formula], words: `${phase} ${notes}` });
}

export function listMaterials(query: z.output<typeof materialsQuerySchema>) {
  const keys = fitting(MATERIALS, (entry) => rankMaterial(query.q ?? '', entry)).map(
    ({ key }) => key,
  );
  const byKey = new Map(PRESENTED.map((item) => [item.key, item]));
  const kept = keys
    .flatMap((key) => byKey.get(key) ?? [])
    .filter(({ phase }) => query.phase === undefined || phase === query.phase);
  const sorted = ordered(kept, query.sort, {
    label: (item) => item.label,
    formula: (item) => item.formula,
    density: (item) => item.density?.value ?? null,
    molarMass: (item) => item.molarMass.value,
  });
  return { ...pageOf(sorted, query), table: HEADS.materials };
}
