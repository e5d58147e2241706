import { useMemo, useState } from 'react';
import { MAX_ORIGINAL, MAX_POINTS } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import type { Layout } from './model/layout.ts';
import type { Columns } from './model/columns.ts';
import { guessColumns, unitIn } from './model/columns.ts';
import { cutTable, readRows, thinned } from './model/read-table.ts';
import type { RawTable, ReadRows } from './model/read-table.ts';

export interface Source {
  name: string;
  text: string;
}

/** What the person has decided; what is left out is guessed from the text. */
interface Decisions {
  layout: Partial<Layout>;
  columns: Partial<Columns>;
  lengthUnit?: string;
  energyUnit?: string;
  sorted: boolean;
  leftOut: boolean;
}

const UNDECIDED: Decisions = { layout: {}, columns: {}, sorted: false, leftOut: false };
const FEWEST_ROWS = 4;

function refusalOf({ rows, faults }: ReadRows, { columns, lines, refused }: RawTable) {
  const count = rows.length;
  if (refused !== null) return refused;
  if (columns === 1)
    return 'There is one column only; a table needs r and V. Is the separator right?';
  return faults.length === 0 && lines.length > 0 && count < FEWEST_ROWS
    ? `${count} ${count === 1 ? 'row is' : 'rows are'} too few for a spline; at least ${FEWEST_ROWS} are needed.`
    : null;
}

/** The text of a table as it is read now, and how that is changed. */
export function useTableReading(initial: Source, before: InteractionTerm) {
  const [source, setSource] = useState(initial);
  const [decided, setDecided] = useState<Decisions>(UNDECIDED);
  const raw = useMemo(() => cutTable(source.text, decided.layout), [source.text, decided.layout]);
  const guessed = guessColumns(raw);
  const columns = {
    r: Math.min(decided.columns.r ?? guessed.r, Math.max(0, raw.columns - 1)),
    V: Math.min(decided.columns.V ?? guessed.V, Math.max(0, raw.columns - 1)),
  };
  const { sorted, leftOut } = decided;
  const read = useMemo(
    () => readRows(raw, { r: columns.r, V: columns.V }, { sorted, leftOut }),
    [raw, columns.r, columns.V, sorted, leftOut],
  );
  const rows = useMemo(() => thinned(read.rows, MAX_POINTS), [read.rows]);
  const given = (key: string, fallback: string) => {
    const value = before[key];
    return typeof value === 'string' ? value : fallback;
  };
  const lengthUnit =
    decided.lengthUnit ??
    unitIn(raw.header?.[columns.r], 'length') ??
    given('lengthUnit', 'angstrom');
  const energyUnit =
    decided.energyUnit ?? unitIn(raw.header?.[columns.V], 'energy') ?? given('energyUnit', 'eV');
  const refusal = refusalOf(read, raw);
  const open = read.faults.length > 0 || raw.ambiguous !== null;
  const sound = refusal === null && !open && rows.length >= FEWEST_ROWS;
  const kept = source.text.length <= MAX_ORIGINAL;
  return {
    source,
    raw,
    columns,
    lengthUnit,
    energyUnit,
    sorted,
    leftOut,
    read,
    rows,
    refusal,
    sound,
    /** The original is kept with the case unless it is too long. */
    kept,
    /** A new text: what was decided for the old one is forgotten. */
    setSource: (next: Source) => {
      setSource(next);
      if (next.name !== source.name) setDecided(UNDECIDED);
    },
    decide: (next: Partial<Decisions>) => setDecided((now) => ({ ...now, ...next })),
    /** Settles one thing about how the text is cut; the other goes on being guessed. */
    cut: (next: Partial<Layout>) =>
      setDecided((now) => ({ ...now, layout: { ...now.layout, ...next } })),
    layout: { ...raw.layout, ...decided.layout },
    /** The members of the term this table makes. */
    members: sound
      ? {
          lengthUnit,
          energyUnit,
          points: rows,
          ...(kept && { original: { name: source.name, text: source.text } }),
        }
      : null,
  };
}

export type TableReading = ReturnType<typeof useTableReading>;
