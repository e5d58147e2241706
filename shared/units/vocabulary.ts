import {
  ATOMIC_MASS_EV,
  BOHR_ANGSTROM,
  ELEMENTARY_CHARGE_C,
  HARTREE_EV,
  SPEED_OF_LIGHT_M_S,
} from './codata.ts';

export type Dimension =
  | 'energy'
  | 'length'
  | 'mass'
  | 'angle'
  | 'solidAngle'
  | 'area'
  | 'volume'
  | 'energyLength'
  | 'time'
  | 'rate'
  | 'current'
  | 'density'
  | 'arealDensity'
  | 'pressure'
  | 'temperature';

const EV_PER_JOULE = 1 / ELEMENTARY_CHARGE_C;

/**
 * Factor from each unit to the internal unit of its dimension: energy eV, length angstrom, mass eV (mc²), angle rad, solid angle sr,
 * area angstrom2, volume angstrom3, energy·length `eV angstrom`, time s, rate 1/s, current A, density g/cm3, areal density 1/cm2,
 * pressure Pa, temperature K. Names are case-sensitive. Areal densities by mass need a molar mass to become a number of nuclei:
 * they stand in AREAL_MASS_UNITS.
 */
export const UNITS: { readonly [D in Dimension]: Readonly<Record<string, number>> } = {
  energy: {
    meV: 1e-3,
    eV: 1,
    keV: 1e3,
    MeV: 1e6,
    GeV: 1e9,
    J: EV_PER_JOULE,
    hartree: HARTREE_EV,
  },
  length: {
    angstrom: 1,
    pm: 1e-2,
    fm: 1e-5,
    nm: 10,
    um: 1e4,
    mm: 1e7,
    cm: 1e8,
    m: 1e10,
    bohr: BOHR_ANGSTROM,
  },
  mass: {
    u: ATOMIC_MASS_EV,
    eV: 1,
    keV: 1e3,
    MeV: 1e6,
    GeV: 1e9,
    kg: SPEED_OF_LIGHT_M_S ** 2 / ELEMENTARY_CHARGE_C,
  },
  angle: { deg: Math.PI / 180, rad: 1, mrad: 1e-3 },
  solidAngle: { sr: 1, msr: 1e-3 },
  area: {
    angstrom2: 1,
    nm2: 100,
    fm2: 1e-10,
    bohr2: BOHR_ANGSTROM ** 2,
    barn: 1e-8,
    millibarn: 1e-11,
    microbarn: 1e-14,
    cm2: 1e16,
    m2: 1e20,
  },
  volume: { angstrom3: 1, fm3: 1e-15, bohr3: BOHR_ANGSTROM ** 3 },
  energyLength: { 'eV angstrom': 1, 'MeV fm': 10 },
  time: { s: 1, ms: 1e-3, us: 1e-6, ns: 1e-9, min: 60, h: 3600 },
  rate: { '1/s': 1 },
  current: { A: 1, mA: 1e-3, uA: 1e-6, nA: 1e-9, pA: 1e-12 },
  density: { 'g/cm3': 1, 'kg/m3': 1e-3 },
  arealDensity: { '1/cm2': 1, '1/m2': 1e-4, '1/angstrom2': 1e16 },
  pressure: { Pa: 1, mbar: 100, bar: 1e5 },
  temperature: { K: 1 },
};

/** Areal densities by mass, factor to g/cm2: accepted where an areal density is, but converted by the molar mass of the target. */
export const AREAL_MASS_UNITS: Readonly<Record<string, number>> = {
  'ug/cm2': 1e-6,
  'mg/cm2': 1e-3,
  'g/cm2': 1,
};

export const INTERNAL_UNITS: { readonly [D in Dimension]: string } = {
  energy: 'eV',
  length: 'angstrom',
  mass: 'eV',
  angle: 'rad',
  solidAngle: 'sr',
  area: 'angstrom2',
  volume: 'angstrom3',
  energyLength: 'eV angstrom',
  time: 's',
  rate: '1/s',
  current: 'A',
  density: 'g/cm3',
  arealDensity: '1/cm2',
  pressure: 'Pa',
  temperature: 'K',
};

export const DIMENSION_NAMES: { readonly [D in Dimension]: string } = {
  energy: 'energy',
  length: 'length',
  mass: 'mass',
  angle: 'angle',
  solidAngle: 'solid angle',
  area: 'area',
  volume: 'volume',
  energyLength: 'energy times length',
  time: 'time',
  rate: 'rate',
  current: 'current',
  density: 'density',
  arealDensity: 'areal density',
  pressure: 'pressure',
  temperature: 'temperature',
};

export const DIMENSIONS = Object.keys(UNITS) as Dimension[];

/** Unit names a quantity of this dimension may carry, by-mass areal densities included. */
export function unitsOf(dimension: Dimension): string[] {
  const names = Object.keys(UNITS[dimension]);
  return dimension === 'arealDensity' ? [...names, ...Object.keys(AREAL_MASS_UNITS)] : names;
}

export function isUnit(unit: string, dimension: Dimension): boolean {
  return unitsOf(dimension).includes(unit);
}

/** Whether the unit gives an areal density by mass, which only a molar mass turns into a number of nuclei. */
export function isArealMassUnit(unit: string): boolean {
  return Object.hasOwn(AREAL_MASS_UNITS, unit);
}

/** Dimensions that know this unit, in the order of the vocabulary. */
export function dimensionsOf(unit: string): Dimension[] {
  return DIMENSIONS.filter((dimension) => isUnit(unit, dimension));
}

/** Units of the dimension that differ from what was written by case only. */
export function caseSlips(unit: string, dimension: Dimension): string[] {
  const lower = unit.toLowerCase();
  return unitsOf(dimension).filter((name) => name !== unit && name.toLowerCase() === lower);
}
