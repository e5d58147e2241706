import { BOHR } from '#server/physics/constants/codata2022.ts';
import { DomainError } from '#shared/errors.ts';
import table from './screening/published.json' with { type: 'json' };

export type ScreeningKey = 'moliere' | 'krc' | 'universalIon';

export interface Screening {
  key: ScreeningKey;
  label: string;
  /** The length over the Bohr radius, as printed. */
  lengthFormula: string;
  /** Number before the powers of the charges in that length. */
  prefactor: number;
  /** Weights of the exponentials. */
  weights: readonly number[];
  /** Their decays per screening length. */
  decays: readonly number[];
  /** What the printed weights add up to, less 1. */
  residual: number;
  source: string;
}

export const SCREENING_EDITION = table.edition;
export const SCREENING_SOURCE = table.source;
export const SCREENING_NOTES: readonly string[] = table.notes;
/** (9π²/128)^(1/3), the Thomas-Fermi prefactor that the printed ones round. */
export const THOMAS_FERMI_PREFACTOR = Math.cbrt((9 * Math.PI ** 2) / 128);

const KEYS: readonly ScreeningKey[] = ['moliere', 'krc', 'universalIon'];

/** The published screening functions, with their coefficients as printed. */
export const SCREENINGS: readonly Screening[] = KEYS.map((key) => {
  const entry = table.screenings.find((row) => row.key === key);
  if (!entry) throw new Error(`Damaged table of screening functions: no ${key}`);
  return { ...entry, key };
});

/**
 * Coefficients of a published screening function.
 *
 * Formula: V(r) = Z1 Z2 e²/r · Σ w_i exp(-d_i r/a).
 *
 * @param key moliere, krc or universalIon
 * @returns weights w (1 in sum but for `residual`), decays d, and how the length a is made
 * @throws DomainError('invalidInput') for another key
 *
 * Source: `source` of each entry.
 */
export function screening(key: string): Screening {
  const found = SCREENINGS.find((entry) => entry.key === key);
  if (found) return found;
  throw new DomainError(
    'invalidInput',
    `\`${key}\` is not a screening function; known: ${KEYS.join(', ')}.`,
  );
}

function checkCharge(name: string, charge: number): void {
  if (charge >= 1 && charge <= 200) return;
  throw new DomainError(
    'invalidInput',
    `\`${name}\` is an atomic number from 1 to 200, not ${charge}.`,
  );
}

/**
 * Thomas-Fermi length of Molière's screening.
 *
 * Formula: a = 0.88534 a0 Z^(-1/3).
 *
 * @param atomicNumber of the atom, 1 to 200
 * @returns angstrom, to the five digits of the prefactor
 * @throws DomainError('invalidInput') outside that range
 *
 * Validity: Z above about 10. Source: Molière, Z. Naturforsch. 2a (1947) 133.
 */
export function thomasFermiLength(atomicNumber: number): number {
  checkCharge('Z', atomicNumber);
  return (screening('moliere').prefactor * BOHR) / Math.cbrt(atomicNumber);
}

/**
 * Screening length of an ion and an atom.
 *
 * Formula: krc a = 0.8853 a0 (√Z1 + √Z2)^(-2/3); universalIon a = 0.8854 a0/(Z1^0.23 + Z2^0.23).
 *
 * @param key krc or universalIon
 * @param z1 atomic number of the ion, 1 to 200
 * @param z2 atomic number of the atom, 1 to 200
 * @returns angstrom, symmetric in the two, to the four digits of the prefactors
 * @throws DomainError('invalidInput') outside that range
 *
 * Source: Wilson, Haggmark and Biersack 1977; Ziegler, Biersack and Littmark 1985.
 */
export function ionAtomLength(key: 'krc' | 'universalIon', z1: number, z2: number): number {
  checkCharge('Z1', z1);
  checkCharge('Z2', z2);
  const unit = screening(key).prefactor * BOHR;
  if (key === 'krc') return unit / Math.cbrt((Math.sqrt(z1) + Math.sqrt(z2)) ** 2);
  return unit / (z1 ** 0.23 + z2 ** 0.23);
}
