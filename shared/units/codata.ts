/**
 * Constants that unit conversions need: CODATA 2022 recommended values (NIST, https://physics.nist.gov/constants, public domain).
 * e, h and c are exact by the SI. The engine's own list, with uncertainties, is server/physics/constants.
 */
export const ELEMENTARY_CHARGE_C = 1.602176634e-19;
export const PLANCK_J_S = 6.62607015e-34;
export const SPEED_OF_LIGHT_M_S = 299792458;
/** Bohr radius, angstrom. */
export const BOHR_ANGSTROM = 0.529177210544;
/** Hartree energy, eV. */
export const HARTREE_EV = 27.211386245981;
/** Atomic mass unit, eV. */
export const ATOMIC_MASS_EV = 931494103.72;
/** hbar c = h c/(2 pi e), exact by the SI and rounded to the nearest double, eV·angstrom. */
export const HBAR_C_EV_ANGSTROM = 1973.2698045930247;
