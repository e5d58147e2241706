import { DomainError } from '#shared/errors.ts';
import { atomicWeight, chemicalElement } from './elements.ts';
import { readFormula } from './formula-reader.ts';
import { nuclide } from './nuclides.ts';

export interface FormulaPart {
  /** Element (C) or nuclide (H-2). */
  name: string;
  symbol: string;
  /** Null for the natural mixture of isotopes. */
  massNumber: number | null;
  /** Atoms of it in one formula unit. */
  count: number;
  /** Of one atom, g/mol. */
  molarMass: number;
}

export interface Formula {
  /** As it was given. */
  text: string;
  /** Like atoms added up, in the order of first appearance. */
  parts: readonly FormulaPart[];
  /** Atoms in one formula unit. */
  atoms: number;
  /** Of one formula unit, g/mol. */
  molarMass: number;
}

function partOf(name: string, count: number): FormulaPart {
  const [symbol = '', massNumber] = name.split('-');
  if (massNumber === undefined) {
    return { name, symbol, massNumber: null, count, molarMass: atomicWeight(symbol) };
  }
  chemicalElement(symbol);
  return {
    name,
    symbol,
    massNumber: Number(massNumber),
    count,
    molarMass: nuclide(name).atomicMass,
  };
}

/**
 * Composition and molar mass of a chemical formula.
 *
 * Formula: M = Σ n_i m_i, with standard atomic weights for elements and atomic masses for nuclides.
 *
 * Written as in C10H8O4, Al2(SO4)3, CaSO4·2H2O or Fe0.95O. Isotopes: D and T, [10B]4C or ¹⁰B₄C, a leading mass number where one element
 * stands alone (3He), and symbol-mass number without a count (Li-6F).
 *
 * @param text of at most 200 characters, brackets nested at most 8 deep, counts between 1e-6 and 1e6
 * @returns parts, atoms per formula unit, and g/mol with the relative uncertainty of the weights (1e-5 typically, 9e-3 for lithium)
 * @throws DomainError('invalidInput') that shows the place and the mend
 *
 * Source of weights and masses: ELEMENTS_SOURCE, NUCLIDES_SOURCE.
 */
export function parseFormula(text: string): Formula {
  const counts = readFormula(text);
  const parts = [...counts].map(([name, count]) => partOf(name, count));
  return {
    text,
    parts,
    atoms: parts.reduce((sum, { count }) => sum + count, 0),
    molarMass: parts.reduce((sum, { count, molarMass }) => sum + count * molarMass, 0),
  };
}

/**
 * Atoms of one kind in a formula unit. Throws DomainError('invalidInput') where the formula has none, naming what it has.
 * Elements and nuclides are different kinds: H2O has H, D2O has H-2.
 */
export function countOf(formula: Formula, name: string): number {
  const found = formula.parts.find((part) => part.name === name);
  if (found) return found.count;
  const known = formula.parts.map((part) => part.name).join(', ');
  throw new DomainError(
    'invalidInput',
    `\`${formula.text}\` contains no ${name || 'nameless atom'}: choose one of ${known}.`,
  );
}
