import { DomainError } from '#shared/errors.ts';
import { chemicalElement } from './elements.ts';
import table from './neutron-lengths/rauch-waschkowski-2003.json' with { type: 'json' };
import { naturalIsotopes, nuclide } from './nuclides.ts';

export interface Measured {
  value: number;
  /** Standard uncertainty; null where none is printed. */
  uncertainty: number | null;
}

export interface NeutronEntry {
  /** Element (Ni) or nuclide (Ni-58). */
  name: string;
  /** Bound coherent scattering length, fm: the real part b' of b' - i b''. Null where nobody has measured it. */
  b: Measured | null;
  /** -b'' as printed, fm; null where the table has none. */
  imaginary: number | null;
  /** Bound coherent scattering, barn per nucleus. */
  sigmaCoherent: Measured | null;
  /** Bound incoherent scattering, barn. */
  sigmaIncoherent: Measured | null;
  /** Absorption at `NEUTRON_WAVELENGTH`, barn. */
  sigmaAbsorption: Measured | null;
  /** A low level bends the absorption away from 1/v, and b depends on the energy. */
  resonant: boolean;
  /** What 4π|b|² gives, barn, where it contradicts the printed coherent cross section; null where they agree. */
  contradiction: number | null;
  remark: string;
}

export const NEUTRON_EDITION = table.edition;
export const NEUTRON_SOURCE = table.source;
export const NEUTRON_LICENCE = table.licence;
export const NEUTRON_NOTES: readonly string[] = table.notes;
/** Wavelength of the tabulated absorption, angstrom (2200 m/s). */
export const NEUTRON_WAVELENGTH = table.wavelength;
/** Elements whose length differs from Sears (1992) by more than 0.006 fm. */
export const DIFFERS_FROM_SEARS: readonly { symbol: string; here: number; sears: number }[] =
  table.differsFromSears1992.map(([symbol, here, sears]) => ({
    symbol: String(symbol),
    here: Number(here),
    sears: Number(sears),
  }));

/** Where the printed imaginary part implies another absorption than the printed one, barn at `NEUTRON_WAVELENGTH`. */
export const ABSORPTION_CONTRADICTIONS: ReadonlyMap<string, number> = new Map(
  table.absorptionExceptions.map((row) => [String(row[0]), Number(row[3])]),
);

type Cell = string | number | boolean | null;
const CONTRADICTIONS: ReadonlyMap<string, number> = new Map(
  table.exceptions.map((row) => [String(row[0]), Number(row[3])]),
);

function measured(value: Cell | undefined, uncertainty: Cell | undefined): Measured | null {
  if (typeof value !== 'number') return null;
  return { value, uncertainty: typeof uncertainty === 'number' ? uncertainty : null };
}

function read(row: Cell[]): NeutronEntry {
  const [name, b, ub, coherent, uc, incoherent, ui, absorbed, ua, imaginary, resonant, remark] =
    row;
  return {
    name: String(name),
    b: measured(b, ub),
    imaginary: typeof imaginary === 'number' ? imaginary : null,
    sigmaCoherent: measured(coherent, uc),
    sigmaIncoherent: measured(incoherent, ui),
    sigmaAbsorption: measured(absorbed, ua),
    resonant: resonant === true,
    contradiction: CONTRADICTIONS.get(String(name)) ?? null,
    remark: String(remark),
  };
}

/** Every row of the table, in its order. */
export const NEUTRON_ENTRIES: readonly NeutronEntry[] = table.entries.map(read);
const BY_NAME: ReadonlyMap<string, NeutronEntry> = new Map(
  NEUTRON_ENTRIES.map((entry) => [entry.name, entry]),
);

function refuse(message: string): never {
  throw new DomainError('invalidInput', message);
}

const isotopesOf = (symbol: string): string[] =>
  NEUTRON_ENTRIES.filter(({ name }) => name.startsWith(`${symbol}-`)).map(({ name }) => name);

/**
 * The row of an element or nuclide. An element of one natural isotope, which the table prints once, is found under both names.
 * @throws DomainError('invalidInput') for an unknown name, and where the table has no such row, with the isotopes it has
 */
export function neutronEntry(name: string): NeutronEntry {
  const found = BY_NAME.get(name);
  if (found) return found;
  const isNuclide = /\d/.test(name);
  const symbol = isNuclide ? nuclide(name).symbol : chemicalElement(name).symbol;
  const [only, ...others] = naturalIsotopes(symbol);
  const same = isNuclide ? undefined : BY_NAME.get(only?.name ?? '');
  if (same && others.length === 0) return { ...same, name };
  const known = isotopesOf(symbol);
  const has = known.length > 0 ? `; of this element it has ${known.join(', ')}` : '';
  refuse(`The table of neutron scattering lengths (${NEUTRON_EDITION}) has no ${name}${has}.`);
}

/**
 * Bound coherent scattering length.
 *
 * @param name of an element (Ni) or nuclide (Ni-58)
 * @returns real part in fm with its standard uncertainty, and -b'' where tabulated; f = -b for a fixed nucleus
 * @throws DomainError('invalidInput') for an unknown name, and where no length has been measured
 *
 * Validity: slow neutrons, below about 1 eV; for `resonant` entries the value holds near 25 meV only.
 *
 * Source: `NEUTRON_SOURCE`.
 */
export function boundLength(name: string): Measured & { imaginary: number | null } {
  const { b, imaginary } = neutronEntry(name);
  if (b !== null) return { ...b, imaginary };
  refuse(
    `No scattering length of ${name} has been measured (${NEUTRON_EDITION}): give \`b\` yourself, or name the natural element.`,
  );
}

/**
 * Absorption cross section at a wavelength, by the 1/v law.
 *
 * Formula: sigma(lambda) = sigma(1.798 angstrom) · lambda/1.798 angstrom.
 *
 * @param name of an element or nuclide
 * @param wavelength in angstrom, positive; the law holds above about 0.3
 * @returns barn, with the standard uncertainty of the table
 * @throws DomainError('invalidInput') for an unknown name, a wavelength that is not positive, a nuclide without a tabulated absorption, and
 * resonant absorbers, whose absorption does not follow 1/v
 *
 * Source: `NEUTRON_SOURCE`.
 */
export function absorptionAt(name: string, wavelength: number): Measured {
  if (!(wavelength > 0 && wavelength < Infinity)) {
    refuse(`A wavelength of ${wavelength} angstrom is not positive.`);
  }
  const { resonant, sigmaAbsorption } = neutronEntry(name);
  if (resonant) {
    refuse(
      `${name} absorbs slow neutrons through a resonance: its cross section does not follow 1/v, and the table knows it at ${NEUTRON_WAVELENGTH} angstrom only. Give the cross section at your wavelength.`,
    );
  }
  if (sigmaAbsorption === null) {
    refuse(
      `No absorption cross section of ${name} is tabulated (${NEUTRON_EDITION}): give your own.`,
    );
  }
  const { value, uncertainty } = sigmaAbsorption;
  const factor = wavelength / NEUTRON_WAVELENGTH;
  return { value: value * factor, uncertainty: uncertainty === null ? null : uncertainty * factor };
}
