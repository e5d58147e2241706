import { AVOGADRO, CONSTANTS } from '#server/physics/constants/codata2022.ts';
import { DomainError } from '#shared/errors.ts';
import type { Phase } from './elements.ts';
import type { Formula } from './formula.ts';
import table from './materials/handbooks-2024.json' with { type: 'json' };

export interface Material {
  key: string;
  label: string;
  /** Read it with `parseFormula`. */
  formula: string;
  phase: Exclude<Phase, 'unknown'>;
  /** g/cm³ at 20 °C and one atmosphere; null for gases. */
  density: number | null;
  /** Lowest and highest density sold under this name, g/cm³; null where it hardly varies. */
  range: readonly [number, number] | null;
  source: string;
  /** What to know or to ask before use. */
  notes: string;
}

export const MATERIALS_EDITION = table.edition;
export const MATERIALS_SOURCE = table.source;
export const MATERIALS_LICENCE = table.licence;
export const MATERIALS_NOTES: readonly string[] = table.notes;

const SOURCES: ReadonlyMap<string, string> = new Map(Object.entries(table.sources));

type Cell = string | number | number[] | null;

function read([key, label, formula, density, range, phase, source, notes]: Cell[]): Material {
  const [low, high] = Array.isArray(range) ? range : [];
  return {
    key: String(key),
    label: String(label),
    formula: String(formula),
    phase: phase === 'gas' || phase === 'liquid' ? phase : 'solid',
    density: typeof density === 'number' ? density : null,
    range: low !== undefined && high !== undefined ? [low, high] : null,
    source: SOURCES.get(String(source)) ?? String(source),
    notes: String(notes),
  };
}

export const MATERIALS: readonly Material[] = table.materials.map(read);
const BY_KEY: ReadonlyMap<string, Material> = new Map(MATERIALS.map((entry) => [entry.key, entry]));

function refuse(message: string): never {
  throw new DomainError('invalidInput', message);
}

/**
 * The material of this key.
 * @throws DomainError('invalidInput') with the keys that resemble what was written, or all of them
 */
export function material(key: string): Material {
  const found = BY_KEY.get(key);
  if (found) return found;
  const plain = key.trim().toLowerCase();
  const near = MATERIALS.filter(
    (entry) =>
      plain !== '' &&
      [entry.key, entry.label.toLowerCase(), entry.formula.toLowerCase()].some(
        (name) => name === plain || (plain.length > 2 && name.includes(plain)),
      ),
  );
  const hint =
    near.length > 0
      ? `did you mean ${near.map((entry) => entry.key).join(' or ')}?`
      : `known: ${MATERIALS.map((entry) => entry.key).join(', ')}; anything else by formula and density.`;
  refuse(`\`${key}\` is not a material of the table: ${hint}`);
}

/**
 * Density of a solid or liquid material.
 * @returns g/cm³, to the range that `material(key)` states
 * @throws DomainError('invalidInput') for an unknown key, and for a gas, whose density follows from pressure and temperature
 */
export function materialDensity(key: string): number {
  const { density, label } = material(key);
  if (density !== null) return density;
  refuse(`${label} is a gas: give its pressure and temperature instead of a density.`);
}

/**
 * Formula units per volume of a solid or liquid.
 *
 * Formula: n = rho N_A/M.
 *
 * @param formula from `parseFormula`
 * @param density in g/cm³, positive; up to 30, above which none is known
 * @returns per angstrom³, to the uncertainty of density and weights; times the count for one kind of atom
 * @throws DomainError('invalidInput') for a density outside that range
 *
 * Source: definition.
 */
export function unitsPerVolume(formula: Formula, density: number): number {
  if (!(density > 0 && density <= 30)) {
    refuse(
      `A density of ${density} g/cm³ is not that of a solid or liquid (above 0, at most 30): check the unit.`,
    );
  }
  return (density * AVOGADRO * 1e-24) / formula.molarMass;
}

/**
 * Molecules per volume of a gas.
 *
 * Formula: n = p/(k T), ideal.
 *
 * @param pressure in Pa, positive, at most 1e8
 * @param temperature in K, positive, at most 1e5
 * @returns per angstrom³; at one bar and 20 °C true to 1e-3, at 10 bar to 1e-2 for light gases
 * @throws DomainError('invalidInput') outside these ranges
 *
 * Validity: not near condensation. Source: ideal-gas law.
 */
export function gasUnitsPerVolume(pressure: number, temperature: number): number {
  if (!(pressure > 0 && pressure <= 1e8)) {
    refuse(`A gas pressure of ${pressure} Pa is out of range: above 0, at most 1e8 Pa (1000 bar).`);
  }
  if (!(temperature > 0 && temperature <= 1e5)) {
    refuse(
      `A gas temperature of ${temperature} K is out of range: above 0, at most 1e5 K; 20 °C is 293.15 K.`,
    );
  }
  return (pressure * 1e-30) / (CONSTANTS.boltzmann.value * temperature);
}
