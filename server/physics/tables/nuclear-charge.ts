import { DomainError } from '#shared/errors.ts';
import table from './nuclear-charge/devries1987-angeli2013.json' with { type: 'json' };
import { nuclide } from './nuclides.ts';

export interface FermiShape {
  /** Half-density radius, fm. */
  c: number;
  /** Diffuseness, fm. */
  a: number;
  /** Whether the numbers were compared with a transcription of the publication, or are from memory. */
  origin: 'transcription' | 'memory';
  /** The independent number that the rms radius of this shape agrees with. */
  check: string;
}

export interface NuclearCharge {
  nuclide: string;
  /** Root-mean-square charge radius, fm. */
  rms: number;
  rmsSource: string;
  /** Null where no two-parameter Fermi shape is published, or where it contradicts the radius. */
  fermi: FermiShape | null;
}

export const NUCLEAR_CHARGE_EDITION = table.edition;
export const NUCLEAR_CHARGE_SOURCE = table.source;
export const NUCLEAR_CHARGE_LICENCE = table.licence;
export const NUCLEAR_CHARGE_NOTES: readonly string[] = table.notes;

type Cell = string | number | null;
const DROPPED: ReadonlyMap<string, Cell[]> = new Map(
  table.dropped.map((row) => [String(row[0]), row]),
);

function read([name, rms, rmsSource, c, a, origin, check]: Cell[]): NuclearCharge {
  const fermi =
    typeof c === 'number' && typeof a === 'number'
      ? {
          c,
          a,
          origin: origin === 'memory' ? ('memory' as const) : ('transcription' as const),
          check: String(check),
        }
      : null;
  return { nuclide: String(name), rms: Number(rms), rmsSource: String(rmsSource), fermi };
}

/** Every nuclide of the table, light ones first. */
export const NUCLEAR_CHARGES: readonly NuclearCharge[] = table.nuclides.map(read);
const BY_NAME: ReadonlyMap<string, NuclearCharge> = new Map(
  NUCLEAR_CHARGES.map((entry) => [entry.nuclide, entry]),
);

/**
 * Charge radius of a nuclide, with its Fermi shape where one is known.
 * @throws DomainError('invalidInput') for an unknown nuclide, and for one that the table does not have, with an estimate to enter instead
 */
export function nuclearCharge(name: string): NuclearCharge {
  const found = BY_NAME.get(name);
  if (found) return found;
  const { massNumber } = nuclide(name);
  // Rough: 0.836 A^(1/3) + 0.570 fm describes radii of A above 9 within 6 %.
  const estimate = (0.836 * Math.cbrt(massNumber) + 0.57).toFixed(2);
  throw new DomainError(
    'invalidInput',
    `No charge radius of ${name} is tabulated (${NUCLEAR_CHARGE_EDITION}): give the radius yourself; near A = ${massNumber} the rms radius is about ${estimate} fm.`,
  );
}

/**
 * Two-parameter Fermi shape of a nuclide's charge, rho proportional to 1/(1 + exp((r - c)/a)).
 *
 * @param name of a nuclide, as in Au-197
 * @returns c and a in fm, typically to 1 %; their rms radius agrees with an independent one within 1 %
 * @throws DomainError('invalidInput') where the table has none, with the shape that its rms radius allows
 *
 * Source: de Vries, de Jager and de Vries, At. Data Nucl. Data Tables 36 (1987) 495.
 */
export function fermiShape(name: string): FermiShape {
  const { fermi, rms } = nuclearCharge(name);
  if (fermi !== null) return fermi;
  const row = DROPPED.get(name);
  const why = row
    ? `the one of 1987 has an rms radius of ${row[3]} fm, against ${row[4]} fm measured since`
    : 'none is in the table';
  throw new DomainError(
    'invalidInput',
    `No two-parameter Fermi shape of ${name}: ${why}. Give c and a yourself, or take a Gaussian or uniform sphere of rms radius ${rms} fm.`,
  );
}

/** Σ over k of (-1)^(k+1) exp(-k eta)/k^order, which the closed moments leave out. */
function exponentialRest(eta: number, order: number): number {
  let sum = 0;
  for (let k = 1; k <= 60; k += 1) {
    const term = Math.exp(-k * eta) / k ** order;
    sum += k % 2 === 1 ? term : -term;
    if (term < 1e-17 * sum) break;
  }
  return sum;
}

/**
 * Root-mean-square radius of a two-parameter Fermi distribution, exactly.
 *
 * Formula: <r²> = I4/I2, I_n = ∫ r^n/(1 + exp((r - c)/a)) dr; with eta = c/a and E_m = Σ (-1)^(k+1) exp(-k eta)/k^m,
 * I2 = a³(eta³/3 + π² eta/3 + 2 E_3), I4 = a⁵(eta⁵/5 + 2π² eta³/3 + 7π⁴ eta/15 + 24 E_5).
 * Without the E this is 3c²/5 + 7π²a²/5.
 *
 * @param c half-density radius, positive, any length
 * @param a diffuseness, positive, in the same length and at most c
 * @returns rms radius in that length, to 1e-14 of itself
 * @throws DomainError('invalidInput') outside these bounds
 *
 * Source: moments of the Fermi function by polylogarithms (DLMF 25.12), derived here.
 */
export function fermiRms(c: number, a: number): number {
  if (!(a > 0 && c >= a && c < Infinity)) {
    throw new DomainError(
      'invalidInput',
      `A Fermi shape needs a positive diffuseness that is at most its radius, not c = ${c} and a = ${a}.`,
    );
  }
  const eta = c / a;
  const pi2 = Math.PI ** 2;
  const second = eta ** 3 / 3 + (pi2 * eta) / 3 + 2 * exponentialRest(eta, 3);
  const fourth =
    eta ** 5 / 5 +
    (2 * pi2 * eta ** 3) / 3 +
    (7 * pi2 ** 2 * eta) / 15 +
    24 * exponentialRest(eta, 5);
  return a * Math.sqrt(fourth / second);
}
