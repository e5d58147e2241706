import {
  ATOMIC_MASS_EV,
  BOHR_ANGSTROM,
  ELEMENTARY_CHARGE_C,
  HARTREE_EV,
  HBAR_C_EV_ANGSTROM,
  PLANCK_J_S,
  SPEED_OF_LIGHT_M_S,
} from '#shared/units/codata.ts';

export interface Constant {
  value: number;
  /** Standard uncertainty in the unit of `value`; 0 where the SI makes the constant exact. */
  uncertainty: number;
  unit: string;
  edition: string;
  source: string;
}

export const CONSTANTS_EDITION = 'CODATA 2022';
const SOURCE = 'NIST, Fundamental Physical Constants, https://physics.nist.gov/constants';

const constant = (value: number, uncertainty: number, unit: string): Constant => ({
  value,
  uncertainty,
  unit,
  edition: CONSTANTS_EDITION,
  source: SOURCE,
});

/** Recommended values with all their digits. Derived exact ones (hbar c, hbar) follow from h, e and c and are checked in tests. */
export const CONSTANTS = {
  planck: constant(PLANCK_J_S, 0, 'J s'),
  elementaryCharge: constant(ELEMENTARY_CHARGE_C, 0, 'C'),
  speedOfLight: constant(SPEED_OF_LIGHT_M_S, 0, 'm/s'),
  boltzmann: constant(1.380649e-23, 0, 'J/K'),
  avogadro: constant(6.02214076e23, 0, '1/mol'),
  hbar: constant(6.582119569509066e-16, 0, 'eV s'),
  hbarC: constant(HBAR_C_EV_ANGSTROM, 0, 'eV angstrom'),
  fineStructure: constant(7.2973525643e-3, 1.1e-12, '1'),
  bohrRadius: constant(BOHR_ANGSTROM, 8.2e-11, 'angstrom'),
  hartree: constant(HARTREE_EV, 3.0e-11, 'eV'),
  classicalElectronRadius: constant(2.8179403205e-5, 1.3e-14, 'angstrom'),
  atomicMass: constant(ATOMIC_MASS_EV, 0.29, 'eV'),
  electronMass: constant(510998.95069, 1.6e-4, 'eV'),
  muonMass: constant(105658375.5, 2.3, 'eV'),
  protonMass: constant(938272089.43, 0.29, 'eV'),
  neutronMass: constant(939565421.94, 0.48, 'eV'),
  deuteronMass: constant(1875612945.0, 0.58, 'eV'),
  tritonMass: constant(2808921136.68, 0.88, 'eV'),
  helionMass: constant(2808391611.12, 0.88, 'eV'),
  alphaMass: constant(3727379411.8, 1.2, 'eV'),
} as const satisfies Readonly<Record<string, Constant>>;

/** hbar c, eV·angstrom. */
export { HBAR_C_EV_ANGSTROM };
/** hbar, eV·s. */
export const HBAR_EV_S = CONSTANTS.hbar.value;
/** Speed of light, m/s. */
export const SPEED_OF_LIGHT = SPEED_OF_LIGHT_M_S;
/** Speed of light, angstrom/s. */
export const SPEED_OF_LIGHT_ANGSTROM_S = SPEED_OF_LIGHT_M_S * 1e10;
export const FINE_STRUCTURE = CONSTANTS.fineStructure.value;
/** e²/(4 pi epsilon0) = alpha hbar c, eV·angstrom. */
export const COULOMB_EV_ANGSTROM = 14.39964546860267;
/** Boltzmann constant, eV/K. */
export const BOLTZMANN_EV_K = CONSTANTS.boltzmann.value / ELEMENTARY_CHARGE_C;
/** Avogadro constant, 1/mol. */
export const AVOGADRO = CONSTANTS.avogadro.value;
/** Bohr radius, angstrom. */
export const BOHR = BOHR_ANGSTROM;
/** Hartree energy, eV. */
export const HARTREE = HARTREE_EV;
/** Masses as mc², eV. */
export const ATOMIC_MASS_UNIT = ATOMIC_MASS_EV;
export const ELECTRON_MASS = CONSTANTS.electronMass.value;
export const MUON_MASS = CONSTANTS.muonMass.value;
export const PROTON_MASS = CONSTANTS.protonMass.value;
export const NEUTRON_MASS = CONSTANTS.neutronMass.value;
export const DEUTERON_MASS = CONSTANTS.deuteronMass.value;
export const TRITON_MASS = CONSTANTS.tritonMass.value;
export const HELION_MASS = CONSTANTS.helionMass.value;
export const ALPHA_MASS = CONSTANTS.alphaMass.value;
