import { ATOMIC_MASS_UNIT, ELECTRON_MASS } from '#server/physics/constants/codata2022.ts';
import { DomainError } from '#shared/errors.ts';
import table from './nuclides/ame2012.json' with { type: 'json' };
import { speciesOfNuclide } from './species.ts';

export interface Nuclide {
  /** Symbol and mass number, such as Ca-40. */
  name: string;
  symbol: string;
  atomicNumber: number;
  massNumber: number;
  /** Mass of the neutral atom, u. */
  atomicMass: number;
  /** Mole fraction in ordinary terrestrial material; null where it does not occur. */
  abundance: number | null;
  /** Ground-state spin; null where the table does not know it. */
  spin: number | null;
}

export const NUCLIDES_EDITION = table.edition;
export const NUCLIDES_SOURCE = `${table.masses}. ${table.abundances}. ${table.spins}.`;

export const NUCLIDES_LICENCE = `Numbers with their published source; by way of ${table.obtainedFrom}`;
export const NUCLIDES_LEFT_OUT = table.leftOut;

/** Symbols in the order of atomic number, hydrogen first. */
export const ELEMENT_SYMBOLS: readonly string[] = table.elements;
const ATOMIC_NUMBERS: ReadonlyMap<string, number> = new Map(
  table.elements.map((symbol, index) => [symbol, index + 1]),
);

function read([name, mass, abundance, spin]: (string | number | null)[]): Nuclide {
  const [symbol = '', massNumber = ''] = String(name).split('-');
  const atomicNumber = ATOMIC_NUMBERS.get(symbol);
  if (atomicNumber === undefined || typeof mass !== 'number') {
    throw new Error(`Damaged row of the nuclide table: ${String(name)}`);
  }
  return {
    name: String(name),
    symbol,
    atomicNumber,
    massNumber: Number(massNumber),
    atomicMass: mass,
    abundance: typeof abundance === 'number' ? abundance : null,
    spin: typeof spin === 'number' ? spin : null,
  };
}

export const NUCLIDES: readonly Nuclide[] = table.nuclides.map(read);
const BY_NAME: ReadonlyMap<string, Nuclide> = new Map(NUCLIDES.map((entry) => [entry.name, entry]));

/** The right spelling of `ca-40`, `Ca40`, `40Ca`, `⁴⁰Ca` or `Ca 40`, or null. */
function respell(text: string): string | null {
  const plain = text.normalize('NFKC').replace(/[\s_–-]+/g, '');
  const match =
    /^([A-Za-z]{1,2})(\d{1,3})$/.exec(plain) ?? /^(\d{1,3})([A-Za-z]{1,2})$/.exec(plain);
  const [first = '', second = ''] = match?.slice(1) ?? [];
  const [letters, digits] = /\d/.test(first) ? [second, first] : [first, second];
  const name = `${letters.charAt(0).toUpperCase()}${letters.slice(1).toLowerCase()}-${Number(digits)}`;
  return BY_NAME.has(name) ? name : null;
}

/**
 * The nuclide of this name, written symbol-A as in Ca-40.
 * @throws DomainError('invalidInput') that suggests the right spelling, or the isotopes there are
 */
export function nuclide(name: string): Nuclide {
  const found = BY_NAME.get(name);
  if (found) return found;
  const spelling = respell(name);
  if (spelling !== null) {
    throw new DomainError('invalidInput', `\`${name}\` is not a nuclide; write ${spelling}.`);
  }
  const symbol = /^([A-Z][a-z]?)(?:-|$)/.exec(name)?.[1] ?? '';
  const isotopes = naturalIsotopes(symbol).map((entry) => entry.name);
  const known = isotopes.length > 0 ? `; natural isotopes: ${isotopes.join(', ')}` : '';
  throw new DomainError(
    'invalidInput',
    `\`${name}\` is not a nuclide of the table (${NUCLIDES_EDITION}): write symbol and mass number, as in Ca-40${known}.`,
  );
}

/** Isotopes of an element that occur in nature; their abundances add up to one. Empty for an unknown or artificial element. */
export function naturalIsotopes(symbol: string): Nuclide[] {
  return NUCLIDES.filter((entry) => entry.symbol === symbol && entry.abundance !== null);
}

/** Atomic number of an element's symbol. Throws DomainError('invalidInput') for one that is not there. */
export function atomicNumber(symbol: string): number {
  const found = ATOMIC_NUMBERS.get(symbol);
  if (found !== undefined) return found;
  const slip = ELEMENT_SYMBOLS.find((known) => known.toLowerCase() === symbol.toLowerCase());
  const mend = slip === undefined ? 'write its symbol, as in Ca' : `did you mean ${slip}?`;
  throw new DomainError(
    'invalidInput',
    `\`${symbol}\` is not an element; ${mend}.`.replace('?.', '?'),
  );
}

/** Mass of the neutral atom as mc², eV. */
export function atomicMassEnergy(entry: Nuclide): number {
  return entry.atomicMass * ATOMIC_MASS_UNIT;
}

/**
 * Mass of the bare nucleus as mc², eV: the atomic mass minus Z electron masses.
 * The binding energy of the electrons is left out: 3.4e-6 of the mass for uranium, 1e-8 for hydrogen.
 * Nuclides that have a name of their own (proton, deuteron, triton, helion, alpha) have that particle's CODATA mass, so that both
 * ways of writing one collision give one answer.
 */
export function nuclearMassEnergy(entry: Nuclide): number {
  const named = speciesOfNuclide(entry.name);
  return named ? named.mass : atomicMassEnergy(entry) - entry.atomicNumber * ELECTRON_MASS;
}

/** Mass as mc², eV, that a projectile of this charge number meets: a charged one the nucleus, a neutral one the whole atom. */
export function massMetBy(entry: Nuclide, projectileCharge: number): number {
  return projectileCharge === 0 ? atomicMassEnergy(entry) : nuclearMassEnergy(entry);
}
