import { DomainError } from '#shared/errors.ts';
import table from './electron-scattering/itc-c-4.3.2.2.json' with { type: 'json' };
import { chemicalElement } from './elements.ts';

export interface ElectronScatteringFactor {
  symbol: string;
  atomicNumber: number;
  /** Heights of the five Gaussians, angstrom. */
  a: readonly number[];
  /** Widths, angstrom². */
  b: readonly number[];
  /** Largest s = q/4π of the fit, 1/angstrom. */
  fittedTo: number;
  /**
   * How far the Gaussians lie from the Mott-Bethe formula (with the form factors of Waasmaier and Kirfel 1995) at three s, as a fraction
   * of it: what a join there costs.
   */
  gaps: readonly { s: number; relative: number }[];
}

export const ELECTRON_SCATTERING_EDITION = table.edition;
export const ELECTRON_SCATTERING_SOURCE = table.source;
export const ELECTRON_SCATTERING_NOTES: readonly string[] = table.notes;

const GAPS_AT = [1, 1.5, 2];

type Row = (string | number[])[];
const ROWS: ReadonlyMap<string, Row> = new Map(table.atoms.map((row) => [String(row[0]), row]));

/**
 * Coefficients of the elastic electron scattering factor of a neutral atom.
 *
 * Formula: f_e(s) = Σ a_i exp(-b_i s²), s = sin(theta/2)/lambda = q/4π; first Born, electron of rest mass, attraction positive.
 *
 * @param symbol of an element from hydrogen to californium
 * @returns a in angstrom, b in angstrom²; the fit holds to 1 % of f_e for most atoms up to s = 1.5 per angstrom (Rb, Cs 7 %), and is low by up to 31 % at 2
 * @throws DomainError('invalidInput') for an unknown symbol or one beyond californium
 *
 * Validity: s up to `fittedTo`, beyond which Gaussians die while the true factor falls as s^-2: continue with the Mott-Bethe formula
 * f_e = (Z - f_x)/(8π² a0 s²), see `xrayFormFactor`. Fast electrons: times gamma. Positrons: opposite sign.
 *
 * Source: International Tables for Crystallography C, table 4.3.2.2; Peng et al., Acta Cryst. A52 (1996) 257.
 */
export function electronScatteringFactor(symbol: string): ElectronScatteringFactor {
  const { atomicNumber, name } = chemicalElement(symbol);
  const [, a, b, gaps] = ROWS.get(symbol) ?? [];
  if (!Array.isArray(a) || !Array.isArray(b) || !Array.isArray(gaps)) {
    throw new DomainError(
      'invalidInput',
      `The electron scattering factor of ${name.toLowerCase()} is not tabulated (${ELECTRON_SCATTERING_EDITION}): elements from H to Cf are.`,
    );
  }
  return {
    symbol,
    atomicNumber,
    a,
    b,
    fittedTo: table.fittedTo,
    gaps: gaps.map((relative, index) => ({ s: GAPS_AT[index] ?? NaN, relative })),
  };
}
