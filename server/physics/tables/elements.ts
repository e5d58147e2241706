import { DomainError } from '#shared/errors.ts';
import table from './elements/ciaaw2021.json' with { type: 'json' };

export type Phase = 'solid' | 'liquid' | 'gas' | 'unknown';

export interface ChemicalElement {
  atomicNumber: number;
  symbol: string;
  name: string;
  /** Standard atomic weight, g/mol; null where no isotope lives long enough to define one. */
  weight: number | null;
  weightUncertainty: number | null;
  /** Lowest and highest standard weight where natural material varies; null elsewhere. */
  interval: readonly [number, number] | null;
  /** At 20 °C and one atmosphere. */
  phase: Phase;
  /** g/cm³ at 20 °C unless `densityNote` says otherwise; null for gases and where nobody has measured it. */
  density: number | null;
  densityNote: string;
}

export const ELEMENTS_EDITION = table.edition;
export const ELEMENTS_SOURCE = table.source;
export const ELEMENTS_LICENCE = table.licence;
export const ELEMENTS_NOTES: readonly string[] = table.notes;

type Cell = string | number | number[] | null;
const numberOrNull = (cell: Cell | undefined): number | null =>
  typeof cell === 'number' ? cell : null;

function read([
  z,
  symbol,
  name,
  weight,
  uncertainty,
  interval,
  phase,
  density,
  note,
]: Cell[]): ChemicalElement {
  const [low, high] = Array.isArray(interval) ? interval : [];
  return {
    atomicNumber: Number(z),
    symbol: String(symbol),
    name: String(name),
    weight: numberOrNull(weight),
    weightUncertainty: numberOrNull(uncertainty),
    interval: low !== undefined && high !== undefined ? [low, high] : null,
    phase: phase === 'solid' || phase === 'liquid' || phase === 'gas' ? phase : 'unknown',
    density: numberOrNull(density),
    densityNote: String(note),
  };
}

/** In the order of atomic number, hydrogen first. */
export const ELEMENTS: readonly ChemicalElement[] = table.elements.map(read);
const BY_SYMBOL: ReadonlyMap<string, ChemicalElement> = new Map(
  ELEMENTS.map((entry) => [entry.symbol, entry]),
);

/** Spellings that people use beside the table's names. */
const OTHER_NAMES: ReadonlyMap<string, string> = new Map([
  ['aluminum', 'Al'],
  ['cesium', 'Cs'],
  ['sulphur', 'S'],
  ['deuterium', 'H-2'],
  ['tritium', 'H-3'],
  ['graphite', 'C'],
]);

function mend(text: string): string {
  const plain = text.trim().toLowerCase();
  const nuclide = /^([a-z]{1,2})[\s_–-]*\d{1,3}$|^\d{1,3}[\s_–-]*([a-z]{1,2})$/.exec(plain);
  const symbol = nuclide?.[1] ?? nuclide?.[2];
  const known = ELEMENTS.find((entry) => entry.symbol.toLowerCase() === (symbol ?? plain));
  if (known && symbol !== undefined) return `for the natural element write ${known.symbol}`;
  if (known) return `did you mean ${known.symbol} (${known.name.toLowerCase()})?`;
  const named = ELEMENTS.find((entry) => entry.name.toLowerCase() === plain);
  const other = named?.symbol ?? OTHER_NAMES.get(plain);
  return other === undefined ? 'write its symbol, as in Ca' : `write ${other}`;
}

/**
 * The element of this symbol.
 * @throws DomainError('invalidInput') that says which symbol was probably meant
 */
export function chemicalElement(symbol: string): ChemicalElement {
  const found = BY_SYMBOL.get(symbol);
  if (found) return found;
  const hint = mend(symbol);
  throw new DomainError(
    'invalidInput',
    `\`${symbol}\` is not an element: ${hint}${hint.endsWith('?') ? '' : '.'}`,
  );
}

/**
 * Standard atomic weight of an element, abridged where it is an interval.
 *
 * @param symbol of the element, as in Ca
 * @returns g/mol; its uncertainty stands in `chemicalElement(symbol).weightUncertainty`
 * @throws DomainError('invalidInput') for an unknown symbol, and where no standard weight exists
 *
 * Source: CIAAW 2021 (Prohaska et al., Pure Appl. Chem. 94 (2022) 573).
 */
export function atomicWeight(symbol: string): number {
  const entry = chemicalElement(symbol);
  if (entry.weight !== null) return entry.weight;
  throw new DomainError(
    'invalidInput',
    `${entry.name} has no standard atomic weight (${ELEMENTS_EDITION}): it has no isotope stable enough. Name a nuclide, as in Tc-99.`,
  );
}

/**
 * Density of the bulk element at 20 °C.
 *
 * @param symbol of the element, as in Ca
 * @returns g/cm³; films and powders differ by several per cent, and `densityNote` says what is known
 * @throws DomainError('invalidInput') for a gas, whose density follows from pressure and temperature, and where none is tabulated
 *
 * Source: CRC Handbook, 80th edition (1999), as in the ILL Neutron Data Booklet.
 */
export function elementDensity(symbol: string): number {
  const entry = chemicalElement(symbol);
  if (entry.density !== null) return entry.density;
  throw new DomainError(
    'invalidInput',
    entry.phase === 'gas'
      ? `${entry.name} is a gas at 20 °C: give its pressure and temperature instead of a density.`
      : `No density of ${entry.name.toLowerCase()} is tabulated: give the density of your material.`,
  );
}
