import { readUnit } from '#shared/units/unit-words.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import type { RawTable } from './read-table.ts';

export interface Columns {
  r: number;
  V: number;
}

const RADIUS = /^(r|radius|distance|x)\b/i;
const POTENTIAL = /^(v|u|pot\w*|energy|e)\b/i;

/** Which columns hold r and V, by their names, else the first two. */
export function guessColumns({ header, columns }: RawTable): Columns {
  const names = header ?? [];
  const r = Math.max(
    0,
    names.findIndex((name) => RADIUS.test(name)),
  );
  const named = names.findIndex((name, i) => i !== r && POTENTIAL.test(name));
  if (named >= 0) return { r, V: named };
  return { r, V: r === 0 ? Math.min(1, Math.max(0, columns - 1)) : 0 };
}

/** What column i is called on the page. */
export function columnName({ header }: RawTable, i: number): string {
  const name = header?.[i]?.trim() ?? '';
  return name === '' ? `column ${i + 1}` : `column ${i + 1}, ${name.slice(0, 24)}`;
}

/** The unit that a name carries: `r (fm)`, `V [MeV]`, `r/fm`, `V in eV`, `r_fm`. */
export function unitIn(name: string | undefined, dimension: Dimension): string | null {
  if (name === undefined) return null;
  const candidates = [
    /[([]\s*([^)\]]+?)\s*[)\]]/.exec(name)?.[1],
    /\/\s*(\S+)$/.exec(name)?.[1],
    /\bin\s+(\S+)$/.exec(name)?.[1],
    /[_\s](\S+)$/.exec(name)?.[1],
  ];
  for (const candidate of candidates) {
    const unit = candidate === undefined ? null : readUnit(candidate, dimension);
    if (unit) return unit.unit;
  }
  return null;
}
