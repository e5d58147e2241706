import { UNITS } from '#shared/units/vocabulary.ts';
import { DomainError } from '#shared/errors.ts';
import type { Formula } from '#server/physics/tables/formula.ts';
import {
  NEUTRON_EDITION,
  absorptionAt,
  neutronEntry,
} from '#server/physics/tables/neutron-lengths.ts';

const BARN = UNITS.area['barn'] ?? NaN;
const FERMI = UNITS.length['fm'] ?? NaN;
/** Bound lengths and the 1/v law are for slow neutrons: kinetic energy in eV. */
export const SLOW_NEUTRON_LIMIT = 1;
const SCATTERED_SHARE = 0.1;

export interface Sample {
  formula: Formula;
  /** Formula units per angstrom³. */
  numberDensity: number;
  /** Of the beam in the lab, angstrom. */
  wavelength: number;
  /** Absorption at this wavelength by kind of atom, angstrom², for those the table cannot tell. */
  absorption?: Readonly<Record<string, number>>;
}

/** A number, or why there is none. */
export type Told<T> = T | { unavailable: string };

export interface ScatteringLengthDensity {
  /** Σ n b', 1/angstrom². */
  value: number;
  /** Of the tabulated lengths; null where one of them has none. */
  uncertainty: number | null;
  /** Critical momentum transfer of total reflection and its glancing angle, 1/angstrom and rad; null where the density is negative. */
  critical: { q: number; angle: number } | null;
}

/** Bound cross sections of one formula unit, angstrom². */
export interface UnitCrossSections {
  coherent: number;
  incoherent: number;
}

export interface Transmission {
  /** Share that neither scatters nor is absorbed. */
  value: number;
  /** The same if only one of the two happened. */
  byScattering: number;
  byAbsorption: number;
}

function told<T>(work: () => T): Told<T> {
  try {
    return work();
  } catch (error) {
    if (error instanceof DomainError && error.code === 'invalidInput') {
      return { unavailable: error.message };
    }
    throw error;
  }
}

function refuse(message: string): never {
  throw new DomainError('invalidInput', message);
}

/**
 * Scattering length density of a material.
 *
 * Formula: rho = n Σ c_i b'_i; critical q = 4 sqrt(pi rho), glancing angle asin(q lambda/4pi).
 *
 * @param sample number density in 1/angstrom³, > 0; wavelength in angstrom, > 0
 * @returns 1/angstrom², with the standard uncertainty of the lengths; a reason for resonant atoms, whose complex length depends on
 *   the energy, and for atoms without a measured length
 *
 * Validity: slow neutrons (SLOW_NEUTRON_LIMIT); bound nuclei.
 *
 * Source of lengths: NEUTRON_SOURCE. Formula: V. F. Sears, Neutron Optics (1989), ch. 2.
 */
export function scatteringLengthDensity(sample: Sample): Told<ScatteringLengthDensity> {
  return told(() => {
    let sum = 0;
    let variance: number | null = 0;
    for (const { name, count } of sample.formula.parts) {
      const { b, resonant } = neutronEntry(name);
      if (resonant) {
        refuse(
          `${name} has a resonance for slow neutrons: its complex scattering length depends on the energy, and the table knows it near 25 meV only. No scattering length density is given.`,
        );
      }
      if (b === null) refuse(`No scattering length of ${name} is tabulated (${NEUTRON_EDITION}).`);
      sum += count * b.value;
      variance =
        variance === null || b.uncertainty === null
          ? null
          : variance + (count * b.uncertainty) ** 2;
    }
    const scale = sample.numberDensity * FERMI;
    const value = scale * sum;
    const q = 4 * Math.sqrt(Math.PI * Math.max(0, value));
    const sine = (q * sample.wavelength) / (4 * Math.PI);
    return {
      value,
      uncertainty: variance === null ? null : scale * Math.sqrt(variance),
      critical: value > 0 ? { q, angle: sine < 1 ? Math.asin(sine) : Math.PI / 2 } : null,
    };
  });
}

/** Bound scattering of one formula unit: Σ c_i σ_i, angstrom²; a reason where the table lacks one. */
export function unitScattering({ formula }: Pick<Sample, 'formula'>): Told<UnitCrossSections> {
  return told(() => {
    let coherent = 0;
    let incoherent = 0;
    for (const { name, count } of formula.parts) {
      const { sigmaCoherent, sigmaIncoherent } = neutronEntry(name);
      if (sigmaCoherent === null || sigmaIncoherent === null) {
        refuse(`The scattering of ${name} is not tabulated whole (${NEUTRON_EDITION}).`);
      }
      coherent += count * sigmaCoherent.value;
      incoherent += count * sigmaIncoherent.value;
    }
    return { coherent: coherent * BARN, incoherent: incoherent * BARN };
  });
}

/**
 * Absorption of one formula unit at the wavelength of the beam.
 *
 * Formula: Σ c_i σ_i(1.798 angstrom) lambda/1.798 angstrom; what was given for an atom is taken as it is.
 *
 * @returns angstrom²; a reason for resonant atoms whose absorption was not given, and for untabulated ones
 *
 * Validity: 1/v holds above about 0.3 angstrom, and never for resonant absorbers.
 */
export function unitAbsorption({
  formula,
  wavelength,
  absorption = {},
}: Omit<Sample, 'numberDensity'>): Told<{ value: number }> {
  return told(() => {
    let sum = 0;
    for (const { name, count } of formula.parts) {
      const given = Object.hasOwn(absorption, name) ? absorption[name] : undefined;
      sum += count * (given ?? absorptionAt(name, wavelength).value * BARN);
    }
    return { value: sum };
  });
}

/**
 * Share of a beam that passes a plate.
 *
 * Formula: exp(-n (σ_scattering + σ_absorption) t), each atom bound and by itself; what scatters once is taken as lost.
 *
 * @param thickness angstrom, >= 0
 * @param scattering σ of one formula unit, angstrom²
 * @param absorption the same
 *
 * Validity: no multiple scattering back into the beam, no Bragg edges.
 */
export function transmission(
  numberDensity: number,
  thickness: number,
  { scattering, absorption }: { scattering: number; absorption: number },
): Transmission {
  const depth = numberDensity * thickness;
  return {
    value: Math.exp(-depth * (scattering + absorption)),
    byScattering: Math.exp(-depth * scattering),
    byAbsorption: Math.exp(-depth * absorption),
  };
}

/**
 * Thickness at which a tenth of the beam has scattered.
 *
 * Formula: -ln(0.9)/(n σ_scattering).
 *
 * @returns angstrom; Infinity where nothing scatters
 *
 * Source: trade practice against multiple scattering; V. F. Sears, Adv. Phys. 24 (1975) 1.
 */
export function tenPercentThickness(numberDensity: number, scattering: number): number {
  return -Math.log1p(-SCATTERED_SHARE) / (numberDensity * scattering);
}
